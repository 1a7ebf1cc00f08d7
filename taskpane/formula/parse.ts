/** Formula tokens to a small tree, by precedence climbing. Only as much of the grammar as reading arguments needs. */
import { FormulaError, tokenize, type Token } from './tokens';

interface Span {
  /** place in the formula text, end exclusive */
  readonly start: number;
  readonly end: number;
}
export type Node = Span &
  (
    | { readonly kind: 'text'; readonly value: string }
    | { readonly kind: 'number'; readonly value: number }
    | { readonly kind: 'boolean'; readonly value: boolean }
    | { readonly kind: 'error'; readonly value: string }
    | { readonly kind: 'missing' }
    | {
        readonly kind: 'reference';
        readonly sheet: string | null;
        readonly text: string;
        readonly spill: boolean;
      }
    | { readonly kind: 'structured'; readonly table: string; readonly specifier: string }
    | { readonly kind: 'name'; readonly sheet: string | null; readonly name: string }
    | { readonly kind: 'call'; readonly name: string; readonly args: readonly Node[] }
    | { readonly kind: 'array'; readonly rows: readonly (readonly Node[])[] }
    | { readonly kind: 'unary'; readonly operator: string; readonly value: Node }
    | { readonly kind: 'binary'; readonly operator: string; readonly left: Node; readonly right: Node }
  );

/** Binding strength, after the host's own order: range, then ^, * /, + -, &, comparison. */
const STRENGTH: Readonly<Record<string, number>> = {
  '=': 1,
  '<': 1,
  '>': 1,
  '<=': 1,
  '>=': 1,
  '<>': 1,
  '&': 2,
  '+': 3,
  '-': 3,
  '*': 4,
  '/': 4,
  '^': 5,
  ':': 8,
};
/** a sign binds tighter than ^ in a spreadsheet: -2^2 is 4 */
const SIGN_STRENGTH = 6;

class Parser {
  private index = 0;
  constructor(
    private readonly tokens: readonly Token[],
    private readonly length: number,
  ) {}

  private peek(): Token | undefined {
    return this.tokens[this.index];
  }

  private take(): Token {
    const token = this.tokens[this.index];
    if (!token) throw new FormulaError('the formula ends too early', this.length);
    this.index++;
    return token;
  }

  private expect(kind: Token['kind']): Token {
    const token = this.take();
    if (token.kind !== kind) throw new FormulaError(`"${token.text}" is not expected here`, token.start);
    return token;
  }

  whole(): Node {
    const node = this.expression(0);
    const rest = this.peek();
    if (rest) throw new FormulaError(`"${rest.text}" is not expected here`, rest.start);
    return node;
  }

  private expression(least: number): Node {
    let left = this.operand();
    for (;;) {
      const token = this.peek();
      if (token?.kind !== 'operator') return left;
      if (token.text === '%') {
        this.take();
        left = { kind: 'unary', operator: '%', value: left, start: left.start, end: token.end };
        continue;
      }
      const strength = STRENGTH[token.text];
      if (strength === undefined || strength <= least) return left;
      this.take();
      const right = this.expression(strength);
      left = { kind: 'binary', operator: token.text, left, right, start: left.start, end: right.end };
    }
  }

  private operand(): Node {
    const token = this.take();
    const { start, end } = token;
    switch (token.kind) {
      case 'text':
        return { kind: 'text', value: token.text, start, end };
      case 'number':
        return { kind: 'number', value: Number(token.text), start, end };
      case 'error':
        return { kind: 'error', value: token.text, start, end };
      case 'reference':
        return { kind: 'reference', sheet: token.sheet, text: token.text, spill: token.spill, start, end };
      case 'structured':
        return { kind: 'structured', table: token.text, specifier: token.specifier, start, end };
      case 'name':
        if (/^(?:true|false)$/i.test(token.text)) {
          return { kind: 'boolean', value: token.text.toLowerCase() === 'true', start, end };
        }
        return { kind: 'name', sheet: token.sheet, name: token.text, start, end };
      case 'function':
        return this.call(token);
      case 'open': {
        const inner = this.expression(0);
        const close = this.expect('close');
        return { ...inner, start, end: close.end };
      }
      case 'array-open':
        return this.array(token);
      case 'operator':
        if (token.text === '@') return this.operand();
        if (token.text === '-' || token.text === '+') {
          const value = this.expression(SIGN_STRENGTH);
          return { kind: 'unary', operator: token.text, value, start, end: value.end };
        }
    }
    throw new FormulaError(`"${token.text}" is not expected here`, start);
  }

  private call(name: Token): Node {
    this.expect('open');
    const args: Node[] = [];
    let close = this.peek();
    if (close?.kind === 'close') {
      this.take();
      return { kind: 'call', name: name.text, args, start: name.start, end: close.end };
    }
    for (;;) {
      const next = this.peek();
      if (next?.kind === 'separator' || next?.kind === 'close') {
        args.push({ kind: 'missing', start: next.start, end: next.start });
      } else args.push(this.expression(0));
      close = this.take();
      if (close.kind === 'close') {
        return { kind: 'call', name: name.text, args, start: name.start, end: close.end };
      }
      if (close.kind !== 'separator')
        throw new FormulaError(`"${close.text}" is not expected here`, close.start);
    }
  }

  private array(open: Token): Node {
    const rows: Node[][] = [[]];
    for (;;) {
      rows[rows.length - 1]?.push(this.expression(0));
      const next = this.take();
      if (next.kind === 'array-close') return { kind: 'array', rows, start: open.start, end: next.end };
      if (next.kind === 'row-separator') rows.push([]);
      else if (next.kind !== 'separator')
        throw new FormulaError(`"${next.text}" is not expected here`, next.start);
    }
  }
}

/** Throws FormulaError when the text is no formula of the supported grammar. */
export function parseFormula(formula: string): Node {
  return new Parser(tokenize(formula), formula.length).whole();
}

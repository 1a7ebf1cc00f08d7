/**
 * Splits a formula (file form: English names, comma separators) into tokens. Handles quoted text and sheet names,
 * cell, column and row ranges, spill marks, structured references, array constants and error words.
 */
import { parseArea } from '../address';

export type TokenKind =
  | 'text'
  | 'number'
  | 'reference'
  | 'structured'
  | 'name'
  | 'function'
  | 'error'
  | 'operator'
  | 'open'
  | 'close'
  | 'separator'
  | 'array-open'
  | 'array-close'
  | 'row-separator';

export interface Token {
  readonly kind: TokenKind;
  /** the value for text (unquoted), the address without sheet for references, the word otherwise */
  readonly text: string;
  /** sheet written before a reference or name; null when none */
  readonly sheet: string | null;
  /** `B4#` */
  readonly spill: boolean;
  /** what stands between the brackets of a structured reference */
  readonly specifier: string;
  readonly start: number;
  readonly end: number;
}

/** The formula cannot be read; `at` is the character where it stops making sense. */
export class FormulaError extends Error {
  constructor(
    message: string,
    readonly at: number,
  ) {
    super(message);
    this.name = 'FormulaError';
  }
}

const WORD = /[\p{L}\p{N}_.$?\\]/u;
const NUMBER = /^(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?/;
const ERROR = /^#(?:N\/A|VALUE!|REF!|DIV\/0!|NUM!|NAME\?|NULL!|SPILL!|CALC!|GETTING_DATA|BUSY!|FIELD!)/i;
const OPERATOR = /^(?:<=|>=|<>|[-+*/^&=<>%@:])/;

function readQuoted(source: string, start: number, quote: string): { text: string; end: number } {
  let text = '';
  let at = start + 1;
  for (;;) {
    const next = source.indexOf(quote, at);
    if (next < 0) throw new FormulaError('a quotation mark is not closed', start);
    text += source.slice(at, next);
    if (source[next + 1] !== quote) return { text, end: next + 1 };
    text += quote;
    at = next + 2;
  }
}

/** From an opening bracket to the one that closes it; `'` escapes the next character inside. */
function readBrackets(source: string, start: number): { text: string; end: number } {
  let depth = 0;
  for (let at = start; at < source.length; at++) {
    const c = source[at];
    if (c === "'") at++;
    else if (c === '[') depth++;
    else if (c === ']' && --depth === 0) return { text: source.slice(start + 1, at), end: at + 1 };
  }
  throw new FormulaError('a bracket is not closed', start);
}

function wordEnd(source: string, start: number): number {
  let end = start;
  while (end < source.length && WORD.test(source[end] ?? '')) end++;
  return end;
}

/** Tokens of the text after the leading "=" (or of a bare expression). Positions count from the start of `formula`. */
export function tokenize(formula: string): Token[] {
  const tokens: Token[] = [];
  let at = formula.startsWith('=') ? 1 : 0;
  let braces = 0;

  const push = (kind: TokenKind, text: string, end: number, extra: Partial<Token> = {}): void => {
    tokens.push({ kind, text, sheet: null, spill: false, specifier: '', start: at, end, ...extra });
    at = end;
  };

  /** A word (maybe after a sheet name): reference, structured reference, function or name. */
  const readWord = (from: number, sheet: string | null): void => {
    const end = wordEnd(formula, from);
    const word = formula.slice(from, end);
    if (formula[end] === ':') {
      const lastEnd = wordEnd(formula, end + 1);
      const pair = formula.slice(from, lastEnd);
      if (parseArea(pair, '')) {
        push('reference', pair, lastEnd, { sheet });
        return;
      }
    }
    if (formula[end] === '[' && word !== '') {
      const inside = readBrackets(formula, end);
      push('structured', word, inside.end, { sheet, specifier: inside.text });
      return;
    }
    if (formula[end] === '(') {
      push('function', word, end);
      return;
    }
    if (parseArea(word, '')) {
      const spill = formula[end] === '#';
      push('reference', word, spill ? end + 1 : end, { sheet, spill });
      return;
    }
    if (word === '') {
      const error = ERROR.exec(formula.slice(from));
      if (!error) throw new FormulaError('a sheet name without a cell', from);
      push('error', error[0].toUpperCase(), from + error[0].length);
      return;
    }
    push('name', word, end, { sheet });
  };

  while (at < formula.length) {
    const c = formula[at] ?? '';
    const rest = formula.slice(at);
    const number = NUMBER.exec(rest);
    const error = c === '#' ? ERROR.exec(rest) : null;
    const operator = OPERATOR.exec(rest);
    if (/\s/.test(c)) at++;
    else if (c === '"') {
      const quoted = readQuoted(formula, at, '"');
      push('text', quoted.text, quoted.end);
    } else if (c === "'") {
      const quoted = readQuoted(formula, at, "'");
      if (formula[quoted.end] !== '!') throw new FormulaError('a quoted sheet name without "!"', at);
      readWord(quoted.end + 1, quoted.text);
    } else if (error) push('error', error[0].toUpperCase(), at + error[0].length);
    else if (c === '(') push('open', c, at + 1);
    else if (c === ')') push('close', c, at + 1);
    else if (c === '{') {
      braces++;
      push('array-open', c, at + 1);
    } else if (c === '}') {
      braces--;
      push('array-close', c, at + 1);
    } else if (c === ',') push('separator', c, at + 1);
    else if (c === ';') push(braces > 0 ? 'row-separator' : 'separator', c, at + 1);
    else if (number && !/^\d+:\$?\d/.test(rest) && !/[\p{L}_]/u.test(formula[at + number[0].length] ?? '')) {
      push('number', number[0], at + number[0].length);
    } else if (c === '[') {
      // [Book.xlsx]Sheet!A1: another workbook, which no adapter can read; kept as a name that resolves to nothing
      const book = readBrackets(formula, at);
      const end = wordEnd(formula, book.end);
      if (formula[end] === '!')
        push('name', formula.slice(at, wordEnd(formula, end + 1)), wordEnd(formula, end + 1));
      else push('structured', '', book.end, { specifier: book.text });
    } else if (WORD.test(c)) {
      const end = wordEnd(formula, at);
      if (formula[end] === '!') readWord(end + 1, formula.slice(at, end));
      else readWord(at, null);
    } else if (operator) push('operator', operator[0], at + operator[0].length);
    else throw new FormulaError(`"${c}" does not belong in a formula`, at);
  }
  return tokens;
}

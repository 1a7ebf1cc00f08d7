/**
 * Arithmetic in a cell (contract 2.7). mathjs parses the text into our own node classes; whatever is not a number, a name,
 * one of + - * / ^, a pair of brackets or one of eleven functions has no class to become and is refused with a reason. The
 * tree is then compiled once into a closure over an array of numbers, so evaluating never touches mathjs or a name again.
 */
import { makeParser } from './mathjs';
import { remember } from './memo';
import { nearest } from './near';

/** env[0] is x; the other places are the table's names. */
export type Closure = (env: readonly number[]) => number;

export interface Node {
  /** names used, x and pi left out */
  collect(names: Set<string>): boolean;
  compile(slot: (name: string) => number): Closure;
}

export interface Expression {
  readonly text: string;
  readonly names: readonly string[];
  readonly usesX: boolean;
  readonly root: Node;
}

export type ExpressionResult =
  | { readonly ok: true; readonly expression: Expression }
  /** reason: a code of messages.ts */
  | { readonly ok: false; readonly reason: string; readonly found: string; readonly suggestion?: string };

const FUNCTIONS: ReadonlyMap<
  string,
  { readonly least: number; readonly most: number; readonly apply: (...a: number[]) => number }
> = new Map([
  ['sqrt', { least: 1, most: 1, apply: Math.sqrt }],
  ['abs', { least: 1, most: 1, apply: Math.abs }],
  ['min', { least: 1, most: 20, apply: Math.min }],
  ['max', { least: 1, most: 20, apply: Math.max }],
  ['sin', { least: 1, most: 1, apply: Math.sin }],
  ['cos', { least: 1, most: 1, apply: Math.cos }],
  ['tan', { least: 1, most: 1, apply: Math.tan }],
  ['exp', { least: 1, most: 1, apply: Math.exp }],
  ['log', { least: 1, most: 1, apply: Math.log }],
]);

/** Names that mean something already and cannot be given by `names`. */
export const RESERVED: ReadonlySet<string> = new Set(['x', 'pi', 'span', ...FUNCTIONS.keys()]);

const OPERATIONS: ReadonlyMap<string, number> = new Map([
  ['add', 2],
  ['subtract', 2],
  ['multiply', 2],
  ['divide', 2],
  ['pow', 2],
  ['unaryMinus', 1],
  ['unaryPlus', 1],
]);

/** Thrown by a node class to leave the parser; never leaves this file. */
class Refusal extends Error {
  constructor(
    readonly reason: string,
    readonly found: string,
    readonly suggestion?: string,
  ) {
    super(reason);
  }
}

/** Base of all nodes: the parser looks for isNode on the prototype. */
class Base {}
Object.defineProperty(Base.prototype, 'isNode', { value: true });

export class ConstantNode extends Base implements Node {
  readonly isConstantNode = true;
  readonly value: number;
  constructor(value: unknown) {
    super();
    if (typeof value !== 'number') {
      throw new Refusal('not-allowed', typeof value === 'string' ? 'a text in quotes' : String(value));
    }
    this.value = value;
  }
  collect(): boolean {
    return false;
  }
  compile(): Closure {
    const { value } = this;
    return () => value;
  }
}

export class SymbolNode extends Base implements Node {
  readonly isSymbolNode = true;
  constructor(readonly name: string) {
    super();
  }
  collect(names: Set<string>): boolean {
    if (this.name === 'x') return true;
    if (FUNCTIONS.has(this.name)) throw new Refusal('function-without-brackets', this.name);
    if (this.name !== 'pi') names.add(this.name);
    return false;
  }
  compile(slot: (name: string) => number): Closure {
    if (this.name === 'pi') return () => Math.PI;
    const i = this.name === 'x' ? 0 : slot(this.name);
    return (env) => env[i]!;
  }
}

export class OperatorNode extends Base implements Node {
  readonly isOperatorNode = true;
  constructor(
    readonly op: string,
    readonly fn: string,
    readonly args: readonly Node[],
    implicit = false,
    percent = false,
  ) {
    super();
    if (percent) throw new Refusal('not-allowed', 'a percent sign');
    if (implicit) throw new Refusal('missing-operator', '');
    if (OPERATIONS.get(fn) !== args.length) throw new Refusal('not-allowed', `"${op}"`);
  }
  collect(names: Set<string>): boolean {
    let usesX = false;
    for (const arg of this.args) usesX = arg.collect(names) || usesX;
    return usesX;
  }
  compile(slot: (name: string) => number): Closure {
    const [left, right] = this.args;
    const a = left!.compile(slot);
    if (this.fn === 'unaryPlus') return a;
    if (this.fn === 'unaryMinus') return (env) => -a(env);
    const b = right!.compile(slot);
    switch (this.fn) {
      case 'add':
        return (env) => a(env) + b(env);
      case 'subtract':
        return (env) => a(env) - b(env);
      case 'multiply':
        return (env) => a(env) * b(env);
      case 'divide':
        return (env) => a(env) / b(env);
      default:
        return (env) => a(env) ** b(env);
    }
  }
}

export class ParenthesisNode extends Base implements Node {
  readonly isParenthesisNode = true;
  constructor(readonly content: Node) {
    super();
  }
  collect(names: Set<string>): boolean {
    return this.content.collect(names);
  }
  compile(slot: (name: string) => number): Closure {
    return this.content.compile(slot);
  }
}

export class FunctionNode extends Base implements Node {
  readonly isFunctionNode = true;
  readonly name: string;
  constructor(
    readonly fn: object,
    readonly args: readonly Node[],
  ) {
    super();
    this.name = fn instanceof SymbolNode ? fn.name : '';
    const known = FUNCTIONS.get(this.name);
    if (known === undefined) {
      throw new Refusal('unknown-function', this.name || 'a bracket', nearest(this.name, FUNCTIONS.keys()));
    }
    if (args.length < known.least || args.length > known.most) {
      throw new Refusal('wrong-arguments', this.name);
    }
  }
  collect(names: Set<string>): boolean {
    let usesX = false;
    for (const arg of this.args) usesX = arg.collect(names) || usesX;
    return usesX;
  }
  compile(slot: (name: string) => number): Closure {
    const { apply } = FUNCTIONS.get(this.name)!;
    const parts = this.args.map((arg) => arg.compile(slot));
    if (parts.length === 1) {
      const [a] = parts;
      return (env) => apply(a!(env));
    }
    return (env) => apply(...parts.map((part) => part(env)));
  }
}

/** A node class whose construct is refused. */
const refused = (what: string) =>
  class {
    constructor() {
      throw new Refusal('not-allowed', what);
    }
  };

const parse = makeParser({
  ConstantNode,
  SymbolNode,
  OperatorNode: OperatorNode as never,
  FunctionNode: FunctionNode as never,
  ParenthesisNode: ParenthesisNode as never,
  AccessorNode: refused('a dot or an index'),
  ArrayNode: refused('a list in square brackets'),
  AssignmentNode: refused('"="'),
  BlockNode: refused('";"'),
  ConditionalNode: refused('"?"'),
  FunctionAssignmentNode: refused('"="'),
  IndexNode: refused('a dot or an index'),
  ObjectNode: refused('a list in curly brackets'),
  RangeNode: refused('":"'),
  RelationalNode: refused('a comparison'),
});

/** Bounds: the parser calls itself for each bracket, and a cell is no program. */
const MOST_CHARACTERS = 500;
const MOST_BRACKETS = 30;

/** Reads an expression; remembered per text. */
export const parseExpression: (text: string) => ExpressionResult = remember(read);

function read(text: string): ExpressionResult {
  if (text.length > MOST_CHARACTERS || nesting(text) > MOST_BRACKETS) {
    return { ok: false, reason: 'expression-too-long', found: text };
  }
  // Line breaks and comments would be grammar to the parser; here they are none.
  const stray = /[#\n\r'"`\\;&|!=<>?:[\]{}%~@$]/.exec(text);
  if (stray !== null) return { ok: false, reason: 'not-allowed', found: `"${stray[0]}"` };
  try {
    const root = parse(text.replace(/[\u2212\u2013]/g, '-').replace(/[\u00b7\u22c5\u00d7]/g, '*')) as Node;
    const names = new Set<string>();
    const usesX = root.collect(names);
    return { ok: true, expression: { text, names: [...names], usesX, root } };
  } catch (problem) {
    if (problem instanceof Refusal) {
      const { reason, found, suggestion } = problem;
      return { ok: false, reason, found, ...(suggestion === undefined ? {} : { suggestion }) };
    }
    return { ok: false, reason: 'not-understood', found: text };
  }
}

function nesting(text: string): number {
  let depth = 0;
  let most = 0;
  for (const sign of text) {
    if (sign === '(') most = Math.max(most, (depth += 1));
    else if (sign === ')') depth -= 1;
  }
  return most;
}

/**
 * The two parts of mathjs that the row language uses, made from their factories so that nothing else of the library is
 * shipped: the expression parser, given our own node classes, and the Unit class, given plain number arithmetic.
 */
import { createParse, createUnitClass } from 'mathjs';

/** The parser fills in these classes; a class that throws makes its construct unreachable. */
export interface NodeClasses {
  readonly ConstantNode: new (value: unknown) => object;
  readonly SymbolNode: new (name: string) => object;
  readonly OperatorNode: new (
    op: string,
    fn: string,
    args: object[],
    implicit?: boolean,
    percent?: boolean,
  ) => object;
  readonly FunctionNode: new (fn: object, args: object[]) => object;
  readonly ParenthesisNode: new (content: object) => object;
  readonly AccessorNode: new () => object;
  readonly ArrayNode: new () => object;
  readonly AssignmentNode: new () => object;
  readonly BlockNode: new () => object;
  readonly ConditionalNode: new () => object;
  readonly FunctionAssignmentNode: new () => object;
  readonly IndexNode: new () => object;
  readonly ObjectNode: new () => object;
  readonly RangeNode: new () => object;
  readonly RelationalNode: new () => object;
}

export interface MathUnit {
  readonly value: number | null;
  readonly units: readonly {
    readonly unit: { readonly name: string; readonly value: number };
    readonly prefix: { readonly value: number };
    readonly power: number;
  }[];
  /** exponents of mass, length, time, current, temperature, luminous intensity, amount, angle, bits */
  readonly dimensions: readonly number[];
}

export interface MathUnitClass {
  parse(text: string): MathUnit;
  createUnit(
    definitions: Readonly<Record<string, string | { definition: string; prefixes?: string }>>,
    options?: { override?: boolean },
  ): unknown;
}

// The factories are documented exports of mathjs but missing from its type declarations. They are imported by name, so that
// the bundler can leave the rest of the library out.
declare module 'mathjs' {
  export function createParse(parts: object): (text: string) => object;
  export function createUnitClass(parts: object): MathUnitClass;
}

const config = { number: 'number', predictable: false, relTol: 1e-12, absTol: 1e-15 };

/** text -> syntax tree of the given classes; throws SyntaxError. */
export function makeParser(classes: NodeClasses): (text: string) => object {
  // `typed` dispatches on the argument's type at run time; here the argument is always one text.
  const typed = Object.assign(
    (_name: string, signatures: { readonly string: (text: string) => object }) => signatures.string,
    { addConversion: () => undefined },
  );
  return createParse({ ...classes, typed, config, numeric: (text: string) => Number(text) });
}

/** The Unit class over plain numbers. */
export function makeUnitClass(): MathUnitClass {
  const absent = () => {
    throw new Error('only plain numbers are used here');
  };
  return createUnitClass({
    config,
    addScalar: (a: number, b: number) => a + b,
    subtractScalar: (a: number, b: number) => a - b,
    multiplyScalar: (a: number, b: number) => a * b,
    divideScalar: (a: number, b: number) => a / b,
    pow: Math.pow,
    abs: Math.abs,
    fix: Math.trunc,
    round: Math.round,
    equal: (a: number, b: number) => a === b,
    isNumeric: (a: unknown) => typeof a === 'number',
    format: String,
    number: Number,
    // Temperatures and reactive power are defined with these at load time; no row can use them.
    Fraction: class {
      constructor(
        readonly n: number,
        readonly d: number,
      ) {}
    },
    Complex: { I: absent },
    BigNumber: absent,
  });
}

/**
 * A host for the built bundle: runs dist/functions.js in a context of its own that holds nothing but `CustomFunctions`,
 * and calls the functions with the arguments a spreadsheet would deliver.
 *
 * - an omitted argument arrives as null; a single cell given to a matrix parameter as [[v]];
 * - a blank cell arrives as 0 on the desktop and as null on the web: every call can be made in either way.
 */
import fs from 'node:fs';
import path from 'node:path';
import vm from 'node:vm';

const dist = path.resolve(__dirname, '../../dist');

export interface Parameter {
  readonly name: string;
  readonly description: string;
  readonly optional?: boolean;
  readonly dimensionality?: 'matrix';
  readonly type: string;
  readonly customEnumId?: string;
}
export interface FunctionMetadata {
  readonly id: string;
  readonly name: string;
  readonly description: string;
  readonly helpUrl: string;
  readonly parameters: readonly Parameter[];
  readonly result: { readonly type?: string; readonly dimensionality?: 'matrix' };
}
export interface Metadata {
  readonly functions: readonly FunctionMetadata[];
  readonly enums: readonly {
    readonly id: string;
    readonly values: readonly { readonly stringValue: string }[];
  }[];
}

/** The error class of the host, as the bundle sees it. */
export class HostError {
  constructor(
    readonly code: string,
    readonly message?: string,
  ) {}
}
export const ErrorCode = {
  invalidValue: '#VALUE!',
  notAvailable: '#N/A',
  invalidNumber: '#NUM!',
  divisionByZero: '#DIV/0!',
  nullReference: '#NULL!',
} as const;

export const BUNDLE = read('functions.js');
export const METADATA = JSON.parse(read('functions.json')) as Metadata;

function read(file: string): string {
  try {
    return fs.readFileSync(path.join(dist, file), 'utf8');
  } catch {
    throw new Error(`dist/${file} is missing: run "npm run build" first ("npm test" does it by itself).`);
  }
}

/** What the bundle registers, in a context without window, document or anything else of a page. */
export function loadBundle(): ReadonlyMap<string, (...args: unknown[]) => unknown> {
  const registered = new Map<string, (...args: unknown[]) => unknown>();
  const CustomFunctions = {
    associate(id: string, body: (...args: unknown[]) => unknown) {
      registered.set(id, body);
    },
    Error: HostError,
    ErrorCode,
  };
  vm.runInNewContext(BUNDLE, { CustomFunctions }, { filename: 'functions.js' });
  return registered;
}

const FUNCTIONS = loadBundle();

/** A cell nobody wrote in. */
export const BLANK = Symbol('a blank cell');
/** An argument nobody gave. */
export const OMITTED = Symbol('an omitted argument');

export type Blanks = 0 | null;
export const BLANK_BEHAVIOURS: readonly Blanks[] = [0, null];

/** Calls a function as a host does; gives what it returns or the HostError it throws. */
export function call(id: string, args: readonly unknown[], blanks: Blanks = null): unknown {
  const described = METADATA.functions.find((one) => one.id === id);
  const body = FUNCTIONS.get(id);
  if (!described || !body) throw new Error(`no function ${id}`);
  if (args.length > described.parameters.length) throw new Error(`too many arguments for ${id}`);
  const delivered = described.parameters.map((parameter, i) => {
    const given = i < args.length ? args[i] : OMITTED;
    if (given === OMITTED) {
      if (!parameter.optional) throw new Error(`${id} needs ${parameter.name}`);
      return null;
    }
    const cell = (one: unknown): unknown => (one === BLANK ? blanks : one);
    if (parameter.dimensionality !== 'matrix') return cell(given);
    return Array.isArray(given) ? given.map((row: unknown[]) => row.map(cell)) : [[cell(given)]];
  });
  try {
    return body(...delivered);
  } catch (thrown) {
    if (thrown instanceof HostError) return thrown;
    throw thrown; // nothing but the host's error may leave a function
  }
}

/** The number of a call that gives one, as a number or as a spill of one cell. */
export function number(id: string, args: readonly unknown[], blanks: Blanks = null): number {
  const result = call(id, args, blanks);
  if (typeof result === 'number') return result;
  if (Array.isArray(result) && result.length === 1) {
    const [row] = result as unknown[][];
    if (row?.length === 1 && typeof row[0] === 'number') return row[0];
  }
  throw new Error(`${id} gave ${JSON.stringify(result)}`);
}

/** The spill of a call that gives one. */
export function spill(id: string, args: readonly unknown[], blanks: Blanks = null): unknown[][] {
  const result = call(id, args, blanks);
  if (!Array.isArray(result)) throw new Error(`${id} gave ${JSON.stringify(result)}`);
  return result as unknown[][];
}

/** The error of a call that fails. */
export function failure(
  id: string,
  args: readonly unknown[],
  blanks: Blanks = null,
): { code: string; message: string } {
  const result = call(id, args, blanks);
  if (!(result instanceof HostError)) throw new Error(`${id} gave ${JSON.stringify(result)} and no error`);
  return { code: result.code, message: result.message ?? '' };
}

/** Rows of a table, filled up to eight columns with blank cells. */
export function rows(...table: readonly (readonly unknown[])[]): unknown[][] {
  return table.map((row) => [...row, ...Array<unknown>(8 - row.length).fill(BLANK)]);
}

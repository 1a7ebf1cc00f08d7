/**
 * The functions bundle, loaded the way the spreadsheet host loads it: `functions.js` registers each id through
 * `CustomFunctions.associate`, `functions.json` describes the parameters. Nothing here knows what the functions do.
 */

/** One parameter as functions.json describes it. */
export interface ParameterMetadata {
  readonly name: string;
  readonly description?: string;
  /** 'any' | 'string' | 'number' | 'boolean' | the name of a custom enumeration */
  readonly type?: string;
  readonly dimensionality?: 'scalar' | 'matrix';
  readonly optional?: boolean;
  readonly repeating?: boolean;
}

export interface FunctionMetadata {
  /** the id the bundle registers, e.g. "DEFLECTION" */
  readonly id: string;
  /** the name shown in the sheet, without the namespace */
  readonly name: string;
  readonly description?: string;
  readonly helpUrl?: string;
  readonly parameters: readonly ParameterMetadata[];
  readonly result?: { readonly type?: string; readonly dimensionality?: 'scalar' | 'matrix' };
}

export type CustomFunction = (...values: unknown[]) => unknown;

export interface FunctionsBundle {
  readonly namespace: string;
  readonly metadata: readonly FunctionMetadata[];
  readonly functions: ReadonlyMap<string, CustomFunction>;
}

/** The namespace of the manifest; functions.json does not carry it. */
export const NAMESPACE = 'SPANROW';

/** Worksheet error codes, as the functions runtime of the host names them. */
export const ERROR_CODES = {
  invalidValue: '#VALUE!',
  notAvailable: '#N/A',
  divisionByZero: '#DIV/0!',
  invalidNumber: '#NUM!',
  nullReference: '#NULL!',
  invalidName: '#NAME?',
  invalidReference: '#REF!',
} as const;
export type WorksheetError = (typeof ERROR_CODES)[keyof typeof ERROR_CODES];

/** What a function throws to put an error, and a sentence with it, into its cell. */
export class HostError extends Error {
  readonly code: WorksheetError;
  constructor(code: WorksheetError, message?: string) {
    super(message ?? '');
    this.name = 'CustomFunctions.Error';
    this.code = code;
  }
}

/** A stand-in for the host's `CustomFunctions` object that records what a bundle registers. */
export interface CustomFunctionsShim {
  associate(id: string, body: CustomFunction): void;
  associate(table: Readonly<Record<string, CustomFunction>>): void;
  readonly Error: typeof HostError;
  readonly ErrorCode: typeof ERROR_CODES;
}

export function createShim(into: Map<string, CustomFunction>): CustomFunctionsShim {
  return {
    associate(first: string | Readonly<Record<string, CustomFunction>>, body?: CustomFunction): void {
      if (typeof first === 'string') {
        if (typeof body !== 'function') throw new TypeError(`associate("${first}") was given no function`);
        into.set(first, body);
      } else for (const [id, one] of Object.entries(first)) into.set(id, one);
    },
    Error: HostError,
    ErrorCode: ERROR_CODES,
  };
}

/** Checks that the metadata and the registered functions are about the same ids; a difference would be #NAME? in the host. */
export function assembleBundle(
  metadata: { readonly functions?: readonly FunctionMetadata[] },
  functions: ReadonlyMap<string, CustomFunction>,
): FunctionsBundle {
  const described = metadata.functions ?? [];
  const missing = described.filter(({ id }) => !functions.has(id)).map(({ id }) => id);
  const extra = [...functions.keys()].filter((id) => !described.some((one) => one.id === id));
  if (missing.length > 0 || extra.length > 0)
    throw new Error(
      `functions.js and functions.json differ: not registered ${missing.join(', ') || '-'}, not described ${extra.join(', ') || '-'}`,
    );
  return { namespace: NAMESPACE, metadata: described, functions };
}

/** Evaluates the text of functions.js against a fresh shim (Node: tests, recalculation, the demo script). */
export function evaluateBundle(code: string, metadataText: string): FunctionsBundle {
  const functions = new Map<string, CustomFunction>();
  // The bundle is our own build output, the same file the page loads by a script element.
  // eslint-disable-next-line @typescript-eslint/no-implied-eval
  const run = new Function('CustomFunctions', code) as (shim: CustomFunctionsShim) => void;
  run(createShim(functions));
  return assembleBundle(JSON.parse(metadataText) as { functions: FunctionMetadata[] }, functions);
}

/** Loads the bundle of a page: the shim becomes the global the script expects, then the script element runs. */
export async function loadBundle(base: string): Promise<FunctionsBundle> {
  const functions = new Map<string, CustomFunction>();
  (globalThis as { CustomFunctions?: unknown }).CustomFunctions = createShim(functions);
  const [metadata] = await Promise.all([
    fetchJson(`${base}functions.json`),
    loadScript(`${base}functions.js`),
  ]);
  return assembleBundle(metadata as { functions: FunctionMetadata[] }, functions);
}

async function fetchJson(address: string): Promise<unknown> {
  const response = await fetch(address);
  if (!response.ok) throw new Error(`${address}: ${response.status} ${response.statusText}`);
  return response.json();
}

function loadScript(address: string): Promise<void> {
  return new Promise((resolve, reject) => {
    const script = document.createElement('script');
    script.src = address;
    script.onload = () => resolve();
    script.onerror = () => reject(new Error(`${address} could not be loaded`));
    document.head.append(script);
  });
}

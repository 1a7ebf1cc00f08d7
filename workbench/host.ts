/**
 * The custom-function host: turns a functions bundle into functions of the spreadsheet engine, with the habits of the host
 * that will run the same bundle (see the platform notes of the documentation of custom functions):
 * - an omitted argument arrives as null, a single cell given to a matrix parameter as [[v]];
 * - a blank cell arrives as 0 on the desktop and as null on the web: both can be chosen, results must not differ;
 * - a cell holding an error arrives as an object with its basic value when it stands inside a range, and ends the call when it is
 *   the argument itself;
 * - NaN, Infinity, null and undefined inside a returned matrix become 0, a lone one becomes #NUM!.
 * An exception never leaves `calculate`: it would end the whole calculation of the workbook.
 */
import {
  ArrayValueObject,
  BaseFunction,
  BooleanValueObject,
  ErrorType,
  ErrorValueObject,
  FunctionType,
  NumberValueObject,
  StringValueObject,
  type BaseValueObject,
  type IFunctionInfo,
} from '@univerjs/engine-formula';
import {
  ERROR_CODES,
  type CustomFunction,
  type FunctionMetadata,
  type FunctionsBundle,
  type ParameterMetadata,
} from './bundle';

/** How a blank cell reaches a function: 0 as on the desktop, null as on the web. */
export type BlankCells = 'zero' | 'empty';

/** Where a call stands, as the engine names it. */
export interface CellAddress {
  readonly unitId: string;
  readonly sheetId: string;
  readonly row: number;
  readonly column: number;
}

export interface FunctionHost {
  /** function classes with their full names, for the engine's registration */
  readonly functions: [new (name: string) => BaseFunction, string][];
  /** descriptions for autocompletion and argument help */
  readonly descriptions: IFunctionInfo[];
  blankCells: BlankCells;
  /** number of calls and time spent in the bundle's functions since the last reset, for the bench and the status line */
  spent: { calls: number; milliseconds: number };
  /** hears of every call, for progress on long files */
  onCall: ((calls: number) => void) | null;
  /** begins a calculation: messages of earlier ones are dropped as their cells are computed again */
  beginRun(): void;
  /** the sentence that came with the error of a cell's own call, or null */
  messageAt(cell: CellAddress): string | null;
}

const ERROR_TYPES = new Set<string>(Object.values(ERROR_CODES));
const now: () => number = () => performance.now();

export function createHost(bundle: FunctionsBundle, options: { blankCells?: BlankCells } = {}): FunctionHost {
  const messages = new Map<string, { run: number; text: string }>();
  let run = 0;
  const keyOf = (cell: CellAddress) => `${cell.unitId}/${cell.sheetId}/${cell.row}/${cell.column}`;

  const host: FunctionHost = {
    functions: [],
    descriptions: bundle.metadata.map((one) => describeFunction(bundle.namespace, one)),
    blankCells: options.blankCells ?? 'zero',
    spent: { calls: 0, milliseconds: 0 },
    onCall: null,
    beginRun: () => void (run += 1),
    messageAt: (cell) => messages.get(keyOf(cell))?.text ?? null,
  };

  function note(caller: BaseFunction, text: string | null): void {
    if (text === null && messages.size === 0) return;
    const key = keyOf({
      unitId: caller.unitId ?? '',
      sheetId: caller.subUnitId ?? '',
      row: caller.row,
      column: caller.column,
    });
    if (text !== null) messages.set(key, { run, text });
    else if ((messages.get(key)?.run ?? run) !== run) messages.delete(key);
  }

  for (const metadata of bundle.metadata) {
    const body = bundle.functions.get(metadata.id);
    if (body === undefined) continue;
    const call = compileCall(metadata, body, host);
    class HostedFunction extends BaseFunction {
      override calculate(...values: BaseValueObject[]): BaseValueObject {
        const started = now();
        const outcome = call(values);
        host.spent.calls += 1;
        host.spent.milliseconds += now() - started;
        host.onCall?.(host.spent.calls);
        note(this, outcome.message);
        return outcome.value;
      }
    }
    host.functions.push([HostedFunction, `${bundle.namespace}.${metadata.name}`]);
  }
  return host;
}

interface Outcome {
  readonly value: BaseValueObject;
  readonly message: string | null;
}

function fail(code: string, message: string): Outcome {
  const type = (ERROR_TYPES.has(code) ? code : ErrorType.VALUE) as ErrorType;
  return { value: ErrorValueObject.create(type, message), message: message === '' ? null : message };
}

/** One call: values of the engine in, plain values to the function, its result or error back. */
function compileCall(
  metadata: FunctionMetadata,
  body: CustomFunction,
  host: FunctionHost,
): (values: BaseValueObject[]) => Outcome {
  const { parameters } = metadata;
  const required = parameters.filter((one) => one.optional !== true).length;
  return (values) => {
    if (values.length > parameters.length)
      return fail(
        '#VALUE!',
        `${metadata.name} takes at most ${parameters.length} arguments, ${values.length} were given.`,
      );
    const plain: unknown[] = [];
    for (const [index, parameter] of parameters.entries()) {
      const value = values[index];
      if (value === undefined || (value.isNull() && !value.isArray())) {
        if (index < required)
          return fail('#VALUE!', `${metadata.name} needs its argument "${parameter.name}".`);
        plain.push(null);
        continue;
      }
      const argument =
        parameter.dimensionality === 'matrix'
          ? matrixArgument(value, host.blankCells)
          : scalarArgument(value, parameter, host);
      if (argument instanceof Refusal) return fail(argument.code, argument.message);
      plain.push(argument);
    }
    try {
      return { value: toValueObject(body(...plain)), message: null };
    } catch (error) {
      const { code, message } = error as { code?: unknown; message?: unknown };
      return fail(
        typeof code === 'string' ? code : '#VALUE!',
        typeof message === 'string' ? message : String(error),
      );
    }
  };
}

class Refusal {
  constructor(
    readonly code: string,
    readonly message: string,
  ) {}
}

/**
 * A range of the engine as rows of plain values. The engine keeps one array object per range and calculation, so that the rows of
 * a template used by thousands of formulas are read once; the copy is kept with it.
 */
const matrices = new WeakMap<BaseValueObject, { blank: BlankCells; rows: unknown[][] }>();

function matrixArgument(value: BaseValueObject, blank: BlankCells): unknown[][] | Refusal {
  if (value.isError()) return new Refusal((value as ErrorValueObject).getErrorType(), '');
  if (!value.isArray()) return [[plainValue(value, blank)]];
  const kept = matrices.get(value);
  if (kept !== undefined && kept.blank === blank) return kept.rows;
  const rows = (value as ArrayValueObject)
    .getArrayValue()
    .map((row) => Array.from(row, (cell) => plainValue(cell, blank)));
  matrices.set(value, { blank, rows });
  return rows;
}

function scalarArgument(value: BaseValueObject, parameter: ParameterMetadata, host: FunctionHost): unknown {
  let one: BaseValueObject | null | undefined | void = value;
  if (value.isArray()) {
    const array = value as ArrayValueObject;
    if (array.getRowCount() !== 1 || array.getColumnCount() !== 1)
      return new Refusal(
        '#VALUE!',
        `The argument "${parameter.name}" takes one cell, a range of ${array.getRowCount()} x ${array.getColumnCount()} was given.`,
      );
    one = array.get(0, 0);
  }
  if (one?.isError() === true) return new Refusal((one as ErrorValueObject).getErrorType(), '');
  const plain = plainValue(one, host.blankCells);
  // What the host does before a function sees the value: text for a text parameter, a number for a number parameter.
  if (parameter.type === 'string') {
    if (plain === null || !one || one.isNull()) return '';
    return typeof plain === 'boolean' ? String(plain).toUpperCase() : `${plain as string | number}`;
  }
  if (parameter.type === 'number') {
    const number = plain === null || plain === '' ? 0 : Number(plain);
    return Number.isNaN(number)
      ? new Refusal(
          '#VALUE!',
          `The argument "${parameter.name}" takes a number, "${plain as string}" was given.`,
        )
      : number;
  }
  return plain;
}

function plainValue(value: BaseValueObject | null | undefined | void, blank: BlankCells): unknown {
  if (!value || value.isNull()) return blank === 'zero' ? 0 : null;
  if (value.isError()) {
    const code = (value as ErrorValueObject).getErrorType();
    return { type: 'Error', basicType: 'Error', basicValue: code };
  }
  return value.getValue();
}

/** A function's result as a value of the engine, with the host's own treatment of what cannot stand in a cell. */
function toValueObject(result: unknown): BaseValueObject {
  if (!Array.isArray(result)) {
    if (typeof result === 'number' && !Number.isFinite(result)) return ErrorValueObject.create(ErrorType.NUM);
    return cellValue(result);
  }
  const rows = result.map((row: unknown): unknown[] => (Array.isArray(row) ? row : [row]));
  const columnCount = rows.reduce((most, row) => Math.max(most, row.length), 0);
  if (rows.length === 0 || columnCount === 0) return ErrorValueObject.create(ErrorType.CALC);
  return ArrayValueObject.create({
    calculateValueList: rows.map((row) =>
      Array.from({ length: columnCount }, (_, column) => cellValue(row[column])),
    ),
    rowCount: rows.length,
    columnCount,
    unitId: '',
    sheetId: '',
    row: -1,
    column: -1,
  });
}

function cellValue(value: unknown): BaseValueObject {
  switch (typeof value) {
    case 'number':
      return NumberValueObject.create(Number.isFinite(value) ? value : 0);
    case 'string':
      return StringValueObject.create(value);
    case 'boolean':
      return BooleanValueObject.create(value);
    default:
      return NumberValueObject.create(0);
  }
}

function describeFunction(namespace: string, metadata: FunctionMetadata): IFunctionInfo {
  return {
    functionName: `${namespace}.${metadata.name}`,
    functionType: FunctionType.User,
    description: metadata.description ?? '',
    abstract: metadata.description ?? '',
    functionParameter: metadata.parameters.map((one) => ({
      name: one.name,
      detail: one.description ?? '',
      example: '',
      require: one.optional === true ? 0 : 1,
      repeat: one.repeating === true ? 1 : 0,
    })),
  };
}

/**
 * The host's edge: the one file that knows how a spreadsheet wants to hear "this went wrong".
 *
 * A BeamProblem becomes a host error that carries its sentence: `#VALUE!` (invalidValue) when rows or arguments are
 * wrong, `#N/A` (notAvailable) when they are right but there is no such result. Only these two carry a message.
 * Anything else that is thrown, and any result that is not whole, is our fault and says so. A host turns NaN, infinity,
 * null and undefined inside a result silently into 0, so every result is looked through before it leaves.
 */
import { BeamProblem, VERSION, sayAll } from "../src/index";

/** What a cell can show. */
export type Shown = number | string | boolean;

/** Runs one question and hands the host either a whole number or text, or a host error with a sentence. */
export function scalar<T extends Shown>(question: () => T): T {
  return atTheEdge(question, wholeCell) as T;
}

/** The same for a result that spills: a rectangle, every cell of it whole. */
export function matrix<T extends Shown>(question: () => readonly (readonly T[])[]): T[][] {
  return atTheEdge(question, wholeMatrix) as T[][];
}

/** A result that takes the shape of its argument: one number, or a rectangle of them. */
export function spread(question: () => number | readonly (readonly number[])[]): number[][] {
  return matrix(() => {
    const result = question();
    return typeof result === "number" ? [[result]] : result;
  });
}

function atTheEdge<T>(question: () => T, whole: (result: T) => unknown): unknown {
  try {
    return whole(question());
  } catch (thrown) {
    // the host's own error class, which does not derive from Error
    // eslint-disable-next-line @typescript-eslint/only-throw-error
    throw hostError(thrown);
  }
}

/** Exported for its tests: every thing that can be thrown -> the error the cell shows. */
export function hostError(thrown: unknown): CustomFunctions.Error {
  const { ErrorCode, Error: HostError } = CustomFunctions;
  if (thrown instanceof BeamProblem) {
    const wrong = thrown.issues.some((issue) => issue.kind === "invalid");
    return new HostError(wrong ? ErrorCode.invalidValue : ErrorCode.notAvailable, sayAll(thrown.issues));
  }
  const found = thrown instanceof Error ? `${thrown.name}: ${thrown.message}` : String(thrown);
  return new HostError(
    ErrorCode.invalidValue,
    `A fault of Spanrow, not of your rows (${found}). Please report it with the rows; version ${VERSION}.`,
  );
}

/** Minus zero would show as "-0" in some number formats. */
const plainZero = (value: number): number => (value === 0 ? 0 : value);

function wholeCell(cell: unknown): Shown {
  if (typeof cell === "number") {
    if (!Number.isFinite(cell)) throw new RangeError(`the result is ${cell}`);
    return plainZero(cell);
  }
  if (typeof cell === "string" || typeof cell === "boolean") return cell;
  throw new TypeError(`the result is ${cell === null ? "null" : typeof cell}`);
}

function wholeMatrix(rows: readonly (readonly unknown[])[]): Shown[][] {
  const width = rows[0]?.length ?? 0;
  if (width === 0) throw new TypeError("the result is an empty table");
  return rows.map((row, r) => {
    if (row.length !== width)
      throw new TypeError(`row ${r + 1} of the result has ${row.length} cells, not ${width}`);
    return row.map(wholeCell);
  });
}

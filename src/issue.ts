/**
 * An issue is data: where, what was expected, what was found. `messages.ts` is the only place that words it.
 * `kind` decides the worksheet error: 'invalid' (rows or arguments are wrong) -> #VALUE!,
 * 'unavailable' (right rows, no such result) -> #N/A.
 */
export interface Issue {
  readonly code: string;
  readonly kind: 'invalid' | 'unavailable';
  /** 1-based row of the beam range, when one row is to blame */
  readonly row?: number;
  /** name of the column (Item, At, To, Value, End value, Unit, Case, Note) or of the argument (x, combination, names, values, ...) */
  readonly column?: string;
  readonly expected?: string;
  readonly found?: string;
  /** the word or unit that was probably meant */
  readonly suggestion?: string;
  /** anything else the sentence needs */
  readonly detail?: Readonly<Record<string, string | number | readonly string[]>>;
}

/** Thrown at the door of the engine (never inside it for control flow): carries every issue found. */
export class BeamProblem extends Error {
  readonly issues: readonly Issue[];
  constructor(issues: readonly Issue[], message: string) {
    super(message);
    this.name = 'BeamProblem';
    this.issues = issues;
  }
}

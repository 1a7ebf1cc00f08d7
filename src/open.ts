/**
 * The door of the engine: a table and its arguments in, an opened beam out, remembered by content.
 *
 *   table                          -> compiled table      (a template is compiled once for all its members)
 *   table + names + values         -> model and solution
 *   table + names + values + combination -> opened beam   (its response is solved when first asked)
 *
 * Faults are remembered too: a wrong table that 500 cells ask about is read once.
 */
import type { BeamModel, Combination } from './beam/model';
import { solve } from './integrate/solve';
import { BeamProblem, type Issue } from './issue';
import { ContentMemo, copyRange, hashRange, rangeBytes, sameRange } from './memo';
import { sayAll } from './messages';
import { compileTable, readBindings, readCombination, type CompiledTable, type Reading } from './rows';
import { plain, shownFactor } from './signs';
import type { Quantity, Response, Solution, SolveResult } from './solution';

/** Raw host arguments: ranges (rows of cells) or scalars; null, undefined, '' or 0 when omitted. */
export interface BeamArguments {
  readonly beam: unknown;
  readonly combination?: unknown;
  readonly names?: unknown;
  readonly values?: unknown;
}

export interface OpenBeam {
  readonly table: CompiledTable;
  readonly model: BeamModel;
  readonly readings: readonly Reading[];
  readonly cautions: readonly Issue[];
  /** Solved when first asked; throws BeamProblem when the beam has no answer (a mechanism, past its critical load). */
  readonly solution: Solution;
  readonly combination: Combination | null;
  readonly response: Response;
  /** model -> shown number (axis sign, deflection unit) */
  show(quantity: Quantity, value: number): number;
}

export interface Review {
  readonly table: CompiledTable;
  /** everything that keeps the beam from being answered; empty when `open` is there and solves */
  readonly issues: readonly Issue[];
  readonly model: BeamModel | null;
  readonly open: OpenBeam | null;
  /** how the rows were read and what looks odd; there as soon as the rows are right, also when the beam cannot be solved */
  readonly readings: readonly Reading[];
  readonly cautions: readonly Issue[];
}

/**
 * Bounds of the memo: tables seen, and members (a table with its names and values) kept solved.
 * Few members on purpose. Solving one again costs some 15 times a look-up, but keeping thousands costs more than that on every new one:
 * what lives long is copied by the garbage collector again and again (measured: a schedule of 10,000 members took 4 times as long with
 * 256 kept as with 64). 64 is enough for the several columns of a schedule that ask about one row, and for the beams of a sheet.
 */
export const MEMO_BOUNDS = {
  tables: { entries: 256, bytes: 32e6 },
  members: { entries: 64, bytes: 64e6 },
  /** combinations kept per member */
  combinations: 256,
} as const;

/** Empirical, rounded up: heap per compiled row, and of a solved member (a two-span template member held 12.8 kB, 5 regions counted). */
const BYTES_PER_ROW = 800;
const BYTES_PER_REGION = 1800;
const BYTES_PER_MEMBER = 4000;

/** Throws the issues as one BeamProblem with their wording. */
export function fail(...issues: Issue[]): never {
  throw new BeamProblem(issues, sayAll(issues));
}

/** The response to a combination; what keeps it from being solved is worded here. */
export function respond(solution: Solution, factors: readonly number[] | null): Response {
  try {
    return solution.respond(factors);
  } catch (problem) {
    return problem instanceof BeamProblem ? fail(...problem.issues) : rethrow(problem);
  }
}

function rethrow(problem: unknown): never {
  throw problem;
}

/** A table with its names and values: read once, solved once. */
class Member {
  private solved: SolveResult | null = null;
  private plain: Opened | null = null;
  private readonly byText = new Map<string, Opened | readonly Issue[]>();
  private readonly byRange: { range: unknown; hash: number; opened: Opened | readonly Issue[] }[] = [];

  constructor(
    readonly table: CompiledTable,
    readonly model: BeamModel | null,
    readonly source: { readonly readings: readonly Reading[]; readonly cautions: readonly Issue[] } | null,
    readonly issues: readonly Issue[],
  ) {}

  solution(): Solution {
    const solved = (this.solved ??= solve(this.model as BeamModel));
    return solved.ok ? solved.solution : fail(solved.issue);
  }

  open(combination: unknown): Opened {
    if (this.model === null) return fail(...this.issues);
    if (combination === null || combination === undefined || combination === '' || combination === 0) {
      return (this.plain ??= new Opened(this, this.model, null));
    }
    const found = this.lookUp(combination);
    return found instanceof Opened ? found : fail(...found);
  }

  private lookUp(combination: unknown): Opened | readonly Issue[] {
    if (typeof combination === 'string') {
      const known = this.byText.get(combination);
      if (known !== undefined) return known;
      const made = this.make(combination);
      if (this.byText.size >= MEMO_BOUNDS.combinations) this.byText.clear();
      this.byText.set(combination, made);
      return made;
    }
    const hash = hashRange(combination);
    for (const entry of this.byRange) {
      if (entry.hash === hash && sameRange(entry.range, combination)) return entry.opened;
    }
    const made = this.make(combination);
    if (this.byRange.length >= MEMO_BOUNDS.combinations) this.byRange.length = 0;
    this.byRange.push({ range: copyRange(combination), hash, opened: made });
    return made;
  }

  private make(combination: unknown): Opened | readonly Issue[] {
    const model = this.model as BeamModel;
    const read = readCombination(combination, model.cases);
    if (!read.ok) return read.issues;
    if (read.combination === null) return (this.plain ??= new Opened(this, model, null));
    return new Opened(this, model, read.combination);
  }
}

class Opened implements OpenBeam {
  private solvedResponse: Response | null = null;
  private readonly deflectionFactor: number;

  constructor(
    private readonly member: Member,
    readonly model: BeamModel,
    readonly combination: Combination | null,
  ) {
    this.deflectionFactor = shownFactor(model, 'deflection');
  }

  get table(): CompiledTable {
    return this.member.table;
  }

  get readings(): readonly Reading[] {
    return this.member.source?.readings ?? [];
  }

  get cautions(): readonly Issue[] {
    return this.member.source?.cautions ?? [];
  }

  get solution(): Solution {
    return this.member.solution();
  }

  get response(): Response {
    return (this.solvedResponse ??= respond(this.member.solution(), this.combination?.factors ?? null));
  }

  show(quantity: Quantity, value: number): number {
    if (quantity === 'deflection') return plain(value * this.deflectionFactor);
    return plain(quantity === 'slope' ? value * this.model.axis : value);
  }
}

const tables = new ContentMemo<CompiledTable>(MEMO_BOUNDS.tables.entries, MEMO_BOUNDS.tables.bytes);
const members = new ContentMemo<Member>(MEMO_BOUNDS.members.entries, MEMO_BOUNDS.members.bytes);

/** The compiled table of these cells (a scalar is the one-cell text form). Never throws. */
function tableOf(beam: unknown): { table: CompiledTable; hash: number } {
  const hash = hashRange(beam);
  const known = tables.find(hash, beam);
  if (known !== undefined) return { table: known, hash };
  const copy = copyRange(beam);
  const rows: unknown[] = Array.isArray(copy) ? copy : [copy];
  const cells = rows.map((row): unknown[] => (Array.isArray(row) ? row : [row]));
  const table = compileTable(cells);
  tables.keep(hash, [copy], table, rangeBytes(copy) + BYTES_PER_ROW * table.rows.length);
  return { table, hash };
}

function memberOf(args: BeamArguments): Member {
  const { table, hash: tableHash } = tableOf(args.beam);
  const names = args.names ?? null;
  const values = args.values ?? null;
  const hash = hashRange(values, hashRange(names, tableHash));
  const known = members.find3(hash, table, names, values);
  if (known !== undefined) return known;
  const member = readMember(table, names, values);
  const model = member.model;
  const regions = model === null ? 0 : model.supports.length + model.loads.length + model.ei.length;
  const bytes = BYTES_PER_MEMBER + rangeBytes(names) + rangeBytes(values) + BYTES_PER_REGION * regions;
  return members.keep(hash, [table, copyRange(names), copyRange(values)], member, bytes);
}

function readMember(table: CompiledTable, names: unknown, values: unknown): Member {
  const bindings = readBindings(names, values);
  if (!bindings.ok) return new Member(table, null, null, [...table.issues, ...bindings.issues]);
  const built = table.build(bindings.bindings);
  if (!built.ok) return new Member(table, null, null, built.issues);
  return new Member(table, built.model, built, []);
}

/**
 * Opens a beam: reads its rows and its combination. Throws BeamProblem with every issue found.
 * The second question about the same content costs a hash and a comparison.
 */
export function openBeam(args: BeamArguments): OpenBeam {
  return memberOf(args).open(args.combination);
}

/** The same without ever throwing: for READBACK and the pane, which show what is wrong beside what is right. */
export function reviewBeam(args: BeamArguments): Review {
  const member = memberOf(args);
  const { table, model } = member;
  const readings = member.source?.readings ?? [];
  const cautions = member.source?.cautions ?? [];
  try {
    const open = member.open(args.combination);
    void open.response; // a beam that cannot be answered is an issue here, not a surprise later
    return { table, issues: [], model, open, readings, cautions };
  } catch (problem) {
    if (!(problem instanceof BeamProblem)) throw problem;
    return { table, issues: problem.issues, model, open: null, readings, cautions };
  }
}

/** Entries and estimated bytes the memo holds (for the bench and its tests). */
export function memoSize(): {
  tables: { entries: number; bytes: number };
  members: { entries: number; bytes: number };
} {
  return { tables: tables.size(), members: members.size() };
}

/** Forgets everything (tests and benches that need a cold start). */
export function clearMemo(): void {
  tables.clear();
  members.clear();
}

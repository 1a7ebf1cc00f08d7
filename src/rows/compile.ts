/**
 * Cells -> compiled table. All text is read here, once; what remains for `build` is arithmetic. Every issue of the table is
 * collected; a table with issues builds nothing but says them all.
 */
import type { Issue } from '../issue';
import { combineAtRow, CASE_NAME } from './combine';
import { buildPlan, type BuildResult } from './build';
import type { Bindings } from './bindings';
import { isBlank, isErrorCell, showCell, type Cell } from './cell';
import { AT, fieldsOf, LENGTH, SECOND_MOMENT, SPECS, takes, TO, type Field, type ItemSpec } from './items';
import { layOut, type Layout, type RowInfo } from './layout';
import { readLimitCell } from './limit';
import type { Placed, Plan, PlannedLimit } from './plan';
import { readScalar, readUnitCell, type Reading, type Scalar } from './scalar';
import { readSettings, type Settings } from './settings';
import { usualUnit } from './system';
import { parseUnit, type Unit } from './units';
import { COLUMNS, type ItemName } from './words';

export interface CompiledTable {
  /** issues that need no names */
  readonly issues: readonly Issue[];
  /** one per physical row; one-cell text: one per `;` row */
  readonly rows: readonly RowInfo[];
  readonly layout: Layout;
  /** free names its expressions use (not x) */
  readonly names: readonly string[];
  /** cheap: numbers only */
  build(bindings: Bindings): BuildResult;
}

/** Never throws; pure. */
export function compileTable(cells: readonly (readonly unknown[])[]): CompiledTable {
  const { rows, layout, issues, cautions, text } = layOut(cells);
  const compiler = new Compiler(rows, issues, cautions, text);
  const plan = compiler.plan();
  if (issues.length > 0) {
    const failed: BuildResult = { ok: false, issues };
    return { issues, rows, layout, names: plan.names, build: () => failed };
  }
  // A table without names means one beam: it is built once.
  let only: BuildResult | null = null;
  const build =
    plan.names.length === 0
      ? (bindings: Bindings): BuildResult => (only ??= buildPlan(plan, bindings))
      : (bindings: Bindings): BuildResult => buildPlan(plan, bindings);
  return { issues, rows, layout, names: plan.names, build };
}

class Compiler implements Reading {
  readonly system: Plan['system'];
  private readonly settings: Settings;
  private readonly cases: string[] = [];
  private readonly names: string[] = [];
  private readonly uses = new Map<string, { row: number; column: string }>();
  private readonly places: Scalar[] = [];
  private unitWithoutRowSaid = false;

  constructor(
    private readonly rows: readonly RowInfo[],
    readonly issues: Issue[],
    readonly cautions: Issue[],
    readonly text: boolean,
  ) {
    this.settings = readSettings(rows, issues);
    this.system = this.settings.system;
  }

  plan(): Plan {
    const placed: Placed[] = [];
    const limits: RowInfo[] = [];
    let any = false;
    for (const info of this.rows) {
      if (info.item === null) continue;
      any = true;
      this.unusedCells(info, info.item);
      if (info.item === 'limit') limits.push(info);
      if (SPECS[info.item].group === 'setting') continue;
      const row = this.placedRow(info, info.item);
      if (row !== null) placed.push(row);
    }
    if (!any && this.issues.length === 0) this.issues.push({ code: 'no-rows', kind: 'invalid' });
    this.similarCases();
    // Fields are written out here and in loads.ts: copying them with a spread was measured to cost more than all the rest.
    return {
      system: this.settings.system,
      axis: this.settings.axis,
      unitsRow: this.settings.unitsRow,
      axisRow: this.settings.axisRow,
      cases: this.cases,
      names: this.names,
      uses: this.uses,
      places: this.places,
      placed,
      limits: this.limits(limits),
      secondMoment: this.secondMoment(placed),
      cautions: this.cautions,
    };
  }

  /** The unit of the first I row, for REQUIREDI; the usual one where only a name carries the unit. */
  private secondMoment(placed: readonly Placed[]): Unit | null {
    const first = placed.find(({ item }) => item === 'I');
    if (first === undefined || this.system === null) return null;
    if (first.value?.unit) return first.value.unit;
    const usual = parseUnit(usualUnit(SECOND_MOMENT, this.system));
    return usual.ok ? usual.unit : null;
  }

  slot(name: string, row: number, column: string): number {
    const known = this.names.indexOf(name);
    if (known >= 0) return known + 1;
    this.uses.set(name, { row, column });
    return this.names.push(name);
  }

  /** Said once: one missing `units` row is one mistake. With a faulty `units` row it has been said already. */
  unitWithoutRow(row: number, column: string, found: string): void {
    if (this.settings.unitsRow !== null || this.unitWithoutRowSaid) return;
    this.unitWithoutRowSaid = true;
    this.issues.push({ code: 'units-row-missing', kind: 'invalid', row, column, found });
  }

  /** A filled cell that the item has no use for is a misunderstanding, never skipped. */
  private unusedCells({ row, cells }: RowInfo, item: ItemName): void {
    for (let i = 1; i < 7; i += 1) {
      const column = COLUMNS[i]!;
      const cell = cells[column];
      if (isBlank(cell) || takes(item, column)) continue;
      if (isErrorCell(cell)) {
        this.issues.push({ code: 'cell-error', kind: 'invalid', row, column, found: cell.error });
      } else {
        this.issues.push({
          code: 'unused-cell',
          kind: 'invalid',
          row,
          column,
          found: showCell(cell),
          detail: { item },
        });
      }
    }
  }

  private placedRow(info: RowInfo, item: ItemName): Placed | null {
    const spec = SPECS[item];
    const before = this.issues.length;
    const { row, cells } = info;
    const [from, to] = this.position(info, item, spec);
    let value: Scalar | null = null;
    let end: Scalar | null = null;
    if (spec.value !== null) {
      const unit = readUnitCell(cells.Unit, row, spec.value, this);
      const fields = fieldsOf(item);
      if (unit !== undefined) {
        value = readScalar(cells.Value, row, fields.value, unit, this);
        if (spec.end) end = this.endValue(cells['End value'], value, row, fields.end, unit);
        if (value !== null) this.checkValue(value, item, spec);
      }
    }
    const caseIndex = spec.load ? this.caseOf(cells.Case, row) : -1;
    if (this.issues.length > before) return null;
    return {
      row,
      item,
      from,
      to,
      value,
      end,
      case: caseIndex,
      positive: spec.positive,
      sign: spec.signed ? this.settings.axis : 1,
    };
  }

  private endValue(
    cell: Cell | undefined,
    value: Scalar | null,
    row: number,
    field: Field,
    unit: Unit | null,
  ): Scalar | null {
    if (value?.usesX) {
      if (!isBlank(cell)) {
        this.issues.push({
          code: 'end-with-law',
          kind: 'invalid',
          row,
          column: 'End value',
          found: showCell(cell),
        });
      }
      return null;
    }
    return readScalar(cell, row, field, unit, this);
  }

  private checkValue(value: Scalar, item: ItemName, spec: ItemSpec): void {
    if (value.expression !== null) return;
    const place = { kind: 'invalid', row: value.row, column: 'Value' } as const;
    if (spec.positive) {
      if (value.constant <= 0) {
        this.issues.push({
          ...place,
          code: 'not-positive',
          found: value.blank ? '0 or a blank cell' : String(value.written),
          detail: { item },
        });
      }
    } else if (value.constant === 0 && item !== 'varying') {
      this.cautions.push({ ...place, code: 'zero-value', detail: { item } });
    }
  }

  /** Indices of At and To in `places`; -1 and -1 for the whole beam. */
  private position(info: RowInfo, item: ItemName, spec: ItemSpec): [number, number] {
    const { row, cells } = info;
    if (spec.at === 'none') return [-1, -1];
    const at = readScalar(cells.At, row, AT, null, this);
    if (spec.at === 'place') return at === null ? [-1, -1] : [this.places.push(at) - 1, -1];
    const to = readScalar(cells.To, row, TO, null, this);
    if (at === null || to === null) return [-1, -1];
    const atZero = at.expression === null && at.constant === 0;
    const toZero = to.expression === null && to.constant === 0;
    if (atZero && toZero) return [-1, -1];
    // A blank To arrives as 0, so a stretch that really ends at 0 writes that 0 as text.
    if (to.blank) {
      this.issues.push({
        code: 'to-blank',
        kind: 'invalid',
        row,
        column: 'To',
        found: String(at.written),
        detail: { item },
      });
    }
    this.places.push(at, to);
    return [this.places.length - 2, this.places.length - 1];
  }

  private caseOf(cell: Cell | undefined, row: number): number {
    if (isBlank(cell)) return -1;
    if (isErrorCell(cell ?? null)) {
      this.issues.push({ code: 'cell-error', kind: 'invalid', row, column: 'Case', found: showCell(cell) });
      return -1;
    }
    if (typeof cell !== 'string' || !CASE_NAME.test(cell)) {
      this.issues.push({ code: 'bad-case', kind: 'invalid', row, column: 'Case', found: showCell(cell) });
      return -1;
    }
    const known = this.cases.indexOf(cell);
    return known >= 0 ? known : this.cases.push(cell) - 1;
  }

  private similarCases(): void {
    const seen = new Map<string, string>();
    for (const name of this.cases) {
      const other = seen.get(name.toLowerCase());
      if (other !== undefined) {
        this.cautions.push({
          code: 'similar-cases',
          kind: 'invalid',
          column: 'Case',
          found: name,
          detail: { other },
        });
      } else seen.set(name.toLowerCase(), name);
    }
  }

  private limits(rows: readonly RowInfo[]): PlannedLimit[] {
    const found: PlannedLimit[] = [];
    for (const info of rows) {
      const limit = this.limit(info);
      if (limit !== null) found.push(limit);
    }
    return found;
  }

  private limit({ row, cells }: RowInfo): PlannedLimit | null {
    const unit = readUnitCell(cells.Unit, row, LENGTH, this);
    const read = readLimitCell(cells.Value, row, unit ?? null, this);
    const combined = combineAtRow(cells.Case, this.cases, row);
    if (!combined.ok) {
      this.issues.push(...combined.issues);
      return null;
    }
    if (read === null || unit === undefined) return null;
    if (read.scalar.expression === null && !(read.scalar.constant > 0)) {
      this.issues.push({
        code: 'bad-limit',
        kind: 'invalid',
        row,
        column: 'Value',
        found: showCell(cells.Value),
      });
      return null;
    }
    return { row, scalar: read.scalar, kind: read.kind, text: read.text, combination: combined.combination };
  }
}

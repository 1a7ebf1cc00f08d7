/** The rows that set things for the whole table: `units` and `axis`. */
import type { Issue } from '../issue';
import { isBlank, isErrorCell, showCell, type Cell } from './cell';
import { FORCE, LENGTH } from './items';
import type { RowInfo } from './layout';
import { nearest } from './near';
import { sameDimension, unitSystem, type UnitSystem } from './system';
import { parseUnit, type Dimension, type Unit } from './units';
import type { ColumnName } from './words';

export interface Settings {
  readonly system: UnitSystem | null;
  /** 1: down, -1: up */
  readonly axis: 1 | -1;
  /** the `units` row (perhaps a wrong one) and the `axis` row, if there are any */
  readonly unitsRow: number | null;
  readonly axisRow: number | null;
}

export function readSettings(rows: readonly RowInfo[], issues: Issue[]): Settings {
  let system: UnitSystem | null = null;
  let axis: 1 | -1 = 1;
  let unitsRow: number | null = null;
  let axisRow: number | null = null;
  for (const info of rows) {
    if (info.item === 'units') {
      if (unitsRow !== null) issues.push(twice('units', info.row, unitsRow));
      else system = readUnits(info, issues);
      unitsRow ??= info.row;
    } else if (info.item === 'axis') {
      if (axisRow !== null) issues.push(twice('axis', info.row, axisRow));
      else axis = readAxis(info, issues);
      axisRow ??= info.row;
    }
  }
  return { system, axis, unitsRow, axisRow };
}

function twice(item: string, row: number, first: number): Issue {
  return { code: 'setting-twice', kind: 'invalid', row, column: 'Item', found: item, detail: { first } };
}

function readUnits(info: RowInfo, issues: Issue[]): UnitSystem | null {
  const force = readOne(info, 'At', FORCE, 'a force, e.g. kN', issues);
  const length = readOne(info, 'To', LENGTH, 'a length, e.g. m', issues);
  // Without a deflection unit of its own the table shows deflections in its length unit.
  const deflection = isBlank(info.cells.Value)
    ? length
    : readOne(info, 'Value', LENGTH, 'a length, e.g. mm', issues);
  return force === null || length === null || deflection === null
    ? null
    : unitSystem(force, length, deflection);
}

function readOne(
  info: RowInfo,
  column: ColumnName,
  dimension: Dimension,
  expected: string,
  issues: Issue[],
): Unit | null {
  const cell: Cell = info.cells[column] ?? null;
  const place = { kind: 'invalid', row: info.row, column, expected } as const;
  if (isErrorCell(cell)) {
    issues.push({ code: 'cell-error', kind: 'invalid', row: info.row, column, found: cell.error });
    return null;
  }
  if (typeof cell !== 'string') {
    issues.push({
      ...place,
      code: 'units-incomplete',
      found: isBlank(cell) ? 'a blank cell' : showCell(cell),
    });
    return null;
  }
  const unit = parseUnit(cell);
  if (unit.ok && sameDimension(unit.unit, dimension)) return unit.unit;
  const suggestion = unit.ok ? undefined : unit.suggestion;
  issues.push({
    ...place,
    code: 'units-incomplete',
    found: showCell(cell),
    ...(suggestion === undefined ? {} : { suggestion }),
  });
  return null;
}

function readAxis(info: RowInfo, issues: Issue[]): 1 | -1 {
  const cell = info.cells.At;
  if (typeof cell === 'string') {
    const word = cell.toLowerCase();
    if (word === 'down') return 1;
    if (word === 'up') return -1;
  }
  if (isErrorCell(cell ?? null)) {
    issues.push({ code: 'cell-error', kind: 'invalid', row: info.row, column: 'At', found: showCell(cell) });
    return 1;
  }
  const suggestion =
    typeof cell === 'string'
      ? (nearest(cell.toLowerCase(), ['down', 'up']) ?? /^(down|up)/i.exec(cell)?.[0].toLowerCase())
      : undefined;
  issues.push({
    code: 'bad-axis',
    kind: 'invalid',
    row: info.row,
    column: 'At',
    found: isBlank(cell) ? 'a blank cell' : showCell(cell),
    ...(suggestion === undefined ? {} : { suggestion }),
  });
  return 1;
}

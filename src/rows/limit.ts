/** Deflection limits: an absolute deflection ("20 mm", 12) or a fraction of the span ("span/360"). */
import type { BeamModel, Limit } from '../beam/model';
import type { Issue } from '../issue';
import { isBlank, isErrorCell, normaliseCell, showCell, type Cell } from './cell';
import { readText } from './cell-text';
import { fieldsOf, type Field } from './items';
import { times, toNumber, type Ratio } from './rational';
import { readScalar, type Reading, type Scalar } from './scalar';
import { unitSystem } from './system';
import { parseUnit, type Unit } from './units';

const SPAN = /^span\s*\/\s*(\S.*)$/i;
/** L/360 is the usual way to say span/360 on paper, but L may be a name of the table. */
const LETTER = /^l\s*\/\s*([\d.]+)$/i;
const DIVISOR: Field = {
  column: 'Value',
  dimension: { force: 0, length: 0, angle: 0 },
  bare: 'radians',
  law: false,
};

/** The Value of a `limit` row. null: an issue was added. */
export function readLimitCell(
  cell: Cell | undefined,
  row: number,
  unit: Unit | null,
  table: Reading,
): { readonly scalar: Scalar; readonly kind: Limit['kind']; readonly text: string } | null {
  const column = 'Value';
  const place = { kind: 'invalid', row, column } as const;
  if (typeof cell === 'string') {
    const letter = LETTER.exec(cell);
    if (letter !== null) {
      table.issues.push({ ...place, code: 'bad-limit', found: cell, suggestion: `span/${letter[1]!}` });
      return null;
    }
    const span = SPAN.exec(cell);
    if (span !== null) {
      if (unit !== null) {
        table.issues.push({
          ...place,
          code: 'unused-cell',
          column: 'Unit',
          found: unit.text,
          detail: { item: 'limit of span/...' },
        });
        return null;
      }
      // The number after "span/" is text by nature, so it earns no caution about numbers stored as text.
      const read = readText(span[1]!);
      const scalar = readScalar(read.kind === 'number' ? read.value : span[1]!, row, DIVISOR, null, table);
      return scalar === null ? null : { scalar, kind: 'fraction', text: `span/${span[1]!}` };
    }
  }
  const scalar = readScalar(cell, row, fieldsOf('limit').value, unit, table);
  if (scalar === null) return null;
  const shown =
    typeof scalar.written === 'string' && scalar.unit !== null && scalar.expression === null
      ? ''
      : (scalar.unit?.text ?? table.system?.deflection.text ?? '');
  return { scalar, kind: 'absolute', text: `${scalar.written} ${shown}`.trim() };
}

export type LimitResult =
  | { readonly ok: true; readonly limit: Limit | null; readonly text: string }
  | { readonly ok: false; readonly issue: Issue };

/** A formula's own `limit` argument: a number in the deflection unit, "span/360" or "20 mm". null: none given. */
export function readLimit(raw: unknown, model: BeamModel): LimitResult {
  const cell = normaliseCell(single(raw));
  if (isBlank(cell)) return { ok: true, limit: null, text: '' };
  const place = { kind: 'invalid', column: 'limit' } as const;
  if (isErrorCell(cell)) return { ok: false, issue: { ...place, code: 'cell-error', found: cell.error } };
  const bad = (suggestion?: string): LimitResult => ({
    ok: false,
    issue: {
      ...place,
      code: 'bad-limit',
      found: showCell(cell),
      ...(suggestion === undefined ? {} : { suggestion }),
    },
  });
  const perLength = model.units?.deflectionPerLength ?? 1;
  const shown = model.units?.deflection ?? '';
  if (typeof cell === 'boolean') return bad();
  if (typeof cell === 'number') {
    if (!(cell > 0)) return bad();
    return {
      ok: true,
      limit: { kind: 'absolute', value: cell / perLength },
      text: `${cell} ${shown}`.trim(),
    };
  }
  const letter = LETTER.exec(cell);
  if (letter !== null) return bad(`span/${letter[1]!}`);
  const span = SPAN.exec(cell);
  const text = readText(span === null ? cell : span[1]!);
  if (text.kind === 'number') {
    if (!(text.value > 0) || !Number.isFinite(text.value)) return bad();
    return span === null
      ? {
          ok: true,
          limit: { kind: 'absolute', value: text.value / perLength },
          text: `${text.value} ${shown}`.trim(),
        }
      : { ok: true, limit: { kind: 'fraction', divisor: text.value }, text: `span/${text.value}` };
  }
  if (text.kind === 'refused') {
    return {
      ok: false,
      issue: {
        ...place,
        code:
          text.reason === 'ambiguous-number' || text.reason === 'unknown-unit' ? text.reason : 'bad-limit',
        found: text.found,
        ...(text.suggestion === undefined ? {} : { suggestion: text.suggestion }),
        detail: { text: cell, expected: shown },
      },
    };
  }
  if (text.kind === 'expression' || span !== null) return bad();
  if (model.units === null) return { ok: false, issue: { ...place, code: 'units-row-missing', found: cell } };
  if (text.unit.force !== 0 || text.unit.length !== 1 || text.unit.angle !== 0) {
    return {
      ok: false,
      issue: { ...place, code: 'wrong-dimension', found: text.unit.text, expected: shown },
    };
  }
  const value = lengthIn(model, text.exact, text.unit);
  return value > 0 && Number.isFinite(value)
    ? { ok: true, limit: { kind: 'absolute', value }, text: cell }
    : bad();
}

/** An exact number of `unit` in the model's length unit; the model has units. */
export function lengthIn(model: BeamModel, exact: Ratio, unit: Unit): number {
  const { force, length, deflection } = model.units!;
  const f = parseUnit(force);
  const l = parseUnit(length);
  const d = parseUnit(deflection);
  if (!f.ok || !l.ok || !d.ok) throw new Error('the units of a model were read from its table');
  return toNumber(times(exact, unitSystem(f.unit, l.unit, d.unit).exactFactor(unit)));
}

function single(raw: unknown): unknown {
  return Array.isArray(raw) && raw.length === 1 ? single((raw as readonly unknown[])[0]) : raw;
}

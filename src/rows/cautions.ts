/** Cautions that the table's own numbers give (contract 4); those that need a solution are raised by READBACK itself. */
import type { BeamModel } from '../beam/model';
import type { Issue } from '../issue';
import type { Evaluated } from './build';
import { showNumber } from './show';
import { siFactor } from './units';

export function numericCautions(beam: Evaluated, model: BeamModel): Issue[] {
  return [...unlikelyModulus(beam), ...loadsFarOut(beam, model), ...unlikelyLimits(beam, model)];
}

/** Contract 4: a structural material has E between 0.1 and 1000 GPa. Only a table with units can tell. */
const LEAST_E = 0.1;
const MOST_E = 1000;

function unlikelyModulus({ plan, values }: Evaluated): Issue[] {
  const { system } = plan;
  if (system === null) return [];
  const toGPa = siFactor(system.force) / siFactor(system.length) ** 2 / 1e9;
  const found: Issue[] = [];
  plan.placed.forEach(({ item, row, value }, k) => {
    if (item !== 'E' || value === null || value.usesX) return;
    const e = values[k]! * toGPa;
    // A limit itself is inside; conversion may move it by a few units in the last place.
    if (e >= LEAST_E * (1 - 1e-12) && e <= MOST_E * (1 + 1e-12)) return;
    found.push({
      code: 'modulus-unlikely',
      kind: 'invalid',
      row,
      column: 'Value',
      found: `${showNumber(e)} GPa`,
    });
  });
  return found;
}

/**
 * A load that stands outside every span on an overhang longer than the longest span: mostly a slipped digit (60 for 6) or a
 * length in another unit. Ordinary overhangs and cantilevers are left alone.
 */
function loadsFarOut(beam: Evaluated, { supports, foundations }: BeamModel): Issue[] {
  const vertical = supports.filter(({ held, spring }) => held || spring > 0);
  const first = vertical[0];
  const last = vertical[vertical.length - 1];
  if (first === undefined || last === undefined || first === last || foundations.length > 0) return [];
  let longest = 0;
  for (let i = 1; i < vertical.length; i += 1)
    longest = Math.max(longest, vertical[i]!.at - vertical[i - 1]!.at);
  const found: Issue[] = [];
  for (const row of beam.plan.placed) {
    if (row.item !== 'point' && row.item !== 'couple' && row.item !== 'uniform' && row.item !== 'varying')
      continue;
    const from = beam.from(row);
    const to = row.item === 'point' || row.item === 'couple' ? from : beam.to(row);
    const right = from >= last.at && !last.clamped ? to - last.at : 0;
    const left = to <= first.at && !first.clamped ? first.at - from : 0;
    const overhang = Math.max(left, right);
    if (!(overhang > longest)) continue;
    found.push({
      code: 'load-far-out',
      kind: 'invalid',
      row: row.row,
      column: 'At',
      found: beam.show(overhang),
      expected: beam.show(longest),
      detail: { item: row.item },
    });
  }
  return found;
}

/** An absolute limit above a tenth of the beam is mostly the divisor of span/... without the span. */
function unlikelyLimits({ plan }: Evaluated, { limits, start, end, units }: BeamModel): Issue[] {
  const found: Issue[] = [];
  for (const { row, limit, text } of limits) {
    if (limit.kind !== 'absolute' || limit.value <= (end - start) / 10) continue;
    const shown = showNumber(limit.value * (units?.deflectionPerLength ?? 1));
    found.push({
      code: 'limit-unlikely',
      kind: 'invalid',
      row,
      column: 'Value',
      found: text,
      suggestion: `span/${shown}`,
      ...(plan.system === null ? { detail: { units: 'none' } } : {}),
    });
  }
  return found;
}

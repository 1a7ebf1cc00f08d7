/** Load rows -> loads of the model. Numbers arrive in the model's units; `axis up` has been turned over by then. */
import type { Foundation, Law, Load } from '../beam/model';
import type { Evaluated } from './build';
import type { Placed } from './plan';

export function gatherLoads(beam: Evaluated): Load[] {
  const loads: Load[] = [];
  const { placed } = beam.plan;
  for (let k = 0; k < placed.length; k += 1) {
    const load = loadOf(placed[k]!, k, beam);
    if (load !== null) loads.push(load);
  }
  return loads;
}

/** Fields are written out, not spread from a common part: this runs for every load of every member of a schedule. */
function loadOf(placed: Placed, k: number, beam: Evaluated): Load | null {
  const { row, case: index } = placed;
  const value = beam.values[k]!;
  switch (placed.item) {
    case 'point':
      return { kind: 'point', row, case: index, at: beam.from(placed), force: value };
    case 'couple':
      return { kind: 'couple', row, case: index, at: beam.from(placed), couple: value };
    case 'uniform':
    case 'varying': {
      const law: Law = placed.item === 'varying' ? beam.law(k) : { kind: 'linear', start: value, end: value };
      return { kind: 'distributed', row, case: index, from: beam.from(placed), to: beam.to(placed), law };
    }
    case 'curvature':
      return {
        kind: 'curvature',
        row,
        case: index,
        from: beam.from(placed),
        to: beam.to(placed),
        curvature: value,
      };
    case 'axial':
      return { kind: 'axial', row, case: index, force: value };
    case 'camber':
      return { kind: 'camber', row, case: index, from: beam.from(placed), to: beam.to(placed), rise: value };
    case 'settlement':
      return { kind: 'settlement', row, case: index, at: beam.from(placed), displacement: value };
    case 'rotation':
      return { kind: 'rotation', row, case: index, at: beam.from(placed), angle: value };
    default:
      return null;
  }
}

/** Sorted; two foundations over one stretch are an error (their stiffnesses may be meant to add or to replace). */
export function gatherFoundations(beam: Evaluated): Foundation[] {
  const found: Foundation[] = [];
  const { placed } = beam.plan;
  for (let k = 0; k < placed.length; k += 1) {
    const row = placed[k]!;
    if (row.item !== 'foundation') continue;
    found.push({ from: beam.from(row), to: beam.to(row), stiffness: beam.values[k]!, row: row.row });
  }
  if (found.length < 2) return found;
  found.sort((a, b) => a.from - b.from);
  let reach = found[0]!;
  for (const next of found.slice(1)) {
    if (next.from < reach.to) {
      beam.issues.push({
        code: 'foundation-overlap',
        kind: 'invalid',
        row: Math.max(next.row, reach.row),
        column: 'At',
        detail: {
          from: beam.show(next.from),
          to: beam.show(Math.min(next.to, reach.to)),
          rows: [reach.row, next.row].sort((a, b) => a - b).map(String),
        },
      });
    }
    if (next.to > reach.to) reach = next;
  }
  return found;
}

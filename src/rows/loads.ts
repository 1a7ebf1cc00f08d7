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

function loadOf(row: Placed, k: number, beam: Evaluated): Load | null {
  const base = { row: row.row, case: row.case };
  const value = beam.values[k]!;
  switch (row.item) {
    case 'point':
      return { ...base, kind: 'point', at: beam.from(row), force: value };
    case 'couple':
      return { ...base, kind: 'couple', at: beam.from(row), couple: value };
    case 'uniform': {
      const law: Law = { kind: 'linear', start: value, end: value };
      return { ...base, kind: 'distributed', from: beam.from(row), to: beam.to(row), law };
    }
    case 'varying':
      return { ...base, kind: 'distributed', from: beam.from(row), to: beam.to(row), law: beam.law(k) };
    case 'curvature':
      return { ...base, kind: 'curvature', from: beam.from(row), to: beam.to(row), curvature: value };
    case 'axial':
      return { ...base, kind: 'axial', force: value };
    case 'camber':
      return { ...base, kind: 'camber', from: beam.from(row), to: beam.to(row), rise: value };
    case 'settlement':
      return { ...base, kind: 'settlement', at: beam.from(row), displacement: value };
    case 'rotation':
      return { ...base, kind: 'rotation', at: beam.from(row), angle: value };
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

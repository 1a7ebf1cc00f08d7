/** Supports: rows at one place become one, contradictions are named; settlements, rotations and releases are checked against them. */
import type { Release, Support } from '../beam/model';
import type { Issue } from '../issue';
import type { Evaluated } from './build';
import type { Placed } from './plan';
import type { ItemName } from './words';

interface Growing {
  at: number;
  held: boolean;
  clamped: boolean;
  spring: number;
  rotationalSpring: number;
  rows: number[];
  items: ItemName[];
}

/** What may stand together with what at one place; anything else contradicts. */
const TOGETHER: ReadonlySet<string> = new Set([
  'pin+pin',
  'fixed+fixed',
  'guided+guided',
  'pin+rotational spring',
  'spring+rotational spring',
  'guided+spring',
]);

/** Sorted by position. */
export function gatherSupports(beam: Evaluated): Support[] {
  const found: Growing[] = [];
  const many = beam.plan.placed.length > 60 ? new Map<number, Growing>() : null;
  beam.plan.placed.forEach((row, i) => {
    const { item } = row;
    if (
      item !== 'pin' &&
      item !== 'fixed' &&
      item !== 'guided' &&
      item !== 'spring' &&
      item !== 'rotational spring'
    )
      return;
    const at = beam.from(row);
    let here = many === null ? found.find((support) => support.at === at) : many.get(at);
    if (here === undefined) {
      here = { at, held: false, clamped: false, spring: 0, rotationalSpring: 0, rows: [], items: [] };
      found.push(here);
      many?.set(at, here);
    } else if (!together(here, row, beam)) return;
    here.rows.push(row.row);
    here.items.push(item);
    if (item === 'pin' || item === 'fixed') here.held = true;
    if (item === 'fixed' || item === 'guided') here.clamped = true;
    if (item === 'spring') here.spring = beam.values[i]!;
    if (item === 'rotational spring') here.rotationalSpring = beam.values[i]!;
  });
  found.sort((a, b) => a.at - b.at);
  return found.map(({ at, held, clamped, spring, rotationalSpring, rows }) => ({
    at,
    held,
    clamped,
    spring,
    rotationalSpring,
    rows,
  }));
}

function together(here: Growing, row: Placed, beam: Evaluated): boolean {
  for (let k = 0; k < here.items.length; k += 1) {
    const other = here.items[k]!;
    if (TOGETHER.has(`${other}+${row.item}`) || TOGETHER.has(`${row.item}+${other}`)) continue;
    beam.issues.push({
      code: other === row.item ? 'spring-twice' : 'support-conflict',
      kind: 'invalid',
      row: row.row,
      column: 'Item',
      found: row.item,
      detail: { other, otherRow: here.rows[k]!, at: beam.show(here.at) },
    });
    return false;
  }
  return true;
}

export function supportAt(supports: readonly Support[], at: number): Support | undefined {
  let low = 0;
  let high = supports.length - 1;
  while (low <= high) {
    const middle = (low + high) >> 1;
    const support = supports[middle]!;
    if (support.at === at) return support;
    if (support.at < at) low = middle + 1;
    else high = middle - 1;
  }
  return undefined;
}

/** A settlement displaces a support that holds or springs the deflection; a rotation turns one that holds or springs the rotation. */
export function checkImposed(beam: Evaluated, supports: readonly Support[]): void {
  for (const row of beam.plan.placed) {
    if (row.item !== 'settlement' && row.item !== 'rotation') continue;
    const at = beam.from(row);
    const support = supportAt(supports, at);
    const takes = (s: Support) =>
      row.item === 'settlement' ? s.held || s.spring > 0 : s.clamped || s.rotationalSpring > 0;
    if (support !== undefined && takes(support)) continue;
    beam.issues.push({
      code: row.item === 'settlement' ? 'settlement-unsupported' : 'rotation-unsupported',
      kind: 'invalid',
      row: row.row,
      column: 'At',
      found: beam.show(at),
      detail: { supports: supports.filter(takes).map((s) => beam.show(s.at)) },
    });
  }
}

/**
 * Hinges and shear releases, sorted. Where a release would have nothing to release it is left out with a caution (a hinge at
 * a pinned or free end: the moment is 0 there anyway); where it would take away what a support at the same place holds, or
 * where it is unclear on which side of the release a support or load acts, it is an error.
 */
export function gatherReleases(beam: Evaluated, supports: readonly Support[]): Release[] {
  const releases: Release[] = [];
  for (const row of beam.plan.placed) {
    if (row.item !== 'hinge' && row.item !== 'shear release') continue;
    const at = beam.from(row);
    const hinge = row.item === 'hinge';
    const support = supportAt(supports, at);
    const issue = (code: string, detail: Issue['detail'] = {}): void => {
      beam.issues.push({
        code,
        kind: 'invalid',
        row: row.row,
        column: 'At',
        found: beam.show(at),
        detail: { item: row.item, ...detail },
      });
    };
    const held =
      support !== undefined &&
      (hinge ? support.clamped || support.rotationalSpring > 0 : support.held || support.spring > 0);
    if (held) {
      issue(hinge ? 'hinge-at-clamp' : 'release-at-support', { otherRow: support.rows[0]! });
      continue;
    }
    if (at === beam.start || at === beam.end) {
      beam.cautions.push({
        code: 'release-at-end',
        kind: 'invalid',
        row: row.row,
        column: 'At',
        found: beam.show(at),
        detail: { item: row.item },
      });
      continue;
    }
    const other = releases.find((release) => release.at === at);
    if (other !== undefined && (other.kind === 'moment') === hinge) {
      beam.cautions.push({
        code: 'release-twice',
        kind: 'invalid',
        row: row.row,
        column: 'At',
        found: beam.show(at),
        detail: { item: row.item, otherRow: other.row },
      });
      continue;
    }
    if (other !== undefined) {
      issue('cut-in-two', { otherRow: other.row });
      continue;
    }
    releases.push({ at, kind: hinge ? 'moment' : 'shear', row: row.row });
  }
  checkLoads(beam, releases);
  return releases.sort((a, b) => a.at - b.at);
}

/** A couple at a hinge, or a force at a shear release, acts on one side of it or the other: the row must say which. */
function checkLoads(beam: Evaluated, releases: readonly Release[]): void {
  if (releases.length === 0) return;
  const at = new Map(releases.map((release) => [`${release.kind} ${release.at}`, release]));
  for (const row of beam.plan.placed) {
    if (row.item !== 'point' && row.item !== 'couple') continue;
    const place = beam.from(row);
    const release = at.get(`${row.item === 'couple' ? 'moment' : 'shear'} ${place}`);
    if (release === undefined) continue;
    beam.issues.push({
      code: 'load-at-release',
      kind: 'invalid',
      row: row.row,
      column: 'At',
      found: beam.show(place),
      detail: {
        item: row.item,
        release: release.kind === 'moment' ? 'hinge' : 'shear release',
        otherRow: release.row,
      },
    });
  }
}

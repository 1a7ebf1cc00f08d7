/** REACTION and REACTIONS: what the supports give. Force positive up; a couple has the sign an applied couple has. */
import type { BeamModel, Support } from '../beam/model';
import { fail, type OpenBeam } from '../open';
import { readPosition } from '../rows';
import { plain } from '../signs';
import type { Reaction } from '../solution';
import { heading, unitOf, write } from './units';
import { PARTS, readWord, single } from './words';

/** Two positions nearer than this fraction of the beam's length (or of x itself) are one place: a few roundings of arithmetic in the sheet. */
const SAME_PLACE = 1e-9;

export function samePlace(model: BeamModel, a: number, b: number): boolean {
  return Math.abs(a - b) <= SAME_PLACE * Math.max(model.end - model.start, Math.abs(a), Math.abs(b));
}

/** What a support is, in a word or two. */
export function supportName(support: Support): string {
  const rotation = support.rotationalSpring > 0 ? ' with rotational spring' : '';
  if (support.clamped) return support.held ? 'fixed' : support.spring > 0 ? 'guided spring' : 'guided';
  if (support.held) return `pin${rotation}`;
  return support.spring > 0 ? `spring${rotation}` : 'rotational spring';
}

/**
 * The force (positive up) or the couple of the support at `at`.
 * Throws BeamProblem 'no-support' when nothing there can give it: the issue lists the supports that can.
 */
export function reaction(open: OpenBeam, at: unknown, part?: unknown): number {
  const wanted = readWord(part, 'part', PARTS, 'force');
  const all = open.response.reactions();
  const found = all.find((one) => samePlace(open.model, one.at, supportPosition(open, at)));
  if (found === undefined || !(wanted === 'force' ? found.holdsForce : found.holdsCouple)) {
    return noSupport(open, wanted, all, at);
  }
  return plain(wanted === 'force' ? found.force : found.couple * open.model.axis);
}

function supportPosition(open: OpenBeam, at: unknown): number {
  const cell = single(at);
  const read = readPosition(cell === null || cell === undefined || cell === '' ? 0 : cell, open.model);
  return read.ok ? read.x : fail({ ...read.issue, column: 'at' });
}

function noSupport(open: OpenBeam, wanted: 'force' | 'couple', all: readonly Reaction[], at: unknown): never {
  const can = all.filter((one) => (wanted === 'force' ? one.holdsForce : one.holdsCouple));
  const unit = unitOf(open.model, 'length');
  return fail({
    code: 'no-support',
    kind: 'unavailable',
    column: 'at',
    expected: wanted === 'force' ? 'a support that holds a force' : 'a support that holds a couple',
    found: write(supportPosition(open, at)),
    detail: { part: wanted, unit, supports: can.map((one) => write(one.at)) },
  });
}

/** One row per support under a heading: position, kind of support, force, couple (empty text where it cannot hold one). */
export function reactions(open: OpenBeam): (number | string)[][] {
  const { model } = open;
  const rows: (number | string)[][] = [
    [
      heading('position', unitOf(model, 'length')),
      'support',
      heading('force', unitOf(model, 'reaction')),
      heading('couple', unitOf(model, 'couple')),
    ],
  ];
  for (const one of open.response.reactions()) {
    const support = model.supports.find((candidate) => candidate.at === one.at);
    rows.push([
      one.at,
      support === undefined ? 'support' : supportName(support),
      one.holdsForce ? plain(one.force) : '',
      one.holdsCouple ? plain(one.couple * model.axis) : '',
    ]);
  }
  return rows;
}

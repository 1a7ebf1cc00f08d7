/**
 * A train of axles on an influence line: effect(t) = sum of P_i eta(t + d_i), t = position of the first axle, d_i the
 * other axles' distances from it (turned over when the train comes the other way). Axles off the beam do not count;
 * an axle exactly on an end does.
 *
 * Between two events (an axle passes a break of the line) the effect is one polynomial in t, the sum of the shifted
 * pieces; its extremes are its ends and the roots of its derivative. At the events themselves both limits of a jump
 * count. So the worst place is found exactly and nothing is stepped.
 */
import { fail } from '../open';
import type { BeamModel } from '../beam/model';
import type { Sense } from '../solution';
import { candidates, segmentAt, valueAt, type Segment } from './field';
import { addScaled, compose, type Coefficients } from './polynomial';
import { describe, isBlank } from './words';

export interface Axle {
  /** distance from the first axle, length unit */
  readonly offset: number;
  /** along the y axis, force unit */
  readonly force: number;
}

export interface Worst {
  readonly value: number;
  /** of the first axle */
  readonly position: number;
  readonly section: number;
}

/** The two-column range of axles (offset, force). Throws 'bad-axles' with the row of the range. */
export function readAxles(raw: unknown): Axle[] {
  if (!Array.isArray(raw)) return badAxles(0, describe(raw));
  const axles: Axle[] = [];
  let first: number | null = null;
  (raw as unknown[]).forEach((row, i) => {
    const cells: unknown[] = Array.isArray(row) ? row : [row];
    if (cells.every(isBlank)) return;
    if (cells.length !== 2) badAxles(i + 1, `${cells.length} columns`);
    const [offset, force] = cells.map((cell) => axleNumber(cell, i + 1)) as [number, number];
    first ??= offset;
    axles.push({ offset: offset - first, force });
  });
  return axles.length > 0 ? axles : badAxles(0, 'only blank rows');
}

function axleNumber(cell: unknown, row: number): number {
  if (cell === null || cell === undefined || cell === '') return 0;
  const number = typeof cell === 'string' ? Number(cell) : cell;
  return typeof number === 'number' && Number.isFinite(number) ? number : badAxles(row, describe(cell));
}

function badAxles(row: number, found: string): never {
  return fail({
    code: 'bad-axles',
    kind: 'invalid',
    column: 'axles',
    expected: 'two columns of numbers: offset, force',
    found,
    ...(row > 0 ? { detail: { axle: row } } : {}),
  });
}

/** Both ways over the beam: the distances as given, and turned over (once when the train is its own mirror image). */
export function waysOf(axles: readonly Axle[]): number[][] {
  const along = axles.map((axle) => axle.offset);
  return axles.length === 1 ? [along] : [along, along.map((d) => -d)];
}

/** Keeps the best of what it is shown; a later candidate must be better by more than rounding, so that ties do not flicker. */
export class Best {
  worst: Worst | null = null;
  private score = -Infinity;
  constructor(private readonly sense: Sense) {}

  take(value: number, position: number, section: number): void {
    const score = this.sense === 'largest' ? Math.abs(value) : this.sense === 'highest' ? value : -value;
    if (this.worst !== null && !(score > this.score && score - this.score > 1e-13 * Math.abs(score))) return;
    this.score = score;
    this.worst = { value, position, section };
  }
}

/** Places closer than this fraction of the beam are one event: t = b - d and t + d round differently by an ulp or two. */
const SNAP = 1e-12;

export function snapOf(model: BeamModel): number {
  return SNAP * Math.max(model.end - model.start, Math.abs(model.start), Math.abs(model.end));
}

/** Every t at which an axle stands on one of the breaks, sorted, near-duplicates merged. */
export function eventsOf(breaks: readonly number[], distances: readonly number[], snap: number): number[] {
  const all: number[] = [];
  for (const b of breaks) for (const d of distances) all.push(b - d);
  all.sort((a, b) => a - b);
  const events: number[] = [];
  for (const t of all)
    if (events.length === 0 || t - (events[events.length - 1] as number) > snap) events.push(t);
  return events;
}

/** The field's polynomial under an axle that moves from x to x + length, or null when it is off the beam. */
export function underAxle(field: readonly Segment[], x: number, length: number): Coefficients | null {
  const middle = x + length / 2;
  const first = field[0] as Segment;
  const last = field[field.length - 1] as Segment;
  if (middle < first.from || middle > last.to) return null;
  const segment = field[segmentAt(field, middle)] as Segment;
  const h = segment.to - segment.from;
  return compose(segment.c, (x - segment.from) / h, length / h);
}

/** x, put exactly on a break it is within `snap` of. */
export function snapped(field: readonly Segment[], x: number, snap: number): number {
  const segment = field[segmentAt(field, x)] as Segment;
  if (Math.abs(x - segment.from) <= snap) return segment.from;
  return Math.abs(x - segment.to) <= snap ? segment.to : x;
}

/** Shows `best` every candidate of the train on the influence line of one section, either way or only as the distances are given. */
export function rollOver(
  field: readonly Segment[],
  axles: readonly Axle[],
  snap: number,
  section: number,
  best: Best,
  bothWays = true,
): void {
  const start = (field[0] as Segment).from;
  const end = (field[field.length - 1] as Segment).to;
  const breaks = [...field.map((segment) => segment.from), end];
  for (const distances of bothWays ? waysOf(axles) : [axles.map((axle) => axle.offset)]) {
    const events = eventsOf(breaks, distances, snap);
    events.forEach((t, e) => {
      for (const left of [true, false]) {
        let sum = 0;
        axles.forEach((axle, i) => {
          const x = snapped(field, t + (distances[i] as number), snap);
          if (x >= start && x <= end) sum += axle.force * valueAt(field, x, left);
        });
        best.take(sum, t, section);
      }
      const next = events[e + 1];
      if (next === undefined) return;
      let sum: Coefficients = [0];
      let any = false;
      axles.forEach((axle, i) => {
        const c = underAxle(field, t + (distances[i] as number), next - t);
        if (c === null) return;
        any = true;
        sum = addScaled(sum, c, axle.force);
      });
      if (any) candidates(sum, (tau, value) => best.take(value, t + tau * (next - t), section));
    });
  }
}

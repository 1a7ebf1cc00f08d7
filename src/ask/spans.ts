/**
 * Spans for limits, and the deflection a limit is compared with.
 *
 * A span reaches between neighbouring vertical supports (springs count). What sticks out beyond the last support is an
 * overhang (a cantilever when it is the whole beam); it counts as a span of twice its length. Common practice
 * (a limit of span/360 then allows 2a/360 at the tip of an arm a).
 *
 * Deflection of a span is measured from the chord that joins its two supports where they have gone (settled, or pressed
 * into their springs); that of an overhang from the level of its one support, so that it keeps the tilt of the back
 * span, which is part of what is seen at the tip. Common practice.
 */
import type { BeamModel } from '../beam/model';
import type { Response } from '../solution';
import { cutSegment, extremes, fieldOf, largestOf, valueAt, type Extreme, type Segment } from './field';
import { addScaled } from './polynomial';
import { unitOf, write } from './units';

export interface Span {
  readonly from: number;
  readonly to: number;
  readonly kind: 'span' | 'overhang' | 'cantilever' | 'whole';
  /** the length a limit such as span/360 divides: twice its own length for an overhang or cantilever */
  readonly length: number;
  /** the supports whose displaced places are the zero line; none for a beam that only lies on a foundation */
  readonly chord: readonly number[];
}

/** The spans of a beam from left to right; one 'whole' stretch when it has no vertical support (a foundation alone). */
export function spansOf(model: BeamModel): Span[] {
  const at = model.supports
    .filter((support) => support.held || support.spring > 0)
    .map((support) => support.at);
  const first = at[0];
  const last = at[at.length - 1];
  if (first === undefined || last === undefined) {
    return [{ from: model.start, to: model.end, kind: 'whole', length: model.end - model.start, chord: [] }];
  }
  const arm = at.length === 1 && (first === model.start || first === model.end) ? 'cantilever' : 'overhang';
  const spans: Span[] = [];
  if (first > model.start) {
    spans.push({
      from: model.start,
      to: first,
      kind: arm,
      length: 2 * (first - model.start),
      chord: [first],
    });
  }
  for (let i = 1; i < at.length; i++) {
    const from = at[i - 1] as number;
    const to = at[i] as number;
    spans.push({ from, to, kind: 'span', length: to - from, chord: [from, to] });
  }
  if (last < model.end) {
    spans.push({ from: last, to: model.end, kind: arm, length: 2 * (model.end - last), chord: [last] });
  }
  return spans;
}

/** "0 to 6 m", "overhang 6 to 8 m (counts as 2 × 2 m)". */
export function spanName(model: BeamModel, span: Span): string {
  const unit = unitOf(model, 'length');
  const tail = unit === '' ? '' : ` ${unit}`;
  const ends = `${write(span.from)} to ${write(span.to)}${tail}`;
  if (span.kind === 'span') return ends;
  if (span.kind === 'whole') return `whole beam ${ends}`;
  return `${span.kind} ${ends} (counts as 2 × ${write(span.to - span.from)}${tail})`;
}

/** A held support moves by rounding of the solve: less than this fraction of the peak is no displacement. */
const STILL = 256 * Number.EPSILON;

/** Deflection from the chord, of largest magnitude within the span; model signs and length unit. */
export function sag(response: Response, span: Span): Extreme {
  const plain = response.peak('deflection', 'largest', span.from, span.to);
  const [a, b] = span.chord;
  if (a === undefined) return plain;
  const field = fieldOf(response.pieces('deflection'));
  // the supports' own displacements, taken from inside the span (a shear release may stand on the support)
  const va = valueAt(field, a, a === span.to);
  const vb = b === undefined ? va : valueAt(field, b, true);
  if (Math.max(Math.abs(va), Math.abs(vb)) <= STILL * Math.abs(plain.value)) return plain;
  const slope = b === undefined ? 0 : (vb - va) / (b - a);
  const relative: Segment[] = [];
  for (const segment of field) {
    const from = Math.max(segment.from, span.from);
    const to = Math.min(segment.to, span.to);
    if (!(to > from)) continue;
    const chord = [va + slope * (from - a), slope * (to - from)];
    const c = addScaled(cutSegment(segment, from, to), chord, -1);
    relative.push({ from, to, c });
  }
  return largestOf(extremes(relative));
}

/** The beam itself: its strip to scale of stiffness, supports, releases, loads, span dimensions and the case legend. */
import type { BeamModel, Law } from '../engine';
import { svg } from '../dom';
import { formatNumber } from '../numbers';
import { texts } from '../texts';
import { caseClass, LoadPainter } from './loads';
import {
  path,
  px,
  SMALL,
  TEXT,
  unitOf,
  withUnit,
  type DrawingInput,
  type DrawingOptions,
  type Frame,
} from './frame';
import { textWidth } from './labels';
import { drawFoundation, drawRelease, drawSupport, SUPPORT_HEIGHT } from './symbols';

/** Half the drawn depth of the stiffest section when EI varies, of any section when it does not, and the least. */
const HALF_MOST = 6;
const HALF_PLAIN = 2.5;
const HALF_LEAST = 1.5;
const SAMPLES = 16;

function stiffness(law: Law, from: number, to: number, x: number): number {
  if (law.kind === 'function') return law.at(x);
  return to === from ? law.start : law.start + ((law.end - law.start) * (x - from)) / (to - from);
}

interface Strip {
  readonly half: (x: number) => number;
  readonly outline: SVGElement;
  readonly varies: boolean;
}

/** Depth goes with the cube root of EI: the depth of a rectangular section of that stiffness. */
function drawStrip(model: BeamModel, frame: Frame): Strip {
  const samples: { x: number; value: number }[] = [];
  for (const { from, to, law } of model.ei) {
    const steps = law.kind === 'linear' && law.start === law.end ? 1 : SAMPLES;
    for (let i = 0; i <= steps; i++) {
      // inside the stretch, so that a function law is not asked past its end
      const x = from + ((to - from) * i) / steps;
      samples.push({ x, value: stiffness(law, from, to, x) });
    }
  }
  const values = samples.map((sample) => sample.value);
  const most = Math.max(...values);
  const varies = most - Math.min(...values) > 1e-9 * most;
  const depth = (value: number): number =>
    varies ? Math.max(HALF_LEAST, HALF_MOST * Math.cbrt(value / most)) : HALF_PLAIN;
  const half = (x: number): number => {
    let found = HALF_PLAIN;
    for (const { from, to, law } of model.ei) {
      if (x >= from && x <= to)
        found = Math.max(from === x || to === x ? found : 0, depth(stiffness(law, from, to, x)));
    }
    return found;
  };
  if (samples.length === 0) samples.push({ x: model.start, value: 1 }, { x: model.end, value: 1 });
  let d = '';
  samples.forEach(({ x, value }, i) => (d += path(i === 0 ? 'M' : ' L', frame.x(x), -depth(value))));
  for (const { x, value } of samples.slice().reverse()) d += path(' L', frame.x(x), depth(value));
  return { half, outline: svg('path', { class: 'sp-beam', d: `${d} Z` }), varies };
}

/** Positions between which lengths are dimensioned: the ends and every support. */
export function stations(model: BeamModel): number[] {
  const all = [model.start, ...model.supports.map((support) => support.at), model.end];
  return [...new Set(all)].sort((a, b) => a - b);
}

function drawDimensions(
  model: BeamModel,
  frame: Frame,
  options: DrawingOptions,
  y: number,
): { group: SVGElement; bottom: number } {
  const group = svg('g', { class: 'sp-dimensions' });
  const marks = stations(model);
  let line = path('M', frame.left, y, 'H', frame.right);
  for (const at of marks)
    line += path(' M', frame.x(at) - 3, y + 3, 'l', 6, -6, 'M', frame.x(at), y - 5, 'v', 10);
  group.append(svg('path', { class: 'sp-dimension', d: line }));
  const unit = unitOf(model, 'length');
  let row = false;
  // texts that do not fit between their marks go one line lower, in turn; what still does not fit is read by the crosshair
  const ends = [-Infinity, -Infinity];
  for (let i = 0; i + 1 < marks.length; i++) {
    const from = marks[i] ?? 0;
    const to = marks[i + 1] ?? 0;
    const number = formatNumber(to - from, options.separators, 4);
    const room = frame.x(to) - frame.x(from) - 6;
    const full = withUnit(number, unit);
    const words = textWidth(full, SMALL) <= room ? full : number;
    const width = textWidth(words, SMALL);
    const middle = (frame.x(from) + frame.x(to)) / 2;
    const fits = width <= room;
    const level = fits ? 0 : 1;
    const left = Math.max(1, Math.min(middle - width / 2, frame.width - 1 - width));
    if (left < (ends[level] ?? 0) + 4) continue;
    ends[level] = left + width;
    if (level === 1) row = true;
    group.append(
      svg(
        'text',
        {
          class: 'sp-small',
          x: px(left + width / 2),
          y: px(y + SMALL + 3 + level * 12),
          'text-anchor': 'middle',
        },
        words,
      ),
    );
  }
  return { group, bottom: y + SMALL + 6 + (row ? 12 : 0) };
}

function drawLegend(
  input: DrawingInput,
  options: DrawingOptions,
  y: number,
): { group: SVGElement; bottom: number } | null {
  const { cases } = input.model;
  if (cases.length === 0) return null;
  const group = svg('g', { class: 'sp-legend' });
  let left = 4;
  let line = y;
  cases.forEach((name, index) => {
    const factor = input.factors ? (input.factors[index] ?? 0) : 1;
    const words =
      input.factors === null
        ? name
        : factor === 0
          ? texts.drawing.notActing(name)
          : texts.drawing.times(name, formatNumber(factor, options.separators, 4));
    const width = 20 + textWidth(words, TEXT);
    if (left + width > options.width - 4 && left > 4) {
      left = 4;
      line += 15;
    }
    group.append(
      svg(
        'g',
        { class: `${caseClass(index)}${factor === 0 ? ' sp-idle' : ''}` },
        svg('path', { class: 'sp-swatch', d: path('M', left, line + 8, 'h', 14) }),
        svg('text', { class: 'sp-label', x: px(left + 18), y: px(line + 12) }, words),
      ),
    );
    left += width + 12;
  });
  return { group, bottom: line + 17 };
}

export interface BeamDrawing {
  readonly group: SVGElement;
  /** y of the beam's axis within the group */
  readonly axis: number;
  readonly height: number;
  readonly varies: boolean;
}

/** The whole beam part, its top at y = 0. */
export function drawBeam(input: DrawingInput, options: DrawingOptions, frame: Frame): BeamDrawing {
  const { model } = input;
  const strip = drawStrip(model, frame);
  const body = svg('g');
  const deepest = Math.max(HALF_PLAIN, ...model.supports.map((support) => strip.half(support.at)));
  const below = deepest + SUPPORT_HEIGHT;

  for (const { from, to } of model.foundations)
    body.append(drawFoundation(frame.x(from), frame.x(to), strip.varies ? HALF_MOST : HALF_PLAIN));
  for (const support of model.supports) {
    const roller =
      support.held && !support.clamped && support.rows.some((row) => /roller/i.test(input.word?.(row) ?? ''));
    body.append(drawSupport(support, frame, model, 0, strip.half(support.at), roller));
  }
  const loads = new LoadPainter(input, options, frame, strip.half, below).paint();
  body.append(strip.outline, loads.group);
  for (const release of model.releases)
    body.append(drawRelease(release.kind, frame.x(release.at), 0, strip.half(release.at)));

  const axis = 6 - Math.min(loads.top, -18);
  let y = Math.max(loads.bottom, below) + 14;
  const dimensions = drawDimensions(model, frame, options, y);
  body.append(dimensions.group);
  y = dimensions.bottom;
  const legend = drawLegend(input, options, y + 2);
  if (legend) {
    body.append(legend.group);
    y = legend.bottom;
  }
  const group = svg('g', { class: 'sp-part-beam', transform: `translate(0 ${px(axis)})` }, body);
  return { group, axis, height: axis + y, varies: strip.varies };
}

/** One diagram under the beam: zero line, curve, peaks and zero crossings with their labels, limit lines, envelope band. */
import type { Peak, Quantity, Response, Side } from '../engine';
import { svg } from '../dom';
import { formatNumber } from '../numbers';
import { texts } from '../texts';
import { curvePath } from './curve';
import { Placer, textWidth, type Box, type Ink } from './labels';
import { stations } from './beam';
import {
  path,
  px,
  SMALL,
  TEXT,
  unitOf,
  type DrawingInput,
  type DrawingOptions,
  type Frame,
  type LimitLine,
} from './frame';

const PLAIN_HEIGHT = 58;
const LARGE_HEIGHT = 150;
const CAPTION = 17;
/** room for a label outside the highest and lowest point */
const PAD = 17;
/** zero crossings closer together than this on average say nothing at this size */
const ZERO_PITCH = 24;
/** local extremes smaller than this part of the largest are not labelled */
const WORTH = 0.04;
/** a limit further away than this many times the deflection would flatten the curve: it is stated, not drawn */
const LIMIT_REACH = 2.5;

export interface Diagram {
  readonly quantity: Quantity;
  readonly group: SVGElement;
  readonly height: number;
  /** y of the zero line and of a shown value, within the group */
  readonly zero: number;
  readonly y: (shown: number) => number;
  /** where the crosshair writes the value at its position */
  readonly reading: SVGTextElement;
  /** drawn height of a deflection over its height to the scale of the beam; null for other diagrams or a straight beam */
  readonly exaggeration: number | null;
}

/** +1 when positive shown values are drawn downwards. */
function direction(quantity: Quantity, input: DrawingInput, options: DrawingOptions): 1 | -1 {
  if (quantity === 'moment') return options.momentBelow ? 1 : -1;
  if (quantity === 'deflection') return input.model.axis;
  return -1;
}

interface Point {
  readonly at: number;
  readonly shown: number;
  readonly main: boolean;
}

/** Highest and lowest of the whole beam first, then those of every span, largest first. */
function labelled(quantity: Quantity, input: DrawingInput, response: Response): Point[] {
  const point = (peak: Peak, main: boolean): Point => ({
    at: peak.at,
    shown: input.show(quantity, peak.value),
    main,
  });
  const points: Point[] = [];
  const length = input.model.end - input.model.start;
  const same = (a: Point, b: Point): boolean =>
    Math.abs(a.at - b.at) < 1e-6 * length && Math.abs(a.shown - b.shown) <= 1e-6 * Math.abs(b.shown);
  const add = (next: Point): void => {
    if (next.shown !== 0 && !points.some((known) => same(known, next))) points.push(next);
  };
  const highest = point(response.peak(quantity, 'highest'), true);
  const lowest = point(response.peak(quantity, 'lowest'), true);
  const most = Math.max(Math.abs(highest.shown), Math.abs(lowest.shown));
  for (const main of [highest, lowest].sort((a, b) => Math.abs(b.shown) - Math.abs(a.shown))) {
    // the far end of a diagram that stays on one side is its zero at a support: nothing to label
    if (Math.abs(main.shown) > most * 1e-6) add(main);
  }
  const marks = stations(input.model);
  const local: Point[] = [];
  for (let i = 0; i + 1 < marks.length; i++) {
    for (const sense of ['highest', 'lowest'] as const) {
      const peak = point(response.peak(quantity, sense, marks[i], marks[i + 1]), false);
      if (Math.abs(peak.shown) > most * WORTH) local.push(peak);
    }
  }
  local.sort((a, b) => Math.abs(b.shown) - Math.abs(a.shown));
  local.forEach(add);
  return points;
}

export function drawDiagram(
  quantity: Quantity,
  input: DrawingInput,
  options: DrawingOptions,
  frame: Frame,
  response: Response,
): Diagram {
  const { model } = input;
  const group = svg('g', { class: `sp-part sp-part-${quantity}` });
  const height = options.enlarged === quantity ? LARGE_HEIGHT : PLAIN_HEIGHT;
  const sign = direction(quantity, input, options);
  const band = input.bands?.[quantity];
  const points = labelled(quantity, input, response);
  const values = [0, ...points.map((point) => point.shown)];
  if (band) values.push(...band.lowest, ...band.highest);
  const own = Math.max(...values.map(Math.abs));
  const limits = quantity === 'deflection' ? (input.limits ?? []) : [];
  const near = limits.filter((limit) => limit.allowed <= own * LIMIT_REACH);
  const lines = near.map((limit) => limitLine(limit, input, response));
  for (const line of lines) values.push(line.start, line.end);

  const up = Math.max(0, ...values.map((value) => -sign * value));
  const down = Math.max(0, ...values.map((value) => sign * value));
  const scale = up + down > 0 ? height / (up + down) : 0;
  const top = CAPTION + (up > 0 ? PAD : 4);
  const zero = top + (scale > 0 ? up * scale : height / 4);
  const y = (shown: number): number => zero + sign * shown * scale;
  const bottom = scale > 0 ? top + height : zero;
  const total = bottom + (down > 0 ? PAD : 6);

  const unit = unitOf(model, quantity);
  const caption = svg(
    'text',
    { class: 'sp-caption', x: 4, y: TEXT + 1 },
    texts.drawing.caption(texts.quantity[quantity], unit),
  );
  const reading = svg('text', {
    class: 'sp-reading',
    x: px(options.width - 4),
    y: TEXT + 1,
    'text-anchor': 'end',
  });
  const title = svg('title', null, texts.quantity[quantity]);
  group.append(title, caption, reading);

  for (const at of stations(model)) {
    group.append(svg('path', { class: 'sp-guide', d: path('M', frame.x(at), CAPTION + 2, 'V', total) }));
  }
  if (band) group.append(svg('path', { class: 'sp-band', d: bandPath(band, frame, y) }));
  const factor = input.show(quantity, 1);
  const d = curvePath(response.pieces(quantity), frame.x, (value) => y(value * factor));
  const first = response.value(quantity, model.start, 'right') * factor;
  const closed = `M${px(frame.left)} ${px(zero)}L${px(frame.left)} ${px(y(first))}${d.replace(/^M/, 'L')}L${px(frame.right)} ${px(zero)}Z`;
  group.append(
    svg('path', { class: 'sp-area', d: closed }),
    svg('path', { class: 'sp-zero', d: path('M', frame.left, zero, 'H', frame.right) }),
    svg('path', { class: 'sp-curve', d }),
  );
  for (const line of lines) {
    group.append(
      svg(
        'path',
        {
          class: 'sp-limit',
          d: path('M', frame.x(line.from), y(line.start), 'L', frame.x(line.to), y(line.end)),
        },
        svg('title', null, line.text),
      ),
    );
  }

  const placer = new Placer(2, options.width - 2);
  placer.keepOff(ink(response, quantity, input, frame, y, lines));
  placer.take({ left: 0, top: 0, width: textWidth(caption.textContent, TEXT) + 6, height: CAPTION - 2 });
  labelPeaks(group, placer, points, quantity, options, frame, y, zero, sign, total);
  if (quantity === 'moment' || quantity === 'shear') {
    labelZeros(group, placer, response.zeros(quantity), input, options, frame, zero);
  }
  const perUnit = (frame.right - frame.left) / (model.end - model.start);
  const exaggeration = quantity === 'deflection' && scale > 0 ? (scale * Math.abs(factor)) / perUnit : null;
  return { quantity, group, height: total, zero, y, reading, exaggeration };
}

/** Where the curve and the limit lines run, pixel by pixel, so that labels keep off them. */
function ink(
  response: Response,
  quantity: Quantity,
  input: DrawingInput,
  frame: Frame,
  y: (shown: number) => number,
  lines: readonly DrawnLimit[],
): Ink {
  const from = Math.floor(frame.left);
  const count = Math.ceil(frame.right) - from + 1;
  const curve: number[] = [];
  const { start, end } = input.model;
  for (let i = 0; i < count; i++) {
    const x = Math.min(end, Math.max(start, frame.x.invert(from + i)));
    curve.push(y(input.show(quantity, response.value(quantity, x, 'right'))));
  }
  return {
    from,
    curve,
    lines: lines.map((line) => ({
      x0: frame.x(line.from),
      x1: frame.x(line.to),
      y0: y(line.start),
      y1: y(line.end),
    })),
  };
}

interface DrawnLimit {
  readonly from: number;
  readonly to: number;
  /** shown deflection at both ends of the line */
  readonly start: number;
  readonly end: number;
  readonly text: string;
}

/** The limit on the side to which the span deflects, parallel to its chord. */
function limitLine(limit: LimitLine, input: DrawingInput, response: Response): DrawnLimit {
  const { from, to, chord, allowed, text } = limit;
  const at = (x: number, side: Side): number =>
    input.show('deflection', response.value('deflection', x, side));
  const [a, b] = chord;
  const va = a === undefined ? 0 : at(a, a === to ? 'left' : 'right');
  const slope = a === undefined || b === undefined ? 0 : (at(b, 'left') - va) / (b - a);
  const line = (x: number): number => (a === undefined ? 0 : va + slope * (x - a));
  const high = input.show('deflection', response.peak('deflection', 'largest', from, to).value);
  const middle = (line(from) + line(to)) / 2;
  const side = high < middle ? -1 : 1;
  return { from, to, start: line(from) + side * allowed, end: line(to) + side * allowed, text };
}

function bandPath(
  band: {
    readonly x: readonly number[];
    readonly lowest: readonly number[];
    readonly highest: readonly number[];
  },
  frame: Frame,
  y: (shown: number) => number,
): string {
  let d = '';
  band.x.forEach((at, i) => (d += path(i === 0 ? 'M' : ' L', frame.x(at), y(band.highest[i] ?? 0))));
  for (let i = band.x.length - 1; i >= 0; i--)
    d += path(' L', frame.x(band.x[i] ?? 0), y(band.lowest[i] ?? 0));
  return `${d} Z`;
}

function labelPeaks(
  group: SVGElement,
  placer: Placer,
  points: readonly Point[],
  quantity: Quantity,
  options: DrawingOptions,
  frame: Frame,
  y: (shown: number) => number,
  zero: number,
  sign: 1 | -1,
  total: number,
): void {
  const number = (value: number, digits: number): string => formatNumber(value, options.separators, digits);
  for (const point of points) {
    const x = frame.x(point.at);
    const at = y(point.shown);
    const outward = sign * point.shown > 0 ? 1 : -1;
    const full = texts.drawing.valueAt(number(point.shown, 4), number(point.at, 4));
    const choices = point.main ? [full, number(point.shown, 4)] : [number(point.shown, 3)];
    const size = point.main ? TEXT : SMALL;
    const wishes = (words: string): Box[] => {
      const width = textWidth(words, size);
      const box = (left: number, top: number): Box => ({ left, top, width, height: size + 1 });
      const out = outward > 0 ? at + 4 : at - 4 - size;
      const all = [
        box(x - width / 2, out),
        box(x + 5, out),
        box(x - width - 5, out),
        box(x + 5, at - size / 2),
        box(x - width - 5, at - size / 2),
      ];
      if (point.main) {
        const inward = outward > 0 ? at - 6 - size : at + 6;
        all.push(box(x - width / 2, inward), box(x + 9, inward), box(x - width - 9, inward));
      }
      return all.filter((wish) => wish.top >= CAPTION - 4 && wish.top + wish.height <= total + 1);
    };
    let place: Box | null = null;
    let words = '';
    for (words of choices) if ((place = placer.clear(wishes(words)))) break;
    // the two values that matter most are labelled even where their text must cross the curve
    if (!place && point.main) {
      for (words of choices) if ((place = placer.first(wishes(words)))) break;
    }
    if (place) {
      group.append(
        svg(
          'text',
          {
            class: point.main ? 'sp-peak' : 'sp-peak sp-peak-local',
            x: px(place.left + place.width / 2),
            y: px(place.top + size - 1),
            'text-anchor': 'middle',
          },
          words,
        ),
      );
    }
    const done = place !== null;
    if (done || point.main)
      group.append(svg('circle', { class: 'sp-peak-dot', cx: px(x), cy: px(at), r: point.main ? 2.6 : 1.8 }));
  }
  if (points.length === 0) {
    group.append(
      svg(
        'text',
        {
          class: 'sp-small',
          x: px((frame.left + frame.right) / 2),
          y: px(zero - 4),
          'text-anchor': 'middle',
        },
        texts.drawing.zeroEverywhere(texts.quantity[quantity]),
      ),
    );
  }
}

function labelZeros(
  group: SVGElement,
  placer: Placer,
  zeros: readonly number[],
  input: DrawingInput,
  options: DrawingOptions,
  frame: Frame,
  zero: number,
): void {
  const { model } = input;
  const length = model.end - model.start;
  const known = stations(model);
  // a zero at a pin or a free end is there by definition
  const between = zeros.filter((at) => !known.some((mark) => Math.abs(mark - at) < 1e-6 * length));
  if (between.length > (frame.right - frame.left) / ZERO_PITCH) return;
  for (const at of between) {
    const x = frame.x(at);
    const words = formatNumber(at, options.separators, 3);
    const width = textWidth(words, SMALL);
    const box = (left: number, top: number): Box => ({ left, top, width, height: SMALL });
    group.append(svg('circle', { class: 'sp-crossing', cx: px(x), cy: px(zero), r: 2.2 }));
    const place = placer.clear([
      box(x + 4, zero - SMALL - 2),
      box(x - width - 4, zero - SMALL - 2),
      box(x + 4, zero + 3),
      box(x - width - 4, zero + 3),
    ]);
    if (place) {
      group.append(
        svg('text', { class: 'sp-small', x: px(place.left), y: px(place.top + SMALL - 1) }, words),
      );
    }
  }
}

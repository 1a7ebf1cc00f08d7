/** Support and release symbols as the textbooks draw them. Each hangs from the beam's underside at (x, y). */
import type { BeamModel, Support } from '../engine';
import { svg } from '../dom';
import { path, type Frame } from './frame';

const WIDTH = 8;
const HEIGHT = 11;
/** height of the whole symbol with its hatching */
export const SUPPORT_HEIGHT = 19;

/** Short slanted strokes under a ground line from x-w to x+w. */
function hatch(x: number, y: number, half: number): string {
  let d = path('M', x - half, y, 'H', x + half);
  for (let at = x - half + 1; at <= x + half; at += 4) d += path(' M', at + 1, y, 'l', -3.5, 4);
  return d;
}

/** Slanted strokes along a vertical wall; `side` -1 draws them to its left. */
function wall(x: number, top: number, bottom: number, side: -1 | 1): string {
  let d = path('M', x, top, 'V', bottom);
  for (let at = top + 3; at <= bottom; at += 4.5) d += path(' M', x, at - 1, 'l', side * 5, 4);
  return d;
}

function triangle(x: number, y: number): SVGElement {
  return svg('path', {
    class: 'sp-support',
    d: path('M', x, y, 'L', x - WIDTH, y + HEIGHT, 'H', x + WIDTH, 'Z'),
  });
}

function zigzag(x: number, y: number, length: number): string {
  const step = length / 6;
  let d = path('M', x, y);
  for (let i = 0; i < 5; i++) d += path(' L', x + (i % 2 === 0 ? 5 : -5), y + step * (i + 0.8));
  return d + path(' L', x, y + length);
}

function spiral(x: number, y: number): string {
  let d = '';
  for (let i = 0; i <= 40; i++) {
    const angle = (i / 40) * Math.PI * 4;
    const radius = 1 + (i / 40) * 7;
    d += path(i === 0 ? 'M' : ' L', x + radius * Math.cos(angle), y + radius * Math.sin(angle));
  }
  return d;
}

/** One support. `half` is half the drawn depth of the beam there; `y` the beam's axis. */
export function drawSupport(
  support: Support,
  frame: Frame,
  model: BeamModel,
  y: number,
  half: number,
  roller: boolean,
): SVGElement {
  const x = frame.x(support.at);
  const under = y + half;
  const group = svg('g', { class: 'sp-support-group' });
  const line = (d: string): void => {
    group.append(svg('path', { class: 'sp-support-line', d }));
  };
  const first = support.at === model.start;
  const last = support.at === model.end;
  if (support.clamped && support.held) {
    if (first || last) line(wall(x, y - half - 11, y + half + 11, first ? -1 : 1));
    else {
      // held both ways inside the beam: a clamp above and below
      line(hatch(x, under + 2, WIDTH));
      line(path('M', x - WIDTH, y - half - 2, 'H', x + WIDTH));
      for (let at = x - WIDTH + 1; at <= x + WIDTH; at += 4)
        line(path('M', at - 1, y - half - 2, 'l', 3.5, -4));
    }
  } else if (support.clamped) {
    // guided: the end slides along a wall between two rollers
    const side = last && !first ? 1 : -1;
    line(path('M', x, y - half - 7, 'V', y + half + 7));
    line(wall(x + side * 6, y - half - 11, y + half + 11, side));
    for (const cy of [y - half - 3, y + half + 3]) {
      group.append(svg('circle', { class: 'sp-support', cx: px1(x + side * 3), cy: px1(cy), r: 2.4 }));
    }
  } else if (support.held) {
    if (roller) {
      group.append(svg('circle', { class: 'sp-support', cx: px1(x), cy: px1(under + 5.5), r: 5.5 }));
    } else group.append(triangle(x, under));
    line(hatch(x, under + HEIGHT + (roller ? 0.5 : 0), WIDTH + 3));
  }
  if (!support.held && support.spring > 0) {
    line(zigzag(x, under, 14));
    line(hatch(x, under + 14, WIDTH));
  }
  if (!support.clamped && support.rotationalSpring > 0) {
    line(spiral(x, support.held || support.spring > 0 ? y : under + 8));
  }
  return group;
}

function px1(value: number): number {
  return Math.round(value * 10) / 10;
}

/** Hinge: an open circle on the axis. Shear release: two upright strokes with a gap, the beam free to step between them. */
export function drawRelease(kind: 'moment' | 'shear', x: number, y: number, half: number): SVGElement {
  if (kind === 'moment') {
    return svg('circle', {
      class: 'sp-release',
      cx: px1(x),
      cy: px1(y),
      r: Math.min(4.5, Math.max(3.5, half + 0.5)),
    });
  }
  return svg(
    'g',
    null,
    svg('rect', {
      class: 'sp-gap',
      x: px1(x - 2.5),
      y: px1(y - half - 1),
      width: 5,
      height: px1(2 * half + 2),
    }),
    svg('path', {
      class: 'sp-support-line',
      d: path('M', x - 2.5, y - half - 5, 'v', 2 * half + 10, 'M', x + 2.5, y - half - 5, 'v', 2 * half + 10),
    }),
  );
}

/** Continuous elastic support: a row of small springs on one ground line. */
export function drawFoundation(from: number, to: number, y: number): SVGElement {
  let d = path('M', from, y + 12, 'H', to);
  const count = Math.max(1, Math.floor((to - from) / 11));
  const pitch = (to - from) / count;
  for (let i = 0; i < count; i++) {
    const x = from + pitch * (i + 0.5);
    d += path(' M', x, y, 'l', 2.5, 2, 'l', -5, 2.7, 'l', 5, 2.7, 'l', -5, 2.6, 'l', 2.5, 2);
  }
  for (let x = from + 3; x <= to; x += 4.5) d += path(' M', x, y + 12, 'l', -3, 3.5);
  return svg('path', { class: 'sp-support-line sp-foundation', d });
}

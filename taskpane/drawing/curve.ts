/**
 * Polynomial pieces to an SVG path. Pieces up to the third degree become one Bézier curve, exactly; higher ones are cut into
 * parts, each the cubic with the same end values and end slopes. The error of such a part is at most h^4/384 max|f''''|
 * (cubic Hermite interpolation, standard numerical analysis): with 6 parts a full-height quartic is off by less than 1/50 pixel.
 */
import type { Piece } from '../engine';
import { px } from './frame';

const PARTS = 6;

function horner(coefficients: Float64Array, u: number): [value: number, slope: number] {
  let value = 0;
  let slope = 0;
  for (let k = coefficients.length - 1; k >= 0; k--) {
    slope = slope * u + value;
    value = value * u + (coefficients[k] ?? 0);
  }
  return [value, slope];
}

function degree(coefficients: Float64Array): number {
  let top = coefficients.length - 1;
  while (top > 0 && coefficients[top] === 0) top--;
  return top;
}

/** Path through all pieces; `x` and `y` map to pixels and must be linear. Jumps become upright strokes. */
export function curvePath(
  pieces: readonly Piece[],
  x: (at: number) => number,
  y: (value: number) => number,
): string {
  const d: string[] = [];
  let pen = '';
  const point = (at: number, value: number): string => `${px(x(at))} ${px(y(value))}`;
  for (const { x0, h, origin, coefficients } of pieces) {
    const n = degree(coefficients);
    const parts = n <= 3 ? 1 : PARTS;
    for (let i = 0; i < parts; i++) {
      const t0 = i / parts;
      const t1 = (i + 1) / parts;
      const [v0, s0] = horner(coefficients, t0 + origin);
      const [v1, s1] = horner(coefficients, t1 + origin);
      const start = point(x0 + h * t0, v0);
      if (pen === '') d.push(`M${start}`);
      else if (pen !== start) d.push(`L${start}`);
      pen = point(x0 + h * t1, v1);
      const third = (t1 - t0) / 3;
      if (n <= 1) d.push(`L${pen}`);
      else {
        d.push(
          `C${point(x0 + h * (t0 + third), v0 + s0 * third)} ${point(x0 + h * (t1 - third), v1 - s1 * third)} ${pen}`,
        );
      }
    }
  }
  return d.join('');
}

import { BandMatrix } from '../../../src/integrate/band';
import { seeded } from '../../helpers/random';

const EPS = 2 ** -52;

/** Random band system with rows of very different size; returns the largest relative error of the solution x = 1, 2, 3, ... */
function errorOf(n: number, rowScale: (r: number) => number): number {
  const random = seeded(n);
  const rows: number[][] = [];
  const band = BandMatrix.zeros(n, 5, 5);
  const b = band.b;
  for (let r = 0; r < n; r++) {
    rows.push([]);
    for (let c = Math.max(0, r - 5); c <= Math.min(n - 1, r + 5); c++) {
      const value = (random() - 0.5) * rowScale(r);
      rows[r]![c] = value;
      band.set(r, c, value);
      b[r]! += value * (c + 1);
    }
  }
  expect(band.factor()).toBeGreaterThan(0);
  const residual = band.solve(0);
  // backward stable: the residual is a few roundings of the terms of a row
  expect(residual).toBeLessThanOrEqual(16 * EPS);
  let worst = 0;
  for (let c = 0; c < n; c++) worst = Math.max(worst, Math.abs(b[c]! / (c + 1) - 1));
  return worst;
}

describe('band elimination', () => {
  test('needs interchanges: a zero on the diagonal', () => {
    const band = BandMatrix.zeros(2, 5, 5);
    band.set(0, 1, 2);
    band.set(1, 0, 4);
    band.b.set([6, 8]);
    expect(band.factor()).toBeGreaterThan(0);
    band.solve(0);
    expect([...band.b]).toEqual([2, 3]);
  });

  test('random systems; rows 1e±12 apart make no difference', () => {
    // random band matrices of this size have condition numbers up to some 1e4
    expect(errorOf(40, () => 1)).toBeLessThan(1e5 * EPS);
    expect(errorOf(40, (r) => (r % 2 ? 1e12 : 1e-12))).toBeLessThan(1e5 * EPS);
    expect(errorOf(400, () => 1)).toBeLessThan(1e6 * EPS);
  });

  test('a singular system says so', () => {
    const band = BandMatrix.zeros(2, 5, 5);
    band.set(0, 0, 1);
    band.set(0, 1, 2);
    band.set(1, 0, 2);
    band.set(1, 1, 4);
    expect(band.factor()).toBe(0);
    const empty = BandMatrix.zeros(2, 5, 5);
    empty.set(0, 0, 1);
    expect(empty.factor()).toBe(0);
  });
});

import {
  addScaled,
  bound,
  derivative,
  evaluate,
  integrateFrom,
  multiply,
  productIntegral,
  rootsIn,
} from '../../../src/integrate/polynomial';

const EPS = 2 ** -52;

describe('polynomials', () => {
  const p = [2, -3, 0.5, 1.25];

  test('value by hand', () => {
    expect(evaluate(p, 2)).toBe(2 - 6 + 2 + 10);
  });

  test('derivative of the integral is the polynomial', () => {
    const back = derivative(integrateFrom(p, -0.5, 1, 7));
    back.forEach((c, k) => expect(Math.abs(c - p[k]!)).toBeLessThanOrEqual(2 * EPS * Math.abs(p[k]!)));
  });

  test('an integral starts at its start value', () => {
    expect(Math.abs(evaluate(integrateFrom(p, -0.5, 3, 7), -0.5) - 7)).toBeLessThanOrEqual(8 * EPS * 7);
    expect(evaluate(integrateFrom(p, 0, 3, 7), 0)).toBe(7);
  });

  test('product and its integral', () => {
    // (1 + u)(1 - u) = 1 - u^2; over 0..1: 2/3; over -1/2..1/2: 11/12
    expect(multiply([1, 1], [1, -1])).toEqual([1, 0, -1]);
    expect(productIntegral([1, 1], [1, -1], 0)).toBeCloseTo(2 / 3, 15);
    expect(productIntegral([1, 1], [1, -1], -0.5)).toBeCloseTo(11 / 12, 15);
  });

  test('sum with a factor, either one longer', () => {
    expect(addScaled([1], [1, 2], 3)).toEqual([4, 6]);
    expect(addScaled([1, 2], [1], 3)).toEqual([4, 2]);
  });

  test('bound is a bound', () => {
    for (let u = 0; u <= 1; u += 1 / 64) expect(Math.abs(evaluate(p, u))).toBeLessThanOrEqual(bound(p, 0));
  });
});

describe('roots', () => {
  /** coefficients of the product of (u - r) */
  const withRoots = (roots: readonly number[]): number[] =>
    roots.reduce((acc, r) => multiply(acc, [-r, 1]), [1] as number[]);

  test('all simple roots inside, none outside', () => {
    const found = rootsIn(withRoots([-0.2, 0.1, 0.25, 0.7, 1.3]), 0, 1);
    expect(found).toHaveLength(3);
    // condition of a simple root: coefficient rounding / |p'|, below 1e3 here
    [0.1, 0.25, 0.7].forEach((r, i) => expect(Math.abs(found[i]! - r)).toBeLessThanOrEqual(1000 * EPS));
  });

  test('two roots 1e-6 apart are two', () => {
    expect(rootsIn(withRoots([0.5, 0.500001]), 0, 1)).toHaveLength(2);
  });

  test('roots at the ends count once', () => {
    expect(rootsIn([0, 1, -1], 0, 1)).toEqual([0, 1]);
  });

  test('constants and the zero polynomial have none; trailing zeros do not matter', () => {
    expect(rootsIn([3], 0, 1)).toEqual([]);
    expect(rootsIn([0, 0, 0], 0, 1)).toEqual([]);
    expect(rootsIn([-0.5, 1, 0, 0], 0, 1)).toEqual([0.5]);
  });
});

/**
 * Gauss-Legendre rules on 0..1: n nodes integrate a polynomial of degree 2n-1 exactly.
 * Nodes by Newton's method on P_n from Tricomi's starting values; weights 2/((1-z^2) P_n'(z)^2)
 * (Abramowitz & Stegun 25.4.29, 22.16.6, from memory).
 */
export interface Rule {
  readonly nodes: Float64Array;
  readonly weights: Float64Array;
}

const rules = new Map<number, Rule>();

export function gauss(n: number): Rule {
  const known = rules.get(n);
  if (known) return known;
  const nodes = new Float64Array(n);
  const weights = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    let z = Math.cos((Math.PI * (i + 0.75)) / (n + 0.5));
    let slope = 1;
    // Newton doubles its digits: five steps from Tricomi's estimate are full precision, ten are safe
    for (let turn = 0; turn < 10; turn++) {
      let before = 1;
      let here = z;
      for (let k = 2; k <= n; k++) [before, here] = [here, ((2 * k - 1) * z * here - (k - 1) * before) / k];
      if (n === 1) here = z;
      slope = (n * (z * here - before)) / (z * z - 1);
      z -= here / slope;
    }
    nodes[n - 1 - i] = (1 + z) / 2;
    weights[n - 1 - i] = 1 / ((1 - z * z) * slope * slope);
  }
  const rule = { nodes, weights };
  rules.set(n, rule);
  return rule;
}

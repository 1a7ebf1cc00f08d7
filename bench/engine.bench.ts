/** The engine against what a spreadsheet user would build instead, and against itself: ratios of issue "the beam engine, whole". */
import { lusolve } from 'mathjs';
import { solve } from '../src/integrate/solve';
import type { BeamModel } from '../src/beam/model';
import type { Response, Solution } from '../src/solution';
import { beam, distributed, pin, point, stretch } from '../tests/helpers/model';
import { seeded } from '../tests/helpers/random';
import { measure, ratio, show } from './timing';

function solved(model: BeamModel): Solution {
  const result = solve(model);
  if (!result.ok) throw new Error(result.issue.code);
  return result.solution;
}

/** Two 5 m spans, uniform load on the first, a point load at x = 7: the seven-row beam. */
const two = beam(0, 10, {
  supports: [pin(0), pin(5), pin(10)],
  ei: [stretch(0, 10, 7)],
  loads: [distributed(0, 5, 3), point(7, 2)],
});

/**
 * The same beam by a dense displacement method: `nodes` nodes with two unknowns each, solved by mathjs lusolve. 4 elements (5 nodes) is the
 * least that gives the deflection at x = 2.5 and the load at 7; 61 nodes is the sampled version that gives a whole curve.
 */
function dense(positions: readonly number[], ask: number): number {
  const n = 2 * positions.length;
  const K: number[][] = Array.from({ length: n }, () => new Array<number>(n).fill(0));
  const f = new Array<number>(n).fill(0);
  const EI = 7;
  for (let e = 0; e + 1 < positions.length; e++) {
    const a = positions[e]!;
    const L = positions[e + 1]! - a;
    const k = EI / L ** 3;
    const ke = [
      [12, 6 * L, -12, 6 * L],
      [6 * L, 4 * L * L, -6 * L, 2 * L * L],
      [-12, -6 * L, 12, -6 * L],
      [6 * L, 2 * L * L, -6 * L, 4 * L * L],
    ];
    for (let i = 0; i < 4; i++) for (let j = 0; j < 4; j++) K[2 * e + i]![2 * e + j]! += k * ke[i]![j]!;
    if (a < 5) {
      const w = 3;
      const fe = [(w * L) / 2, (w * L * L) / 12, (w * L) / 2, (-w * L * L) / 12];
      for (let i = 0; i < 4; i++) f[2 * e + i]! += fe[i]!;
    }
  }
  f[2 * positions.indexOf(7)]! += 2;
  for (const at of [0, 5, 10]) {
    const i = 2 * positions.indexOf(at);
    for (let j = 0; j < n; j++) K[i]![j] = 0;
    K[i]![i] = 1;
    f[i] = 0;
  }
  const x = lusolve(K, f) as number[][];
  return x[2 * positions.indexOf(ask)]![0]!;
}

export function bench(): void {
  console.log('engine');
  const few = [0, 2.5, 5, 7, 10];
  const many = [...new Set([...Array.from({ length: 60 }, (_, i) => (i * 10) / 60), 2.5, 7, 10])].sort(
    (a, b) => a - b,
  );
  const ours = measure(() => solved(two).respond(null).value('deflection', 2.5, 'right'));
  const minimal = measure(() => dense(few, 2.5));
  const sampled = measure(() => dense(many, 2.5), 40, 5);
  const agree = Math.abs(dense(few, 2.5) / solved(two).respond(null).value('deflection', 2.5, 'right') - 1);
  show('two spans: solve and one value', ours);
  show(
    '  the same, dense, least nodes, mathjs lusolve',
    minimal,
    `(values agree to ${agree.toExponential(0)})`,
  );
  show(`  the same, dense, ${many.length} nodes, mathjs lusolve`, sampled);
  ratio('least dense system / ours', minimal.median / ours.median, { atLeast: 5 });
  ratio('sampled dense system / ours', sampled.median / ours.median, { atLeast: 1000 });

  const perSpan: number[] = [];
  for (const spans of [10, 100, 1000, 10000]) {
    const model = beam(0, 5 * spans, {
      supports: Array.from({ length: spans + 1 }, (_, i) => pin(5 * i)),
      ei: [stretch(0, 5 * spans, 7)],
      loads: [distributed(0, 5 * spans, 3)],
    });
    const t = measure(() => solved(model).respond(null).value('deflection', 2.5, 'right'), 60, 7);
    perSpan.push(t.median / spans);
    show(`${spans} spans, per span`, { ...t, median: t.median / spans });
    if (spans === 10000 && global.gc) {
      global.gc();
      const before = process.memoryUsage();
      const keep = solved(model);
      keep.respond(null).peak('deflection', 'largest');
      global.gc();
      const after = process.memoryUsage();
      const bytes = after.heapUsed + after.arrayBuffers - before.heapUsed - before.arrayBuffers;
      console.log(`  memory kept per region, every diagram formed: ${(bytes / spans).toFixed(0)} bytes`);
      keep.respond(null);
    }
  }
  ratio('dearest span / cheapest span, 10 to 10,000 spans', Math.max(...perSpan) / Math.min(...perSpan), {
    atMost: 1.5,
  });

  const response: Response = solved(two).respond(null);
  const random = seeded(7);
  const xs = Array.from({ length: 1024 }, () => 10 * random());
  let i = 0;
  const value = measure(() => response.value('deflection', xs[i++ & 1023]!, 'right'));
  const formula = measure(() => {
    const x = 0.5 * xs[i++ & 1023]!;
    return (3 * x * (125 - 10 * x * x + x * x * x)) / (24 * 7);
  });
  show('one value of a solved beam', value);
  show('hand-typed formula of a simple span', formula);
  ratio('one value / hand-typed formula', value.median / formula.median, { atMost: 5 });

  const ten = beam(0, 50, {
    supports: Array.from({ length: 11 }, (_, k) => pin(5 * k)),
    cases: ['G', 'Q', 'W'],
    ei: [stretch(0, 50, 7)],
    loads: [distributed(0, 50, 3, 3, 0), distributed(0, 25, 1, 1, 1), point(12, 3, 2)],
  });
  const whole = measure(() => solved(ten).respond([1, 1, 1]).value('deflection', 2.5, 'right'));
  const solution = solved(ten);
  let n = 0;
  const again = measure(() => solution.respond([1, 1, 1e-6 * n++]).value('deflection', 2.5, 'right'));
  const peak = measure(() => solution.respond([1, 1, 1e-6 * n++]).peak('deflection', 'largest').value);
  show('ten spans, three cases: solve and one value', whole);
  show('  another combination, one value', again);
  show('  another combination, largest deflection', peak);
  ratio('another combination / solve', again.median / whole.median, { atMost: 0.2 });
  // an exact envelope of 20 combinations against 20 separate solves
  const twenty = Array.from({ length: 20 }, (_, k) => [1, 0.1 * k, 1 - 0.05 * k]);
  const highest = (of: () => Solution): number => {
    let worst = -Infinity;
    for (const factors of twenty) {
      worst = Math.max(worst, of().respond(factors).peak('deflection', 'highest').value);
    }
    return worst;
  };
  // a solution of its own each time, so that no response is remembered from the round before
  const together = measure(() => {
    const own = solved(ten);
    return highest(() => own);
  });
  const separate = measure(() => highest(() => solved(ten)));
  show('envelope of 20 combinations, solved once', together);
  show('  the same by 20 separate solves', separate);
  console.log(`  -> separate / together: ${(separate.median / together.median).toPrecision(3)}`);
}

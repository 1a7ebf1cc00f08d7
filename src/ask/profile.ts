/**
 * PROFILE: shear, moment, slope and deflection along the beam, ready for a chart.
 * Positions: `points` equally spaced ones, and every place where something starts, ends or jumps. Where a quantity jumps
 * (shear at a point load, slope at a hinge, ...) the position stands twice, with the left-hand and right-hand values,
 * so that a chart draws the step upright.
 */
import type { BeamModel } from '../beam/model';
import type { OpenBeam } from '../open';
import type { Quantity, Response, Side } from '../solution';
import { sortedOnce } from './field';
import { quiet } from './quiet';
import { heading, unitOf } from './units';
import { QUANTITIES, readPoints } from './words';

/** Every position the table names: supports, releases, ends of loads and of section stretches, and the beam's own ends. */
export function namedPositions(model: BeamModel): number[] {
  const at: number[] = [model.start, model.end];
  for (const support of model.supports) at.push(support.at);
  for (const release of model.releases) at.push(release.at);
  for (const stretch of [...model.ei, ...model.ga, ...model.foundations]) at.push(stretch.from, stretch.to);
  for (const load of model.loads) {
    if ('at' in load) at.push(load.at);
    if ('from' in load) at.push(load.from, load.to);
  }
  return sortedOnce(at.filter((x) => x >= model.start && x <= model.end));
}

/**
 * `count` equally spaced positions together with the given ones. An equally spaced position closer to a given one than
 * a thousandth of the step would be a near-duplicate on the chart and is left out.
 */
export function spread(model: BeamModel, given: readonly number[], count: number): number[] {
  const step = (model.end - model.start) / (count - 1);
  const positions = [...given];
  let next = 0;
  for (let i = 0; i < count; i++) {
    const x = i === count - 1 ? model.end : model.start + i * step;
    while (next < given.length - 1 && (given[next] as number) < x) next++;
    const after = Math.abs((given[next] ?? Infinity) - x);
    const before = Math.abs((given[next - 1] ?? Infinity) - x);
    if (Math.min(after, before) > 1e-3 * step) positions.push(x);
  }
  return sortedOnce(positions);
}

/** Positions with sides: each once (right-hand), and twice where one of the quantities jumps inside the beam. */
export function withJumps(
  model: BeamModel,
  positions: readonly number[],
  jumps: ReadonlySet<number>,
): { x: number; side: Side }[] {
  const places: { x: number; side: Side }[] = [];
  for (const x of positions) {
    if (jumps.has(x) && x > model.start && x < model.end) places.push({ x, side: 'left' });
    places.push({ x, side: x === model.end ? 'left' : 'right' });
  }
  return places;
}

/** Positions where any of the quantities of any of the responses jumps. */
export function jumpsOf(responses: readonly Response[], quantities: readonly Quantity[]): Set<number> {
  const jumps = new Set<number>();
  for (const response of responses) {
    for (const quantity of quantities) for (const x of response.jumps(quantity)) jumps.add(x);
  }
  return jumps;
}

/** Heading and rows: x, shear, moment, slope, deflection. Throws BeamProblem 'bad-points'. */
export function profile(open: OpenBeam, points?: unknown): (number | string)[][] {
  const count = readPoints(points);
  const { model, response } = open;
  const jumps = jumpsOf([response], QUANTITIES);
  const positions = spread(model, sortedOnce([...namedPositions(model), ...jumps]), count);
  const order = ['shear', 'moment', 'slope', 'deflection'] as const;
  const rows: (number | string)[][] = [
    [
      heading('x', unitOf(model, 'length')),
      ...order.map((quantity) => heading(quantity, unitOf(model, quantity))),
    ],
  ];
  const peaks = order.map((quantity) => response.peak(quantity, 'largest').value);
  for (const { x, side } of withJumps(model, positions, jumps)) {
    const values = order.map((quantity, i) => quiet(response.value(quantity, x, side), peaks[i] as number));
    rows.push([x, ...order.map((quantity, i) => open.show(quantity, values[i] as number))]);
  }
  return rows;
}

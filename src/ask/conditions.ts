/**
 * The boundary, support and continuity conditions that fix the constants of integration, each with the values of its two
 * sides computed from the region equations (not from the solution's own joints), so that what is left over is a check.
 * Reader's signs; deflections in the deflection unit. With camber, deflection and slope here are those beyond its shape.
 */
import type { Load, Support } from '../beam/model';
import type { OpenBeam } from '../open';
import type { Reaction } from '../solution';
import { derivative, evaluate } from './polynomial';
import { evaluateAny } from './equation';
import type { RegionWork } from './regions';
import { unitOf } from './units';

export interface Condition {
  readonly text: string;
  readonly at: number;
  readonly left: number;
  readonly right: number;
}

interface State {
  readonly v: number;
  readonly slope: number;
  readonly moment: number;
  readonly shear: number;
}

export function conditionsOf(open: OpenBeam, works: readonly RegionWork[]): Condition[] {
  const { model, combination, response } = open;
  const y = model.axis;
  const perLength = model.units?.deflectionPerLength ?? 1;
  const factorOf = (load: Load): number =>
    combination === null || load.case < 0 ? 1 : (combination.factors[load.case] ?? 0);
  const list: Condition[] = [];
  const first = works[0] as RegionWork;
  const places = [first.from, ...works.map((work) => work.to)];
  const all = response.reactions();
  places.forEach((x, i) => {
    const before = works[i - 1];
    const after = works[i];
    const left = before === undefined ? null : stateOf(open, before, before.to - before.from, factorOf);
    const right = after === undefined ? null : stateOf(open, after, 0, factorOf);
    const here = left ?? right;
    if (here === null) return; // never: every place has a region on one side at least
    const support = model.supports.find((one) => one.at === x);
    const reaction = all.find((one) => one.at === x);
    const released = (kind: 'moment' | 'shear'): boolean =>
      model.releases.some((one) => one.at === x && one.kind === kind);
    const acting = (kind: Load['kind']): number =>
      model.loads.reduce((sum, load) => {
        if (load.kind !== kind || !('at' in load) || load.at !== x) return sum;
        const size =
          load.kind === 'point'
            ? load.force
            : load.kind === 'couple'
              ? load.couple
              : load.kind === 'rotation' || load.kind === 'kink'
                ? load.angle
                : load.displacement;
        return sum + factorOf(load) * size;
      }, 0);
    const add = (text: string, a: number, b: number): void =>
      void list.push({ text, at: x, left: a, right: b });
    const sides: [string, State | null][] = [
      [left && right ? ' (left)' : '', left],
      [left && right ? ' (right)' : '', right],
    ];

    if (support)
      addSupport(support, reaction, sides, here, {
        settled: y * perLength * acting('settlement'),
        turned: y * acting('rotation'),
      });
    if (left && right) {
      const both = (text: string, a: number, b: number): void =>
        add(`${text} is the same on both sides`, a, b);
      if (!released('shear') && !support?.held) both('deflection', left.v, right.v);
      if (!released('moment') && !support?.clamped) both('slope', left.slope, right.slope);
    }
    const couple = acting('couple') + (reaction?.couple ?? 0);
    const force = (reaction?.force ?? 0) - acting('point');
    for (const [side, state] of sides) {
      if (state === null) continue;
      if (released('moment')) add(`M = 0 at the hinge${side}`, state.moment, 0);
      if (released('shear')) add(`V = 0 at the shear release${side}`, state.shear, 0);
    }
    // balance of the joint: with nothing beyond an end, the section force there is 0
    if (!released('moment'))
      add('M steps by the couple there', (right?.moment ?? 0) - (left?.moment ?? 0), couple);
    if (!released('shear') && model.loads.every((load) => load.kind !== 'axial' || factorOf(load) === 0)) {
      add('V steps by reaction less load', (right?.shear ?? 0) - (left?.shear ?? 0), force);
    }

    function addSupport(
      one: Support,
      gives: Reaction | undefined,
      states: readonly [string, State | null][],
      nearest: State,
      moved: { settled: number; turned: number },
    ): void {
      for (const [side, state] of states) {
        if (state === null) continue;
        if (one.held) add(`deflection is held${side}`, state.v, moved.settled);
        if (one.clamped) add(`rotation is held${side}`, state.slope, moved.turned);
      }
      const unit = unitOf(model, 'reaction');
      if (!one.held && one.spring > 0) {
        const pressed = (y * (nearest.v - moved.settled)) / perLength;
        add(
          `spring force = stiffness × deflection${unit === '' ? '' : ` (${unit})`}`,
          gives?.force ?? 0,
          one.spring * pressed,
        );
      }
      if (!one.clamped && one.rotationalSpring > 0) {
        const turned = y * (nearest.slope - moved.turned);
        add(
          'couple of the rotational spring = -stiffness × rotation',
          gives?.couple ?? 0,
          -one.rotationalSpring * turned,
        );
      }
    }
  });
  return list;
}

/** Both diagrams and both curves of a region at s, from its own equations; the camber's shape is taken out, for it is no strain. */
function stateOf(open: OpenBeam, work: RegionWork, s: number, factorOf: (load: Load) => number): State {
  const { model } = open;
  const perLength = model.units?.deflectionPerLength ?? 1;
  const moment = 'coefficients' in work.moment ? work.moment.coefficients : work.moment;
  let bow = 0;
  let tilt = 0;
  for (const load of model.loads) {
    if (load.kind !== 'camber' || load.from > work.from || load.to < work.to) continue;
    const length = load.to - load.from;
    const left = work.from + s - load.from;
    const right = load.to - work.from - s;
    // -4 rise t (1 - t), up being negative in the model
    bow -= (factorOf(load) * 4 * load.rise * left * right) / length ** 2;
    tilt -= (factorOf(load) * 4 * load.rise * (right - left)) / length ** 2;
  }
  return {
    v: perLength * (evaluateAny(work.deflection, s) - model.axis * bow),
    slope: evaluateAny(work.slope, s) - model.axis * tilt,
    moment: evaluate(moment, s),
    shear: evaluate(derivative(moment), s),
  };
}

/**
 * The oracle: every beam of src/beam/model.ts solved a second time, independently of src/integrate, in 48 or more decimal digits (160 bits; more where joints stand close).
 *
 * Formulation: displacement method. Joints at every discontinuity; unknown deflections and rotations of the joints (two of either at a
 * release); stiffness matrices and end forces of the elements between them from power series (oracle-element.ts); symmetric banded
 * elimination. The engine instead carries states through regions in double precision. A pivot that is not positive means that the
 * beam has no stable state: at or past its critical load, or a mechanism.
 *
 * Reading of the contract where it leaves room, so that a difference shows:
 * - camber: the initial shape is w = -4 r t (1 - t) over from..to; supports act on the movement v from that shape; the shown deflection
 *   is v + w. The shown slope is the rotation theta of the section plus w'.
 * - with axial force S is the vertical force on a section; V = dM/dx; joints and springs deal with S; a shear release slides along its
 *   own faces and passes the axial force on (see the assembly).
 * - a function law is known only to double precision: it is replaced by interpolation at up to 17 points in short elements.
 */
import type { BeamModel, Law } from '../../src/beam/model';
import type { Quantity, Side } from '../../src/solution';
import { Element, type Field, type Series } from './oracle-element';
import { Big, currentBits, withBits } from './oracle-number';
import { lawSeries, variesLittle } from './oracle-law';

export interface OracleReaction {
  at: number;
  force: number;
  couple: number;
}

export interface Oracle {
  /** false: at or past the critical load, or a mechanism; then nothing else is to be asked */
  readonly stable: boolean;
  value(quantity: Quantity, x: number, side?: Side): number;
  /** the elastic part alone, without the initial shape */
  raw(field: Field, x: number, side?: Side): number;
  reactions(): OracleReaction[];
  /** largest magnitude of the quantity over `perElement` places of every element, both sides of every joint included */
  scale(quantity: Quantity, perElement?: number): number;
  readonly joints: readonly number[];
  /** vertical force S left and right of joint j, for equilibrium checks */
  readonly elements: readonly Element[];
}

interface Joint {
  x: number;
  /** unknowns on the left and on the right of the joint */
  vL: number;
  vR: number;
  tL: number;
  tR: number;
  force: Big;
  couple: Big;
  kink: Big;
  offset: Big;
}

export function solveOracle(
  model: BeamModel,
  factors: readonly number[] | null = null,
  bits?: number,
): Oracle {
  const breaks = breaksOf(model);
  let shortest = Infinity;
  for (let i = 0; i + 1 < breaks.length; i++) shortest = Math.min(shortest, breaks[i + 1]! - breaks[i]!);
  const ratio = Math.log2((model.end - model.start) / shortest);
  // a displacement method loses about four times the digits of the length ratio
  const wanted = bits ?? Math.min(900, 160 + Math.ceil(4 * ratio));
  return withBits(wanted, () => build(model, factors, breaks, wanted));
}

function breaksOf(model: BeamModel): number[] {
  const set = new Set<number>([model.start, model.end]);
  for (const s of model.supports) set.add(s.at);
  for (const r of model.releases) set.add(r.at);
  for (const s of [...model.ei, ...model.ga, ...model.foundations]) set.add(s.from).add(s.to);
  for (const l of model.loads) {
    if ('at' in l) set.add(l.at);
    else if ('from' in l) set.add(l.from).add(l.to);
  }
  return [...set].sort((a, b) => a - b);
}

function build(model: BeamModel, factors: readonly number[] | null, breaks: number[], bits: number): Oracle {
  const factorOf = (c: number): Big => (c < 0 || !factors ? Big.one : Big.of(factors[c] ?? 0));
  let axial = Big.zero;
  for (const l of model.loads) {
    if (l.kind === 'axial') axial = axial.plus(factorOf(l.case).times(Big.of(l.force)));
  }

  const data: { x0: number; x1: number }[] = [];
  const elements: Element[] = [];
  const cut = (x0: number, x1: number): void => {
    const mid = x0 + 0.5 * (x1 - x0);
    const within = <T extends { from: number; to: number }>(list: readonly T[]): T | undefined =>
      list.find((s) => s.from <= mid && mid <= s.to && s.from <= x0 && s.to >= x1);
    const eiStretch = within(model.ei);
    if (!eiStretch) throw new Error(`oracle: EI does not cover ${x0}..${x1}`);
    const gaStretch = within(model.ga);
    const soil = within(model.foundations);
    const add = (a: number, b: number, depth: number): void => {
      const last = depth > 45 || a + 0.5 * (b - a) <= a || a + 0.5 * (b - a) >= b;
      const halve = (): void => {
        const c = a + 0.5 * (b - a);
        add(a, c, depth + 1);
        add(c, b, depth + 1);
      };
      const h = Big.of(b).minus(Big.of(a));
      const ei = lawSeries(eiStretch, a, b, last);
      const ga = gaStretch ? lawSeries(gaStretch, a, b, last) : null;
      if (!ei || (gaStretch && !ga)) return halve();
      const soft = ga ? ga.map((c, n) => (n === 0 ? c.plus(axial) : c)) : null;
      if (!last && (!variesLittle(ei) || (soft && !variesLittle(soft)))) return halve();
      const k = soil ? Big.of(soil.stiffness) : Big.zero;
      const ei0 = ei[0]!.toNumber();
      const hh = h.toNumber();
      const growth =
        hh * Math.sqrt(Math.abs(axial.toNumber()) / ei0) +
        hh * (k.toNumber() / ei0) ** 0.25 +
        (soft ? hh * Math.sqrt(k.toNumber() / Math.abs(soft[0]!.toNumber())) : 0);
      if (!last && growth > 3) return halve();
      const q: Series = [];
      const addTo = (target: Series, series: Series, factor: Big): void => {
        series.forEach((c, n) => {
          target[n] = (target[n] ?? Big.zero).plus(c.times(factor));
        });
      };
      let kappa = Big.zero;
      const camberSlope: Series = [];
      for (const l of model.loads) {
        if (!('from' in l) || l.from > a || l.to < b) continue;
        const factor = factorOf(l.case);
        if (factor.isZero) continue;
        if (l.kind === 'distributed') {
          const shape = lawSeries(l, a, b, last, true);
          if (!shape) return halve();
          addTo(q, shape, factor);
        } else if (l.kind === 'curvature') kappa = kappa.plus(factor.times(Big.of(l.curvature)));
        else if (l.kind === 'camber') {
          // w' = -4 r (1 - 2 t)/Lc, t = (x - from)/Lc
          const length = Big.of(l.to).minus(Big.of(l.from));
          const t0 = Big.of(a).minus(Big.of(l.from)).over(length);
          const size = factor.times(Big.of(-4 * l.rise)).over(length);
          addTo(camberSlope, [Big.one.minus(t0).minus(t0), h.over(length).times(Big.of(-2))], size);
        }
      }
      data.push({ x0: a, x1: b });
      elements.push(new Element({ x0: a, x1: b, ei, ga, k, axial, q, kappa, camberSlope }));
    };
    add(x0, x1, 0);
  };
  for (let i = 0; i + 1 < breaks.length; i++) cut(breaks[i]!, breaks[i + 1]!);

  // joints and unknowns
  const joints: Joint[] = [];
  let unknowns = 0;
  const places = [model.start, ...data.map((d) => d.x1)];
  const hinges = new Set(model.releases.filter((r) => r.kind === 'moment').map((r) => r.at));
  const slides = new Set(model.releases.filter((r) => r.kind === 'shear').map((r) => r.at));
  for (const x of places) {
    const inner = x !== model.start && x !== model.end;
    const vL = unknowns++;
    const tL = unknowns++;
    const vR = inner && slides.has(x) ? unknowns++ : vL;
    const tR = inner && hinges.has(x) ? unknowns++ : tL;
    joints.push({ x, vL, tL, vR, tR, force: Big.zero, couple: Big.zero, kink: Big.zero, offset: Big.zero });
  }
  const jointAt = new Map(joints.map((j) => [j.x, j]));
  const moved = new Map<number, Big>();
  const turned = new Map<number, Big>();
  for (const l of model.loads) {
    if (!('at' in l)) continue;
    const joint = jointAt.get(l.at)!;
    const factor = factorOf(l.case);
    const plus = (map: Map<number, Big>, amount: number): void => {
      map.set(l.at, (map.get(l.at) ?? Big.zero).plus(factor.times(Big.of(amount))));
    };
    if (l.kind === 'point') joint.force = joint.force.plus(factor.times(Big.of(l.force)));
    else if (l.kind === 'couple') joint.couple = joint.couple.plus(factor.times(Big.of(l.couple)));
    else if (l.kind === 'settlement') plus(moved, l.displacement);
    else if (l.kind === 'rotation') plus(turned, l.angle);
    else if (l.kind === 'kink') joint.kink = joint.kink.plus(factor.times(Big.of(l.angle)));
    else joint.offset = joint.offset.plus(factor.times(Big.of(l.displacement)));
  }

  // assembly: a dense list of rows, each a map column -> value (the band is narrow)
  const rows: Map<number, Big>[] = Array.from({ length: unknowns }, () => new Map());
  const right: Big[] = new Array<Big>(unknowns).fill(Big.zero);
  const into = (i: number, j: number, value: Big): void => {
    if (value.isZero) return;
    rows[i]!.set(j, (rows[i]!.get(j) ?? Big.zero).plus(value));
  };
  elements.forEach((element, i) => {
    const a = joints[i]!;
    const b = joints[i + 1]!;
    const index = [a.vR, a.tR, b.vL, b.tL];
    index.forEach((row, p) => {
      index.forEach((column, s) => into(row, column, element.stiffness[p]![s]!));
      // dislocations at the element's left joint move its own left end
      const shift = element.stiffness[p]![0]!.times(a.offset).plus(element.stiffness[p]![1]!.times(a.kink));
      right[row] = right[row]!.minus(element.loadForces[p]!).minus(shift);
    });
  });
  for (const j of joints) {
    right[j.vL] = right[j.vL]!.plus(j.force);
    right[j.tL] = right[j.tL]!.plus(j.couple);
  }
  // A sliding joint carries the axial force across its opening: M jumps by -N (vR - vL) (moments about the joint). Its faces slide along
  // themselves, so what it cannot carry is S - N (theta + w'): only so are the equations symmetric, as those of a conservative system are.
  for (const j of joints) {
    if (j.vL === j.vR) continue;
    into(j.tL, j.vR, axial);
    into(j.vR, j.tL, axial);
    into(j.tL, j.vL, axial.negated());
    into(j.vL, j.tL, axial.negated());
    const i = joints.indexOf(j);
    const bow = axial.times(elements[i]!.data.camberSlope[0] ?? Big.zero);
    right[j.vR] = right[j.vR]!.minus(bow);
    right[j.vL] = right[j.vL]!.plus(bow);
  }
  const held = new Map<number, Big>();
  for (const s of model.supports) {
    const joint = jointAt.get(s.at)!;
    const ground = moved.get(s.at) ?? Big.zero;
    const angle = turned.get(s.at) ?? Big.zero;
    if (s.held) held.set(joint.vL, ground);
    else if (s.spring !== 0) {
      into(joint.vL, joint.vL, Big.of(s.spring));
      right[joint.vL] = right[joint.vL]!.plus(Big.of(s.spring).times(ground));
    }
    if (s.clamped) held.set(joint.tL, angle);
    else if (s.rotationalSpring !== 0) {
      into(joint.tL, joint.tL, Big.of(s.rotationalSpring));
      right[joint.tL] = right[joint.tL]!.plus(Big.of(s.rotationalSpring).times(angle));
    }
  }

  const solved = eliminate(rows, right, held);
  const stable = solved !== null;
  if (solved) {
    elements.forEach((element, i) => {
      const a = joints[i]!;
      const b = joints[i + 1]!;
      element.settle(solved[a.vR]!.plus(a.offset), solved[a.tR]!.plus(a.kink), solved[b.vL]!, solved[b.tL]!);
    });
  }

  const locate = (x: number, side: Side): Element => {
    let low = 0;
    let high = elements.length - 1;
    while (low < high) {
      const mid = (low + high) >> 1;
      const end = elements[mid]!.data.x1;
      if (x < end || (x === end && side === 'left')) high = mid;
      else low = mid + 1;
    }
    return elements[low]!;
  };
  const initial = (x: number, element: Element): { w: Big; slope: Big } => {
    let w = Big.zero;
    let slope = Big.zero;
    for (const l of model.loads) {
      if (l.kind !== 'camber' || l.from > element.data.x0 || l.to < element.data.x1) continue;
      const length = Big.of(l.to).minus(Big.of(l.from));
      const t = Big.of(x).minus(Big.of(l.from)).over(length);
      const size = factorOf(l.case).times(Big.of(-4 * l.rise));
      w = w.plus(size.times(t).times(Big.one.minus(t)));
      slope = slope.plus(size.times(Big.one.minus(t).minus(t)).over(length));
    }
    return { w, slope };
  };
  const ask = <T>(work: () => T): T => {
    if (!stable) throw new Error('oracle: this beam has no stable state');
    return withBits(bits, work);
  };
  const fieldOf = { deflection: 'v', slope: 'theta', moment: 'M', shear: 'V' } as const;
  const value = (quantity: Quantity, x: number, side: Side = 'right'): number =>
    ask(() => {
      const element = locate(x, side);
      let result = element.value(fieldOf[quantity], x);
      if (quantity === 'deflection') result = result.plus(initial(x, element).w);
      else if (quantity === 'slope') result = result.plus(initial(x, element).slope);
      return result.toNumber();
    });
  return {
    stable,
    elements,
    joints: joints.map((j) => j.x),
    value,
    raw: (field, x, side = 'right') => ask(() => locate(x, side).value(field, x).toNumber()),
    reactions: () =>
      ask(() =>
        model.supports.map((s) => {
          const i = joints.findIndex((j) => j.x === s.at);
          const joint = joints[i]!;
          const leftOf = (field: Field): Big => (i > 0 ? elements[i - 1]!.value(field, s.at) : Big.zero);
          const rightOf = (field: Field): Big =>
            i < elements.length ? elements[i]!.value(field, s.at) : Big.zero;
          const force = rightOf('S').minus(leftOf('S')).plus(joint.force);
          const couple = rightOf('M').minus(leftOf('M')).minus(joint.couple);
          return {
            at: s.at,
            force: s.held || s.spring !== 0 ? force.toNumber() : 0,
            couple: s.clamped || s.rotationalSpring !== 0 ? couple.toNumber() : 0,
          };
        }),
      ),
    scale: (quantity, perElement = 5) => {
      let largest = 0;
      for (const { x0, x1 } of data) {
        for (let i = 0; i <= perElement; i++) {
          const x = i === 0 ? x0 : i === perElement ? x1 : x0 + ((x1 - x0) * i) / perElement;
          const side = i === perElement ? 'left' : 'right';
          largest = Math.max(largest, Math.abs(value(quantity, x, side)));
        }
      }
      return largest;
    },
  };
}

/** Symmetric banded elimination with some unknowns prescribed; null when a pivot is not positive. */
function eliminate(rows: Map<number, Big>[], right: Big[], held: ReadonlyMap<number, Big>): Big[] | null {
  const n = rows.length;
  const own = rows.map((row, i) => row.get(i)?.magnitude ?? -Infinity);
  for (const [j, value] of held) {
    for (const [i] of rows[j]!) {
      if (held.has(i)) continue;
      right[i] = right[i]!.minus(rows[i]!.get(j)!.times(value));
      rows[i]!.delete(j);
    }
  }
  for (let p = 0; p < n; p++) {
    if (held.has(p)) continue;
    const row = rows[p]!;
    const pivot = row.get(p);
    // what is left of a singular pivot is rounding: some 2^-bits of the diagonal; a real one keeps more than half of its digits
    if (!pivot || pivot.sign <= 0 || pivot.magnitude < own[p]! - 0.6 * currentBits()) return null;
    for (const [i] of row) {
      if (i <= p) continue;
      const factor = row.get(i)!.over(pivot);
      for (const [j, value] of row) {
        if (j < i) continue;
        const entry = (rows[i]!.get(j) ?? Big.zero).minus(factor.times(value));
        rows[i]!.set(j, entry);
        if (j !== i) rows[j]!.set(i, entry);
      }
      right[i] = right[i]!.minus(factor.times(right[p]!));
      rows[i]!.delete(p);
    }
    for (const [i] of row) if (i < p) row.delete(i);
  }
  const x: Big[] = new Array<Big>(n).fill(Big.zero);
  for (let p = n - 1; p >= 0; p--) {
    const given = held.get(p);
    if (given) {
      x[p] = given;
      continue;
    }
    let value = right[p]!;
    for (const [j, c] of rows[p]!) if (j > p) value = value.minus(c.times(x[j]!));
    x[p] = value.over(rows[p]!.get(p)!);
  }
  return x;
}

export type { Law };

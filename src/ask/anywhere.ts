/**
 * The worst section under a rolling train, besides its worst position.
 *
 * Moment and shear of a beam held by its supports alone: between two neighbouring actions (axles, reactions) V is
 * constant and M linear, so for each position of the train the extremes stand at an axle or beside a support. Both follow
 * from the reactions' influence lines by equilibrium of the part to the left; between two events they are polynomials in
 * t, so the worst is found exactly.
 *
 * Deflection and slope vary smoothly with the section: the exact worst position for a section and the exact worst
 * section for a position are taken in turn, from several sections of every span, until neither gains any more.
 * Moment and shear on foundations or under axial force: extremes over the sections are exact for each position; the
 * position is closed in on between events.
 */
import type { BeamModel, Load } from '../beam/model';
import type { Quantity, Response, Sense } from '../solution';
import { candidates, sortedOnce, unionOfBreaks, type Segment } from './field';
import { bare, influenceField, influenceFactor, reactionLines, respondTo } from './influence';
import { addScaled, multiply, type Coefficients } from './polynomial';
import { namedPositions } from './profile';
import { lowestBetween } from './roots';
import { shownFactor, turned } from '../signs';
import { Best, eventsOf, rollOver, snapOf, underAxle, waysOf, type Axle } from './train';
import type { Effect } from './words';

/** Shows `best` the candidates of every section; values in the reader's signs and units. */
export function worstAnywhere(
  model: BeamModel,
  effect: Effect,
  axles: readonly Axle[],
  best: Best,
  sense: Sense,
): void {
  if (effect === 'reaction' || effect === 'couple') return overSupports(model, effect, axles, best);
  const still = model.foundations.length === 0 && bare(model).length === 0;
  if ((effect === 'moment' || effect === 'shear') && still) return byEquilibrium(model, effect, axles, best);
  if (effect === 'moment' || effect === 'shear') return byPosition(model, effect, axles, best, sense);
  return inTurn(model, effect, axles, best, sense);
}

export function scaledField(field: readonly Segment[], factor: number): Segment[] {
  return field.map((segment) => ({ ...segment, c: segment.c.map((term) => factor * term) }));
}

/** The effect's influence line in the reader's signs and units. */
export function shownLine(model: BeamModel, effect: Effect, x: number, side: 'left' | 'right'): Segment[] {
  return scaledField(influenceField(model, effect, { x, side }), influenceFactor(model, effect));
}

function overSupports(
  model: BeamModel,
  effect: 'reaction' | 'couple',
  axles: readonly Axle[],
  best: Best,
): void {
  for (const support of model.supports) {
    const gives =
      effect === 'reaction'
        ? support.held || support.spring > 0
        : support.clamped || support.rotationalSpring > 0;
    if (gives)
      rollOver(shownLine(model, effect, support.at, 'right'), axles, snapOf(model), support.at, best);
  }
}

function byEquilibrium(
  model: BeamModel,
  effect: 'moment' | 'shear',
  axles: readonly Axle[],
  best: Best,
): void {
  const lines = reactionLines(model);
  const fields = [...lines.force, ...lines.couple].filter(
    (field): field is readonly Segment[] => field !== null,
  );
  const breaks = sortedOnce([...unionOfBreaks(fields), model.start, model.end]);
  const snap = snapOf(model);
  const onBeam = (x: number): boolean => x >= model.start - snap && x <= model.end + snap;
  for (const distances of waysOf(axles)) {
    const events = eventsOf(breaks, distances, snap);
    events.forEach((t, e) => {
      look(distances, t, 0);
      const next = events[e + 1];
      if (next !== undefined) look(distances, t, next - t);
    });
  }

  /** All sections while the first axle goes from t to t + length (length 0: standing on an event). */
  function look(distances: readonly number[], t: number, length: number): void {
    const at = axles.map((_, i) => t + (distances[i] as number));
    const acts = at.map((x) => onBeam(x + length / 2));
    const sum = (field: readonly Segment[] | null | undefined): Coefficients => {
      let total: Coefficients = [0];
      if (!field) return total;
      axles.forEach((axle, i) => {
        if (!acts[i]) return;
        const x = Math.min(Math.max(at[i] as number, model.start), model.end);
        const c = underAxle(field, length === 0 ? x : (at[i] as number), length);
        if (c !== null) total = addScaled(total, c, model.axis * axle.force);
      });
      return total;
    };
    const forces = lines.at.map((_, k) => sum(lines.force[k]));
    const couples = lines.at.map((_, k) => sum(lines.couple[k]));
    const show = (c: Coefficients, x: number, speed: number): void =>
      candidates(c, (tau, value) => best.take(value, t + tau * length, x + tau * speed));

    // sections that travel with an axle
    axles.forEach((_, i) => {
      if (!acts[i]) return;
      const x = at[i] as number;
      let c: Coefficients = [0];
      lines.at.forEach((a, k) => {
        if (!(a < x + length / 2)) return;
        const force = forces[k] as Coefficients;
        if (effect === 'shear') c = addScaled(c, force, 1);
        else {
          c = addScaled(c, multiply(force, [x - a, length]), 1);
          c = addScaled(c, couples[k] as Coefficients, 1);
        }
      });
      let here = 0;
      axles.forEach((axle, j) => {
        if (!acts[j]) return;
        const ahead = (at[i] as number) - (at[j] as number);
        const force = model.axis * axle.force;
        if (ahead > 0) c = addScaled(c, [effect === 'shear' ? force : force * ahead], -1);
        else if (ahead === 0) here += force;
      });
      show(c, x, length);
      if (effect === 'shear') show(addScaled(c, [here], -1), x, length);
    });

    // sections beside a support
    lines.at.forEach((s, m) => {
      let c: Coefficients = [0, 0];
      lines.at.forEach((a, k) => {
        if (!(a < s)) return;
        c = addScaled(c, forces[k] as Coefficients, effect === 'shear' ? 1 : s - a);
        if (effect === 'moment') c = addScaled(c, couples[k] as Coefficients, 1);
      });
      axles.forEach((axle, j) => {
        const x = at[j] as number;
        if (!acts[j] || !(x + length / 2 < s)) return;
        const force = model.axis * axle.force;
        c = addScaled(c, effect === 'shear' ? [force] : [force * (s - x), -force * length], -1);
      });
      if (s > model.start) show(c, s, 0);
      if (s < model.end)
        show(addScaled(c, (effect === 'shear' ? forces[m] : couples[m]) as Coefficients, 1), s, 0);
    });
  }
}

/**
 * An axle nearer to a named position than this fraction of the beam is put on it: a load a few roundings away from a
 * support leaves nothing but rounding to the rest of the beam, and no effect asked for here feels the difference.
 */
const ONTO = 1e-9;

/** The axles that stand on the beam when the first is at t, as loads of the model. */
function loadsAt(
  model: BeamModel,
  axles: readonly Axle[],
  distances: readonly number[],
  t: number,
): Extract<Load, { kind: 'point' }>[] {
  const reach = ONTO * (model.end - model.start);
  const named = namedPositions({ ...model, loads: [] });
  const loads: Extract<Load, { kind: 'point' }>[] = [];
  axles.forEach((axle, i) => {
    const x = t + (distances[i] as number);
    const at = named.find((one) => Math.abs(one - x) <= reach) ?? x;
    if (at < model.start || at > model.end) return;
    loads.push({ row: 0, case: -1, kind: 'point', at, force: model.axis * axle.force });
  });
  return loads;
}

function peakOf(
  model: BeamModel,
  response: Response,
  quantity: Quantity,
  sense: Sense,
): { value: number; at: number } {
  const factor = shownFactor(model, quantity);
  const peak = response.peak(quantity, turned(sense, factor));
  return { value: factor * peak.value, at: peak.at };
}

/** Sections to start from in every stretch between supports: its ends and three inside; deflections have at most one wave or two there. */
const STARTS = [0, 0.25, 0.5, 0.75, 1];
/** Each turn gains the square of what was left; thirty are far more than full precision needs. */
const TURNS = 30;

function inTurn(
  model: BeamModel,
  effect: 'deflection' | 'slope',
  axles: readonly Axle[],
  best: Best,
  sense: Sense,
): void {
  const stops = sortedOnce([model.start, ...model.supports.map((support) => support.at), model.end]);
  const starts = new Set<number>();
  for (let i = 1; i < stops.length; i++) {
    const a = stops[i - 1] as number;
    const b = stops[i] as number;
    for (const part of STARTS) starts.add(part === 1 ? b : a + part * (b - a));
  }
  const ways = waysOf(axles);
  for (const start of starts) {
    let section = start;
    let reached = -Infinity;
    for (let turn = 0; turn < TURNS; turn++) {
      const line = shownLine(model, effect, section, section === model.end ? 'left' : 'right');
      // each way by itself, so that the position found can be told with its direction
      let gained = false;
      for (const distances of ways) {
        const one = new Best(sense);
        const turnedAxles = axles.map((axle, i) => ({ offset: distances[i] as number, force: axle.force }));
        rollOver(line, turnedAxles, snapOf(model), section, one, false);
        if (one.worst === null) continue;
        const loads = loadsAt(model, axles, distances, one.worst.position);
        const peak =
          loads.length === 0
            ? { value: 0, at: section }
            : peakOf(model, respondTo(model, loads), effect, sense);
        best.take(peak.value, one.worst.position, peak.at);
        const score =
          sense === 'largest' ? Math.abs(peak.value) : sense === 'highest' ? peak.value : -peak.value;
        if (score > reached + 1e-15 * Math.abs(score)) {
          reached = score;
          section = peak.at;
          gained = true;
        }
      }
      if (!gained) break;
    }
  }
}

/** Positions tried in each stretch between events before closing in: the extreme over the sections is smooth there, with few waves. */
const PROBES = 4;

function byPosition(
  model: BeamModel,
  effect: 'moment' | 'shear',
  axles: readonly Axle[],
  best: Best,
  sense: Sense,
): void {
  const breaks = namedPositions({ ...model, loads: [] });
  const sign = (value: number): number =>
    sense === 'largest' ? -Math.abs(value) : sense === 'highest' ? -value : value;
  let least = Infinity;
  const stretches: { level: (t: number) => number; tries: number[]; levels: number[] }[] = [];
  for (const distances of waysOf(axles)) {
    const level = (t: number): number => {
      const loads = loadsAt(model, axles, distances, t);
      if (loads.length === 0) return 0;
      const response = respondTo(model, loads);
      const peak = peakOf(model, response, effect, sense);
      best.take(peak.value, t, peak.at);
      let here = sign(peak.value);
      if (effect === 'shear') {
        // an axle on a support may stand a hair to either side of it, and then carries its own step of V with it
        for (const { at, force } of loads) {
          if (!breaks.includes(at)) continue;
          const steps: number[] = [];
          if (at < model.end) steps.push(response.value('shear', at, 'right') + force);
          if (at > model.start) steps.push(response.value('shear', at, 'left') - force);
          for (const value of steps) {
            best.take(value, t, at);
            here = Math.min(here, sign(value));
          }
        }
      }
      least = Math.min(least, here);
      return here;
    };
    const events = eventsOf(breaks, distances, snapOf(model));
    events.forEach((t, e) => {
      level(t);
      const next = events[e + 1];
      if (next === undefined) return;
      const tries = Array.from({ length: PROBES + 1 }, (_, i) => t + ((next - t) * i) / PROBES);
      stretches.push({ level, tries, levels: tries.map(level) });
    });
  }
  // close in where the probes leave room for something worse than all that is known
  const reach = (levels: readonly number[]): number => {
    let steepest = 0;
    for (let i = 1; i < levels.length; i++) {
      steepest = Math.max(steepest, Math.abs((levels[i] as number) - (levels[i - 1] as number)));
    }
    return Math.min(...levels) - steepest;
  };
  stretches.sort((a, b) => reach(a.levels) - reach(b.levels));
  for (const { level, tries, levels } of stretches) {
    if (reach(levels) >= least) break;
    const at = levels.indexOf(Math.min(...levels));
    lowestBetween(level, tries[Math.max(0, at - 1)] as number, tries[Math.min(PROBES, at + 1)] as number);
  }
}

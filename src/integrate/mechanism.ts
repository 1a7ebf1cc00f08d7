/**
 * Can the beam move without bending? A sweep from left to right over the rigid motions (deflection v, rotation t) that the supports and
 * springs met so far still allow at the current place.
 *
 * The allowed motions form a space of dimension 2, 1 or 0. A held deflection or a spring asks v = 0, a held rotation asks t = 0, an
 * elastic foundation asks both; a hinge lets t start afresh, a shear release lets v start afresh. If a motion survives to the end, or is
 * shut in between releases, the beam is a mechanism. These are the pivots of the kinematic conditions; stiffness does not
 * enter, and lengths enter only through "is this distance zero?", so the verdict has no tolerance and no units.
 */
import type { BeamModel } from '../beam/model';
import type { Issue } from '../issue';

interface Event {
  at: number;
  /** order at one place: conditions of the left part before releases, then conditions of the right part */
  kind: 'deflection' | 'rotation' | 'hinge' | 'slide' | 'soil-left' | 'soil-right';
}

/** One rigid piece: held by two deflections, by a deflection and a rotation, or by soil. */
function isHeld(model: BeamModel): boolean {
  let deflections = 0;
  let rotations = 0;
  for (const s of model.supports) {
    if (s.held || s.spring !== 0) deflections++;
    if (s.clamped || s.rotationalSpring !== 0) rotations++;
  }
  if (deflections >= 2 || (deflections === 1 && rotations >= 1)) return true;
  return model.foundations.some((f) => f.stiffness !== 0);
}

export function findMechanism(model: BeamModel): Issue | null {
  if (model.releases.length === 0 && isHeld(model)) return null;
  const events: Event[] = [];
  for (const s of model.supports) {
    if (s.held || s.spring !== 0) events.push({ at: s.at, kind: 'deflection' });
    if (s.clamped || s.rotationalSpring !== 0) events.push({ at: s.at, kind: 'rotation' });
  }
  for (const r of model.releases) {
    if (r.at > model.start && r.at < model.end) {
      events.push({ at: r.at, kind: r.kind === 'moment' ? 'hinge' : 'slide' });
    }
  }
  // a stretch of foundation holds both motions over its whole length; across a release inside it, on both sides
  for (const f of model.foundations) {
    if (f.stiffness === 0) continue;
    events.push({ at: f.from, kind: 'soil-right' });
    for (const r of model.releases) {
      if (r.at > f.from && r.at < f.to)
        events.push({ at: r.at, kind: 'soil-left' }, { at: r.at, kind: 'soil-right' });
    }
    events.push({ at: f.to, kind: 'soil-left' });
  }
  const byPlace = new Map<number, Event[]>();
  for (const e of events) {
    const list = byPlace.get(e.at);
    if (list) list.push(e);
    else byPlace.set(e.at, [e]);
  }
  const places = [...byPlace.keys()].sort((a, b) => a - b);

  let dimension = 2;
  let v = 0;
  let t = 0;
  let x = model.start;
  let since = model.start;
  /** a release has been passed inside the part that moves: its pieces turn against each other */
  let folds = false;
  const moving = (to: number): Issue => {
    const detail: Record<string, string | number> = { from: since, to };
    if (folds) detail.motion = 'fold';
    else if (dimension === 2) detail.motion = 'any';
    else if (t === 0) detail.motion = 'translate';
    else {
      detail.motion = 'rotate';
      detail.about = x - v / t;
    }
    return { code: 'unstable', kind: 'unavailable', detail };
  };
  const holdDeflection = (): void => {
    if (dimension === 2) {
      dimension = 1;
      v = 0;
      t = 1;
    } else if (dimension === 1 && v !== 0) dimension = 0;
  };
  const holdRotation = (): void => {
    if (dimension === 2) {
      dimension = 1;
      v = 1;
      t = 0;
    } else if (dimension === 1 && t !== 0) dimension = 0;
  };

  for (const at of places) {
    if (dimension === 1) v += t * (at - x);
    x = at;
    const here = byPlace.get(at)!;
    const soilRight = here.some((e) => e.kind === 'soil-right');
    const hinge = here.some((e) => e.kind === 'hinge');
    const slide = here.some((e) => e.kind === 'slide');
    for (const e of here) {
      if (e.kind === 'deflection') holdDeflection();
      // a rotational restraint at a hinge is taken to hold the left part; the rows refuse the ambiguous cases
      else if (e.kind === 'rotation') holdRotation();
      else if (e.kind === 'soil-left') dimension = 0;
    }
    // what stands on soil right of a release holds only what the release passes on
    if (soilRight && hinge) holdDeflection();
    if (soilRight && slide) holdRotation();
    for (const e of here) {
      if (e.kind === 'hinge') {
        if (dimension === 2 || (dimension === 1 && v === 0)) return moving(at);
        if (dimension === 1) {
          dimension = 2;
          folds = true;
        } else {
          dimension = 1;
          v = 0;
          t = 1;
          since = at;
          folds = false;
        }
      } else if (e.kind === 'slide') {
        if (dimension === 2 || (dimension === 1 && t === 0)) return moving(at);
        if (dimension === 1) {
          dimension = 2;
          folds = true;
        } else {
          dimension = 1;
          v = 1;
          t = 0;
          since = at;
          folds = false;
        }
      }
    }
    if (soilRight) dimension = 0;
  }
  if (dimension > 0) {
    if (dimension === 1) v += t * (model.end - x);
    x = model.end;
    return moving(model.end);
  }
  return null;
}

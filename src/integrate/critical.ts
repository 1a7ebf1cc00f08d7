/**
 * Is a compressed beam past its critical load, and where is that load?
 *
 * The stiffness matrix of the stations' displacements (v, rotation) at axial force N is formed from the transfer matrices; the number of
 * its negative pivots is the number of critical loads below N (Wittrick & Williams, Q. J. Mech. Appl. Math. 24, 1971, cited from memory).
 * Their count for members with clamped ends is zero here, because segments are cut so short that N h^2/EI stays far below 4 pi^2.
 * Counting pivots needs no eigenvectors and cannot overlook double roots.
 */
import type { BeamModel } from '../beam/model';
import { findStations, transferMatrices } from './closing';
import { carry } from './fields';
import { cutBeam } from './regions';

/**
 * Number of critical loads passed at axial force `axial` (negative = compression); null when the beam cannot be cut.
 * Tension matters too where a joint slides: its two halves can snap apart sideways under tension.
 */
export function passedModes(model: BeamModel, axial: number): number | null {
  // Engesser: a shear-flexible beam has no stiffness left at N = -GA
  for (const stretch of model.ga) {
    const law = stretch.law;
    const samples =
      law.kind === 'linear'
        ? [law.start, law.end]
        : Array.from({ length: 65 }, (_, i) => law.at(stretch.from + ((stretch.to - stretch.from) * i) / 64));
    if (samples.some((ga) => ga + axial <= 0)) return 1;
  }
  const result = cutBeam({ ...model, loads: model.loads.filter((l) => l.kind !== 'distributed') }, axial);
  if (!result.ok) return null;
  const { cut } = result;
  const stations = findStations(model, cut);
  const matrices = transferMatrices(cut, axial);

  // unknown displacements: one deflection and one rotation per station, two where a release parts them
  interface Dofs {
    vLeft: number;
    vRight: number;
    tLeft: number;
    tRight: number;
  }
  const dofs: Dofs[] = [];
  let count = 0;
  for (const s of stations) {
    const held = s.support?.held ?? false;
    const clamped = (s.support?.clamped ?? false) && !s.hinge;
    const vLeft = held ? -1 : count++;
    const tLeft = clamped ? -1 : count++;
    const vRight = s.slide && !held ? count++ : vLeft;
    const tRight = s.hinge ? count++ : tLeft;
    dofs.push({ vLeft, vRight, tLeft, tRight });
  }
  // half bandwidth: the unknowns of two neighbouring stations
  const width = 8;
  const K = new Float64Array(count * width);
  const add = (i: number, j: number, value: number): void => {
    if (i < 0 || j < 0) return;
    if (j < i) return;
    K[i * width + j - i]! += value;
  };
  for (let i = 0; i < stations.length; i++) {
    const s = stations[i]!;
    const d = dofs[i]!;
    if (s.support && !s.support.held && s.support.spring !== 0) add(d.vLeft, d.vLeft, s.support.spring);
    if (s.support && !s.support.clamped && s.support.rotationalSpring !== 0) {
      add(d.tLeft, d.tLeft, s.support.rotationalSpring);
    }
    if (i === 0) continue;
    const T = [1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1];
    for (let r = stations[i - 1]!.at; r < s.at; r++) {
      for (let j = 0; j < 16; j += 4) carry(cut.regions[r]!, matrices[r]!, T, j);
    }
    const k = elementStiffness(T);
    const before = dofs[i - 1]!;
    const map = [before.vRight, before.tRight, d.vLeft, d.tLeft];
    for (let a = 0; a < 4; a++) {
      for (let b = 0; b < 4; b++) {
        // symmetric by reciprocity; the mean of both halves keeps it so in rounding
        if (map[a]! <= map[b]!) add(map[a]!, map[b]!, 0.5 * (k[4 * a + b]! + k[4 * b + a]!));
      }
    }
    // a sliding joint carries the axial force across its offset: N (vR - vL) turns with the rotation
    if (s.slide && d.tLeft >= 0) {
      couple(add, d.vRight, d.tLeft, axial);
      couple(add, d.vLeft, d.tLeft, -axial);
    }
  }
  // L D L^T without interchanges; only the signs of D matter
  let negative = 0;
  for (let i = 0; i < count; i++) {
    let pivot = K[i * width]!;
    if (pivot === 0) pivot = -Number.MIN_VALUE * 2 ** 52;
    if (pivot < 0) negative++;
    const last = Math.min(count - 1, i + width - 1);
    for (let r = i + 1; r <= last; r++) {
      const factor = K[i * width + r - i]! / pivot;
      if (factor !== 0)
        for (let c = r; c <= last; c++) K[r * width + c - r]! -= factor * K[i * width + c - i]!;
    }
  }
  return negative;
}

function couple(
  add: (i: number, j: number, value: number) => void,
  i: number,
  j: number,
  value: number,
): void {
  if (i >= 0 && j >= 0) add(Math.min(i, j), Math.max(i, j), value);
}

/**
 * Stiffness of a segment for (v, rotation) of both ends from its transfer matrix. Forces on the ends in the direction of the
 * displacements: (-S, M) at the left end, (S, -M) at the right end.
 */
function elementStiffness(T: readonly number[]): Float64Array {
  const t = (i: number, j: number): number => T[4 * j + i]!;
  // u1 = Tuu u0 + Tuf (M0, S0)  =>  (M0, S0) = Tuf^-1 (u1 - Tuu u0)
  const det = t(0, 2) * t(1, 3) - t(0, 3) * t(1, 2);
  const inverse = [t(1, 3) / det, -t(0, 3) / det, -t(1, 2) / det, t(0, 2) / det];
  const k = new Float64Array(16);
  for (let j = 0; j < 4; j++) {
    const u0 = j < 2 ? [j === 0 ? 1 : 0, j === 1 ? 1 : 0] : [0, 0];
    const u1 = j >= 2 ? [j === 2 ? 1 : 0, j === 3 ? 1 : 0] : [0, 0];
    const a = u1[0]! - t(0, 0) * u0[0]! - t(0, 1) * u0[1]!;
    const b = u1[1]! - t(1, 0) * u0[0]! - t(1, 1) * u0[1]!;
    const m0 = inverse[0]! * a + inverse[1]! * b;
    const s0 = inverse[2]! * a + inverse[3]! * b;
    const m1 = t(2, 0) * u0[0]! + t(2, 1) * u0[1]! + t(2, 2) * m0 + t(2, 3) * s0;
    const s1 = t(3, 0) * u0[0]! + t(3, 1) * u0[1]! + t(3, 2) * m0 + t(3, 3) * s0;
    k[j] = -s0;
    k[4 + j] = m0;
    k[8 + j] = s1;
    k[12 + j] = -m1;
  }
  return k;
}

/** Size of the critical force between 0 and `axial` (of its sign), found by halving on the count of passed modes. */
export function criticalLoad(model: BeamModel, axial: number): number {
  const sign = Math.sign(axial);
  let lo = 0;
  let hi = Math.abs(axial);
  for (let i = 0; i < 60 && hi - lo > 4e-16 * hi; i++) {
    const mid = 0.5 * (lo + hi);
    if ((passedModes(model, sign * mid) ?? 1) > 0) hi = mid;
    else lo = mid;
  }
  return 0.5 * (lo + hi);
}

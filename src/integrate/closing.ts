/**
 * The closing equations: the constants of integration and the reactions, found for all load columns at once.
 *
 * Unknown is the state (v, rotation, M, S) just right of each station; stations are the beam's start, its supports and releases (and, on
 * foundations and under axial force, enough places in between that the solution grows little from one to the next). Loads
 * and section changes are carried along inside and add no unknowns. Each station contributes four conditions that join at most two
 * states, so the matrix is banded and the cost grows linearly with the number of spans.
 *
 * Why this keeps its digits: nothing is expressed by powers of the whole length or as differences of large stiffnesses (a short or
 * stiff piece gives a transfer matrix near the identity, where a stiffness matrix would hold numbers like EI/h^3); every
 * span is started afresh from its own support, so errors do not grow from span to span; rows and columns are scaled by powers of two to
 * numbers without units. Method: multiple shooting with exact propagators (Ascher, Mattheij & Russell, Numerical Solution of Boundary
 * Value Problems for ODEs, SIAM 1995, section 4.3, cited from memory).
 */
import type { BeamModel, Support } from '../beam/model';
import { BandMatrix } from './band';
import type { Columns } from './columns';
import { carry, particular, transferMatrix } from './fields';
import { noLoad } from './region-load';
import type { Cut, Region } from './regions';

export interface Station {
  /** index into the breaks */
  readonly at: number;
  readonly support: Support | null;
  /** index of the support in the model, -1 without */
  readonly supportIndex: number;
  readonly hinge: boolean;
  readonly slide: boolean;
}

/** Between stations on foundations or under axial force the homogeneous solution may grow by about e^1.5. */
const MAX_SEGMENT_GROWTH = 1.5;

export function findStations(model: BeamModel, cut: Cut): Station[] {
  const { supports, releases } = model;
  const stations: Station[] = [];
  const last = cut.breaks.length - 1;
  let growth = 0;
  let support = 0;
  let release = 0;
  for (let b = 0; b <= last; b++) {
    const x = cut.breaks[b]!;
    // supports and releases are sorted, and every one of them is a break
    const index = support < supports.length && supports[support]!.at === x ? support++ : -1;
    let hinge = false;
    let slide = false;
    while (release < releases.length && releases[release]!.at <= x) {
      if (b > 0 && b < last && releases[release]!.at === x) {
        if (releases[release]!.kind === 'moment') hinge = true;
        else slide = true;
      }
      release++;
    }
    const ahead = b < last ? cut.regions[b]!.growth : 0;
    const grown = growth > 0 && growth + ahead > MAX_SEGMENT_GROWTH;
    if (b === 0 || b === last || index >= 0 || hinge || slide || grown) {
      stations.push({
        at: b,
        support: index >= 0 ? supports[index]! : null,
        supportIndex: index,
        hinge,
        slide,
      });
      growth = 0;
    }
    growth += ahead;
  }
  return stations;
}

export interface Closed {
  readonly stations: readonly Station[];
  /** state right of station i in column c at [(i*columns + c)*4 ..] */
  readonly states: readonly number[];
  /** largest relative residual of the conditions over all columns */
  readonly conditions: number;
}

const load = noLoad();
const own = [0, 0, 0, 0];

/**
 * A segment between two stations: its end state is T x (start state) + p. T (column by column) and p (per load column) are carried
 * through the regions, with the jumps at the breaks passed.
 */
function carrySegment(
  regions: readonly Region[],
  matrices: Matrices,
  columns: Columns,
  axial: number,
  first: number,
  last: number,
  T: number[],
  p: number[],
): void {
  T.fill(0);
  T[0] = T[5] = T[10] = T[15] = 1;
  p.fill(0);
  for (let r = first; r < last; r++) {
    const region = regions[r]!;
    const matrix = matrices[r]!;
    for (let j = 0; j < 16; j += 4) carry(region, matrix, T, j);
    for (let c = 0; c < columns.count; c++) {
      const at = 4 * c;
      if (r > first) {
        addJump(columns, r, c, axial, 1, p, at);
        if (p[at] !== 0 || p[at + 1] !== 0 || p[at + 2] !== 0 || p[at + 3] !== 0)
          carry(region, matrix, p, at);
      }
      if (columns.read(r, c, load)) {
        particular(region, axial, load, own, 0);
        for (let i = 0; i < 4; i++) p[at + i]! += own[i]!;
      }
    }
  }
}

/**
 * Adds weight x the jumps at break b in column c to a state. An offset between two halves under axial force turns the couple N x offset.
 */
export function addJump(
  columns: Columns,
  b: number,
  c: number,
  axial: number,
  weight: number,
  y: number[],
  at: number,
): void {
  const jumps = columns.jumps;
  if (!jumps) return;
  const j = (b * columns.count + c) * 4;
  y[at]! += weight * jumps[j]!;
  y[at + 1]! += weight * jumps[j + 1]!;
  y[at + 2]! += weight * (jumps[j + 2]! - axial * jumps[j]!);
  y[at + 3]! += weight * jumps[j + 3]!;
}

/** Transfer matrix of each region, null where `carry` works without. */
export type Matrices = readonly (readonly number[] | null)[];

export function transferMatrices(cut: Cut, axial: number): Matrices {
  return cut.regions.map((region) => transferMatrix(region, axial));
}

/** Nearest power of two: scaling by it rounds nothing. */
function powerOfTwo(x: number): number {
  return x > 0 && Number.isFinite(x) ? 2 ** Math.round(Math.log2(x)) : 1;
}

export function close(
  model: BeamModel,
  cut: Cut,
  stations: readonly Station[],
  columns: Columns,
  axial: number,
  matrices: Matrices,
): Closed | null {
  const n = 4 * (stations.length - 1);
  const C = columns.count;
  const band = BandMatrix.zeros(n, 5, 5, C);
  const rhs = band.b;
  const T = new Array<number>(16).fill(0);
  const p = new Array<number>(4 * C).fill(0);

  const length = powerOfTwo((model.end - model.start) / (stations.length - 1));
  const flexibility = powerOfTwo(meanFlexibility(cut));
  // unknowns are v/(f L^2), rotation/(f L), M, S L: all of the size of a moment
  const d = [flexibility * length * length, flexibility * length, 1, 1 / length];

  let row = 0;
  let i = 0;
  let station = stations[0]!;
  const put = (at: number, component: number, value: number, unit: number): void => {
    if (value !== 0) band.set(row, 4 * at + component, (value * d[component]!) / d[unit]!);
  };
  /**
   * One condition: coefficients of the state left of the station (reached through T and p) and right of it, and of what is given there:
   * displacement and rotation of the ground, then the four jumps; `shape` multiplies the slope of the initial shape.
   */
  const condition = (unit: number, onLeft: Row, onRight: Row, given: Row, shape = 0): void => {
    if (onLeft !== NONE) {
      for (let j = 0; j < 4; j++) {
        let sum = 0;
        for (let m = 0; m < 4; m++) if (onLeft[m] !== 0) sum += onLeft[m]! * T[4 * j + m]!;
        put(i - 1, j, sum, unit);
      }
    }
    if (onRight !== NONE) for (let j = 0; j < 4; j++) put(i, j, onRight[j]!, unit);
    for (let c = 0; c < C; c++) {
      let value = 0;
      if (columns.moved && station.supportIndex >= 0) {
        const at = (station.supportIndex * C + c) * 2;
        value += given[0]! * columns.moved[at]! + given[1]! * columns.moved[at + 1]!;
      }
      if (columns.jumps) {
        const at = (station.at * C + c) * 4;
        const offset = columns.jumps[at]!;
        value +=
          given[2]! * offset +
          given[3]! * columns.jumps[at + 1]! +
          given[4]! * (columns.jumps[at + 2]! - axial * offset) +
          given[5]! * columns.jumps[at + 3]!;
      }
      if (shape !== 0) value += shape * columns.shapeSlope(station.at, c);
      if (onLeft !== NONE) for (let m = 0; m < 4; m++) value -= onLeft[m]! * p[4 * c + m]!;
      rhs[c * n + row] = value / d[unit]!;
    }
    row++;
  };

  for (; i < stations.length; i++) {
    station = stations[i]!;
    const { support, hinge, slide } = station;
    const left = i > 0;
    const right = i < stations.length - 1;
    const held = support !== null && support.held;
    const clamped = support !== null && support.clamped;
    const k = support === null || held ? 0 : support.spring;
    const kr = support === null || clamped ? 0 : support.rotationalSpring;
    if (left) carrySegment(cut.regions, matrices, columns, axial, stations[i - 1]!.at, station.at, T, p);
    // S jumps by -P and by the spring's push k (v - ground); M by C and by the rotational spring's turn -kr (rotation - imposed). An
    // influence line's dislocation at a support stands just right of it, so springs feel the state left of it.
    const springS = k === 0 ? JUMP_S : [-k, 0, -k, 0, 0, 1];
    const springM = kr === 0 ? JUMP_M : [0, kr, 0, kr, 1, 0];

    if (left && right) {
      if (held) {
        condition(0, V, NONE, GROUND);
        condition(0, NONE, V, GROUND_AND_OFFSET);
      } else if (!slide) condition(0, MINUS_V, V, OFFSET);
      if (hinge) {
        condition(2, M, NONE, NOTHING);
        condition(2, NONE, M, NOTHING);
      } else if (clamped) {
        condition(1, R, NONE, TURN);
        condition(1, NONE, R, TURN_AND_KINK);
      } else {
        condition(1, MINUS_R, R, KINK);
        if (slide) condition(2, [-axial, 0, -1, 0], [axial, kr, 1, 0], springM);
        else condition(2, MINUS_M, kr === 0 ? M : [0, kr, 1, 0], springM);
      }
      if (slide) {
        // a joint that slides along its own turned faces passes no force across the slide: S = N (rotation + w'), the partner of the
        // couple N x offset above; both together keep the equations symmetric (Maxwell-Betti)
        const faces = axial === 0 ? S : [0, -axial, 0, 1];
        condition(3, faces, NONE, NOTHING, axial);
        condition(3, NONE, faces, NOTHING, axial);
      } else if (!held) condition(3, MINUS_S, k === 0 ? S : [-k, 0, 0, 1], springS);
    } else if (right) {
      if (held) condition(0, NONE, V, GROUND_AND_OFFSET);
      else condition(3, NONE, [-k, 0, 0, 1], springS);
      if (clamped) condition(1, NONE, R, TURN_AND_KINK);
      else condition(2, NONE, [0, kr, 1, 0], springM);
    } else {
      // at the far end a dislocation stands just left of the support
      if (held) condition(0, V, NONE, GROUND_LESS_OFFSET);
      else condition(3, [k, 0, 0, 1], NONE, [k, 0, 0, 0, 0, -1]);
      if (clamped) condition(1, R, NONE, TURN_LESS_KINK);
      else condition(2, [0, -kr, 1, 0], NONE, [0, -kr, 0, 0, -1, 0]);
    }
  }

  if (!(band.factor() > 0)) return null;
  let conditions = 0;
  for (let c = 0; c < C; c++) {
    if (columns.active[c]) conditions = Math.max(conditions, band.solve(c));
  }
  const states = new Array<number>(n * C);
  let at = 0;
  for (let s = 0; s < n; s += 4) {
    for (let c = 0; c < C; c++) for (let j = 0; j < 4; j++) states[at++] = rhs[c * n + s + j]! * d[j]!;
  }
  return { stations, states, conditions };
}

type Row = readonly number[];
const NONE: Row = [];
// coefficients of a state (v, rotation, M, S)
const V: Row = [1, 0, 0, 0];
const R: Row = [0, 1, 0, 0];
const M: Row = [0, 0, 1, 0];
const S: Row = [0, 0, 0, 1];
const MINUS_V: Row = [-1, 0, 0, 0];
const MINUS_R: Row = [0, -1, 0, 0];
const MINUS_M: Row = [0, 0, -1, 0];
const MINUS_S: Row = [0, 0, 0, -1];
// coefficients of what is given (ground displacement and rotation; jumps of v, rotation, M, S)
const NOTHING: Row = [0, 0, 0, 0, 0, 0];
const GROUND: Row = [1, 0, 0, 0, 0, 0];
const GROUND_AND_OFFSET: Row = [1, 0, 1, 0, 0, 0];
const GROUND_LESS_OFFSET: Row = [1, 0, -1, 0, 0, 0];
const TURN: Row = [0, 1, 0, 0, 0, 0];
const TURN_AND_KINK: Row = [0, 1, 0, 1, 0, 0];
const TURN_LESS_KINK: Row = [0, 1, 0, -1, 0, 0];
const OFFSET: Row = [0, 0, 1, 0, 0, 0];
const KINK: Row = [0, 0, 0, 1, 0, 0];
const JUMP_M: Row = [0, 0, 0, 0, 1, 0];
const JUMP_S: Row = [0, 0, 0, 0, 0, 1];

/** Mean of 1/EI over the beam; only a scale. */
function meanFlexibility(cut: Cut): number {
  let sum = 0;
  for (const region of cut.regions) sum += region.h * (region.fPoly ? region.fPoly[0]! : region.f);
  return sum / (cut.breaks[cut.breaks.length - 1]! - cut.breaks[0]!);
}

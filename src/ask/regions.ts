/**
 * REGIONS: the double integration as a checker follows it by hand.
 *
 *   reactions -> in each region the load w(s) and M(s), s from the region's left end
 *   EI v' = C1 -+ integral of M       (the sign: EI v'' = -M with y down, EI v'' = M with y up)
 *   EI v  = C2 + C1 s -+ double integral of M
 *   C1 = EI v'(0), C2 = EI v(0): found from the boundary, support and continuity conditions listed below the regions,
 *   each with what its two sides come to and what is left over.
 *
 * Free curvature k adds -+EI k to EI v''; camber is an initial shape, so deflections are net of it; with GA the shear adds
 * (EI/GA)(M - M(0)) to EI v, and v' stands for the rotation of the section.
 * Where EI varies or the load is a text in x, or on a foundation or under axial force, M/EI has no polynomial integral: there
 * the solved curves are given as polynomials fitted to them, with the largest departure stated, and said to be so.
 */
import type { BeamModel, Load } from '../beam/model';
import { lawAt } from '../integrate/regions';
import type { OpenBeam } from '../open';
import { plain } from '../signs';
import { conditionsOf } from './conditions';
import { evaluateAny, fitted, polynomialText, type Fit } from './equation';
import { addScaled, integrateFrom, type Coefficients } from './polynomial';
import { namedPositions } from './profile';
import { reactions } from './reactions';
import { heading, unitOf, write } from './units';

/** A stretch without any discontinuity, and what is integrated there; reader's signs, length unit for deflections. */
export interface RegionWork {
  readonly from: number;
  readonly to: number;
  readonly stiffness: string;
  readonly load: string;
  readonly moment: Coefficients | Fit;
  /** set where the integration is one of polynomials */
  readonly exact: {
    readonly ei: number;
    readonly c1: number;
    readonly c2: number;
    readonly first: Coefficients;
    readonly second: Coefficients;
  } | null;
  readonly slope: Coefficients | Fit;
  readonly deflection: Coefficients | Fit;
}

/** Twelve columns throughout, so that the spill is a rectangle. */
const WIDTH = 12;

export function regions(open: OpenBeam): (number | string)[][] {
  const { model } = open;
  const works = regionsOf(open);
  const down = model.axis === 1;
  const length = unitOf(model, 'length');
  const ei = unitOf(model, 'stiffness');
  const unit = (text: string): string => (model.units === null ? '' : text);
  const force = model.units?.force ?? '';
  const rows: (number | string)[][] = [
    [
      `Double integration, y ${down ? 'down' : 'up'}: EI v'' = ${down ? '-M' : 'M'}; s from the left end of each region` +
        (open.combination === null ? '' : `; combination ${open.combination.text}`),
    ],
    ...reactions(open).map((row, i) => [i === 0 ? 'reactions' : `R${i}`, ...row]),
    [
      'region',
      heading('from', length),
      heading('to', length),
      heading('EI', ei),
      heading('load w(s)', unit(`${force}/${length}`)),
      heading('M(s)', unitOf(model, 'moment')),
      heading("EI v'(s)", unit(`${force}·${length}²`)),
      'C1',
      heading('EI v(s)', unit(`${force}·${length}³`)),
      'C2',
      heading('slope(s)', 'rad'),
      heading('deflection(s)', unitOf(model, 'deflection')),
    ],
  ];
  const perLength = model.units?.deflectionPerLength ?? 1;
  works.forEach((work, i) => {
    const h = work.to - work.from;
    const varies = 'no polynomial: see slope and deflection';
    rows.push([
      i + 1,
      work.from,
      work.to,
      work.stiffness,
      work.load,
      polynomialText(work.moment, h),
      work.exact ? polynomialText(work.exact.first, h) : varies,
      work.exact ? plain(work.exact.c1) : plain(evaluateAny(work.slope, 0)),
      work.exact ? polynomialText(work.exact.second, h) : varies,
      work.exact ? plain(work.exact.c2) : plain(evaluateAny(work.deflection, 0)),
      polynomialText(work.slope, h),
      polynomialText(scaledBy(work.deflection, perLength), h),
    ]);
  });
  if (works.some((work) => work.exact === null)) {
    rows.push([
      "where EI v' and EI v have no polynomial, C1 and C2 are the slope and the deflection at s = 0 themselves",
    ]);
  }
  if (open.model.loads.some((load) => load.kind === 'camber')) {
    rows.push(["in the conditions, deflection and slope are those beyond the camber's shape"]);
  }
  rows.push(['condition', heading('at', length), 'left side', 'right side', 'left over']);
  for (const one of conditionsOf(open, works)) {
    rows.push([one.text, one.at, plain(one.left), plain(one.right), plain(one.left - one.right)]);
  }
  return rows.map((row) => [...row, ...new Array<string>(WIDTH - row.length).fill('')]);
}

function scaledBy(curve: Coefficients | Fit, factor: number): Coefficients | Fit {
  if (!('coefficients' in curve)) return curve.map((c) => factor * c);
  return { coefficients: curve.coefficients.map((c) => factor * c), departure: factor * curve.departure };
}

/** The regions between all positions where something that acts begins, ends or stands. */
export function regionsOf(open: OpenBeam): RegionWork[] {
  const { model, combination } = open;
  const factorOf = (load: Load): number =>
    combination === null || load.case < 0 ? 1 : (combination.factors[load.case] ?? 0);
  const loads = model.loads.filter((load) => factorOf(load) !== 0);
  const cuts = namedPositions({ ...model, loads });
  const works: RegionWork[] = [];
  for (let i = 1; i < cuts.length; i++) {
    works.push(regionOf(open, loads, factorOf, cuts[i - 1] as number, cuts[i] as number));
  }
  return works;
}

function regionOf(
  open: OpenBeam,
  loads: readonly Load[],
  factorOf: (load: Load) => number,
  from: number,
  to: number,
): RegionWork {
  const { model, response } = open;
  const y = model.axis;
  const h = to - from;
  const covers = (stretch: { from: number; to: number }): boolean => stretch.from <= from && stretch.to >= to;
  const section = model.ei.find(covers);
  const shear = model.ga.find(covers);
  const bed = model.foundations.find(covers);
  const axial = loads.reduce(
    (sum, load) => sum + (load.kind === 'axial' ? factorOf(load) * load.force : 0),
    0,
  );

  let q0 = 0;
  let q1 = 0; // model sign, at the two ends
  let curvature = 0;
  let bow = 0; // second derivative of the camber's shape, model sign
  const texts: string[] = [];
  for (const load of loads) {
    if (!('from' in load) || !covers(load)) continue;
    const factor = factorOf(load);
    if (load.kind === 'curvature') curvature += factor * load.curvature;
    else if (load.kind === 'camber') bow += (8 * factor * load.rise) / (load.to - load.from) ** 2;
    else if (load.law.kind === 'function')
      texts.push(`${factor === 1 ? '' : `${write(factor)} × `}(${load.law.text}), row ${load.row}`);
    else {
      q0 += factor * lawAt(load, from);
      q1 += factor * lawAt(load, to);
    }
  }
  const linear = polynomialText([y * q0, (y * (q1 - q0)) / h], h);
  const load = [
    texts.length > 0 && q0 === 0 && q1 === 0 ? '' : linear,
    ...texts,
    curvature === 0 ? '' : `free curvature ${write(curvature, 10)}`,
    bow === 0 ? '' : `camber, initial v'' ${write(y * bow, 10)}`,
    bed === undefined ? '' : `foundation ${write(bed.stiffness, 10)} × v`,
    axial === 0 ? '' : `axial force ${write(axial, 10)}`,
  ].filter((text) => text !== '');

  const constant =
    section?.law.kind === 'linear' && section.law.start === section.law.end ? section.law.start : null;
  const shearConstant =
    shear?.law.kind === 'linear' && shear.law.start === shear.law.end ? shear.law.start : null;
  const stiff = shear === undefined || shearConstant !== null;
  const polynomialMoment = texts.length === 0 && bed === undefined && axial === 0;
  const moment: Coefficients | Fit = polynomialMoment
    ? [
        response.value('moment', from, 'right'),
        response.value('shear', from, 'right'),
        -q0 / 2,
        -(q1 - q0) / (6 * h),
      ]
    : fitted((s) => response.value('moment', from + s, s === h ? 'left' : 'right'), h);
  const base = { from, to, load: load.join('; '), moment, stiffness: stiffnessText(model, from, to) };

  if (constant === null || !stiff || !polynomialMoment || 'coefficients' in moment) {
    const read = (quantity: 'slope' | 'deflection') =>
      fitted((s) => y * response.value(quantity, from + s, s === h ? 'left' : 'right'), h);
    return { ...base, exact: null, slope: read('slope'), deflection: read('deflection') };
  }
  // EI v'' = -y M + EI (-y k + y bow)
  const extra = constant * y * (bow - curvature);
  const bending = addScaled(
    moment.map((c) => -y * c),
    [extra],
    1,
  );
  const c1 = constant * y * response.value('slope', from, 'right');
  const c2 = constant * y * response.value('deflection', from, 'right');
  const first = integrateFrom(bending, 0, 1, c1);
  let second = integrateFrom(first, 0, 1, c2);
  if (shearConstant !== null) {
    second = addScaled(second, [0, ...moment.slice(1)], (y * constant) / shearConstant);
  }
  return {
    ...base,
    exact: { ei: constant, c1, c2, first, second },
    slope: first.map((c) => c / constant),
    deflection: second.map((c) => c / constant),
  };
}

function stiffnessText(model: BeamModel, from: number, to: number): string {
  const section = model.ei.find((stretch) => stretch.from <= from && stretch.to >= to);
  const shear = model.ga.find((stretch) => stretch.from <= from && stretch.to >= to);
  const parts: string[] = [];
  for (const [name, stretch] of [
    ['', section],
    ['GA ', shear],
  ] as const) {
    if (stretch === undefined) continue;
    const { law } = stretch;
    if (law.kind === 'function') parts.push(`${name}${law.text}`);
    else {
      const a = lawAt(stretch, from);
      const b = lawAt(stretch, to);
      parts.push(a === b ? `${name}${write(a, 10)}` : `${name}${write(a, 10)} to ${write(b, 10)}, linear`);
    }
  }
  return parts.join('; ');
}

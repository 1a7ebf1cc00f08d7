/**
 * The beam cut into regions at every discontinuity: supports, releases, ends of section stretches and of loads, concentrated actions.
 * Inside a region every given quantity is one smooth law.
 *
 * Lengths are differences of neighbouring positions, taken once; nothing downstream ever forms x^3 of an absolute position. That is
 * why two loads 1e-7 of the span apart, or a beam whose positions start at 1,000, keep their digits.
 */
import { ascending } from '../ascending';
import type { BeamModel, Law, Load, SectionStretch } from '../beam/model';
import type { Issue } from '../issue';
import { fitPiece } from './fit';
import type { Poly } from './polynomial';

/** Geometry and stiffness of one region. Flexibilities: f = 1/EI, g = 1/(kappa GA) (0 = rigid in shear). */
export interface Region {
  readonly x0: number;
  readonly h: number;
  /** 0: fields in u = s/h in 0..1; -0.5: in u = s/h - 1/2 (some law was fitted) */
  readonly origin: 0 | -0.5;
  readonly f: number;
  readonly g: number;
  /** set when EI or GA varies inside the region, in u with origin -0.5 */
  readonly fPoly: Poly | null;
  readonly gPoly: Poly | null;
  /** Winkler stiffness, force/length^2 */
  readonly k: number;
  /** how strongly foundation and axial force bend the homogeneous solution over this region (1 = one radian or one e-fold) */
  readonly growth: number;
}

export interface Cut {
  readonly regions: readonly Region[];
  /** regions.length + 1 positions */
  readonly breaks: readonly number[];
  /** fitted shapes of distributed loads given as functions: load -> region -> polynomial in u (origin -0.5) */
  readonly shapes: ReadonlyMap<Load, ReadonlyMap<number, Poly>>;
}

/** A region may stretch the homogeneous solution by at most this much, so its power series needs some 20 terms and never cancels. */
const MAX_GROWTH = 1;
/** A region is halved at most this often while laws are fitted: then a kink in a law weighs less than (2^-30)^2 of the region. */
const MAX_HALVINGS = 30;
/** Pieces one stretch may be cut into: for its laws (a law that is still not smooth then never will be), and for a stiff foundation. */
const MAX_PIECES = 2000;
const MAX_STIFF_PIECES = 20000;

const NO_SHAPES = new Map<Load, Map<number, Poly>>();

export function cutBeam(
  model: BeamModel,
  axial: number,
): { ok: true; cut: Cut } | { ok: false; issue: Issue } {
  const primary = primaryBreaks(model);
  const regions: Region[] = [];
  const breaks: number[] = [model.start];
  const shaped = model.loads.filter(
    (l): l is Load & { kind: 'distributed'; law: { kind: 'function' } & Law } =>
      l.kind === 'distributed' && l.law.kind === 'function',
  );
  const shapes = shaped.length === 0 ? NO_SHAPES : new Map<Load, Map<number, Poly>>();
  let ei = 0;
  let ga = 0;
  let soil = 0;
  for (let i = 0; i + 1 < primary.length; i++) {
    const a = primary[i]!;
    const b = primary[i + 1]!;
    const mid = a + 0.5 * (b - a);
    while (ei + 1 < model.ei.length && model.ei[ei]!.to <= mid) ei++;
    while (ga < model.ga.length && model.ga[ga]!.to <= mid) ga++;
    while (soil < model.foundations.length && model.foundations[soil]!.to <= mid) soil++;
    const eiStretch = model.ei[ei]!;
    const gaStretch = ga < model.ga.length && model.ga[ga]!.from <= mid ? model.ga[ga]! : null;
    const bed = model.foundations[soil];
    const k = bed && bed.from <= mid ? bed.stiffness : 0;
    const loads = shaped.filter((l) => l.from <= a && l.to >= b);
    const issue = cutStretch(a, b, eiStretch, gaStretch, k, axial, loads, regions, breaks, shapes);
    if (issue) return { ok: false, issue };
  }
  return { ok: true, cut: { regions, breaks, shapes } };
}

function primaryBreaks(model: BeamModel): number[] {
  const all: number[] = [model.start, model.end];
  for (const s of model.supports) all.push(s.at);
  for (const r of model.releases) all.push(r.at);
  for (const s of model.ei) all.push(s.from, s.to);
  for (const s of model.ga) all.push(s.from, s.to);
  for (const s of model.foundations) all.push(s.from, s.to);
  for (const l of model.loads) {
    if (l.kind === 'axial') continue;
    if ('at' in l) all.push(l.at);
    else all.push(l.from, l.to);
  }
  return distinct(ascending(all));
}

/** Keeps the first of equal neighbours, in place. */
function distinct(list: number[]): number[] {
  let kept = 1;
  for (let i = 1; i < list.length; i++) if (list[i] !== list[kept - 1]) list[kept++] = list[i]!;
  list.length = kept;
  return list;
}

function constantOf(stretch: SectionStretch): number | null {
  const law = stretch.law;
  return law.kind === 'linear' && law.start === law.end ? law.start : null;
}

/** The law of a stretch at x; exact at both its ends. */
export function lawAt(stretch: { from: number; to: number; law: Law }, x: number): number {
  const law = stretch.law;
  if (law.kind === 'function') return law.at(x);
  const t = (x - stretch.from) / (stretch.to - stretch.from);
  return t <= 0.5 ? law.start + (law.end - law.start) * t : law.end + (law.start - law.end) * (1 - t);
}

/** A law that is not usable somewhere: how far it got is part of the message. */
class BadLaw extends Error {
  constructor(readonly issue: Issue) {
    super(issue.code);
  }
}

function cutStretch(
  a: number,
  b: number,
  ei: SectionStretch,
  ga: SectionStretch | null,
  k: number,
  axial: number,
  loads: readonly (Load & { kind: 'distributed' })[],
  regions: Region[],
  breaks: number[],
  shapes: Map<Load, Map<number, Poly>>,
): Issue | null {
  const eiConstant = constantOf(ei);
  const gaConstant = ga ? constantOf(ga) : null;
  const f0 = eiConstant !== null ? 1 / eiConstant : 0;
  const plain = k === 0 && axial === 0 && loads.length === 0 && f0 > 0 && f0 < Infinity;
  if (plain && (!ga || (gaConstant !== null && gaConstant > 0 && 1 / gaConstant > 0))) {
    // the common region: nothing to fit, nothing to divide
    const g = gaConstant !== null ? 1 / gaConstant : 0;
    regions.push({ x0: a, h: b - a, origin: 0, f: f0, g, fPoly: null, gPoly: null, k: 0, growth: 0 });
    breaks.push(b);
    return null;
  }
  const flexibility = (stretch: SectionStretch, extra: number) => (x: number) =>
    1 / (lawAt(stretch, x) + extra);
  const before = regions.length;
  let blamed: Blame = ei;
  const positive = (y: number): boolean => y > 0 && Number.isFinite(y);
  try {
    if (eiConstant !== null) need(positive(1 / eiConstant), ei, a);
    if (ga && gaConstant !== null) need(positive(1 / gaConstant), ga, a);
    // with an axial force the shear law becomes v' = (1 - N g) theta + g (S - N w'), g = 1/(GA + N) (Engesser; see fields.ts)
    const gOf = ga ? flexibility(ga, axial) : null;
    const g0 = ga && gaConstant !== null ? 1 / (gaConstant + axial) : 0;
    const grown = (from: number, to: number): number => {
      const h = to - from;
      let f = f0;
      let g = g0;
      for (const x of [from + h * 2 ** -50, from + 0.5 * h, to - h * 2 ** -50]) {
        if (eiConstant === null) f = Math.max(f, 1 / lawAt(ei, x));
        if (gOf && gaConstant === null) g = Math.max(g, gOf(x));
      }
      return h * (Math.sqrt(Math.abs(axial) * f) + Math.sqrt(Math.sqrt(k * f)) + Math.sqrt(k * Math.abs(g)));
    };
    const divide = (from: number, to: number, depth: number): void => {
      const h = to - from;
      const growth = grown(from, to);
      const force = depth >= MAX_HALVINGS || from + 0.5 * h <= from || from + 0.5 * h >= to;
      let split = growth > MAX_GROWTH && !force;
      let fPoly: Poly | null = null;
      let gPoly: Poly | null = null;
      const pieces: [Load, Poly][] = [];
      const fit = (law: (x: number) => number, accept: (y: number) => boolean, blame: Blame): Poly | null => {
        blamed = blame;
        const result = fitPiece(law, from, to, accept, force);
        if (result.state === 'bad') throw new BadLaw(badLaw(blame, result.x));
        return result.state === 'fitted' ? result.poly : null;
      };
      if (!split && eiConstant === null) {
        fPoly = fit(flexibility(ei, 0), positive, ei);
        if (!fPoly) split = true;
      }
      if (!split && ga && gaConstant === null) {
        gPoly = fit(gOf!, axial < 0 ? Number.isFinite : positive, ga);
        if (!gPoly) split = true;
      }
      if (!split) {
        for (const load of loads) {
          const shape = fit((x) => lawAt(load, x), Number.isFinite, load);
          if (!shape) {
            split = true;
            break;
          }
          pieces.push([load, shape]);
        }
      }
      if (split) {
        const stiff = growth > MAX_GROWTH;
        const parts = stiff ? Math.ceil(growth / MAX_GROWTH) : 2;
        if (!(regions.length - before + parts <= (stiff ? MAX_STIFF_PIECES : MAX_PIECES))) {
          throw new BadLaw(stiff ? tooStiff(from) : badLaw(blamed, from));
        }
        let left = from;
        for (let i = 1; i <= parts; i++) {
          const right = i === parts ? to : from + (h * i) / parts;
          divide(left, right, depth + 1);
          left = right;
        }
        return;
      }
      for (const [load, shape] of pieces) {
        let map = shapes.get(load);
        if (!map) shapes.set(load, (map = new Map<number, Poly>()));
        map.set(regions.length, shape);
      }
      const fitted = fPoly !== null || gPoly !== null || pieces.length > 0;
      push({ x0: from, h, origin: fitted ? -0.5 : 0, f: f0, g: g0, fPoly, gPoly, k, growth }, to);
    };
    divide(a, b, 0);
  } catch (error) {
    if (error instanceof BadLaw) return error.issue;
    throw error;
  }
  return null;

  function push(region: Region, to: number): void {
    regions.push(region);
    breaks.push(to);
  }
}

function need(good: boolean, stretch: SectionStretch, x: number): void {
  if (!good) throw new BadLaw(badLaw(stretch, x));
}

type Blame = { readonly rows?: readonly number[]; readonly row?: number };

function badLaw(blame: Blame, x: number): Issue {
  const row = blame.row ?? blame.rows?.[blame.rows.length - 1];
  return { code: 'bad-law', kind: 'invalid', row, column: 'Value', detail: { x } };
}

function tooStiff(x: number): Issue {
  return { code: 'too-stiff', kind: 'unavailable', column: 'Value', detail: { x } };
}

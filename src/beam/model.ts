/**
 * The beam model: what the row language means, in one consistent system of units, ready to be solved.
 *
 * Axes and signs of the model (always, whatever the table's `axis` row says; `signs.ts` turns them over for the reader):
 * positions x grow to the right; forces, distributed loads, settlements and deflections are positive down;
 * slopes, rotations and couples are positive clockwise; bending moment is positive when it sags;
 * shear V = dM/dx; free curvature is positive when it makes a simple span sag; camber is positive up (a bow).
 * Units: force and length of the `units` row (or whatever consistent system the numbers are in); radians.
 *
 * A model is valid by construction: the row language has checked it, the engine may rely on it.
 */

/** A quantity along a stretch: linear between its two ends, or any smooth function of the position x. */
export type Law =
  | { readonly kind: 'linear'; readonly start: number; readonly end: number }
  | { readonly kind: 'function'; readonly at: (x: number) => number; readonly text: string };

/** Where the beam is held. One entry per position: several rows at one place are merged. */
export interface Support {
  readonly at: number;
  /** deflection held (pin, roller, fixed) */
  readonly held: boolean;
  /** rotation held (fixed, guided) */
  readonly clamped: boolean;
  /** vertical stiffness, force/length; 0 = none; only meaningful when not held */
  readonly spring: number;
  /** rotational stiffness, moment/radian; 0 = none; only meaningful when not clamped */
  readonly rotationalSpring: number;
  /** 1-based rows of the table that made it */
  readonly rows: readonly number[];
}

export interface Release {
  readonly at: number;
  readonly kind: 'moment' | 'shear';
  readonly row: number;
}

/** Winkler support over a stretch: force/length per length. */
export interface Foundation {
  readonly from: number;
  readonly to: number;
  readonly stiffness: number;
  readonly row: number;
}

/** A stretch of a section property. `ei` stretches cover the beam exactly once, in order; `ga` stretches may leave gaps (rigid in shear). */
export interface SectionStretch {
  readonly from: number;
  readonly to: number;
  readonly law: Law;
  /** 1-based rows of the table that made it (E and I, or EI) */
  readonly rows: readonly number[];
}

/** Index into BeamModel.cases, or -1 for a load without a case, which always acts. */
export type CaseIndex = number;

interface LoadBase {
  readonly row: number;
  readonly case: CaseIndex;
}
export type Load = LoadBase &
  (
    | { readonly kind: 'point'; readonly at: number; readonly force: number }
    | { readonly kind: 'couple'; readonly at: number; readonly couple: number }
    | { readonly kind: 'distributed'; readonly from: number; readonly to: number; readonly law: Law }
    | { readonly kind: 'curvature'; readonly from: number; readonly to: number; readonly curvature: number }
    /** constant axial force over the whole beam, tension positive */
    | { readonly kind: 'axial'; readonly force: number }
    /** initial upward parabola over from..to, rise at its middle */
    | { readonly kind: 'camber'; readonly from: number; readonly to: number; readonly rise: number }
    /** the held deflection at a support (or the ground under a spring) is displaced, positive down */
    | { readonly kind: 'settlement'; readonly at: number; readonly displacement: number }
    /** the held rotation at a support (or the ground of a rotational spring) is turned, positive clockwise */
    | { readonly kind: 'rotation'; readonly at: number; readonly angle: number }
    /** unit dislocations for influence lines (Mueller-Breslau); no row can ask for them: the slope jumps by angle at a section */
    | { readonly kind: 'kink'; readonly at: number; readonly angle: number }
    /** the deflection jumps by displacement at a section */
    | { readonly kind: 'offset'; readonly at: number; readonly displacement: number }
  );

/** A deflection limit: an absolute deflection (length unit of the model) or a fraction of the span, under a combination. */
export interface LimitRow {
  readonly row: number;
  readonly limit: Limit;
  /** factors by case index; null = everything acts */
  readonly combination: Combination | null;
  /** as the person wrote it, e.g. "span/360" or "20 mm" */
  readonly text: string;
}
export type Limit =
  | { readonly kind: 'absolute'; readonly value: number }
  | { readonly kind: 'fraction'; readonly divisor: number };

/** factors[i] multiplies case i; loads without a case always act with factor 1. */
export interface Combination {
  readonly factors: readonly number[];
  readonly text: string;
}

/** What the `units` row says; null when the table has none (one consistent system, nothing converted). */
export interface ModelUnits {
  readonly force: string;
  readonly length: string;
  readonly deflection: string;
  /** deflection unit per length unit: model length x this = shown deflection */
  readonly deflectionPerLength: number;
  /** standard gravity in length/s^2, for FREQUENCY */
  readonly gravity: number;
  /** the unit of the I rows (for REQUIREDI), and how many of it are one length^4 of the model */
  readonly secondMoment: { readonly unit: string; readonly perModelUnit: number } | null;
}

export interface BeamModel {
  readonly start: number;
  readonly end: number;
  readonly supports: readonly Support[]; // sorted by at
  readonly releases: readonly Release[]; // sorted by at
  readonly foundations: readonly Foundation[]; // sorted, not overlapping
  readonly ei: readonly SectionStretch[]; // sorted, covers start..end exactly once
  readonly ga: readonly SectionStretch[]; // sorted, not overlapping
  readonly loads: readonly Load[];
  readonly cases: readonly string[];
  readonly limits: readonly LimitRow[];
  /** 1: y points down (default); -1: y points up */
  readonly axis: 1 | -1;
  readonly units: ModelUnits | null;
  /** the E of the beam when it is one number (cautions, REQUIREDI); null otherwise */
  readonly modulus: number | null;
}

/** What a drawing is made of: the input, the common horizontal axis, and a few helpers for paths. */
import { scaleLinear } from 'd3-scale';
import type { BeamModel, Quantity, Response } from '../engine';
import type { Separators } from '../port';

export type Part = 'beam' | Quantity;
export const DIAGRAMS: readonly Quantity[] = ['shear', 'moment', 'slope', 'deflection'];

/** A limit line for the deflection diagram: between two positions, how far from the chord (shown units, positive). */
export interface LimitLine {
  readonly from: number;
  readonly to: number;
  /** supports whose displaced places are the zero line: two, one (an overhang), or none */
  readonly chord: readonly number[];
  readonly allowed: number;
  readonly text: string;
}

/** The lowest and highest value at positions: a band behind a diagram. */
export interface Band {
  readonly x: readonly number[];
  readonly lowest: readonly number[];
  readonly highest: readonly number[];
}

export interface DrawingInput {
  readonly model: BeamModel;
  /** null while there is no solution (unstable, or rows in error): the beam alone is drawn */
  readonly response: Response | null;
  /** by case index; null = everything acts with factor 1 */
  readonly factors: readonly number[] | null;
  /** model value -> shown value */
  readonly show: (quantity: Quantity, value: number) => number;
  /** the item word a row was written with, for the symbol of a roller */
  readonly word?: (row: number) => string;
  /** positions a formula asks at */
  readonly marks?: readonly number[];
  readonly limits?: readonly LimitLine[];
  readonly bands?: Partial<Readonly<Record<Quantity, Band>>>;
}

export interface DrawingOptions {
  readonly width: number;
  readonly parts: readonly Part[];
  /** bending moment on the tension side: sagging below the axis */
  readonly momentBelow: boolean;
  readonly enlarged: Part | null;
  readonly separators: Separators;
}

export const TEXT = 11;
export const SMALL = 10;
/** room at both ends for a built-in end and half a label */
export const MARGIN = 24;

/** Position along the beam -> pixel, and back. */
export interface Scale {
  (at: number): number;
  invert(pixel: number): number;
}

export interface Frame {
  readonly width: number;
  readonly x: Scale;
  readonly left: number;
  readonly right: number;
}

export function makeFrame(model: BeamModel, width: number): Frame {
  const left = MARGIN;
  const right = Math.max(left + 60, width - MARGIN);
  return { width, left, right, x: scaleLinear([model.start, model.end], [left, right]) };
}

/** One decimal of a pixel is enough, and keeps golden files steady. */
export function px(value: number): number {
  const rounded = Math.round(value * 10) / 10;
  return rounded === 0 ? 0 : rounded;
}

type Step = string | number;
export function path(...steps: readonly Step[]): string {
  return steps.map((step) => (typeof step === 'number' ? px(step) : step)).join(' ');
}

/** Unit words for axes: force, length, force·length, ...; empty without a units row. */
export function unitOf(
  model: BeamModel,
  quantity: Quantity | 'length' | 'force' | 'couple' | 'distributed',
): string {
  const { units } = model;
  if (!units) return '';
  switch (quantity) {
    case 'deflection':
      return units.deflection;
    case 'slope':
      return 'rad';
    case 'moment':
    case 'couple':
      return `${units.force}·${units.length}`;
    case 'shear':
    case 'force':
      return units.force;
    case 'length':
      return units.length;
    case 'distributed':
      return `${units.force}/${units.length}`;
  }
}

export function withUnit(text: string, unit: string): string {
  return unit === '' ? text : `${text} ${unit}`;
}

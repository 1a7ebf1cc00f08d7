/**
 * What a solved beam answers: the types between the engine and everything that asks it.
 * All numbers are in the model's units and signs (see beam/model.ts).
 */
import type { Issue } from './issue';

export type Quantity = 'deflection' | 'slope' | 'moment' | 'shear';
export type Sense = 'largest' | 'highest' | 'lowest';
/** which limit to take at a jump; at the beam's ends the only existing one is taken */
export type Side = 'left' | 'right';

export interface Peak {
  readonly value: number;
  readonly at: number;
  readonly side: Side;
}

export interface Reaction {
  readonly at: number;
  /** force the support exerts on the beam, positive up; 0 when it cannot hold a force */
  readonly force: number;
  /** couple the support exerts on the beam, positive clockwise; 0 when it cannot hold one */
  readonly couple: number;
  readonly holdsForce: boolean;
  readonly holdsCouple: boolean;
}

/** A polynomial piece of one field. value(x) = sum c[k] u^k with u = (x - x0)/h + origin, origin 0 (u in 0..1) or -0.5 (u in -0.5..0.5). */
export interface Piece {
  readonly x0: number;
  readonly h: number;
  readonly origin: number;
  readonly coefficients: Float64Array;
}

/** The response of the beam to one combination: fields as piecewise polynomials. */
export interface Response {
  value(quantity: Quantity, x: number, side: Side): number;
  /** extreme over the whole beam, or over from..to; from the roots of the derivative, never sampled */
  peak(quantity: Quantity, sense: Sense, from?: number, to?: number): Peak;
  /** where the quantity passes through zero */
  zeros(quantity: Quantity): number[];
  reactions(): readonly Reaction[];
  /** positions where the piecewise description changes, start and end included, sorted */
  readonly breaks: readonly number[];
  pieces(quantity: Quantity): readonly Piece[];
  /** positions (sorted) where this quantity jumps */
  jumps(quantity: Quantity): readonly number[];
  /** the self-check, each relative to its own scale */
  readonly residuals: Residuals;
}

export interface Residuals {
  /** vertical force and moment balance of the whole beam */
  readonly equilibrium: number;
  /** support conditions and continuity at the joints */
  readonly conditions: number;
  /** external work against strain energy */
  readonly energy: number;
}

export interface Solution {
  /** factors by case index; null = every case with factor 1. Cached; throws BeamProblem when the combination is past its critical load. */
  respond(factors: readonly number[] | null): Response;
}

export type SolveResult =
  { readonly ok: true; readonly solution: Solution } | { readonly ok: false; readonly issue: Issue };

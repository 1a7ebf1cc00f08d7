/**
 * Signs: what positive means to the reader, and the one place where the model's signs are turned into the reader's.
 * The model is always y down, clockwise (beam/model.ts); `axis up` turns over every quantity that follows y.
 * Tests and help import these labels, so that no sign is ever described in two ways.
 */
import type { BeamModel } from './beam/model';
import type { Quantity } from './solution';

export const SIGNS = {
  down: {
    force: 'positive down',
    deflection: 'positive down',
    slope: 'positive clockwise',
    couple: 'positive clockwise',
  },
  up: {
    force: 'positive up',
    deflection: 'positive up',
    slope: 'positive counter-clockwise',
    couple: 'positive counter-clockwise',
  },
  always: {
    reaction: 'positive when it pushes up on the beam',
    reactionCouple: 'signed as an applied couple',
    moment: 'positive sagging',
    shear: 'V = dM/dx, positive when it pushes the left part up',
    curvature: 'positive when it makes a simple span sag',
    axial: 'positive in tension',
    camber: 'positive upward',
    x: 'positive to the right',
  },
} as const;

/** Factor from a model number to the shown number: the axis sign, and the deflection unit for deflections. */
export function shownFactor(model: BeamModel, quantity: Quantity): number {
  switch (quantity) {
    case 'deflection':
      return model.axis * (model.units === null ? 1 : model.units.deflectionPerLength);
    case 'slope':
      return model.axis;
    case 'moment':
    case 'shear':
      return 1;
  }
}

/** -0 is 0 to a reader (a turned-over zero must not print as a minus sign). */
export function plain(value: number): number {
  return value === 0 ? 0 : value;
}

/** A sense in the reader's signs, put into the model's: `highest` of a turned-over quantity is the model's `lowest`. */
export function turned<S extends 'largest' | 'highest' | 'lowest'>(
  sense: S,
  factor: number,
): 'largest' | 'highest' | 'lowest' {
  if (factor > 0 || sense === 'largest') return sense;
  return sense === 'highest' ? 'lowest' : 'highest';
}

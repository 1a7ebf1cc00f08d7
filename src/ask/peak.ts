/** MAXDEFLECTION and PEAK: extremes over the whole beam, from the roots of the derivative. */
import type { OpenBeam } from '../open';
import { shownFactor, turned } from '../signs';
import { QUANTITIES, readWord, SENSES } from './words';

/** Signed deflection of largest magnitude, in the reader's sign and deflection unit. */
export function maxDeflection(open: OpenBeam): number {
  return open.show('deflection', open.response.peak('deflection', 'largest').value);
}

/**
 * Extreme of a quantity, or its position (in the length unit). `sense` is in the reader's signs: with `axis up`
 * the highest deflection is the one furthest up. Throws BeamProblem 'no-such-word'.
 */
export function peak(open: OpenBeam, quantity: unknown, sense?: unknown, give?: unknown): number {
  const what = readWord(quantity, 'quantity', QUANTITIES);
  const which = readWord(sense, 'sense', SENSES, 'largest');
  const wanted = readWord(give, 'give', ['value', 'position'] as const, 'value');
  const found = open.response.peak(what, turned(which, shownFactor(open.model, what)));
  return wanted === 'position' ? found.at : open.show(what, found.value);
}

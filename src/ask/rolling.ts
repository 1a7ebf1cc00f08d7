/** ROLLING: the worst effect of a train of axle loads alone, at a section or anywhere, as it rolls across either way. */
import { fail, type OpenBeam } from '../open';
import { plain } from '../signs';
import { shownLine, worstAnywhere } from './anywhere';
import { readSection } from './influence';
import { Best, readAxles, rollOver, snapOf } from './train';
import { EFFECTS, readWord, SENSES, single } from './words';

/**
 * `quantity`: deflection, slope, moment, shear, reaction, couple; `at`: a section (a support for the last two) or
 * "anywhere"; `axles`: two columns, offset and force (along y: positive down with `axis down`).
 * Gives the value in the reader's signs and units, the position of the first axle, or the section.
 * Throws 'bad-axles', 'no-such-word', 'no-support', 'outside-beam'.
 */
export function rolling(
  open: OpenBeam,
  quantity: unknown,
  at: unknown,
  axles: unknown,
  sense?: unknown,
  give?: unknown,
): number {
  const { model } = open;
  const effect = readWord(quantity, 'quantity', EFFECTS);
  const train = readAxles(axles);
  const which = readWord(sense, 'sense', SENSES, 'largest');
  const wanted = readWord(give, 'give', ['value', 'position', 'section'] as const, 'value');
  const cell = single(at);
  const best = new Best(which);
  if (typeof cell === 'string' && /^[a-z]/i.test(cell.trim())) {
    readWord(cell, 'at', ['anywhere'] as const);
    worstAnywhere(model, effect, train, best, which);
  } else {
    const section = readSection(model, at);
    rollOver(shownLine(model, effect, section.x, section.side), train, snapOf(model), section.x, best);
  }
  if (best.worst === null) {
    return fail({
      code: 'no-support',
      kind: 'unavailable',
      column: 'at',
      expected: effect === 'couple' ? 'a support that holds a couple' : 'a support that holds a force',
      found: 'none',
      detail: { part: effect, supports: [] },
    });
  }
  return plain(best.worst[wanted]);
}

import type { BeamModel } from '../../../src/beam/model';
import { findMechanism } from '../../../src/integrate/mechanism';
import { solve } from '../../../src/integrate/solve';
import { beam, fixed, guided, onSprings, pin, spring } from '../../helpers/model';

const hinges = (...at: number[]): BeamModel['releases'] => at.map((x) => ({ at: x, kind: 'moment', row: 7 }));
const slides = (...at: number[]): BeamModel['releases'] => at.map((x) => ({ at: x, kind: 'shear', row: 7 }));
const soil = (from: number, to: number, stiffness = 1): BeamModel['foundations'][number] => ({
  from,
  to,
  stiffness,
  row: 8,
});

const stable: [string, Partial<BeamModel>][] = [
  ['two pins', { supports: [pin(0), pin(3)] }],
  ['two pins a billionth apart', { supports: [pin(0), pin(1e-9)] }],
  ['one fixed end', { supports: [fixed(0)] }],
  ['guided and pin', { supports: [guided(0), pin(8)] }],
  ['two soft springs', { supports: [spring(0, 1e-12), spring(8, 1e-12)] }],
  [
    'pin with a soft rotational spring',
    { supports: [onSprings(0, { held: true, rotationalSpring: 1e-12 })] },
  ],
  ['soil under a part', { foundations: [soil(2, 2.001)] }],
  ['fixed, hinge, pin', { supports: [fixed(0), pin(8)], releases: hinges(3) }],
  ['three supports, one hinge between', { supports: [pin(0), pin(4), pin(8)], releases: hinges(3) }],
  ['fixed both ends, shear release', { supports: [fixed(0), fixed(8)], releases: slides(3) }],
  [
    'hinge with soil on its right, fixed left',
    { supports: [fixed(0)], releases: hinges(3), foundations: [soil(3, 8)] },
  ],
  ['hinge inside the soil', { releases: hinges(3), foundations: [soil(0, 8)] }],
];

const unstable: [string, Partial<BeamModel>, object][] = [
  ['nothing', {}, { motion: 'any', from: 0, to: 8 }],
  ['one pin', { supports: [pin(2)] }, { motion: 'rotate', about: 2, from: 0, to: 8 }],
  ['one guided', { supports: [guided(2)] }, { motion: 'translate', from: 0, to: 8 }],
  [
    'only a rotational spring',
    { supports: [onSprings(2, { rotationalSpring: 5 })] },
    { motion: 'translate' },
  ],
  ['soil of zero stiffness', { foundations: [soil(0, 8, 0)] }, { motion: 'any' }],
  [
    'two pins and a hinge in the span',
    { supports: [pin(0), pin(8)], releases: hinges(3) },
    { motion: 'fold', from: 0, to: 8 },
  ],
  [
    'the part right of a hinge',
    { supports: [fixed(0)], releases: hinges(5) },
    { motion: 'rotate', about: 5, from: 5, to: 8 },
  ],
  [
    'the part left of a hinge',
    { supports: [fixed(8)], releases: hinges(3) },
    { motion: 'any', from: 0, to: 3 },
  ],
  [
    'a link between three hinges',
    { supports: [fixed(0), pin(4), fixed(8)], releases: hinges(1, 2, 3) },
    { motion: 'fold', from: 1 },
  ],
  [
    'two shear releases',
    { supports: [fixed(0), fixed(8)], releases: slides(3, 5) },
    { motion: 'translate', from: 3, to: 5 },
  ],
  [
    'soil only right of a hinge',
    { releases: hinges(3), foundations: [soil(3, 8)] },
    { motion: 'rotate', about: 3, to: 3 },
  ],
];

describe('mechanisms', () => {
  test.each(stable)('stands: %s', (_name, parts) => {
    const model = beam(0, 8, parts);
    expect(findMechanism(model)).toBeNull();
    expect(solve(model).ok).toBe(true);
  });

  test.each(unstable)('moves: %s', (_name, parts, detail) => {
    expect(findMechanism(beam(0, 8, parts))).toMatchObject({ code: 'unstable', kind: 'unavailable', detail });
  });

  test('units do not matter', () => {
    for (const scale of [1e-9, 1e9]) {
      const m = beam(0, 8 * scale, { supports: [pin(0), pin(8 * scale)], releases: hinges(3 * scale) });
      expect(findMechanism(m)).not.toBeNull();
      expect(findMechanism(beam(0, 8 * scale, { supports: [pin(0), pin(3 * scale)] }))).toBeNull();
    }
  });
});

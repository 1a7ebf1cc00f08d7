/** Rayleigh's method: closed forms of the quotient for a uniform span, a point mass and a cantilever; the exact first mode below. */
import { ask } from '../../../src/index';
import { beam, expectNear } from './beams';

const G = 9.80665;

test('uniform simple span: (1/2pi) sqrt(g 3024/31 EI/(w L^4)), just above the exact (pi/2) sqrt(EI g/(w L^4))', () => {
  // v = w (L^3 x - 2 L x^3 + x^4)/(24 EI): int v = w L^5/(120 EI), int v^2 = 31 w^2 L^9/(362880 EI^2)
  const [w, L, EI] = [12, 6, 17556];
  const f = ask.frequency(
    beam(`units kN m mm; pin 0; pin ${L}; uniform 0 ${L} "${w} kN/m"; EI value="${EI} kN m2"`),
  );
  expectNear(f, Math.sqrt((G * 3024 * EI) / (31 * w * L ** 4)) / (2 * Math.PI));
  const exact = (Math.PI / 2) * Math.sqrt((EI * G) / (w * L ** 4));
  expect(f / exact).toBeGreaterThan(1);
  expect(f / exact).toBeLessThan(1.001);
});

test('one point mass at midspan: (1/2pi) sqrt(g/delta), exact', () => {
  const delta = (20 * 6 ** 3) / (48 * 17556);
  const f = ask.frequency(beam('units kN m mm; pin 0; pin 6; point 3 value="20 kN"; EI value="17556 kN m2"'));
  expectNear(f, Math.sqrt(G / delta) / (2 * Math.PI));
});

test('uniform cantilever: int v = wL^5/(20 EI), int v^2 = 13 w^2 L^9/(3240 EI^2)', () => {
  const [w, L, EI] = [3, 2.5, 800];
  const f = ask.frequency(beam(`units kN m mm; fixed 0; uniform 0 ${L} "${w} kN/m"; EI value="${EI} kN m2"`));
  expectNear(f, Math.sqrt((G * 162 * EI) / (13 * w * L ** 4)) / (2 * Math.PI));
});

test('US units: g in ft/s^2', () => {
  const delta = (10 * 240 ** 3) / (48 * 29000 * 612); // inches
  const f = ask.frequency(
    beam('units kip ft in; pin 0; pin 20; point 10 value="10 kip"; E value="29000 ksi"; I value="612 in4"'),
  );
  expectNear(f, Math.sqrt(G / 0.0254 / delta) / (2 * Math.PI));
});

test('only vertical loads of the combination are masses; settlement, couples and camber are not', () => {
  const base =
    'units kN m mm; pin 0; pin 6; uniform 0 6 "2 kN/m" case=G; uniform 0 6 "9 kN/m" case=Q; EI value="5000 kN m2"';
  const plain = ask.frequency(beam(base, { combination: 'G + 0.1 Q' }));
  const more = `${base}; settlement 6 value=7; couple 2 value="30 kN m"; camber 0 6 value=12`;
  expectNear(ask.frequency(beam(more, { combination: 'G + 0.1 Q' })), plain);
  expectNear(plain, Math.sqrt((G * 3024 * 5000) / (31 * 2.9 * 6 ** 4)) / (2 * Math.PI));
});

test('two equal spans loaded against each other vibrate like one span: the antisymmetric first mode', () => {
  const one = ask.frequency(beam('units kN m mm; pin 0; pin 6; uniform 0 6 "2 kN/m"; EI value="5000 kN m2"'));
  const two = ask.frequency(
    beam(
      'units kN m mm; pin 0; pin 6; pin 12; uniform 0 6 "2 kN/m"; uniform 6 12 "-2 kN/m"; EI value="5000 kN m2"',
    ),
  );
  expectNear(two, one);
});

test('a load that changes sign inside its stretch, against its two halves', () => {
  const whole = 'units kN m mm; pin 0; pin 6; varying 0 6 "-2 kN/m" "4 kN/m"; EI value="5000 kN m2"';
  const halves =
    'units kN m mm; pin 0; pin 6; varying 0 2 "-2 kN/m" 0; varying 2 6 0 "4 kN/m"; EI value="5000 kN m2"';
  expectNear(ask.frequency(beam(whole)), ask.frequency(beam(halves)));
});

test('axis up and tension: gravity is down whatever the axis, and a pulled beam is stiffer', () => {
  const down = ask.frequency(
    beam('units kN m mm; pin 0; pin 6; uniform 0 6 "2 kN/m"; EI value="5000 kN m2"'),
  );
  const up = ask.frequency(
    beam('units kN m mm; axis up; pin 0; pin 6; uniform 0 6 "-2 kN/m"; EI value="5000 kN m2"'),
  );
  expectNear(up, down);
  const pulled = ask.frequency(
    beam('units kN m mm; pin 0; pin 6; uniform 0 6 "2 kN/m"; EI value="5000 kN m2"; axial value="500 kN"'),
  );
  // with the half-sine mode f^2 grows by 1 + N L^2/(pi^2 EI); Rayleigh's shape is near it
  expectNear((pulled / down) ** 2, 1 + (500 * 36) / (Math.PI ** 2 * 5000), undefined, 1e-2 / Number.EPSILON);
});

test('without units or without vertical loads there is no frequency', () => {
  expect(() => ask.frequency(beam('pin 0; pin 6; uniform 0 6 2; EI value=5000'))).toThrow(/units/);
  expect(() =>
    ask.frequency(beam('units kN m mm; pin 0; pin 6; settlement 6 value=3; EI value="5000 kN m2"')),
  ).toThrow();
});

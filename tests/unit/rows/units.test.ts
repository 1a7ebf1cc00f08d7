import { EXACT_NAMES, MathUnits, parseUnit, siFactor, type Unit } from '../../../src/rows/units';
import { sameDimension, unitSystem, unitText, usualUnit } from '../../../src/rows/system';

function unit(text: string): Unit {
  const result = parseUnit(text);
  if (!result.ok) throw new Error(`${text}: ${result.reason}`);
  return result.unit;
}

const EPS = Number.EPSILON;

/**
 * Factors to SI. Source: NIST SP 811 (2008), appendix B.8 and B.9 (values from memory): the pound, inch and standard gravity
 * are exact by definition (0.45359237 kg, 0.0254 m, 9.80665 m/s2), the others follow by arithmetic done here in decimals.
 */
const SI: [string, number, number, number][] = [
  ['N', 1, 1, 0],
  ['kN', 1e3, 1, 0],
  ['MN', 1e6, 1, 0],
  ['lbf', 4.4482216152605, 1, 0],
  ['lb', 4.4482216152605, 1, 0],
  ['kip', 4448.2216152605, 1, 0],
  ['k', 4448.2216152605, 1, 0],
  ['kgf', 9.80665, 1, 0],
  ['tf', 9806.65, 1, 0],
  ['m', 1, 0, 1],
  ['cm', 0.01, 0, 1],
  ['mm', 0.001, 0, 1],
  ['\u00b5m', 1e-6, 0, 1],
  ['in', 0.0254, 0, 1],
  ['ft', 0.3048, 0, 1],
  ['yd', 0.9144, 0, 1],
  ['Pa', 1, 1, -2],
  ['MPa', 1e6, 1, -2],
  ['GPa', 1e9, 1, -2],
  ['N/mm2', 1e6, 1, -2],
  ['N/mm\u00b2', 1e6, 1, -2],
  ['N/mm^2', 1e6, 1, -2],
  ['psi', 4.4482216152605 / 0.00064516, 1, -2],
  ['ksi', 4448.2216152605 / 0.00064516, 1, -2],
  ['psf', 4.4482216152605 / 0.09290304, 1, -2],
  ['ksf', 4448.2216152605 / 0.09290304, 1, -2],
  ['kgf/cm2', 98066.5, 1, -2],
  ['N/m', 1, 1, -1],
  ['kN/m', 1e3, 1, -1],
  ['pli', 4.4482216152605 / 0.0254, 1, -1],
  ['plf', 4.4482216152605 / 0.3048, 1, -1],
  ['klf', 4448.2216152605 / 0.3048, 1, -1],
  ['lb/ft', 4.4482216152605 / 0.3048, 1, -1],
  ['kip/ft', 4448.2216152605 / 0.3048, 1, -1],
  ['cm4', 1e-8, 0, 4],
  ['cm^4', 1e-8, 0, 4],
  ['mm\u2074', 1e-12, 0, 4],
  ['in4', 4.162314256e-7, 0, 4],
  ['m^4', 1, 0, 4],
  ['kNm', 1e3, 1, 1],
  ['kN\u00b7m', 1e3, 1, 1],
  ['kN*m', 1e3, 1, 1],
  ['kN m', 1e3, 1, 1],
  ['Nmm', 1e-3, 1, 1],
  ['ft-kip', 1355.8179483314004, 1, 1],
  ['kip-ft', 1355.8179483314004, 1, 1],
  ['ft\u00b7lbf', 0.3048 * 4.4482216152605, 1, 1],
  ['kip\u00b7in', 4448.2216152605 * 0.0254, 1, 1],
  ['kN\u00b7m2', 1e3, 1, 2],
  ['kip*in^2', 4448.2216152605 * 0.00064516, 1, 2],
  ['1/m', 1, 0, -1],
  ['m^-1', 1, 0, -1],
  ['m\u207b\u00b9', 1, 0, -1],
  ['1/mm', 1e3, 0, -1],
];

test.each(SI)('%s', (text, si, force, length) => {
  const u = unit(text);
  expect([u.force, u.length, u.angle]).toEqual([force, length, 0]);
  // The expected values are rounded once or twice themselves.
  expect(Math.abs(siFactor(u) / si - 1)).toBeLessThanOrEqual(2 * EPS);
});

test('angles', () => {
  expect(siFactor(unit('rad'))).toBe(1);
  expect(siFactor(unit('mrad'))).toBe(1e-3);
  expect(siFactor(unit('deg'))).toBe(Math.PI / 180);
  expect(siFactor(unit('\u00b0'))).toBe(Math.PI / 180);
  expect(unit('kN\u00b7m/rad')).toMatchObject({ force: 1, length: 1, angle: -1 });
});

test('our exact definitions agree with those of mathjs, also in dimension', () => {
  for (const name of EXACT_NAMES) {
    const mine = unit(name === 'kilogramforce' ? 'kgf' : name);
    const [part] = MathUnits.parse(name).units;
    // A definition of mathjs is a product of a few rounded numbers.
    expect([name, Math.abs(part!.unit.value / siFactor(mine) - 1) < 8 * EPS]).toEqual([name, true]);
    const [mass, length, time, , , , , angle] = MathUnits.parse(name).dimensions;
    expect([name, mass, length! - mass!, time! + 2 * mass!, angle]).toEqual([
      name,
      mine.force,
      mine.length,
      0,
      mine.angle,
    ]);
  }
});

test.each([
  ['knm', 'kNm'],
  ['KN/M', 'kN/m'],
  ['kN/mm\u00b2x', undefined],
  ['Mpa', 'MPa'],
  ['gpa', 'GPa'],
  ['kips/fft', 'kips/ft'],
  ['banana', undefined],
  ['', undefined],
])('unknown: %s', (text, suggestion) => {
  expect(parseUnit(text)).toMatchObject({
    ok: false,
    reason: 'unknown',
    ...(suggestion ? { suggestion } : {}),
  });
  const result = parseUnit(text);
  if (!suggestion && !result.ok) expect(result.suggestion).toBeUndefined();
});

test('masses and times are no structural units; a weight is suggested', () => {
  expect(parseUnit('kg/m')).toEqual({ ok: false, reason: 'not-structural', suggestion: 'kgf/m' });
  expect(parseUnit('s')).toEqual({ ok: false, reason: 'not-structural' });
  expect(parseUnit('m^0.5')).toMatchObject({ ok: false });
  expect(parseUnit('2 m')).toMatchObject({ ok: false });
  expect(parseUnit('constructor')).toMatchObject({ ok: false });
  expect(parseUnit('m'.repeat(100))).toMatchObject({ ok: false });
});

test('factors between units of a table are exact', () => {
  const metric = unitSystem(unit('kN'), unit('m'), unit('mm'));
  expect(metric.factor(unit('kN'))).toBe(1);
  expect(metric.factor(unit('GPa'))).toBe(1e6);
  expect(metric.factor(unit('N/mm2'))).toBe(1e3);
  expect(metric.factor(unit('cm4'))).toBe(1e-8);
  expect(metric.factor(unit('N/mm'))).toBe(1);
  expect(metric.deflectionFactor).toBe(1e-3);
  const customary = unitSystem(unit('kip'), unit('ft'), unit('in'));
  expect(customary.factor(unit('ksi'))).toBe(144);
  expect(customary.factor(unit('in4'))).toBe(1 / 20736); // 12^4
  expect(customary.factor(unit('plf'))).toBe(0.001);
  expect(customary.factor(unit('kip-in'))).toBe(1 / 12);
});

test('the unit to suggest, and the unit of the table itself', () => {
  const metric = unitSystem(unit('kN'), unit('m'), unit('mm'));
  const customary = unitSystem(unit('kip'), unit('ft'), unit('in'));
  const d = (force: number, length: number, angle = 0) => ({ force, length, angle });
  expect([d(1, -2), d(0, 4), d(1, 2), d(1, -1)].map((x) => usualUnit(x, metric))).toEqual([
    'GPa',
    'cm\u2074',
    'kN\u00b7m\u00b2',
    'kN/m',
  ]);
  expect([d(1, -2), d(0, 4), d(1, 2), d(1, -1)].map((x) => usualUnit(x, customary))).toEqual([
    'ksi',
    'in\u2074',
    'kip\u00b7ft\u00b2',
    'kip/ft',
  ]);
  expect([d(1, 0), d(0, 1), d(1, 1), d(0, -1), d(0, 0, 1), d(0, 0)].map((x) => unitText(x, metric))).toEqual([
    'kN',
    'm',
    'kN\u00b7m',
    '1/m',
    'rad',
    '',
  ]);
});

test('a radian may be written or left out where only radians are meant', () => {
  const spring = { force: 1, length: 1, angle: -1 };
  expect(sameDimension(unit('kNm/rad'), spring)).toBe(true);
  expect(sameDimension(unit('kNm'), spring)).toBe(true);
  expect(sameDimension(unit('kNm/deg'), spring)).toBe(true);
  expect(sameDimension(unit('kNm/rad'), { force: 1, length: 1, angle: 0 })).toBe(false);
  expect(sameDimension(unit('rad/m'), { force: 0, length: -1, angle: 0 })).toBe(true);
  expect(sameDimension(unit('kN'), { force: 1, length: -1, angle: 0 })).toBe(false);
});

import fc from 'fast-check';
import { readFeet } from '../../../src/rows/feet';
import { readNumberText, splitQuantity } from '../../../src/rows/number-text';
import { decimal, power, times, toNumber } from '../../../src/rows/rational';

describe('numbers written as text', () => {
  test.each([
    ['12', '12', false],
    ['-12.5', '-12.5', false],
    ['\u221212.5', '-12.5', false],
    ['.5', '.5', false],
    ['5.', '5.', false],
    ['1e3', '1e3', false],
    ['2.5E-3', '2.5E-3', false],
    ['1.234', '1.234', false],
    ['12,5', '12.5', true],
    ['0,125', '0.125', true],
    ['1234,5', '1234.5', true],
    ['12,50', '12.50', true],
    ['1234,567', '1234.567', true],
    ['1 234', '1234', true],
    ['1\u2009234\u2009567,25', '1234567.25', true],
    ['1\u00a0234.5', '1234.5', true],
    ['1,234,567', '1234567', true],
    ['1,234.5', '1234.5', true],
    ['1.234.567', '1234567', true],
    ['1.234,5', '1234.5', true],
  ])('%s', (text, plain, odd) => {
    expect(readNumberText(text)).toEqual({ kind: 'number', decimal: plain, odd });
  });

  test.each(['1,234', '-12,345', '999,000'])('%s can mean two things', (text) => {
    expect(readNumberText(text)).toEqual({ kind: 'ambiguous' });
  });

  test.each(['', 'a', '1 2', '12 34', '1,2,3', '1.2.3', '--1', '1e', '1e1234', '0x10', 'Infinity', 'NaN'])(
    '%s is none',
    (text) => {
      expect(readNumberText(text)).toBeNull();
    },
  );

  test('a number and its unit', () => {
    expect(splitQuantity('12 kN/m')).toEqual({ number: '12', unit: 'kN/m' });
    expect(splitQuantity('3.5m')).toEqual({ number: '3.5', unit: 'm' });
    expect(splitQuantity('12,5 kN')).toEqual({ number: '12,5', unit: 'kN' });
    expect(splitQuantity('1.2e3 N')).toEqual({ number: '1.2e3', unit: 'N' });
    expect(splitQuantity('2*3')).toBeNull();
    expect(splitQuantity('q')).toBeNull();
    expect(splitQuantity('12e-6*28/0.4')).toBeNull();
  });
});

describe('feet and inches, exact, in inches', () => {
  test.each([
    [`12'-6"`, 150],
    [`12' 6 1/2"`, 150.5],
    [`12'-6 1/2"`, 150.5],
    [`12'6"`, 150],
    [`12'`, 144],
    [`12.5'`, 150],
    [`6"`, 6],
    [`6 1/2"`, 6.5],
    [`3/4"`, 0.75],
    [`-3'-6"`, -42],
    ['12\u2032 6\u2033', 150],
    ['12 ft 6 in', 150],
    ['12ft-6in', 150],
    [`1' 0 1/16"`, 12.0625],
  ])('%s', (text, inches) => {
    expect(toNumber(readFeet(text)!)).toBe(inches);
  });

  test.each([`'`, `"`, `6 1/0"`, `12'6`, 'abc"', '12 ft', '6', `1/2'`])('%s is none', (text) => {
    expect(readFeet(text)).toBeNull();
  });
});

describe('exact fractions', () => {
  test('a decimal literal becomes the same double as the language reads', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e300, max: 1e300 }), (x) => {
        const text = String(x);
        // Subnormal results are rounded twice (the quotient, then the scaling); lengths and forces are never that small.
        fc.pre(x === 0 || Math.abs(x) > 1e-290);
        expect(toNumber(decimal(text))).toBe(Number(text) + 0);
      }),
    );
  });

  test('hand-worked', () => {
    expect(toNumber({ n: 1n, d: 3n })).toBe(1 / 3);
    expect(toNumber({ n: -2n, d: 3n })).toBe(-2 / 3);
    expect(toNumber({ n: 0n, d: 5n })).toBe(0);
    expect(toNumber(times({ n: 1n, d: 4n }, { n: 8n, d: 1n }))).toBe(2);
    expect(toNumber(power({ n: 2n, d: 5n }, -2))).toBe(6.25);
    expect(toNumber({ n: 10n ** 300n, d: 1n })).toBe(1e300);
    expect(toNumber({ n: 1n, d: 10n ** 300n })).toBe(1e-300);
  });
});

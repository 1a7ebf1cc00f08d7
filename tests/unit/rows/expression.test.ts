import fc from 'fast-check';
import { parseExpression } from '../../../src/rows/expression';

function value(text: string, names: Record<string, number> = {}): number {
  const result = parseExpression(text);
  if (!result.ok) throw new Error(`${text}: ${result.reason} ${result.found}`);
  const { expression } = result;
  const env = [names.x ?? 0, ...expression.names.map((name) => names[name] ?? NaN)];
  return expression.root.compile((name) => expression.names.indexOf(name) + 1)(env);
}

describe('arithmetic', () => {
  test.each([
    ['2+3*4', 14],
    ['(2+3)*4', 20],
    ['-2^2', -4], // as in mathematics
    ['2^3^2', 512],
    ['2^-1', 0.5],
    ['1/2/4', 0.125],
    ['10-4-3', 3],
    ['+5', 5],
    ['--5', 5],
    ['1.5e3*2', 3000],
    ['sqrt(16)+abs(-3)', 7],
    ['min(3,1,2)+max(3,1,2)', 4],
    ['sin(pi/2)', 1],
    ['cos(0)+tan(0)+exp(0)', 2],
    ['log(exp(2))', 2],
    ['8\u22123', 5],
    ['3\u00b74', 12],
    [' ( 1 + 1 ) ', 2],
    ['12e-6*28/0.4', (12e-6 * 28) / 0.4],
  ])('%s = %p', (text, expected) => {
    expect(value(text)).toBe(expected);
  });

  test('names and x', () => {
    expect(value('I0*(1+x/L)^3', { I0: 2, x: 6, L: 6 })).toBe(16);
    expect(value('q_1+q_2', { q_1: 1, q_2: 2 })).toBe(3);
    expect(value('\u03b1*2', { '\u03b1': 4 })).toBe(8);
    const result = parseExpression('a*x+b*a');
    expect(result.ok && [result.expression.names, result.expression.usesX]).toEqual([['a', 'b'], true]);
  });

  test('the closure agrees with the language on random numbers', () => {
    const number = fc.double({ noNaN: true, min: -1e6, max: 1e6 });
    fc.assert(
      fc.property(number, number, number, (a, b, c) => {
        expect(value('a*(b-c)/(1+abs(b))+c^2', { a, b, c })).toBe((a * (b - c)) / (1 + Math.abs(b)) + c ** 2);
      }),
    );
  });
});

describe('nothing else is reachable', () => {
  test.each([
    ['a.b', 'not-allowed'],
    ['a[1]', 'not-allowed'],
    ['[1,2]', 'not-allowed'],
    ['{a:1}', 'not-allowed'],
    ['a=1', 'not-allowed'],
    ['f(x)=x', 'not-allowed'],
    ['1;2', 'not-allowed'],
    ['1:3', 'not-allowed'],
    ['a ? b : c', 'not-allowed'],
    ['a<b', 'not-allowed'],
    ['a and b', 'not-allowed'],
    ['not a', 'not-allowed'],
    ['a mod b', 'not-allowed'],
    ['5%', 'not-allowed'],
    ['a!', 'not-allowed'],
    ["a'", 'not-allowed'],
    ['"text"', 'not-allowed'],
    ['a to b', 'not-allowed'],
    ['a in b', 'not-allowed'],
    ['1 # remark', 'not-allowed'],
    ['true', 'not-allowed'],
    ['null', 'not-allowed'],
    ['undefined', 'not-allowed'],
    ['import("x")', 'not-allowed'],
    ['import(x)', 'unknown-function'],
    ['evaluate(x)', 'unknown-function'],
    ['createUnit(x)', 'unknown-function'],
    ['constructor(x)', 'unknown-function'],
    ['toString()', 'unknown-function'],
    ['__proto__(x)', 'unknown-function'],
    ['(a)(b)', 'missing-operator'],
    ['2 a', 'missing-operator'],
    ['2(3+4)', 'missing-operator'],
    ['a b', 'missing-operator'],
    ['sqrt', 'function-without-brackets'],
    ['sqrt+1', 'function-without-brackets'],
    ['sqrt(1,2)', 'wrong-arguments'],
    ['min()', 'wrong-arguments'],
    ['2 +', 'not-understood'],
    ['(2', 'not-understood'],
    ['2)', 'not-understood'],
    ['', 'not-allowed'],
    ['*', 'not-understood'],
  ])('%s: %s', (text, reason) => {
    expect(parseExpression(text)).toMatchObject({ ok: false, reason });
  });

  test('a misspelt function is recognised', () => {
    expect(parseExpression('sqr(4)')).toMatchObject({
      reason: 'unknown-function',
      found: 'sqr',
      suggestion: 'sqrt',
    });
  });

  test('names of an object are only names', () => {
    for (const name of ['constructor', '__proto__', 'toString', 'hasOwnProperty', 'prototype']) {
      const result = parseExpression(`${name}+1`);
      expect(result.ok && result.expression.names).toEqual([name]);
    }
  });

  test('bounded length and nesting', () => {
    expect(parseExpression(`1${'+1'.repeat(300)}`)).toMatchObject({ reason: 'expression-too-long' });
    expect(parseExpression(`${'('.repeat(31)}1${')'.repeat(31)}`)).toMatchObject({
      reason: 'expression-too-long',
    });
    expect(value(`${'('.repeat(30)}1${')'.repeat(30)}`)).toBe(1);
    expect(value('-'.repeat(499) + '1')).toBe(-1);
  });

  test('any text: a result or a reason, never an exception', () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 80 }), (text) => {
        const result = parseExpression(text);
        expect(result.ok ? typeof result.expression.text : typeof result.reason).toBe('string');
      }),
      { numRuns: 500 },
    );
    const piece = fc.constantFrom(
      '1',
      'x',
      'a',
      '+',
      '-',
      '*',
      '/',
      '^',
      '(',
      ')',
      ',',
      'sqrt(',
      'min(',
      ' ',
      '.',
      '2e3',
    );
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 30 }), (pieces) => {
        expect(typeof parseExpression(pieces.join('')).ok).toBe('boolean');
      }),
      { numRuns: 500 },
    );
  });
});

import fc from 'fast-check';
import { readCombination } from '../../../src/rows';

const CASES = ['G', 'Q', 'W', 'G_s', 'S1'];

function factors(text: unknown): readonly number[] | null {
  const result = readCombination(text, CASES);
  if (!result.ok) throw new Error(JSON.stringify(result.issues));
  return result.combination === null ? null : result.combination.factors;
}

function fault(raw: unknown, cases: readonly string[] = CASES) {
  const result = readCombination(raw, cases);
  return result.ok ? null : result.issues;
}

describe('a linear expression in case names', () => {
  test.each([
    ['G + 0.3 Q', [1, 0.3, 0, 0, 0]],
    ['1.35 G + 1.5 Q', [1.35, 1.5, 0, 0, 0]],
    ['1.2*G - 0.5*W', [1.2, 0, -0.5, 0, 0]],
    ['G+0.3Q', [1, 0.3, 0, 0, 0]],
    ['1,35 G + 1,5 Q', [1.35, 1.5, 0, 0, 0]],
    ['-W', [0, 0, -1, 0, 0]],
    ['1.35 (G + G_s) + 1.5 Q', [1.35, 1.5, 0, 1.35, 0]],
    ['G*1.2', [1.2, 0, 0, 0, 0]],
    ['0.7*1.5*S1', [0, 0, 0, 0, 0.7 * 1.5]],
    ['Q/2', [0, 0.5, 0, 0, 0]],
    ['G \u2212 Q', [1, -1, 0, 0, 0]],
    ['1.2\u00b7G', [1.2, 0, 0, 0, 0]],
    ['G + G', [2, 0, 0, 0, 0]],
    ['0 G', [0, 0, 0, 0, 0]],
    ['-(G - 2 (Q - W))', [-1, 2, -2, 0, 0]],
    [' 1e1 Q ', [0, 10, 0, 0, 0]],
  ])('%s', (text, expected) => {
    expect(factors(text)!.map((f) => f + 0)).toEqual(expected);
  });

  test.each([null, undefined, '', 0, '  ', [[null]], [['']], [[0]]])('blank (%p): everything acts', (raw) => {
    expect(factors(raw)).toBeNull();
  });

  test.each([
    ['1.35 G + 1.5 P', 'unknown-case'],
    ['g', 'unknown-case'],
    ['G * Q', 'not-linear'],
    ['G + 3', 'combination-without-case'],
    ['G / Q', 'bad-combination'],
    ['G / 0', 'bad-combination'],
    ['G +', 'bad-combination'],
    ['(G', 'bad-combination'],
    ['G)', 'bad-combination'],
    ['1.35 & G', 'bad-combination'],
    ['G ^ 2', 'bad-combination'],
    ['('.repeat(40) + 'G' + ')'.repeat(40), 'bad-combination'],
    ['G + '.repeat(200) + 'G', 'bad-combination'],
    [5, 'bad-combination'],
    [true, 'bad-combination'],
    [{ error: '#REF!' }, 'cell-error'],
    ['#N/A', 'cell-error'],
  ])('%p: %s', (raw, code) => {
    expect(fault(raw)).toMatchObject([{ code, column: 'combination' }]);
  });

  test('capitals count, and the case that was meant is suggested with the list', () => {
    expect(fault('1.35 g + Q')).toMatchObject([{ found: 'g', suggestion: 'G', detail: { cases: CASES } }]);
    expect(fault('G', [])).toMatchObject([{ found: 'G', detail: { cases: [] } }]);
  });

  test('what a factor is worth does not depend on how it is written', () => {
    fc.assert(
      fc.property(fc.integer({ min: -2000, max: 2000 }), fc.integer({ min: 1, max: 2000 }), (a, b) => {
        const [x, y] = [a / 1000, b / 1000];
        expect(factors(`${x} G + ${y} Q`)).toEqual([x, y, 0, 0, 0].map((f) => f + 0));
        expect(factors(`${y}*Q ${x < 0 ? '-' : '+'} ${Math.abs(x)}*G`)!.map((f) => f + 0)).toEqual([
          x + 0,
          y,
          0,
          0,
          0,
        ]);
      }),
    );
  });

  test('any text gives a combination or an issue', () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 40 }), (text) => {
        const result = readCombination(text, CASES);
        expect(result.ok || result.issues.length > 0).toBe(true);
      }),
    );
  });
});

describe('a two-column range', () => {
  test('case, factor; blank rows and a heading are passed over', () => {
    const rows = [
      ['Case', 'Factor'],
      ['G', 1.35],
      [null, 0],
      ['', ''],
      ['Q', '1.5'],
      ['W', '-0,5'],
    ];
    const result = readCombination(rows, CASES);
    expect(result).toEqual({
      ok: true,
      combination: { factors: [1.35, 1.5, -0.5, 0, 0], text: '1.35 G + 1.5 Q - 0.5 W' },
    });
  });

  test('a blank factor is 0, like a 0', () => {
    expect(
      factors([
        ['G', null],
        ['Q', 1],
      ]),
    ).toEqual([0, 1, 0, 0, 0]);
    expect(
      factors([
        ['G', 0],
        ['Q', 1],
      ]),
    ).toEqual([0, 1, 0, 0, 0]);
    expect(
      factors([
        [0, 0],
        ['', null],
      ]),
    ).toBeNull();
  });

  test('what is wrong is named with its row', () => {
    expect(
      fault([
        ['G', 'much'],
        ['P', 1],
        ['Q', 1],
        ['Q', 2],
        [3, 1],
        ['W', { error: '#REF!' }],
      ])!.map(({ row, code }) => [row, code]),
    ).toEqual([
      [1, 'bad-factor'],
      [2, 'unknown-case'],
      [4, 'case-twice'],
      [5, 'bad-case'],
      [6, 'cell-error'],
    ]);
    expect(fault([['G', 1, 2]])).toMatchObject([{ code: 'combination-shape', found: '3' }]);
  });
});

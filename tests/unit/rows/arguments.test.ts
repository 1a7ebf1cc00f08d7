/** The other arguments of a formula: x, limit, names and values. */
import { readBindings, readLimit, readPosition } from '../../../src/rows';
import { METRIC, modelOf, PLAIN } from './helpers';

const metric = modelOf(METRIC);
const bare = modelOf(PLAIN);

describe('x', () => {
  test.each([
    [3, 3, 'right'],
    [0, 0, 'right'],
    [null, 0, 'right'],
    ['', 0, 'right'],
    ['3', 3, 'right'],
    ['3-', 3, 'left'],
    ['3+', 3, 'right'],
    ['3 -', 3, 'left'],
    ['3.5 m', 3.5, 'right'],
    ['350 cm-', 3.5, 'left'],
    [`10'-6"`, 3.2004, 'right'],
    [`10'-6"-`, 3.2004, 'left'],
    ['2,5', 2.5, 'right'],
    [[[3]], 3, 'right'],
    [6, 6, 'right'],
    [{ type: 'FormattedNumber', basicValue: 2 }, 2, 'right'],
  ])('%p', (raw, x, side) => {
    expect(readPosition(raw, metric)).toEqual({ ok: true, x, side });
  });

  test('a position a few units in the last place from a named one is that one', () => {
    const model = modelOf([
      ['pin', 0],
      ['pin', 0.3],
      ['EI', '', '', 1],
      ['point', 0.1, '', 1],
    ]);
    expect(readPosition(0.1 * 3, model)).toMatchObject({ ok: true, x: 0.3 });
    expect(readPosition(0.3 - 0.2, model)).toMatchObject({ ok: true, x: 0.1 });
    expect(readPosition(-1e-17, model)).toMatchObject({ ok: true, x: 0 });
    expect(readPosition(0.3 + 1e-12, model)).toMatchObject({ ok: false });
    expect(readPosition(0.1 + 1e-12, model)).toMatchObject({ ok: true, x: 0.1 + 1e-12 });
  });

  test.each([
    [9, 'outside-beam'],
    [-1, 'outside-beam'],
    ['7 m', 'outside-beam'],
    ['3 kN', 'wrong-dimension'],
    ['middle', 'bad-position'],
    ['3 & 4', 'bad-position'],
    [true, 'bad-position'],
    [NaN, 'cell-error'],
    [{ error: '#REF!' }, 'cell-error'],
  ])('%p: %s', (raw, code) => {
    expect(readPosition(raw, metric)).toMatchObject({ ok: false, issue: { code, column: 'x' } });
  });

  test('outside the beam states both ends', () => {
    expect(readPosition(9, metric)).toMatchObject({
      issue: { found: '9 m', detail: { from: '0 m', to: '6 m' } },
    });
    expect(readPosition('3 m', bare)).toMatchObject({ issue: { code: 'units-row-missing' } });
  });
});

describe('limit', () => {
  test.each([
    ['span/360', { kind: 'fraction', divisor: 360 }, 'span/360'],
    ['SPAN / 250', { kind: 'fraction', divisor: 250 }, 'span/250'],
    [20, { kind: 'absolute', value: 0.02 }, '20 mm'],
    ['20', { kind: 'absolute', value: 0.02 }, '20 mm'],
    ['20 mm', { kind: 'absolute', value: 0.02 }, '20 mm'],
    ['1 in', { kind: 'absolute', value: 0.0254 }, '1 in'],
  ])('%p', (raw, limit, text) => {
    expect(readLimit(raw, metric)).toEqual({ ok: true, limit, text });
  });

  test.each([null, undefined, '', 0, [[0]]])('%p: none given', (raw) => {
    expect(readLimit(raw, metric)).toEqual({ ok: true, limit: null, text: '' });
  });

  test.each([
    [-5, 'bad-limit'],
    [true, 'bad-limit'],
    ['span/0', 'bad-limit'],
    ['span/-3', 'bad-limit'],
    ['span', 'bad-limit'],
    ['span/360 mm', 'bad-limit'],
    ['q+1', 'bad-limit'],
    ['1,234', 'ambiguous-number'],
    ['20 kN', 'wrong-dimension'],
    ['20 mmm', 'unknown-unit'],
    ['-3 mm', 'bad-limit'],
    ['#REF!', 'cell-error'],
  ])('%p: %s', (raw, code) => {
    expect(readLimit(raw, metric)).toMatchObject({ ok: false, issue: { code, column: 'limit' } });
  });

  test('L/360 suggests span/360; a unit needs a units row', () => {
    expect(readLimit('L/360', metric)).toMatchObject({
      issue: { code: 'bad-limit', suggestion: 'span/360' },
    });
    expect(readLimit('20 mm', bare)).toMatchObject({ issue: { code: 'units-row-missing' } });
    expect(readLimit(0.02, bare)).toEqual({
      ok: true,
      limit: { kind: 'absolute', value: 0.02 },
      text: '0.02',
    });
  });
});

describe('names and values', () => {
  const pairs = (names: unknown, values: unknown) => {
    const result = readBindings(names, values);
    return result.ok
      ? Object.fromEntries(result.bindings)
      : result.issues.map(({ code, found }) => [code, found]);
  };

  test('rows, columns, single cells, nothing', () => {
    expect(pairs([['L', 'q']], [[6, '12 kN/m']])).toEqual({ L: 6, q: '12 kN/m' });
    expect(pairs([['L'], ['q']], [[6, 12]])).toEqual({ L: 6, q: 12 });
    expect(pairs('L', 6)).toEqual({ L: 6 });
    expect(pairs(null, null)).toEqual({});
    expect(pairs([['']], [[0]])).toEqual({});
    expect(pairs(undefined, undefined)).toEqual({});
  });

  test('a blank value is 0 and a blank name binds nothing, however blanks arrive', () => {
    for (const blank of [null, '', 0])
      expect(pairs([['a', blank, 'b']], [[blank, 7, 2]])).toEqual({ a: 0, b: 2 });
  });

  test.each([
    [[['L', 'q']], [[6]], [['names-size', '1']]],
    [[['L']], null, [['names-size', '0']]],
    [[['1st']], [[6]], [['bad-name', '1st']]],
    [[['a b']], [[6]], [['bad-name', 'a b']]],
    [[[5]], [[6]], [['bad-name', '5']]],
    [[['x']], [[6]], [['reserved-name', 'x']]],
    [[['pi']], [[6]], [['reserved-name', 'pi']]],
    [[['sqrt']], [[6]], [['reserved-name', 'sqrt']]],
    [[['span']], [[6]], [['reserved-name', 'span']]],
    [[['a', 'a']], [[6, 7]], [['name-twice', 'a']]],
    [[['a']], [[true]], [['bad-value', 'TRUE']]],
    [[['a']], [[{ error: '#REF!' }]], [['cell-error', '#REF!']]],
    [[['#REF!']], [[1]], [['cell-error', '#REF!']]],
  ])('%p %p', (names, values, expected) => {
    expect(pairs(names, values)).toEqual(expected);
  });
});

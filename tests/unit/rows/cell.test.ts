import { isBlank, normaliseCell, showCell } from '../../../src/rows/cell';

describe('one cell, in every dress a host gives it', () => {
  test.each([
    [undefined, null],
    [null, null],
    ['', null],
    ['   ', null],
    [' pin ', 'pin'],
    [0, 0],
    [-1.5, -1.5],
    [45000, 45000], // a date is its serial number
    [true, true],
    [12n, 12],
    [NaN, { error: '#NUM!' }],
    [Infinity, { error: '#NUM!' }],
    ['#REF!', { error: '#REF!' }],
    ['#n/a', { error: '#N/A' }],
    ['# a remark', '# a remark'],
    [{ type: 'Double', basicType: 'Double', basicValue: 7, numberFormat: '0.00' }, 7],
    [{ type: 'FormattedNumber', basicType: 'Double', basicValue: 3.5 }, 3.5],
    [{ type: 'String', basicType: 'String', basicValue: ' pin' }, 'pin'],
    [{ type: 'Boolean', basicType: 'Boolean', basicValue: false }, false],
    [{ type: 'Empty', basicType: 'Empty', basicValue: '' }, null],
    [{ type: 'Empty' }, null],
    [{ type: 'Error', basicType: 'Error', basicValue: '#DIV/0!', errorType: 'Div0' }, { error: '#DIV/0!' }],
    [{ type: 'Error', basicType: 'Error', basicValue: 5 }, { error: '#VALUE!' }],
    [{ type: 'Entity', text: 'x', basicType: 'Error', basicValue: '#VALUE!' }, { error: '#VALUE!' }],
    [{ type: 'Odd', basicValue: { deep: 1 } }, { error: '#VALUE!' }],
    [{ error: '#SPILL!' }, { error: '#SPILL!' }],
    [{ code: '#N/A', message: 'no such support' }, { error: '#N/A' }],
    [{ anything: 1 }, { error: '#VALUE!' }],
    [[1, 2], { error: '#VALUE!' }],
    [() => 1, { error: '#VALUE!' }],
    [Symbol('x'), { error: '#VALUE!' }],
    [new Date(0), { error: '#VALUE!' }],
  ])('%p', (raw, cell) => {
    expect(normaliseCell(raw)).toEqual(cell);
  });

  test('blank and 0 are one and the same', () => {
    expect([null, undefined, 0].every((cell) => isBlank(cell))).toBe(true);
    expect([1, '0', 'a', false].some((cell) => isBlank(cell))).toBe(false);
  });

  test('cells in a sentence', () => {
    expect(showCell(null)).toBe('a blank cell');
    expect(showCell(false)).toBe('FALSE');
    expect(showCell(1.5)).toBe('1.5');
    expect(showCell({ error: '#REF!' })).toBe('#REF!');
    expect(showCell('a'.repeat(80))).toBe(`"${'a'.repeat(57)}..."`);
  });
});

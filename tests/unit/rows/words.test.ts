import { columnMeant, columnOf, itemMeant, itemOf } from '../../../src/rows/words';

// Contract 2.1 to 2.4: every item and every accepted synonym.
test.each([
  ['pin', 'pin roller pinned support Pin PIN'],
  ['fixed', 'fixed built-in built_in encastre encastré clamped'],
  ['guided', 'guided'],
  ['spring', 'spring'],
  ['settlement', 'settlement'],
  ['rotation', 'rotation'],
  ['foundation', 'foundation'],
  ['hinge', 'hinge'],
  ['rotational spring', 'rotational-spring rotational_spring'],
  ['shear release', 'shear-release'],
  ['E', 'E e'],
  ['I', 'I i'],
  ['EI', 'EI ei'],
  ['GA', 'GA ga'],
  ['point', 'point point-load force'],
  ['couple', 'couple moment'],
  ['uniform', 'uniform udl UDL'],
  ['varying', 'varying trapezoidal triangular'],
  ['curvature', 'curvature'],
  ['axial', 'axial'],
  ['camber', 'camber'],
  ['units', 'units'],
  ['axis', 'axis'],
  ['limit', 'limit'],
])('%s: %s', (item, words) => {
  for (const word of words.split(' ')) expect([word, itemOf(word)]).toEqual([word, item]);
});

test('words of two parts, however they are spaced', () => {
  expect(itemOf('rotational  spring')).toBe('rotational spring');
  expect(itemOf('Shear Release')).toBe('shear release');
  expect(itemOf('Point Load')).toBe('point');
  expect(itemOf('built in')).toBe('fixed');
});

test('names of an object are no items', () => {
  for (const word of ['constructor', '__proto__', 'toString', 'hasOwnProperty'])
    expect(itemOf(word)).toBeNull();
});

test('near misses', () => {
  expect(itemMeant('unifrom')).toBe('uniform');
  expect(itemMeant('buildt-in')).toBe('built-in');
  expect(itemMeant('rotatonal spring')).toBe('rotational spring');
  expect(itemMeant('hing')).toBe('hinge');
  expect(itemMeant('girder')).toBeUndefined();
});

test('columns, case and spacing ignored', () => {
  expect(columnOf(' END  VALUE')).toBe('End value');
  expect(columnOf('endvalue')).toBe('End value');
  expect(columnOf('at')).toBe('At');
  expect(columnOf('Position')).toBeNull();
  expect(columnMeant('Vaule')).toBe('Value');
  expect(columnMeant('Checked by')).toBeUndefined();
});

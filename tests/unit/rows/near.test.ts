import { editDistance, nearest } from '../../../src/rows/near';

test('edit distance: hand-worked', () => {
  expect(editDistance('kitten', 'sitting')).toBe(3); // two changes and one letter more (Levenshtein's own example, from memory)
  expect(editDistance('pin', 'pin')).toBe(0);
  expect(editDistance('', 'abc')).toBe(3);
  expect(editDistance('unifrom', 'uniform')).toBe(1); // neighbours swapped
  expect(editDistance('Pin', 'pin')).toBeCloseTo(0.1, 15);
  expect(editDistance('abcdef', 'uvwxyz', 2)).toBe(Infinity);
});

test('the nearest word, if it is near enough', () => {
  const words = ['pin', 'fixed', 'uniform', 'hinge', 'kN/m', 'G', 'Q'];
  expect(nearest('unifrom', words)).toBe('uniform');
  expect(nearest('fixd', words)).toBe('fixed');
  expect(nearest('KN/m', words)).toBe('kN/m');
  expect(nearest('g', words)).toBe('G');
  expect(nearest('w', words)).toBeUndefined();
  expect(nearest('banana', words)).toBeUndefined();
  expect(nearest('x'.repeat(100), words)).toBeUndefined();
});

/** Random tables: never an exception; always issues with words, or a model of finite numbers that is valid by construction. */
import fc from 'fast-check';
import type { BeamModel } from '../../../src/beam/model';
import type { Issue } from '../../../src/issue';
import { say } from '../../../src/messages';
import { compileTable, readBindings, readCombination, readLimit, readPosition } from '../../../src/rows';

const word = fc.constantFrom(
  ...'pin fixed guided spring settlement rotation foundation hinge E I EI GA point couple uniform varying curvature axial camber units axis limit'.split(
    ' ',
  ),
  'rotational spring',
  'shear release',
  'Item',
  'At',
  'Value',
  '# remark',
  'unifrom',
  'toString',
  '__proto__',
);
const place = fc.oneof(
  fc.constantFrom<unknown>(
    0,
    1,
    2,
    3,
    6,
    '',
    null,
    '0',
    'L',
    'L/2',
    '3 m',
    `12'-6"`,
    'x',
    'kN',
    'down',
    'up',
    -1,
    1e308,
  ),
  fc.double(),
);
const number = fc.oneof(
  fc.constantFrom<unknown>(
    0,
    1,
    5,
    -3,
    '',
    null,
    'q',
    'q*b',
    'x+1',
    '1/x',
    '5 kN',
    '5 kN/m',
    '210 GPa',
    '8360 cm4',
    'span/300',
    'mm',
    '1,234',
    '12,5',
    '2 q',
    '((',
    1e308,
    '1e308*10',
  ),
  fc.double(),
  fc.string({ maxLength: 8 }),
);
const unit = fc.constantFrom<unknown>(
  '',
  null,
  0,
  'kN',
  'kN/m',
  'GPa',
  'cm4',
  'kNm',
  'mm',
  'm',
  'banana',
  'kg',
  5,
  '^',
  '1/',
);
const odd = fc.oneof(
  fc.boolean(),
  fc.constantFrom<unknown>(
    undefined,
    { error: '#REF!' },
    { type: 'Error', basicValue: '#N/A' },
    { basicValue: 3 },
    {},
    [],
    NaN,
    '#REF!',
  ),
  fc.anything({ maxDepth: 1 }),
);
const rare = (usual: fc.Arbitrary<unknown>) =>
  fc.oneof({ weight: 24, arbitrary: usual }, { weight: 1, arbitrary: odd });
const row = fc.tuple(
  rare(word),
  rare(place),
  rare(fc.oneof({ weight: 2, arbitrary: fc.constant<unknown>('') }, { weight: 1, arbitrary: place })),
  rare(number),
  rare(fc.oneof({ weight: 3, arbitrary: fc.constant<unknown>('') }, { weight: 1, arbitrary: number })),
  rare(unit),
  rare(fc.constantFrom<unknown>('', 'G', 'Q', 'g', 'G + Q', '1.5 G', 0, null)),
);
/** Tables that are mostly right, so that the later stages are reached too. */
const sound: unknown[][] = [
  ['pin', 0],
  ['pin', 6],
  ['EI', '', '', 1],
];
const units: unknown[][] = [
  ['units', 'kN', 'm', 'mm'],
  ['pin', 0],
  ['fixed', 6],
  ['E', '', '', 200, '', 'GPa'],
  ['I', '', '', 5000, '', 'cm4'],
];
const table = fc
  .tuple(fc.constantFrom<unknown[][]>([], sound, units), fc.array(row, { maxLength: 6 }))
  .map(([base, rows]) => [...base, ...rows]);

function finite(value: unknown): boolean {
  if (typeof value === 'number') return Number.isFinite(value);
  if (Array.isArray(value)) return value.every(finite);
  return typeof value !== 'object' || value === null || Object.values(value).every(finite);
}

function sane(model: BeamModel): void {
  expect(finite(model)).toBe(true);
  expect(model.start).toBeLessThan(model.end);
  let reached = model.start;
  for (const { from, to } of model.ei) {
    expect(from).toBe(reached);
    expect(to).toBeGreaterThan(from);
    reached = to;
  }
  expect(reached).toBe(model.end);
  const places = model.supports.map(({ at }) => at);
  expect([...new Set(places)].sort((a, b) => a - b)).toEqual(places);
  for (const load of model.loads) {
    expect(load.case).toBeGreaterThanOrEqual(-1);
    expect(load.case).toBeLessThan(model.cases.length);
    if ('from' in load) {
      expect(load.from).toBeGreaterThanOrEqual(model.start);
      expect(load.to).toBeLessThanOrEqual(model.end);
      expect(load.from).toBeLessThan(load.to);
    }
  }
}

/** The sentence without what it quotes of the user's own. */
function ours(issue: Issue): string {
  return say(issue).replace(/".*"/gs, '""');
}

function check(rows: unknown[][], names: unknown, values: unknown): 'model' | 'issues' {
  const compiled = compileTable(rows);
  for (const issue of compiled.issues) expect(say(issue).length).toBeGreaterThan(10);
  const bindings = readBindings(names, values);
  if (!bindings.ok) {
    expect(bindings.issues.map(say).every((text) => text.length > 10)).toBe(true);
    return 'issues';
  }
  const result = compiled.build(bindings.bindings);
  if (!result.ok) {
    expect(result.issues.length).toBeGreaterThan(0);
    for (const issue of result.issues) expect(ours(issue)).not.toMatch(/undefined|NaN|\[object|\?\./);
    return 'issues';
  }
  sane(result.model);
  for (const { text } of result.readings) expect(text).not.toMatch(/undefined|NaN|\[object/);
  for (const caution of result.cautions) expect(say(caution).length).toBeGreaterThan(10);
  return 'model';
}

test('random rows', () => {
  let models = 0;
  fc.assert(
    fc.property(table, fc.constantFrom<unknown>('4', 4, '4 kN/m', '4 m', true, ''), (rows, value) => {
      if (check(rows, [['L', 'q', 'b']], [[6, value, 2]]) === 'model') models += 1;
    }),
    { seed: 20261201, numRuns: 1500 },
  );
  // The property would be empty if hardly any table got as far as a model.
  expect(models).toBeGreaterThan(100);
});

test('random cells of any kind', () => {
  fc.assert(
    fc.property(
      fc.array(fc.array(fc.anything({ maxDepth: 1 }), { maxLength: 10 }), { maxLength: 5 }),
      (rows) => {
        check(rows, null, null);
      },
    ),
    { seed: 20261201, numRuns: 500 },
  );
});

test('random text in one cell', () => {
  const piece = fc.constantFrom(
    'pin ',
    'uniform ',
    'EI ',
    'value=',
    '"',
    ';',
    '\n',
    '3 ',
    '0 ',
    '12\'-6" ',
    'kN ',
    'units ',
    '# ',
    'x ',
    '=',
    'case=',
    'G ',
  );
  fc.assert(
    fc.property(
      fc.oneof(
        fc.string(),
        fc.array(piece, { maxLength: 25 }).map((pieces) => pieces.join('')),
      ),
      (text) => {
        check([[text]], null, null);
      },
    ),
    { seed: 20261201, numRuns: 800 },
  );
});

test('random arguments', () => {
  const compiled = compileTable(units).build(new Map());
  if (!compiled.ok) throw new Error('a model was expected');
  const { model } = compiled;
  fc.assert(
    fc.property(fc.oneof(fc.anything({ maxDepth: 2 }), fc.string({ maxLength: 12 }), fc.double()), (raw) => {
      const position = readPosition(raw, model);
      if (position.ok) {
        expect(position.x).toBeGreaterThanOrEqual(0);
        expect(position.x).toBeLessThanOrEqual(6);
      } else expect(say(position.issue)).toMatch(/^Argument x: /);
      const limit = readLimit(raw, model);
      expect(
        limit.ok
          ? limit.limit === null || finite(limit.limit)
          : say(limit.issue).startsWith('Argument limit: '),
      ).toBe(true);
      const combination = readCombination(raw, ['G']);
      expect(combination.ok ? finite(combination.combination) : combination.issues.length > 0).toBe(true);
      const bindings = readBindings(raw, raw);
      expect(bindings.ok || bindings.issues.length > 0).toBe(true);
    }),
    { seed: 20261201, numRuns: 1000 },
  );
});

/** Opening beams and the content memo: same content is one beam, any change is another, bounds hold, age of use decides. */
import { ask, BeamProblem, clearMemo, MEMO_BOUNDS, memoSize, openBeam, reviewBeam } from '../../../src/index';
import { ContentMemo, copyRange, hashRange, sameRange } from '../../../src/memo';

const TABLE = (): unknown[][] => [
  ['pin', 0, null, null],
  ['pin', 'L', null, null],
  ['uniform', null, null, 3],
  ['EI', null, null, 200],
];
const NAMES = [['L']];

beforeEach(clearMemo);

test('the same content in fresh arrays is the same opened beam, also by combination', () => {
  const ask_ = (): unknown => openBeam({ beam: TABLE(), names: NAMES, values: [[4]] });
  expect(ask_()).toBe(ask_());
  expect(memoSize().tables.entries).toBe(1);
  expect(memoSize().members.entries).toBe(1);
});

test('members of a template share its compiled table', () => {
  const one = openBeam({ beam: TABLE(), names: NAMES, values: [[4]] });
  const two = openBeam({ beam: TABLE(), names: NAMES, values: [[5]] });
  expect(two.table).toBe(one.table);
  expect(two.model.end).toBe(5);
  expect(one.model.end).toBe(4);
});

test('a change of the caller’s array after the call changes nothing that is remembered', () => {
  const table = TABLE();
  const before = ask.maxDeflection(openBeam({ beam: table, names: NAMES, values: [[4]] }));
  (table[2] as unknown[])[3] = 6;
  expect(ask.maxDeflection(openBeam({ beam: table, names: NAMES, values: [[4]] }))).toBeCloseTo(
    2 * before,
    12,
  );
  expect(ask.maxDeflection(openBeam({ beam: TABLE(), names: NAMES, values: [[4]] }))).toBe(before);
});

test('faults are remembered and thrown each time with all their issues', () => {
  const wrong = (): unknown[][] => [
    ['pin', 0],
    ['pinn', 4],
    ['EI', null, null, 1],
    ['foo', 2],
  ];
  for (let i = 0; i < 2; i++) {
    let caught: unknown;
    try {
      openBeam({ beam: wrong() });
    } catch (problem) {
      caught = problem;
    }
    expect(caught).toBeInstanceOf(BeamProblem);
    expect((caught as BeamProblem).issues.map((issue) => issue.row)).toEqual(expect.arrayContaining([2, 4]));
    expect((caught as BeamProblem).message).toMatch(/row 2/i);
  }
  expect(memoSize().members.entries).toBe(1);
});

test('an unstable beam is a review with rows read and one issue, and a problem only when asked', () => {
  const review = reviewBeam({ beam: 'pin 0; EI 0 4 100; point 2 value=1' });
  expect(review.issues.map((issue) => issue.code)).toEqual(['unstable']);
  expect(review.model).not.toBeNull();
  expect(review.readings.length).toBeGreaterThan(0);
  expect(review.open).toBeNull();
});

test('past the critical load the message is a sentence', () => {
  const open = openBeam({ beam: 'pin 0; pin 4; uniform 0 4 1; EI value=100; axial value=-500' });
  expect(() => ask.maxDeflection(open)).toThrow(/critical load/);
});

test('blank combination, names and values read alike as null, empty text and 0', () => {
  const beam = 'pin 0; pin 4; uniform 0 4 1 case=G; EI value=100';
  const values = [null, undefined, '', 0].map((blank) =>
    ask.maxDeflection(
      openBeam({ beam, combination: blank, names: blank === 0 ? null : blank, values: null }),
    ),
  );
  expect(new Set(values).size).toBe(1);
});

describe('the memo', () => {
  test('every kind of cell counts: type, value, shape', () => {
    const ranges: unknown[] = [
      [[1, 2]],
      [[1], [2]],
      [[1, '2']],
      [[1, true]],
      [[1, null]],
      [[1, '']],
      [[1, 2.0000000000000004]],
      [[1, { type: 'Error', basicType: 'Error', basicValue: '#DIV/0!' }]],
      [[1, { type: 'Double', basicType: 'Double', basicValue: 2 }]],
      'pin 0',
      'pin 1',
      0,
      null,
    ];
    ranges.forEach((a, i) => ranges.forEach((b, j) => expect(sameRange(a, copyRange(b))).toBe(i === j)));
    for (const range of ranges) expect(hashRange(copyRange(range))).toBe(hashRange(range));
    expect(sameRange([[NaN]], [[NaN]])).toBe(true);
  });

  test('hashes spread: 20,000 neighbouring members fall on as many hashes, bar a handful', () => {
    const seen = new Set<number>();
    for (let k = 0; k < 20000; k++) seen.add(hashRange([[6 + k * 1e-4, 8360, 12]]));
    // 20,000 draws of 32 bits collide 0.05 times on average
    expect(seen.size).toBeGreaterThanOrEqual(19990);
  });

  test('a collision costs a comparison and never an answer', () => {
    const memo = new ContentMemo<string>(10, 1e6);
    memo.keep(7, [[[1]]], 'one', 10);
    memo.keep(7, [[[2]]], 'two', 10);
    expect(memo.find(7, [[1]])).toBe('one');
    expect(memo.find(7, [[2]])).toBe('two');
    expect(memo.find(7, [[3]])).toBeUndefined();
  });

  test('bounded by entries; what was used longest ago goes first', () => {
    const memo = new ContentMemo<number>(8, 1e6);
    for (let k = 0; k < 8; k++) memo.keep(k, [k], k, 10);
    expect(memo.find(0, 0)).toBe(0); // 0 is young again, 1 is the oldest
    memo.keep(8, [8], 8, 10);
    expect(memo.size().entries).toBeLessThanOrEqual(8);
    expect(memo.find(0, 0)).toBe(0);
    expect(memo.find(8, 8)).toBe(8);
    expect(memo.find(1, 1)).toBeUndefined();
  });

  test('bounded by bytes; an entry larger than the bound is kept alone until the next', () => {
    const memo = new ContentMemo<number>(100, 1000);
    for (let k = 0; k < 50; k++) memo.keep(k, [k], k, 100);
    expect(memo.size().bytes).toBeLessThanOrEqual(1000);
    memo.keep(99, [99], 99, 5000);
    expect(memo.find(99, 99)).toBe(99);
    expect(memo.size().entries).toBe(1);
  });

  test('ten thousand members stay within the bounds', () => {
    for (let k = 0; k < 10000; k++) openBeam({ beam: TABLE(), names: NAMES, values: [[4 + k]] });
    const { members, tables } = memoSize();
    expect(members.entries).toBeLessThanOrEqual(MEMO_BOUNDS.members.entries);
    expect(members.bytes).toBeLessThanOrEqual(MEMO_BOUNDS.members.bytes);
    expect(tables.entries).toBe(1);
  });
});

import { COVERED } from './section-cases';
import { issuesOf, modelOf } from './helpers';

const ENDS = [
  ['pin', 0],
  ['pin', 6],
];
const beam = (...rows: unknown[][]) => modelOf([...ENDS, ...rows]);
const faulty = (...rows: unknown[][]) => issuesOf([...ENDS, ...rows]);
const line = (start: number, end: number) => ({ kind: 'linear', start, end });

describe('E x I or EI, each point exactly once', () => {
  test.each(COVERED)('%s', (_, rows, expected) => {
    expect(beam(...rows).ei).toEqual(expected);
  });

  test('I that varies under E in two pieces is cut where E changes', () => {
    const model = beam(['E', 0, 2, 1], ['E', 2, 6, 2], ['I', '', '', 3, 9]);
    expect(model.ei).toEqual([
      { from: 0, to: 2, law: line(3, 5), rows: [3, 5] },
      { from: 2, to: 6, law: line(10, 18), rows: [4, 5] },
    ]);
    expect(model.modulus).toBeNull();
  });

  test('both in x: the product at x', () => {
    const { law } = beam(['E', '', '', '1+x'], ['I', '', '', '2*x+1']).ei[0]!;
    if (law.kind !== 'function') throw new Error('a law in x was expected');
    expect([law.at(0), law.at(3)]).toEqual([1, 28]);
    expect(law.text).toBe('(1+x) * (2*x+1)');
  });

  test('the modulus is known when every E row says the same number and no EI row stands beside', () => {
    expect(beam(['E', 0, 2, 7], ['E', 2, 6, 7], ['I', '', '', 1]).modulus).toBe(7);
    expect(beam(['E', 0, 2, 7], ['I', 0, 2, 1], ['EI', 2, 6, 1]).modulus).toBeNull();
    expect(beam(['E', '', '', '7+x'], ['I', '', '', 1]).modulus).toBeNull();
  });

  test.each([
    ['nothing', [], { code: 'section-missing', expected: 'E and I, or EI' }],
    ['no I', [['E', '', '', 1]], { code: 'section-missing', expected: 'I' }],
    ['no E', [['I', '', '', 1]], { code: 'section-missing', expected: 'E' }],
    [
      'I ends early',
      [
        ['E', '', '', 1],
        ['I', 0, 4, 1],
      ],
      { code: 'section-gap', expected: 'I', detail: { from: '4', to: '6' } },
    ],
    [
      'E begins late',
      [
        ['E', 1, 6, 1],
        ['I', '', '', 1],
      ],
      { code: 'section-gap', expected: 'E', detail: { from: '0', to: '1' } },
    ],
    [
      'a gap between EI rows',
      [
        ['EI', 0, 2, 1],
        ['EI', 3, 6, 1],
      ],
      { code: 'section-gap', expected: 'EI', detail: { from: '2', to: '3' } },
    ],
    [
      'a gap in both',
      [
        ['E', 0, 2, 1],
        ['I', 0, 2, 1],
        ['E', 3, 6, 1],
        ['I', 3, 6, 1],
      ],
      { code: 'section-gap', expected: 'E and I', detail: { from: '2', to: '3' } },
    ],
    [
      'I twice',
      [
        ['E', '', '', 1],
        ['I', 0, 4, 1],
        ['I', 3, 6, 1],
      ],
      { code: 'section-overlap', row: 5, found: 'I', detail: { from: '3', to: '4', rows: ['4', '5'] } },
    ],
    [
      'E for the whole beam, twice',
      [
        ['E', '', '', 1],
        ['E', '', '', 2],
        ['I', '', '', 3],
      ],
      { code: 'section-overlap', row: 4, found: 'E', detail: { from: '0', to: '6', rows: ['3', '4'] } },
    ],
    [
      'EI over E x I',
      [
        ['E', '', '', 1],
        ['I', '', '', 1],
        ['EI', 2, 3, 5],
      ],
      { code: 'section-overlap', row: 5, found: 'EI', detail: { from: '2', to: '3', rows: ['3', '4', '5'] } },
    ],
    [
      'GA twice',
      [
        ['EI', '', '', 1],
        ['GA', 0, 4, 1],
        ['GA', 3, 6, 1],
      ],
      { code: 'section-overlap', row: 5, found: 'GA' },
    ],
  ])('%s', (_, rows, issue) => {
    expect(faulty(...rows)).toMatchObject([issue]);
  });

  test('GA may leave stretches rigid in shear', () => {
    expect(beam(['EI', '', '', 1], ['GA', 4, 6, 2, 3], ['GA', 0, 2, 1]).ga).toEqual([
      { from: 0, to: 2, law: line(1, 1), rows: [5] },
      { from: 4, to: 6, law: line(2, 3), rows: [4] },
    ]);
  });

  test('many stretches stay linear in cost', () => {
    const rows = Array.from({ length: 3000 }, (_, i) => ['EI', i * 0.002, (i + 1) * 0.002, 1 + (i % 7)]);
    const model = beam(...rows);
    expect(model.ei).toHaveLength(3000);
    model.ei.forEach((part, i) =>
      expect([part.from, part.to]).toEqual([i === 0 ? 0 : model.ei[i - 1]!.to, part.to]),
    );
  });
});

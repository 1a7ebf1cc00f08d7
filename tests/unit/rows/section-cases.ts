import type { SectionStretch } from '../../../src/beam/model';

const line = (start: number, end: number) => ({ kind: 'linear', start, end }) as const;

/** [what, rows after two pins at 0 and 6, the stretches of EI] */
export const COVERED: [string, unknown[][], SectionStretch[]][] = [
  [
    'E and I for the whole beam',
    [
      ['E', '', '', 2],
      ['I', '', '', 3],
    ],
    [{ from: 0, to: 6, law: line(6, 6), rows: [3, 4] }],
  ],
  ['EI for the whole beam', [['EI', '', '', 5]], [{ from: 0, to: 6, law: line(5, 5), rows: [3] }]],
  ['EI that varies', [['EI', 0, 6, 5, 8]], [{ from: 0, to: 6, law: line(5, 8), rows: [3] }]],
  [
    'stepped I, rows in any order',
    [
      ['I', 4, 6, 3],
      ['E', '', '', 2],
      ['I', 0, 4, 5],
    ],
    [
      { from: 0, to: 4, law: line(10, 10), rows: [4, 5] },
      { from: 4, to: 6, law: line(6, 6), rows: [3, 4] },
    ],
  ],
  [
    'E x I on one part, EI on the other, also where E alone reaches over it',
    [
      ['E', '', '', 2],
      ['I', 0, 2, 3],
      ['EI', 2, 6, 9],
    ],
    [
      { from: 0, to: 2, law: line(6, 6), rows: [3, 4] },
      { from: 2, to: 6, law: line(9, 9), rows: [5] },
    ],
  ],
];

/** Starting points: beam rows for common arrangements, named by trade terms. Their numbers are round and only a start. */
import type { CellInput } from '../port';
import { COLUMNS } from '../rows/guide';

export type UnitChoice = 'metric' | 'american' | 'none';

export const ARRANGEMENTS = [
  'simple',
  'cantilever',
  'propped',
  'fixed',
  'two',
  'three',
  'overhang',
  'hinged',
] as const;
export type Arrangement = (typeof ARRANGEMENTS)[number];

type Line = readonly [
  item: string,
  at?: CellInput,
  to?: CellInput,
  value?: CellInput,
  end?: CellInput,
  unit?: string,
  group?: string,
];

interface System {
  readonly units: Line | null;
  /** a span, a permanent and a variable line load, a point load */
  readonly span: number;
  readonly dead: number;
  readonly live: number;
  readonly point: number;
  readonly line: string;
  readonly force: string;
  readonly stiffness: readonly Line[];
}

const SYSTEMS: Readonly<Record<UnitChoice, System>> = {
  metric: {
    units: ['units', 'kN', 'm', 'mm'],
    span: 6,
    dead: 4,
    live: 6,
    point: 12,
    line: 'kN/m',
    force: 'kN',
    stiffness: [
      ['E', null, null, 210, null, 'GPa'],
      ['I', null, null, 8400, null, 'cm4'],
    ],
  },
  american: {
    units: ['units', 'kip', 'ft', 'in'],
    span: 20,
    dead: 0.4,
    live: 0.6,
    point: 3,
    line: 'klf',
    force: 'kip',
    stiffness: [
      ['E', null, null, 29000, null, 'ksi'],
      ['I', null, null, 300, null, 'in4'],
    ],
  },
  none: {
    units: null,
    span: 6,
    dead: 4,
    live: 6,
    point: 12,
    line: '',
    force: '',
    stiffness: [['EI', null, null, 18000]],
  },
};

/** Supports and releases, in spans. */
const HELD: Readonly<Record<Arrangement, readonly (readonly [item: string, at: number])[]>> = {
  simple: [
    ['pin', 0],
    ['roller', 1],
  ],
  cantilever: [['fixed', 0]],
  propped: [
    ['fixed', 0],
    ['roller', 1],
  ],
  fixed: [
    ['fixed', 0],
    ['fixed', 1],
  ],
  two: [
    ['pin', 0],
    ['roller', 1],
    ['roller', 2],
  ],
  three: [
    ['pin', 0],
    ['roller', 1],
    ['roller', 2],
    ['roller', 3],
  ],
  overhang: [
    ['pin', 0],
    ['roller', 1],
  ],
  hinged: [
    ['pin', 0],
    ['roller', 1],
    ['hinge', 1.25],
    ['roller', 2],
  ],
};

const ENDS: Readonly<Record<Arrangement, number>> = {
  simple: 1,
  cantilever: 0.5,
  propped: 1,
  fixed: 1,
  two: 2,
  three: 3,
  overhang: 1.25,
  hinged: 2,
};

/** Heading and rows, eight columns wide. */
export function arrangementRows(kind: Arrangement, choice: UnitChoice): CellInput[][] {
  const system = SYSTEMS[choice];
  const end = ENDS[kind] * system.span;
  const lines: Line[] = [];
  if (system.units) lines.push(system.units);
  for (const [item, at] of HELD[kind]) lines.push([item, at * system.span]);
  lines.push(...system.stiffness);
  lines.push(['uniform', 0, end, system.dead, null, system.line, 'G']);
  lines.push(['uniform', 0, end, system.live, null, system.line, 'Q']);
  if (kind === 'cantilever' || kind === 'overhang')
    lines.push(['point', end, null, system.point, null, system.force, 'Q']);
  lines.push(['limit', null, null, kind === 'cantilever' ? 'span/180' : 'span/250']);
  return [
    [...COLUMNS],
    ...lines.map((line) => COLUMNS.map((_, i): CellInput => (line[i] === '' ? null : (line[i] ?? null)))),
  ];
}

/** Sixty floor joists from one template: the template's rows hold names, each joist brings its own values in its row of the schedule. */
import { absolute, titleBlock, WIDTHS } from './member';
import { Paper, type Put } from './paper';
import { cellName } from '../xlsx/address';

export const TEMPLATE_NAME = 'JoistRows';
export const JOISTS = 60;
/** Names in the header of the schedule; the template's rows use them. */
export const NAMES = ['L', 's', 'g', 'q', 'Ej', 'Ij', 'P', 'a'] as const;

const HEADER = ['Item', 'At', 'To', 'Value', 'End value', 'Unit', 'Case', 'Note'];
const TEMPLATE_ROWS: readonly (readonly Put[])[] = [
  ['units', 'kN', 'm', 'mm'],
  ['pin', 0, null, null, null, null, null, 'hanger'],
  ['pin', 'L', null, null, null, null, null, 'wall plate'],
  ['E', null, null, 'Ej', null, 'GPa', null, 'mean value'],
  ['I', null, null, 'Ij', null, 'cm4'],
  ['uniform', 0, 'L', 'g*s', null, 'kN/m', 'G', 'floor load times spacing'],
  ['uniform', 0, 'L', 'q*s', null, 'kN/m', 'Q', 'people and stalls times spacing'],
  ['point', 'a', null, 'P', null, 'kN', 'G', 'partition, 0 where there is none'],
  ['limit', null, null, 'span/360', null, null, 'Q', 'live load'],
  ['limit', null, null, 'span/250', null, null, 'G + Q', 'total'],
];
const TEMPLATE_SHEET = 'Joist template';
const FIRST_ROW = 5; // of the template's header

export const templateReference = `'${TEMPLATE_SHEET}'!${absolute(FIRST_ROW, 1, FIRST_ROW + TEMPLATE_ROWS.length, 8)}`;

export function templateSheet(): Paper {
  const paper = new Paper('joist-template', TEMPLATE_SHEET, WIDTHS);
  titleBlock(
    paper,
    'Template of the floor joists',
    'J-00',
    'One set of rows for every joist of the schedule. The names get their values there.',
  );
  paper.line(4, 1, ['Beam rows', ...Array<Put>(7).fill(null)], 'section');
  paper.line(FIRST_ROW, 1, HEADER, 'columns');
  TEMPLATE_ROWS.forEach((cells, index) => {
    HEADER.forEach((_, column) => {
      const value = cells[column] ?? null;
      paper.put(
        FIRST_ROW + 1 + index,
        1 + column,
        value,
        column >= 1 && column <= 5 && value !== null ? 'input' : column === 7 ? 'note' : 'plain',
      );
    });
  });
  const after = FIRST_ROW + TEMPLATE_ROWS.length + 2;
  paper.line(after, 1, ['Names', ...Array<Put>(7).fill(null)], 'section');
  const words: readonly (readonly [string, string])[] = [
    ['L', 'span, m'],
    ['s', 'spacing, m'],
    ['g', 'permanent load, kN/m²'],
    ['q', 'live load, kN/m²'],
    ['Ej', 'modulus, GPa'],
    ['Ij', 'second moment of area, cm4'],
    ['P, a', 'partition on the joist, kN, and where, m'],
  ];
  words.forEach(([name, meaning], index) => paper.line(after + 1 + index, 1, [name, meaning], 'soft'));
  return paper;
}

interface Section {
  readonly words: string;
  readonly inertia: number;
  readonly upTo: number;
}
/** Sawn timber b x h, I = b h³/12, chosen by span. */
const SECTIONS: readonly Section[] = [
  { words: '47 x 195', inertia: 2904, upTo: 3.4 },
  { words: '47 x 220', inertia: 4170, upTo: 3.9 },
  { words: '63 x 220', inertia: 5590, upTo: 4.3 },
  { words: '75 x 220', inertia: 6655, upTo: 4.7 },
  { words: '75 x 245', inertia: 9191, upTo: 5.1 },
  { words: '75 x 300', inertia: 16875, upTo: 9 },
];
const HALLS: readonly (readonly [hall: string, live: number])[] = [
  ['Flowers', 2],
  ['Bread', 2.5],
  ['Fruit', 2.5],
  ['Cheese', 2.5],
  ['Fish', 3],
];

export interface Joist {
  readonly mark: string;
  readonly hall: string;
  readonly section: string;
  /** in the order of NAMES */
  readonly values: readonly number[];
}

/** The joists are spread over the halls by plain arithmetic, so that the script always builds the same schedule. */
export function joists(): Joist[] {
  return Array.from({ length: JOISTS }, (_, index) => {
    const [hall, live] = HALLS[Math.floor(index / 12)] ?? HALLS[0]!;
    const span = Math.round((3 + ((index * 7) % 25) * 0.1) * 10) / 10;
    const section = SECTIONS.find(({ upTo }) => span <= upTo) ?? SECTIONS[SECTIONS.length - 1]!;
    const partition = index % 6 === 0 ? 1.2 : 0;
    return {
      mark: `J${String(index + 1).padStart(2, '0')}`,
      hall,
      section: section.words,
      values: [
        span,
        index % 5 === 2 ? 0.45 : 0.4,
        index % 3 === 0 ? 1.1 : 0.9,
        live,
        11,
        section.inertia,
        partition,
        Math.round(span * 4) / 10,
      ],
    };
  });
}

export const SCHEDULE_SHEET = 'Joist schedule';
export const SCHEDULE_HEADER_ROW = 6;
const MARK = 1;
export const NAMES_COLUMN = 4;
export const RESULTS_COLUMN = NAMES_COLUMN + NAMES.length;

export function scheduleSheet(): Paper {
  const paper = new Paper(
    'joist-schedule',
    SCHEDULE_SHEET,
    [18, 50, 70, 78, 46, 46, 52, 52, 44, 62, 44, 44, 64, 56, 52, 78, 78],
    { rows: SCHEDULE_HEADER_ROW + 1, columns: 0 },
  );
  titleBlock(
    paper,
    'Schedule of floor joists',
    'J-01',
    'One formula a column, filled down. The beam is the template with the values of the row.',
  );
  const header = SCHEDULE_HEADER_ROW;
  const first = header + 1;
  const last = header + JOISTS;
  paper.line(
    header - 1,
    MARK,
    ['', '', '', 'm', 'm', 'kN/m²', 'kN/m²', 'GPa', 'cm4', 'kN', 'm', 'mm', 'mm', '', 'kN', ''],
    'soft',
  );
  paper.line(
    header,
    MARK,
    ['Mark', 'Hall', 'Size', ...NAMES, 'Sag, G + Q', 'Sag, Q', 'Used', 'Reaction', 'Result'],
    'head',
  );
  paper.height(header, 40);
  const names = absolute(header, NAMES_COLUMN, header, NAMES_COLUMN + NAMES.length - 1);
  joists().forEach((joist, index) => {
    const row = first + index;
    const from = cellName(row, NAMES_COLUMN);
    const to = cellName(row, NAMES_COLUMN + NAMES.length - 1);
    const values = `${from.replace(/^/, '$')}:${to.replace(/^/, '$')}`;
    const tail = `${names},${values})`;
    const used = cellName(row, RESULTS_COLUMN + 2);
    paper.line(row, MARK, [joist.mark, joist.hall, joist.section], 'plain');
    paper.line(row, NAMES_COLUMN, joist.values, 'input');
    paper.put(
      row,
      RESULTS_COLUMN,
      `=SPANROW.MAXDEFLECTION(${TEMPLATE_NAME},"G + Q",${tail}`,
      'result',
      '0.0',
    );
    paper.put(
      row,
      RESULTS_COLUMN + 1,
      `=SPANROW.MAXDEFLECTION(${TEMPLATE_NAME},"Q",${tail}`,
      'result',
      '0.0',
    );
    paper.put(row, RESULTS_COLUMN + 2, `=SPANROW.USED(${TEMPLATE_NAME},,,${tail}`, 'result', '0%');
    paper.put(
      row,
      RESULTS_COLUMN + 3,
      `=SPANROW.REACTION(${TEMPLATE_NAME},0,"force","G + Q",${tail}`,
      'result',
      '0.00',
    );
    paper.put(row, RESULTS_COLUMN + 4, `=IF(${used}<=1,"within","exceeded")`, 'plain');
  });
  const used = absolute(first, RESULTS_COLUMN + 2, last, RESULTS_COLUMN + 2);
  paper.put(header - 2, MARK, 'Worst used', 'soft');
  paper.put(header - 2, NAMES_COLUMN - 1, `=MAX(${used})`, 'result', '0%');
  paper.put(header - 2, NAMES_COLUMN + 1, 'Over their limit', 'soft');
  paper.put(header - 2, NAMES_COLUMN + 4, `=COUNTIF(${used},">1")`, 'result', '0');
  return paper;
}

/** One member on one calculation sheet: title block, beam rows, results with their units, the check, notes. */
import { cellName, rangeName } from '../xlsx/address';
import { Paper, type Put } from './paper';

/** A row of the beam table in the order Item, At, To, Value, End value, Unit, Case, Note; trailing cells may be left out. */
export type BeamRow = readonly Put[];

export interface ResultLine {
  readonly label: string;
  /** formula text; `{beam}` stands for the range of the beam rows, `{names}` and `{values}` for the ranges of given names */
  readonly formula: string;
  readonly unit: string;
  readonly pattern: string;
  readonly note?: string;
}

export interface Member {
  readonly id: string;
  readonly sheet: string;
  readonly title: string;
  readonly mark: string;
  readonly about: string;
  /** names used by expressions in the rows, with their values and what they are */
  readonly given?: readonly (readonly [name: string, value: number, unit: string, words: string])[];
  readonly rows: readonly BeamRow[];
  readonly results: readonly ResultLine[];
  /** formulas that spill, each under its own heading, one below the other with room for the lines they fill */
  readonly tables: readonly {
    readonly heading: string;
    readonly formula: string;
    readonly lines: number;
    readonly pattern?: string;
    readonly head?: boolean;
  }[];
  readonly notes: readonly string[];
}

const HEADER = ['Item', 'At', 'To', 'Value', 'End value', 'Unit', 'Case', 'Note'];
const FIRST = 1; // column B: a narrow margin stands before it
export const WIDTHS = [18, 162, 96, 86, 90, 92, 92, 84, 208];
const NOTE_COLUMN = FIRST + 7;

export function titleBlock(paper: Paper, title: string, mark: string, about: string): void {
  paper.put(0, FIRST, title, 'title');
  paper.height(0, 30);
  paper.put(
    1,
    FIRST,
    `Covered market, member calculations   ·   sheet ${mark}   ·   revision A   ·   prepared            ·   checked            `,
    'soft',
  );
  paper.put(2, FIRST, about, 'note');
  paper.height(2, 28);
}

export function memberSheet(member: Member): Paper {
  const paper = new Paper(member.id, member.sheet, WIDTHS, { rows: 3, columns: 0 });
  titleBlock(paper, member.title, member.mark, member.about);
  let row = 4;
  let names = '';
  let values = '';

  if (member.given !== undefined) {
    section(paper, row, 'Given');
    row += 1;
    const first = row;
    for (const [name, value, unit, words] of member.given) {
      paper.put(row, FIRST, name, 'plain');
      paper.put(row, FIRST + 1, value, 'input');
      paper.put(row, FIRST + 2, unit, 'soft');
      paper.put(row, FIRST + 3, words, 'soft');
      row += 1;
    }
    names = absolute(first, FIRST, row - 1, FIRST);
    values = absolute(first, FIRST + 1, row - 1, FIRST + 1);
    row += 1;
  }

  section(paper, row, 'Beam rows');
  paper.line(row + 1, FIRST, HEADER, 'columns');
  const firstRow = row + 1;
  row += 2;
  for (const cells of member.rows) {
    for (let column = 0; column < HEADER.length; column++) {
      const value = cells[column] ?? null;
      const isInput = column >= 1 && column <= 5 && value !== null;
      paper.put(row, FIRST + column, value, isInput ? 'input' : column === 7 ? 'note' : 'plain');
    }
    row += 1;
  }
  const beam = absolute(firstRow, FIRST, row - 1, NOTE_COLUMN);
  const place = (formula: string) =>
    formula
      .replace(/\{beam\}/g, beam)
      .replace(/\{names\}/g, names)
      .replace(/\{values\}/g, values);

  row += 1;
  section(paper, row, 'Results');
  row += 1;
  for (const { label, formula, unit, pattern, note } of member.results) {
    paper.put(row, FIRST, label, 'plain');
    paper.put(row, FIRST + 3, place(formula), 'result', pattern);
    paper.put(row, FIRST + 4, unit, 'soft');
    if (note !== undefined) paper.put(row, FIRST + 5, note, 'note');
    row += 1;
  }
  for (const { heading, formula, lines, pattern, head = true } of member.tables) {
    row += 1;
    section(paper, row, heading);
    row += 1;
    if (head) {
      paper.line(row, FIRST, Array<Put>(HEADER.length).fill(null), 'head');
      paper.height(row, 76);
    }
    paper.put(row, FIRST, place(formula), head ? 'head' : 'plain');
    // number formats for the cells that the formula will spill into
    for (let line = 1; line < lines; line++)
      for (let column = 0; column < HEADER.length; column++)
        paper.put(row + line, FIRST + column, null, 'plain', pattern);
    row += lines;
  }
  row += 1;
  section(paper, row, 'Notes');
  for (const note of member.notes) {
    row += 1;
    paper.put(row, FIRST, note, 'soft');
  }
  return paper;
}

function section(paper: Paper, row: number, words: string): void {
  paper.line(row, FIRST, [words, ...Array<Put>(HEADER.length - 1).fill(null)], 'section');
}

export function absolute(startRow: number, startColumn: number, endRow: number, endColumn: number): string {
  const dollars = (address: string) => address.replace(/([A-Z]+)(\d+)/g, '$$$1$$$2');
  return startRow === endRow && startColumn === endColumn
    ? dollars(cellName(startRow, startColumn))
    : dollars(rangeName({ startRow, startColumn, endRow, endColumn }));
}

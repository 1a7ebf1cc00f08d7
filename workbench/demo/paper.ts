/** A calculation sheet as data: cells put in place one by one, with the few formats that a calculation needs. */
import type { ICellData, IStyleData, IWorksheetData } from '@univerjs/core';

export type Put = number | string | null;

const INK = { rgb: '#23292b' };
const SOFT = { rgb: '#5d686b' };
const LINE = { s: 1, cl: { rgb: '#b9beb8' } };
const HEAVY = { s: 8, cl: { rgb: '#2c6665' } };

/** What a cell is for decides what it looks like. Input cells are straw-coloured; nothing else is. */
export const FORMATS = {
  title: { fs: 16, bl: 1, cl: INK },
  plain: { cl: INK },
  soft: { cl: SOFT },
  note: { cl: SOFT, it: 1 },
  section: { bl: 1, fs: 12, cl: { rgb: '#215251' }, bd: { b: HEAVY } },
  head: { bl: 1, fs: 10, cl: INK, bg: { rgb: '#e4ebe9' }, bd: { b: LINE }, tb: 3, vt: 2 },
  columns: { bl: 1, cl: INK, bg: { rgb: '#e4ebe9' }, bd: { b: LINE } },
  input: { cl: INK, bg: { rgb: '#fbf4dc' }, bd: { t: LINE, b: LINE, l: LINE, r: LINE } },
  result: { bl: 1, cl: INK, bg: { rgb: '#eaf2ef' }, bd: { t: LINE, b: LINE, l: LINE, r: LINE } },
  wrapped: { cl: INK, tb: 3, vt: 1 },
} satisfies Record<string, IStyleData>;
export type Format = keyof typeof FORMATS;

export class Paper {
  readonly cellData: Record<number, Record<number, ICellData>> = {};
  private readonly merges: IWorksheetData['mergeData'] = [];
  private readonly heights: Record<number, { h: number }> = {};
  private lastRow = 0;
  private lastColumn = 0;

  constructor(
    readonly id: string,
    readonly name: string,
    private readonly widths: readonly number[],
    private readonly freeze: { rows: number; columns: number } | null = null,
  ) {}

  /** Puts a value, or a formula when the text starts with "=", at a zero-based place. */
  put(row: number, column: number, value: Put, format: Format = 'plain', pattern?: string): void {
    const style: IStyleData = { ...FORMATS[format], ...(pattern === undefined ? {} : { n: { pattern } }) };
    const cell: ICellData = { s: style };
    if (typeof value === 'number') Object.assign(cell, { v: value, t: 2 });
    else if (value !== null && value.startsWith('=')) cell.f = value;
    else if (value !== null) Object.assign(cell, { v: value, t: 1 });
    (this.cellData[row] ??= {})[column] = cell;
    this.lastRow = Math.max(this.lastRow, row);
    this.lastColumn = Math.max(this.lastColumn, column);
  }

  /** Puts a row of values from a column on. */
  line(
    row: number,
    column: number,
    values: readonly Put[],
    format: Format = 'plain',
    pattern?: string,
  ): void {
    values.forEach((value, index) => this.put(row, column + index, value, format, pattern));
  }

  /** A wide cell of running text over several columns. */
  text(row: number, column: number, columns: number, text: string, height = 24): void {
    this.put(row, column, text, 'wrapped');
    this.merges.push({ startRow: row, endRow: row, startColumn: column, endColumn: column + columns - 1 });
    this.heights[row] = { h: height };
  }

  height(row: number, pixels: number): void {
    this.heights[row] = { h: pixels };
  }

  data(): Partial<IWorksheetData> {
    return {
      id: this.id,
      name: this.name,
      cellData: this.cellData,
      mergeData: this.merges,
      rowData: this.heights,
      columnData: Object.fromEntries(this.widths.map((w, index) => [index, { w }])),
      rowCount: this.lastRow + 60,
      columnCount: Math.max(this.lastColumn + 6, 20),
      defaultRowHeight: 22,
      showGridlines: 0,
      ...(this.freeze === null
        ? {}
        : {
            freeze: {
              xSplit: this.freeze.columns,
              ySplit: this.freeze.rows,
              startColumn: this.freeze.columns > 0 ? this.freeze.columns : -1,
              startRow: this.freeze.rows > 0 ? this.freeze.rows : -1,
            },
          }),
    };
  }
}

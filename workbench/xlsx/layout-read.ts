/** Sizes, hidden rows and columns, frozen panes and format indices of a worksheet part, which the cell reader leaves out. */
import type { IColumnData, IFreeze, IRowData } from '@univerjs/core';
import { parseRange } from './address';
import { decode, tags } from './xml';

export interface SheetLayout {
  /** format index by "row,column" zero-based */
  readonly formats: ReadonlyMap<number, ReadonlyMap<number, number>>;
  readonly rows: Record<number, IRowData>;
  readonly columns: Record<number, IColumnData>;
  readonly freeze: IFreeze | null;
  readonly gridLines: boolean;
}

const PIXELS_PER_CHARACTER = 7;
const PIXELS_PER_POINT = 4 / 3;
const COLUMNS_OF_A_SHEET = 16_384;

export function readLayout(part: Uint8Array | undefined): SheetLayout {
  const formats = new Map<number, Map<number, number>>();
  const rows: Record<number, IRowData> = {};
  const columns: Record<number, IColumnData> = {};
  let freeze: IFreeze | null = null;
  let gridLines = true;
  for (const { name, attributes, closing } of tags(decode(part))) {
    if (closing) continue;
    switch (name) {
      case 'c': {
        const cell = parseRange(attributes.r ?? '');
        const format = Number(attributes.s ?? 0);
        if (cell === null || !(format > 0)) break;
        const row = formats.get(cell.startRow) ?? new Map<number, number>();
        row.set(cell.startColumn, format);
        formats.set(cell.startRow, row);
        break;
      }
      case 'row': {
        const index = Number(attributes.r) - 1;
        const height = Number(attributes.ht);
        const own: IRowData = {};
        if (attributes.customHeight === '1' && height > 0 && height < 1000)
          own.h = Math.round(height * PIXELS_PER_POINT);
        if (attributes.hidden === '1') own.hd = 1;
        if (index >= 0 && Object.keys(own).length > 0) rows[index] = own;
        break;
      }
      case 'col': {
        const first = Math.max(1, Number(attributes.min));
        const last = Math.min(COLUMNS_OF_A_SHEET, Number(attributes.max));
        const width = Number(attributes.width);
        const own: IColumnData = {};
        if (width > 0 && width <= 255) own.w = Math.round(width * PIXELS_PER_CHARACTER);
        if (attributes.hidden === '1') own.hd = 1;
        for (let column = first; column <= last; column++) columns[column - 1] = own;
        break;
      }
      case 'sheetView':
        gridLines = attributes.showGridLines !== '0';
        break;
      case 'pane': {
        if (attributes.state !== 'frozen') break;
        const xSplit = Math.max(0, Number(attributes.xSplit ?? 0)) || 0;
        const ySplit = Math.max(0, Number(attributes.ySplit ?? 0)) || 0;
        if (xSplit > 100 || ySplit > 100) break;
        freeze = {
          xSplit,
          ySplit,
          startColumn: xSplit > 0 ? xSplit : -1,
          startRow: ySplit > 0 ? ySplit : -1,
        };
        break;
      }
    }
  }
  return { formats, rows, columns, freeze, gridLines };
}

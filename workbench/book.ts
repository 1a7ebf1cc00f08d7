/**
 * The open workbook of the embedded spreadsheet: the one place that knows where its engine keeps values, formulas, spilled
 * cells and names. Used by the page, by the pane's port and by the headless recalculation alike.
 */
import type { ICellData, IWorkbookData, Nullable, Univer, Workbook, Worksheet } from '@univerjs/core';
import type { FUniver } from '@univerjs/core/facade';
import { FormulaDataModel, IDefinedNamesService } from '@univerjs/engine-formula';
import type { FWorkbook } from '@univerjs/sheets/facade';
import '@univerjs/engine-formula/facade';
import '@univerjs/sheets/facade';
import '@univerjs/sheets-formula/facade';
import type { FunctionHost } from './host';

/** A plain value of a cell: what a person sees before number formatting. */
export type Plain = number | string | boolean | null;

/** A rectangle, zero-based, last row and column included. */
export interface Rectangle {
  readonly startRow: number;
  readonly startColumn: number;
  readonly endRow: number;
  readonly endColumn: number;
}

export interface BookCell {
  readonly row: number;
  readonly column: number;
  readonly value: Plain;
  /** with its "=", or null */
  readonly formula: string | null;
  /** the cells this formula spilled into, itself included */
  readonly spill: Rectangle | null;
}

/** A name that formulas may use: of one sheet, or of the whole workbook (sheet null). */
export interface BookName {
  readonly name: string;
  /** a reference or a formula, without "=" */
  readonly refersTo: string;
  readonly sheet: string | null;
}

/** A value without a formula of its own. */
export interface SpilledCell {
  readonly row: number;
  readonly column: number;
  readonly value: Plain;
}

/** Everything a file is written from: plain data, no engine. */
export interface BookContents {
  readonly snapshot: IWorkbookData;
  readonly sheets: readonly {
    readonly id: string;
    readonly name: string;
    readonly cells: readonly BookCell[];
    /** cells that hold what another cell's formula spilled there */
    readonly spilled: readonly SpilledCell[];
  }[];
  readonly names: readonly BookName[];
}

/** How long a calculation may take before waiting for it is given up. */
const PATIENCE = 120_000;

// Values of CellValueType of the engine's core; written out so that this file needs only types from it.
const BLOCKED = '#SPILL!';
const STRING = 1;
const BOOLEAN = 3;
const FORCED_STRING = 4;

/** The plain value of a stored cell. Booleans are kept as 1 and 0 by the engine. */
export function plainOf(cell: Nullable<ICellData>): Plain {
  const value = cell?.v;
  if (value === undefined || value === null) return null;
  const type = Number(cell?.t);
  if (type === BOOLEAN) return value === 1 || value === true || value === 'TRUE' || value === '1';
  if ((type === STRING || type === FORCED_STRING) && typeof value !== 'string') return String(value);
  return value;
}

export class Book {
  constructor(
    readonly univer: Univer,
    readonly api: FUniver,
    readonly host: FunctionHost,
  ) {
    // Only used to know which messages belong to the newest calculation.
    api.getFormula().calculationStart(() => host.beginRun());
  }

  get workbook(): FWorkbook {
    const active = this.api.getActiveWorkbook();
    if (active === null) throw new Error('no workbook is open');
    return active;
  }

  get model(): Workbook {
    return this.workbook.getWorkbook();
  }

  get id(): string {
    return this.model.getUnitId();
  }

  private get formulas(): FormulaDataModel {
    return this.univer.__getInjector().get(FormulaDataModel);
  }

  get names(): IDefinedNamesService {
    return this.univer.__getInjector().get(IDefinedNamesService);
  }

  /**
   * Opens a snapshot in place of the open workbook and waits for its first calculation. The old one goes first: parts of the grid
   * are registered once per workbook under one name. A snapshot that the engine refuses leaves the old workbook open.
   */
  async open(snapshot: Partial<IWorkbookData>): Promise<void> {
    const before = this.api.getActiveWorkbook();
    const kept = before?.save();
    if (before) this.api.disposeUnit(before.getId());
    try {
      this.api.createWorkbook(snapshot);
    } catch (error) {
      if (kept) this.api.createWorkbook(kept);
      throw error;
    }
    await this.settle();
  }

  /** Waits until the calculation that the last change started has reached the cells. */
  async settle(timeout = PATIENCE): Promise<void> {
    await this.api.getFormula().onCalculationResultApplied(timeout);
  }

  /** Computes every formula again, as the host does after rows were inserted or a blank-cell habit was changed. */
  async recalculate(timeout = PATIENCE): Promise<void> {
    this.api.getFormula().executeCalculation();
    await this.settle(timeout);
  }

  sheets(): Worksheet[] {
    return this.model.getSheets();
  }

  sheet(name: string): Worksheet | null {
    const wanted = name.toLowerCase();
    return this.sheets().find((one) => one.getName().toLowerCase() === wanted) ?? null;
  }

  /** The formula of a cell with its "=", also where filled-down cells share one stored text; null when it has none. */
  formulaAt(sheet: Worksheet, row: number, column: number): string | null {
    const cell = sheet.getCellMatrix().getValue(row, column);
    if (cell === undefined || cell === null) return null;
    if (typeof cell.f === 'string' && cell.f !== '') return cell.f;
    if (typeof cell.si !== 'string' || cell.si === '') return null;
    return this.formulas.getFormulaStringByCell(row, column, sheet.getSheetId(), this.id) ?? null;
  }

  /** The value in a cell, spilled values included. */
  valueAt(sheet: Worksheet, row: number, column: number): Plain {
    const own = plainOf(sheet.getCellMatrix().getValue(row, column));
    return own ?? plainOf(this.spilledCells(sheet)?.[row]?.[column]);
  }

  private spilledCells(sheet: Worksheet) {
    return this.formulas.getArrayFormulaCellData()[this.id]?.[sheet.getSheetId()];
  }

  /** The cells that the formula at row, column spilled into; null when it gives one value or was blocked. */
  spillOf(sheet: Worksheet, row: number, column: number): Rectangle | null {
    const range = this.formulas.getArrayFormulaRange()[this.id]?.[sheet.getSheetId()]?.[row]?.[column];
    // the engine keeps the range it would have needed; where it was blocked nothing has spilled
    if (!range || sheet.getCellMatrix().getValue(row, column)?.v === BLOCKED) return null;
    const { startRow, startColumn, endRow, endColumn } = range;
    return { startRow, startColumn, endRow, endColumn };
  }

  /** Every cell that holds a value or a formula of its own, row by row (spilled-into cells are not among them). */
  *cells(sheet: Worksheet): Generator<BookCell> {
    const matrix = sheet.getCellMatrix().getMatrix();
    const byRow = Object.keys(matrix)
      .map(Number)
      .sort((a, b) => a - b);
    for (const row of byRow) {
      const columns = Object.keys(matrix[row] ?? {})
        .map(Number)
        .sort((a, b) => a - b);
      for (const column of columns) {
        const value = plainOf(matrix[row]?.[column]);
        const formula = this.formulaAt(sheet, row, column);
        if (value === null && formula === null) continue;
        yield {
          row,
          column,
          value,
          formula,
          spill: formula === null ? null : this.spillOf(sheet, row, column),
        };
      }
    }
  }

  /** The used part of a sheet, spilled cells included; null when it is empty. */
  used(sheet: Worksheet): Rectangle | null {
    let [startRow, startColumn, endRow, endColumn] = [Infinity, Infinity, -1, -1];
    const include = (range: Rectangle) => {
      startRow = Math.min(startRow, range.startRow);
      startColumn = Math.min(startColumn, range.startColumn);
      endRow = Math.max(endRow, range.endRow);
      endColumn = Math.max(endColumn, range.endColumn);
    };
    const matrix = sheet.getCellMatrix().getMatrix();
    for (const key of Object.keys(matrix)) {
      const row = Number(key);
      const cells = matrix[row] ?? {};
      for (const columnKey of Object.keys(cells)) {
        const column = Number(columnKey);
        const cell = cells[column];
        if ((cell?.v ?? null) === null && !cell?.f && !cell?.si) continue;
        include({ startRow: row, startColumn: column, endRow: row, endColumn: column });
      }
    }
    const spills = this.formulas.getArrayFormulaRange()[this.id]?.[sheet.getSheetId()] ?? {};
    for (const [row, columns] of Object.entries(spills))
      for (const column of Object.keys((columns ?? {}) as object)) {
        const range = this.spillOf(sheet, Number(row), Number(column));
        if (range !== null) include(range);
      }
    return endRow < 0 ? null : { startRow, startColumn, endRow, endColumn };
  }

  /** The sentence behind an error shown in a cell that calls one of our functions; null when there is none. */
  messageAt(sheet: Worksheet, row: number, column: number): string | null {
    const value = this.valueAt(sheet, row, column);
    if (typeof value !== 'string' || !value.startsWith('#')) return null;
    return this.host.messageAt({ unitId: this.id, sheetId: sheet.getSheetId(), row, column });
  }

  namesList(): BookName[] {
    return Object.values(this.names.getDefinedNameMap(this.id) ?? {}).map((one) => ({
      name: one.name,
      refersTo: one.formulaOrRefString.replace(/^=/, ''),
      sheet:
        this.sheets()
          .find((sheet) => sheet.getSheetId() === one.localSheetId)
          ?.getName() ?? null,
    }));
  }

  /** What the workbook holds now, for writing a file. */
  contents(): BookContents {
    return {
      snapshot: this.workbook.save(),
      sheets: this.sheets().map((sheet) => {
        const cells = [...this.cells(sheet)];
        const spilled: SpilledCell[] = [];
        for (const { row: ownRow, column: ownColumn, spill } of cells) {
          if (spill === null) continue;
          for (let row = spill.startRow; row <= spill.endRow; row++)
            for (let column = spill.startColumn; column <= spill.endColumn; column++)
              if (row !== ownRow || column !== ownColumn)
                spilled.push({ row, column, value: this.valueAt(sheet, row, column) });
        }
        return { id: sheet.getSheetId(), name: sheet.getName(), cells, spilled };
      }),
      names: this.namesList(),
    };
  }
}

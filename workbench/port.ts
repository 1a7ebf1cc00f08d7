/** The workbench's adapter of the pane's port: the one file between the pane and the embedded spreadsheet. */
import { ICommandService, IUndoRedoService, type ICellData, type Worksheet } from '@univerjs/core';
import { InsertRangeMoveDownCommand } from '@univerjs/sheets';
import { addressFrom, cellOf, contains, intersect, parseArea, shortAddress } from '../taskpane/address';
import type {
  Ability,
  Area,
  Block,
  CellInput,
  NameMeaning,
  Selection,
  Theme,
  WorkbookPort,
  WriteOptions,
  WriteResult,
  Writing,
} from '../taskpane/port';
import type { Book, Rectangle } from './book';
import type { SelectedCells, Signals } from './signals';
import type { ThemeSwitch } from './theme';

const ABILITIES = new Set<Ability>(['insert', 'addSheet', 'undoGroup', 'select']);
/** The engine's mark of a name that every sheet sees. */
const WHOLE_BOOK = 'AllDefaultWorkbook';

function areaOf(sheet: string, range: Rectangle): Area {
  return {
    sheet,
    row: range.startRow,
    column: range.startColumn,
    rows: range.endRow - range.startRow + 1,
    columns: range.endColumn - range.startColumn + 1,
  };
}

/** A cell as the engine stores it. Text keeps its type, so that "1/2" stays text. */
function stored(input: CellInput): ICellData {
  const nothing: ICellData = { f: null, si: null, p: null, v: null, t: null };
  if (input === null) return nothing;
  if (typeof input === 'object') return { ...nothing, f: input.formula };
  if (typeof input === 'number') return { ...nothing, v: input, t: 2 };
  if (typeof input === 'boolean') return { ...nothing, v: input ? 1 : 0, t: 3 };
  // A forced string is never read as a number; ordinary text needs no force.
  return { ...nothing, v: input, t: input.trim() !== '' && !Number.isNaN(Number(input)) ? 4 : 1 };
}

/** Work as a promise: what it throws becomes a rejection, as the port promises. */
function later<T>(work: () => T): Promise<T> {
  return new Promise((resolve) => resolve(work()));
}

export function createPort(book: Book, signals: Signals, theme: ThemeSwitch): WorkbookPort {
  const injector = book.univer.__getInjector();

  function sheetOf(area: Area): Worksheet {
    const sheet = book.sheet(area.sheet);
    if (sheet === null) throw new Error(`There is no sheet "${area.sheet}".`);
    return sheet;
  }

  function toSelection({ sheet, range, active }: SelectedCells): Selection {
    return { area: areaOf(sheet, range), active: { sheet, ...active, rows: 1, columns: 1 } };
  }

  function usedArea(name: string): Area | null {
    const sheet = book.sheet(name);
    const range = sheet === null ? null : book.used(sheet);
    return sheet === null || range === null ? null : areaOf(sheet.getName(), range);
  }

  function readBlock(area: Area): Block | null {
    const sheet = book.sheet(area.sheet);
    const used = usedArea(area.sheet);
    if (sheet === null || used === null) return null;
    const common = intersect({ ...area, sheet: used.sheet }, used);
    if (common === null) return null;
    const values: unknown[][] = [];
    const formulas: string[][] = [];
    for (let row = common.row; row < common.row + common.rows; row++) {
      const valueRow: unknown[] = [];
      const formulaRow: string[] = [];
      for (let column = common.column; column < common.column + common.columns; column++) {
        valueRow.push(book.valueAt(sheet, row, column));
        formulaRow.push(book.formulaAt(sheet, row, column) ?? '');
      }
      values.push(valueRow);
      formulas.push(formulaRow);
    }
    return { area: common, values, formulas };
  }

  function filledCells(area: Area): Area[] {
    const block = readBlock(area);
    if (block === null) return [];
    const filled: Area[] = [];
    block.values.forEach((row, r) =>
      row.forEach((value, c) => {
        if ((value !== null && value !== '') || block.formulas[r]?.[c] !== '')
          filled.push(cellOf(block.area, r, c));
      }),
    );
    return filled;
  }

  function activeSheet(): string {
    return book.model.getActiveSheet()?.getName() ?? '';
  }

  /** Filled cells that a write would replace although they are neither the caller's own nor confirmed. */
  function inTheWay(writings: readonly Writing[], own: readonly Area[]): string[] {
    const found: string[] = [];
    for (const { area, cells } of writings)
      for (const cell of filledCells(area)) {
        if (cells[cell.row - area.row]?.[cell.column - area.column] === undefined) continue;
        if (own.some((one) => contains(one, cell))) continue;
        found.push(addressFrom(cell, activeSheet()));
      }
    return found;
  }

  async function write(writings: readonly Writing[], options: WriteOptions = {}): Promise<WriteResult> {
    if (options.confirmed !== true) {
      const occupied = inTheWay(writings, options.own ?? []);
      if (occupied.length > 0) return { written: false, occupied };
    }
    const batch = injector.get(IUndoRedoService).__tempBatchingUndoRedo(book.id);
    try {
      for (const { area, cells } of writings) {
        const sheet = sheetOf(area);
        growTo(sheet, area);
        const matrix: Record<number, Record<number, ICellData>> = {};
        cells.forEach((row, r) =>
          row.forEach((input, c) => {
            if (input !== undefined) (matrix[area.row + r] ??= {})[area.column + c] = stored(input);
          }),
        );
        rangeOf(area).setValues(matrix);
      }
    } finally {
      batch.dispose();
    }
    await book.settle();
    return { written: true };
  }

  /** Sheets are as large as they were made; writing below the last row makes more. */
  function growTo(sheet: Worksheet, area: Area): void {
    const facade = book.workbook.getSheetBySheetId(sheet.getSheetId());
    const rows = area.row + area.rows;
    const columns = area.column + area.columns;
    if (rows > sheet.getRowCount())
      facade?.insertRowsAfter(sheet.getRowCount() - 1, rows - sheet.getRowCount());
    if (columns > sheet.getColumnCount())
      facade?.insertColumnsAfter(sheet.getColumnCount() - 1, columns - sheet.getColumnCount());
  }

  function rangeOf(area: Area) {
    const facade = book.workbook.getSheetBySheetId(sheetOf(area).getSheetId());
    if (facade === null) throw new Error(`There is no sheet "${area.sheet}".`);
    return facade.getRange(area.row, area.column, area.rows, area.columns);
  }

  function nameMeaning(name: string, sheet: string): NameMeaning | null {
    const wanted = name.toLowerCase();
    const seenFrom = book.sheet(sheet)?.getSheetId();
    const named = Object.values(book.names.getDefinedNameMap(book.id) ?? {}).filter(
      (one) => one.name.toLowerCase() === wanted,
    );
    const own =
      named.find((one) => one.localSheetId === seenFrom) ??
      named.find((one) => one.localSheetId === undefined || one.localSheetId === WHOLE_BOOK);
    if (own === undefined) return null;
    const text = own.formulaOrRefString.replace(/^=/, '').trim();
    const area = parseReference(text, sheet);
    if (area !== null) return { kind: 'area', area };
    const number = Number(text);
    if (text !== '' && !Number.isNaN(number)) return { kind: 'value', value: number };
    const quoted = /^"((?:[^"]|"")*)"$/.exec(text);
    if (quoted !== null) return { kind: 'value', value: (quoted[1] ?? '').replace(/""/g, '"') };
    return { kind: 'formula', formula: `=${text}` };
  }

  /** "'Roof beams'!$B$4:$I$11" or "B4" -> area */
  function parseReference(text: string, home: string): Area | null {
    const bang = text.lastIndexOf('!');
    if (bang < 0) return parseArea(text, home);
    const quoted = text.slice(0, bang);
    const sheet = quoted.startsWith("'") ? quoted.slice(1, -1).replace(/''/g, "'") : quoted;
    return book.sheet(sheet) === null ? null : parseArea(text.slice(bang + 1), sheet);
  }

  const themeNow = (): Theme => {
    const style = getComputedStyle(document.documentElement);
    const colour = (name: string) => style.getPropertyValue(name).trim() || null;
    return { dark: theme.dark, background: colour('--paper'), text: colour('--ink') };
  };

  return {
    host: 'workbench',
    can: (ability) => ABILITIES.has(ability),

    selection: () =>
      later(() => {
        const selected = signals.selection();
        return selected === null ? null : toSelection(selected);
      }),
    onSelection: (listener) => signals.onSelection((selected) => listener(toSelection(selected))),
    onChange: (listener) => signals.onChange(() => listener({ area: null })),
    select: (area) =>
      later(() => {
        book.workbook.getSheetBySheetId(sheetOf(area).getSheetId())?.activate();
        rangeOf(area).activate();
      }),

    read: (areas) => later(() => areas.map(readBlock)),
    sheetNames: () => later(() => book.sheets().map((sheet) => sheet.getName())),
    used: (sheet) => later(() => usedArea(sheet)),
    name: (name, sheet) => later(() => nameMeaning(name, sheet)),
    // Tables of an opened file become plain cells, and formulas that named them hold their addresses (xlsx/tables.ts).
    table: () => Promise.resolve(null),
    spill: (cell) =>
      later(() => {
        const sheet = book.sheet(cell.sheet);
        const range = sheet === null ? null : book.spillOf(sheet, cell.row, cell.column);
        return range === null ? null : areaOf(cell.sheet, range);
      }),

    occupied: (area) => later(() => filledCells(area).map(shortAddress)),
    write,
    async insert(area) {
      const { row, column, rows, columns } = area;
      const range = {
        startRow: row,
        endRow: row + rows - 1,
        startColumn: column,
        endColumn: column + columns - 1,
      };
      await injector.get(ICommandService).executeCommand(InsertRangeMoveDownCommand.id, {
        unitId: book.id,
        subUnitId: sheetOf(area).getSheetId(),
        range,
      });
      await book.settle();
    },

    separators: () => Promise.resolve({ decimal: '.', group: ',', list: ',' }),
    theme: themeNow,
    onTheme: (listener) => theme.onChange(() => listener(themeNow())),
    today: () => new Date().toLocaleDateString(),

    addSheet: (name) =>
      later(() => {
        const before = book.workbook.getActiveSheet();
        const taken = new Set(book.sheets().map((sheet) => sheet.getName().toLowerCase()));
        let free = name;
        for (let number = 2; taken.has(free.toLowerCase()); number++) free = `${name} ${number}`;
        book.workbook.insertSheet(free);
        book.workbook.setActiveSheet(before);
        return free;
      }),
  };
}

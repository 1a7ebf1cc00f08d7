/**
 * Opens an .xlsx file: cells, formulas (ours renamed, shared ones written out), cached values, names, formats, sizes. What cannot be held
 * is listed in words. Text is text: nothing of a file is run except as a formula of the embedded spreadsheet.
 */
import { read, type CellObject, type WorkBook, type WorkSheet } from '@e965/xlsx';
import type { ICellData, IRange, IStyleData, IWorkbookData, IWorksheetData } from '@univerjs/core';
import { parseRange } from './address';
import { fromFile, otherAddIns } from './formula-text';
import { readLayout } from './layout-read';
import { mixedTexts, partsLeftOut, sheetLeftOut } from './left-out';
import { readStyles } from './styles-read';
import { readTable, withoutTables, type FileTable } from './tables';
import { decode, tags } from './xml';
import { FileProblem, unzip, zip, zipNames } from './zip';

export type ReadFile =
  | { readonly ok: true; readonly snapshot: IWorkbookData; readonly notes: readonly string[] }
  | { readonly ok: false; readonly reason: string };

/** Cells that the embedded spreadsheet still handles fluently on a small machine. */
const MOST_CELLS = 400_000;
const MOST_SHEETS = 200;
const MOST_MERGES = 20_000;
/** Parts that are read. Pictures, macros and the like are never unpacked. */
const WANTED =
  /^(\[Content_Types\]\.xml|_rels\/|docProps\/|xl\/(_rels\/|worksheets\/|tables\/|theme\/|[^/]+\.xml$))/i;

export async function readXlsx(bytes: Uint8Array, name: string): Promise<ReadFile> {
  try {
    return await readOrThrow(bytes, name);
  } catch (error) {
    if (error instanceof FileProblem) return { ok: false, reason: error.message };
    return {
      ok: false,
      reason: `it could not be read (${error instanceof Error ? error.message : String(error)}).`,
    };
  }
}

async function readOrThrow(bytes: Uint8Array, name: string): Promise<ReadFile> {
  const names = zipNames(bytes);
  const parts = await unzip(bytes, (part) => WANTED.test(part));
  if (!parts.has('xl/workbook.xml'))
    throw new FileProblem('it holds no workbook (xl/workbook.xml is missing).');
  // the cell reader gets parts that are already unpacked within limits, never the packed file
  const book = read(await zip(parts, { deflate: false }), {
    type: 'array',
    cellFormula: true,
    cellNF: false,
    cellHTML: false,
    cellText: false,
    xlfn: true,
    dense: false,
  });
  const places = sheetParts(parts);
  if (book.SheetNames.length > MOST_SHEETS) throw new FileProblem(`it has more than ${MOST_SHEETS} sheets.`);

  const notes = partsLeftOut(names);
  const { styles } = readStyles(decode(parts.get('xl/styles.xml')), decode(parts.get('xl/theme/theme1.xml')));
  const tables = readTables(book.SheetNames, places, parts);
  for (const table of tables)
    notes.push(
      `Table "${table.name}" on sheet "${table.sheet}": its cells are kept, its frame is not; formulas hold its cells' addresses.`,
    );
  if (mixedTexts(parts.get('xl/sharedStrings.xml')))
    notes.push('Mixed formatting inside texts (the texts are kept).');

  const snapshot: IWorkbookData = {
    id: `book-${Date.now().toString(36)}`,
    name,
    appVersion: '',
    locale: 'enUS' as IWorkbookData['locale'],
    styles: Object.fromEntries(
      styles.flatMap((style, index) => (style === null ? [] : [[`f${index}`, style]])),
    ),
    sheetOrder: [],
    sheets: {},
  };
  const tally = { cells: 0, arrays: 0, unturned: 0, addIns: new Set<string>() };
  book.SheetNames.forEach((sheetName, index) => {
    const sheet = book.Sheets[sheetName];
    const part = parts.get(places.get(sheetName) ?? '');
    const id = `sheet-${index + 1}`;
    snapshot.sheetOrder.push(id);
    snapshot.sheets[id] = readSheet(id, sheetName, sheet, part, {
      book,
      index,
      styles,
      tables,
      tally,
      notes,
    });
    notes.push(...sheetLeftOut(sheetName, part));
  });
  if (tally.arrays > 0)
    notes.push(
      `${tally.arrays} array formula${tally.arrays === 1 ? '' : 's'} of the older kind ({=…}): kept as formulas that spill.`,
    );
  if (tally.unturned > 0)
    notes.push(`${tally.unturned} formulas name a table in a way that is not understood; they show #NAME?.`);
  if (tally.addIns.size > 0)
    notes.push(`Functions of other add-ins, which show #NAME? here: ${[...tally.addIns].join(', ')}.`);
  const defined = readNames(book, snapshot, tables, notes);
  snapshot.resources = [{ name: 'SHEET_DEFINED_NAME_PLUGIN', data: JSON.stringify(defined) }];
  return { ok: true, snapshot, notes };
}

interface Context {
  readonly book: WorkBook;
  readonly index: number;
  readonly styles: readonly (IStyleData | null)[];
  readonly tables: readonly FileTable[];
  readonly tally: { cells: number; arrays: number; unturned: number; readonly addIns: Set<string> };
  readonly notes: string[];
}

function readSheet(
  id: string,
  name: string,
  sheet: WorkSheet | undefined,
  part: Uint8Array | undefined,
  context: Context,
): Partial<IWorksheetData> {
  const layout = readLayout(part);
  const cellData: Record<number, Record<number, ICellData>> = {};
  let [lastRow, lastColumn] = [0, 0];
  const put = (row: number, column: number, cell: ICellData) => {
    (cellData[row] ??= {})[column] = { ...cellData[row]?.[column], ...cell };
    lastRow = Math.max(lastRow, row);
    lastColumn = Math.max(lastColumn, column);
  };
  for (const [row, formats] of layout.formats)
    for (const [column, format] of formats) if (context.styles[format]) put(row, column, { s: `f${format}` });
  for (const [address, cell] of Object.entries(sheet ?? {})) {
    if (address.startsWith('!')) continue;
    const at = parseRange(address);
    if (at === null) continue;
    context.tally.cells += 1;
    if (context.tally.cells > MOST_CELLS)
      throw new FileProblem(`it has more than ${MOST_CELLS.toLocaleString('en')} filled cells.`);
    const data = readCell(cell as CellObject, name, at.startRow, at.startColumn, context);
    if (data !== null) put(at.startRow, at.startColumn, data);
  }
  const mergeData = readMerges(sheet, name, context.notes);
  for (const { endRow, endColumn } of mergeData)
    [lastRow, lastColumn] = [Math.max(lastRow, endRow), Math.max(lastColumn, endColumn)];
  return {
    id,
    name,
    cellData,
    mergeData,
    rowData: layout.rows,
    columnData: layout.columns,
    rowCount: Math.max(lastRow + 100, 200),
    columnCount: Math.max(lastColumn + 10, 26),
    showGridlines: layout.gridLines ? 1 : 0,
    hidden: (context.book.Workbook?.Sheets?.[context.index]?.Hidden ?? 0) > 0 ? 1 : 0,
    ...(layout.freeze === null ? {} : { freeze: layout.freeze }),
  };
}

function readCell(
  cell: CellObject,
  sheet: string,
  row: number,
  column: number,
  context: Context,
): ICellData | null {
  const value = storedValue(cell);
  const range = cell.F === undefined ? null : parseRange(cell.F);
  const origin = range === null || (range.startRow === row && range.startColumn === column);
  if (!origin) return null; // spilled into: comes back when the formula is computed
  if (cell.f === undefined || cell.f === '') return value;
  if (range !== null && cell.D !== true) context.tally.arrays += 1;
  for (const other of otherAddIns(cell.f)) context.tally.addIns.add(other);
  const turned = withoutTables(fromFile(cell.f), context.tables, { sheet, row });
  if (turned.failed) context.tally.unturned += 1;
  return { ...value, f: `=${turned.formula}` };
}

/** The cached value as the engine stores it. Dates are their serial numbers; an error is its text. */
function storedValue(cell: CellObject): ICellData | null {
  switch (cell.t) {
    case 'n':
      return typeof cell.v === 'number' && Number.isFinite(cell.v) ? { v: cell.v, t: 2 } : null;
    case 'b':
      return { v: cell.v === true ? 1 : 0, t: 3 };
    case 's':
    case 'e': {
      const text =
        cell.t === 'e' ? (ERROR_TEXT[Number(cell.v)] ?? cell.w ?? '#VALUE!') : String(cell.v ?? '');
      // text that looks like a number stays text
      return { v: text, t: cell.t === 's' && text.trim() !== '' && !Number.isNaN(Number(text)) ? 4 : 1 };
    }
    default:
      return null;
  }
}

const ERROR_TEXT: Readonly<Record<number, string>> = {
  0x00: '#NULL!', 0x07: '#DIV/0!', 0x0f: '#VALUE!', 0x17: '#REF!', 0x1d: '#NAME?', 0x24: '#NUM!', 0x2a: '#N/A', 0x2b: '#GETTING_DATA',
}; // prettier-ignore

function readMerges(sheet: WorkSheet | undefined, name: string, notes: string[]): IRange[] {
  const merges = sheet?.['!merges'] ?? [];
  const kept = merges
    .slice(0, MOST_MERGES)
    .map(({ s, e }) => ({ startRow: s.r, startColumn: s.c, endRow: e.r, endColumn: e.c }))
    .filter((one) => (one.endRow - one.startRow + 1) * (one.endColumn - one.startColumn + 1) <= 100_000);
  if (kept.length < merges.length)
    notes.push(
      `Sheet "${name}": ${merges.length - kept.length} merged areas that are too large or too many.`,
    );
  return kept;
}

/** Sheet name -> path of its part, through the relations of the workbook. */
function sheetParts(parts: ReadonlyMap<string, Uint8Array>): Map<string, string> {
  const targets = relationTargets(parts.get('xl/_rels/workbook.xml.rels'), 'xl/');
  const places = new Map<string, string>();
  for (const { name, attributes } of tags(decode(parts.get('xl/workbook.xml'))))
    if (name === 'sheet' && attributes.name !== undefined)
      places.set(attributes.name, targets.get(attributes.id ?? '') ?? '');
  return places;
}

function relationTargets(part: Uint8Array | undefined, folder: string): Map<string, string> {
  const targets = new Map<string, string>();
  for (const { name, attributes } of tags(decode(part)))
    if (name === 'Relationship')
      targets.set(attributes.Id ?? '', resolvePath(folder, attributes.Target ?? ''));
  return targets;
}

function resolvePath(folder: string, target: string): string {
  if (target.startsWith('/')) return target.slice(1);
  const pieces = (folder + target).split('/');
  const path: string[] = [];
  for (const piece of pieces) {
    if (piece === '..') path.pop();
    else if (piece !== '.') path.push(piece);
  }
  return path.join('/');
}

function readTables(
  sheets: readonly string[],
  places: ReadonlyMap<string, string>,
  parts: ReadonlyMap<string, Uint8Array>,
): FileTable[] {
  const found: FileTable[] = [];
  for (const sheet of sheets) {
    const place = places.get(sheet) ?? '';
    const folder = place.slice(0, place.lastIndexOf('/') + 1);
    const file = place.slice(folder.length);
    for (const target of relationTargets(parts.get(`${folder}_rels/${file}.rels`), folder).values()) {
      if (!/(^|\/)tables\/[^/]+\.xml$/.test(target)) continue;
      const table = readTable(parts.get(target), sheet);
      if (table !== null) found.push(table);
    }
  }
  return found;
}

function readNames(
  book: WorkBook,
  snapshot: IWorkbookData,
  tables: readonly FileTable[],
  notes: string[],
): Record<string, unknown> {
  const defined: Record<string, unknown> = {};
  (book.Workbook?.Names ?? []).forEach(({ Name, Ref, Sheet }, index) => {
    if (Name.startsWith('_xlnm.')) {
      notes.push(`The name ${Name.slice(6).replace('_', ' ')} (printing and filters).`);
      return;
    }
    const turned = withoutTables(fromFile(Ref), tables, { sheet: '', row: -1 });
    if (turned.failed) notes.push(`The name "${Name}" refers to a table in a way that is not understood.`);
    const id = `name-${index + 1}`;
    defined[id] = {
      id,
      name: Name,
      formulaOrRefString: turned.formula,
      localSheetId: Sheet === undefined ? 'AllDefaultWorkbook' : snapshot.sheetOrder[Sheet],
    };
  });
  return defined;
}

/**
 * Writes the open workbook as an .xlsx file: values as computed, formulas in the file's spelling, spilling formulas as dynamic arrays
 * with their spilled values, formats, sizes, merges, frozen panes and names. A formula that calls one of our functions is always
 * written as a dynamic array, as the host itself does for functions that may give more than one value; written as a plain
 * formula it would come back with an "@" before it.
 */
import type { ICellData, IStyleData, IWorkbookData, IWorksheetData, Nullable } from '@univerjs/core';
import type { BookCell, BookContents, Plain, Rectangle } from '../book';
import { cellName, rangeName } from './address';
import { callsSpanrow, toFile } from './formula-text';
import { createStyleSheet, type StyleSheet } from './styles-write';
import { XML_HEAD, encode, escapeXml } from './xml';
import { zip } from './zip';

export interface WrittenFile {
  readonly bytes: Uint8Array<ArrayBuffer>;
  /** what is in the workbook and not in the file, in words */
  readonly notes: readonly string[];
}

const MAIN = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const RELATIONS = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const PACKAGE = 'http://schemas.openxmlformats.org/package/2006';
/** Errors that a file can hold; newer ones are stored as #VALUE!, as the host itself stores them. */
const FILE_ERRORS = new Set(['#NULL!', '#DIV/0!', '#VALUE!', '#REF!', '#NAME?', '#NUM!', '#N/A']);
const SHEET_ERRORS = new Set(['#SPILL!', '#CALC!', '#CYCLE!', '#ERROR!', '#GETTING_DATA']);
const PIXELS_PER_CHARACTER = 7; // width of a digit of the plain font at 96 dpi
const POINTS_PER_PIXEL = 0.75;

export async function writeXlsx(contents: BookContents): Promise<WrittenFile> {
  const notes: string[] = [];
  const sheetStyles = createStyleSheet();
  const strings = new SharedStrings();
  const parts = new Map<string, Uint8Array>();
  const sheets = contents.sheets.map((sheet) => ({
    ...sheet,
    data: contents.snapshot.sheets[sheet.id] ?? {},
  }));
  const bodies = sheets.map((sheet) => sheetXml(sheet, contents.snapshot, sheetStyles, strings, notes));

  parts.set('[Content_Types].xml', encode(contentTypes(sheets.length)));
  parts.set('_rels/.rels', encode(relations([['officeDocument', 'xl/workbook.xml']])));
  parts.set('xl/workbook.xml', encode(workbookXml(sheets, contents)));
  parts.set(
    'xl/_rels/workbook.xml.rels',
    encode(
      relations([
        ...sheets.map((_, index) => ['worksheet', `worksheets/sheet${index + 1}.xml`] as const),
        ['styles', 'styles.xml'],
        ['sharedStrings', 'sharedStrings.xml'],
        ['sheetMetadata', 'metadata.xml'],
      ]),
    ),
  );
  bodies.forEach((body, index) => parts.set(`xl/worksheets/sheet${index + 1}.xml`, encode(body)));
  parts.set('xl/styles.xml', encode(sheetStyles.xml()));
  parts.set('xl/sharedStrings.xml', encode(strings.xml()));
  parts.set('xl/metadata.xml', encode(METADATA));
  return { bytes: await zip(parts), notes };
}

interface SheetToWrite {
  readonly id: string;
  readonly name: string;
  readonly cells: readonly BookCell[];
  readonly spilled: readonly { readonly row: number; readonly column: number; readonly value: Plain }[];
  readonly data: Partial<IWorksheetData>;
}

function sheetXml(
  sheet: SheetToWrite,
  book: IWorkbookData,
  styles: StyleSheet,
  strings: SharedStrings,
  notes: string[],
): string {
  const { data } = sheet;
  const rows = new Map<number, Map<number, string>>();
  const put = (row: number, column: number, xml: string) => {
    let cells = rows.get(row);
    if (cells === undefined) rows.set(row, (cells = new Map<number, string>()));
    cells.set(column, xml);
  };
  const styleAt = (row: number, column: number) =>
    styleAttribute(data.cellData?.[row]?.[column], book, styles);
  let rich = 0;

  // formats first, so that empty cells with a border or a colour are there; values then replace them
  for (const [rowKey, cells] of Object.entries(data.cellData ?? {}))
    for (const [columnKey, cell] of Object.entries((cells ?? {}) as Record<string, ICellData>)) {
      const [row, column] = [Number(rowKey), Number(columnKey)];
      const style = styleAttribute(cell, book, styles);
      if (style !== '') put(row, column, `<c r="${cellName(row, column)}"${style}/>`);
      if (cell?.p) rich += 1;
    }
  for (const cell of sheet.cells)
    put(cell.row, cell.column, cellXml(cell, styleAt(cell.row, cell.column), strings));
  for (const { row, column, value } of sheet.spilled)
    put(
      row,
      column,
      cellXml({ row, column, value, formula: null, spill: null }, styleAt(row, column), strings),
    );
  if (rich > 0)
    notes.push(
      `Sheet "${sheet.name}": the mixed formatting inside ${rich} text cell${rich === 1 ? '' : 's'}; the text itself is kept.`,
    );

  for (const key of Object.keys(data.rowData ?? {}))
    if (!rows.has(Number(key))) rows.set(Number(key), new Map<number, string>());
  const body = [...rows.entries()]
    .sort(([a], [b]) => a - b)
    .map(([row, cells]) => {
      const inside = [...cells.entries()].sort(([a], [b]) => a - b).map(([, xml]) => xml);
      return `<row r="${row + 1}"${rowAttributes(data, row)}>${inside.join('')}</row>`;
    });
  const merges = data.mergeData ?? [];
  return [
    `${XML_HEAD}<worksheet xmlns="${MAIN}" xmlns:r="${RELATIONS}">`,
    viewXml(data),
    '<sheetFormatPr defaultRowHeight="15"/>',
    columnsXml(data),
    `<sheetData>${body.join('')}</sheetData>`,
    merges.length === 0
      ? ''
      : `<mergeCells count="${merges.length}">${merges.map((one) => `<mergeCell ref="${rangeName(one)}"/>`).join('')}</mergeCells>`,
    '</worksheet>',
  ].join('');
}

function cellXml(cell: BookCell, style: string, strings: SharedStrings): string {
  const { formula } = cell;
  const head = `<c r="${cellName(cell.row, cell.column)}"${style}`;
  if (formula === null) {
    if (typeof cell.value === 'string' && !FILE_ERRORS.has(cell.value))
      return `${head} t="s"><v>${strings.indexOf(cell.value)}</v></c>`;
    const { type, text } = valueXml(cell.value, false);
    return cell.value === null ? `${head}/>` : `${head}${type}>${text}</c>`;
  }
  const { type, text } = valueXml(cell.value, true);
  const inside = escapeXml(toFile(formula.replace(/^=/, '')));
  const dynamic = cell.spill !== null || callsSpanrow(formula);
  const reference = cell.spill === null ? cellName(cell.row, cell.column) : reach(cell.spill);
  return dynamic
    ? `${head}${type} cm="1"><f t="array" ref="${reference}">${inside}</f>${text}</c>`
    : `${head}${type}><f>${inside}</f>${text}</c>`;
}

function reach(range: Rectangle): string {
  return range.startRow === range.endRow && range.startColumn === range.endColumn
    ? cellName(range.startRow, range.startColumn)
    : rangeName(range);
}

function valueXml(value: Plain, computed: boolean): { type: string; text: string } {
  if (value === null) return { type: '', text: '' };
  if (typeof value === 'number') return { type: '', text: `<v>${value}</v>` };
  if (typeof value === 'boolean') return { type: ' t="b"', text: `<v>${value ? 1 : 0}</v>` };
  if (FILE_ERRORS.has(value)) return { type: ' t="e"', text: `<v>${escapeXml(value)}</v>` };
  if (computed && SHEET_ERRORS.has(value)) return { type: ' t="e"', text: '<v>#VALUE!</v>' };
  return { type: ' t="str"', text: `<v>${escapeXml(value)}</v>` };
}

function styleAttribute(cell: Nullable<ICellData>, book: IWorkbookData, styles: StyleSheet): string {
  const style: Nullable<IStyleData> = typeof cell?.s === 'string' ? book.styles[cell.s] : cell?.s;
  const index = styles.indexOf(style);
  return index === 0 ? '' : ` s="${index}"`;
}

function rowAttributes(data: Partial<IWorksheetData>, row: number): string {
  const size = data.rowData?.[row];
  const height = size?.h ?? null;
  return [
    height !== null && height !== data.defaultRowHeight
      ? ` ht="${height * POINTS_PER_PIXEL}" customHeight="1"`
      : '',
    Number(size?.hd) === 1 ? ' hidden="1"' : '',
  ].join('');
}

function columnsXml(data: Partial<IWorksheetData>): string {
  const columns = Object.entries(data.columnData ?? {}) as [string, { w?: number; hd?: number }][];
  const inside = columns
    .filter(([, one]) => one?.w !== undefined || one?.hd === 1)
    .map(([key, one]) => {
      const width = (one.w ?? data.defaultColumnWidth ?? 88) / PIXELS_PER_CHARACTER;
      return `<col min="${Number(key) + 1}" max="${Number(key) + 1}" width="${Number(width.toFixed(4))}"${one.hd === 1 ? ' hidden="1"' : ''} customWidth="1"/>`;
    });
  return inside.length === 0 ? '' : `<cols>${inside.join('')}</cols>`;
}

function viewXml(data: Partial<IWorksheetData>): string {
  const grid = Number(data.showGridlines ?? 1) === 0 ? ' showGridLines="0"' : '';
  const across = data.freeze?.xSplit ?? 0;
  const down = data.freeze?.ySplit ?? 0;
  if (across <= 0 && down <= 0) return `<sheetViews><sheetView${grid} workbookViewId="0"/></sheetViews>`;
  const corner = cellName(
    Math.max(0, data.freeze?.startRow ?? down),
    Math.max(0, data.freeze?.startColumn ?? across),
  );
  const where = down > 0 && across > 0 ? 'bottomRight' : down > 0 ? 'bottomLeft' : 'topRight';
  const split = `${across > 0 ? ` xSplit="${across}"` : ''}${down > 0 ? ` ySplit="${down}"` : ''}`;
  return `<sheetViews><sheetView${grid} workbookViewId="0"><pane${split} topLeftCell="${corner}" activePane="${where}" state="frozen"/></sheetView></sheetViews>`;
}

function workbookXml(sheets: readonly SheetToWrite[], contents: BookContents): string {
  const list = sheets.map(({ name, data }, index) => {
    const hidden = Number(data.hidden) === 1 ? ' state="hidden"' : '';
    return `<sheet name="${escapeXml(name)}" sheetId="${index + 1}"${hidden} r:id="rId${index + 1}"/>`;
  });
  const names = contents.names.map(({ name, refersTo, sheet }) => {
    const index = sheets.findIndex((one) => one.name === sheet);
    const local = sheet === null || index < 0 ? '' : ` localSheetId="${index}"`;
    return `<definedName name="${escapeXml(name)}"${local}>${escapeXml(toFile(refersTo))}</definedName>`;
  });
  return [
    `${XML_HEAD}<workbook xmlns="${MAIN}" xmlns:r="${RELATIONS}">`,
    `<bookViews><workbookView/></bookViews><sheets>${list.join('')}</sheets>`,
    names.length === 0 ? '' : `<definedNames>${names.join('')}</definedNames>`,
    // the program that opens the file computes everything once more
    '<calcPr fullCalcOnLoad="1"/></workbook>',
  ].join('');
}

function contentTypes(sheets: number): string {
  const type = (part: string, kind: string) =>
    `<Override PartName="/${part}" ContentType="application/vnd.openxmlformats-officedocument.spreadsheetml.${kind}+xml"/>`;
  return [
    `${XML_HEAD}<Types xmlns="${PACKAGE}/content-types">`,
    '<Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/>',
    '<Default Extension="xml" ContentType="application/xml"/>',
    type('xl/workbook.xml', 'sheet.main'),
    ...Array.from({ length: sheets }, (_, index) => type(`xl/worksheets/sheet${index + 1}.xml`, 'worksheet')),
    type('xl/styles.xml', 'styles'),
    type('xl/sharedStrings.xml', 'sharedStrings'),
    type('xl/metadata.xml', 'sheetMetadata'),
    '</Types>',
  ].join('');
}

function relations(targets: readonly (readonly [kind: string, target: string])[]): string {
  const list = targets.map(
    ([kind, target], index) =>
      `<Relationship Id="rId${index + 1}" Type="${RELATIONS}/${kind}" Target="${target}"/>`,
  );
  return `${XML_HEAD}<Relationships xmlns="${PACKAGE}/relationships">${list.join('')}</Relationships>`;
}

/** The one piece of metadata a dynamic array needs: cells with cm="1" point to it. */
const METADATA = [
  `${XML_HEAD}<metadata xmlns="${MAIN}" xmlns:xda="http://schemas.microsoft.com/office/spreadsheetml/2017/dynamicarray">`,
  '<metadataTypes count="1"><metadataType name="XLDAPR" minSupportedVersion="120000" copy="1" pasteAll="1" pasteValues="1" merge="1" splitFirst="1" rowColShift="1" clearFormats="1" clearComments="1" assign="1" coerce="1" cellMeta="1"/></metadataTypes>',
  '<futureMetadata name="XLDAPR" count="1"><bk><extLst><ext uri="{bdbb8cdc-fa1e-496e-a857-3c3f30c029c3}"><xda:dynamicArrayProperties fDynamic="1" fCollapsed="0"/></ext></extLst></bk></futureMetadata>',
  '<cellMetadata count="1"><bk><rc t="1" v="0"/></bk></cellMetadata></metadata>',
].join('');

class SharedStrings {
  private readonly index = new Map<string, number>();
  private count = 0;
  indexOf(text: string): number {
    this.count += 1;
    const found = this.index.get(text);
    if (found !== undefined) return found;
    this.index.set(text, this.index.size);
    return this.index.size - 1;
  }
  xml(): string {
    const items = [...this.index.keys()].map(
      (text) => `<si><t xml:space="preserve">${escapeXml(text)}</t></si>`,
    );
    return `${XML_HEAD}<sst xmlns="${MAIN}" count="${this.count}" uniqueCount="${items.length}">${items.join('')}</sst>`;
  }
}

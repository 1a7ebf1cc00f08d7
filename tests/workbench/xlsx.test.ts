/** .xlsx in and out: what is kept, what is listed, and files that mean harm. A second reader (SheetJS) reads what is written. */
import { read, utils, write, type WorkSheet } from '@e965/xlsx';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { fromFile, outsideQuotes, toFile } from '../../workbench/xlsx/formula-text';
import { readXlsx, type ReadFile } from '../../workbench/xlsx/read';
import { withoutTables, type FileTable } from '../../workbench/xlsx/tables';
import { decode, encode } from '../../workbench/xlsx/xml';
import { unzip, zip } from '../../workbench/xlsx/zip';
import { loadBundle, loadWorkbench, snapshotOf, type Headless } from '../helpers/workbench';

const workbench = loadWorkbench();
const bundle = loadBundle(workbench);
const DEMO = path.resolve(__dirname, '../../workbench/demo/covered-market.xlsx');
let open: Headless[] = [];
afterEach(() => {
  for (const one of open) one.dispose();
  open = [];
});
function start(): Headless['book'] {
  const headless = workbench.createHeadless(bundle);
  open.push(headless);
  return headless.book;
}

function opened(file: ReadFile): Extract<ReadFile, { ok: true }> {
  if (!file.ok) throw new Error(file.reason);
  return file;
}

/** Every value and formula of a workbook, for comparing two. */
function everything(book: Headless['book']): string[] {
  return book
    .sheets()
    .flatMap((sheet) =>
      [...book.cells(sheet)].map(
        ({ row, column, value, formula, spill }) =>
          `${sheet.getName()}!${row},${column} ${JSON.stringify(value)} ${formula ?? ''} ${JSON.stringify(spill)}`,
      ),
    );
}

describe('formula text', () => {
  test.each([
    ['SPANROW.DEFLECTION(A1:B2,3)', '_xldudf_SPANROW_DEFLECTION(A1:B2,3)'],
    ['IF(SPANROW.USED(B4:I9)>1,"no","yes")', 'IF(_xldudf_SPANROW_USED(B4:I9)>1,"no","yes")'],
    ['"SPANROW.USED("&A1', '"SPANROW.USED("&A1'],
    ["'SPANROW.USED(x'!A1+SPANROW.VERSION()", "'SPANROW.USED(x'!A1+_xldudf_SPANROW_VERSION()"],
    ['XLOOKUP(1,A:A,B:B)', '_xlfn.XLOOKUP(1,A:A,B:B)'],
    ['FILTER(A1:A9,B1:B9)', '_xlfn._xlws.FILTER(A1:A9,B1:B9)'],
  ])('%s <-> %s', (sheet, file) => {
    expect(toFile(sheet)).toBe(file);
    expect(fromFile(file)).toBe(sheet);
  });
  test('names in a file count without case, longer names are other functions', () => {
    expect(fromFile('_XLDUDF_spanrow_deflection(A1)')).toBe('SPANROW.DEFLECTION(A1)');
    expect(fromFile('my_xldudf_SPANROW_X(1)')).toBe('my_xldudf_SPANROW_X(1)');
    expect(toFile('MYSPANROW.USED(1)')).toBe('MYSPANROW.USED(1)');
  });
  test('doubled quotes and an unclosed quote stay as they are', () => {
    expect(toFile('"a ""SPANROW.USED("" b"&SPANROW.USED(1)')).toBe(
      '"a ""SPANROW.USED("" b"&_xldudf_SPANROW_USED(1)',
    );
    expect(outsideQuotes('A&"open SPANROW.USED(', (part) => part.toLowerCase())).toBe(
      'a&"open SPANROW.USED(',
    );
  });
});

describe('structured references', () => {
  const table: FileTable = {
    name: 'Joists',
    sheet: 'Floor plan',
    range: { startRow: 1, startColumn: 1, endRow: 5, endColumn: 3 },
    columns: ['Span', 'Load [kN]', 'Sag'],
    headerRows: 1,
    totalRows: 1,
  };
  test.each([
    ['SUM(Joists[Span])', "SUM('Floor plan'!$B$3:$B$5)"],
    ['Joists[#All]', "'Floor plan'!$B$2:$D$6"],
    ['Joists', "'Floor plan'!$B$3:$D$5"],
    ['Joists[@Span]*2', "'Floor plan'!$B$4*2"],
    ['Joists[[#This Row],[Sag]]', "'Floor plan'!$D$4"],
    ['Joists[[#Headers],[Span]:[Sag]]', "'Floor plan'!$B$2:$D$2"],
    ["SUM(Joists[Load '[kN']])", "SUM('Floor plan'!$C$3:$C$5)"],
    ['Joists[[#Totals],[Sag]]', "'Floor plan'!$D$6"],
    ['"Joists[Span]"&MyJoists', '"Joists[Span]"&MyJoists'],
  ])('%s -> %s', (formula, expected) => {
    expect(withoutTables(formula, [table], { sheet: 'Other', row: 3 })).toMatchObject({
      formula: expected,
      failed: false,
    });
  });
  test('on its own sheet the sheet name is left out; an unknown column is told', () => {
    expect(withoutTables('Joists[Sag]', [table], { sheet: 'Floor plan', row: 3 }).formula).toBe('$D$3:$D$5');
    expect(withoutTables('Joists[Width]', [table], { sheet: 'x', row: 3 })).toMatchObject({ failed: true });
    expect(withoutTables('Joists[@Span]', [table], { sheet: 'x', row: 30 })).toMatchObject({ failed: true });
  });
});

describe('round trip', () => {
  test('the demo: saved and reopened, every value, formula and spill is the same', async () => {
    const book = start();
    await book.open(workbench.demoWorkbook());
    const before = everything(book);
    expect(before.length).toBeGreaterThan(1000);
    const written = await workbench.writeXlsx(book.contents());
    expect(written.notes).toEqual([]);
    const again = start();
    const file = opened(await workbench.readXlsx(written.bytes, 'again.xlsx'));
    expect(file.notes).toEqual([]);
    await again.open(file.snapshot);
    expect(everything(again)).toEqual(before);
    expect(again.namesList()).toEqual(book.namesList());
  });

  test('the file keeps cached values and the spelling of the file format, read by another reader', async () => {
    const book = start();
    await book.open(workbench.demoWorkbook());
    const { bytes } = await workbench.writeXlsx(book.contents());
    const other = read(bytes, { type: 'array', cellFormula: true });
    const canopy = other.Sheets['Canopy beam']!;
    expect(canopy.E20.f).toBe('_xldudf_SPANROW_DEFLECTION($B$6:$I$17,3.6,"G + S")');
    expect(canopy.E20.v).toBe(book.valueAt(book.sheet('Canopy beam')!, 19, 4));
    expect(canopy.E20.D).toBe(true);
    expect(canopy.E20.F).toBe('E20');
    expect(canopy.B29.D).toBe(true);
    expect(canopy.B29.F).toBe('B29:I32');
    expect(canopy.C30.v).toBe(book.valueAt(book.sheet('Canopy beam')!, 29, 2)); // spilled values are in the file
    expect(other.Workbook?.Names?.map(({ Name, Ref }) => `${Name} ${Ref}`)).toEqual([
      "JoistRows 'Joist template'!$B$6:$I$16",
    ]);
  });

  test('formats, widths, heights, merges, frozen panes, hidden rows and columns are kept', async () => {
    const book = start();
    const snapshot = snapshotOf({
      One: [
        [1.5, 'text', true],
        [2, '=A1*2', '007'],
      ],
    });
    const sheet = snapshot.sheets!.One!;
    sheet.cellData![0]![0] = {
      v: 1.5,
      t: 2,
      s: {
        n: { pattern: '0.00" mm"' },
        bl: 1,
        it: 1,
        cl: { rgb: '#aa3311' },
        bg: { rgb: '#fbf4dc' },
        ht: 2,
        vt: 1,
        tb: 3,
        bd: { b: { s: 8, cl: { rgb: '#2c6665' } }, l: { s: 1, cl: { rgb: '#000000' } } },
      },
    };
    sheet.cellData![1]![2] = { v: '007', t: 4 };
    sheet.columnData = { 0: { w: 140 }, 2: { w: 70, hd: 1 } };
    sheet.rowData = { 1: { h: 44 }, 3: { hd: 1 } };
    sheet.mergeData = [{ startRow: 4, endRow: 5, startColumn: 0, endColumn: 2 }];
    sheet.freeze = { xSplit: 1, ySplit: 2, startRow: 2, startColumn: 1 };
    await book.open(snapshot);
    const { bytes } = await workbench.writeXlsx(book.contents());
    const { snapshot: back } = opened(await readXlsx(bytes, 'x.xlsx'));
    const got = back.sheets['sheet-1']!;
    const first = got.cellData![0]![0]!;
    expect(back.styles[first.s as string]).toEqual(
      (sheet.cellData![0]![0] as { s: unknown }).s && {
        ff: 'Calibri',
        fs: 11,
        bl: 1,
        it: 1,
        cl: { rgb: '#aa3311' },
        bg: { rgb: '#fbf4dc' },
        ht: 2,
        vt: 1,
        tb: 3,
        bd: { b: { s: 8, cl: { rgb: '#2c6665' } }, l: { s: 1, cl: { rgb: '#000000' } } },
        n: { pattern: '0.00" mm"' },
      },
    );
    expect(got.columnData).toMatchObject({ 0: { w: 140 }, 2: { w: 70, hd: 1 } });
    expect(got.rowData).toMatchObject({ 1: { h: 44 }, 3: { hd: 1 } });
    expect(got.mergeData).toEqual([{ startRow: 4, endRow: 5, startColumn: 0, endColumn: 2 }]);
    expect(got.freeze).toEqual({ xSplit: 1, ySplit: 2, startRow: 2, startColumn: 1 });
    expect(got.cellData![0]![2]).toMatchObject({ v: 1, t: 3 });
    expect(got.cellData![1]![2]).toMatchObject({ v: '007', t: 4 }); // text that looks like a number stays text
    expect(got.cellData![1]![1]).toMatchObject({ f: '=A1*2', v: 3 });
  });

  test('errors keep their kind, also where the file has no word for it', async () => {
    const book = start();
    await book.open(
      snapshotOf({
        One: [
          ['=1/0', '=SPANROW.USED("pinn")', '=SEQUENCE(3)', null],
          [null, null, 'blocks'],
        ],
      }),
    );
    const { bytes } = await workbench.writeXlsx(book.contents());
    const sheet = read(bytes, { type: 'array' }).Sheets.One!;
    expect([sheet.A1.w, sheet.B1.w, sheet.C1.w]).toEqual(['#DIV/0!', '#VALUE!', '#VALUE!']);
    const again = start();
    await again.open(opened(await readXlsx(bytes, 'x.xlsx')).snapshot);
    expect(again.valueAt(again.sheets()[0]!, 0, 2)).toBe('#SPILL!');
  });

  test('a file of another program: shared formulas, array formulas, another add-in, dates', async () => {
    const sheet: WorkSheet = utils.aoa_to_sheet([
      [1, 2],
      [3, 4],
    ]);
    sheet.C1 = { t: 'n', v: 3, f: '_xldudf_spanrow_deflection(A1:B2,1)' };
    sheet.C2 = { t: 'n', v: 7, f: '_xldudf_OTHER_CALC(A1)' };
    utils.sheet_set_array_formula(sheet, 'D1:D2', 'A1:A2*2', false);
    sheet.E1 = { t: 'n', v: 45000, z: 'yyyy-mm-dd' };
    sheet['!ref'] = 'A1:E2';
    const book = utils.book_new();
    utils.book_append_sheet(book, sheet, "O'Neil & <sons>");
    const bytes = new Uint8Array(write(book, { type: 'array', bookType: 'xlsx' }) as ArrayBuffer);
    const file = opened(await readXlsx(bytes, 'other.xlsx'));
    const cells = file.snapshot.sheets['sheet-1']!.cellData!;
    expect(file.snapshot.sheets['sheet-1']!.name).toBe("O'Neil & <sons>");
    expect(cells[0]![2]!.f).toBe('=SPANROW.DEFLECTION(A1:B2,1)');
    expect(cells[0]![3]!.f).toBe('=A1:A2*2');
    expect(cells[1]?.[3]?.f).toBeUndefined();
    expect(cells[0]![4]!.v).toBe(45000);
    expect(file.snapshot.styles[cells[0]![4]!.s as string]).toMatchObject({ n: { pattern: 'yyyy-mm-dd' } });
    expect(file.notes.join(' ')).toMatch(/array formula/);
    expect(file.notes.join(' ')).toMatch(/OTHER_CALC/);
  });

  test('what cannot be kept is listed', async () => {
    const parts = await unzip(readFileSync(DEMO));
    const sheet = decode(parts.get('xl/worksheets/sheet2.xml'));
    parts.set(
      'xl/worksheets/sheet2.xml',
      encode(
        sheet.replace(
          '</worksheet>',
          '<conditionalFormatting sqref="A1"/><dataValidations count="1"><dataValidation sqref="A1"/></dataValidations><pageSetup paperSize="9"/></worksheet>',
        ),
      ),
    );
    parts.set('xl/charts/chart1.xml', encode('<c/>'));
    parts.set('xl/vbaProject.bin', encode('x'));
    const { notes } = opened(await readXlsx(await zip(parts), 'x.xlsx'));
    expect(notes).toEqual([
      '1 chart.',
      '1 set of macros (never run here).',
      'Sheet "Canopy beam": conditional formatting, data validation, page set-up for printing.',
    ]);
  });
});

describe('files that mean harm', () => {
  const refused = async (bytes: Uint8Array) => {
    const file = await readXlsx(bytes, 'x.xlsx');
    if (file.ok) throw new Error('was opened');
    return file.reason;
  };
  const demo = new Uint8Array(readFileSync(DEMO));

  test('not a zip, empty, and every truncation of a good file are refused in words', async () => {
    expect(await refused(encode('Item,At,To'))).toMatch(/not an \.xlsx/);
    expect(await refused(new Uint8Array())).toMatch(/not an \.xlsx/);
    for (let size = 0; size < demo.length; size += 997)
      expect(await refused(demo.slice(0, size))).toMatch(/\.$/);
  });

  test('flipped bytes never crash: refused in words or opened', async () => {
    let seed = 20261201;
    const random = () => ((seed = (Math.imul(seed, 1664525) + 1013904223) >>> 0), seed / 2 ** 32);
    let answered = 0;
    for (let round = 0; round < 60; round++) {
      const bytes = demo.slice();
      for (let flip = 0; flip < 20; flip++)
        bytes[Math.floor(random() * bytes.length)] = Math.floor(random() * 256);
      const file = await readXlsx(bytes, 'x.xlsx');
      answered += 1;
      if (!file.ok) expect(file.reason.length).toBeGreaterThan(10);
    }
    expect(answered).toBe(60);
  });

  test('a part that unpacks without end is stopped at the limit, whatever size it declares', async () => {
    const bomb = await zip(new Map([['xl/workbook.xml', new Uint8Array(40_000_000)]]));
    expect(bomb.length).toBeLessThan(100_000);
    new DataView(bomb.buffer).setUint32(bomb.length - 22 - 46 - 'xl/workbook.xml'.length + 24, 10, true); // declares 10 bytes
    const started = process.memoryUsage().arrayBuffers;
    await expect(unzip(bomb, undefined, { file: 1e6, inflated: 1_000_000, entries: 10 })).rejects.toThrow(
      /unpack/,
    );
    expect(process.memoryUsage().arrayBuffers - started).toBeLessThan(20_000_000);
  });

  test('too many parts, a file too large, no workbook inside', async () => {
    await expect(unzip(demo, undefined, { file: 1000, inflated: 1e9, entries: 100 })).rejects.toThrow(
      /larger/,
    );
    await expect(unzip(demo, undefined, { file: 1e9, inflated: 1e9, entries: 2 })).rejects.toThrow(/parts/);
    expect(await refused(await zip(new Map([['a.txt', encode('a')]])))).toMatch(/no workbook/);
  });

  test('entities that would multiply are not expanded, prototype names are only text', async () => {
    const parts = await unzip(demo);
    const lol = '<!DOCTYPE a [<!ENTITY a "aaaaaaaaaa"><!ENTITY b "&a;&a;&a;&a;">]>';
    const strings = decode(parts.get('xl/sharedStrings.xml'));
    parts.set(
      'xl/sharedStrings.xml',
      encode(
        strings
          .replace('<sst', `${lol}<sst`)
          .replace(/<t xml:space="preserve">[^<]*<\/t>/, '<t>&b;&b;__proto__</t>'),
      ),
    );
    const file = await readXlsx(await zip(parts), 'x.xlsx');
    if (file.ok) expect(JSON.stringify(file.snapshot)).not.toMatch(/aaaaaaaaaa/);
    expect(({} as Record<string, unknown>).polluted).toBeUndefined();
  });

  test('text that begins with "=" stays text, a formula is only ever a formula', async () => {
    const parts = await unzip(demo);
    const sheet = decode(parts.get('xl/worksheets/sheet1.xml'));
    parts.set(
      'xl/worksheets/sheet1.xml',
      encode(
        sheet.replace(
          '</sheetData>',
          '<row r="90"><c r="A90" t="str"><v>=1+1</v></c><c r="B90"><f>constructor.constructor("globalThis.hacked=1")()</f><v>1</v></c><c r="C90" t="inlineStr"><is><t>=HYPERLINK("x")</t></is></c></row></sheetData>',
        ),
      ),
    );
    const book = start();
    await book.open(opened(await readXlsx(await zip(parts), 'x.xlsx')).snapshot);
    const first = book.sheets()[0]!;
    expect(book.formulaAt(first, 89, 0)).toBeNull();
    expect(book.valueAt(first, 89, 0)).toBe('=1+1');
    expect(book.valueAt(first, 89, 2)).toBe('=HYPERLINK("x")');
    expect(String(book.valueAt(first, 89, 1))).toMatch(/^#/);
    expect((globalThis as Record<string, unknown>).hacked).toBeUndefined();
  });

  test('a sheet that claims to be huge costs what it holds', async () => {
    const parts = await unzip(demo);
    const sheet = decode(parts.get('xl/worksheets/sheet1.xml'));
    parts.set(
      'xl/worksheets/sheet1.xml',
      encode(
        sheet
          .replace('<sheetFormatPr', '<dimension ref="A1:XFD1048576"/><sheetFormatPr')
          .replace(
            '</sheetData>',
            '</sheetData><mergeCells count="1"><mergeCell ref="A1:XFD1048576"/></mergeCells>',
          ),
      ),
    );
    const started = Date.now();
    const file = opened(await readXlsx(await zip(parts), 'x.xlsx'));
    expect(Date.now() - started).toBeLessThan(5_000);
    expect(file.notes.join(' ')).toMatch(/merged areas/);
    expect(file.snapshot.sheets['sheet-1']!.rowCount).toBeLessThan(1000);
  });
});

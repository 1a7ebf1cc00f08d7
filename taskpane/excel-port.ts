/**
 * The pane's port on Excel: the only file of the pane that knows Office.js. Requirement sets are tested at run time; every
 * visit waits for a cell edit to end (`delayForCellEdit`); changes by co-authors are not ours to react to.
 */
import { addressFrom, contains, shortAddress } from './address';
import { formulaOf, isFilled, themeFrom, toExcel } from './excel-values';
import type {
  Ability,
  Area,
  Block,
  ChartRequest,
  NameMeaning,
  Selection,
  Separators,
  TableInfo,
  Theme,
  WorkbookPort,
  WriteOptions,
  WriteResult,
  Writing,
} from './port';

/** Excel API version that each optional ability needs. */
const NEEDS: Readonly<Record<Ability, string>> = {
  tables: '1.4',
  insert: '1.1',
  pictures: '1.9',
  charts: '1.7',
  print: '1.9',
  addTable: '1.1',
  addSheet: '1.1',
  undoGroup: '1.20',
  select: '1.1',
};

function supports(version: string): boolean {
  return Office.context.requirements.isSetSupported('ExcelApi', version);
}

function run<T>(work: (context: Excel.RequestContext) => Promise<T>): Promise<T> {
  return Excel.run({ delayForCellEdit: true }, work);
}

/** The same as one step of the host's undo list, where the host can. */
function runAsOneStep<T>(work: (context: Excel.RequestContext) => Promise<T>): Promise<T> {
  const options: Excel.RunOptions = { delayForCellEdit: true };
  if (supports(NEEDS.undoGroup)) Object.assign(options, { mergeUndoGroup: true });
  return Excel.run(options, work);
}

function areaOf(range: Excel.Range, sheet: string): Area {
  return {
    sheet,
    row: range.rowIndex,
    column: range.columnIndex,
    rows: range.rowCount,
    columns: range.columnCount,
  };
}

/** "'Roof beams'!B4:I11" -> "Roof beams" */
export function sheetOf(address: string): string {
  const sheet = address.slice(0, Math.max(0, address.lastIndexOf('!')));
  return sheet.startsWith("'") ? sheet.slice(1, -1).replace(/''/g, "'") : sheet;
}

function rangeOf(context: Excel.RequestContext, area: Area): Excel.Range {
  return context.workbook.worksheets
    .getItem(area.sheet)
    .getRangeByIndexes(area.row, area.column, area.rows, area.columns);
}

async function selectionNow(context: Excel.RequestContext): Promise<Selection | null> {
  const range = context.workbook.getSelectedRange();
  range.load('rowIndex, columnIndex, rowCount, columnCount');
  // what is selected is always on the active sheet
  const sheet = context.workbook.worksheets.getActiveWorksheet();
  sheet.load('name');
  const cell = supports('1.7') ? context.workbook.getActiveCell() : range.getCell(0, 0);
  cell.load('rowIndex, columnIndex, rowCount, columnCount');
  try {
    await context.sync();
  } catch {
    return null; // several separate ranges, or a chart, are selected
  }
  return { area: areaOf(range, sheet.name), active: areaOf(cell, sheet.name) };
}

/** The used part of each area, values and formulas; null where there is no such sheet or nothing used. */
async function readBlocks(context: Excel.RequestContext, areas: readonly Area[]): Promise<(Block | null)[]> {
  const names = [...new Set(areas.map((area) => area.sheet))];
  const sheets = new Map(names.map((name) => [name, context.workbook.worksheets.getItemOrNullObject(name)]));
  for (const sheet of sheets.values()) sheet.load('name');
  await context.sync();
  const ranges = areas.map((area) => {
    const sheet = sheets.get(area.sheet);
    if (!sheet || sheet.isNullObject) return null;
    const range = sheet
      .getRangeByIndexes(area.row, area.column, area.rows, area.columns)
      .getUsedRangeOrNullObject(true);
    range.load('values, formulas, rowIndex, columnIndex, rowCount, columnCount');
    return range;
  });
  await context.sync();
  return ranges.map((range, i) => {
    if (!range || range.isNullObject) return null;
    return {
      area: areaOf(range, areas[i]?.sheet ?? ''),
      values: range.values as unknown[][],
      formulas: (range.formulas as unknown[][]).map((row) => row.map(formulaOf)),
    };
  });
}

/** Filled cells of a block as one-cell areas. */
function filledCells(block: Block | null): Area[] {
  if (!block) return [];
  const { area } = block;
  return block.values.flatMap((row, r) =>
    row.flatMap((value, c): Area[] =>
      isFilled(value, block.formulas[r]?.[c] ?? '')
        ? [{ sheet: area.sheet, row: area.row + r, column: area.column + c, rows: 1, columns: 1 }]
        : [],
    ),
  );
}

async function write(writings: readonly Writing[], options: WriteOptions = {}): Promise<WriteResult> {
  return runAsOneStep(async (context): Promise<WriteResult> => {
    if (!options.confirmed) {
      const active = context.workbook.worksheets.getActiveWorksheet();
      active.load('name');
      await context.sync();
      const blocks = await readBlocks(
        context,
        writings.map((writing) => writing.area),
      );
      const occupied = writings.flatMap(({ area, cells }, i) =>
        filledCells(blocks[i] ?? null)
          .filter((cell) => cells[cell.row - area.row]?.[cell.column - area.column] !== undefined)
          .filter((cell) => !(options.own ?? []).some((own) => contains(own, cell)))
          .map((cell) => addressFrom(cell, active.name)),
      );
      if (occupied.length > 0) return { written: false, occupied };
    }
    for (const { area, cells } of writings) {
      rangeOf(context, area).formulas = cells.map((row) => row.map(toExcel));
    }
    await context.sync();
    return { written: true };
  });
}

async function nameMeaning(
  context: Excel.RequestContext,
  name: string,
  sheet: string,
): Promise<NameMeaning | null> {
  const local = context.workbook.worksheets.getItem(sheet).names.getItemOrNullObject(name);
  const global = context.workbook.names.getItemOrNullObject(name);
  for (const item of [local, global]) item.load('type, value, formula');
  await context.sync();
  const item = !local.isNullObject ? local : !global.isNullObject ? global : null;
  if (!item) return null;
  if (item.type === Excel.NamedItemType.range) {
    const range = item.getRangeOrNullObject();
    range.load('address, rowIndex, columnIndex, rowCount, columnCount');
    await context.sync();
    if (!range.isNullObject) return { kind: 'area', area: areaOf(range, sheetOf(range.address)) };
  }
  const formula: unknown = item.formula;
  if (typeof formula === 'string' && /[A-Za-z(]/.test(formula)) return { kind: 'formula', formula };
  return { kind: 'value', value: item.value };
}

async function tableInfo(context: Excel.RequestContext, name: string): Promise<TableInfo | null> {
  const table = context.workbook.tables.getItemOrNullObject(name);
  table.load('name, showHeaders, showTotals');
  await context.sync();
  if (table.isNullObject) return null;
  const range = table.getRange();
  range.load('rowIndex, columnIndex, rowCount, columnCount');
  const sheet = table.worksheet;
  sheet.load('name');
  const { columns } = table;
  columns.load('items/name');
  await context.sync();
  return {
    name: table.name,
    area: areaOf(range, sheet.name),
    header: table.showHeaders,
    totals: table.showTotals,
    columns: columns.items.map((column) => column.name),
  };
}

async function separatorsNow(): Promise<Separators> {
  const plain: Separators = { decimal: '.', group: ',', list: ',' };
  if (!supports('1.11')) return plain;
  return run(async (context) => {
    const { application } = context.workbook;
    application.load('decimalSeparator, thousandsSeparator');
    await context.sync();
    const decimal = application.decimalSeparator || plain.decimal;
    // the list separator is not told; where the decimal mark is a comma, arguments are separated by semicolons
    return { decimal, group: application.thousandsSeparator, list: decimal === ',' ? ';' : ',' };
  });
}

function themeNow(): Theme {
  const theme = Office.context.officeTheme as Office.OfficeTheme | undefined;
  const prefersDark = typeof matchMedia === 'function' && matchMedia('(prefers-color-scheme: dark)').matches;
  return themeFrom(theme?.bodyBackgroundColor, theme?.bodyForegroundColor, prefersDark);
}

/** Registers a handler and gives the way to take it off again; a host that is gone needs no taking off. */
function subscribe<T>(
  add: (context: Excel.RequestContext) => OfficeExtension.EventHandlerResult<T>,
): () => void {
  let stopped = false;
  const registered = run(async (context) => {
    const handler = add(context);
    await context.sync();
    return handler;
  });
  registered.catch(() => undefined);
  return () => {
    if (stopped) return;
    stopped = true;
    void registered
      .then(async (handler) => {
        await Excel.run(handler.context, async (context) => {
          handler.remove();
          await context.sync();
        });
      })
      .catch(() => undefined);
  };
}

async function addChart(request: ChartRequest): Promise<void> {
  await run(async (context) => {
    const sheet = context.workbook.worksheets.getItem(request.at.sheet);
    const data = rangeOf(context, request.data);
    const chart = sheet.charts.add(
      Excel.ChartType.xyscatterLinesNoMarkers,
      data.getColumn(0).getResizedRange(0, 1),
      Excel.ChartSeriesBy.columns,
    );
    chart.title.text = request.title;
    const body = (column: number): Excel.Range =>
      data.getColumn(column).getOffsetRange(1, 0).getResizedRange(-1, 0);
    const first = chart.series.getItemAt(0);
    request.columns.forEach((column, i) => {
      const series = i === 0 ? first : chart.series.add();
      series.setXAxisValues(body(0));
      series.setValues(body(column));
    });
    chart.setPosition(rangeOf(context, request.at));
    await context.sync();
  });
}

export function createExcelPort(): WorkbookPort {
  return {
    host: 'Excel',
    can: (ability) => supports(NEEDS[ability]),

    selection: () => run(selectionNow),
    onSelection: (listener) =>
      subscribe((context) =>
        context.workbook.onSelectionChanged.add(async () => {
          const selection = await run(selectionNow);
          if (selection) listener(selection);
        }),
      ),
    onChange: (listener) => {
      const stops: (() => void)[] = [];
      if (supports('1.9')) {
        stops.push(
          subscribe((context) =>
            context.workbook.worksheets.onChanged.add(async (event) => {
              if (event.source === Excel.EventSource.local) listener({ area: null });
              return Promise.resolve();
            }),
          ),
        );
      }
      if (supports('1.8')) {
        stops.push(
          subscribe((context) =>
            context.workbook.worksheets.onCalculated.add(async () => {
              listener({ area: null });
              return Promise.resolve();
            }),
          ),
        );
      }
      return () => {
        for (const stop of stops) stop();
      };
    },
    select: (area) =>
      run(async (context) => {
        rangeOf(context, area).select();
        await context.sync();
      }),

    read: (areas) => run((context) => readBlocks(context, areas)),
    sheetNames: () =>
      run(async (context) => {
        const { worksheets } = context.workbook;
        worksheets.load('items/name');
        await context.sync();
        return worksheets.items.map((sheet) => sheet.name);
      }),
    used: (name) =>
      run(async (context) => {
        const sheet = context.workbook.worksheets.getItemOrNullObject(name);
        sheet.load('name');
        await context.sync();
        if (sheet.isNullObject) return null;
        const range = sheet.getUsedRangeOrNullObject(true);
        range.load('rowIndex, columnIndex, rowCount, columnCount');
        await context.sync();
        return range.isNullObject ? null : areaOf(range, sheet.name);
      }),
    name: (name, sheet) => run((context) => nameMeaning(context, name, sheet)),
    table: (name) =>
      supports(NEEDS.tables) ? run((context) => tableInfo(context, name)) : Promise.resolve(null),
    spill: (cell) =>
      supports('1.12')
        ? run(async (context) => {
            const range = rangeOf(context, cell).getSpillingToRangeOrNullObject();
            range.load('rowIndex, columnIndex, rowCount, columnCount');
            await context.sync();
            return range.isNullObject ? null : areaOf(range, cell.sheet);
          })
        : Promise.resolve(null),

    occupied: (area) =>
      run(async (context) => filledCells((await readBlocks(context, [area]))[0] ?? null).map(shortAddress)),
    write,
    insert: (area) =>
      runAsOneStep(async (context) => {
        rangeOf(context, area).insert(Excel.InsertShiftDirection.down);
        await context.sync();
      }),

    separators: separatorsNow,
    theme: themeNow,
    onTheme: (listener) => {
      // the host does not tell when its theme changes: read it again when the pane is looked at
      const again = (): void => listener(themeNow());
      window.addEventListener('focus', again);
      const media = typeof matchMedia === 'function' ? matchMedia('(prefers-color-scheme: dark)') : null;
      media?.addEventListener('change', again);
      return () => {
        window.removeEventListener('focus', again);
        media?.removeEventListener('change', again);
      };
    },
    today: () => new Date().toLocaleDateString(Office.context.contentLanguage || undefined),

    addTable: (area) =>
      run(async (context) => {
        const table = context.workbook.tables.add(rangeOf(context, area), true);
        table.load('name');
        await context.sync();
        return table.name;
      }),
    addSheet: (name) =>
      run(async (context) => {
        const { worksheets } = context.workbook;
        worksheets.load('items/name');
        await context.sync();
        const taken = new Set(worksheets.items.map((sheet) => sheet.name.toLowerCase()));
        let free = name;
        for (let number = 2; taken.has(free.toLowerCase()); number++) free = `${name} ${number}`;
        worksheets.add(free);
        await context.sync();
        return free;
      }),
    addPicture: (at, png, alternative, width, height) =>
      run(async (context) => {
        const corner = rangeOf(context, at);
        corner.load('left, top');
        await context.sync();
        const shape = context.workbook.worksheets.getItem(at.sheet).shapes.addImage(png);
        shape.left = corner.left;
        shape.top = corner.top;
        shape.lockAspectRatio = true;
        shape.width = width;
        shape.height = height;
        shape.altTextDescription = alternative;
        await context.sync();
      }),
    addChart,
    setPrint: (area, paper) =>
      run(async (context) => {
        const layout = context.workbook.worksheets.getItem(area.sheet).pageLayout;
        layout.orientation = Excel.PageOrientation.portrait;
        layout.paperSize = paper === 'a4' ? Excel.PaperType.a4 : Excel.PaperType.letter;
        layout.zoom = { horizontalFitToPages: 1, verticalFitToPages: 0 };
        layout.setPrintArea(rangeOf(context, area));
        await context.sync();
      }),
  };
}

/** The Excel adapter on office-addin-mock: unloaded or unsynced reads come back as error strings there, so they are caught. */
import { OfficeMockObject } from 'office-addin-mock';
import { createExcelPort, sheetOf } from '../../taskpane/excel-port';
import { brightness, themeFrom, toExcel } from '../../taskpane/excel-values';
import type { Area, Selection } from '../../taskpane/port';

// the mock needs of this package only a list of host names; the package itself cannot be loaded as CommonJS
jest.mock('office-addin-manifest', () => ({ OfficeApp: { Excel: 'excel' }, getOfficeApps: () => ['excel'] }));

type Cells = unknown[][];

/** A mocked range at a place of the sheet: values and formulas as Excel gives them. */
function range(
  row: number,
  column: number,
  values: Cells,
  formulas: Cells = values,
): Record<string, unknown> {
  const rows = values.length;
  const columns = values[0]?.length ?? 1;
  const made: Record<string, unknown> = {
    isNullObject: false,
    address: "'Roof beams'!B4:I11",
    rowIndex: row,
    columnIndex: column,
    rowCount: rows,
    columnCount: columns,
    values,
    formulas,
  };
  made['getUsedRangeOrNullObject'] = () => made['used'] ?? made['self'];
  return made;
}

interface Handlers {
  selection?: () => Promise<void>;
  changed?: (event: { source: string }) => Promise<void>;
}

let handlers: Handlers;
let asked: [number, number, number, number][];
let inserted: string[];

/** Builds the host: one sheet "Beams" whose range at any index is `used`; API version tells what is supported. */
function host(
  version: string,
  used: Record<string, unknown>,
  extra: Record<string, unknown> = {},
): OfficeMockObject {
  handlers = {};
  asked = [];
  inserted = [];
  const context = new OfficeMockObject({
    workbook: {
      worksheets: {
        items: [{ name: 'Beams' }, { name: 'Record' }],
        onChanged: { add: (run: Handlers['changed']) => ((handlers.changed = run), {}) },
        onCalculated: { add: () => ({}) },
        getActiveWorksheet: () => sheet,
        getItem: () => sheet,
        getItemOrNullObject: () => sheet,
      },
      onSelectionChanged: { add: (run: Handlers['selection']) => ((handlers.selection = run), {}) },
      application: { decimalSeparator: ',', thousandsSeparator: '.' },
      ...extra,
    },
  }) as unknown as Record<string, unknown>;
  const usedRange = new OfficeMockObject(used) as unknown as Record<string, unknown>;
  used['self'] = usedRange;
  usedRange['getUsedRangeOrNullObject'] = () => usedRange;
  usedRange['insert'] = (shift: string) => inserted.push(shift);
  const sheet = new OfficeMockObject({
    name: 'Beams',
    isNullObject: false,
  }) as unknown as Record<string, unknown>;
  sheet['getRangeByIndexes'] = (...indexes: [number, number, number, number]) => (
    asked.push(indexes),
    usedRange
  );
  sheet['getUsedRangeOrNullObject'] = () => usedRange;
  sheet['names'] = new OfficeMockObject({ getItemOrNullObject: () => missing });
  const missing = new OfficeMockObject({ isNullObject: true, type: '', value: '', formula: '' });
  const workbook = context['workbook'] as Record<string, unknown>;
  workbook['getSelectedRange'] = () => usedRange;
  workbook['getActiveCell'] = () => usedRange;
  const later: OfficeMockObject[] = [usedRange, sheet, missing] as never;
  const sync = async (): Promise<void> => {
    await (context as unknown as OfficeMockObject)['syncAll']?.();
    for (const object of later) await object.sync();
  };
  const real = (context as unknown as OfficeMockObject).sync.bind(context);
  context['sync'] = async () => {
    await real();
    await sync();
  };
  Object.assign(globalThis, {
    Excel: {
      run: (_options: unknown, work: (context: unknown) => Promise<unknown>) => work(context),
      NamedItemType: { range: 'Range' },
      EventSource: { local: 'Local', remote: 'Remote' },
      InsertShiftDirection: { down: 'Down' },
    },
    Office: {
      context: {
        requirements: {
          isSetSupported: (_set: string, wanted: string) =>
            Number(wanted.slice(2)) <= Number(version.slice(2)),
        },
        officeTheme: { bodyBackgroundColor: '#1e1e1e', bodyForegroundColor: '#f0f0f0' },
      },
    },
  });
  return usedRange as unknown as OfficeMockObject;
}

const AREA: Area = { sheet: 'Beams', row: 3, column: 1, rows: 8, columns: 8 };

test('read: the used part with its place, literals apart from formulas', async () => {
  host(
    '1.12',
    range(
      3,
      1,
      [
        ['pin', 0],
        ['point', 12],
      ],
      [
        ['pin', 0],
        ['point', '=3*4'],
      ],
    ),
  );
  const [block] = await createExcelPort().read([AREA]);
  expect(asked).toEqual([[3, 1, 8, 8]]);
  expect(block).toEqual({
    area: { sheet: 'Beams', row: 3, column: 1, rows: 2, columns: 2 },
    values: [
      ['pin', 0],
      ['point', 12],
    ],
    formulas: [
      ['', ''],
      ['', '=3*4'],
    ],
  });
});

test('read: nothing used there is null', async () => {
  host('1.12', { ...range(3, 1, [[null]]), isNullObject: true });
  expect(await createExcelPort().read([AREA])).toEqual([null]);
});

test('write: filled cells that are not ours stand in the way and are named; nothing is written', async () => {
  const used = host('1.12', range(3, 1, [['mine', 7]]));
  const port = createExcelPort();
  const area = { ...AREA, rows: 1, columns: 2 };
  expect(await port.write([{ area, cells: [['a', 'b']] }])).toEqual({
    written: false,
    occupied: ['B4', 'C4'],
  });
  expect(await port.write([{ area, cells: [['a', undefined]] }])).toEqual({
    written: false,
    occupied: ['B4'],
  });
  expect(await port.write([{ area, cells: [['a', 'b']] }], { own: [area] })).toEqual({ written: true });
  expect((used as unknown as { formulas: unknown }).formulas).toEqual([['a', 'b']]);
});

test('write: confirmed, with text that Excel would read as something else', async () => {
  const used = host('1.12', range(3, 1, [['mine', 7, 1, 2]]));
  const area = { ...AREA, rows: 1, columns: 4 };
  const result = await createExcelPort().write(
    [{ area, cells: [['12\'-6"', { formula: '=A1' }, null, undefined]] }],
    {
      confirmed: true,
    },
  );
  expect(result).toEqual({ written: true });
  expect((used as unknown as { formulas: unknown }).formulas).toEqual([["'12'-6\"", '=A1', '', null]]);
});

test('abilities follow the requirement sets of the host', () => {
  host('1.4', range(0, 0, [[1]]));
  const old = createExcelPort();
  expect([old.can('tables'), old.can('insert'), old.can('pictures'), old.can('undoGroup')]).toEqual([
    true,
    true,
    false,
    false,
  ]);
  host('1.20', range(0, 0, [[1]]));
  expect(createExcelPort().can('undoGroup')).toBe(true);
});

test('separators: of the host where it tells them, plain ones before that', async () => {
  host('1.11', range(0, 0, [[1]]));
  expect(await createExcelPort().separators()).toEqual({ decimal: ',', group: '.', list: ';' });
  host('1.10', range(0, 0, [[1]]));
  expect(await createExcelPort().separators()).toEqual({ decimal: '.', group: ',', list: ',' });
});

test('selection, and its event', async () => {
  host('1.12', range(5, 2, [[1]]));
  const port = createExcelPort();
  const here: Selection = {
    area: { sheet: 'Beams', row: 5, column: 2, rows: 1, columns: 1 },
    active: { sheet: 'Beams', row: 5, column: 2, rows: 1, columns: 1 },
  };
  expect(await port.selection()).toEqual(here);
  const heard: Selection[] = [];
  port.onSelection((selection) => heard.push(selection));
  await Promise.resolve();
  await handlers.selection?.();
  expect(heard).toEqual([here]);
});

test('changes of co-authors are not ours to follow', async () => {
  host('1.12', range(0, 0, [[1]]));
  let heard = 0;
  createExcelPort().onChange(() => heard++);
  await Promise.resolve();
  await handlers.changed?.({ source: 'Remote' });
  expect(heard).toBe(0);
  await handlers.changed?.({ source: 'Local' });
  expect(heard).toBe(1);
});

test('used part, sheet names, occupied cells, room made by moving down', async () => {
  host(
    '1.12',
    range(3, 1, [
      ['pin', null],
      [null, 4],
    ]),
  );
  const port = createExcelPort();
  expect(await port.used('Beams')).toEqual({ sheet: 'Beams', row: 3, column: 1, rows: 2, columns: 2 });
  expect(await port.sheetNames()).toEqual(['Beams', 'Record']);
  expect(await port.occupied(AREA)).toEqual(['B4', 'C5']);
  await port.insert(AREA);
  expect(inserted).toEqual(['Down']);
});

test('the sheet of an address', () => {
  expect(sheetOf("'Anna''s roof'!B4:I11")).toBe("Anna's roof");
  expect(sheetOf('Beams!B4')).toBe('Beams');
});

test.each([
  ['pin', 'pin'],
  ['kN/m', 'kN/m'],
  ['span/360', 'span/360'],
  ['1/2', "'1/2"],
  ['=1+1', "'=1+1"],
  ['true', "'true"],
  ['May 5', "'May 5"],
  ["'quoted", "''quoted"],
  ['', ''],
])('text %p is typed as %p', (text, typed) => {
  expect(toExcel(text)).toBe(typed);
});

test('the theme is read from the host; one whose text is hard to read is not taken', () => {
  expect(themeFrom('#1e1e1e', '#f0f0f0', false)).toEqual({
    dark: true,
    background: '#1e1e1e',
    text: '#f0f0f0',
  });
  expect(themeFrom('#ffffff', '#999999', true)).toEqual({ dark: false, background: null, text: null });
  expect(themeFrom(undefined, undefined, true)).toEqual({ dark: true, background: null, text: null });
  expect(brightness('ffffff')).toBeCloseTo(1, 12);
});

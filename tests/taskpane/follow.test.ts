import { shortAddress } from '../../taskpane/address';
import { Follower, type Found, type Subject } from '../../taskpane/follow';
import { MemoryPort } from '../helpers/memory-port';

const ROWS = [
  ['Item', 'At', 'To', 'Value', 'Unit', 'Case'],
  ['units', 'kN', 'm', 'mm'],
  ['pin', 0],
  ['pin', 6],
  ['E', null, null, 210, 'GPa'],
  ['I', null, null, 8400, 'cm4'],
  ['uniform', 0, 6, 12, 'kN/m', 'Q'],
];

async function at(port: MemoryPort, cell: string, sheet?: string, index?: number): Promise<Found> {
  port.selectCell(cell, sheet);
  const selection = await port.selection();
  if (!selection) throw new Error('nothing selected');
  return new Follower(port).follow(selection, index);
}
function subject(found: Found): Subject {
  if (found.kind !== 'subject') throw new Error(`no subject: ${found.kind}`);
  return found.subject;
}
const where = (one: Subject): string => (one.source ? shortAddress(one.source) : '');

test('a formula in the selected cell: range, x, combination and the cells read', async () => {
  const port = new MemoryPort();
  port.fill('B4', ROWS);
  port.fill('L2', [['=SPANROW.DEFLECTION(B4:G10, M2, "1.5 Q")', 3.6]]);
  const one = subject(await at(port, 'L2'));
  expect([one.via, where(one), one.quantity]).toEqual(['formula', 'B4:G10', 'deflection']);
  expect(one.x).toEqual([3.6]);
  expect(one.args.combination).toBe('1.5 Q');
  expect(one.read.map(shortAddress)).toEqual(['B4:G10', 'M2']);
});

test('the second of several calls', async () => {
  const port = new MemoryPort();
  port.fill('B4', ROWS);
  port.fill('L2', [['=SPANROW.USED(B4:G10,"span/250")+SPANROW.MOMENT(B4:G10,2)']]);
  const one = subject(await at(port, 'L2', undefined, 1));
  expect([one.quantity, one.x[0], one.limit]).toEqual(['moment', 2, null]);
  expect(subject(await at(port, 'L2')).limit).toBe('span/250');
});

test('a template: names and values of that row', async () => {
  const port = new MemoryPort('Joists', 'Template');
  port.fill('A1', [['pin 0; pin L; uniform 0 L w; EI value=100']], 'Template');
  port.fill('A1', [
    ['L', 'w', ''],
    [4, 3, '=SPANROW.MAXDEFLECTION(Template!$A$1,,$A$1:$B$1,A2:B2)'],
  ]);
  const one = subject(await at(port, 'C2'));
  expect(one.args.names).toEqual([['L', 'w']]);
  expect(one.args.values).toEqual([[4, 3]]);
  expect(one.source?.sheet).toBe('Template');
  // a cell among the values of a member shows that member
  expect(subject(await at(port, 'B2')).args.values).toEqual([[4, 3]]);
});

test('a cell inside the rows follows the formula that uses them, without its x', async () => {
  const port = new MemoryPort();
  port.fill('B4', ROWS);
  port.fill('L2', [['=SPANROW.DEFLECTION(B4:G10, 3.6)']]);
  const one = subject(await at(port, 'E9'));
  expect([one.via, where(one), one.x.length]).toEqual(['rows', 'B4:G10', 0]);
});

test('a cell inside a spilled result follows its formula', async () => {
  const port = new MemoryPort();
  port.fill('B4', ROWS);
  port.fill('L2', [['=SPANROW.REACTIONS(B4:G10)'], ['at', 'force'], [0, 36]]);
  port.spills.set('Sheet1!L2', port.area('L2:M4'));
  expect(subject(await at(port, 'M4'))).toMatchObject({ via: 'spill' });
});

test('rows that nobody asks yet: with a heading, and without', async () => {
  const port = new MemoryPort();
  port.fill('B4', ROWS);
  port.fill('B20', ROWS.slice(1));
  const headed = subject(await at(port, 'C6'));
  expect([headed.via, where(headed)]).toEqual(['found', 'B4:G10']);
  const bare = subject(await at(port, 'D24'));
  expect([bare.via, where(bare)]).toEqual(['found', 'B20:G25']);
});

test('the rest of the sheet under the rows is no part of them', async () => {
  const port = new MemoryPort();
  port.fill('B4', ROWS);
  port.fill('B12', [['Results'], ['Largest deflection', null, null, 7]]);
  expect(where(subject(await at(port, 'D6')))).toBe('B4:G10');
  expect((await at(port, 'D12')).kind).not.toBe('subject');
  // a blank row between items is: blank rows are skipped
  port.fill('B12', [
    ['point', 2, null, 5, 'kN'],
    [null, null, null, null],
  ]);
  expect(where(subject(await at(port, 'D6')))).toBe('B4:G12');
});

test('rows beside other cells are not mistaken for them; a lone word is no beam', async () => {
  const port = new MemoryPort();
  port.fill('A1', [['pin', 'code', 1234]]);
  port.fill('A3', [
    ['Name', 'Amount'],
    ['bolts', 7],
  ]);
  expect(await at(port, 'A1')).toEqual({ kind: 'nothing' });
  expect(await at(port, 'B4')).toEqual({ kind: 'nothing' });
  expect(await at(port, 'Z99')).toEqual({ kind: 'nothing' });
});

test('an argument that is worked out by a function is said to be out of reach', async () => {
  const port = new MemoryPort();
  port.fill('L2', [['=SPANROW.USED(OFFSET(B4,0,0,7,6))']]);
  expect(await at(port, 'L2')).toMatchObject({
    kind: 'lost',
    reason: { reason: 'function', what: 'OFFSET' },
  });
});

test('a name, a table with its heading, and text in the formula', async () => {
  const port = new MemoryPort('Sheet1', 'Data');
  port.fill('B4', ROWS, 'Data');
  port.names.set('canopy', { kind: 'area', area: port.area('B4:G10', 'Data') });
  port.tables.set('rows', {
    name: 'Rows',
    area: port.area('B4:G10', 'Data'),
    header: true,
    totals: false,
    columns: ['Item', 'At', 'To', 'Value', 'Unit', 'Case'],
  });
  port.fill('A1', [
    ['=SPANROW.USED(Canopy)'],
    ['=SPANROW.USED(Rows[#All])'],
    ['=SPANROW.USED("pin 0; pin 6; uniform 0 6 1; EI value=1")'],
  ]);
  expect(where(subject(await at(port, 'A1')))).toBe('B4:G10');
  expect(where(subject(await at(port, 'A2')))).toBe('B4:G10');
  const text = subject(await at(port, 'A3'));
  expect([text.source, text.cells.length]).toEqual([null, 1]);
});

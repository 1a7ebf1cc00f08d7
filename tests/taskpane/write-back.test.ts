import { insertRow, makeDraft, moveRow, setCell, type Draft, type Row } from '../../taskpane/rows/draft';
import { writeBack } from '../../taskpane/rows/write-back';
import { MemoryPort } from '../helpers/memory-port';

const ROWS = [
  ['pin', 0, null],
  ['pin', 6, null],
  ['point', 3, 12],
];
const HINGE: Row = ['hinge', 2, null].map((value) => ({ value, formula: '' }));

async function setUp(): Promise<{ port: MemoryPort; before: Draft }> {
  const port = new MemoryPort();
  port.fill('B4', ROWS);
  port.fill('F1', [['=SPANROW.USED(B4:D6)']]);
  port.selectCell('F1');
  const [block] = await port.read([port.area('B4:D6')]);
  if (!block) throw new Error('nothing read');
  return { port, before: makeDraft(block.values, block.formulas, 0) };
}
const never = (): Promise<boolean> => Promise.reject(new Error('the person was asked'));
const column = (port: MemoryPort, letter: string, from: number, to: number): unknown[] =>
  Array.from({ length: to - from + 1 }, (_, i) => port.valueAt(`${letter}${from + i}`));

test('a change inside the range needs no question', async () => {
  const { port, before } = await setUp();
  const after = moveRow(setCell(before, 2, 2, { value: 20, formula: '' }), 2, 0);
  const outcome = await writeBack(port, port.area('B4:D6'), before, after, never);
  expect(outcome.kind).toBe('written');
  expect(column(port, 'B', 4, 6)).toEqual(['point', 'pin', 'pin']);
  expect(port.valueAt('D4')).toBe(20);
});

test('a full range grows inside, so that the formula follows, and nothing below is asked about when nothing is there', async () => {
  const { port, before } = await setUp();
  const outcome = await writeBack(port, port.area('B4:D6'), before, insertRow(before, 1, HINGE), never);
  expect(outcome).toMatchObject({ kind: 'written', source: { rows: 4 } });
  expect(column(port, 'B', 4, 7)).toEqual(['pin', 'hinge', 'pin', 'point']);
  expect(port.formulaAt('F1')).toBe('=SPANROW.USED(B4:D7)');
});

test('cells below are named before they move; no leaves everything as it was', async () => {
  const { port, before } = await setUp();
  port.fill('C8', [['checked', 'by']]);
  const asked: string[] = [];
  const answer = (reply: boolean) => (question: string) => {
    asked.push(question);
    return Promise.resolve(reply);
  };
  const no = await writeBack(port, port.area('B4:D6'), before, insertRow(before, 3, HINGE), answer(false));
  expect(no.kind).toBe('cancelled');
  expect(asked[0]).toContain('C8:D8');
  expect([column(port, 'B', 4, 7), port.valueAt('C8')]).toEqual([['pin', 'pin', 'point', null], 'checked']);
  await writeBack(port, port.area('B4:D6'), before, insertRow(before, 3, HINGE), answer(true));
  expect(column(port, 'B', 4, 7)).toEqual(['pin', 'pin', 'point', 'hinge']);
  expect([port.valueAt('C9'), port.valueAt('C8')]).toEqual(['checked', null]);
});

test('where the host cannot insert, a filled cell below is replaced only after a yes', async () => {
  const { port, before } = await setUp();
  port.abilities.delete('insert');
  port.fill('B7', [['total']]);
  const after = insertRow(before, 3, HINGE);
  expect((await writeBack(port, port.area('B4:D6'), before, after, () => Promise.resolve(false))).kind).toBe(
    'cancelled',
  );
  expect(port.valueAt('B7')).toBe('total');
  await writeBack(port, port.area('B4:D6'), before, after, () => Promise.resolve(true));
  expect(port.valueAt('B7')).toBe('hinge');
});

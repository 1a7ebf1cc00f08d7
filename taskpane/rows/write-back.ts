/**
 * Brings a step of the editor to the sheet. Cells of the range are its own; where the range has to grow, room is made inside it
 * so that every formula that uses it follows, and nothing that stands below moves or is replaced unless the person agrees.
 */
import type { Area, CellInput, WorkbookPort } from '../port';
import { nameCells, shortAddress } from '../address';
import { texts } from '../texts';
import { difference, overflows, type Draft } from './draft';

export type AskPerson = (question: string, yes: string) => Promise<boolean>;

export type Outcome =
  | { readonly kind: 'written'; readonly source: Area }
  | { readonly kind: 'cancelled' }
  | { readonly kind: 'nothing' };

/** Cells below the range, in its columns, that hold something. */
async function below(port: WorkbookPort, source: Area): Promise<readonly string[]> {
  const used = await port.used(source.sheet);
  const first = source.row + source.rows;
  const last = used ? used.row + used.rows : first;
  if (last <= first) return [];
  return port.occupied({ ...source, row: first, rows: last - first });
}

export async function writeBack(
  port: WorkbookPort,
  source: Area,
  before: Draft,
  after: Draft,
  ask: AskPerson,
): Promise<Outcome> {
  const cells = difference(before, after, source.row);
  if (!overflows(after, source.rows)) {
    const own = cells.slice(0, source.rows);
    if (!own.some((row) => row.some((cell) => cell !== undefined))) return { kind: 'nothing' };
    await port.write([{ area: source, cells: own }], { own: [source], label: texts.rows.undoLabel });
    return { kind: 'written', source };
  }
  const more = after.capacity - source.rows;
  const grown = { ...source, rows: after.capacity };
  const name = shortAddress(source);
  if (port.can('insert') && source.rows >= 2) {
    const moved = await below(port, source);
    if (
      moved.length > 0 &&
      !(await ask(texts.rows.moveDown(name, nameCells(moved), more), texts.rows.moveDownYes))
    ) {
      return { kind: 'cancelled' };
    }
    // before the last row: a range grows only when the new cells come inside it
    const last = { ...source, row: source.row + source.rows - 1, rows: more };
    await port.insert(last);
    await port.write([{ area: grown, cells: whole(cells, before, after, source) }], {
      own: [grown],
      label: texts.rows.undoLabel,
    });
    return { kind: 'written', source: grown };
  }
  const result = await port.write([{ area: grown, cells }], { own: [source], label: texts.rows.undoLabel });
  if (!result.written) {
    if (!(await ask(texts.rows.replaceBelow(name, nameCells(result.occupied)), texts.rows.replaceYes))) {
      return { kind: 'cancelled' };
    }
    await port.write([{ area: grown, cells }], { confirmed: true, label: texts.rows.undoLabel });
  }
  return { kind: 'written', source: grown };
}

/**
 * After room has been made before the last row, that row stands lower than the draft before knew: it and the new cells are
 * written in full.
 */
function whole(
  cells: (CellInput | undefined)[][],
  before: Draft,
  after: Draft,
  source: Area,
): (CellInput | undefined)[][] {
  const from = source.rows - 1;
  const emptied: Draft = {
    ...before,
    rows: before.rows.filter((_, i) => (before.slots[i] ?? 0) < from),
    slots: before.slots.filter((slot) => slot < from),
  };
  const rest = difference({ ...emptied, capacity: after.capacity }, after, source.row, before);
  return rest.map((row, slot) => (slot < from ? (cells[slot] ?? row) : row.map((cell) => cell ?? null)));
}

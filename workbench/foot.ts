/** The status line: the selected cell with its full value, or the sentence behind its error; at the right the last calculation. */
import type { Book } from './book';
import type { Signals } from './signals';
import { cellName } from './xlsx/address';

export function wireFoot(foot: HTMLElement, book: Book, signals: Signals): void {
  const cell = document.createElement('div');
  cell.className = 'cell';
  const spent = document.createElement('div');
  spent.className = 'spent';
  spent.setAttribute('aria-live', 'off');
  foot.append(cell, spent);

  function showCell(): void {
    const selected = signals.selection();
    const sheet = selected === null ? null : book.sheet(selected.sheet);
    if (selected === null || sheet === null) return;
    const { row, column } = selected.active;
    const message = book.messageAt(sheet, row, column);
    const value = book.valueAt(sheet, row, column);
    const address = document.createElement('b');
    address.textContent = cellName(row, column);
    cell.classList.toggle('error', message !== null);
    cell.replaceChildren(address, message ?? (value === null ? '' : words(value)));
  }

  function showSpent(): void {
    const { calls, milliseconds } = book.host.spent;
    if (calls === 0) return;
    spent.textContent = `${calls} SPANROW ${calls === 1 ? 'call' : 'calls'} in ${milliseconds.toFixed(milliseconds < 10 ? 1 : 0)} ms`;
    book.host.spent = { calls: 0, milliseconds: 0 };
  }

  signals.onSelection(showCell);
  signals.onChange(() => {
    showCell();
    showSpent();
  });
}

/** Numbers in full, so that a rounded display can be checked. */
function words(value: number | string | boolean): string {
  return typeof value === 'boolean' ? String(value).toUpperCase() : String(value);
}

/**
 * The table of a beam's rows: as quick as a sheet. Typing previews at once (sketch and messages), leaving a cell or Enter
 * commits the step. The editor knows nothing of the sheet: it reports drafts, the pane writes them.
 */
import type { ColumnName } from '../engine';
import { h, put } from '../dom';
import { exactNumber, readNumber } from '../numbers';
import type { Separators } from '../port';
import { texts } from '../texts';
import { basicOf, textOf } from '../values';
import { attachCompletion, type Completion } from './completion';
import {
  adopt,
  duplicateRow,
  EMPTY,
  History,
  insertRow,
  moveRow,
  removeRow,
  sameDraft,
  setCell,
  type Cell,
  type Draft,
} from './draft';
import { guideOf, matchItems, NUMERIC, unitsFor, type UnitSystem } from './guide';

export interface EditorEvents {
  /** the draft as it would be if the present typing were committed */
  preview(draft: Draft): void;
  /** a finished step, from the draft before it; the pane writes the difference */
  commit(before: Draft, after: Draft): void;
  /** the row that has the focus, as a slot; null: none */
  row(slot: number | null): void;
}

export interface Sheet {
  readonly draft: Draft;
  /** columns of the range in order; null for a column of the person's own */
  readonly columns: readonly (ColumnName | null)[];
  readonly system: UnitSystem | null;
  readonly cases: readonly string[];
  readonly separators: Separators;
  readonly readOnly: boolean;
}

/** Columns that are shown only when a row uses them, because a pane is narrow. */
const RARE: ReadonlySet<ColumnName> = new Set<ColumnName>(['End value', 'Note']);

interface Place {
  readonly row: number;
  readonly column: number;
}

export class RowsEditor {
  readonly element: HTMLElement;
  private readonly body = h('tbody');
  private readonly head = h('tr');
  private readonly layer: HTMLElement;
  private readonly table: HTMLElement;
  private readonly buttons: Readonly<
    Record<'add' | 'copy' | 'up' | 'down' | 'remove' | 'undo' | 'redo', HTMLButtonElement>
  >;
  private sheet: Sheet | null = null;
  private history: History | null = null;
  private shown: number[] = [];
  private current: Place | null = null;
  private messages: ReadonlyMap<number, readonly string[]> = new Map();
  /** show also the columns that no row uses */
  private all = false;
  private readonly allLine: HTMLElement;
  private typed: { place: Place; text: string } | null = null;

  constructor(private readonly events: EditorEvents) {
    const button = (key: keyof typeof texts.rows.actions, run: () => void): HTMLButtonElement => {
      const { label, hint } = texts.rows.actions[key];
      return h(
        'button',
        { type: 'button', class: 'sp-tool', title: hint, 'aria-label': hint, click: run },
        label,
      );
    };
    this.buttons = {
      add: button('add', () => this.add()),
      copy: button('copy', () => this.copy()),
      up: button('up', () => this.move(-1)),
      down: button('down', () => this.move(1)),
      remove: button('remove', () => this.remove()),
      undo: button('undo', () => this.undo()),
      redo: button('redo', () => this.redo()),
    };
    this.table = h(
      'table',
      { class: 'sp-rows', 'aria-label': texts.rows.table },
      h('thead', null, this.head),
      this.body,
    );
    const all = h('input', { type: 'checkbox' });
    all.addEventListener('change', () => {
      this.all = all.checked;
      this.build();
    });
    this.allLine = h('label', { class: 'sp-choice sp-quiet' }, all, texts.rows.allColumns);
    this.layer = h('div', { class: 'sp-rows-layer' }, h('div', { class: 'sp-rows-scroll' }, this.table));
    this.element = h(
      'div',
      { class: 'sp-editor' },
      h(
        'div',
        { class: 'sp-tools', role: 'toolbar', 'aria-label': texts.rows.toolbar },
        Object.values(this.buttons),
      ),
      this.layer,
      this.allLine,
    );
    this.element.addEventListener('keydown', (event) => this.shortcut(event));
    this.table.addEventListener('paste', (event) => this.paste(event));
    this.table.addEventListener('focusout', (event) => {
      if (!this.element.contains(event.relatedTarget as Node | null)) this.events.row(null);
    });
    this.refresh();
  }

  /** Shows rows as read from the sheet. The same rows again only refresh values; other rows start a new history. */
  show(sheet: Sheet): void {
    const same =
      this.history !== null &&
      this.sheet !== null &&
      sameDraft(this.history.current, sheet.draft) &&
      this.sheet.readOnly === sheet.readOnly &&
      this.sheet.columns.length === sheet.columns.length;
    this.sheet = sheet;
    if (same && this.history) {
      this.history.replace(adopt(this.history.current, sheet.draft));
      this.values();
    } else {
      this.history = new History(sheet.draft);
      this.current = null;
      this.build();
    }
    this.refresh();
  }

  get draft(): Draft | null {
    return this.history?.current ?? null;
  }

  get focused(): boolean {
    return this.layer.contains(document.activeElement);
  }

  /** Messages by slot (physical row of the range). */
  say(messages: ReadonlyMap<number, readonly string[]>): void {
    this.messages = messages;
    this.placeMessages();
  }

  /** A step made elsewhere (dragging in the drawing, a starting point): joins the same history. */
  apply(draft: Draft): void {
    this.step(draft, this.current);
  }

  focusRow(slot: number): void {
    const row = this.history?.current.slots.indexOf(slot) ?? -1;
    if (row >= 0) this.focus({ row, column: this.current?.column ?? this.shown[0] ?? 0 });
  }

  // ---- building

  private build(): void {
    const { sheet } = this;
    if (!sheet || !this.history) return;
    const { rows } = this.history.current;
    const needed = (name: ColumnName | null, index: number): boolean => {
      if (name === null) return false;
      if (this.all || !RARE.has(name)) return true;
      return (
        rows.some((row) => (row[index]?.value ?? '') !== '' || (row[index]?.formula ?? '') !== '') ||
        (name === 'End value' &&
          rows.some((_, row) => guideOf(this.valueIn(row, 'Item'))?.word === 'varying'))
      );
    };
    this.shown = sheet.columns.flatMap((name, index) => (needed(name, index) ? [index] : []));
    const rare = sheet.columns.some((name) => name !== null && RARE.has(name));
    this.allLine.hidden = !rare;
    put(
      this.head,
      h('th', { scope: 'col', class: 'sp-number' }, h('span', { class: 'sp-hidden' }, texts.rows.rowNumber)),
      this.shown.map((index) => {
        const name = sheet.columns[index] ?? 'Item';
        return h('th', { scope: 'col', class: columnClass(name) }, texts.columns[name]);
      }),
    );
    put(
      this.body,
      this.history.current.rows.map((_, row) => this.buildRow(row)),
    );
    this.values();
    this.placeMessages();
  }

  private buildRow(row: number): HTMLElement {
    const sheet = this.sheet as Sheet;
    const slot = this.history?.current.slots[row] ?? 0;
    return h(
      'tr',
      { 'data-row': row },
      h('th', { scope: 'row', class: 'sp-number' }, slot + 1),
      this.shown.map((column) => {
        const name = sheet.columns[column] ?? 'Item';
        const field = h('input', {
          type: 'text',
          class: 'sp-cell',
          autocomplete: 'off',
          spellcheck: 'false',
          'aria-label': texts.rows.cell(slot + 1, texts.columns[name]),
          readonly: sheet.readOnly,
          'data-column': column,
        });
        this.wire(field, name);
        return h('td', { class: columnClass(name) }, field);
      }),
    );
  }

  private wire(field: HTMLInputElement, name: ColumnName): void {
    const here = (): Place => this.placeOf(field);
    let completion: Completion | null = null;
    const words = this.wordsFor(name);
    if (words && !this.sheet?.readOnly) {
      completion = attachCompletion(
        field,
        this.layer,
        texts.rows.choices(texts.columns[name]),
        (typed) => words(typed, here().row),
        () => this.type(field),
      );
    }
    field.addEventListener('focus', () => {
      this.current = here();
      const cell = this.cellAt(this.current);
      field.value = this.editText(cell);
      field.select();
      this.events.row(this.history?.current.slots[this.current.row] ?? null);
      this.refresh();
    });
    field.addEventListener('input', () => {
      this.type(field);
      completion?.refresh();
    });
    field.addEventListener('blur', () => this.finish(field));
    field.addEventListener('keydown', (event) => {
      if (completion?.key(event)) {
        event.preventDefault();
        event.stopPropagation();
        return;
      }
      this.key(event, field);
    });
  }

  private wordsFor(name: ColumnName): ((typed: string, row: number) => readonly string[]) | null {
    const begins = (all: readonly string[], typed: string): string[] =>
      all.filter((word) => word.toLowerCase().startsWith(typed.trim().toLowerCase()));
    if (name === 'Item') return (typed) => matchItems(typed);
    if (name === 'Unit') {
      return (typed, row) => {
        const guide = guideOf(this.valueIn(row, 'Item'));
        return guide ? begins(unitsFor(guide.kind, this.sheet?.system ?? null), typed) : [];
      };
    }
    if (name === 'Case') return (typed) => begins(this.sheet?.cases ?? [], typed);
    return null;
  }

  private valueIn(row: number, name: ColumnName): unknown {
    const column = this.sheet?.columns.indexOf(name) ?? -1;
    if (this.typed && this.typed.place.row === row && this.typed.place.column === column)
      return this.typed.text;
    return this.history?.current.rows[row]?.[column]?.value;
  }

  private placeOf(field: HTMLInputElement): Place {
    const row = Number(field.closest('tr')?.dataset['row'] ?? 0);
    return { row, column: Number(field.dataset['column'] ?? 0) };
  }

  private field(place: Place): HTMLInputElement | null {
    return this.body.querySelector(`tr[data-row="${place.row}"] input[data-column="${place.column}"]`);
  }

  private cellAt(place: Place): Cell {
    return this.history?.current.rows[place.row]?.[place.column] ?? EMPTY;
  }

  /** All inputs to what the draft holds, except the one being typed in. */
  private values(): void {
    const draft = this.history?.current;
    if (!draft) return;
    draft.rows.forEach((row, index) => {
      const guide = guideOf(this.valueIn(index, 'Item'));
      for (const column of this.shown) {
        const field = this.field({ row: index, column });
        if (!field) continue;
        const cell = row[column] ?? EMPTY;
        if (field !== document.activeElement) field.value = this.showText(cell);
        field.classList.toggle('sp-formula', cell.formula !== '');
        field.title = cell.formula;
        const name = this.sheet?.columns[column] ?? 'Item';
        const used = !guide || name === 'Item' || name === 'Note' || guide.uses.includes(name);
        field.classList.toggle('sp-unused', !used);
        const units = name === 'Unit' && guide ? unitsFor(guide.kind, this.sheet?.system ?? null) : [];
        field.placeholder = used && units[0] !== undefined ? units[0] : '';
      }
    });
  }

  private showText(cell: Cell): string {
    const value = basicOf(cell.value);
    if (typeof value === 'number') return exactNumber(Number(value.toPrecision(12)), this.sheet?.separators);
    return textOf(value);
  }

  private editText(cell: Cell): string {
    if (cell.formula !== '') return cell.formula;
    return typeof cell.value === 'number'
      ? exactNumber(cell.value, this.sheet?.separators)
      : this.showText(cell);
  }

  private placeMessages(): void {
    for (const old of Array.from(this.body.querySelectorAll('.sp-row-message'))) old.remove();
    const draft = this.history?.current;
    if (!draft) return;
    draft.slots.forEach((slot, row) => {
      const line = this.body.querySelector(`tr[data-row="${row}"]`);
      const words = this.messages.get(slot) ?? [];
      line?.classList.toggle('sp-wrong', words.length > 0);
      for (const field of Array.from(line?.querySelectorAll('input') ?? [])) {
        field.removeAttribute('aria-describedby');
      }
      if (!line || words.length === 0) return;
      const id = `sp-row-message-${row}`;
      const first = line.querySelector('input');
      first?.setAttribute('aria-describedby', id);
      line.after(
        h(
          'tr',
          { class: 'sp-row-message' },
          h(
            'td',
            { colspan: this.shown.length + 1 },
            h(
              'div',
              { id, class: 'sp-row-words' },
              words.map((word) => h('p', null, word)),
            ),
          ),
        ),
      );
    });
  }

  // ---- typing

  private readCell(text: string, place: Place): Cell {
    const old = this.cellAt(place);
    const name = this.sheet?.columns[place.column] ?? null;
    if (text.startsWith('=')) return { value: old.value, formula: text };
    if (text.trim() === '') return EMPTY;
    // `units kN m mm` has words in At, To and Value; a number is a number wherever it stands but in a note or a case
    const number = name !== null && NUMERIC.has(name) ? readNumber(text, this.sheet?.separators) : null;
    return { value: number ?? text.trim(), formula: '' };
  }

  private type(field: HTMLInputElement): void {
    const place = this.placeOf(field);
    if (!this.history) return;
    this.typed = { place, text: field.value };
    this.events.preview(
      setCell(this.history.current, place.row, place.column, this.readCell(field.value, place)),
    );
  }

  private finish(field: HTMLInputElement): void {
    const place = this.placeOf(field);
    const { typed } = this;
    this.typed = null;
    if (typed && this.history && field.isConnected) {
      const cell = this.readCell(typed.text, place);
      const next = setCell(this.history.current, place.row, place.column, cell);
      if (!sameDraft(next, this.history.current)) {
        this.step(next, null);
        return;
      }
    }
    field.value = this.showText(this.cellAt(place));
  }

  private step(next: Draft, focus: Place | null): void {
    if (!this.history || this.sheet?.readOnly) return;
    const before = this.history.current;
    if (sameDraft(before, next) && before.rows.length === next.rows.length) return;
    this.history.push(next);
    this.after(before, next, focus);
  }

  private after(before: Draft, next: Draft, focus: Place | null): void {
    const varied =
      this.sheet?.columns.some(
        (name, i) =>
          name !== null &&
          RARE.has(name) &&
          !this.shown.includes(i) &&
          next.rows.some(
            (row) =>
              guideOf(row[this.sheet?.columns.indexOf('Item') ?? 0]?.value)?.word === 'varying' &&
              name === 'End value',
          ),
      ) ?? false;
    const structural =
      before.rows.length !== next.rows.length || before.slots.some((slot, i) => slot !== next.slots[i]);
    if (structural || varied) this.build();
    else this.values();
    this.refresh();
    if (focus) this.focus(focus);
    this.events.commit(before, next);
  }

  /** The pane could not write the step: it goes, and its redo with it. */
  takeBack(): void {
    if (!this.history) return;
    this.history = new History(this.history.undo());
    this.build();
    this.refresh();
    this.events.preview(this.history.current);
  }

  // ---- actions

  private rowIndex(): number {
    const count = this.history?.current.rows.length ?? 0;
    return Math.min(this.current?.row ?? count - 1, count - 1);
  }

  private commitTyping(): void {
    const active = document.activeElement;
    if (active instanceof HTMLInputElement && this.layer.contains(active) && this.typed) this.finish(active);
  }

  add(): void {
    this.commitTyping();
    if (!this.history) return;
    const row = this.rowIndex() + 1;
    this.step(insertRow(this.history.current, row), { row, column: this.shown[0] ?? 0 });
  }

  copy(): void {
    this.commitTyping();
    if (!this.history) return;
    const row = this.rowIndex();
    this.step(duplicateRow(this.history.current, row), {
      row: row + 1,
      column: this.current?.column ?? this.shown[0] ?? 0,
    });
  }

  move(by: -1 | 1): void {
    this.commitTyping();
    if (!this.history) return;
    const row = this.rowIndex();
    const to = row + by;
    if (to < 0 || to >= this.history.current.rows.length) return;
    const column = this.current?.column ?? this.shown[0] ?? 0;
    this.current = { row: to, column };
    this.step(moveRow(this.history.current, row, to), { row: to, column });
  }

  remove(): void {
    if (!this.history || this.history.current.rows.length === 0) return;
    this.typed = null;
    const row = this.rowIndex();
    const left = this.history.current.rows.length - 1;
    const focus =
      left > 0 ? { row: Math.min(row, left - 1), column: this.current?.column ?? this.shown[0] ?? 0 } : null;
    this.current = focus;
    this.step(removeRow(this.history.current, row), focus);
  }

  undo(): void {
    this.commitTyping();
    if (!this.history?.canUndo) return;
    const before = this.history.current;
    this.after(before, this.history.undo(), this.current);
  }

  redo(): void {
    if (!this.history?.canRedo) return;
    const before = this.history.current;
    this.after(before, this.history.redo(), this.current);
  }

  private refresh(): void {
    const frozen = !this.sheet || this.sheet.readOnly;
    const count = this.history?.current.rows.length ?? 0;
    const row = this.rowIndex();
    const set = (button: HTMLButtonElement, off: boolean): void => {
      button.disabled = off;
    };
    set(this.buttons.add, frozen);
    set(this.buttons.copy, frozen || count === 0);
    set(this.buttons.up, frozen || row <= 0);
    set(this.buttons.down, frozen || row >= count - 1);
    set(this.buttons.remove, frozen || count === 0);
    set(this.buttons.undo, frozen || !this.history?.canUndo);
    set(this.buttons.redo, frozen || !this.history?.canRedo);
  }

  // ---- keys

  private focus(place: Place): void {
    const field = this.field(place);
    if (!field) return;
    this.current = place;
    field.focus();
    field.select();
  }

  private key(event: KeyboardEvent, field: HTMLInputElement): void {
    const { row, column } = this.placeOf(field);
    const count = this.history?.current.rows.length ?? 0;
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    switch (event.key) {
      case 'Enter': {
        event.preventDefault();
        const to = row + (event.shiftKey ? -1 : 1);
        if (to >= count && !event.shiftKey) {
          this.finish(field);
          // Enter on the last row that holds something goes on with a new one, as a sheet would
          const filled = this.history?.current.rows[row]?.some(
            (cell) => cell.value !== null && cell.value !== '',
          );
          if (filled && !this.sheet?.readOnly) this.add();
        } else this.focus({ row: Math.max(0, to), column });
        return;
      }
      case 'ArrowDown':
      case 'ArrowUp': {
        const to = row + (event.key === 'ArrowDown' ? 1 : -1);
        if (to < 0 || to >= count) return;
        event.preventDefault();
        this.focus({ row: to, column });
        return;
      }
      case 'Escape':
        if (!this.typed) return;
        event.preventDefault();
        this.typed = null;
        field.value = this.editText(this.cellAt({ row, column }));
        field.select();
        if (this.history) this.events.preview(this.history.current);
    }
  }

  private shortcut(event: KeyboardEvent): void {
    const control = event.ctrlKey || event.metaKey;
    const key = event.key.toLowerCase();
    let run: (() => void) | null = null;
    if (control && !event.altKey && key === 'z' && !event.shiftKey)
      run = this.typed ? null : () => this.undo();
    else if (control && (key === 'y' || (key === 'z' && event.shiftKey))) run = () => this.redo();
    else if (event.altKey && !control) {
      if (event.key === 'ArrowUp') run = () => this.move(-1);
      else if (event.key === 'ArrowDown') run = () => this.move(1);
      else if (event.key === 'Insert') run = () => this.add();
      else if (event.key === 'Delete') run = () => this.remove();
    }
    if (!run) return;
    event.preventDefault();
    event.stopPropagation();
    run();
  }

  /** A block of cells from a sheet: tabs and line breaks. Fills from the focused cell to the right and down, adding rows. */
  private paste(event: ClipboardEvent): void {
    const text = event.clipboardData?.getData('text/plain') ?? '';
    if (!/[\t\n]/.test(text.trim()) || !this.history || !this.current || this.sheet?.readOnly) return;
    event.preventDefault();
    this.typed = null;
    const lines = text.replace(/\r\n?/g, '\n').replace(/\n$/, '').split('\n');
    const start = this.current;
    const first = this.shown.indexOf(start.column);
    let draft = this.history.current;
    lines.forEach((line, i) => {
      const row = start.row + i;
      if (row >= draft.rows.length) draft = insertRow(draft, row);
      line.split('\t').forEach((word, j) => {
        const column = this.shown[first + j];
        if (column === undefined) return;
        draft = setCell(draft, row, column, this.readCell(unquote(word), { row, column }));
      });
    });
    this.step(draft, start);
  }
}

/** A copied cell with line breaks or quotes comes quoted. */
function unquote(word: string): string {
  return /^".*"$/s.test(word) && word.includes('""') ? word.slice(1, -1).replace(/""/g, '"') : word;
}

function columnClass(name: ColumnName): string {
  return `sp-col sp-col-${name.toLowerCase().replace(' ', '-')}`;
}

/**
 * The table of the editor as elements: one input per cell, messages under their rows, completion under the inputs. It shows a draft
 * and reports what the person does; it decides nothing.
 */
import type { ColumnName } from '../engine';
import { h, put } from '../dom';
import { exactNumber, readNumber } from '../numbers';
import type { Separators } from '../port';
import { texts } from '../texts';
import { basicOf, textOf } from '../values';
import { attachCompletion, type Completion } from './completion';
import { EMPTY, type Cell, type Draft } from './draft';
import { guideOf, matchItems, NUMERIC, unitsFor, type ItemGuide, type UnitSystem } from './guide';

export interface Sheet {
  readonly draft: Draft;
  /** columns of the range in order; null for a column of the person's own */
  readonly columns: readonly (ColumnName | null)[];
  readonly system: UnitSystem | null;
  readonly cases: readonly string[];
  readonly separators: Separators;
  readonly readOnly: boolean;
}

export interface Place {
  readonly row: number;
  readonly column: number;
}

export interface GridEvents {
  focused(place: Place): void;
  /** text in an input has changed */
  typed(place: Place, text: string): void;
  /** the input is left; `next` is the cell that gets the focus, if one does */
  left(place: Place, next: Place | null): void;
  key(event: KeyboardEvent, place: Place): void;
}

/** Columns that are shown only when a row uses them, because a pane is narrow. */
const RARE: ReadonlySet<ColumnName> = new Set<ColumnName>(['End value', 'Note']);

export class RowsGrid {
  readonly element: HTMLElement;
  readonly table: HTMLElement;
  /** the columns shown, as indices of the range */
  shown: readonly number[] = [];
  private readonly body = h('tbody');
  private readonly head = h('tr');
  private readonly layer: HTMLElement;
  private readonly allLine: HTMLElement;
  /** show also the columns that no row uses */
  private all = false;
  private sheet: Sheet | null = null;
  private draft: Draft | null = null;
  private messages: ReadonlyMap<number, readonly string[]> = new Map();
  /** text that is being typed and not in the draft yet */
  private typing: { place: Place; text: string } | null = null;

  constructor(private readonly events: GridEvents) {
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
    this.element = h('div', null, this.layer, this.allLine);
  }

  get focused(): boolean {
    return this.layer.contains(document.activeElement);
  }

  /** Other rows: everything is built anew. */
  show(sheet: Sheet, draft: Draft): void {
    this.sheet = sheet;
    this.draft = draft;
    this.build();
  }

  /** The same rows with other values; gives true when the table had to be built anew because another column is needed. */
  update(sheet: Sheet, draft: Draft): boolean {
    this.sheet = sheet;
    this.draft = draft;
    const columns = this.neededColumns();
    if (columns.length > this.shown.length) {
      this.build();
      return true;
    }
    this.values();
    return false;
  }

  say(messages: ReadonlyMap<number, readonly string[]>): void {
    this.messages = messages;
    this.placeMessages();
  }

  focus(place: Place): boolean {
    const field = this.field(place);
    field?.focus();
    field?.select();
    return field !== null;
  }

  /** What is typed and not committed, and forget it. */
  takeTyping(): { place: Place; text: string } | null {
    const { typing } = this;
    this.typing = null;
    return typing;
  }

  get isTyping(): boolean {
    return this.typing !== null;
  }

  /** The cell as the draft has it, in an input that is being left (or taken back). */
  restore(place: Place, editing: boolean): void {
    const field = this.field(place);
    if (!field) return;
    const cell = this.draft?.rows[place.row]?.[place.column] ?? EMPTY;
    field.value = editing ? this.editText(cell) : this.showText(cell);
    if (editing) field.select();
  }

  /** What a text typed at a place becomes as a cell. */
  readCell(text: string, place: Place): Cell {
    const old = this.draft?.rows[place.row]?.[place.column] ?? EMPTY;
    const name = this.sheet?.columns[place.column] ?? null;
    // the value of a formula is known when the sheet has calculated it
    if (text.startsWith('=')) return { value: old.value, formula: text };
    if (text.trim() === '') return EMPTY;
    // `units kN m mm` has words in At, To and Value; a number is a number wherever it stands but in a note or a case
    const number = name !== null && NUMERIC.has(name) ? readNumber(text, this.sheet?.separators) : null;
    return { value: number ?? text.trim(), formula: '' };
  }

  // ---- building

  private neededColumns(): number[] {
    const { sheet, draft } = this;
    if (!sheet || !draft) return [];
    const filled = (index: number): boolean =>
      draft.rows.some((row) => textOf(row[index]?.value) !== '' || (row[index]?.formula ?? '') !== '');
    const varying = draft.rows.some((_, row) => this.guideAt(row)?.word === 'varying');
    return sheet.columns.flatMap((name, index) => {
      if (name === null) return [];
      const needed = this.all || !RARE.has(name) || filled(index) || (name === 'End value' && varying);
      return needed ? [index] : [];
    });
  }

  private build(): void {
    const { sheet, draft } = this;
    if (!sheet || !draft) return;
    this.shown = this.neededColumns();
    this.allLine.hidden = !sheet.columns.some((name) => name !== null && RARE.has(name));
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
      draft.rows.map((_, row) => this.buildRow(sheet, draft, row)),
    );
    this.values();
    this.placeMessages();
  }

  private buildRow(sheet: Sheet, draft: Draft, row: number): HTMLElement {
    const slot = draft.slots[row] ?? 0;
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
        this.wire(field, name, sheet.readOnly);
        return h('td', { class: columnClass(name) }, field);
      }),
    );
  }

  private wire(field: HTMLInputElement, name: ColumnName, readOnly: boolean): void {
    const type = (): void => {
      const place = placeOf(field);
      this.typing = { place, text: field.value };
      this.events.typed(place, field.value);
    };
    let completion: Completion | null = null;
    const words = this.wordsFor(name);
    if (words && !readOnly) {
      const label = texts.rows.choices(texts.columns[name]);
      completion = attachCompletion(
        field,
        this.layer,
        label,
        (typed) => words(typed, placeOf(field).row),
        type,
      );
    }
    field.addEventListener('focus', () => {
      const place = placeOf(field);
      this.restore(place, true);
      this.events.focused(place);
    });
    field.addEventListener('input', () => {
      type();
      completion?.refresh();
    });
    field.addEventListener('blur', (event) => {
      const next = event.relatedTarget;
      const inTable = next instanceof HTMLInputElement && this.body.contains(next);
      if (field.isConnected) this.events.left(placeOf(field), inTable ? placeOf(next) : null);
    });
    field.addEventListener('keydown', (event) => {
      if (completion?.key(event)) {
        event.preventDefault();
        event.stopPropagation();
        return;
      }
      this.events.key(event, placeOf(field));
    });
  }

  private wordsFor(name: ColumnName): ((typed: string, row: number) => readonly string[]) | null {
    const begins = (all: readonly string[], typed: string): string[] =>
      all.filter((word) => word.toLowerCase().startsWith(typed.trim().toLowerCase()));
    if (name === 'Item') return (typed) => matchItems(typed);
    if (name === 'Unit') {
      return (typed, row) => {
        const guide = this.guideAt(row);
        return guide ? begins(unitsFor(guide.kind, this.sheet?.system ?? null), typed) : [];
      };
    }
    if (name === 'Case') return (typed) => begins(this.sheet?.cases ?? [], typed);
    return null;
  }

  /** The item of a row, as it is typed at this moment. */
  private guideAt(row: number): ItemGuide | null {
    const column = this.sheet?.columns.indexOf('Item') ?? -1;
    const { typing } = this;
    if (typing && typing.place.row === row && typing.place.column === column) return guideOf(typing.text);
    return guideOf(this.draft?.rows[row]?.[column]?.value);
  }

  private field(place: Place): HTMLInputElement | null {
    return this.body.querySelector(`tr[data-row="${place.row}"] input[data-column="${place.column}"]`);
  }

  // ---- showing

  /** All inputs to what the draft holds, except the one being typed in. */
  private values(): void {
    this.draft?.rows.forEach((row, index) => {
      const guide = this.guideAt(index);
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
    this.draft?.slots.forEach((slot, row) => {
      const line = this.body.querySelector(`tr[data-row="${row}"]`);
      const words = this.messages.get(slot) ?? [];
      line?.classList.toggle('sp-wrong', words.length > 0);
      for (const field of Array.from(line?.querySelectorAll('input') ?? [])) {
        field.removeAttribute('aria-describedby');
      }
      if (!line || words.length === 0) return;
      const id = `sp-row-message-${row}`;
      line.querySelector('input')?.setAttribute('aria-describedby', id);
      const paragraphs = words.map((word) => h('p', null, word));
      const box = h('div', { id, class: 'sp-row-words' }, paragraphs);
      line.after(h('tr', { class: 'sp-row-message' }, h('td', { colspan: this.shown.length + 1 }, box)));
    });
  }
}

function placeOf(field: HTMLInputElement): Place {
  const row = Number(field.closest('tr')?.dataset['row'] ?? 0);
  return { row, column: Number(field.dataset['column'] ?? 0) };
}

function columnClass(name: ColumnName): string {
  return `sp-col sp-col-${name.toLowerCase().replace(' ', '-')}`;
}

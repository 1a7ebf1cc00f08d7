/**
 * The editor of a beam's rows: as quick as a sheet. Typing previews at once (sketch and messages), leaving a cell or Enter
 * commits the step. The editor knows nothing of the sheet: it reports drafts, the pane writes them.
 */
import { h } from '../dom';
import { texts } from '../texts';
import { isBlank } from '../values';
import {
  adopt,
  duplicateRow,
  History,
  insertRow,
  moveRow,
  removeRow,
  sameDraft,
  setCell,
  type Draft,
} from './draft';
import { RowsGrid, type Place, type Sheet } from './grid';

export type { Sheet } from './grid';

export interface EditorEvents {
  /** the draft as it would be if the present typing were committed */
  preview(draft: Draft): void;
  /** a finished step, from the draft before it; the pane writes the difference */
  commit(before: Draft, after: Draft): void;
}

type Action = keyof typeof texts.rows.actions;

export class RowsEditor {
  readonly element: HTMLElement;
  private readonly grid: RowsGrid;
  private readonly buttons: Readonly<Record<Action, HTMLButtonElement>>;
  private sheet: Sheet | null = null;
  private history: History | null = null;
  private current: Place | null = null;

  constructor(private readonly events: EditorEvents) {
    const button = (key: Action, run: () => void): HTMLButtonElement => {
      const { label, hint } = texts.rows.actions[key];
      const attributes = { type: 'button', class: 'sp-tool', title: hint, 'aria-label': hint, click: run };
      return h('button', attributes, label);
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
    this.grid = new RowsGrid({
      focused: (place) => {
        this.current = place;
        this.refresh();
      },
      typed: (place, text) => {
        if (!this.history) return;
        const cell = this.grid.readCell(text, place);
        this.events.preview(setCell(this.history.current, place.row, place.column, cell));
      },
      left: (place, next) => this.finish(place, next),
      key: (event, place) => this.key(event, place),
    });
    const tools = { class: 'sp-tools', role: 'toolbar', 'aria-label': texts.rows.toolbar };
    this.element = h(
      'div',
      { class: 'sp-editor' },
      h('div', tools, Object.values(this.buttons)),
      this.grid.element,
    );
    this.element.addEventListener('keydown', (event) => this.shortcut(event));
    this.grid.table.addEventListener('paste', (event) => this.paste(event));
    this.refresh();
  }

  /** Shows rows as read from the sheet. The same rows again only refresh values; other rows start a new history. */
  show(sheet: Sheet): void {
    const { history } = this;
    const same =
      history !== null &&
      this.sheet !== null &&
      sameDraft(history.current, sheet.draft) &&
      this.sheet.readOnly === sheet.readOnly &&
      this.sheet.columns.length === sheet.columns.length;
    this.sheet = sheet;
    if (same) {
      history.replace(adopt(history.current, sheet.draft));
      this.grid.update(sheet, history.current);
    } else {
      this.history = new History(sheet.draft);
      this.current = null;
      this.grid.show(sheet, sheet.draft);
    }
    this.refresh();
  }

  get draft(): Draft | null {
    return this.history?.current ?? null;
  }

  /** Messages by slot (physical row of the range). */
  say(messages: ReadonlyMap<number, readonly string[]>): void {
    this.grid.say(messages);
  }

  /** A step made elsewhere (moving a load in the sketch, adding a limit): joins the same history. */
  apply(draft: Draft): void {
    this.step(draft, null);
  }

  /** The pane could not write the step: it goes. */
  takeBack(): void {
    if (!this.history || !this.sheet) return;
    this.history = new History(this.history.undo());
    this.grid.show(this.sheet, this.history.current);
    this.refresh();
    this.events.preview(this.history.current);
  }

  // ---- steps

  private finish(place: Place, next: Place | null): void {
    const typing = this.grid.takeTyping();
    if (typing && this.history) {
      const cell = this.grid.readCell(typing.text, place);
      const draft = setCell(this.history.current, place.row, place.column, cell);
      if (!sameDraft(draft, this.history.current)) {
        this.step(draft, next, false);
        return;
      }
    }
    this.grid.restore(place, false);
  }

  private step(next: Draft, focus: Place | null, move = true): void {
    if (!this.history || this.sheet?.readOnly) return;
    const before = this.history.current;
    if (sameDraft(before, next) && before.rows.length === next.rows.length) return;
    this.history.push(next);
    this.after(before, next, focus, move);
  }

  /** `move`: the focus is to go to a cell; otherwise it is on its way there already, unless the table is built anew. */
  private after(before: Draft, next: Draft, focus: Place | null, move: boolean): void {
    if (!this.sheet) return;
    const moved =
      before.rows.length !== next.rows.length || before.slots.some((slot, i) => slot !== next.slots[i]);
    const rebuilt = moved || this.grid.update(this.sheet, next);
    if (moved) this.grid.show(this.sheet, next);
    this.refresh();
    if (focus && move) this.focus(focus);
    // the input that was to get the focus has just been replaced: its successor gets it when the browser is done
    else if (focus && rebuilt) setTimeout(() => this.focus(focus), 0);
    this.events.commit(before, next);
  }

  private rowIndex(): number {
    const count = this.history?.current.rows.length ?? 0;
    return Math.min(this.current?.row ?? count - 1, count - 1);
  }

  private column(): number {
    return this.current?.column ?? this.grid.shown[0] ?? 0;
  }

  /** Before an action: what is being typed counts. */
  private commitTyping(): void {
    if (this.grid.isTyping && this.current) this.finish(this.current, null);
  }

  add(): void {
    this.commitTyping();
    if (!this.history) return;
    const row = this.rowIndex() + 1;
    this.step(insertRow(this.history.current, row), { row, column: this.grid.shown[0] ?? 0 });
  }

  copy(): void {
    this.commitTyping();
    if (!this.history) return;
    const row = this.rowIndex();
    this.step(duplicateRow(this.history.current, row), { row: row + 1, column: this.column() });
  }

  move(by: -1 | 1): void {
    this.commitTyping();
    if (!this.history) return;
    const row = this.rowIndex();
    const to = row + by;
    if (to < 0 || to >= this.history.current.rows.length) return;
    const place = { row: to, column: this.column() };
    this.current = place;
    this.step(moveRow(this.history.current, row, to), place);
  }

  remove(): void {
    if (!this.history || this.history.current.rows.length === 0) return;
    this.grid.takeTyping();
    const row = this.rowIndex();
    const left = this.history.current.rows.length - 1;
    const focus = left > 0 ? { row: Math.min(row, left - 1), column: this.column() } : null;
    this.current = focus;
    this.step(removeRow(this.history.current, row), focus);
  }

  undo(): void {
    this.commitTyping();
    if (!this.history?.canUndo) return;
    const before = this.history.current;
    this.after(before, this.history.undo(), this.current, true);
  }

  redo(): void {
    if (!this.history?.canRedo) return;
    const before = this.history.current;
    this.after(before, this.history.redo(), this.current, true);
  }

  private refresh(): void {
    const frozen = !this.sheet || this.sheet.readOnly;
    const count = this.history?.current.rows.length ?? 0;
    const row = this.rowIndex();
    const { add, copy, up, down, remove, undo, redo } = this.buttons;
    add.disabled = frozen;
    copy.disabled = frozen || count === 0;
    up.disabled = frozen || row <= 0;
    down.disabled = frozen || row >= count - 1;
    remove.disabled = frozen || count === 0;
    undo.disabled = frozen || !this.history?.canUndo;
    redo.disabled = frozen || !this.history?.canRedo;
  }

  // ---- keys

  private focus(place: Place): void {
    if (this.grid.focus(place)) this.current = place;
  }

  private key(event: KeyboardEvent, { row, column }: Place): void {
    const count = this.history?.current.rows.length ?? 0;
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    switch (event.key) {
      case 'Enter': {
        event.preventDefault();
        const to = row + (event.shiftKey ? -1 : 1);
        if (to < count) {
          this.focus({ row: Math.max(0, to), column });
          return;
        }
        this.commitTyping();
        // Enter on the last row that holds something goes on with a new one, as a sheet would
        const filled = this.history?.current.rows[row]?.some((cell) => !isBlank(cell.value));
        if (filled && !this.sheet?.readOnly) this.add();
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
        if (!this.grid.isTyping || !this.history) return;
        event.preventDefault();
        this.grid.takeTyping();
        this.grid.restore({ row, column }, true);
        this.events.preview(this.history.current);
    }
  }

  private shortcut(event: KeyboardEvent): void {
    const control = event.ctrlKey || event.metaKey;
    const key = event.key.toLowerCase();
    let run: (() => void) | null = null;
    // inside a text that is being typed, undo is the input's own
    if (control && !event.altKey && key === 'z' && !event.shiftKey)
      run = this.grid.isTyping ? null : () => this.undo();
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
    this.grid.takeTyping();
    const lines = text.replace(/\r\n?/g, '\n').replace(/\n$/, '').split('\n');
    const start = this.current;
    const first = this.grid.shown.indexOf(start.column);
    let draft = this.history.current;
    lines.forEach((line, i) => {
      const row = start.row + i;
      if (row >= draft.rows.length) draft = insertRow(draft, row);
      line.split('\t').forEach((word, j) => {
        const column = this.grid.shown[first + j];
        if (column === undefined) return;
        draft = setCell(draft, row, column, this.grid.readCell(unquote(word), { row, column }));
      });
    });
    this.step(draft, start);
  }
}

/** A copied cell with line breaks or quotes comes quoted. */
function unquote(word: string): string {
  return /^".*"$/s.test(word) && word.includes('""') ? word.slice(1, -1).replace(/""/g, '"') : word;
}

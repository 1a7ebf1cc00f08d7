/** The rows of the shown beam in the editor, and the way back to the sheet. */
import { h, put } from '../dom';
import { addressFrom } from '../address';
import type { ColumnName } from '../engine';
import type { Area, Separators, WorkbookPort } from '../port';
import type { Reviewed } from '../review';
import { insertRow, makeDraft, setCell, type Draft } from '../rows/draft';
import { RowsEditor } from '../rows/editor';
import { COLUMNS, guideOf } from '../rows/guide';
import { rowsText } from '../rows/text-form';
import { writeBack, type AskPerson } from '../rows/write-back';
import { texts } from '../texts';
import { textOf } from '../values';
import type { Movable } from './handles';

/** Items that are not moved in the sketch: settings, and sections, whose ends would lie on top of the loads'. */
const STILL = new Set(['units', 'axis', 'limit', 'E', 'I', 'EI', 'GA']);

/** Items taken below the beam in the sketch. */
const BELOW = new Set([
  'pin',
  'roller',
  'fixed',
  'guided',
  'spring',
  'rotational spring',
  'foundation',
  'settlement',
  'rotation',
]);

export interface RowsEvents {
  preview(draft: Draft): void;
  /** the editor shows other rows now */
  changed(): void;
  /** something was read too early to be shown: read again */
  stale(): void;
  written(words: string): void;
  failed(reason: unknown): void;
}

/** How rows stand in the workbook. */
type Form = 'cells' | 'text' | 'fixed';

export class RowsView {
  readonly element: HTMLElement;
  private readonly editor: RowsEditor;
  private readonly note = h('p', { class: 'sp-quiet' });
  private source: Area | null = null;
  private form: Form = 'fixed';
  private columns: readonly (ColumnName | null)[] = [];
  private reading = 0;
  /** steps on their way to the sheet: what is read meanwhile is older than what the editor shows */
  private pending = 0;
  private late = false;
  private waiting: { reviewed: Reviewed; separators: Separators } | null = null;
  private queue: Promise<void> = Promise.resolve();

  constructor(
    private readonly port: WorkbookPort,
    private readonly ask: AskPerson,
    private readonly events: RowsEvents,
  ) {
    this.editor = new RowsEditor({
      preview: (draft) => {
        if (this.form === 'cells') this.events.preview(draft);
      },
      commit: (before, after) => this.commit(before, after),
    });
    this.element = h('div', { class: 'sp-rows-view' }, this.editor.element, this.note);
  }

  /** Rows are out of sight: they are built when they are next needed, not now. */
  later(reviewed: Reviewed, separators: Separators): void {
    this.reading++;
    this.waiting = { reviewed, separators };
  }

  async show(reviewed: Reviewed, separators: Separators): Promise<void> {
    this.waiting = null;
    const { subject, review } = reviewed;
    const reading = ++this.reading;
    const single = subject.cells.length === 1 && subject.cells[0]?.length === 1;
    const units = review.model?.units ?? null;
    const system = units ?? unitsRow(reviewed);
    const rest = { system, cases: review.model?.cases ?? [], separators };
    if (single) {
      const values = review.table.rows.map((row) => COLUMNS.map((name) => row.cells[name] ?? null));
      this.form = subject.source ? 'text' : 'fixed';
      this.source = subject.source;
      this.columns = COLUMNS;
      const draft = makeDraft(
        values,
        values.map((row) => row.map(() => '')),
        0,
      );
      // one more row can always be written into a text
      this.editor.show({
        ...rest,
        draft: { ...draft, capacity: draft.rows.length + 100 },
        columns: COLUMNS,
        readOnly: !subject.source,
      });
      this.say(reviewed);
      this.explain(subject.source ? '' : texts.rows.readOnlyFormula);
      return;
    }
    this.columns = review.table.layout.columns;
    const head = review.table.layout.header ? 1 : 0;
    const { source } = subject;
    if (!source) {
      this.form = 'fixed';
      this.source = null;
      const blank = subject.cells.map((row) => row.map(() => ''));
      this.editor.show({
        ...rest,
        draft: makeDraft(subject.cells, blank, head),
        columns: this.columns,
        readOnly: true,
      });
      this.say(reviewed);
      this.explain(texts.rows.readOnlyJoined);
      return;
    }
    await this.port.read([source]).then(
      ([block]) => {
        if (reading !== this.reading) return;
        if (this.pending > 0) {
          this.late = true;
          return;
        }
        this.form = 'cells';
        this.source = source;
        const formulas = subject.cells.map((row, i) =>
          row.map((_, j) =>
            block
              ? (block.formulas[i + source.row - block.area.row]?.[j + source.column - block.area.column] ??
                '')
              : '',
          ),
        );
        this.editor.show({
          ...rest,
          draft: makeDraft(subject.cells, formulas, head),
          columns: this.columns,
          readOnly: false,
        });
        this.say(reviewed);
        this.events.changed();
        const missing = COLUMNS.filter((name) => !this.columns.includes(name));
        this.explain(
          missing.length > 0 ? texts.rows.missing(missing.map((name) => texts.columns[name]).join(', ')) : '',
        );
      },
      (reason: unknown) => this.events.failed(reason),
    );
  }

  /** Messages of a review, at their rows. */
  say(reviewed: Reviewed): void {
    this.editor.say(reviewed.byRow);
  }

  /** Adds a row at the end, by column name; false when the rows cannot be edited here. */
  async append(values: Partial<Record<ColumnName, unknown>>): Promise<boolean> {
    if (this.waiting) await this.show(this.waiting.reviewed, this.waiting.separators);
    const { draft } = this.editor;
    if (!draft || this.form === 'fixed') return false;
    const row = this.columns.map((name) => ({
      value: name === null ? null : (values[name] ?? null),
      formula: '',
    }));
    this.editor.apply(insertRow(draft, draft.rows.length, row));
    return true;
  }

  /** The positions that can be moved in the sketch: plain numbers in At and To of supports, releases, loads and the like. */
  movables(): Movable[] {
    const { draft } = this.editor;
    if (!draft || this.form !== 'cells') return [];
    const item = this.columns.indexOf('Item');
    return draft.rows.flatMap((row, index) => {
      const guide = guideOf(row[item]?.value);
      if (!guide || STILL.has(guide.word)) return [];
      return (['At', 'To'] as const).flatMap((name): Movable[] => {
        const column = this.columns.indexOf(name);
        const cell = row[column];
        if (!cell || !guide.uses.includes(name) || cell.formula !== '' || typeof cell.value !== 'number')
          return [];
        const slot = draft.slots[index] ?? 0;
        // 0 and 0 stand for the whole beam in a stretch: moving one end would change their meaning
        const other = row[this.columns.indexOf(name === 'At' ? 'To' : 'At')]?.value;
        if (guide.uses.includes('To') && cell.value === 0 && (other === 0 || textOf(other) === '')) return [];
        const label = texts.handles.label(slot + 1, guide.word, texts.columns[name]);
        return [{ slot, column, at: cell.value, label, below: BELOW.has(guide.word) }];
      });
    });
  }

  /** A position moved in the sketch: previewed while it moves, a step of the editor when it has arrived. */
  move(movable: Movable, at: number, final: boolean): void {
    const { draft } = this.editor;
    const index = draft?.slots.indexOf(movable.slot) ?? -1;
    if (!draft || index < 0) return;
    const next = setCell(draft, index, movable.column, { value: at, formula: '' });
    if (final) this.editor.apply(next);
    else this.events.preview(next);
  }

  private explain(words: string): void {
    put(this.note, words);
    this.note.hidden = words === '';
  }

  /** Steps reach the sheet one after the other, in the order they were made. */
  private commit(before: Draft, after: Draft): void {
    this.pending++;
    this.queue = this.queue
      .then(() => this.write(before, after))
      .catch((reason: unknown) => {
        this.editor.takeBack();
        this.events.failed(reason);
      })
      .then(() => {
        this.pending--;
        if (this.pending === 0 && this.late) this.events.stale();
        if (this.pending === 0) this.late = false;
      });
  }

  private async write(before: Draft, after: Draft): Promise<void> {
    const { source, form } = this;
    if (!source) return;
    if (form === 'text') {
      const rows = after.rows.map((row) =>
        Object.fromEntries(COLUMNS.map((name, i) => [name, row[i]?.value ?? null])),
      );
      const text = rowsText(rows);
      await this.port.write([{ area: source, cells: [[text]] }], {
        own: [source],
        label: texts.rows.undoLabel,
      });
      this.events.written(texts.rows.written(addressFrom(source, source.sheet)));
      return;
    }
    const outcome = await writeBack(this.port, source, before, after, this.ask);
    if (outcome.kind === 'cancelled') {
      this.editor.takeBack();
      return;
    }
    if (outcome.kind === 'nothing') return;
    this.source = outcome.source;
    this.events.written(texts.rows.written(addressFrom(outcome.source, outcome.source.sheet)));
  }
}

/** The units row as written, for hints while the table has errors and no model. */
function unitsRow(reviewed: Reviewed): { force: string; length: string; deflection: string } | null {
  const row = reviewed.review.table.rows.find((one) => guideOf(one.cells.Item)?.word === 'units');
  if (!row) return null;
  const text = (value: unknown): string => (typeof value === 'string' ? value : '');
  return { force: text(row.cells.At), length: text(row.cells.To), deflection: text(row.cells.Value) };
}

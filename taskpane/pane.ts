/**
 * The pane: follows the selected cell, shows the beam behind it, edits its rows, places answers.
 * It talks to the workbook through the port alone and to the engine through its one door.
 */
import './pane.css';
import { addressFrom, overlaps, shortAddress } from './address';
import { Asker } from './ask-person';
import { h, put } from './dom';
import { draw } from './drawing/drawing';
import { exportPng } from './drawing/export';
import { DIAGRAMS } from './drawing/frame';
import { Follower, type Found, type Subject } from './follow';
import { PLAIN, formatNumber } from './numbers';
import type { Area, Selection, Separators, Theme, Unsubscribe, WorkbookPort } from './port';
import { NO_WISH, reviewCells, reviewSubject, type Reviewed, type Wish } from './review';
import { toCells, type Draft } from './rows/draft';
import { makeRecord } from './place/record';
import { Settings, type Tab } from './settings';
import { texts } from './texts';
import { AnswersView } from './view/answers';
import { DrawingView } from './view/drawing-view';
import { makeHandles } from './view/handles';
import { HeadView } from './view/head';
import { LimitPicker } from './view/limit-picker';
import { MessagesView } from './view/messages';
import { pictureButtons } from './view/picture-buttons';
import { PlaceView } from './view/place-view';
import { RowsView } from './view/rows-view';
import { makeTabs } from './view/tabs';
import { WorkingView } from './view/working';

export interface MountedPane {
  dispose(): void;
}

/** px of the drawing on a record sheet: the text width of a portrait page at 96 px an inch, less its margins */
const RECORD_WIDTH = 640;

/** Mounts the pane into an element and starts following the selection. */
export function mountPane(container: HTMLElement, port: WorkbookPort): MountedPane {
  const pane = new Pane(container, port);
  return { dispose: () => pane.dispose() };
}

class Pane {
  private readonly settings = new Settings();
  private readonly follower: Follower;
  private readonly root: HTMLElement;
  private readonly status = h('p', { class: 'sp-status', role: 'status' });
  private readonly asker = new Asker();
  private readonly head: HeadView;
  private readonly messages = new MessagesView();
  private readonly drawing: DrawingView;
  private readonly answers = new AnswersView();
  private readonly picker: LimitPicker;
  private readonly rows: RowsView;
  private readonly place: PlaceView;
  private readonly working = new WorkingView((words) => this.announce(words));
  private readonly panel = h('div', { class: 'sp-panel', role: 'tabpanel', id: 'sp-panel', tabindex: -1 });
  private readonly empty = h('div', { class: 'sp-empty' });
  private readonly subscriptions: Unsubscribe[] = [];

  private selection: Selection | null = null;
  private reviewed: Reviewed | null = null;
  private lost: Extract<Found, { kind: 'lost' }> | null = null;
  private wish = NO_WISH;
  private held = false;
  /** the selected cell has no beam of its own: the last one stays, marked so */
  private kept = false;
  private separators: Separators = PLAIN;
  private run = 0;
  private pending: ReturnType<typeof setTimeout> | null = null;
  private disposed = false;

  constructor(
    container: HTMLElement,
    private readonly port: WorkbookPort,
  ) {
    this.follower = new Follower(port);
    const ask = (question: string, yes: string): Promise<boolean> => this.asker.ask(question, yes);
    const failed = (reason: unknown): void => this.failed(reason);
    this.head = new HeadView({
      hold: (held) => this.hold(held),
      choose: (index) => void this.follow(index),
      select: (area) => void port.select(area).catch(failed),
      canSelect: port.can('select'),
    });
    const pictures = pictureButtons(port, {
      drawing: () => this.drawing.current?.drawing ?? null,
      name: () => {
        const source = this.reviewed?.subject.source;
        return source
          ? `${texts.view.fileName} ${source.sheet} ${shortAddress(source).replace(':', '-')}`
          : texts.view.fileName;
      },
      target: () => this.selection?.active ?? null,
      say: (words) => this.announce(words),
      failed,
    });
    this.drawing = new DrawingView(this.settings, pictures, (wish) => this.wishFor(wish));
    this.picker = new LimitPicker({
      try: (limit) => this.wishFor({ limit }),
      add: (limit, note) => {
        this.picker.reset();
        this.wishFor({ limit: null });
        void this.rows.append({ Item: 'limit', Value: limit, Note: note });
      },
    });
    this.drawing.overlay = (drawing, { model }) =>
      makeHandles(drawing, this.rows.movables(), model.start, model.end, this.separators, {
        preview: (movable, at) => this.rows.move(movable, at, false),
        commit: (movable, at) => this.rows.move(movable, at, true),
        cancel: () => this.show(),
      });
    this.rows = new RowsView(port, ask, {
      preview: (draft) => this.preview(draft),
      changed: () => this.drawing.refreshOverlay(),
      stale: () => this.changed(null),
      written: (words) => {
        this.announce(words);
        this.changed(null);
      },
      failed,
    });
    this.place = new PlaceView(port, this.settings, ask, (words, area) => this.placed(words, area), failed);
    const tabs = makeTabs(this.settings.tab, 'sp-panel', (tab) => this.openTab(tab));
    this.panel.setAttribute('aria-labelledby', `sp-tab-${this.settings.tab}`);
    this.root = h(
      'div',
      { class: 'sp-pane' },
      this.head.element,
      tabs,
      this.asker.element,
      this.messages.element,
      this.panel,
      this.status,
      h('footer', { class: 'sp-standing' }, texts.standing),
    );
    this.paint(port.theme());
    put(container, this.root);
    this.show();
    void this.start();
  }

  dispose(): void {
    this.disposed = true;
    for (const stop of this.subscriptions) stop();
    if (this.pending !== null) clearTimeout(this.pending);
    this.drawing.dispose();
    this.root.remove();
  }

  private async start(): Promise<void> {
    const { port } = this;
    this.subscriptions.push(
      port.onSelection((selection) => {
        this.selection = selection;
        if (this.held) this.showPlace();
        else void this.follow(0);
      }),
      port.onChange((change) => this.changed(change.area)),
      port.onTheme((theme) => this.paint(theme)),
    );
    try {
      this.separators = await port.separators();
      this.selection = await port.selection();
      await this.follow(0);
    } catch (reason) {
      this.failed(reason);
    }
  }

  private paint(theme: Theme): void {
    this.root.dataset['theme'] = theme.dark ? 'dark' : 'light';
    const set = (name: string, value: string | null): void => {
      if (value === null) this.root.style.removeProperty(name);
      else this.root.style.setProperty(name, value);
    };
    set('--sp-paper', theme.background);
    set('--sp-ink', theme.text);
  }

  // ---- following

  private hold(held: boolean): void {
    this.held = held;
    if (held) this.show();
    else void this.follow(0);
  }

  /** Several cells change at once, and recalculation follows: one reading for all of them. */
  private changed(_area: Area | null): void {
    this.follower.changed();
    if (this.pending !== null) clearTimeout(this.pending);
    this.pending = setTimeout(() => {
      this.pending = null;
      void this.follow(null);
    }, 30);
  }

  /** Reads the beam behind the selection (index: which of its calls); null: the same beam again, its cells have changed. */
  private async follow(index: number | null): Promise<void> {
    if (this.disposed) return;
    const run = ++this.run;
    mark('spanrow:selection');
    try {
      const subject = this.reviewed?.subject ?? null;
      const again = index === null && subject !== null && (this.held || this.kept);
      let found: Found = { kind: 'nothing' };
      if (again) found = await this.follower.again(subject);
      else if (this.held && subject && index !== null)
        found = await this.follower.again({ ...subject, index });
      else if (this.selection)
        found = await this.follower.follow(this.selection, index ?? subject?.index ?? 0);
      if (run !== this.run || this.disposed) return;
      this.take(found, again);
    } catch (reason) {
      if (run === this.run) this.failed(reason);
    }
  }

  private take(found: Found, again: boolean): void {
    this.messages.clearHost();
    if (found.kind === 'subject') {
      this.lost = null;
      if (!again) this.kept = false;
      this.reviewed = this.reviewOf(found.subject);
    } else if (found.kind === 'lost') {
      this.lost = found;
      this.reviewed = null;
      this.kept = false;
    } else {
      this.lost = null;
      if (again) this.reviewed = null;
      this.kept = this.reviewed !== null && !this.held;
    }
    this.show();
    measure('spanrow:drawn', 'spanrow:selection');
  }

  private wishFor(change: Partial<Wish>): void {
    this.wish = { ...this.wish, ...change };
    if (!this.reviewed) return;
    this.reviewed = reviewSubject(this.reviewed.subject, this.wish);
    this.show();
  }

  /** A wish is for one beam: another one has other cases. */
  private reviewOf(subject: Subject): Reviewed {
    const now = this.reviewed?.subject.source;
    const same = now && subject.source && addressFrom(now, null) === addressFrom(subject.source, null);
    if (!same && this.wish !== NO_WISH) {
      this.wish = NO_WISH;
      this.drawing.clearWish();
      this.picker.reset();
    }
    return reviewSubject(subject, this.wish);
  }

  // ---- showing

  private openTab(tab: Tab): void {
    this.settings.tab = tab;
    this.settings.save();
    this.panel.setAttribute('aria-labelledby', `sp-tab-${tab}`);
    this.show();
  }

  private show(): void {
    const { reviewed, lost, settings } = this;
    const { tab } = settings;
    this.head.show({
      reviewed,
      lost,
      held: this.held,
      kept: this.kept,
      home: this.selection?.active.sheet ?? null,
    });
    this.messages.show(reviewed, lost, tab === 'rows');
    const beam = reviewed !== null;
    this.drawing.show(
      beam && tab !== 'place' && tab !== 'working' ? reviewed.drawing : null,
      this.separators,
      tab === 'rows',
    );
    this.showPlace();
    if (beam && tab === 'rows') void this.rows.show(reviewed, this.separators);
    else if (beam) this.rows.later(reviewed, this.separators);
    this.answers.show(tab === 'beam' ? reviewed : null, this.separators);
    if (tab === 'working') this.working.show(reviewed, this.separators);
    const parts: (HTMLElement | null)[] = [];
    if (tab === 'place') parts.push(this.place.element, this.place.starts);
    else if (!beam) parts.push(this.empty, lost ? null : this.place.starts);
    else if (tab === 'beam')
      parts.push(this.drawing.element, this.answers.element, this.picker.element, this.head.readFrom);
    else if (tab === 'rows') parts.push(this.drawing.element, this.rows.element);
    else parts.push(this.working.element);
    put(this.empty, lost ? null : h('p', null, texts.empty.title));
    const wanted = parts.filter((part): part is HTMLElement => part !== null);
    // what is already in place stays in place: the focus and the scroll with it
    const now = Array.from(this.panel.children);
    if (now.length !== wanted.length || wanted.some((part, i) => part !== now[i])) put(this.panel, wanted);
  }

  private showPlace(): void {
    const { reviewed, selection } = this;
    const at = reviewed?.marks[0] ?? reviewed?.model?.start ?? 0;
    this.place.show({
      subject: reviewed?.subject ?? null,
      record:
        reviewed?.open && this.port.addSheet && this.port.can('addSheet')
          ? (paper) => this.record(paper)
          : null,
      cases: reviewed?.model?.cases ?? [],
      target: selection?.active ?? null,
      x: formatNumber(at, PLAIN, 6),
    });
  }

  /** A draft that is being typed: sketch and messages follow at once, the sheet does not. */
  private preview(draft: Draft): void {
    const { reviewed } = this;
    if (!reviewed) return;
    const heading = draft.head > 0 ? (reviewed.subject.cells[0] ?? null) : null;
    const next = reviewCells(reviewed.subject, toCells(draft, heading), this.wish);
    this.rows.say(next);
    this.messages.show(next, null, this.settings.tab === 'rows');
    if (next.drawing) this.drawing.show(next.drawing, this.separators, this.settings.tab === 'rows');
  }

  private placed(words: string, area: Area): void {
    this.announce(words);
    // rows placed where the selection stands are the beam now
    const { selection } = this;
    if (selection && overlaps(area, selection.active)) this.held = false;
    this.changed(area);
  }

  /** A sheet of its own, so nothing can be in the way. */
  private async record(paper: 'a4' | 'letter'): Promise<void> {
    const { port, reviewed } = this;
    if (!reviewed?.drawing || !port.addSheet) return;
    const pictures = port.addPicture !== undefined && port.can('pictures');
    const made = makeRecord(reviewed, port.today(), pictures);
    if (!made) {
      this.announce(texts.record.noAnswer);
      return;
    }
    const sheet = await port.addSheet(texts.record.sheet);
    const area = { sheet, row: 0, column: 0, rows: made.cells.length, columns: made.cells[0]?.length ?? 1 };
    await port.write([{ area, cells: made.cells }], { label: texts.record.make });
    if (pictures && port.addPicture) {
      const drawing = draw(reviewed.drawing, {
        width: RECORD_WIDTH,
        parts: ['beam', ...DIAGRAMS],
        momentBelow: this.settings.momentBelow,
        enlarged: null,
        separators: this.separators,
      });
      const at = { sheet, row: made.drawingRow, column: 0, rows: 1, columns: 1 };
      const words = drawing.root.getAttribute('aria-label') ?? '';
      await port.addPicture(
        at,
        await exportPng(drawing, 3),
        words,
        drawing.width * 0.75,
        drawing.height * 0.75,
      );
    }
    if (port.setPrint && port.can('print')) await port.setPrint(area, paper);
    this.announce(texts.record.done(sheet));
  }

  private announce(words: string): void {
    this.status.textContent = words;
  }

  private failed(reason: unknown): void {
    const why = reason instanceof Error ? reason.message : String(reason);
    this.messages.host(texts.messages.hostFailed(this.port.host, why));
  }
}

function mark(name: string): void {
  if (typeof performance !== 'undefined' && typeof performance.mark === 'function') performance.mark(name);
}

function measure(name: string, from: string): void {
  if (typeof performance === 'undefined' || typeof performance.measure !== 'function') return;
  try {
    performance.clearMeasures(name);
    performance.measure(name, from);
  } catch {
    // the mark may have been cleared by the page; a missing measure harms nobody
  }
}

/** Puts a formula or a new beam at the selected cell, and never over something without asking. */
import { reviewBeam } from '../engine';
import { addressFrom, nameCells, overlaps } from '../address';
import { h, put, svg } from '../dom';
import { makeFrame, path, px } from '../drawing/frame';
import { drawRelease, drawSupport } from '../drawing/symbols';
import type { Subject } from '../follow';
import { ARRANGEMENTS, arrangementRows, type Arrangement, type UnitChoice } from '../place/arrangements';
import { composeFormula } from '../place/compose';
import type { Area, CellInput, WorkbookPort } from '../port';
import type { AskPerson } from '../rows/write-back';
import type { Settings } from '../settings';
import { texts } from '../texts';

type AnswerName = keyof typeof texts.place.answers;
const AT_X = new Set<string>(['DEFLECTION', 'SLOPE', 'MOMENT', 'SHEAR', 'REACTION']);

export interface PlaceContext {
  readonly subject: Subject | null;
  /** makes a record of the shown beam; null: there is nothing to record or no place to put it */
  readonly record: ((paper: 'a4' | 'letter') => Promise<void>) | null;
  readonly cases: readonly string[];
  readonly target: Area | null;
  /** a position to start from: where the crosshair or the formula stands */
  readonly x: string;
}

/** Writes cells at an area after asking about whatever stands there. */
export async function placeCells(
  port: WorkbookPort,
  area: Area,
  cells: readonly (readonly CellInput[])[],
  ask: AskPerson,
  label: string,
): Promise<boolean> {
  const first = await port.write([{ area, cells }], { label });
  if (first.written) return true;
  if (!(await ask(texts.place.occupied(nameCells(first.occupied)), texts.place.replace))) return false;
  return (await port.write([{ area, cells }], { label, confirmed: true })).written;
}

/** A small picture of an arrangement: the strip, its supports and a line load. */
function thumbnail(kind: Arrangement): SVGElement {
  const width = 118;
  const rows = arrangementRows(kind, 'none');
  const { model } = reviewBeam({ beam: rows });
  const root = svg('svg', {
    class: 'sp-thumb',
    width,
    height: 44,
    viewBox: `0 0 ${width} 44`,
    'aria-hidden': 'true',
  });
  if (!model) return root;
  const frame = makeFrame(model, width);
  const y = 20;
  root.append(
    svg('rect', {
      class: 'sp-thumb-load',
      x: px(frame.left),
      y: 8,
      width: px(frame.right - frame.left),
      height: 8,
    }),
  );
  for (const support of model.supports) root.append(drawSupport(support, frame, model, y, 1.5, false));
  root.append(svg('path', { class: 'sp-thumb-beam', d: path('M', frame.left, y, 'H', frame.right) }));
  for (const release of model.releases) root.append(drawRelease(release.kind, frame.x(release.at), y, 1.5));
  return root;
}

export class PlaceView {
  readonly element = h('div', { class: 'sp-place' });
  /** the starting points alone, for a pane without a beam */
  readonly starts: HTMLElement;
  private context: PlaceContext = { subject: null, record: null, cases: [], target: null, x: '0' };
  private readonly recordBlock: HTMLElement;
  private readonly answer: HTMLSelectElement;
  private readonly x: HTMLInputElement;
  private readonly combination: HTMLInputElement;
  private readonly cases = h('datalist', { id: 'sp-combinations' });
  private readonly preview = h('code', { class: 'sp-code' });
  private readonly put: HTMLButtonElement;
  private readonly hint = h('p', { class: 'sp-quiet' });
  private readonly xLine: HTMLElement;
  private readonly combinationLine: HTMLElement;

  constructor(
    private readonly port: WorkbookPort,
    private readonly settings: Settings,
    private readonly ask: AskPerson,
    private readonly done: (words: string, area: Area) => void,
    private readonly failed: (reason: unknown) => void,
  ) {
    const answers = Object.entries(texts.place.answers);
    this.answer = h(
      'select',
      { class: 'sp-select' },
      answers.map(([fn, words]) => h('option', { value: fn }, words)),
    );
    this.x = h('input', { type: 'text', class: 'sp-input', autocomplete: 'off', value: '0' });
    this.combination = h('input', {
      type: 'text',
      class: 'sp-input',
      autocomplete: 'off',
      list: 'sp-combinations',
      placeholder: texts.place.everything,
    });
    this.put = h('button', {
      type: 'button',
      class: 'sp-button sp-button-strong',
      click: () => void this.putFormula(),
    });
    this.xLine = h('label', { class: 'sp-line' }, h('span', null, texts.place.x), this.x);
    this.combinationLine = h(
      'label',
      { class: 'sp-line' },
      h('span', null, texts.place.combination),
      this.combination,
    );
    for (const field of [this.answer, this.x, this.combination])
      field.addEventListener('input', () => this.refresh());
    this.starts = this.buildStarts();
    this.recordBlock = this.buildRecord();
    put(
      this.element,
      h(
        'section',
        { class: 'sp-block' },
        h('h2', null, texts.place.formula),
        h('label', { class: 'sp-line' }, h('span', null, texts.place.quantity), this.answer),
        this.xLine,
        this.combinationLine,
        this.cases,
        this.preview,
        this.hint,
        this.put,
      ),
      this.recordBlock,
    );
    this.refresh();
  }

  show(context: PlaceContext): void {
    const other = context.subject?.formula !== this.context.subject?.formula;
    this.context = context;
    if (other) this.x.value = context.x;
    put(
      this.cases,
      context.cases.length === 0
        ? null
        : [context.cases.join(' + '), ...context.cases].map((text) => h('option', { value: text })),
    );
    this.refresh();
  }

  private formula(): string | null {
    const { subject, target } = this.context;
    if (!subject || !target) return null;
    const fn = this.answer.value as AnswerName;
    return composeFormula(subject, { fn, x: this.x.value, combination: this.combination.value }, target);
  }

  private refresh(): void {
    const { subject, target } = this.context;
    this.recordBlock.hidden = this.context.record === null;
    this.xLine.hidden = !AT_X.has(this.answer.value);
    this.combinationLine.hidden = this.answer.value === 'READBACK';
    const inside = subject?.source && target ? overlaps(subject.source, target) : false;
    const formula = this.formula();
    this.preview.textContent = formula ?? '';
    this.preview.hidden = formula === null;
    this.hint.textContent = !subject ? texts.place.noBeamYet : inside ? texts.place.inBeam : '';
    this.hint.hidden = this.hint.textContent === '';
    this.put.disabled = formula === null || inside;
    this.put.textContent = target ? texts.place.put(addressFrom(target, target.sheet)) : texts.place.putHere;
  }

  private buildRecord(): HTMLElement {
    const paper = h(
      'select',
      { class: 'sp-select' },
      h('option', { value: 'a4' }, texts.record.a4),
      h('option', { value: 'letter' }, texts.record.letter),
    );
    const make = (): void => {
      this.context
        .record?.(paper.value === 'letter' ? 'letter' : 'a4')
        .catch((reason: unknown) => this.failed(reason));
    };
    const line = h('label', { class: 'sp-line' }, h('span', null, texts.record.paper), paper);
    line.hidden = !this.port.can('print');
    return h(
      'section',
      { class: 'sp-block' },
      h('h2', null, texts.record.heading),
      h('p', { class: 'sp-quiet' }, texts.record.explain),
      line,
      h('button', { type: 'button', class: 'sp-button', click: make }, texts.record.make),
    );
  }

  private async putFormula(): Promise<void> {
    const formula = this.formula();
    const { target } = this.context;
    if (formula === null || !target) return;
    try {
      if (await placeCells(this.port, target, [[{ formula }]], this.ask, texts.place.formula)) {
        this.done(texts.place.done(addressFrom(target, target.sheet)), target);
      }
    } catch (reason) {
      this.failed(reason);
    }
  }

  private buildStarts(): HTMLElement {
    const units = h(
      'select',
      { class: 'sp-select' },
      h('option', { value: 'metric' }, 'kN, m, mm'),
      h('option', { value: 'american' }, 'kip, ft, in'),
      h('option', { value: 'none' }, texts.place.own),
    );
    units.value = this.settings.units;
    units.addEventListener('change', () => {
      this.settings.units = units.value as UnitChoice;
      this.settings.save();
    });
    const cards = ARRANGEMENTS.map((kind) =>
      h(
        'button',
        { type: 'button', class: 'sp-card', click: () => void this.putRows(kind) },
        thumbnail(kind),
        h('span', null, texts.place.arrangements[kind]),
      ),
    );
    return h(
      'section',
      { class: 'sp-block' },
      h('h2', null, texts.place.start),
      h('label', { class: 'sp-line' }, h('span', null, texts.place.units), units),
      h('div', { class: 'sp-cards' }, cards),
      h('p', { class: 'sp-quiet' }, texts.place.typical),
    );
  }

  private async putRows(kind: Arrangement): Promise<void> {
    const { target } = this.context;
    if (!target) return;
    const cells = arrangementRows(kind, this.settings.units);
    const area = { ...target, rows: cells.length, columns: cells[0]?.length ?? 1 };
    try {
      const label = texts.place.placeRows(texts.place.arrangements[kind]);
      if (await placeCells(this.port, area, cells, this.ask, label)) {
        this.done(texts.place.done(addressFrom(area, area.sheet)), area);
      }
    } catch (reason) {
      this.failed(reason);
    }
  }
}

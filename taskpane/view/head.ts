/** Which beam is shown, who asks about it, and the switch that holds it. */
import { addressFrom } from '../address';
import { h, put, type Child } from '../dom';
import type { Found } from '../follow';
import type { Area } from '../port';
import type { Reviewed } from '../review';
import { texts } from '../texts';

export interface HeadEvents {
  hold(held: boolean): void;
  choose(index: number): void;
  select(area: Area): void;
  readonly canSelect: boolean;
}

export interface HeadState {
  readonly reviewed: Reviewed | null;
  readonly lost: Extract<Found, { kind: 'lost' }> | null;
  readonly held: boolean;
  readonly kept: boolean;
  readonly home: string | null;
}

export class HeadView {
  readonly element: HTMLElement;
  /** the list of cells read, for the end of the panel */
  readonly readFrom = h('details', { class: 'sp-fold' });
  private readonly title = h('h1', { class: 'sp-title' });
  private readonly sub = h('p', { class: 'sp-sub' });
  private readonly which = h('div', { class: 'sp-which' });
  private readonly hold: HTMLButtonElement;

  constructor(private readonly events: HeadEvents) {
    this.hold = h(
      'button',
      {
        type: 'button',
        class: 'sp-hold',
        title: texts.head.holdHint,
        click: () => events.hold(this.hold.getAttribute('aria-pressed') !== 'true'),
      },
      texts.head.hold,
    );
    this.element = h(
      'header',
      { class: 'sp-head' },
      h('div', { class: 'sp-head-line' }, this.title),
      h('div', { class: 'sp-head-line' }, this.sub, this.hold),
      this.which,
    );
  }

  private link(area: Area, home: string | null): Child {
    const address = addressFrom(area, home);
    if (!this.events.canSelect) return address;
    return h(
      'button',
      {
        type: 'button',
        class: 'sp-link',
        title: texts.head.selectRows(address),
        click: () => this.events.select(area),
      },
      address,
    );
  }

  show({ reviewed, lost, held, kept, home }: HeadState): void {
    this.hold.hidden = reviewed === null;
    this.hold.setAttribute('aria-pressed', String(held));
    put(this.which);
    put(this.readFrom);
    this.readFrom.hidden = true;
    if (!reviewed) {
      put(this.title, texts.head.noBeam);
      put(this.sub, lost ? addressFrom(lost.cell, home) : '');
      return;
    }
    const { subject } = reviewed;
    const call = subject.calls[subject.index];
    const where: Child = subject.source
      ? this.link(subject.source, home)
      : call?.args.beam?.kind === 'text'
        ? texts.head.inFormula
        : texts.head.joined;
    put(this.title, texts.head.beam, ' ', where);

    const words: string[] = [];
    const cell = addressFrom(subject.cell, home);
    if (subject.via === 'formula' || subject.via === 'spill')
      words.push(texts.head.askedIn(call?.fn ?? '', cell));
    else if (subject.via === 'rows') words.push(texts.head.withRows(cell));
    else words.push(texts.head.found);
    const combination = reviewed.open?.combination?.text;
    if (combination) words.push(combination);
    else if ((reviewed.model?.cases.length ?? 0) > 1) words.push(texts.head.everything);
    if (held) words.push(texts.head.held);
    else if (kept) words.push(texts.head.kept);
    put(this.sub, words.join(' · '));

    if (subject.calls.length > 1 && (subject.via === 'formula' || subject.via === 'spill')) {
      const select = h(
        'select',
        { class: 'sp-select', 'aria-label': texts.head.which },
        subject.calls.map((one, i) => h('option', { value: i }, shorten(`${i + 1}: ${one.text}`, 60))),
      );
      select.value = String(subject.index);
      select.addEventListener('change', () => this.events.choose(Number(select.value)));
      put(this.which, select);
    }
    if (subject.read.length > 0) {
      this.readFrom.hidden = false;
      put(
        this.readFrom,
        h('summary', null, texts.head.read),
        h(
          'ul',
          { class: 'sp-plain' },
          subject.read.map((area) => h('li', null, this.link(area, home))),
        ),
      );
    }
  }
}

function shorten(text: string, most: number): string {
  return text.length <= most ? text : `${text.slice(0, most - 1)}…`;
}

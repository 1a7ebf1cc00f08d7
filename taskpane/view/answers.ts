/** Answers in tables: what the formula asks, largest values, reactions, limits with the used fraction. */
import { SIGNS, supportName, unitOf, type OpenBeam } from '../engine';
import { h, put, type Child } from '../dom';
import { DIAGRAMS } from '../drawing/frame';
import { formatNumber } from '../numbers';
import type { Separators } from '../port';
import type { Check, Reviewed } from '../review';
import { texts } from '../texts';

type Write = (value: number, digits?: number) => string;

function table(caption: string, head: readonly Child[], rows: readonly (readonly Child[])[]): HTMLElement {
  return h(
    'table',
    { class: 'sp-table' },
    h('caption', null, caption),
    h(
      'thead',
      null,
      h(
        'tr',
        null,
        head.map((cell) => h('th', { scope: 'col' }, cell)),
      ),
    ),
    h(
      'tbody',
      null,
      rows.map(([first, ...rest]) =>
        h(
          'tr',
          null,
          h('th', { scope: 'row' }, first),
          rest.map((cell) => h('td', null, cell)),
        ),
      ),
    ),
  );
}

const named = (name: string, unit: string): Child =>
  unit === '' ? name : [name, ' ', h('span', { class: 'sp-unit' }, unit)];

function asked(open: OpenBeam, reviewed: Reviewed, write: Write): HTMLElement | null {
  const quantity = DIAGRAMS.find((one) => one === reviewed.subject.quantity);
  if (!quantity || reviewed.marks.length === 0) return null;
  const unit = unitOf(open.model, quantity);
  const lines = reviewed.marks.slice(0, 12).map((x) => {
    const value = open.show(quantity, open.response.value(quantity, x, 'right'));
    const where = `${write(x)} ${unitOf(open.model, 'length')}`.trim();
    return h(
      'p',
      { class: 'sp-asked' },
      h('span', null, texts.answers.askedAt(texts.quantity[quantity], where)),
      h('strong', null, `${write(value, 6)} ${unit}`.trim()),
    );
  });
  return h('div', { class: 'sp-asked-list' }, lines);
}

function extremes(open: OpenBeam, write: Write): HTMLElement {
  const { model, response } = open;
  const rows = DIAGRAMS.map((quantity): Child[] => {
    const a = response.peak(quantity, 'highest');
    const b = response.peak(quantity, 'lowest');
    const turned = open.show(quantity, a.value) < open.show(quantity, b.value);
    const [high, low] = turned ? [b, a] : [a, b];
    const cell = (peak: typeof a): Child => [
      write(open.show(quantity, peak.value)),
      h('span', { class: 'sp-at' }, ` ${texts.answers.at} ${write(peak.at)}`),
    ];
    return [named(texts.quantity[quantity], unitOf(model, quantity)), cell(low), cell(high)];
  });
  return table(
    texts.answers.extremes,
    [texts.answers.quantity, texts.answers.lowest, texts.answers.highest],
    rows,
  );
}

function reactions(open: OpenBeam, write: Write): HTMLElement {
  const { model } = open;
  const all = open.response.reactions();
  const couples = all.some((one) => one.holdsCouple);
  const rows = all.map((one): Child[] => {
    const support = model.supports.find((candidate) => candidate.at === one.at);
    const cells: Child[] = [
      write(one.at),
      support ? supportName(support) : '',
      one.holdsForce ? write(one.force, 5) : '–',
    ];
    if (couples) cells.push(one.holdsCouple ? write(one.couple * model.axis, 5) : '–');
    return cells;
  });
  const head: Child[] = [
    named(texts.answers.position, unitOf(model, 'length')),
    texts.answers.support,
    named(texts.answers.force, unitOf(model, 'reaction')),
  ];
  if (couples) head.push(named(texts.answers.couple, unitOf(model, 'couple')));
  const made = table(texts.answers.reactions, head, rows);
  made.classList.add('sp-second-left');
  return made;
}

function usedBar(check: Check, write: Write): HTMLElement {
  const percent = `${write(check.used * 100, 3)} %`;
  const bar = h('span', { class: 'sp-bar', 'aria-hidden': 'true' }, h('span', { class: 'sp-bar-fill' }));
  const fill = bar.firstElementChild as HTMLElement;
  fill.style.width = `${Math.min(100, check.used * 100)}%`;
  return h(
    'span',
    { class: check.exceeded ? 'sp-used sp-exceeded' : 'sp-used' },
    bar,
    h(
      'span',
      { 'aria-label': texts.answers.usedBar(percent, check.exceeded) },
      percent,
      check.exceeded ? ' ✕' : '',
    ),
  );
}

function limits(open: OpenBeam, checks: readonly Check[], write: Write): HTMLElement {
  if (checks.length === 0) return h('p', { class: 'sp-quiet' }, texts.answers.noLimit);
  const unit = unitOf(open.model, 'deflection');
  const head = [
    texts.answers.span,
    named(texts.answers.deflection, unit),
    named(texts.answers.allowed, unit),
    texts.answers.used,
  ];
  // one group of rows per limit: its words are long and the same for every span
  const groups = [...new Set(checks.map((check) => check.limit))].map((limit) =>
    h(
      'tbody',
      null,
      h('tr', { class: 'sp-group' }, h('th', { scope: 'rowgroup', colspan: head.length }, limit)),
      checks
        .filter((check) => check.limit === limit)
        .map((check) =>
          h(
            'tr',
            null,
            h('th', { scope: 'row' }, check.span),
            h('td', null, write(check.deflection)),
            h('td', null, write(check.allowed)),
            h('td', null, usedBar(check, write)),
          ),
        ),
    ),
  );
  return h(
    'div',
    null,
    h(
      'table',
      { class: 'sp-table' },
      h('caption', null, texts.answers.limits),
      h(
        'thead',
        null,
        h(
          'tr',
          null,
          head.map((cell) => h('th', { scope: 'col' }, cell)),
        ),
      ),
      groups,
    ),
    h('p', { class: 'sp-quiet' }, texts.answers.fromChord),
  );
}

export class AnswersView {
  readonly element = h('div', { class: 'sp-answers' });

  show(reviewed: Reviewed | null, separators: Separators): void {
    const open = reviewed?.open ?? null;
    if (!reviewed || !open) {
      put(this.element);
      return;
    }
    const write: Write = (value, digits = 4) => formatNumber(value, separators, digits);
    const signs = open.model.axis === 1 ? SIGNS.down.deflection : SIGNS.up.deflection;
    put(
      this.element,
      asked(open, reviewed, write),
      reactions(open, write),
      extremes(open, write),
      h('p', { class: 'sp-quiet' }, texts.answers.signs(signs)),
      limits(open, reviewed.checks, write),
    );
  }
}

/** The double integration typeset, region by region, as REGIONS spills it. Terms wrap, because a pane is narrow. */
import { ask, conditionsOf, regionsOf, unitOf, type Fit, type OpenBeam, type RegionWork } from '../engine';
import { h, math, put, type Child } from '../dom';
import { formatNumber } from '../numbers';
import type { Separators } from '../port';
import type { Reviewed } from '../review';
import { texts } from '../texts';

const DIGITS = 6;
/** coefficients below this part of the largest are rounding */
const ROUNDING = 1e-13;

type Curve = readonly number[] | Fit;

/** 1.2×10⁻⁵ as MathML; the sign is left to the term. */
function number(value: number, separators: Separators): Element[] {
  const text = formatNumber(Math.abs(value), separators, DIGITS);
  const power = /^(.*)×10([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)$/.exec(text);
  if (!power) return [math('mn', null, text)];
  const plain = (power[2] ?? '').replace(/./g, (c) => (c === '⁻' ? '−' : String('⁰¹²³⁴⁵⁶⁷⁸⁹'.indexOf(c))));
  return [
    math('mn', null, power[1] ?? ''),
    math('mo', null, '×'),
    math('msup', null, math('mn', null, '10'), math('mn', null, plain)),
  ];
}

/** The terms of a polynomial in s, one math element each, so that a long line can wrap between them. */
function terms(coefficients: readonly number[], length: number, separators: Separators): Element[] {
  const sizes = coefficients.map((c, k) => Math.abs(c) * length ** k);
  const most = Math.max(...sizes);
  const made: Element[] = [];
  coefficients.forEach((c, k) => {
    if (c === 0 || (sizes[k] ?? 0) <= ROUNDING * most) return;
    const sign = c < 0 ? '−' : made.length > 0 ? '+' : '';
    const variable =
      k === 0
        ? []
        : k === 1
          ? [math('mi', null, 's')]
          : [math('msup', null, math('mi', null, 's'), math('mn', null, k))];
    made.push(
      math(
        'math',
        null,
        math(
          'mrow',
          null,
          sign === '' ? null : math('mo', { form: made.length > 0 ? 'infix' : 'prefix' }, sign),
          number(c, separators),
          variable,
        ),
      ),
    );
  });
  return made.length > 0 ? made : [math('math', null, math('mn', null, '0'))];
}

/** `name(s) =` with primes and an EI before it where wanted. */
function side(name: string, primes: 0 | 1, stiffness: boolean): Element {
  const symbol = math('mi', null, name);
  return math(
    'math',
    null,
    math(
      'mrow',
      null,
      stiffness ? math('mi', null, 'EI') : null,
      stiffness ? math('mspace', { width: '0.2em' }) : null,
      primes === 1 ? math('msup', null, symbol, math('mo', null, '′')) : symbol,
      math('mo', { stretchy: 'false' }, '('),
      math('mi', null, 's'),
      math('mo', { stretchy: 'false' }, ')'),
      math('mo', null, '='),
    ),
  );
}

function equation(left: Element, right: readonly Element[], unit: string, note = ''): HTMLElement {
  return h(
    'div',
    { class: 'sp-equation' },
    left,
    right,
    unit === '' && note === ''
      ? null
      : h('span', { class: 'sp-unit' }, [` ${unit}`, note === '' ? '' : ` (${note})`]),
  );
}

/** What acts in a region: only the polynomial w(s) has the unit of a line load. */
function loadWords(load: string, unit: string): string {
  if (load === '' || load === '0') return texts.working.none;
  return load
    .split('; ')
    .map((part) => (/^[-+*\d.eE s^]+$/.test(part) ? `${part} ${unit}`.trim() : part))
    .join('; ');
}

function coefficientsOf(curve: Curve): readonly number[] {
  return 'coefficients' in curve ? curve.coefficients : curve;
}

export class WorkingView {
  readonly element = h('div', { class: 'sp-working' });
  private open: OpenBeam | null = null;
  private shown: OpenBeam | null = null;
  private separators: Separators | null = null;

  constructor(private readonly say: (words: string) => void) {}

  /** Regions stay as they were opened while the same beam is shown. */
  show(reviewed: Reviewed | null, separators: Separators): void {
    const open = reviewed?.open ?? null;
    if (open !== null && open === this.shown && separators === this.separators) return;
    this.open = open;
    this.shown = open;
    this.separators = separators;
    if (!open) {
      put(this.element, h('p', { class: 'sp-quiet' }, texts.working.noAnswer));
      return;
    }
    const works = regionsOf(open);
    const down = open.model.axis === 1;
    put(
      this.element,
      h('p', { class: 'sp-quiet' }, texts.working.intro(down, open.combination?.text ?? '')),
      h(
        'div',
        { class: 'sp-tools' },
        h('button', { type: 'button', class: 'sp-tool', click: () => this.fold(true) }, texts.working.unfold),
        h('button', { type: 'button', class: 'sp-tool', click: () => this.fold(false) }, texts.working.fold),
        h('button', { type: 'button', class: 'sp-tool', click: () => void this.copy() }, texts.working.copy),
      ),
      works.map((work, i) => this.region(open, work, i, works.length <= 3 || i === 0, separators)),
      this.conditions(open, works, separators),
    );
  }

  private fold(opened: boolean): void {
    for (const region of Array.from(this.element.querySelectorAll('details'))) region.open = opened;
  }

  private region(
    open: OpenBeam,
    work: RegionWork,
    index: number,
    opened: boolean,
    separators: Separators,
  ): HTMLElement {
    const { model } = open;
    const length = work.to - work.from;
    const unit = (text: string): string => (model.units ? text : '');
    const { force = '', length: metre = '' } = model.units ?? {};
    const write = (value: number): string => formatNumber(value, separators, DIGITS);
    const polynomial = (curve: Curve, factor = 1): Element[] =>
      terms(
        coefficientsOf(curve).map((c) => c * factor),
        length,
        separators,
      );
    const departure = (curve: Curve, factor = 1): string =>
      'coefficients' in curve
        ? texts.working.departure(formatNumber(Math.abs(curve.departure * factor), separators, 2))
        : '';
    const perLength = model.units?.deflectionPerLength ?? 1;
    const lines: Child[] = [
      equation(side('M', 0, false), polynomial(work.moment), unitOf(model, 'moment'), departure(work.moment)),
    ];
    if (work.exact) {
      const { c1, c2, first, second } = work.exact;
      lines.push(
        equation(side('v', 1, true), polynomial(first), unit(`${force}·${metre}²`)),
        equation(side('v', 0, true), polynomial(second), unit(`${force}·${metre}³`)),
        h(
          'dl',
          { class: 'sp-facts' },
          h('dt', null, texts.working.constants),
          h(
            'dd',
            null,
            'C',
            h('sub', null, '1'),
            ` = ${write(c1)}, C`,
            h('sub', null, '2'),
            ` = ${write(c2)}`,
          ),
        ),
      );
    } else lines.push(h('p', { class: 'sp-quiet' }, texts.working.notPolynomial));
    lines.push(
      equation(side('v', 1, false), polynomial(work.slope), unitOf(model, 'slope'), departure(work.slope)),
      equation(
        side('v', 0, false),
        polynomial(work.deflection, perLength),
        unitOf(model, 'deflection'),
        departure(work.deflection, perLength),
      ),
    );
    const metres = unitOf(model, 'length');
    const end = (value: number): string => `${write(value)}${metres === '' ? '' : ` ${metres}`}`;
    return h(
      'details',
      { class: 'sp-region', open: opened },
      h('summary', null, texts.working.region(index + 1, end(work.from), end(work.to))),
      h(
        'div',
        { class: 'sp-region-body' },
        h(
          'dl',
          { class: 'sp-facts' },
          h('dt', null, texts.working.stiffness),
          h('dd', null, `${work.stiffness} ${unitOf(model, 'stiffness')}`.trim()),
          h('dt', null, texts.working.load),
          h('dd', null, loadWords(work.load, unit(`${force}/${metre}`))),
        ),
        h('p', { class: 'sp-quiet' }, texts.working.law(model.axis === 1)),
        lines,
      ),
    );
  }

  private conditions(open: OpenBeam, works: readonly RegionWork[], separators: Separators): HTMLElement {
    const write = (value: number, digits = 5): string => formatNumber(value, separators, digits);
    const head = [texts.working.condition, texts.working.left, texts.working.right, texts.working.over];
    return h(
      'details',
      { class: 'sp-region' },
      h('summary', null, texts.working.conditions),
      h(
        'div',
        {
          class: 'sp-region-body sp-scroll',
          tabindex: 0,
          role: 'group',
          'aria-label': texts.working.conditions,
        },
        h(
          'table',
          { class: 'sp-table' },
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
            conditionsOf(open, works).map((one) =>
              h(
                'tr',
                null,
                h(
                  'th',
                  { scope: 'row' },
                  one.text,
                  h('span', { class: 'sp-at' }, ` ${texts.answers.at} ${write(one.at)}`),
                ),
                h('td', null, write(one.left)),
                h('td', null, write(one.right)),
                h('td', null, write(one.left - one.right, 2)),
              ),
            ),
          ),
        ),
      ),
    );
  }

  /** REGIONS as tab-separated text: it pastes into cells as it would spill. */
  private async copy(): Promise<void> {
    if (!this.open) return;
    const text = ask
      .regions(this.open)
      .map((row) => row.join('\t').replace(/\t+$/, ''))
      .join('\n');
    try {
      await navigator.clipboard.writeText(text);
      this.say(texts.working.copied);
    } catch {
      this.say(texts.working.cannotCopy);
    }
  }
}

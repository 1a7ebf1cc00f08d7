/** The drawing with its crosshair, what it states about itself, and its options. */
import { h, put } from '../dom';
import { makeCrosshair, type Crosshair } from '../drawing/crosshair';
import { draw, type Drawing } from '../drawing/drawing';
import { measureLike } from '../drawing/labels';
import { DIAGRAMS, type DrawingInput, type Part } from '../drawing/frame';
import { PLAIN, formatNumber } from '../numbers';
import type { Separators } from '../port';
import type { Settings } from '../settings';
import type { Wish } from '../review';
import { texts } from '../texts';

const WIDTH_LEAST = 240;
const WIDTH_MOST = 760;

export class DrawingView {
  private readonly stage = h('div', { class: 'sp-stage' });
  private readonly notes = h('p', { class: 'sp-notes' });
  private readonly choices: HTMLElement;
  readonly element: HTMLElement;
  private input: DrawingInput | null = null;
  private beamOnly = false;
  private separators: Separators = PLAIN;
  private crosshair: Crosshair | null = null;
  private drawn: Drawing | null = null;
  private wishes: readonly HTMLInputElement[] = [];
  private width = 0;
  private known = 0;
  private measured = false;
  private readonly observer: ResizeObserver | null;

  constructor(
    private readonly settings: Settings,
    /** more buttons under the options (export, place in the sheet) */
    extra: HTMLElement,
    /** the person wishes an envelope */
    private readonly wish: (wish: Pick<Wish, 'combinations' | 'pattern'>) => void,
  ) {
    this.choices = this.buildChoices(extra);
    this.element = h('div', { class: 'sp-figure' }, this.stage, this.notes, this.choices);
    this.observer =
      typeof ResizeObserver === 'undefined'
        ? null
        : new ResizeObserver(() => {
            this.known = this.stage.clientWidth;
            if (this.known > 0 && Math.abs(this.measure() - this.width) >= 1) this.render();
          });
    this.observer?.observe(this.stage);
  }

  dispose(): void {
    this.observer?.disconnect();
  }

  /** Another beam has other cases. */
  clearWish(): void {
    for (const field of this.wishes) field.value = '';
  }

  get current(): { input: DrawingInput; drawing: Drawing; separators: Separators } | null {
    return this.input && this.drawn
      ? { input: this.input, drawing: this.drawn, separators: this.separators }
      : null;
  }

  /** A layer over the sketch (handles), made anew for every drawing; null: none. */
  overlay: ((drawing: Drawing, input: DrawingInput) => HTMLElement) | null = null;
  private over: HTMLElement | null = null;

  /** Makes the layer again over the drawing as it stands. */
  refreshOverlay(): void {
    const focused = this.over?.contains(document.activeElement)
      ? document.activeElement?.getAttribute('aria-label')
      : null;
    this.over?.remove();
    this.over =
      this.beamOnly && this.drawn && this.input && this.overlay ? this.overlay(this.drawn, this.input) : null;
    if (!this.over) return;
    this.stage.append(this.over);
    if (focused === null || focused === undefined) return;
    const again = Array.from(this.over.children).find((one) => one.getAttribute('aria-label') === focused);
    if (again instanceof HTMLElement) again.focus();
  }

  show(input: DrawingInput | null, separators: Separators, beamOnly: boolean): void {
    this.input = input;
    this.separators = separators;
    this.beamOnly = beamOnly;
    this.render();
  }

  private measure(): number {
    // asking the browser makes it lay out at once: the observer's last word is as good
    const width = this.known || this.stage.clientWidth || 350;
    return Math.min(Math.max(width, WIDTH_LEAST), WIDTH_MOST);
  }

  private render(): void {
    const { input, settings } = this;
    if (!input) {
      put(this.stage);
      put(this.notes);
      this.drawn = null;
      this.crosshair = null;
      this.element.hidden = true;
      return;
    }
    this.element.hidden = false;
    this.width = this.measure();
    this.measured ||= this.element.isConnected && measureLike(this.stage);
    const parts: Part[] = ['beam'];
    if (!this.beamOnly) parts.push(...DIAGRAMS.filter((quantity) => !settings.hidden.includes(quantity)));
    const options = {
      width: this.width,
      parts,
      momentBelow: settings.momentBelow,
      enlarged: settings.enlarged,
      separators: this.separators,
    };
    const kept = this.crosshair?.element === document.activeElement ? (this.crosshair?.at ?? null) : null;
    const hadFocus = this.crosshair?.element === document.activeElement;
    const drawing = draw(input, options);
    const start = input.marks?.[0] ?? null;
    this.drawn = drawing;
    const pieces: Node[] = [drawing.root];
    this.crosshair = null;
    if (input.response && !this.beamOnly && drawing.diagrams.length > 0) {
      this.crosshair = makeCrosshair(drawing, input, options, start, () => undefined);
      pieces.push(this.crosshair.element);
    }
    // a handle that is being dragged must stay in the document: the drawing changes under it
    const held = this.over?.matches(':active') || this.over?.querySelector(':active') ? this.over : null;
    if (held && this.beamOnly) {
      for (const old of Array.from(this.stage.children)) if (old !== held) old.remove();
      held.before(...pieces);
    } else {
      const focused = this.over?.contains(document.activeElement)
        ? document.activeElement?.getAttribute('aria-label')
        : null;
      put(this.stage, pieces);
      this.over = null;
      this.refreshOverlay();
      const again = focused
        ? Array.from(this.stage.querySelectorAll('.sp-handle')).find(
            (one) => one.getAttribute('aria-label') === focused,
          )
        : null;
      if (again instanceof HTMLElement) again.focus();
    }
    if (hadFocus && this.crosshair) {
      this.crosshair.element.focus();
      if (kept !== null) this.crosshair.move(kept);
    }
    this.choices.hidden = this.beamOnly;
    put(this.notes, this.beamOnly ? '' : this.statements(drawing, parts).join(' '));
    this.notes.hidden = this.beamOnly || drawing.diagrams.length === 0;
  }

  private statements(drawing: Drawing, parts: readonly Part[]): string[] {
    const words: string[] = [];
    if (parts.includes('moment')) {
      words.push(this.settings.momentBelow ? texts.view.momentBelow : texts.view.momentAbove);
    }
    const factor = drawing.exaggeration;
    if (factor !== null) {
      const number = formatNumber(factor, this.separators, 2);
      words.push(factor >= 1 ? texts.view.exaggerated(number) : texts.view.reduced(number));
    }
    if (drawing.beam?.drawing.varies) words.push(texts.view.depth);
    if (Object.keys(this.input?.bands ?? {}).length > 0) words.push(texts.view.bands);
    return words;
  }

  private buildChoices(extra: HTMLElement): HTMLElement {
    const { settings } = this;
    const change = (run: () => void): (() => void) => {
      return () => {
        run();
        settings.save();
        this.render();
      };
    };
    const boxes = DIAGRAMS.map((quantity) => {
      const box = h('input', { type: 'checkbox' });
      box.checked = !settings.hidden.includes(quantity);
      box.addEventListener(
        'change',
        change(() => {
          settings.hidden = box.checked
            ? settings.hidden.filter((one) => one !== quantity)
            : [...settings.hidden, quantity];
        }),
      );
      return h('label', { class: 'sp-choice' }, box, texts.quantity[quantity]);
    });
    const large = h(
      'select',
      { class: 'sp-select' },
      h('option', { value: '' }, texts.view.none),
      DIAGRAMS.map((quantity) => h('option', { value: quantity }, texts.quantity[quantity])),
    );
    large.value = settings.enlarged ?? '';
    large.addEventListener(
      'change',
      change(() => {
        settings.enlarged = DIAGRAMS.find((quantity) => quantity === large.value) ?? null;
      }),
    );
    const below = h('input', { type: 'checkbox' });
    below.checked = settings.momentBelow;
    below.addEventListener(
      'change',
      change(() => {
        settings.momentBelow = below.checked;
      }),
    );
    const field = (hint: string): HTMLInputElement =>
      h('input', { type: 'text', class: 'sp-input', autocomplete: 'off', placeholder: hint });
    const combinations = field(texts.view.combinationsHint);
    const pattern = field(texts.view.patternHint);
    this.wishes = [combinations, pattern];
    for (const one of [combinations, pattern]) {
      one.addEventListener('change', () =>
        this.wish({ combinations: combinations.value, pattern: pattern.value }),
      );
    }
    return h(
      'details',
      { class: 'sp-fold' },
      h('summary', null, texts.view.options),
      h('fieldset', { class: 'sp-set' }, h('legend', null, texts.view.show), boxes),
      h('label', { class: 'sp-line' }, h('span', null, texts.view.enlarge), large),
      h('label', { class: 'sp-choice' }, below, texts.view.below),
      h('label', { class: 'sp-line' }, h('span', null, texts.view.envelope), combinations),
      h('label', { class: 'sp-line' }, h('span', null, texts.view.pattern), pattern),
      h('p', { class: 'sp-quiet' }, texts.view.keys),
      extra,
    );
  }
}

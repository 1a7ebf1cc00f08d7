/** A list of published limits: pick one to try it on the beam, add it to the rows when it is the right one. */
import { h, put } from '../dom';
import { PUBLISHED_LIMITS } from '../limits';
import { texts } from '../texts';

export interface PickerEvents {
  /** the limit to try, as the row language writes it; null: the beam's own again */
  try(limit: string | null): void;
  add(limit: string, note: string): void;
}

export class LimitPicker {
  readonly element: HTMLElement;
  private readonly select: HTMLSelectElement;
  private readonly facts = h('p', { class: 'sp-quiet' });
  private readonly add: HTMLButtonElement;

  constructor(private readonly events: PickerEvents) {
    const sources = [...new Set(PUBLISHED_LIMITS.map((one) => one.source))];
    this.select = h(
      'select',
      { class: 'sp-select', 'aria-label': texts.limits.pick },
      h('option', { value: '' }, texts.limits.none),
      sources.map((source) =>
        h(
          'optgroup',
          { label: source },
          PUBLISHED_LIMITS.map((one, i) =>
            one.source === source
              ? h('option', { value: i }, `${one.limit}: ${one.member}, ${one.load}`)
              : null,
          ),
        ),
      ),
    );
    this.add = h(
      'button',
      { type: 'button', class: 'sp-tool', click: () => this.addRow() },
      texts.limits.add,
    );
    this.select.addEventListener('change', () => {
      events.try(this.chosen?.limit ?? null);
      this.refresh();
    });
    this.element = h(
      'details',
      { class: 'sp-fold' },
      h('summary', null, texts.limits.title),
      this.select,
      this.facts,
      this.add,
    );
    this.refresh();
  }

  /** Another beam is shown: back to its own limits. */
  reset(): void {
    this.select.value = '';
    this.refresh();
  }

  private get chosen(): (typeof PUBLISHED_LIMITS)[number] | null {
    return this.select.value === '' ? null : (PUBLISHED_LIMITS[Number(this.select.value)] ?? null);
  }

  private addRow(): void {
    const { chosen } = this;
    if (chosen) this.events.add(chosen.limit, `${chosen.source}: ${chosen.member}, ${chosen.load}`);
  }

  private refresh(): void {
    const { chosen } = this;
    this.add.hidden = chosen === null;
    put(
      this.facts,
      chosen
        ? `${texts.limits.facts(chosen.source, chosen.member, chosen.load)} ${texts.limits.status[chosen.status]} `
        : '',
      h('strong', null, texts.limits.confirm),
    );
  }
}

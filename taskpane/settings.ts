/** What the pane remembers between openings: views, not data. A host without storage simply forgets. */
import type { Quantity } from './engine';

export type Tab = 'beam' | 'rows' | 'working' | 'place';

const KEY = 'spanrow.pane';

export class Settings {
  tab: Tab = 'beam';
  hidden: readonly Quantity[] = [];
  enlarged: Quantity | null = null;
  /** bending moment on the tension side: common practice of many textbooks; switchable */
  momentBelow = true;
  units: 'metric' | 'american' | 'none' = 'metric';

  constructor(private readonly storage: Pick<Storage, 'getItem' | 'setItem'> | null = browserStorage()) {
    try {
      const kept: unknown = JSON.parse(storage?.getItem(KEY) ?? '{}');
      if (typeof kept === 'object' && kept !== null) this.take(kept as Record<string, unknown>);
    } catch {
      // what cannot be read is not worth a message: the defaults stand
    }
  }

  private take(kept: Record<string, unknown>): void {
    const quantities: readonly Quantity[] = ['deflection', 'slope', 'moment', 'shear'];
    const isQuantity = (value: unknown): value is Quantity => quantities.includes(value as Quantity);
    if (['beam', 'rows', 'working', 'place'].includes(kept['tab'] as string)) this.tab = kept['tab'] as Tab;
    if (Array.isArray(kept['hidden'])) this.hidden = kept['hidden'].filter(isQuantity);
    if (isQuantity(kept['enlarged'])) this.enlarged = kept['enlarged'];
    if (typeof kept['momentBelow'] === 'boolean') this.momentBelow = kept['momentBelow'];
    if (['metric', 'american', 'none'].includes(kept['units'] as string)) {
      this.units = kept['units'] as Settings['units'];
    }
  }

  save(): void {
    const { tab, hidden, enlarged, momentBelow, units } = this;
    try {
      this.storage?.setItem(KEY, JSON.stringify({ tab, hidden, enlarged, momentBelow, units }));
    } catch {
      // a full or forbidden storage: the choice lasts as long as the pane
    }
  }
}

function browserStorage(): Storage | null {
  try {
    return typeof localStorage === 'undefined' ? null : localStorage;
  } catch {
    return null; // a host may forbid it
  }
}

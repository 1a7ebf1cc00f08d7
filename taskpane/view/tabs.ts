/** Tabs after the ARIA authoring practices: arrow keys move, the tab opens as it gets the focus. */
import { h } from '../dom';
import type { Tab } from '../settings';
import { texts } from '../texts';

const TABS: readonly Tab[] = ['beam', 'rows', 'working', 'place'];

export function makeTabs(start: Tab, panel: string, open: (tab: Tab) => void): HTMLElement {
  const buttons = TABS.map((tab) =>
    h(
      'button',
      {
        type: 'button',
        role: 'tab',
        id: `sp-tab-${tab}`,
        class: 'sp-tab',
        'aria-controls': panel,
        click: () => choose(tab),
      },
      texts.tabs[tab],
    ),
  );
  const mark = (tab: Tab): void => {
    buttons.forEach((button, i) => {
      const on = TABS[i] === tab;
      button.setAttribute('aria-selected', String(on));
      button.tabIndex = on ? 0 : -1;
    });
  };
  const choose = (tab: Tab): void => {
    mark(tab);
    open(tab);
  };
  const list = h('div', { class: 'sp-tabs', role: 'tablist', 'aria-label': texts.tabList }, buttons);
  list.addEventListener('keydown', (event) => {
    const now = buttons.findIndex((button) => button === document.activeElement);
    const last = TABS.length - 1;
    const next =
      event.key === 'ArrowRight'
        ? now === last
          ? 0
          : now + 1
        : event.key === 'ArrowLeft'
          ? now === 0
            ? last
            : now - 1
          : event.key === 'Home'
            ? 0
            : event.key === 'End'
              ? last
              : -1;
    const tab = TABS[next];
    if (now < 0 || !tab) return;
    event.preventDefault();
    buttons[next]?.focus();
    choose(tab);
  });
  mark(start);
  return list;
}

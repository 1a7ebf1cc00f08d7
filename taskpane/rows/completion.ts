/** A list of words under an input, after the combobox pattern of the ARIA authoring practices: type, arrow, Enter, Escape. */
import { freshId, h } from '../dom';

export interface Completion {
  /** opens or refreshes the list for what stands in the input now */
  refresh(): void;
  close(): void;
  readonly open: boolean;
  /** true when the key was for the list */
  key(event: KeyboardEvent): boolean;
}

/**
 * `words` gives the matches for the typed text; `choose` is told when one is taken. The list is placed in `layer`, which must
 * be positioned and not clip.
 */
export function attachCompletion(
  input: HTMLInputElement,
  layer: HTMLElement,
  label: string,
  words: (typed: string) => readonly string[],
  choose: () => void,
): Completion {
  const id = freshId('list');
  let list: HTMLElement | null = null;
  let options: readonly string[] = [];
  let active = -1;

  input.setAttribute('role', 'combobox');
  input.setAttribute('aria-autocomplete', 'list');
  input.setAttribute('aria-expanded', 'false');
  input.setAttribute('aria-controls', id);

  const close = (): void => {
    list?.remove();
    list = null;
    active = -1;
    input.setAttribute('aria-expanded', 'false');
    input.removeAttribute('aria-activedescendant');
  };

  const mark = (index: number): void => {
    active = index;
    const items = list ? Array.from(list.children) : [];
    items.forEach((item, i) => item.setAttribute('aria-selected', String(i === index)));
    const chosen = items[index];
    if (chosen) {
      input.setAttribute('aria-activedescendant', chosen.id);
      chosen.scrollIntoView?.({ block: 'nearest' });
    } else input.removeAttribute('aria-activedescendant');
  };

  const take = (index: number): void => {
    const word = options[index];
    if (word === undefined) return;
    input.value = word;
    close();
    choose();
  };

  const show = (): void => {
    options = words(input.value).slice(0, 40);
    const typed = input.value.trim().toLowerCase();
    const settled = options.length === 0 || (options.length === 1 && options[0]?.toLowerCase() === typed);
    if (settled) {
      close();
      return;
    }
    const items = options.map((word, i) =>
      h(
        'li',
        {
          id: `${id}-${i}`,
          role: 'option',
          'aria-selected': 'false',
          // the press must not take the focus from the input
          pointerdown: (event: PointerEvent) => {
            event.preventDefault();
            take(i);
          },
        },
        word,
      ),
    );
    list?.remove();
    list = h('ul', { id, class: 'sp-list', role: 'listbox', 'aria-label': label }, items);
    layer.append(list);
    const frame = layer.getBoundingClientRect();
    const place = input.getBoundingClientRect();
    list.style.left = `${Math.max(0, Math.min(place.left - frame.left, frame.width - list.offsetWidth))}px`;
    list.style.top = `${place.bottom - frame.top + 1}px`;
    list.style.minWidth = `${place.width}px`;
    input.setAttribute('aria-expanded', 'true');
    mark(-1);
  };

  input.addEventListener('blur', close);
  return {
    refresh: show,
    close,
    get open() {
      return list !== null;
    },
    key(event) {
      if (!list) {
        if (event.key === 'ArrowDown' && event.altKey) {
          show();
          return true;
        }
        return false;
      }
      switch (event.key) {
        case 'ArrowDown':
          mark((active + 1) % options.length);
          return true;
        case 'ArrowUp':
          mark((active - 1 + options.length) % options.length);
          return true;
        case 'Enter':
        case 'Tab':
          if (active < 0) {
            close();
            return false;
          }
          take(active);
          // Tab takes the word and goes on to the next cell
          return event.key === 'Enter';
        case 'Escape':
          close();
          return true;
        default:
          return false;
      }
    },
  };
}

/** A message under the toolbar that stays until it is closed: what a file could not keep, why a file was refused. */
export interface Notice {
  show(headline: string, items?: readonly string[]): void;
  hide(): void;
}

export function createNotice(element: HTMLElement): Notice {
  return {
    show(headline, items = []) {
      const text = document.createElement('div');
      text.className = 'text';
      const first = document.createElement('p');
      first.textContent = headline;
      text.append(first);
      if (items.length > 0) {
        const list = document.createElement('ul');
        for (const item of items) {
          const entry = document.createElement('li');
          entry.textContent = item;
          list.append(entry);
        }
        text.append(list);
      }
      const close = document.createElement('button');
      close.type = 'button';
      close.textContent = 'Close';
      close.addEventListener('click', () => (element.hidden = true));
      element.replaceChildren(text, close);
      element.hidden = false;
    },
    hide() {
      element.hidden = true;
    },
  };
}

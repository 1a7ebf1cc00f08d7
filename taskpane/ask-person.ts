/** A question in the pane (the host forbids alert and confirm): it stands until it is answered, and takes the focus. */
import { freshId, h, put } from './dom';
import { texts } from './texts';

export class Asker {
  readonly element = h('div', { class: 'sp-ask-place' });
  private pending: ((yes: boolean) => void) | null = null;

  /** A new question answers an older one with no. */
  ask(question: string, yes: string): Promise<boolean> {
    this.pending?.(false);
    const back = document.activeElement;
    return new Promise((resolve) => {
      const finish = (answer: boolean): void => {
        this.pending = null;
        put(this.element);
        if (back instanceof HTMLElement && back.isConnected) back.focus();
        resolve(answer);
      };
      this.pending = finish;
      const id = freshId('ask');
      const cancel = h(
        'button',
        { type: 'button', class: 'sp-button', click: () => finish(false) },
        texts.ask.cancel,
      );
      const box = h(
        'div',
        { class: 'sp-ask', role: 'alertdialog', 'aria-labelledby': id, 'aria-modal': 'false' },
        h('p', { id }, question),
        h(
          'div',
          { class: 'sp-ask-buttons' },
          h(
            'button',
            { type: 'button', class: 'sp-button sp-button-strong', click: () => finish(true) },
            yes,
          ),
          cancel,
        ),
      );
      box.addEventListener('keydown', (event) => {
        if (event.key === 'Escape') finish(false);
      });
      put(this.element, box);
      box.scrollIntoView?.({ block: 'nearest' });
      // the harmless answer is the one under the thumb
      cancel.focus();
    });
  }
}

/** Errors and cautions in words. They stand until their cause is gone. */
import { say } from '../engine';
import { addressFrom } from '../address';
import { h, put } from '../dom';
import type { Found } from '../follow';
import type { Reviewed } from '../review';
import { texts } from '../texts';

const MOST = 8;

export class MessagesView {
  private readonly wrong = h('div', { class: 'sp-wrong-box', hidden: true });
  private readonly hostBox = h('div', { class: 'sp-wrong-box', hidden: true });
  private readonly cautions = h('details', { class: 'sp-cautions', hidden: true });
  private words = '';
  readonly element = h(
    'section',
    { class: 'sp-messages', 'aria-label': texts.messages.title, 'aria-live': 'polite' },
    this.hostBox,
    this.wrong,
    this.cautions,
  );

  host(words: string): void {
    this.hostBox.hidden = false;
    put(this.hostBox, h('p', null, words));
  }

  clearHost(): void {
    this.hostBox.hidden = true;
    put(this.hostBox);
  }

  /** `atRows`: the rows are in sight and carry their own messages */
  show(reviewed: Reviewed | null, lost: Extract<Found, { kind: 'lost' }> | null, atRows: boolean): void {
    const wrong: string[] = [];
    if (lost) {
      wrong.push(
        texts.lost.title(addressFrom(lost.cell, lost.cell.sheet)),
        texts.lost[lost.reason.reason](lost.reason.what),
      );
    }
    if (reviewed) {
      const elsewhere = reviewed.issues.filter((issue) => !atRows || issue.row === undefined);
      wrong.push(...elsewhere.map(say));
    }
    const cautions = reviewed?.cautions ?? [];
    const without = reviewed?.without ?? '';
    // the same words again are not news to a screen reader
    const all = JSON.stringify([wrong, cautions, reviewed?.without]);
    if (all === this.words) return;
    this.words = all;
    this.wrong.hidden = wrong.length === 0 && without === '';
    const rest = wrong.length - MOST;
    put(
      this.wrong,
      h(
        'ul',
        { class: 'sp-plain' },
        wrong.slice(0, MOST).map((words) => h('li', null, words)),
        rest > 0 ? h('li', null, texts.messages.more(rest)) : null,
        without === '' ? null : h('li', { class: 'sp-without' }, without),
      ),
    );
    const open = this.cautions.open;
    this.cautions.hidden = cautions.length === 0;
    put(
      this.cautions,
      h('summary', null, texts.messages.cautions(cautions.length)),
      h(
        'ul',
        { class: 'sp-plain' },
        cautions.map((words) => h('li', null, words)),
      ),
    );
    this.cautions.open = open;
  }
}

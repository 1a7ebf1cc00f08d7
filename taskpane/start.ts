/** Starts the pane in the host: waits for it, tells its absence in words, then mounts the pane with the host's adapter. */
import { createExcelPort } from './excel-port';
import { h, put } from './dom';
import { mountPane } from './pane';
import { texts } from './texts';

/** Office.onReady never resolves when the host's script is blocked or the page stands outside a host. */
const PATIENCE = 8000;

export async function start(place: HTMLElement): Promise<void> {
  const notice = (words: string): void => put(place, h('p', { role: 'alert' }, words));
  if (typeof Office === 'undefined') {
    notice(texts.start.noHost);
    return;
  }
  const late = setTimeout(() => notice(texts.start.waiting), PATIENCE);
  const { host } = await Office.onReady();
  clearTimeout(late);
  if (host !== Office.HostType.Excel) {
    notice(texts.start.noHost);
    return;
  }
  mountPane(place, createExcelPort());
}

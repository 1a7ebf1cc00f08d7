/**
 * Loads the pane's code when the pane is shown, and not before.
 *
 * In the shared runtime the host opens this page, hidden, as soon as a workbook holds one of our functions. Nothing of
 * the pane may stand between that moment and the first calculated cell: so this loader is all that runs then. The pane
 * follows when the page is seen: when the host says so, when the document becomes visible, or when somebody touches it
 * (a host that reports neither still delivers the click). Whichever comes first; the others then do nothing.
 */

/** The parts of a window that tell whether anybody is looking. */
export interface Glass {
  readonly document: Pick<Document, 'visibilityState' | 'addEventListener' | 'removeEventListener'>;
  readonly innerWidth: number;
  readonly innerHeight: number;
  addEventListener(type: string, listener: () => void): void;
  removeEventListener(type: string, listener: () => void): void;
  setTimeout(work: () => void, milliseconds: number): unknown;
}

/** `announce` is the host's own news of the pane being shown, when there is a host. */
export type Announce = (shown: () => void) => void;

/** Calls `load` once, when the page is seen. The first look waits for the scripts of the page to have finished. */
export function whenShown(glass: Glass, load: () => void, announce?: Announce): void {
  let done = false;
  const once = (): void => {
    if (done) return;
    done = true;
    glass.document.removeEventListener('visibilitychange', look);
    for (const type of TOUCHED) glass.removeEventListener(type, once);
    glass.removeEventListener('resize', look);
    load();
  };
  const look = (): void => {
    // a hidden page of some hosts calls itself visible, but has no size
    if (glass.document.visibilityState === 'visible' && glass.innerWidth > 0 && glass.innerHeight > 0) once();
  };
  glass.document.addEventListener('visibilitychange', look);
  glass.addEventListener('resize', look);
  for (const type of TOUCHED) glass.addEventListener(type, once);
  announce?.(once);
  glass.setTimeout(look, 0);
}

const TOUCHED = ['focus', 'pointerdown', 'keydown'] as const;

/** Excel's own news, where the page runs in Excel and Excel knows the event. */
function hostAnnounces(shown: () => void): void {
  if (typeof Office === 'undefined') return;
  void Office.onReady(({ host }) => {
    if (host !== Office.HostType.Excel || !Office.context.requirements.isSetSupported('SharedRuntime', '1.1'))
      return;
    void Office.addin.onVisibilityModeChanged(({ visibilityMode }) => {
      if (visibilityMode === Office.VisibilityMode.taskpane) shown();
    });
  });
}

/** Fetches the pane; when that fails, says so where the pane would stand and offers another try. */
function loadPane(): void {
  const place = document.getElementById('pane');
  if (!place) return;
  const pane = import(/* webpackChunkName: "pane" */ './start').then(({ start }) => start(place));
  pane.catch((reason: unknown) => {
    const notice = document.createElement('p');
    notice.setAttribute('role', 'alert');
    notice.textContent = `The pane could not be loaded (${reason instanceof Error ? reason.message : String(reason)}). The functions in the cells go on working. `;
    const again = document.createElement('button');
    again.type = 'button';
    again.textContent = 'Try again';
    again.addEventListener('click', () => {
      place.replaceChildren();
      loadPane();
    });
    notice.append(again);
    place.replaceChildren(notice);
  });
}

if (typeof window !== 'undefined' && typeof document !== 'undefined')
  whenShown(window, loadPane, hostAnnounces);

/** The divider between the grid and the pane: dragged, or moved with the arrow keys, Home and End. */
export const NARROWEST = 320;
export const WIDEST = 600;
const STEP = 20;
const STORED = 'spanrow-workbench-pane-width';

export function wireDivider(divider: HTMLElement, desk: HTMLElement): { setWidth(width: number): void } {
  let width = 400;

  function setWidth(next: number): void {
    width = Math.round(Math.min(WIDEST, Math.max(NARROWEST, next)));
    desk.style.setProperty('--pane-width', `${width}px`);
    divider.setAttribute('aria-valuenow', String(width));
    divider.setAttribute('aria-valuetext', `${width} pixels`);
    try {
      localStorage.setItem(STORED, String(width));
    } catch {
      // without storage the width lasts as long as the page
    }
  }

  divider.setAttribute('aria-valuemin', String(NARROWEST));
  divider.setAttribute('aria-valuemax', String(WIDEST));
  divider.addEventListener('pointerdown', (event) => {
    divider.setPointerCapture(event.pointerId);
    divider.classList.add('dragging');
    event.preventDefault();
  });
  divider.addEventListener('pointermove', (event) => {
    if (divider.hasPointerCapture(event.pointerId))
      setWidth(desk.getBoundingClientRect().right - event.clientX);
  });
  for (const ended of ['pointerup', 'pointercancel'] as const)
    divider.addEventListener(ended, () => divider.classList.remove('dragging'));
  divider.addEventListener('keydown', (event) => {
    const moves: Readonly<Record<string, number>> = {
      ArrowLeft: width + STEP,
      ArrowRight: width - STEP,
      Home: WIDEST,
      End: NARROWEST,
    };
    const next = moves[event.key];
    if (next === undefined) return;
    event.preventDefault();
    setWidth(next);
  });

  let stored = NaN;
  try {
    stored = Number(localStorage.getItem(STORED) ?? NaN);
  } catch {
    // as above
  }
  setWidth(Number.isFinite(stored) && stored > 0 ? stored : width);
  return { setWidth };
}

/** F6 and Shift+F6 move the keyboard between toolbar, grid and pane: inside the grid Tab belongs to the cells. */
const FOCUSABLE =
  'button:not([disabled]), select:not([disabled]), [href], [contenteditable="true"], textarea, input:not([hidden]), [tabindex="0"]';

export function moveBetweenRegions(regions: readonly HTMLElement[]): void {
  addEventListener(
    'keydown',
    (event) => {
      if (event.key !== 'F6') return;
      event.preventDefault();
      event.stopPropagation();
      const here = regions.findIndex((region) => region.contains(document.activeElement));
      const step = event.shiftKey ? -1 : 1;
      for (let tries = 1; tries <= regions.length; tries++) {
        const region = regions[(here + step * tries + regions.length * 2) % regions.length];
        const target = [...(region?.querySelectorAll<HTMLElement>(FOCUSABLE) ?? [])].find(
          (one) => one.checkVisibility?.() !== false,
        );
        if (target === undefined) continue;
        target.focus();
        return;
      }
    },
    { capture: true },
  );
}

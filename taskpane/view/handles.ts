/**
 * Handles on the sketch: a load, its ends or a support is moved by dragging or by arrow keys, and its row follows. Positions
 * snap to round steps and to the other positions of the beam. A cell that holds a formula or a text is not moved from here.
 */
import { h, put } from '../dom';
import type { Drawing } from '../drawing/drawing';
import { roundTo } from '../drawing/crosshair';
import { formatNumber } from '../numbers';
import type { Separators } from '../port';
import { texts } from '../texts';

/** One movable position: a numeric At or To cell of a row. */
export interface Movable {
  /** physical row of the range, and column in it */
  readonly slot: number;
  readonly column: number;
  readonly at: number;
  readonly label: string;
  /** supports are taken below the beam, loads above */
  readonly below: boolean;
}

export interface HandleEvents {
  /** while it moves */
  preview(movable: Movable, at: number): void;
  /** when it has arrived */
  commit(movable: Movable, at: number): void;
  /** the move is called off */
  cancel(): void;
}

/** px within which a handle catches another position of the beam */
const CATCH = 6;
/** steps over the whole beam */
const STEPS = 100;
/** side of a handle, the least touch target of WCAG 2.2 (2.5.8) */
const SIZE = 24;

export function makeHandles(
  drawing: Drawing,
  movables: readonly Movable[],
  start: number,
  end: number,
  separators: Separators,
  events: HandleEvents,
): HTMLElement {
  const layer = h('div', { class: 'sp-handles' });
  const { frame, beam } = drawing;
  if (!beam) return layer;
  const step = (end - start) / STEPS;
  const axis = beam.top + beam.drawing.axis;
  const lanes = new Map<string, number>();

  const handles = movables.map((movable) => {
    const x = frame.x(Math.min(Math.max(movable.at, start), end));
    // handles at one place stand in a column, away from the beam
    const place = `${Math.round(x / 8)} ${movable.below}`;
    const lane = lanes.get(place) ?? 0;
    lanes.set(place, lane + 1);
    const y = movable.below ? axis + 8 + lane * 14 : axis - 8 - lane * 14;
    const handle = h('div', {
      class: 'sp-handle',
      role: 'slider',
      tabindex: 0,
      title: texts.handles.hint,
      'aria-label': movable.label,
      'aria-valuemin': start,
      'aria-valuemax': end,
    });
    let now = movable.at;
    const show = (at: number): void => {
      now = at;
      handle.style.left = `${frame.x(at) - SIZE / 2}px`;
      handle.setAttribute('aria-valuenow', String(at));
      handle.setAttribute('aria-valuetext', formatNumber(at, separators, 6));
    };
    handle.style.top = `${y - SIZE / 2}px`;
    show(movable.at);

    const others = movables.filter((other) => other !== movable).map((other) => other.at);
    const snapped = (pixel: number): number => {
      const near = [...others, start, end].find((other) => Math.abs(frame.x(other) - pixel) <= CATCH);
      return near ?? roundTo(frame.x.invert(pixel), step);
    };
    let dragging = false;
    handle.addEventListener('pointerdown', (event) => {
      event.preventDefault();
      handle.focus();
      handle.setPointerCapture?.(event.pointerId);
      dragging = true;
      // every step draws the sketch anew and with it the handles: the drag goes on with this one
      const left = layer.getBoundingClientRect().left;
      const move = (moved: PointerEvent): void => {
        const at = snapped(moved.clientX - left);
        if (at === now) return;
        show(at);
        events.preview(movable, at);
      };
      const stop = (): void => {
        handle.removeEventListener('pointermove', move);
        dragging = false;
        if (now !== movable.at) events.commit(movable, now);
      };
      handle.addEventListener('pointermove', move);
      handle.addEventListener('pointerup', stop, { once: true });
      handle.addEventListener(
        'pointercancel',
        () => {
          handle.removeEventListener('pointermove', move);
          dragging = false;
          show(movable.at);
          events.cancel();
        },
        { once: true },
      );
    });
    handle.addEventListener('keydown', (event) => {
      const by = (event.shiftKey ? 10 : 1) * step;
      const next =
        event.key === 'ArrowRight' || event.key === 'ArrowUp'
          ? roundTo(now + by, step)
          : event.key === 'ArrowLeft' || event.key === 'ArrowDown'
            ? roundTo(now - by, step)
            : null;
      if (event.key === 'Escape' && dragging) {
        show(movable.at);
        events.cancel();
      }
      if (next === null) return;
      event.preventDefault();
      show(next);
      events.commit(movable, next);
    });
    return handle;
  });
  put(layer, handles);
  return layer;
}

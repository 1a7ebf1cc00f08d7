/** A line across all diagrams that reads every value at one position: by mouse, touch and keys. */
import type { Quantity } from '../engine';
import { h, svg } from '../dom';
import { formatNumber } from '../numbers';
import { texts } from '../texts';
import type { Drawing } from './drawing';
import { stations } from './beam';
import { DIAGRAMS, path, px, SMALL, unitOf, withUnit, type DrawingInput, type DrawingOptions } from './frame';
import { textWidth } from './labels';

/** pixels within which the pointer catches a notable position */
const CATCH = 5;
const STEPS = 100;

export interface Crosshair {
  /** focusable slider lying over the drawing */
  readonly element: HTMLElement;
  /** moves to a position, or away with null */
  move(at: number | null): void;
  readonly at: number | null;
}

/** Positions worth stopping at: ends, supports, loads' ends, marks, the largest of every quantity. */
export function notable(input: DrawingInput): number[] {
  const { model, response } = input;
  const all = [...stations(model), ...(input.marks ?? [])];
  for (const load of model.loads) {
    if ('at' in load) all.push(load.at);
    else if ('from' in load) all.push(load.from, load.to);
  }
  if (response) for (const quantity of DIAGRAMS) all.push(response.peak(quantity, 'largest').at);
  const inside = all.filter((at) => at >= model.start && at <= model.end);
  return [...new Set(inside)].sort((a, b) => a - b);
}

export function makeCrosshair(
  drawing: Drawing,
  input: DrawingInput,
  options: DrawingOptions,
  start: number | null,
  moved: (at: number | null) => void,
): Crosshair {
  const { model, response } = input;
  const { frame, overlay } = drawing;
  const stops = notable(input);
  const number = (value: number, digits = 4): string => formatNumber(value, options.separators, digits);
  let at: number | null = null;

  const element = h('div', {
    class: 'sp-crosshair',
    role: 'slider',
    tabindex: 0,
    'aria-label': texts.drawing.crosshair,
    'aria-valuemin': model.start,
    'aria-valuemax': model.end,
    'aria-orientation': 'horizontal',
  });

  /** Both sides where the quantity jumps. */
  const reading = (quantity: Quantity, x: number): string => {
    if (!response) return '';
    const value = (side: 'left' | 'right'): string =>
      number(input.show(quantity, response.value(quantity, x, side)));
    const right = value('right');
    const jumps = response.jumps(quantity).includes(x) && x > model.start && x < model.end;
    return jumps ? texts.drawing.bothSides(value('left'), right) : right;
  };

  const show = (): void => {
    overlay.replaceChildren();
    const position = at ?? start ?? model.start;
    const spoken = [texts.drawing.atPosition(withUnit(number(position), unitOf(model, 'length')))];
    for (const { drawing: diagram } of drawing.diagrams) {
      const words = reading(diagram.quantity, position);
      spoken.push(`${texts.quantity[diagram.quantity]} ${withUnit(words, unitOf(model, diagram.quantity))}`);
      diagram.reading.textContent = at === null ? '' : words;
    }
    element.setAttribute('aria-valuenow', String(Number(position.toPrecision(6))));
    element.setAttribute('aria-valuetext', spoken.join(', '));
    if (at === null) return;
    const x = frame.x(at);
    const axis = drawing.beam ? drawing.beam.drawing.axis : 0;
    overlay.append(svg('path', { class: 'sp-cross', d: path('M', x, axis, 'V', drawing.height - 1) }));
    for (const { top, drawing: diagram } of drawing.diagrams) {
      if (!response) break;
      for (const side of ['left', 'right'] as const) {
        const value = input.show(diagram.quantity, response.value(diagram.quantity, at, side));
        overlay.append(
          svg('circle', { class: 'sp-cross-dot', cx: px(x), cy: px(top + diagram.y(value)), r: 3 }),
        );
      }
    }
    const words = `x ${number(at)}`;
    const width = textWidth(words, SMALL) + 8;
    const left = Math.min(Math.max(x - width / 2, 1), drawing.width - width - 1);
    const y = (drawing.beam ? drawing.beam.top + drawing.beam.drawing.height : 0) - 3;
    overlay.append(
      svg('rect', { class: 'sp-tag', x: px(left), y: px(y), width: px(width), height: 14, rx: 3 }),
      svg(
        'text',
        { class: 'sp-tag-text', x: px(left + width / 2), y: px(y + 10.5), 'text-anchor': 'middle' },
        words,
      ),
    );
  };

  const move = (next: number | null): void => {
    at = next === null ? null : Math.min(Math.max(next, model.start), model.end);
    show();
    moved(at);
  };

  const fromPointer = (event: PointerEvent): void => {
    const bounds = element.getBoundingClientRect();
    const place = event.clientX - bounds.left;
    const near = stops
      .map((stop) => ({ stop, away: Math.abs(frame.x(stop) - place) }))
      .filter((one) => one.away <= CATCH)
      .sort((a, b) => a.away - b.away)[0];
    // a whole number of steps of a round size reads better than fifteen digits
    move(near ? near.stop : roundTo(frame.x.invert(place), (model.end - model.start) / 200));
  };
  element.addEventListener('pointermove', (event) => {
    if (event.pointerType === 'mouse' || event.buttons > 0) fromPointer(event);
  });
  element.addEventListener('pointerdown', fromPointer);
  element.addEventListener('pointerleave', (event) => {
    // what was read by touch or keys stays until the person moves on
    if (event.pointerType === 'mouse' && document.activeElement !== element) move(start);
  });
  element.addEventListener('blur', () => move(start));
  element.addEventListener('focus', () => {
    if (at === null) move(start ?? stops[0] ?? model.start);
  });
  element.addEventListener('keydown', (event) => {
    const now = at ?? start ?? model.start;
    const step = (model.end - model.start) / STEPS;
    const next = nextPosition(event.key, event.shiftKey, now, step, stops, model.start, model.end);
    if (next === undefined) return;
    event.preventDefault();
    move(next);
  });
  show();
  if (start !== null) move(start);
  return {
    element,
    move,
    get at() {
      return at;
    },
  };
}

/** null: away; undefined: not a key of the crosshair. */
function nextPosition(
  key: string,
  shift: boolean,
  now: number,
  step: number,
  stops: readonly number[],
  start: number,
  end: number,
): number | null | undefined {
  const by = shift ? 10 * step : step;
  const slack = 1e-9 * (end - start);
  switch (key) {
    case 'ArrowRight':
    case 'ArrowUp':
      return Math.min(end, roundTo(now + by, step));
    case 'ArrowLeft':
    case 'ArrowDown':
      return Math.max(start, roundTo(now - by, step));
    case 'PageDown':
      return stops.find((stop) => stop > now + slack) ?? end;
    case 'PageUp':
      return [...stops].reverse().find((stop) => stop < now - slack) ?? start;
    case 'Home':
      return start;
    case 'End':
      return end;
    case 'Escape':
      return null;
    default:
      return undefined;
  }
}

/** To the nearest multiple of a round number no larger than the step, so that positions read 3.6 and not 3.5999. */
export function roundTo(value: number, step: number): number {
  const power = 10 ** Math.floor(Math.log10(step));
  const unit = step / power >= 5 ? 5 * power : step / power >= 2 ? 2 * power : power;
  return Number((Math.round(value / unit) * unit).toPrecision(12));
}

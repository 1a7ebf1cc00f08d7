/** Puts the beam and its diagrams on one sheet of SVG, and says where everything went. */
import type { Quantity } from '../engine';
import { svg } from '../dom';
import { formatNumber } from '../numbers';
import { texts } from '../texts';
import { drawBeam, type BeamDrawing } from './beam';
import { drawDiagram, type Diagram } from './diagram';
import {
  DIAGRAMS,
  makeFrame,
  path,
  px,
  unitOf,
  withUnit,
  type DrawingInput,
  type DrawingOptions,
  type Frame,
} from './frame';

export interface Placed<T> {
  readonly top: number;
  readonly drawing: T;
}

export interface Drawing {
  readonly root: SVGSVGElement;
  readonly width: number;
  readonly height: number;
  readonly frame: Frame;
  readonly beam: Placed<BeamDrawing> | null;
  readonly diagrams: readonly Placed<Diagram>[];
  /** a layer above everything for the crosshair */
  readonly overlay: SVGElement;
  readonly exaggeration: number | null;
}

const GAP = 8;

/** One sentence for those who do not see the drawing. */
export function describe(input: DrawingInput, options: DrawingOptions): string {
  const { model, response } = input;
  const number = (value: number): string => formatNumber(value, options.separators, 4);
  const length = withUnit(number(model.end - model.start), unitOf(model, 'length'));
  const parts = [texts.drawing.summary(length, model.supports.length, model.loads.length)];
  if (response) {
    for (const quantity of DIAGRAMS) {
      if (!options.parts.includes(quantity)) continue;
      const peak = response.peak(quantity, 'largest');
      const value = withUnit(number(input.show(quantity, peak.value)), unitOf(model, quantity));
      parts.push(
        texts.drawing.summaryPeak(
          texts.quantity[quantity],
          value,
          withUnit(number(peak.at), unitOf(model, 'length')),
        ),
      );
    }
  }
  return parts.join(' ');
}

export function draw(input: DrawingInput, options: DrawingOptions): Drawing {
  const frame = makeFrame(input.model, options.width);
  const root = svg('svg', {
    class: 'sp-drawing',
    width: options.width,
    role: 'img',
    'aria-label': describe(input, options),
  });
  let y = 0;
  let beam: Placed<BeamDrawing> | null = null;
  const diagrams: Placed<Diagram>[] = [];
  const place = (group: SVGElement, height: number): number => {
    const top = y;
    root.append(svg('g', { transform: `translate(0 ${px(top)})` }, group));
    y += height;
    return top;
  };
  if (options.parts.includes('beam')) {
    const drawing = drawBeam(input, options, frame);
    beam = { drawing, top: place(drawing.group, drawing.height) };
  }
  if (input.response) {
    const wanted: readonly Quantity[] = DIAGRAMS.filter((quantity) => options.parts.includes(quantity));
    for (const quantity of wanted) {
      if (y > 0) y += GAP;
      const drawing = drawDiagram(quantity, input, options, frame, input.response);
      diagrams.push({ drawing, top: place(drawing.group, drawing.height) });
    }
  }
  const height = Math.ceil(y) + 2;
  for (const at of input.marks ?? []) {
    if (at < input.model.start || at > input.model.end) continue;
    const x = frame.x(at);
    if (diagrams.length > 0) {
      const d = path('M', x, beam ? beam.drawing.axis : 0, 'V', height - 2);
      root.append(svg('path', { class: 'sp-mark', d }));
    }
    if (beam) {
      root.append(
        svg('path', {
          class: 'sp-mark-head',
          d: path('M', x, beam.drawing.axis, 'l', -4, -4.5, 'l', 4, -4.5, 'l', 4, 4.5, 'Z'),
        }),
      );
    }
  }
  const overlay = svg('g', { class: 'sp-overlay' });
  root.append(overlay);
  root.setAttribute('height', String(height));
  root.setAttribute('viewBox', `0 0 ${options.width} ${height}`);
  const exaggeration =
    diagrams.find((one) => one.drawing.quantity === 'deflection')?.drawing.exaggeration ?? null;
  return { root, width: options.width, height, frame, beam, diagrams, overlay, exaggeration };
}

/**
 * The loads over the beam, to relative scale, with their values. Everything is laid out with the beam's axis at y = 0
 * (up is negative); the caller moves the group once the height is known.
 *
 * Distributed loads stack like bricks, the longest at the bottom; point arrows start above the stack and reach the beam.
 * A label that finds no room within reach is left out (its text stays as the tooltip of the load).
 */
import type { BeamModel, Law, Load } from '../engine';
import { svg } from '../dom';
import { formatNumber } from '../numbers';
import { texts } from '../texts';
import { Placer, textWidth, type Box } from './labels';
import {
  path,
  px,
  TEXT,
  unitOf,
  withUnit,
  type DrawingInput,
  type DrawingOptions,
  type Frame,
} from './frame';

const BLOCK_MOST = 24;
const BLOCK_LEAST = 7;
const POINT_MOST = 34;
const POINT_LEAST = 18;
const LINE = TEXT + 3;
const SAMPLES = 24;
/** a label may climb this many lines before it is left out */
const CLIMB = 4;
/** a distributed load's label looks for a place between the point arrows in steps of this size */
const SIDESTEP = 7;

export interface LoadsDrawing {
  readonly group: SVGElement;
  /** y of the highest ink, negative */
  readonly top: number;
  /** y of the lowest ink, for what hangs below the beam */
  readonly bottom: number;
}

type Of<K extends Load['kind']> = Extract<Load, { kind: K }>;

function lawAt(law: Law, from: number, to: number, x: number): number {
  if (law.kind === 'function') return law.at(x);
  return to === from ? law.start : law.start + ((law.end - law.start) * (x - from)) / (to - from);
}

/** CSS class of a case: its colour and dash. */
export function caseClass(index: number): string {
  return index < 0 ? 'sp-case-none' : `sp-case-${index % 6}`;
}

interface Segment {
  readonly from: number;
  readonly to: number;
  readonly top: number;
}

export class LoadPainter {
  private readonly group = svg('g', { class: 'sp-loads' });
  private readonly placer: Placer;
  private readonly stack: Segment[] = [];
  private top = 0;
  private bottom = 0;
  private readonly model: BeamModel;
  /** point loads from left to right, and where their arrows stand */
  private readonly points: readonly Of<'point'>[];
  private readonly shafts: readonly number[];

  constructor(
    private readonly input: DrawingInput,
    private readonly options: DrawingOptions,
    private readonly frame: Frame,
    /** half the drawn depth of the beam at a position */
    private readonly half: (x: number) => number,
    /** y under the supports, where settlements are drawn */
    private readonly below: number,
  ) {
    this.model = input.model;
    this.placer = new Placer(2, frame.width - 2);
    this.points = input.model.loads
      .filter((load): load is Of<'point'> => load.kind === 'point')
      .sort((a, b) => a.at - b.at);
    this.shafts = this.points.map((load) => frame.x(load.at));
  }

  paint(): LoadsDrawing {
    const { loads } = this.model;
    const distributed = loads.filter((load): load is Of<'distributed'> => load.kind === 'distributed');
    const peak = Math.max(...distributed.map((load) => this.largest(load)), 0);
    for (const load of [...distributed].sort((a, b) => b.to - b.from - (a.to - a.from) || a.row - b.row)) {
      this.block(load, peak);
    }
    for (const load of loads) if (load.kind === 'camber' || load.kind === 'curvature') this.arc(load);
    const most = Math.max(...this.points.map((load) => Math.abs(load.force)), 0);
    // from the right: a label that leans to the right then never stands in the way of an arrow still to come
    for (let i = this.points.length - 1; i >= 0; i--) this.arrow(i, most);
    for (const load of loads) {
      if (load.kind === 'couple') this.couple(load);
      else if (load.kind === 'axial') this.axial(load);
      else if (load.kind === 'settlement' || load.kind === 'rotation') this.moved(load);
    }
    return { group: this.group, top: this.top, bottom: this.bottom };
  }

  private number(value: number): string {
    return formatNumber(value, this.options.separators, 4);
  }

  /** The case's name before the value, so that colour is never the only sign. */
  private label(load: Load, value: string): string {
    const name = this.model.cases[load.case];
    return name === undefined ? value : `${name} ${value}`;
  }

  private begin(load: Load, what: string): SVGElement {
    const idle = load.case >= 0 && this.input.factors !== null && (this.input.factors[load.case] ?? 0) === 0;
    const group = svg(
      'g',
      { class: `sp-load ${caseClass(load.case)}${idle ? ' sp-idle' : ''}`, 'data-row': load.row },
      svg('title', null, texts.drawing.loadTitle(load.row, what)),
    );
    this.group.append(group);
    return group;
  }

  private reach(...ys: number[]): void {
    for (const y of ys) {
      this.top = Math.min(this.top, y);
      this.bottom = Math.max(this.bottom, y);
    }
  }

  /** Draws the text in the first free place of the wishes; gives its baseline, or null when there is none. */
  private write(group: SVGElement, words: string, wishes: readonly Box[]): number | null {
    const box = this.placer.first(wishes);
    if (!box) return null;
    const y = box.top + TEXT - 1;
    group.append(
      svg(
        'text',
        { class: 'sp-label', x: px(box.left + box.width / 2), y: px(y), 'text-anchor': 'middle' },
        words,
      ),
    );
    this.reach(box.top, y);
    return y;
  }

  /** Tries the text with its left edge (or its middle) at x and its baseline at y, then higher lines. */
  private text(
    group: SVGElement,
    words: string,
    x: number,
    baseline: number,
    { climb = CLIMB, step = -LINE, centred = true } = {},
  ): number | null {
    const width = textWidth(words, TEXT);
    const left = centred ? x - width / 2 : x;
    const wishes: Box[] = [];
    for (let line = 0; line <= climb; line++) {
      wishes.push({ left, top: baseline + line * step - TEXT + 1, width, height: TEXT + 1 });
    }
    return this.write(group, words, wishes);
  }

  /** A label over a stretch: in its middle, else beside it, but not across a point arrow; one line higher as a last try. */
  private over(
    group: SVGElement,
    words: string,
    left: number,
    right: number,
    baseline: number,
  ): number | null {
    const width = textWidth(words, TEXT);
    const middle = (left + right - width) / 2;
    const reach = Math.max(0, (right - left - width) / 2 + 12);
    const wishes: Box[] = [];
    for (const line of [0, 1]) {
      for (let shift = 0; shift <= reach; shift += SIDESTEP) {
        for (const at of shift === 0 ? [middle] : [middle - shift, middle + shift]) {
          const box = { left: at, top: baseline - line * LINE - TEXT + 1, width, height: TEXT + 1 };
          const inside = this.placer.inside(box);
          const crossed = this.shafts.some((x) => x > inside.left - 3 && x < inside.left + width + 3);
          if (!crossed) wishes.push(box);
        }
      }
    }
    return this.write(group, words, wishes);
  }

  private largest(load: Of<'distributed'>): number {
    let most = 0;
    for (let i = 0; i <= SAMPLES; i++) {
      const x = load.from + ((load.to - load.from) * i) / SAMPLES;
      most = Math.max(most, Math.abs(lawAt(load.law, load.from, load.to, x)));
    }
    return most;
  }

  private levelOver(from: number, to: number): number {
    let level = 0;
    for (const brick of this.stack)
      if (brick.from < to && from < brick.to) level = Math.min(level, brick.top);
    return level;
  }

  private block(load: Of<'distributed'>, peak: number): void {
    const { x } = this.frame;
    const left = x(load.from);
    const right = x(load.to);
    const values: number[] = [];
    const steps = load.law.kind === 'linear' ? 1 : SAMPLES;
    for (let i = 0; i <= steps; i++) {
      values.push(lawAt(load.law, load.from, load.to, load.from + ((load.to - load.from) * i) / steps));
    }
    const half = Math.max(this.half(load.from), this.half((load.from + load.to) / 2), this.half(load.to));
    const floor = Math.min(-half - 2, this.levelOver(left, right) - 2);
    const size = (value: number): number =>
      value === 0 || peak === 0 ? 0 : Math.max(BLOCK_LEAST, (Math.abs(value) / peak) * BLOCK_MOST);
    const unit = unitOf(this.model, 'distributed');
    const show = (value: number): string => this.number(Math.abs(value));
    const { law } = load;
    let words =
      law.kind === 'function'
        ? law.text
        : law.start === law.end
          ? show(law.start)
          : texts.drawing.fromTo(show(law.start), show(law.end));
    words = this.label(load, withUnit(words, unit));
    const group = this.begin(load, words);

    let outline = path('M', left, floor);
    values.forEach((value, i) => {
      outline += path(' L', left + ((right - left) * i) / steps, floor - size(value));
    });
    outline += path(' L', right, floor, 'Z');
    group.append(svg('path', { class: 'sp-block', d: outline }));

    const count = Math.max(2, Math.round((right - left) / 16));
    let arrows = '';
    for (let i = 0; i <= count; i++) {
      const position = load.from + ((load.to - load.from) * i) / count;
      const value = lawAt(law, load.from, load.to, position);
      const height =
        steps === 1 ? interpolate(size(values[0] ?? 0), size(values[1] ?? 0), i / count) : size(value);
      if (height < 4) continue;
      arrows += smallArrow(left + ((right - left) * i) / count, floor - height, floor, value > 0);
    }
    group.append(svg('path', { class: 'sp-arrow', d: arrows }));

    const roof = floor - Math.max(...values.map(size));
    const baseline = this.over(group, words, left, right, roof - 3);
    this.reach(roof);
    this.placer.take({ left, top: roof, width: right - left, height: floor - roof });
    const top = baseline === null ? roof : baseline - TEXT + 1;
    this.stack.push({ from: left, to: right, top: Math.min(roof, top) });
  }

  private arrow(index: number, most: number): void {
    const load = this.points[index];
    const x = this.shafts[index];
    if (!load || x === undefined) return;
    const length = Math.max(POINT_LEAST, most > 0 ? (Math.abs(load.force) / most) * POINT_MOST : 0);
    const tip = -this.half(load.at) - 1;
    const level = this.levelOver(x - 1, x + 1);
    const words = this.label(load, withUnit(this.number(Math.abs(load.force)), unitOf(this.model, 'force')));
    const group = this.begin(load, words);
    const wish = Math.min(tip - length, level - 8);
    const neighbour = this.shafts[index - 1] ?? -Infinity;
    const centred = x - neighbour > textWidth(words, TEXT) / 2 + 4;
    const width = textWidth(words, TEXT);
    const { left } = this.placer.inside({ left: centred ? x - width / 2 : x - 3, top: 0, width, height: 1 });
    // at the right edge a label is pushed back over its neighbours: then it is left out
    const baseline =
      neighbour > left - 3 ? null : this.text(group, words, left, wish - 3, { centred: false });
    // a label that had to climb keeps its arrow attached
    const tail = baseline === null ? wish : Math.min(wish, baseline + 3);
    this.reach(tail);
    this.placer.take({ left: x - 2, top: tail, width: 4, height: tip - tail });
    const [from, to] = load.force >= 0 ? [tail, tip] : [tip, tail];
    const shaft = path('M', x, from, 'V', to + (to > from ? -5 : 5));
    group.append(
      svg('path', { class: 'sp-halo', d: shaft }),
      svg('path', { class: 'sp-shaft', d: shaft }),
      svg('path', { class: 'sp-head', d: head(x, to, to > from) }),
    );
  }

  private couple(load: Of<'couple'>): void {
    const x = this.frame.x(load.at);
    const radius = 10;
    const clockwise = load.couple >= 0;
    const words = this.label(
      load,
      withUnit(this.number(Math.abs(load.couple)), unitOf(this.model, 'couple')),
    );
    const group = this.begin(load, words);
    // three quarters of a circle, open at the lower side where it ends
    const a = clockwise ? -radius * 0.71 : radius * 0.71;
    const d = path(
      'M',
      x + a,
      radius * 0.71,
      'A',
      radius,
      radius,
      0,
      1,
      clockwise ? 1 : 0,
      x - a,
      radius * 0.71,
    );
    const tipX = x - a;
    const tipY = radius * 0.71;
    const s = clockwise ? -1 : 1;
    group.append(
      svg('path', { class: 'sp-halo', d }),
      svg('path', { class: 'sp-shaft', d }),
      svg('path', {
        class: 'sp-head',
        d: path(
          'M',
          tipX + s * 3.2,
          tipY + 3.4,
          'L',
          tipX - s * 3.6,
          tipY + 0.6,
          'L',
          tipX + s * 1.6,
          tipY - 4.6,
          'Z',
        ),
      }),
      svg('circle', { class: 'sp-dot', cx: px(x), cy: 0, r: 1.8 }),
    );
    const level = this.levelOver(x - radius, x + radius);
    this.text(group, words, x, Math.min(-radius, level) - 4);
    this.reach(-radius, radius);
  }

  private axial(load: Of<'axial'>): void {
    const words = this.label(
      load,
      texts.drawing.axial(
        withUnit(this.number(Math.abs(load.force)), unitOf(this.model, 'force')),
        load.force >= 0,
      ),
    );
    const group = this.begin(load, words);
    const out = load.force >= 0;
    for (const [x, side] of [
      [this.frame.left, -1],
      [this.frame.right, 1],
    ] as const) {
      const near = x + side * 8;
      const far = x + side * 21;
      const [from, to] = out ? [near, far] : [far, near];
      const d = out === side > 0 ? 1 : -1;
      group.append(
        svg('path', { class: 'sp-shaft', d: path('M', from, 0, 'H', to) }),
        svg('path', { class: 'sp-head', d: path('M', to, 0, 'l', -6 * d, -3, 'v', 6, 'Z') }),
      );
    }
    const width = textWidth(words, TEXT);
    const high = -this.half(this.model.start) - 6 - TEXT;
    const low = this.below - TEXT;
    const { left, right } = this.frame;
    const box = (x: number, top: number): Box => ({ left: x, top, width, height: TEXT + 1 });
    // above an end where nothing stands, else below it between the supports
    this.write(group, words, [
      box(left, high),
      box(right - width, high),
      box(left + 14, low),
      box(right - width - 14, low),
      box(left + 14, low + LINE),
    ]);
  }

  /** Camber bows up over its stretch; free curvature is drawn to the side it bends. */
  private arc(load: Of<'camber'> | Of<'curvature'>): void {
    const { x } = this.frame;
    const left = x(load.from);
    const right = x(load.to);
    const value = load.kind === 'camber' ? load.rise : load.curvature;
    const shown =
      load.kind === 'camber'
        ? withUnit(
            this.number(Math.abs(this.input.show('deflection', value))),
            unitOf(this.model, 'deflection'),
          )
        : withUnit(this.number(value), this.model.units ? `rad/${this.model.units.length}` : '');
    const words = this.label(load, texts.drawing[load.kind](shown));
    const group = this.begin(load, words);
    const floor = Math.min(-this.half(load.from) - 2, this.levelOver(left, right) - 2);
    const up = load.kind === 'camber' ? value >= 0 : value < 0;
    const rise = 9;
    const base = up ? floor : floor - rise;
    group.append(
      svg('path', {
        class: 'sp-shaft sp-bow',
        d: path('M', left, base, 'Q', (left + right) / 2, base + (up ? -2 : 2) * rise, right, base),
      }),
    );
    const baseline = this.over(group, words, left, right, floor - rise - 3);
    this.reach(floor - rise);
    this.stack.push({ from: left, to: right, top: (baseline ?? floor - rise) - TEXT });
  }

  private moved(load: Of<'settlement'> | Of<'rotation'>): void {
    const x = this.frame.x(load.at);
    const top = this.below;
    if (load.kind === 'settlement') {
      const shown = this.number(Math.abs(this.input.show('deflection', load.displacement)));
      const words = this.label(
        load,
        texts.drawing.settlement(withUnit(shown, unitOf(this.model, 'deflection'))),
      );
      const group = this.begin(load, words);
      const down = load.displacement >= 0;
      const [from, to] = down ? [top + 1, top + 13] : [top + 13, top + 1];
      group.append(
        svg('path', { class: 'sp-shaft', d: path('M', x, from, 'V', to) }),
        svg('path', { class: 'sp-head', d: head(x, to, down) }),
      );
      this.text(group, words, x + 6 + textWidth(words, TEXT) / 2, top + 12, { climb: 2, step: LINE });
      this.reach(top + 14);
      return;
    }
    const words = this.label(
      load,
      texts.drawing.rotation(withUnit(this.number(Math.abs(load.angle)), 'rad')),
    );
    const group = this.begin(load, words);
    const s = load.angle >= 0 ? 1 : -1;
    group.append(
      svg('path', {
        class: 'sp-shaft',
        d: path('M', x - s * 9, top + 4, 'A', 12, 12, 0, 0, s > 0 ? 1 : 0, x + s * 8, top + 4),
      }),
      svg('path', {
        class: 'sp-head',
        d: path('M', x + s * 10.5, top + 6.5, 'l', s * -6.5, -1.2, 'l', s * 5, -5, 'Z'),
      }),
    );
    this.text(group, words, x + 14 + textWidth(words, TEXT) / 2, top + 12, { climb: 2, step: LINE });
    this.reach(top + 14);
  }
}

function interpolate(a: number, b: number, t: number): number {
  return a + (b - a) * t;
}

/** Filled head with its tip at (x, y). */
function head(x: number, y: number, down: boolean): string {
  const d = down ? -1 : 1;
  return path('M', x, y, 'l', -3.4, 7 * d, 'h', 6.8, 'Z');
}

/** Thin arrow of a distributed load between its roof and its floor. */
function smallArrow(x: number, roof: number, floor: number, down: boolean): string {
  const [from, to, d] = down ? [roof, floor, -1] : [floor, roof, 1];
  return path('M', x, from, 'V', to, 'm', -2, 3.2 * d, 'l', 2, -3.2 * d, 'l', 2, 3.2 * d, ' ');
}

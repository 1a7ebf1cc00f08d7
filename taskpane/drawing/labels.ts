/**
 * Puts texts where they do not cover each other. In a browser their widths are measured; without one (tests, golden files)
 * they are estimated from a table of letter widths, so that a drawing is the same on every machine.
 */

export interface Box {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** Widths in units of the font size, of a common sans-serif face. */
function letterWidth(letter: string): number {
  if (/[ilI.,;:'|!·\u202f]/.test(letter)) return 0.3;
  if (/[ftjr()[\]/ \-⁻]/.test(letter)) return 0.36;
  if (/[⁰¹²³⁴⁵⁶⁷⁸⁹]/.test(letter)) return 0.38;
  if (/[mwMW@%]/.test(letter)) return 0.92;
  if (/[A-Z=+−×<>≤≥]/.test(letter)) return 0.68;
  return 0.57;
}

type Measure = (text: string, size: number) => number;
let measure: Measure | null = null;

/** Measures with a canvas in the face of an element, from now on; returns false where there is no canvas. */
export function measureLike(element: Element): boolean {
  if (typeof CanvasRenderingContext2D === 'undefined') return false;
  const context = document.createElement('canvas').getContext('2d');
  if (!context) return false;
  const face = getComputedStyle(element).fontFamily || 'sans-serif';
  const known = new Map<string, number>();
  const pen = context;
  measure = (text, size) => {
    const key = `${size} ${text}`;
    let width = known.get(key);
    if (width === undefined) {
      pen.font = `${size}px ${face}`;
      width = pen.measureText(text).width;
      if (known.size > 2000) known.clear();
      known.set(key, width);
    }
    return width;
  };
  return true;
}

export function textWidth(text: string, size: number): number {
  if (measure) return measure(text, size) + 1;
  let units = 0;
  for (const letter of text) units += letterWidth(letter);
  return units * size;
}

export function overlap(a: Box, b: Box, gap = 1): boolean {
  return (
    a.left < b.left + b.width + gap &&
    b.left < a.left + a.width + gap &&
    a.top < b.top + b.height + gap &&
    b.top < a.top + a.height + gap
  );
}

/** Lines that labels should not cross: a curve as one y per pixel from `from` on, and straight strokes. */
export interface Ink {
  readonly from: number;
  readonly curve: readonly number[];
  readonly lines: readonly {
    readonly x0: number;
    readonly x1: number;
    readonly y0: number;
    readonly y1: number;
  }[];
}

function crosses(box: Box, { from, curve, lines }: Ink): boolean {
  const top = box.top + 1;
  const bottom = box.top + box.height;
  const first = Math.max(0, Math.floor(box.left) - from);
  const last = Math.min(curve.length - 1, Math.ceil(box.left + box.width) - from);
  for (let i = first; i < last; i++) {
    const a = curve[i] ?? 0;
    const b = curve[i + 1] ?? a;
    if (Math.max(a, b) > top && Math.min(a, b) < bottom) return true;
  }
  return lines.some(({ x0, x1, y0, y1 }) => {
    const left = Math.max(box.left, x0);
    const right = Math.min(box.left + box.width, x1);
    if (left >= right) return false;
    const at = (x: number): number => y0 + ((y1 - y0) * (x - x0)) / (x1 - x0);
    return Math.max(at(left), at(right)) > top && Math.min(at(left), at(right)) < bottom;
  });
}

export class Placer {
  private readonly taken: Box[] = [];
  private ink: Ink | null = null;
  constructor(
    private readonly left: number,
    private readonly right: number,
  ) {}

  /** Moves a box sideways so that it stays inside the frame. */
  inside(box: Box): Box {
    const most = Math.max(this.left, this.right - box.width);
    return { ...box, left: Math.min(Math.max(box.left, this.left), most) };
  }

  free(box: Box): boolean {
    return !this.taken.some((other) => overlap(box, other));
  }

  take(box: Box): void {
    this.taken.push(box);
  }

  keepOff(ink: Ink): void {
    this.ink = ink;
  }

  /** The first free wish that crosses none of the ink; taken at once. */
  clear(wishes: readonly Box[]): Box | null {
    const { ink } = this;
    return this.first(ink ? wishes.filter((wish) => !crosses(this.inside(wish), ink)) : wishes);
  }

  /** The first of the wishes (moved inside the frame) that is free; taken at once. null when none is. */
  first(wishes: readonly Box[]): Box | null {
    for (const wish of wishes) {
      const box = this.inside(wish);
      if (this.free(box)) {
        this.take(box);
        return box;
      }
    }
    return null;
  }
}

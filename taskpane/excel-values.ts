/** Cells between the port's form and Excel's own, without Excel: pure, so that it can be tested as it is. */
import type { CellInput, Theme } from './port';

const MONTH = /^(?:jan|feb|mar|apr|may|jun|jul|aug|sep|oct|nov|dec)[a-z]*[ .\-/]*\d/i;

/** What Excel must be given so that the cell ends up holding exactly this. `null` in a written matrix leaves a cell alone. */
export function toExcel(input: CellInput | undefined): string | number | boolean | null {
  if (input === undefined) return null;
  if (input === null) return '';
  if (typeof input === 'object') return input.formula;
  if (typeof input !== 'string') return input;
  // typed into a cell these would become a number, a date, a truth value or a formula: the apostrophe keeps them text
  const risky = !/^[\p{L}_]/u.test(input) || /^(?:true|false)$/i.test(input) || MONTH.test(input);
  return risky && input !== '' ? `'${input}` : input;
}

/** Excel gives the literal where a cell has no formula. */
export function formulaOf(raw: unknown): string {
  return typeof raw === 'string' && raw.startsWith('=') ? raw : '';
}

export function isFilled(value: unknown, formula: string): boolean {
  return formula !== '' || (value !== null && value !== undefined && value !== '');
}

/** "#rrggbb" or "rrggbb" -> relative brightness 0..1 (Rec. 709 weights on the coded values: enough to tell dark from light). */
export function brightness(colour: string): number | null {
  const hex = /^#?([0-9a-f]{6})$/i.exec(colour.trim())?.[1];
  if (hex === undefined) return null;
  const part = (at: number): number => parseInt(hex.slice(at, at + 2), 16) / 255;
  return 0.2126 * part(0) + 0.7152 * part(2) + 0.0722 * part(4);
}

/** The pane's theme from the host's colours; without them from what the system prefers. */
export function themeFrom(
  background: string | undefined,
  text: string | undefined,
  prefersDark: boolean,
): Theme {
  const light = background === undefined ? null : brightness(background);
  const ink = text === undefined ? null : brightness(text);
  if (light === null || ink === null) return { dark: prefersDark, background: null, text: null };
  // a theme whose own text is hard to read on its ground would make the pane unreadable: then ours is used
  const apart = Math.abs(light - ink) >= 0.6;
  const hash = (colour: string): string => (colour.startsWith('#') ? colour : `#${colour}`);
  return {
    dark: light < 0.5,
    background: apart && background !== undefined ? hash(background) : null,
    text: apart && text !== undefined ? hash(text) : null,
  };
}

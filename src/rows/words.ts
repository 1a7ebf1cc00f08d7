/** The words of the row language: columns, items and their synonyms. */
import { nearest } from './near';

export const COLUMNS = ['Item', 'At', 'To', 'Value', 'End value', 'Unit', 'Case', 'Note'] as const;
export type ColumnName = (typeof COLUMNS)[number];

export type ItemName =
  | 'pin'
  | 'fixed'
  | 'guided'
  | 'spring'
  | 'rotational spring'
  | 'settlement'
  | 'rotation'
  | 'foundation'
  | 'hinge'
  | 'shear release'
  | 'E'
  | 'I'
  | 'EI'
  | 'GA'
  | 'point'
  | 'couple'
  | 'uniform'
  | 'varying'
  | 'curvature'
  | 'axial'
  | 'camber'
  | 'units'
  | 'axis'
  | 'limit';

/** Every accepted word, lower case and single-spaced -> its item. */
const ITEMS: ReadonlyMap<string, ItemName> = new Map<string, ItemName>([
  ['pin', 'pin'],
  ['pinned', 'pin'],
  ['roller', 'pin'],
  ['support', 'pin'],
  ['fixed', 'fixed'],
  ['built in', 'fixed'],
  ['encastre', 'fixed'],
  ['clamped', 'fixed'],
  ['guided', 'guided'],
  ['spring', 'spring'],
  ['rotational spring', 'rotational spring'],
  ['settlement', 'settlement'],
  ['rotation', 'rotation'],
  ['foundation', 'foundation'],
  ['hinge', 'hinge'],
  ['shear release', 'shear release'],
  ['e', 'E'],
  ['i', 'I'],
  ['ei', 'EI'],
  ['ga', 'GA'],
  ['point', 'point'],
  ['point load', 'point'],
  ['force', 'point'],
  ['couple', 'couple'],
  ['moment', 'couple'],
  ['uniform', 'uniform'],
  ['udl', 'uniform'],
  ['varying', 'varying'],
  ['trapezoidal', 'varying'],
  ['triangular', 'varying'],
  ['curvature', 'curvature'],
  ['axial', 'axial'],
  ['camber', 'camber'],
  ['units', 'units'],
  ['axis', 'axis'],
  ['limit', 'limit'],
]);

const cache = new Map<string, ItemName | null>();

/** The item a word names; hyphens, underscores, accents, letter case and spacing do not matter. null: no such word. */
export function itemOf(word: string): ItemName | null {
  const known = cache.get(word);
  if (known !== undefined) return known;
  const item = ITEMS.get(plain(word)) ?? null;
  if (cache.size > 500) cache.clear();
  cache.set(word, item);
  return item;
}

/** The item word that was probably meant, as it is written in the documentation. */
export function itemMeant(word: string): string | undefined {
  const meant = nearest(plain(word), ITEMS.keys());
  if (meant === undefined) return undefined;
  if (meant === 'built in') return 'built-in';
  return /^(e|i|ei|ga)$/.test(meant) ? meant.toUpperCase() : meant;
}

function plain(word: string): string {
  return word
    .normalize('NFD')
    .replace(/[\u0300-\u036f]/g, '')
    .toLowerCase()
    .replace(/[\s_-]+/g, ' ')
    .trim();
}

const HEADINGS: ReadonlyMap<string, ColumnName> = new Map(COLUMNS.map((name) => [squeeze(name), name]));

/** The column a heading names; case and spacing do not matter. */
export function columnOf(heading: string): ColumnName | null {
  return HEADINGS.get(squeeze(heading)) ?? null;
}

/** The column a misspelt heading probably meant. */
export function columnMeant(heading: string): ColumnName | undefined {
  const meant = nearest(squeeze(heading), HEADINGS.keys());
  return meant === undefined ? undefined : HEADINGS.get(meant);
}

function squeeze(text: string): string {
  return text.toLowerCase().replace(/\s+/g, '');
}

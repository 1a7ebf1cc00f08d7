/** What each item takes, for hints in the editor: the cells it uses, a short meaning, the units that fit. */
import type { ColumnName } from '../engine';

export type Kind =
  | 'force'
  | 'couple'
  | 'line'
  | 'area'
  | 'stress'
  | 'second'
  | 'bending'
  | 'spring'
  | 'turn'
  | 'length'
  | 'angle'
  | 'perLength'
  | 'none';

export interface ItemGuide {
  /** the word offered by completion */
  readonly word: string;
  /** other accepted words, so that they are found too */
  readonly also: readonly string[];
  readonly uses: readonly ColumnName[];
  readonly kind: Kind;
}

const item = (word: string, kind: Kind, uses: string, ...also: string[]): ItemGuide => ({
  word,
  also,
  kind,
  uses: uses.split(' ').map((letter) => COLUMN_LETTERS[letter] ?? 'Note'),
});

const COLUMN_LETTERS: Readonly<Record<string, ColumnName>> = {
  a: 'At',
  t: 'To',
  v: 'Value',
  e: 'End value',
  u: 'Unit',
  c: 'Case',
};

/** In the order a designer meets them. */
export const ITEMS: readonly ItemGuide[] = [
  item('pin', 'none', 'a', 'pinned', 'support'),
  item('roller', 'none', 'a'),
  item('fixed', 'none', 'a', 'built-in', 'encastre', 'clamped'),
  item('uniform', 'line', 'a t v u c', 'udl'),
  item('point', 'force', 'a v u c', 'point load', 'force'),
  item('varying', 'line', 'a t v e u c', 'trapezoidal', 'triangular'),
  item('couple', 'couple', 'a v u c', 'moment'),
  item('E', 'stress', 'a t v u'),
  item('I', 'second', 'a t v e u'),
  item('EI', 'bending', 'a t v e u'),
  item('GA', 'force', 'a t v e u'),
  item('hinge', 'none', 'a'),
  item('guided', 'none', 'a'),
  item('spring', 'spring', 'a v u'),
  item('rotational spring', 'turn', 'a v u'),
  item('shear release', 'none', 'a'),
  item('foundation', 'area', 'a t v u'),
  item('settlement', 'length', 'a v u c'),
  item('rotation', 'angle', 'a v u c'),
  item('curvature', 'perLength', 'a t v u c'),
  item('axial', 'force', 'v u c'),
  item('camber', 'length', 'a t v u c'),
  item('units', 'none', 'a t v'),
  item('axis', 'none', 'a'),
  item('limit', 'length', 'v u c'),
];

const byWord = new Map<string, ItemGuide>();
for (const guide of ITEMS)
  for (const word of [guide.word, ...guide.also]) byWord.set(word.toLowerCase(), guide);

export function guideOf(word: unknown): ItemGuide | null {
  if (typeof word !== 'string') return null;
  return byWord.get(word.trim().toLowerCase().replace(/\s+/g, ' ')) ?? null;
}

/** Item words that begin with, then that contain, what was typed. */
export function matchItems(typed: string): readonly string[] {
  const start = typed.trim().toLowerCase();
  if (start === '') return ITEMS.map((guide) => guide.word);
  const first: string[] = [];
  const later: string[] = [];
  for (const guide of ITEMS) {
    const words = [guide.word, ...guide.also].map((word) => word.toLowerCase());
    if (words.some((word) => word.startsWith(start))) first.push(guide.word);
    else if (words.some((word) => word.includes(start))) later.push(guide.word);
  }
  return [...first, ...later];
}

export interface UnitSystem {
  readonly force: string;
  readonly length: string;
  readonly deflection: string;
}

const US = /^(lbf|lb|kip|klf|plf|in|ft)/;

/** Units that fit a kind, those of the table's own system first. */
export function unitsFor(kind: Kind, system: UnitSystem | null): readonly string[] {
  const american = system !== null && (US.test(system.force) || US.test(system.length));
  const own = system ? ownUnit(kind, system) : [];
  const more = american ? AMERICAN[kind] : METRIC[kind];
  return [...new Set([...own, ...more])];
}

function ownUnit(kind: Kind, { force, length, deflection }: UnitSystem): string[] {
  switch (kind) {
    case 'force':
      return [force];
    case 'couple':
      return [`${force}·${length}`];
    case 'line':
    case 'spring':
      return [`${force}/${length}`];
    case 'area':
      return [`${force}/${length}²`];
    case 'turn':
      return [`${force}·${length}/rad`];
    case 'length':
      return [deflection];
    case 'angle':
      return ['rad'];
    case 'perLength':
      return [`1/${length}`];
    case 'bending':
      return [`${force}·${length}²`];
    default:
      return [];
  }
}

const METRIC: Readonly<Record<Kind, readonly string[]>> = {
  force: ['kN', 'N', 'MN'],
  couple: ['kN·m', 'N·m', 'N·mm'],
  line: ['kN/m', 'N/mm', 'N/m'],
  area: ['kN/m²', 'N/mm²', 'MN/m²'],
  stress: ['GPa', 'MPa', 'N/mm²'],
  second: ['cm4', 'mm4', 'm4'],
  bending: ['kN·m²', 'N·mm²', 'MN·m²'],
  spring: ['kN/m', 'kN/mm', 'N/mm'],
  turn: ['kN·m/rad', 'N·m/rad'],
  length: ['mm', 'cm', 'm'],
  angle: ['rad', 'mrad', 'deg'],
  perLength: ['1/m', '1/mm'],
  none: [],
};

const AMERICAN: Readonly<Record<Kind, readonly string[]>> = {
  force: ['kip', 'lbf'],
  couple: ['kip-ft', 'kip·in', 'lbf·ft'],
  line: ['klf', 'plf', 'kip/in'],
  area: ['ksf', 'psf', 'ksi'],
  stress: ['ksi', 'psi'],
  second: ['in4'],
  bending: ['kip·in²', 'kip·ft²'],
  spring: ['kip/in', 'klf', 'lbf/in'],
  turn: ['kip-ft/rad', 'kip·in/rad'],
  length: ['in', 'ft'],
  angle: ['rad', 'deg'],
  perLength: ['1/in', '1/ft'],
  none: [],
};

export const COLUMNS: readonly ColumnName[] = [
  'Item',
  'At',
  'To',
  'Value',
  'End value',
  'Unit',
  'Case',
  'Note',
];
/** columns whose cells hold numbers: typed text that reads as a number becomes one */
export const NUMERIC: ReadonlySet<ColumnName> = new Set<ColumnName>(['At', 'To', 'Value', 'End value']);

/**
 * Section rows -> stretches of EI that cover the beam exactly once, and of GA. E stretches and I stretches are laid over each
 * other; EI rows may cover the rest. Gaps and overlaps are named with their stretch and rows.
 */
import type { Law, SectionStretch } from '../beam/model';
import type { Evaluated } from './build';
import { cutLaw, timesLaw } from './law';
import type { ItemName } from './words';

interface Part {
  readonly from: number;
  readonly to: number;
  readonly law: Law;
  readonly rows: readonly number[];
}

export interface Section {
  readonly ei: readonly SectionStretch[];
  readonly ga: readonly SectionStretch[];
  readonly modulus: number | null;
}

export function gatherSection(beam: Evaluated): Section {
  const parts: Record<'E' | 'I' | 'EI' | 'GA', Part[]> = { E: [], I: [], EI: [], GA: [] };
  const { placed } = beam.plan;
  for (let k = 0; k < placed.length; k += 1) {
    const { item, row } = placed[k]!;
    if (item !== 'E' && item !== 'I' && item !== 'EI' && item !== 'GA') continue;
    parts[item].push({ from: beam.from(placed[k]!), to: beam.to(placed[k]!), law: beam.law(k), rows: [row] });
  }
  let clean = true;
  for (const item of ['E', 'I', 'EI', 'GA'] as const) {
    clean = disjoint(parts[item], item, beam) && clean;
  }
  if (!clean) return { ei: [], ga: [], modulus: null };
  const products = multiply(parts.E, parts.I);
  const ei = parts.EI.length === 0 ? products : merge(products, parts.EI, beam);
  if (ei !== null) covers(ei, parts, beam);
  return { ei: ei ?? [], ga: parts.GA, modulus: parts.EI.length === 0 ? oneNumber(parts.E) : null };
}

/** Sorts; false when two stretches overlap. */
function disjoint(parts: Part[], item: ItemName, beam: Evaluated): boolean {
  if (parts.length < 2) return true;
  parts.sort((a, b) => a.from - b.from);
  let clean = true;
  let reach = parts[0]!;
  for (let k = 1; k < parts.length; k += 1) {
    const part = parts[k]!;
    if (part.from < reach.to) {
      overlap(item, reach, part, beam);
      clean = false;
    }
    if (part.to > reach.to) reach = part;
  }
  return clean;
}

function overlap(what: string, a: Part, b: Part, beam: Evaluated): void {
  beam.issues.push({
    code: 'section-overlap',
    kind: 'invalid',
    row: Math.max(a.rows[a.rows.length - 1]!, b.rows[b.rows.length - 1]!),
    column: 'At',
    found: what,
    detail: {
      from: beam.show(Math.max(a.from, b.from)),
      to: beam.show(Math.min(a.to, b.to)),
      rows: [...a.rows, ...b.rows].sort((x, y) => x - y).map(String),
    },
  });
}

/** E x I where both are given. Both lists are sorted and without overlaps. */
function multiply(e: readonly Part[], i: readonly Part[]): Part[] {
  const found: Part[] = [];
  let p = 0;
  let q = 0;
  while (p < e.length && q < i.length) {
    const a = e[p]!;
    const b = i[q]!;
    const from = Math.max(a.from, b.from);
    const to = Math.min(a.to, b.to);
    if (from < to) {
      const law = timesLaw(
        cutLaw(a.law, a.from, a.to, from, to),
        cutLaw(b.law, b.from, b.to, from, to),
        from,
        to,
      );
      found.push({ from, to, law, rows: [...a.rows, ...b.rows].sort((x, y) => x - y) });
    }
    if (a.to <= b.to) p += 1;
    if (b.to <= a.to) q += 1;
  }
  return found;
}

function merge(products: readonly Part[], ei: readonly Part[], beam: Evaluated): Part[] | null {
  const all = [...products, ...ei].sort((a, b) => a.from - b.from);
  let clean = true;
  for (let k = 1; k < all.length; k += 1) {
    if (all[k]!.from < all[k - 1]!.to) {
      overlap('EI', all[k - 1]!, all[k]!, beam);
      clean = false;
    }
  }
  return clean ? all : null;
}

function covers(ei: readonly Part[], parts: Record<'E' | 'I' | 'EI', Part[]>, beam: Evaluated): void {
  if (parts.E.length === 0 && parts.I.length === 0 && parts.EI.length === 0) {
    beam.issues.push({ code: 'section-missing', kind: 'invalid', expected: 'E and I, or EI' });
    return;
  }
  if (parts.EI.length === 0 && (parts.E.length === 0 || parts.I.length === 0)) {
    beam.issues.push({
      code: 'section-missing',
      kind: 'invalid',
      expected: parts.E.length === 0 ? 'E' : 'I',
    });
    return;
  }
  let reached = beam.start;
  for (const part of ei) {
    if (part.from > reached) gap(reached, part.from, parts, beam);
    if (part.to > reached) reached = part.to;
  }
  if (reached < beam.end) gap(reached, beam.end, parts, beam);
}

function gap(from: number, to: number, parts: Record<'E' | 'I' | 'EI', Part[]>, beam: Evaluated): void {
  const middle = (from + to) / 2;
  const has = (list: readonly Part[]) => list.some((part) => part.from <= middle && middle < part.to);
  const expected = has(parts.E) ? 'I' : has(parts.I) ? 'E' : parts.E.length === 0 ? 'EI' : 'E and I';
  beam.issues.push({
    code: 'section-gap',
    kind: 'invalid',
    expected,
    detail: { from: beam.show(from), to: beam.show(to) },
  });
}

function oneNumber(parts: readonly Part[]): number | null {
  const [first] = parts;
  if (first === undefined || first.law.kind !== 'linear') return null;
  const value = first.law.start;
  return parts.every(({ law }) => law.kind === 'linear' && law.start === value && law.end === value)
    ? value
    : null;
}

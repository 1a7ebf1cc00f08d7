/** The last two arguments of every formula: names and their values, two ranges of the same size. */
import type { Issue } from '../issue';
import { isBlank, isErrorCell, normaliseCell, showCell, type Cell } from './cell';
import { RESERVED } from './expression';
import { remember } from './memo';

/** A value is a number, or text with a unit such as "12 kN/m". */
export type Bindings = ReadonlyMap<string, number | string>;

export type BindingsResult =
  { readonly ok: true; readonly bindings: Bindings } | { readonly ok: false; readonly issues: Issue[] };

export const NO_BINDINGS: Bindings = new Map();

const NAME = /^[\p{L}_][\p{L}\p{N}_]*$/u;
const nameFault = remember((name: string) =>
  RESERVED.has(name) ? 'reserved-name' : NAME.test(name) ? '' : 'bad-name',
);

/** `names` and `values` as the host delivers them: matrices, single cells, or null when left out. */
export function readBindings(names: unknown, values: unknown): BindingsResult {
  const keys = flatten(names);
  const given = flatten(values);
  if (keys.every(isBlank) && given.every(isBlank)) return { ok: true, bindings: NO_BINDINGS };
  if (keys.length !== given.length) {
    return {
      ok: false,
      issues: [
        {
          code: 'names-size',
          kind: 'invalid',
          column: 'values',
          expected: String(keys.length),
          found: String(given.length),
        },
      ],
    };
  }
  const bindings = new Map<string, number | string>();
  const issues: Issue[] = [];
  for (let i = 0; i < keys.length; i += 1) {
    const name = keys[i]!;
    const value = given[i]!;
    // A pair without a name binds nothing: ranges may have spare columns.
    if (isBlank(name)) continue;
    if (typeof name !== 'string') {
      issues.push(nameIssue(isErrorCell(name) ? 'cell-error' : 'bad-name', showCell(name)));
      continue;
    }
    const fault = nameFault(name);
    if (fault !== '') issues.push(nameIssue(fault, name));
    else if (bindings.has(name)) issues.push(nameIssue('name-twice', name));
    else if (typeof value === 'boolean')
      issues.push({
        code: 'bad-value',
        kind: 'invalid',
        column: 'values',
        found: showCell(value),
        detail: { name },
      });
    else if (isErrorCell(value))
      issues.push({
        code: 'cell-error',
        kind: 'invalid',
        column: 'values',
        found: value.error,
        detail: { name },
      });
    else bindings.set(name, value ?? 0);
  }
  return issues.length > 0 ? { ok: false, issues } : { ok: true, bindings };
}

function nameIssue(code: string, found: string): Issue {
  return { code, kind: 'invalid', column: 'names', found };
}

function flatten(raw: unknown): Cell[] {
  if (!Array.isArray(raw)) return raw === null || raw === undefined ? [] : [normaliseCell(raw)];
  const cells: Cell[] = [];
  for (const row of raw as readonly unknown[]) {
    if (Array.isArray(row)) for (const cell of row as readonly unknown[]) cells.push(normaliseCell(cell));
    else cells.push(normaliseCell(row));
  }
  return cells;
}

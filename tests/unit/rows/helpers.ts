import type { BeamModel } from '../../../src/beam/model';
import type { Issue } from '../../../src/issue';
import { compileTable, readBindings } from '../../../src/rows';

type Rows = readonly (readonly unknown[])[];

/** A table with names -> its build result; faulty names fail the test. */
export function built(rows: Rows, names: Record<string, unknown> = {}) {
  const bindings = readBindings([Object.keys(names)], [Object.values(names)]);
  if (!bindings.ok) throw new Error(JSON.stringify(bindings.issues));
  return compileTable(rows).build(bindings.bindings);
}

export function modelOf(rows: Rows, names: Record<string, unknown> = {}): BeamModel {
  const result = built(rows, names);
  if (!result.ok) throw new Error(JSON.stringify(result.issues));
  return result.model;
}

export function issuesOf(rows: Rows, names: Record<string, unknown> = {}): readonly Issue[] {
  const result = built(rows, names);
  return result.ok ? [] : result.issues;
}

/** "row column code" of every issue, e.g. "3 Unit wrong-dimension" */
export function faults(rows: Rows, names: Record<string, unknown> = {}): string[] {
  return issuesOf(rows, names).map(({ row, column, code }) => [row ?? '-', column ?? '-', code].join(' '));
}

export function cautionsOf(rows: Rows, names: Record<string, unknown> = {}) {
  const result = built(rows, names);
  if (!result.ok) throw new Error(JSON.stringify(result.issues));
  return result.cautions;
}

/** A beam that is whole apart from what a test adds: 0..6, pins at both ends, EI 1. */
export const PLAIN: Rows = [
  ['pin', 0],
  ['pin', 6],
  ['EI', '', '', 1],
];

/** The same with units kN, m, mm; E = 200 GPa, I = 5000 cm4, so EI = 10 000 kN·m². */
export const METRIC: Rows = [
  ['units', 'kN', 'm', 'mm'],
  ['pin', 0],
  ['pin', 6],
  ['E', '', '', 200, '', 'GPa'],
  ['I', '', '', 5000, '', 'cm4'],
];

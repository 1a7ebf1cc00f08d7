/**
 * Works out one argument of a call: which cells it names and what stands in them. References, names, tables, spills,
 * literals, array constants and plain arithmetic or joining of these are followed; any other function is not, and says so.
 */
import type { Area, Block, TableInfo, WorkbookPort } from '../port';
import { parseArea } from '../address';
import { basicOf, textOf } from '../values';
import { parseFormula, type Node } from './parse';

/** A matrix of raw values, and the one area it came from when the argument is a plain reference. */
export interface Argument {
  readonly values: readonly (readonly unknown[])[];
  readonly area: Area | null;
}

/** The pane cannot follow this argument; `reason` is a key of the text catalogue, `what` the offending piece. */
export class CannotFollow extends Error {
  constructor(
    readonly reason:
      'function' | 'name' | 'table' | 'column' | 'sheet' | 'error' | 'operator' | 'shape' | 'deep',
    readonly what: string,
  ) {
    super(`${reason}: ${what}`);
    this.name = 'CannotFollow';
  }
}

export interface Place {
  readonly port: WorkbookPort;
  /** the cell that holds the formula: its sheet is meant where none is written, its row by `[@Column]` */
  readonly home: Area;
  /** areas read so far are added here, for "cells read" */
  readonly read: Area[];
}

const scalar = (value: unknown): Argument => ({ values: [[value]], area: null });

/** Up to this many cells an area keeps its whole shape even where the sheet is unused; beyond, its unused tail is cut. */
const WHOLE = 20000;

async function readArea(place: Place, area: Area): Promise<Argument> {
  const [block] = await place.port.read([area]);
  place.read.push(area);
  if (!block) {
    const sheets = await place.port.sheetNames();
    const known = sheets.find((sheet) => sheet.toLowerCase() === area.sheet.toLowerCase());
    if (known === undefined) throw new CannotFollow('sheet', area.sheet);
  }
  return padded(area, block ?? null);
}

/** The values in the shape the function itself sees, so that row numbers agree: what the host cut away comes back as blanks. */
export function padded(area: Area, block: Block | null): Argument {
  const whole = area.rows * area.columns <= WHOLE;
  const used = block?.area ?? { ...area, rows: 1, columns: 1 };
  const rows = whole ? area.rows : used.row - area.row + used.rows;
  const columns = whole ? area.columns : used.column - area.column + used.columns;
  const values = Array.from({ length: rows }, (_, i) =>
    Array.from(
      { length: columns },
      (_unused, j) => block?.values[i + area.row - used.row]?.[j + area.column - used.column] ?? null,
    ),
  );
  return { values, area: { ...area, rows, columns } };
}

/** Pieces of a specifier: `[#All],[Item]:[Note]` -> ["#All", "Item:Note"], `Item` -> ["Item"]. */
function specifierParts(specifier: string): {
  words: string[];
  columns: [string, string] | null;
  row: boolean;
} {
  const text = specifier.trim();
  const words: string[] = [];
  let columns: [string, string] | null = null;
  let row = false;
  const unescape = (word: string): string => word.replace(/'(.)/g, '$1').trim();
  if (text === '') return { words, columns, row };
  if (!text.startsWith('[')) {
    if (text.startsWith('@')) {
      row = true;
      const rest = text.slice(1).replace(/^\[|\]$/g, '');
      if (rest !== '') columns = [unescape(rest), unescape(rest)];
    } else if (text.startsWith('#')) words.push(text.toLowerCase());
    else columns = [unescape(text), unescape(text)];
    return { words, columns, row };
  }
  const pattern = /\[((?:'.|[^\]])*)\]\s*(?::\s*\[((?:'.|[^\]])*)\])?/g;
  for (const match of text.matchAll(pattern)) {
    const first = match[1] ?? '';
    if (match[2] !== undefined) columns = [unescape(first), unescape(match[2])];
    else if (first.startsWith('#')) words.push(first.toLowerCase());
    else columns = [unescape(first), unescape(first)];
  }
  if (words.includes('#this row')) row = true;
  return { words, columns, row };
}

/** The cells of a structured reference. Exported for its tests. */
export function tableArea(table: TableInfo, specifier: string, home: Area): Area {
  const { words, columns, row } = specifierParts(specifier);
  const { area } = table;
  const head = table.header ? 1 : 0;
  const foot = table.totals ? 1 : 0;
  let top = area.row + head;
  let bottom = area.row + area.rows - foot;
  if (words.includes('#all')) {
    top = area.row;
    bottom = area.row + area.rows;
  } else if (words.includes('#headers')) {
    top = area.row;
    bottom = words.includes('#data') ? bottom : area.row + head;
  } else if (words.includes('#totals')) {
    top = words.includes('#data') ? top : area.row + area.rows - foot;
    bottom = area.row + area.rows;
  }
  if (row) {
    top = home.row;
    bottom = home.row + 1;
  }
  const find = (name: string): number => {
    const index = table.columns.findIndex((column) => column.toLowerCase() === name.toLowerCase());
    if (index < 0) throw new CannotFollow('column', `${table.name}[${name}]`);
    return index;
  };
  const from = columns ? find(columns[0]) : 0;
  const to = columns ? find(columns[1]) : area.columns - 1;
  return {
    sheet: area.sheet,
    row: top,
    column: area.column + Math.min(from, to),
    rows: Math.max(1, bottom - top),
    columns: Math.abs(to - from) + 1,
  };
}

async function sheetOf(place: Place, sheet: string | null): Promise<string> {
  if (sheet === null) return place.home.sheet;
  const sheets = await place.port.sheetNames();
  return sheets.find((known) => known.toLowerCase() === sheet.toLowerCase()) ?? sheet;
}

async function evaluateName(node: Node & { kind: 'name' }, place: Place, depth: number): Promise<Argument> {
  const sheet = await sheetOf(place, node.sheet);
  const meaning = await place.port.name(node.name, sheet);
  if (meaning?.kind === 'area') return readArea(place, meaning.area);
  if (meaning?.kind === 'value') return scalar(meaning.value);
  if (meaning?.kind === 'formula') {
    if (depth > 8) throw new CannotFollow('deep', node.name);
    return evaluate(parseFormula(meaning.formula), place, depth + 1);
  }
  const table = await place.port.table(node.name);
  if (table) return readArea(place, tableArea(table, '', place.home));
  throw new CannotFollow('name', node.name);
}

async function evaluateStructured(node: Node & { kind: 'structured' }, place: Place): Promise<Argument> {
  const table = await place.port.table(node.table);
  if (!table) throw new CannotFollow('table', node.table === '' ? `[${node.specifier}]` : node.table);
  return readArea(place, tableArea(table, node.specifier, place.home));
}

async function evaluateReference(node: Node & { kind: 'reference' }, place: Place): Promise<Argument> {
  const sheet = await sheetOf(place, node.sheet);
  const area = parseArea(node.text, sheet);
  if (!area) throw new CannotFollow('name', node.text);
  if (!node.spill) return readArea(place, area);
  return readArea(place, (await place.port.spill(area)) ?? area);
}

function one(argument: Argument): unknown {
  if (argument.values.length !== 1 || argument.values[0]?.length !== 1) throw new CannotFollow('shape', '');
  return basicOf(argument.values[0][0]);
}

function number(argument: Argument): number {
  const value = one(argument);
  if (value === null || value === undefined || value === '') return 0;
  const result = Number(value);
  if (Number.isNaN(result)) throw new CannotFollow('error', textOf(value));
  return result;
}

function joinText(argument: Argument): string {
  const value = one(argument);
  return typeof value === 'boolean' ? (value ? 'TRUE' : 'FALSE') : textOf(value);
}

/** Throws CannotFollow with the piece it does not understand. */
export async function evaluate(node: Node, place: Place, depth = 0): Promise<Argument> {
  switch (node.kind) {
    case 'text':
    case 'number':
    case 'boolean':
      return scalar(node.value);
    case 'missing':
      return scalar(null);
    case 'error':
      throw new CannotFollow('error', node.value);
    case 'reference':
      return evaluateReference(node, place);
    case 'structured':
      return evaluateStructured(node, place);
    case 'name':
      return evaluateName(node, place, depth);
    case 'call':
      throw new CannotFollow('function', node.name.toUpperCase());
    case 'array': {
      const rows: unknown[][] = [];
      for (const row of node.rows) {
        const cells: unknown[] = [];
        for (const cell of row) cells.push(one(await evaluate(cell, place, depth)));
        rows.push(cells);
      }
      return { values: rows, area: null };
    }
    case 'unary': {
      const value = number(await evaluate(node.value, place, depth));
      return scalar(node.operator === '-' ? -value : node.operator === '%' ? value / 100 : value);
    }
    case 'binary': {
      const left = await evaluate(node.left, place, depth);
      const right = await evaluate(node.right, place, depth);
      switch (node.operator) {
        case '&':
          return scalar(joinText(left) + joinText(right));
        case '+':
          return scalar(number(left) + number(right));
        case '-':
          return scalar(number(left) - number(right));
        case '*':
          return scalar(number(left) * number(right));
        case '/':
          return scalar(number(left) / number(right));
        case '^':
          return scalar(number(left) ** number(right));
        case ':':
          if (left.area && right.area && left.area.sheet === right.area.sheet) {
            return readArea(place, hull(left.area, right.area));
          }
      }
      throw new CannotFollow('operator', node.operator);
    }
  }
}

function hull(a: Area, b: Area): Area {
  const row = Math.min(a.row, b.row);
  const column = Math.min(a.column, b.column);
  return {
    sheet: a.sheet,
    row,
    column,
    rows: Math.max(a.row + a.rows, b.row + b.rows) - row,
    columns: Math.max(a.column + a.columns, b.column + b.columns) - column,
  };
}

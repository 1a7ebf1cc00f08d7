/** Composes a formula about a beam for another cell. */
import { addressFrom, columnLetters, quoteSheet } from '../address';
import { FUNCTIONS, type Parameter } from '../formula/functions';
import { tokenize } from '../formula/tokens';
import type { Subject } from '../follow';
import type { Area } from '../port';

/** "$B$4:$I$11", with its sheet when seen from another. */
export function absolute(area: Area, home: string): string {
  const cell = (row: number, column: number): string => `$${columnLetters(column)}$${row + 1}`;
  const first = cell(area.row, area.column);
  const last = cell(area.row + area.rows - 1, area.column + area.columns - 1);
  const text = first === last ? first : `${first}:${last}`;
  return area.sheet === home ? text : `${quoteSheet(area.sheet)}!${text}`;
}

/** An argument as written on one sheet, for a formula on another: bare references get their sheet. */
export function qualify(text: string, from: string, to: string): string {
  if (from === to) return text;
  let result = '';
  let at = 0;
  for (const token of tokenize(text)) {
    if (token.kind !== 'reference' || token.sheet !== null) continue;
    result += `${text.slice(at, token.start)}${quoteSheet(from)}!`;
    at = token.start;
  }
  return result + text.slice(at);
}

/** The first argument for a formula in `target`. */
export function beamArgument(subject: Subject, target: Area): string {
  const call = subject.calls[subject.index];
  const node = call?.args.beam;
  // names and tables say more than addresses, and text has nothing else
  if (call && node && (node.kind === 'name' || node.kind === 'structured' || !subject.source)) {
    return qualify(call.beamText, subject.cell.sheet, target.sheet);
  }
  return subject.source ? absolute(subject.source, target.sheet) : '';
}

export interface Wanted {
  readonly fn: string;
  /** position as typed: a number, a text like 3-, a cell */
  readonly x: string;
  readonly combination: string;
  readonly quantity?: string;
}

/** A typed position: a number or a cell goes in as it is, anything else as text. */
function position(text: string): string {
  const plain = text.trim();
  if (/^-?(?:\d+\.?\d*|\.\d+)$/.test(plain) || /^\$?[A-Za-z]{1,3}\$?\d+$/.test(plain)) return plain;
  return quote(plain);
}

function quote(text: string): string {
  return `"${text.replace(/"/g, '""')}"`;
}

export function composeFormula(subject: Subject, wanted: Wanted, target: Area): string {
  const parameters = FUNCTIONS[wanted.fn] ?? ['beam'];
  const call = subject.calls[subject.index];
  const kept = (name: Parameter): string => {
    const node = call?.args[name];
    return node ? qualify(subject.formula.slice(node.start, node.end), subject.cell.sheet, target.sheet) : '';
  };
  const args = parameters.map((name): string => {
    switch (name) {
      case 'beam':
        return beamArgument(subject, target);
      case 'x':
      case 'at':
        return position(wanted.x);
      case 'quantity':
        return quote(wanted.quantity ?? 'moment');
      case 'combination':
        return wanted.combination.trim() === '' ? '' : quote(wanted.combination.trim());
      case 'names':
      case 'values':
        return kept(name);
      default:
        return '';
    }
  });
  while (args[args.length - 1] === '') args.pop();
  // an argument left out leaves no blank behind: "(beam,, names, values)"
  return `=SPANROW.${wanted.fn}(${args.join(', ').replace(/, (?=,)/g, ',')})`;
}

/** Short name of a cell for a sentence. */
export function cellName(area: Area, home: string | null): string {
  return addressFrom(area, home);
}

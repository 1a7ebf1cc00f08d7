/** Finds the SPANROW calls in a formula, however deep they are nested. */
import { FUNCTIONS, ownFunction, type Parameter } from './functions';
import { parseFormula, type Node } from './parse';

export interface BeamCall {
  /** DEFLECTION, PEAK, ... */
  readonly fn: string;
  readonly args: Readonly<Partial<Record<Parameter, Node>>>;
  /** the call and its first argument as written */
  readonly text: string;
  readonly beamText: string;
  /** place of the first argument in the formula, to rewrite it */
  readonly beamSpan: readonly [number, number];
}

function walk(node: Node, formula: string, found: BeamCall[]): void {
  switch (node.kind) {
    case 'call': {
      const fn = ownFunction(node.name);
      const parameters = fn === null ? undefined : FUNCTIONS[fn];
      const first = node.args[0];
      if (fn !== null && parameters && first && first.kind !== 'missing') {
        const args: Partial<Record<Parameter, Node>> = {};
        node.args.forEach((arg, index) => {
          const parameter = parameters[index];
          if (parameter && arg.kind !== 'missing') args[parameter] = arg;
        });
        found.push({
          fn,
          args,
          text: formula.slice(node.start, node.end),
          beamText: formula.slice(first.start, first.end),
          beamSpan: [first.start, first.end],
        });
      }
      for (const arg of node.args) walk(arg, formula, found);
      return;
    }
    case 'unary':
      walk(node.value, formula, found);
      return;
    case 'binary':
      walk(node.left, formula, found);
      walk(node.right, formula, found);
      return;
    case 'array':
      for (const row of node.rows) for (const cell of row) walk(cell, formula, found);
  }
}

const OWN = /SPANROW[._]/i;

/** Calls in the order they are written; empty when the formula has none or cannot be read. */
export function findCalls(formula: string): readonly BeamCall[] {
  if (!OWN.test(formula)) return [];
  try {
    const found: BeamCall[] = [];
    walk(parseFormula(formula), formula, found);
    return found;
  } catch {
    return [];
  }
}

/** Rewrites the beam of every call whose first argument reads exactly `from`. */
export function replaceBeam(formula: string, from: string, to: string): string {
  const spans = findCalls(formula)
    .filter((call) => call.beamText === from)
    .map((call) => call.beamSpan)
    .sort((a, b) => b[0] - a[0]);
  let result = formula;
  for (const [start, end] of spans) result = result.slice(0, start) + to + result.slice(end);
  return result;
}

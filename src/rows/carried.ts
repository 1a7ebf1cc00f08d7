/**
 * Dimensions carried by names whose values state a unit (`q` given as "12 kN/m"). Such a value is turned into the table's own
 * units before it enters an expression; this file follows its dimension through the tree, so that the result is checked
 * against what the row needs and is not converted twice.
 *
 * Plain numbers in `values` may stand for anything (a width, a factor), so a product with one is of unknown dimension.
 */
import {
  ConstantNode,
  FunctionNode,
  OperatorNode,
  ParenthesisNode,
  SymbolNode,
  type Node,
} from './expression';
import type { Dimension } from './units';

export type Carried =
  /** a number as written in the expression */
  | { readonly kind: 'number' }
  /** made of plain numbers from `values` or of x */
  | { readonly kind: 'plain' }
  /** plain numbers times values with units; the dimension is that of the latter */
  | { readonly kind: 'mixed'; readonly dimension: Dimension }
  /** all units known */
  | { readonly kind: 'known'; readonly dimension: Dimension };

export const NUMBER: Carried = { kind: 'number' };
export const PLAIN: Carried = { kind: 'plain' };

/** null: two different dimensions are added or compared. */
export function carry(node: Node, of: (name: string) => Carried): Carried | null {
  if (node instanceof ConstantNode) return NUMBER;
  if (node instanceof SymbolNode) {
    if (node.name === 'pi') return NUMBER;
    return node.name === 'x' ? PLAIN : of(node.name);
  }
  if (node instanceof ParenthesisNode) return carry(node.content, of);
  if (node instanceof FunctionNode) return carryFunction(node, of);
  if (!(node instanceof OperatorNode)) return PLAIN;
  const [left, right] = node.args;
  const a = carry(left!, of);
  if (a === null || right === undefined) return a;
  const b = carry(right, of);
  if (b === null) return null;
  switch (node.fn) {
    case 'add':
    case 'subtract':
      return sum(a, b);
    case 'multiply':
      return product(a, b, 1);
    case 'divide':
      return product(a, b, -1);
    default:
      return raised(a, right);
  }
}

function carryFunction(node: FunctionNode, of: (name: string) => Carried): Carried | null {
  const parts: Carried[] = [];
  for (const arg of node.args) {
    const part = carry(arg, of);
    if (part === null) return null;
    parts.push(part);
  }
  if (node.name === 'abs' || node.name === 'min' || node.name === 'max') {
    return parts.reduce<Carried | null>((a, b) => (a === null ? null : sum(a, b)), parts[0]!);
  }
  if (node.name === 'sqrt') {
    const [a] = parts;
    return raisedTo(a!, 0.5);
  }
  return parts.some((part) => part.kind === 'plain' || part.kind === 'mixed') ? PLAIN : NUMBER;
}

function sum(a: Carried, b: Carried): Carried | null {
  if (a.kind === 'known' && b.kind === 'known') return same(a.dimension, b.dimension) ? a : null;
  if (a.kind === 'known') return a;
  if (b.kind === 'known') return b;
  if (a.kind === 'mixed') return a;
  if (b.kind === 'mixed') return b;
  return a.kind === 'plain' ? a : b;
}

function product(a: Carried, b: Carried, sign: 1 | -1): Carried {
  const plain = a.kind === 'plain' || a.kind === 'mixed' || b.kind === 'plain' || b.kind === 'mixed';
  const [p, q] = [dimensionOf(a), dimensionOf(b)];
  return made(plain, {
    force: p.force + sign * q.force,
    length: p.length + sign * q.length,
    angle: p.angle + sign * q.angle,
  });
}

function raised(a: Carried, exponent: Node): Carried {
  if (a.kind === 'number' || a.kind === 'plain') return a;
  const bare = exponent instanceof ParenthesisNode ? exponent.content : exponent;
  const turned = bare instanceof OperatorNode && bare.fn === 'unaryMinus' ? bare.args[0] : bare;
  // A power that is not written as a number leaves the dimension open, as a plain factor would.
  if (!(turned instanceof ConstantNode)) return { kind: 'mixed', dimension: a.dimension };
  return raisedTo(a, turned === bare ? turned.value : -turned.value);
}

function raisedTo(a: Carried, k: number): Carried {
  return a.kind === 'known' || a.kind === 'mixed' ? made(a.kind === 'mixed', scaled(a.dimension, k)) : a;
}

const NONE: Dimension = { force: 0, length: 0, angle: 0 };

function dimensionOf(a: Carried): Dimension {
  return a.kind === 'known' || a.kind === 'mixed' ? a.dimension : NONE;
}

/** Units that cancel leave a mere number. */
function made(plain: boolean, dimension: Dimension): Carried {
  const { force, length, angle } = dimension;
  if (force === 0 && length === 0 && angle === 0) return plain ? PLAIN : NUMBER;
  return plain ? { kind: 'mixed', dimension } : { kind: 'known', dimension };
}

function scaled(d: Dimension, k: number): Dimension {
  return { force: d.force * k, length: d.length * k, angle: d.angle * k };
}

function same(a: Dimension, b: Dimension): boolean {
  return a.force === b.force && a.length === b.length && a.angle === b.angle;
}

/** Small helpers to make elements. No framework: the pane is a few functions that return nodes. */

type Value = string | number | boolean | null | undefined | ((event: never) => void);
export type Attributes = Readonly<Record<string, Value>>;
export type Child = Node | string | number | null | undefined | false | readonly Child[];

const SVG = 'http://www.w3.org/2000/svg';
const MATHML = 'http://www.w3.org/1998/Math/MathML';

function append(parent: Element, children: readonly Child[]): void {
  for (const child of children) {
    if (child === null || child === undefined || child === false) continue;
    if (child instanceof Node) parent.append(child);
    else if (typeof child === 'object') append(parent, child);
    else parent.append(String(child));
  }
}

function fill(element: Element, attributes: Attributes | null, children: readonly Child[]): void {
  for (const [name, value] of Object.entries(attributes ?? {})) {
    if (value === null || value === undefined || value === false) continue;
    if (typeof value === 'function') element.addEventListener(name, value as unknown as EventListener);
    else element.setAttribute(name, value === true ? '' : String(value));
  }
  append(element, children);
}

/** An HTML element; a function attribute is a listener for the event of that name (`click: run`). */
export function h<K extends keyof HTMLElementTagNameMap>(
  tag: K,
  attributes: Attributes | null = null,
  ...children: readonly Child[]
): HTMLElementTagNameMap[K] {
  const element = document.createElement(tag);
  fill(element, attributes, children);
  return element;
}

export function svg<K extends keyof SVGElementTagNameMap>(
  tag: K,
  attributes: Attributes | null = null,
  ...children: readonly Child[]
): SVGElementTagNameMap[K] {
  const element = document.createElementNS<K>(SVG, tag);
  fill(element, attributes, children);
  return element;
}

export function math(
  tag: string,
  attributes: Attributes | null = null,
  ...children: readonly Child[]
): Element {
  const element = document.createElementNS(MATHML, tag);
  fill(element, attributes, children);
  return element;
}

/** Replaces everything in an element. */
export function put(element: Element, ...children: readonly Child[]): void {
  element.replaceChildren();
  append(element, children);
}

let counter = 0;
/** A fresh id for aria references. */
export function freshId(stem: string): string {
  counter += 1;
  return `sp-${stem}-${counter}`;
}

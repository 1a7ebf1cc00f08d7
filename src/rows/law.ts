/** Laws along a stretch: made from rows, cut to a part of their stretch, multiplied. */
import type { Law } from '../beam/model';

/** The law's value at x; a linear law runs from `from` to `to`. */
export function lawAt(law: Law, from: number, to: number, x: number): number {
  if (law.kind === 'function') return law.at(x);
  // Exact at both ends, so that a law cut at its own end keeps its end value to the last digit.
  if (x === from || law.start === law.end) return law.start;
  if (x === to) return law.end;
  const t = (x - from) / (to - from);
  return law.start * (1 - t) + law.end * t;
}

/** The same law seen over the part a..b of from..to. */
export function cutLaw(law: Law, from: number, to: number, a: number, b: number): Law {
  if (law.kind === 'function' || (a === from && b === to) || law.start === law.end) return law;
  return { kind: 'linear', start: lawAt(law, from, to, a), end: lawAt(law, from, to, b) };
}

/** E x I over one stretch a..b. Constant x linear stays linear; anything else is a function of x. */
export function timesLaw(e: Law, i: Law, a: number, b: number): Law {
  if (e.kind === 'linear' && e.start === e.end && i.kind === 'linear') {
    return { kind: 'linear', start: e.start * i.start, end: e.start * i.end };
  }
  return {
    kind: 'function',
    at: (x) => lawAt(e, a, b, x) * lawAt(i, a, b, x),
    text: `${lawText(e)} * ${lawText(i)}`,
  };
}

function lawText(law: Law): string {
  if (law.kind === 'function') return `(${law.text})`;
  return law.start === law.end ? String(law.start) : `(${law.start} to ${law.end})`;
}

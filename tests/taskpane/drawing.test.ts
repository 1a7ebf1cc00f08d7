import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { reviewBeam, type Quantity } from '../../taskpane/engine';
import { curvePath } from '../../taskpane/drawing/curve';
import { draw, type Drawing } from '../../taskpane/drawing/drawing';
import type { DrawingInput, DrawingOptions } from '../../taskpane/drawing/frame';
import { overlap, textWidth, type Box } from '../../taskpane/drawing/labels';
import { PLAIN } from '../../taskpane/numbers';
import { textOf } from '../../taskpane/values';
import { BEAMS } from '../helpers/pane-beams';

const OPTIONS: DrawingOptions = {
  width: 350,
  parts: ['beam', 'shear', 'moment', 'slope', 'deflection'],
  momentBelow: true,
  enlarged: null,
  separators: PLAIN,
};

function input(rows: readonly (readonly unknown[])[], combination: string | null = null): DrawingInput {
  const { open, model, issues, table } = reviewBeam({ beam: rows, combination });
  if (!model) throw new Error(JSON.stringify(issues));
  return {
    model,
    response: open?.response ?? null,
    factors: open?.combination?.factors ?? null,
    show: (quantity, value) => (open ? open.show(quantity, value) : value),
    word: (row) => textOf(table.rows.find((one) => one.row === row)?.cells.Item),
  };
}

/** Golden files: delete one (or set UPDATE_GOLDENS=1) to write it anew, then look at it. */
function golden(name: string, text: string): void {
  const file = path.join(__dirname, 'goldens', `${name}.svg`);
  if (!existsSync(file) || process.env['UPDATE_GOLDENS'] === '1') {
    if (process.env['CI']) throw new Error(`the golden file ${name}.svg is missing`);
    mkdirSync(path.dirname(file), { recursive: true });
    writeFileSync(file, text);
  }
  expect(text).toBe(readFileSync(file, 'utf8'));
}

const markup = (drawing: Drawing): string => `${drawing.root.outerHTML.replace(/></g, '>\n<')}\n`;

test.each(Object.entries(BEAMS))('golden drawing: %s', (name, beam) => {
  golden(name, markup(draw(input(beam.rows, beam.combination ?? null), OPTIONS)));
});

/** Boxes of all texts of one part, as the estimate has them. */
function boxes(part: Element): { box: Box; words: string }[] {
  return Array.from(part.querySelectorAll('text')).flatMap((text) => {
    const words = text.textContent ?? '';
    if (words === '') return [];
    const size = /sp-small|sp-peak-local/.test(text.getAttribute('class') ?? '') ? 10 : 11;
    const width = textWidth(words, size);
    const anchor = text.getAttribute('text-anchor');
    const x = Number(text.getAttribute('x'));
    const left = anchor === 'middle' ? x - width / 2 : anchor === 'end' ? x - width : x;
    return [
      { words, box: { left, top: Number(text.getAttribute('y')) - size + 2, width, height: size - 2 } },
    ];
  });
}

describe.each([320, 450])('at %i px', (width) => {
  test.each(Object.entries(BEAMS))('no label of %s covers another or leaves the drawing', (_, beam) => {
    const drawing = draw(input(beam.rows, beam.combination ?? null), { ...OPTIONS, width });
    for (const part of Array.from(drawing.root.children)) {
      const all = boxes(part);
      all.forEach(({ box, words }, i) => {
        expect([words, box.left >= 0, box.left + box.width <= width + 1]).toEqual([words, true, true]);
        for (const other of all.slice(i + 1)) {
          expect([words, other.words, overlap(box, other.box, -1)]).toEqual([words, other.words, false]);
        }
      });
    }
  });
});

test('a curve goes through the solved values: at both ends of every piece and in between', () => {
  const one = input(BEAMS['three spans']?.rows ?? []);
  const { response } = one;
  if (!response) throw new Error('no answer');
  for (const quantity of ['shear', 'moment', 'slope', 'deflection'] as readonly Quantity[]) {
    const scale = 1e4 / Math.abs(response.peak(quantity, 'largest').value);
    const d = curvePath(
      response.pieces(quantity),
      (x) => x * 1e4,
      (v) => v * scale,
    );
    const numbers = [...d.matchAll(/([ML])(-?[\d.]+) (-?[\d.]+)|C[^LMC]* (-?[\d.]+) (-?[\d.]+)/g)].map(
      (m) => [Number(m[2] ?? m[4]), Number(m[3] ?? m[5])],
    );
    expect(numbers.length).toBeGreaterThan(8);
    for (const [x = 0, y = 0] of numbers) {
      const at = Math.min(Math.max(x / 1e4, one.model.start), one.model.end);
      const left = response.value(quantity, at, 'left') * scale;
      const right = response.value(quantity, at, 'right') * scale;
      // coordinates are rounded to a tenth of a pixel of 1e4: half of that, and as much again for x times the steepest slope
      expect(Math.min(Math.abs(y - left), Math.abs(y - right))).toBeLessThan(2);
    }
  }
});

test('sagging is below the line, or above it when asked; the deflection always goes the way the beam goes', () => {
  const down = draw(input(BEAMS['simple span']?.rows ?? []), OPTIONS);
  const up = draw(input(BEAMS['simple span']?.rows ?? []), { ...OPTIONS, momentBelow: false });
  const middle = (drawing: Drawing, quantity: Quantity): number => {
    const diagram = drawing.diagrams.find((one) => one.drawing.quantity === quantity)?.drawing;
    return diagram ? diagram.y(1) - diagram.zero : NaN;
  };
  expect(middle(down, 'moment')).toBeGreaterThan(0);
  expect(middle(up, 'moment')).toBeLessThan(0);
  expect(middle(down, 'deflection')).toBeGreaterThan(0);
  const turned = draw(input([...(BEAMS['simple span']?.rows ?? []), ['axis', 'up']]), OPTIONS);
  expect(middle(turned, 'deflection')).toBeLessThan(0); // y up: a positive deflection is drawn upwards
});

test('the stated exaggeration is the ratio of the two scales', () => {
  const drawing = draw(input(BEAMS['simple span']?.rows ?? []), OPTIONS);
  const diagram = drawing.diagrams.find((one) => one.drawing.quantity === 'deflection')?.drawing;
  const perMetre = drawing.frame.x(1) - drawing.frame.x(0);
  const perMillimetre = (diagram?.y(1) ?? NaN) - (diagram?.y(0) ?? NaN);
  expect(drawing.exaggeration).toBeCloseTo((perMillimetre * 1000) / perMetre, 6);
});

test('a beam without an answer is drawn alone; hidden diagrams are left out', () => {
  const mechanism = draw(
    input([
      ['pin', 0],
      ['EI', null, null, 1],
      ['uniform', 0, 6, 1],
    ]),
    OPTIONS,
  );
  expect([mechanism.diagrams.length, mechanism.beam !== null]).toEqual([0, true]);
  const some = draw(input(BEAMS['simple span']?.rows ?? []), { ...OPTIONS, parts: ['moment'] });
  expect([some.diagrams.map((one) => one.drawing.quantity), some.beam]).toEqual([['moment'], null]);
});

test('the drawing says in words what it shows', () => {
  const label = draw(input(BEAMS['simple span']?.rows ?? []), OPTIONS).root.getAttribute('aria-label');
  expect(label).toContain('Beam of length 6 m, 2 supports, 1 load.');
  expect(label).toContain('Largest bending moment 54 kN·m at 3 m.'); // wL²/8 = 12·6²/8, the textbook value
});

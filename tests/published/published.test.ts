/**
 * Every case of the handbook and of the textbook problems, posed as worksheet rows and asked through the facade.
 *
 * Tolerance: 1e-12 of the value; 1e-11 where the solution is not a polynomial (foundations, tapers): the accuracy goal of the project.
 * Published zeros are judged against the scale written in the case. Text values hold more digits than a double, so the published side
 * adds at most eps/2.
 */
import { openBeam } from '../../src/open';
import { PUBLISHED_CASES, rowsOf, type PublishedCase } from '../../src/published';
import { answer, difference, verify } from '../../src/published/verify';

const worst = new Map<string, number>();

describe.each(PUBLISHED_CASES.map((c): [string, PublishedCase] => [`${c.id}: ${c.description}`, c]))(
  '%s',
  (_, c) => {
    const tolerance = c.kind ? 1e-11 : 1e-12;
    test.each(
      c.asks.map((ask, i): [string, number] => [
        `${ask.quantity}, ${ask.place ?? ''} [${c.source}; ${c.status}]`,
        i,
      ]),
    )('%s', (__, i) => {
      const ask = c.asks[i]!;
      const computed = answer(openBeam({ beam: rowsOf(c) }), ask);
      const error = difference(computed, ask);
      const group = c.kind ?? 'closed form';
      worst.set(group, Math.max(worst.get(group) ?? 0, error));
      expect(
        `${computed} differs by ${error <= tolerance ? 'no more than allowed' : error} from ${ask.value}`,
      ).toMatch(/no more than allowed/);
      if (ask.printed !== undefined && /^[-+]?[\d.]+$/.test(ask.printed)) {
        // the digits the source prints: equal when rounded to as many places (problems print magnitudes for some couples)
        const places = (ask.printed.split('.')[1] ?? '').length;
        expect(
          Math.abs(Number(Math.abs(computed).toFixed(places)) - Math.abs(Number(ask.printed))),
        ).toBeLessThan(1e-9);
      }
    });
  },
);

test('the reading of the case data: 148.6e6 mm4 lands as a value and a unit', () => {
  const first = PUBLISHED_CASES.find((c) => c.id === 'SS-01')!;
  expect(first.rows.find((row) => row[0] === 'I')).toEqual(['I', '', '', 148.6e6, '', 'mm4']);
});

test('VERIFY spills at least 40 cases with a heading and finite numbers', () => {
  const spill = verify();
  expect(spill.length).toBeGreaterThan(300);
  expect(new Set(spill.slice(1).map((row) => row[0])).size).toBeGreaterThan(40);
  for (const row of spill) expect(row).toHaveLength(spill[0]!.length);
  for (const row of spill.slice(1)) {
    for (const cell of row.slice(7)) expect(Number.isFinite(cell)).toBe(true);
    expect(row[9]).toBeLessThanOrEqual(1e-11);
  }
});

afterAll(() => {
  const lines = [...worst].map(([group, error]) => `  ${group}: ${error.toExponential(2)}`);
  process.stdout.write(`published cases, worst relative difference\n${lines.join('\n')}\n`);
});

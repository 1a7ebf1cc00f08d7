/**
 * The same beam written down in different ways gives the same answers: units, axis, templates, header, order, blanks, one-cell text.
 *
 * Where only the writing differs the answers must be equal to the last bit. Where numbers are converted (units) or summed in another
 * order (rows), each input carries one or two roundings, which the beam may magnify: BOUND = 1e-11 of the peak (measured worst 1e-13).
 */
import fc from 'fast-check';
import { ask, BeamProblem, openBeam } from '../../src/index';
import { seeded } from '../helpers/random';
import {
  CONSISTENT,
  IMPERIAL,
  METRIC,
  SMALL,
  randomItems,
  rowsIn,
  type Beam,
  type Cell,
  type System,
} from '../helpers/random-rows';

const BOUND = 1e-11;
const RUNS = Number(process.env.RUNS ?? (process.env.PROVE ? 1000 : 150));
const seed = Number(process.env.SEED ?? 20261201);
const check = (law: (beamSeed: number) => void): void => {
  fc.assert(fc.property(fc.integer({ min: 1, max: 2 ** 30 }), law), { numRuns: RUNS, seed });
};
const worst = new Map<string, number>();
afterAll(() => {
  const lines = [...worst].map(
    ([law, error]) => `  ${law}: ${error === 0 ? 'equal to the last bit' : error.toExponential(2)}`,
  );
  process.stdout.write(
    `ways of writing, ${RUNS} tables each, seed ${seed}, worst relative difference\n${lines.join('\n')}\n`,
  );
});

const COMBINATION = 'G + 0.3 Q';
const QUANTITIES = ['deflection', 'slope', 'moment', 'shear'] as const;

interface Answers {
  /** by quantity, at the probes, then peak values */
  readonly values: Record<(typeof QUANTITIES)[number], number[]>;
  readonly forces: number[];
}

/** Answers in kN, m and rad with y down, whatever the table is written in. */
function answers(
  beam: Beam,
  cells: unknown,
  system: System,
  more: { names?: unknown; values?: unknown } = {},
  up = false,
): Answers {
  const cases = new Set(beam.items.map((q) => q.loadCase).filter(Boolean));
  const combination = cases.size === 2 ? COMBINATION : '';
  let open;
  try {
    open = openBeam({ beam: cells, combination, ...more });
    void open.response;
  } catch (problem) {
    if (!(problem instanceof BeamProblem)) throw problem;
    // the verdicts themselves are judged in engine.test.ts; any other refusal of these tables is a fault
    fc.pre(!problem.issues.some((i) => i.code === 'unstable' || i.code === 'past-critical-load'));
    throw problem;
  }
  const turn = up ? -1 : 1;
  const base = {
    deflection: turn / system.deflection,
    slope: turn,
    moment: 1 / (system.force * system.length),
    shear: 1 / system.force,
  };
  const probes = [0.017, 0.23, 0.391, 0.5, 0.677, 0.83, 0.987].map((t) => t * beam.length * system.length);
  const values = {} as Answers['values'];
  for (const q of QUANTITIES) {
    const at = ask.value(open, q, [probes]) as number[][];
    values[q] = [...at[0]!, ask.peak(open, q, 'largest', 'value')].map((v) => v * base[q]);
  }
  const forces = ask
    .reactions(open)
    .slice(1)
    .map((row) => (typeof row[2] === 'number' ? row[2] / system.force : 0));
  return { values, forces };
}

function compare(law: string, beam: Beam, a: Answers, b: Answers, bound: number): void {
  const bow = beam.items.reduce((sum, q) => sum + (q.word === 'camber' ? Math.abs(q.value!) : 0), 0);
  const judge = (what: string, p: number[], q: number[], extra: number): void => {
    const scale = Math.max(extra, ...p.map(Math.abs));
    p.forEach((v, i) => {
      const error = v === q[i] ? 0 : Math.abs(v - q[i]!) / scale;
      worst.set(law, Math.max(worst.get(law) ?? 0, error));
      if (!(error <= bound)) throw new Error(`${law}: ${what} ${i} ${v} against ${q[i]}, relative ${error}`);
    });
  };
  for (const q of QUANTITIES) judge(q, a.values[q], b.values[q], q === 'deflection' ? bow : 0);
  judge('reactions', a.forces, b.forces, Math.max(...a.values.shear.map(Math.abs)));
}

const METRIC_ROWS = (beam: Beam): Cell[][] => rowsIn(beam, METRIC);

test.each([IMPERIAL, CONSISTENT, SMALL])('kN-m-mm and $name agree', (system) => {
  check((s) => {
    const beam = randomItems(s);
    compare(
      `kN-m-mm and ${system.name}`,
      beam,
      answers(beam, METRIC_ROWS(beam), METRIC),
      answers(beam, rowsIn(beam, system), system),
      BOUND,
    );
  });
});

test('axis up: the same beam with everything along y turned over', () => {
  check((s) => {
    const beam = randomItems(s);
    const down = answers(beam, METRIC_ROWS(beam), METRIC);
    compare('axis up and down', beam, down, answers(beam, rowsIn(beam, METRIC, true), METRIC, {}, true), 0);
  });
});

test('template with names and values against the literal table', () => {
  check((s) => {
    const beam = randomItems(s);
    const r = seeded(s);
    const literal = METRIC_ROWS(beam);
    const names: string[] = [];
    const values: (number | string)[] = [];
    const template = literal.map((row) =>
      row.map((cell, column) => {
        if (typeof cell !== 'number' || r() < 0.4) return cell;
        const name = `p_${names.length}`;
        names.push(name);
        // a value may bring its unit along; then a decimal text is converted, not a double: one rounding apart
        const unit = row[5];
        const along =
          s % 3 === 0 && column === 3 && typeof unit === 'string' && /^[a-z]/i.test(unit) && r() < 0.5;
        values.push(along ? `${cell} ${unit}` : cell);
        return r() < 0.5 ? name : ` ${name}*1 `;
      }),
    );
    const across = s % 2 === 0;
    const range = (list: (string | number)[]): (string | number)[][] =>
      across ? [list] : list.map((v) => [v]);
    const binding = names.length > 0 ? { names: range(names), values: range(values) } : {};
    const [plain, filled] = [answers(beam, literal, METRIC), answers(beam, template, METRIC, binding)];
    if (s % 3 === 0) compare('template with units in its values', beam, plain, filled, BOUND);
    else compare('template and literal', beam, plain, filled, 0);
  });
});

test('header with shuffled and foreign columns', () => {
  check((s) => {
    const beam = randomItems(s);
    const r = seeded(s + 1);
    const literal = METRIC_ROWS(beam);
    const titles = ['Item', 'At', 'To', 'Value', 'End value', 'Unit', 'Case', 'Note'];
    const order = titles.map((_, i) => i).sort(() => r() - 0.5);
    const written = [
      [...order.map((i) => (r() < 0.5 ? titles[i]! : ` ${titles[i]!.toUpperCase()} `)), 'Checked by', 'Sum'],
      ...literal.map((row) => [...order.map((i) => row[i]), r() < 0.5 ? 'me' : '', r() < 0.5 ? 17 : 0]),
    ];
    compare('header order', beam, answers(beam, literal, METRIC), answers(beam, written, METRIC), 0);
  });
});

test('row order', () => {
  check((s) => {
    const beam = randomItems(s);
    const r = seeded(s + 2);
    const literal = METRIC_ROWS(beam);
    const shuffled = [...literal].map((row) => ({ row, key: r() })).sort((a, b) => a.key - b.key);
    compare(
      'row order',
      beam,
      answers(beam, literal, METRIC),
      answers(
        beam,
        shuffled.map((q) => q.row),
        METRIC,
      ),
      BOUND,
    );
  });
});

test('blank cells as 0, null, empty text or nothing; blank rows and remarks between', () => {
  check((s) => {
    const beam = randomItems(s);
    const r = seeded(s + 3);
    const literal = METRIC_ROWS(beam);
    const blank = [0, null, '', undefined][s % 4];
    const mixed = (): Cell => (s % 5 === 0 ? [0, null, '', undefined][Math.floor(4 * r())] : blank);
    const written: Cell[][] = [];
    for (const row of literal) {
      if (r() < 0.2) written.push(new Array<Cell>(8).fill(0).map(mixed));
      if (r() < 0.1) written.push([r() < 0.5 ? '# remark' : '// remark', 'pin', 'x', 3, '', 'kN', '', '']);
      written.push(row.map((cell) => (cell === '' ? mixed() : cell)));
    }
    compare('blanks', beam, answers(beam, literal, METRIC), answers(beam, written, METRIC), 0);
  });
});

test('one cell of text', () => {
  check((s) => {
    const beam = randomItems(s);
    const literal = METRIC_ROWS(beam);
    const quote = (cell: Cell): string => (/\s/.test(String(cell)) ? `"${cell}"` : String(cell));
    const named = ['', '', 'to=', 'value=', 'end=', 'unit=', 'case='];
    const text = literal
      .map((row) => {
        const parts = [quote(row[0])];
        let gap = false;
        for (let i = 1; i < 7; i++) {
          const cell = row[i];
          if (cell === '') gap = true;
          else if (gap || i > 4) parts.push(`${named[i] || 'at='}${quote(cell)}`);
          else parts.push(quote(cell));
        }
        return parts.join(' ');
      })
      .join(s % 2 ? '; ' : '\n');
    compare('one cell of text', beam, answers(beam, literal, METRIC), answers(beam, text, METRIC), 0);
  });
});

test('synonyms, and a unit in the value cell', () => {
  const synonyms: Record<string, string[]> = {
    pin: ['roller', 'Pinned', ' SUPPORT '],
    fixed: ['built-in', 'encastre', 'clamped'],
    point: ['point load', 'Force'],
    couple: ['moment'],
    uniform: ['udl', 'UDL'],
    varying: ['trapezoidal', 'triangular'],
  };
  check((s) => {
    const beam = randomItems(s);
    const r = seeded(s + 4);
    const literal = METRIC_ROWS(beam);
    const written = literal.map((row) => {
      const words = synonyms[String(row[0])];
      const out = [...row];
      if (words) out[0] = words[Math.floor(r() * words.length)];
      if (/^[a-z]/i.test(String(out[5])) && out[4] === '' && r() < 0.5) {
        out[3] = `${out[3]} ${out[5]}`;
        out[5] = '';
      }
      return out;
    });
    compare(
      'synonyms and units in the value',
      beam,
      answers(beam, literal, METRIC),
      answers(beam, written, METRIC),
      BOUND,
    );
  });
});

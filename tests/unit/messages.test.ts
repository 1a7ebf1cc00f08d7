/** The exact text of every sentence, each from a table or argument that provokes it wherever the row language raises it. */
import type { Issue } from '../../src/issue';
import { CODES, say, sayAll } from '../../src/messages';
import { compileTable, readBindings, readCombination, readLimit, readPosition } from '../../src/rows';
import { cautionsOf, issuesOf, METRIC, modelOf, PLAIN } from './rows/helpers';

type Rows = readonly (readonly unknown[])[];
const plain = (...rows: unknown[][]): readonly Issue[] => issuesOf([...PLAIN, ...rows]);
const metric = (...rows: unknown[][]): readonly Issue[] => issuesOf([...METRIC, ...rows]);
const table = (rows: Rows, names = {}): readonly Issue[] => issuesOf(rows, names);
const caution = (...rows: unknown[][]): readonly Issue[] => cautionsOf([...PLAIN, ...rows]);
const combination = (raw: unknown, cases: string[] = ['G', 'Q']): readonly Issue[] => {
  const result = readCombination(raw, cases);
  return result.ok ? [] : result.issues;
};
const x = (raw: unknown, rows: Rows = METRIC): readonly Issue[] => {
  const result = readPosition(raw, modelOf(rows));
  return result.ok ? [] : [result.issue];
};
const limit = (raw: unknown): readonly Issue[] => {
  const result = readLimit(raw, modelOf(METRIC));
  return result.ok ? [] : [result.issue];
};
const bindings = (names: unknown, values: unknown): readonly Issue[] => {
  const result = readBindings(names, values);
  return result.ok ? [] : result.issues;
};
const invalid = (code: string, rest: Omit<Issue, 'code' | 'kind'> = {}): readonly Issue[] => [
  { code, kind: 'invalid', ...rest },
];
const unavailable = (code: string, rest: Omit<Issue, 'code' | 'kind'> = {}): readonly Issue[] => [
  { code, kind: 'unavailable', ...rest },
];

const SAID: [code: string, issues: () => readonly Issue[], text: string][] = [
  // The table as a whole
  [
    'no-rows',
    () => table([['', 0]]),
    'The beam range holds no rows: expected items such as pin, E, I, uniform.',
  ],
  [
    'ninth-column',
    () => table([['pin', 0, '', '', '', '', '', '', '']]),
    'Expected at most eight columns (Item, At, To, Value, End value, Unit, Case, Note), got 9. Select fewer, or add a header row with at least Item and At.',
  ],
  [
    'header-incomplete',
    () => table([['Item', 'Att', 'To', 'Value'], ...PLAIN]),
    'Row 1: this looks like a header row, but it has no At column (it has "Att"): expected at least Item and At.',
  ],
  [
    'header-incomplete',
    () => table([['At', 'To', 'Value'], ...PLAIN]),
    'Row 1: this looks like a header row, but it has no Item column: expected at least Item and At.',
  ],
  [
    'header-late',
    () => plain(['Item', 'At']),
    'Row 4, Item: a header row must be the first row of the beam range.',
  ],
  [
    'duplicate-column',
    () => table([['Item', 'At', 'at']]),
    'Row 1, At: the header names the column At twice.',
  ],
  [
    'no-positions',
    () => table([['EI', '', '', 1]]),
    'No row names a position: expected supports and loads with At, so that the beam has two ends.',
  ],
  [
    'no-length-beam',
    () =>
      table([
        ['units', 'kN', 'm', 'mm'],
        ['pin', 3],
        ['fixed', '300 cm'],
      ]),
    'Every row stands at 3 m: expected at least two positions, so that the beam has a length.',
  ],
  [
    'no-supports',
    () => table([['EI', 0, 6, 1]]),
    'No row holds the beam: expected a pin, fixed, guided, spring or foundation row.',
  ],

  // Cells
  ['cell-error', () => plain(['point', '#REF!']), 'Row 4, At: the cell holds the error #REF!.'],
  [
    'cell-error',
    () => bindings([['q']], [[{ error: '#DIV/0!' }]]),
    'Argument values: the cell for q holds the error #DIV/0!.',
  ],
  ['cell-boolean', () => plain(['pin', true]), 'Row 4, At: expected a number, got TRUE.'],
  [
    'no-item',
    () => plain([0, 3, 0, 12]),
    'Row 4, Item: expected an item such as pin or uniform, got a blank cell beside At = 3.',
  ],
  ['item-not-word', () => plain([7, 3]), 'Row 4, Item: expected an item such as pin or uniform, got 7.'],
  [
    'unknown-item',
    () => plain(['unifrom', 0, 6, 1]),
    'Row 4, Item: "unifrom" is not an item. Did you mean uniform?',
  ],
  ['unknown-item', () => plain(['girder']), 'Row 4, Item: "girder" is not an item.'],
  [
    'unused-cell',
    () => plain(['point', 3, 5, 1]),
    'Row 4, To: a point row takes no To, got 5. Move it to its column or clear the cell.',
  ],
  [
    'unused-cell',
    () => plain(['axial', 3, '', 1]),
    'Row 4, At: an axial row takes no At, got 3. Move it to its column or clear the cell.',
  ],
  ['unclosed-quote', () => table([['pin "0']]), 'Row 1: the quotation mark in "0 is never closed.'],
  [
    'too-many-cells',
    () => table([['pin 0 1 2 3 4 5 6 7']]),
    'Row 1: expected at most eight cells, got 7 after them.',
  ],
  ['cell-twice', () => table([['pin 0 at=3']]), 'Row 1, At: this cell is given twice; the second time as 3.'],

  // Numbers and expressions
  [
    'ambiguous-number',
    () => plain(['point', 3, '', '1,234']),
    'Row 4, Value: 1,234 can be read in two ways (a decimal comma or groups of three). Write it as a number, or with a decimal point.',
  ],
  ['not-finite', () => plain(['point', 3, '', '1/0']), 'Row 4, Value: 1/0 does not give a finite number.'],
  [
    'not-understood',
    () => plain(['point', 3, '', '2*']),
    'Row 4, Value: expected a number, a number with a unit, or an expression, got "2*".',
  ],
  [
    'not-allowed',
    () => plain(['point', 3, '', 'a[1]']),
    'Row 4, Value: an expression holds numbers, names, + - * / ^ ( ) and sqrt abs min max sin cos tan exp log pi only, got "[" in "a[1]".',
  ],
  [
    'missing-operator',
    () => plain(['point', 3, '', 'a b']),
    'Row 4, Value: a * is missing in "a b": a product is written with its *.',
  ],
  [
    'function-without-brackets',
    () => plain(['point', 3, '', 'sqrt+1']),
    'Row 4, Value: sqrt is a function: expected sqrt(...) in "sqrt+1".',
  ],
  [
    'unknown-function',
    () => plain(['point', 3, '', 'sqr(4)']),
    'Row 4, Value: sqr is not a function here: expected one of sqrt, abs, min, max, sin, cos, tan, exp, log. Did you mean sqrt?',
  ],
  [
    'wrong-arguments',
    () => plain(['point', 3, '', 'sqrt(4,2)']),
    'Row 4, Value: sqrt has the wrong number of arguments in "sqrt(4,2)".',
  ],
  [
    'expression-too-long',
    () => plain(['point', 3, '', `a${'+1'.repeat(300)}`]),
    'Row 4, Value: the expression is too long or too deeply nested (500 characters, 30 brackets).',
  ],
  [
    'x-not-allowed',
    () => plain(['point', 3, '', 'x+1']),
    'Row 4, Value: x is the position along the beam and may only stand in the Value of E, I, EI, GA or varying, got "x+1".',
  ],
  [
    'end-with-law',
    () => plain(['varying', '', '', 'x', 3]),
    'Row 4, End value: a Value in x already says how the row varies: expected a blank End value, got 3.',
  ],
  [
    'unknown-name',
    () => table([...PLAIN, ['point', 3, '', 'P1']], { P2: 1, q: 2 }),
    'Row 4, Value: there is no name "P1" (known names: P2, q). Did you mean P2?',
  ],
  [
    'unknown-name',
    () => plain(['point', 3, '', 'P1']),
    'Row 4, Value: there is no name "P1" (no names are given; give them in the last two arguments, names and values).',
  ],

  // Units
  [
    'unknown-unit',
    () => metric(['uniform', '', '', 5, '', 'kNn/m']),
    'Row 6, Unit: "kNn" in "kNn/m" is not a unit: expected a unit like kN/m. Did you mean kN/m?',
  ],
  [
    'unknown-unit',
    () => metric(['couple', 3, '', '5 knm']),
    'Row 6, Value: "knm" in "5 knm" is not a unit: expected a unit like kN·m. Did you mean kNm?',
  ],
  [
    'unknown-unit',
    () => limit('20 mmm'),
    'Argument limit: "mmm" in "20 mmm" is not a unit: expected a unit like mm. Did you mean mm?',
  ],
  [
    'foreign-unit',
    () => metric(['uniform', '', '', 5, '', 'kg/m']),
    'Row 6, Unit: "kg/m" is not a unit of forces, lengths and angles. Did you mean kgf/m?',
  ],
  [
    'wrong-dimension',
    () => metric(['uniform', '', '', 5, '', 'kN']),
    'Row 6, Unit: expected a unit like kN/m, got kN.',
  ],
  ['wrong-dimension', () => x('3 kN'), 'Argument x: expected a unit like m, got kN.'],
  [
    'unit-missing',
    () => metric(['spring', 3, '', 5]),
    'Row 6, Value: with a units row this number must state its unit, got 5. Write for example kN/m in the Unit column.',
  ],
  [
    'unit-not-text',
    () => metric(['point', 3, '', 5, '', 7]),
    'Row 6, Unit: expected a unit such as kN/m, got 7.',
  ],
  [
    'unit-twice',
    () => metric(['point', 3, '', '5 kN', '', 'N']),
    'Row 6, Value: 5 kN brings its own unit although the Unit column says N. State one of them.',
  ],
  [
    'mixed-dimensions',
    () => table([...METRIC, ['point', 3, '', 'P+q']], { P: '1 kN', q: '1 kN/m' }),
    'Row 6, Value: "P+q" adds or compares quantities of different kinds.',
  ],
  [
    'units-row-missing',
    () => plain(['point', 3, '', '5 kN']),
    'Row 4, Value: 5 kN states a unit, but the table has no units row. Add a row such as: units, kN, m, mm.',
  ],
  [
    'units-incomplete',
    () => table([['units', 'kN', '', 'mm'], ...METRIC.slice(1)]),
    'Row 1, To: a units row needs a length, e.g. m here, got a blank cell.',
  ],
  [
    'setting-twice',
    () => metric(['units', 'kN', 'm', 'mm']),
    'Row 6, Item: a units row may stand once; row 1 is one already.',
  ],
  [
    'bad-axis',
    () => plain(['axis', 'upwards']),
    'Row 4, At: expected down or up, got "upwards". Did you mean up?',
  ],

  // Stretches and values
  [
    'to-blank',
    () => plain(['uniform', 3, '', 1]),
    "Row 4, To: the uniform row begins at 3, but To is blank or 0: expected where it ends (a stretch that ends at 0 writes it as the text '0).",
  ],
  [
    'reversed',
    () => plain(['uniform', 4, 2, 1]),
    'Row 4, To: the uniform row runs backwards, from 4 to 2: expected To greater than At. Swap them.',
  ],
  [
    'reversed',
    () => metric(['varying', 4, 2, 1]),
    'Row 6, To: the varying row runs backwards, from 4 m to 2 m: expected To greater than At. Swap them together with Value and End value.',
  ],
  [
    'no-length',
    () => plain(['uniform', 2, 2, 1]),
    'Row 4, To: the uniform row runs from 2 to 2: expected a stretch with a length.',
  ],
  [
    'not-positive',
    () => plain(['spring', 3, '', -5]),
    'Row 4, Value: a spring row needs a number greater than 0, got -5.',
  ],
  [
    'not-positive',
    () => plain(['GA']),
    'Row 4, Value: a GA row needs a number greater than 0, got 0 or a blank cell.',
  ],
  [
    'bad-law',
    () =>
      table([
        ['pin', 0],
        ['pin', 6],
        ['EI', '', '', '1-x'],
      ]),
    'Row 3, Value: the expression in x must be greater than 0, got -2 at x = 3.',
  ],
  [
    'bad-law',
    () => invalid('bad-law', { row: 3, column: 'Value', detail: { x: 2.5 } }),
    'Row 3, Value: the expression in x must be finite, and greater than 0 for a stiffness, and is not at x = 2.5.',
  ],

  // Supports, releases, section
  [
    'support-conflict',
    () => metric(['fixed', 0]),
    'Row 6, Item: the fixed contradicts the pin of row 2, at the same place 0 m. Keep one of them.',
  ],
  [
    'support-conflict',
    () => plain(['guided', 0]),
    'Row 4, Item: the guided contradicts the pin of row 1, at the same place 0. Together they are one fixed row.',
  ],
  [
    'spring-twice',
    () => plain(['spring', 3, '', 1], ['spring', 3, '', 1]),
    'Row 5, Item: there is a spring at 3 already, in row 4. If both act, write their sum in one row.',
  ],
  [
    'settlement-unsupported',
    () => metric(['settlement', 3, '', 5]),
    'Row 6, At: a settlement displaces a support, and nothing holds or springs the deflection at 3 m (supports that do: 0 m, 6 m).',
  ],
  [
    'rotation-unsupported',
    () => metric(['rotation', 0, '', 5]),
    'Row 6, At: a rotation turns a support, and nothing holds or springs the rotation at 0 m (supports that do: none).',
  ],
  [
    'hinge-at-clamp',
    () => plain(['fixed', 3], ['hinge', 3]),
    'Row 5, At: a hinge at 3 contradicts row 4, which holds or springs the rotation there. If the end is pinned write pin; if the hinge is beside the support move it a little.',
  ],
  [
    'release-at-support',
    () => plain(['shear release', 0]),
    'Row 4, At: a shear release at 0 contradicts row 1, which supports the beam there. Move it a little to the side that is released.',
  ],
  [
    'cut-in-two',
    () => plain(['hinge', 3], ['shear release', 3]),
    'Row 5, At: with the release of row 4 the beam is cut in two at 3. Write two beams instead.',
  ],
  [
    'load-at-release',
    () => plain(['hinge', 3], ['couple', 3, '', 1]),
    'Row 5, At: a couple at 3 stands on the hinge of row 4, and it is unclear on which side it acts. Move it a little to one side.',
  ],
  [
    'release-loaded',
    () => invalid('release-loaded', { row: 5, column: 'At', found: '3' }),
    'Row 5, At: a load at 3 stands on a release. Move it a little to one side.',
  ],
  [
    'section-missing',
    () =>
      table([
        ['pin', 0],
        ['pin', 6],
      ]),
    'No row gives E and I, or EI: E and I, or EI, must cover the whole beam once.',
  ],
  [
    'section-missing',
    () =>
      table([
        ['pin', 0],
        ['pin', 6],
        ['E', '', '', 1],
      ]),
    'No row gives I: E and I, or EI, must cover the whole beam once.',
  ],
  [
    'section-gap',
    () =>
      table([
        ['pin', 0],
        ['pin', 6],
        ['EI', 0, 4, 1],
      ]),
    'EI is missing from 4 to 6: E and I, or EI, must cover the whole beam once.',
  ],
  [
    'section-overlap',
    () =>
      table([
        ['pin', 0],
        ['pin', 6],
        ['EI', 0, 4, 1],
        ['EI', 3, 6, 1],
      ]),
    'Row 4, At: EI is given twice from 3 to 4 (rows 3, 4): it must be given once.',
  ],
  [
    'foundation-overlap',
    () => plain(['foundation', 0, 4, 1], ['foundation', 3, 6, 1]),
    'Row 5, At: the foundation is given twice from 3 to 4 (rows 4, 5). If both act, write their sum in one row.',
  ],

  // Cases, combinations, limits
  [
    'bad-case',
    () => plain(['point', 3, '', 1, '', '', '1st']),
    'Row 4, Case: a case name is a letter, then letters, digits or _, got "1st".',
  ],
  [
    'unknown-case',
    () => combination('1.35 g + Q'),
    'Argument combination: no row has the case g (cases: G, Q). Did you mean G?',
  ],
  [
    'unknown-case',
    () => combination('W', []),
    'Argument combination: no row has the case W (no row names a case).',
  ],
  [
    'bad-combination',
    () => combination('1.35 & G'),
    'Argument combination: expected a sum of cases such as 1.35 G + 1.5 Q, got "&" in "1.35 & G".',
  ],
  [
    'bad-combination',
    () => combination(5),
    'Argument combination: expected a sum of cases such as 1.35 G + 1.5 Q, got 5.',
  ],
  [
    'combination-without-case',
    () => combination('G + 3'),
    'Argument combination: expected a sum of cases such as 1.35 G + 1.5 Q, got 3 without a case in "G + 3".',
  ],
  [
    'not-linear',
    () => combination('G*Q'),
    'Argument combination: cases are added, not multiplied with each other: G Q in "G*Q".',
  ],
  [
    'combination-shape',
    () => combination([['G', 1, 2]]),
    'Argument combination: expected one text, or two columns (case, factor), got 3 columns.',
  ],
  [
    'bad-factor',
    () => combination([['G', 'much']]),
    'Argument combination, row 1: expected a factor, got "much".',
  ],
  [
    'case-twice',
    () =>
      combination([
        ['G', 1],
        ['G', 2],
      ]),
    'Argument combination, row 2: the case G is listed twice.',
  ],
  [
    'bad-combinations',
    () =>
      invalid('bad-combinations', {
        column: 'combinations',
        expected: 'a text',
        found: '5',
        detail: { cell: 2 },
      }),
    'Argument combinations: expected a text, got 5 in cell 2.',
  ],
  [
    'bad-limit',
    () => plain(['limit', '', '', 'L/360']),
    'Row 4, Value: expected a deflection greater than 0 or a text such as span/360, got L/360. Did you mean span/360?',
  ],
  [
    'bad-limit',
    () => limit('L/250'),
    'Argument limit: expected a deflection greater than 0 or a text such as span/360, got "L/250". Did you mean span/250?',
  ],

  // The other arguments of a formula
  [
    'names-size',
    () => bindings([['a', 'b']], [[1]]),
    'Argument values: names and values must be ranges of the same size, got 2 names and 1 values.',
  ],
  [
    'bad-name',
    () => bindings([['1st']], [[1]]),
    'Argument names: a name is a letter, then letters, digits or _, got 1st.',
  ],
  [
    'reserved-name',
    () => bindings([['pi']], [[1]]),
    'Argument names: pi has a meaning of its own in expressions and cannot be a name.',
  ],
  ['name-twice', () => bindings([['a', 'a']], [[1, 2]]), 'Argument names: the name a is given twice.'],
  [
    'bad-value',
    () => table([...PLAIN, ['point', 3, '', 'P']], { P: 'a+b' }),
    'Argument values: expected a number or a number with a unit for P, got a+b.',
  ],
  [
    'bad-position',
    () => x('middle'),
    'Argument x: expected a number in m, or a text such as "3-", "3+" or "3.5 m", got "middle".',
  ],
  ['outside-beam', () => x(9), 'Argument x: the beam reaches from 0 m to 6 m, got 9 m.'],
  [
    'no-such-word',
    () =>
      invalid('no-such-word', {
        column: 'quantity',
        expected: 'deflection, slope',
        found: 'slop',
        suggestion: 'slope',
      }),
    'Argument quantity: expected one of deflection, slope, got slop. Did you mean slope?',
  ],
  [
    'no-support',
    () =>
      unavailable('no-support', {
        column: 'at',
        expected: 'a support that holds a force',
        found: '3',
        detail: { unit: 'm', supports: ['0', '6'] },
      }),
    'Argument at: expected a support that holds a force, got 3 m (such supports: 0, 6 m).',
  ],
  [
    'no-support',
    () =>
      unavailable('no-support', {
        column: 'at',
        expected: 'a support that holds a couple',
        found: 'none',
        detail: { supports: [] },
      }),
    'Argument at: expected a support that holds a couple, got none (such supports: none).',
  ],
  [
    'bad-points',
    () => invalid('bad-points', { column: 'points', expected: 'a whole number from 2 to 10000', found: '1' }),
    'Argument points: expected a whole number from 2 to 10000, got 1.',
  ],
  [
    'bad-axles',
    () =>
      invalid('bad-axles', {
        column: 'axles',
        expected: 'two columns of numbers: offset, force',
        found: '"a"',
        detail: { axle: 2 },
      }),
    'Argument axles: expected two columns of numbers: offset, force, got "a" in row 2.',
  ],
  [
    'no-limit',
    () => invalid('no-limit', { column: 'limit', expected: 'a limit row', found: 'none' }),
    'Argument limit: expected a limit row, got none.',
  ],
  [
    'no-span',
    () => unavailable('no-span', { column: 'limit', expected: 'a deflection', found: 'span/300' }),
    'Argument limit: expected a deflection, got span/300.',
  ],
  [
    'no-modulus',
    () => unavailable('no-modulus', { column: 'Item', expected: 'one E row', found: 'none' }),
    'Item: expected one E row, got none.',
  ],
  [
    'needs-units',
    () => invalid('needs-units', { column: 'beam', expected: 'a units row', found: 'none' }),
    'Argument beam: expected a units row, got none.',
  ],
  [
    'no-mass',
    () => unavailable('no-mass', { column: 'combination', expected: 'vertical loads', found: 'none' }),
    'Argument combination: expected vertical loads, got none.',
  ],
  [
    'not-by-stiffness',
    () =>
      unavailable('not-by-stiffness', {
        column: 'limit',
        expected: 'a limit that some stiffness meets',
        found: '1.2 of the limit used',
      }),
    'Argument limit: expected a limit that some stiffness meets, got 1.2 of the limit used.',
  ],

  // Solving
  [
    'unstable',
    () => unavailable('unstable', { detail: { from: 0, to: 3, motion: 'rotate', about: 0 } }),
    'The beam is not held: from x = 0 to 3 it is free to rotate about x = 0. Add a support or remove a release.',
  ],
  [
    'unstable',
    () => unavailable('unstable', { detail: { from: 0, to: 3.000000000001, motion: 'translate' } }),
    'The beam is not held: from x = 0 to 3 it is free to move up and down. Add a support or remove a release.',
  ],
  [
    'past-critical-load',
    () => unavailable('past-critical-load', { detail: { critical: 1234.5678, applied: 2000 } }),
    'The compression 2000 is at or past the critical load 1234.57: the beam buckles. Expected a smaller axial force.',
  ],
  [
    'self-check-failed',
    () => unavailable('self-check-failed', { detail: { which: 'equilibrium', residual: 1e-5 } }),
    'The solution did not pass its own check (equilibrium, residual 0.00001), so no number is given. Look for stiffnesses or lengths of very different size.',
  ],
  [
    'too-stiff',
    () => unavailable('too-stiff', { column: 'Value', detail: { x: 3 } }),
    "Value: the foundation, or the compression, is so large for the beam's stiffness that it cannot be resolved near x = 3. Check its unit.",
  ],

  // Cautions
  [
    'number-as-text',
    () => caution(['point', '3', '', 1]),
    'Row 4, At: the number 3 is stored as text; it was read as 3.',
  ],
  [
    'number-as-text',
    () => caution(['point', 3, '', '12,5']),
    'Row 4, Value: the number 12,5 is stored as text; it was read as 12.5.',
  ],
  ['zero-value', () => caution(['point', 3]), 'Row 4, Value: this point is 0 or blank and does nothing.'],
  [
    'ignored-heading',
    () =>
      cautionsOf([
        ['Item', 'At', 'Value', 'Csae'],
        ['pin', 0],
        ['pin', 6],
        ['EI', '', 1],
      ]),
    'Row 1: the column "Csae" is ignored. Did you mean Case?',
  ],
  [
    'similar-cases',
    () => caution(['point', 3, '', 1, '', '', 'G'], ['point', 3, '', 1, '', '', 'g']),
    'Case: the cases G and g differ only in capitals and are two cases.',
  ],
  [
    'release-at-end',
    () => caution(['hinge', 6]),
    'Row 4, At: a hinge at the end of the beam (6) releases nothing and is left out.',
  ],
  [
    'release-twice',
    () => caution(['hinge', 3], ['hinge', 3]),
    'Row 5, At: the hinge at 3 stands in row 4 already.',
  ],
  [
    'modulus-unlikely',
    () => cautionsOf(METRIC.map((row) => (row[0] === 'E' ? ['E', '', '', 210000, '', 'GPa'] : row))),
    'Row 4, Value: E = 210000 GPa is outside 0.1 to 1000 GPa. Check its unit.',
  ],
  [
    'load-far-out',
    () => cautionsOf([...METRIC, ['point', 60, '', 1]]),
    'Row 6, At: this point stands outside every span, on an overhang of 54 m, longer than the longest span (6 m). Check At.',
  ],
  [
    'limit-unlikely',
    () => cautionsOf([...METRIC, ['limit', '', '', 1000]]),
    'Row 6, Value: a limit of 1000 mm is more than a tenth of the beam. Did you mean span/1000?',
  ],
  [
    'large-slope',
    () => invalid('large-slope', { expected: 'at most 0.1 rad', found: '0.2 rad', detail: { x: '3 m' } }),
    'The slope reaches 0.2 rad at x = 3 m: expected at most 0.1 rad.',
  ],
  [
    'large-deflection',
    () =>
      invalid('large-deflection', {
        expected: 'at most span/20',
        found: '500 mm',
        detail: { span: '0 to 6 m', x: '3 m' },
      }),
    'The deflection of 0 to 6 m reaches 500 mm at x = 3 m: expected at most span/20.',
  ],
  [
    'uplift',
    () => invalid('uplift', { expected: 'a push', found: '-3 kN', detail: { x: '0 m' } }),
    'The support at x = 0 m is pulled up by the beam, its reaction is -3 kN: expected a push.',
  ],
  [
    'standing-caution',
    () => invalid('standing-caution'),
    'Linear elastic theory of small deflections; for review by a qualified engineer. Local codes and licensed practice decide limits, loads and combinations.',
  ],
];

test.each(SAID)('%s', (code, issues, text) => {
  const issue = issues().find((one) => one.code === code);
  expect(issue && say(issue)).toBe(text);
});

test('every code that is worded is tested here', () => {
  const said = new Set(SAID.map(([code]) => code));
  expect(CODES.filter((code) => !said.has(code))).toEqual([]);
});

test('a code without words of its own still makes a readable sentence', () => {
  expect(
    say({
      code: 'some-new-fault',
      kind: 'invalid',
      row: 3,
      column: 'Value',
      expected: 'a number',
      found: '"q"',
    }),
  ).toBe('Row 3, Value: expected a number, got "q" (some new fault).');
  expect(say({ code: 'some-new-fault', kind: 'invalid' })).toBe('Some new fault.');
  expect(say({ code: 'constructor', kind: 'invalid', column: 'x', suggestion: 'y' })).toBe(
    'Argument x: constructor. Did you mean y?',
  );
});

test('several issues: the first, and how many more', () => {
  const issues = compileTable([
    ['piin', 0],
    ['pin', true],
    ['EI', '', '', -1],
  ]).issues;
  expect(sayAll(issues)).toBe(
    'Row 1, Item: "piin" is not an item. Did you mean pin? (And 2 more issues; READBACK lists them.)',
  );
  expect(sayAll(issues.slice(0, 2))).toBe(
    'Row 1, Item: "piin" is not an item. Did you mean pin? (And 1 more issue; READBACK lists them.)',
  );
  expect(sayAll(issues.slice(0, 1))).toBe('Row 1, Item: "piin" is not an item. Did you mean pin?');
  expect(sayAll([])).toBe('');
});

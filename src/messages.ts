/**
 * Issue -> sentence. The only place that words anything; elsewhere issues are data.
 * A sentence names its place, says what was expected (with its unit), what was found, and what was probably meant.
 */
import type { Issue } from './issue';

/** One issue as one sentence (a hint may follow), e.g. "Row 3, Unit: expected a unit like kN/m, got kN." */
export function say(issue: Issue): string {
  const word = WORDED.get(issue.code);
  const sentence = placeOf(issue) + (word === undefined ? general(issue) : word(issue));
  const { suggestion } = issue;
  const end = suggestion === undefined || INSIDE.has(issue.code) ? '' : ` Did you mean ${suggestion}?`;
  return sentence.charAt(0).toUpperCase() + sentence.slice(1) + end;
}

/** These work their suggestion into the sentence; the others end with it. */
const INSIDE: ReadonlySet<string> = new Set([
  'unit-missing',
  'ignored-heading',
  'limit-unlikely',
  'header-incomplete',
]);

/** The first sentence and how many more there are. */
export function sayAll(issues: readonly Issue[]): string {
  const [first, ...rest] = issues;
  if (first === undefined) return '';
  if (rest.length === 0) return say(first);
  return `${say(first)} (And ${rest.length} more ${rest.length === 1 ? 'issue' : 'issues'}; READBACK lists them.)`;
}

/** "Row 3, Value: " for cells of the table, "Argument x: " for arguments of a formula (their names begin small). */
function placeOf({ row, column }: Issue): string {
  const argument = column !== undefined && /^[a-z]/.test(column);
  if (argument) return row === undefined ? `argument ${column}: ` : `argument ${column}, row ${row}: `;
  const parts = [row === undefined ? '' : `row ${row}`, column ?? ''].filter((part) => part !== '');
  return parts.length === 0 ? '' : `${parts.join(', ')}: `;
}

/** For a code without a sentence of its own: its fields, readable. */
function general({ code, expected, found }: Issue): string {
  const parts = [
    expected === undefined ? '' : `expected ${expected}`,
    found === undefined ? '' : `got ${found}`,
  ].filter((part) => part !== '');
  const name = code.replace(/-/g, ' ');
  return `${parts.length === 0 ? name : `${parts.join(', ')} (${name})`}.`;
}

function detail({ detail: fields }: Issue, key: string): string {
  const value = fields?.[key];
  if (value === undefined) return '?';
  if (typeof value === 'number') return String(Number(value.toPrecision(6))).replace('e+', 'e');
  return typeof value === 'string' ? value : list(value);
}

function list(words: readonly string[]): string {
  return words.length === 0 ? 'none' : words.join(', ');
}

function listed(issue: Issue, key: string): readonly string[] {
  const value = issue.detail?.[key];
  return Array.isArray(value) ? (value as readonly string[]) : [];
}

/** "a pin", "an axial" */
function a(word: string): string {
  return `${/^[aeioEI]/.test(word) ? 'an' : 'a'} ${word}`;
}

const got = (issue: Issue): string => issue.found ?? 'nothing';

/** " of q" when a value of `values` is meant */
const ofName = (issue: Issue): string =>
  issue.detail?.name === undefined ? '' : ` for ${detail(issue, 'name')}`;

type Sentence = (issue: Issue) => string;

const SENTENCES: Readonly<Record<string, Sentence>> = {
  // The table as a whole
  'no-rows': () => 'The beam range holds no rows: expected items such as pin, E, I, uniform.',
  'ninth-column': (i) =>
    `Expected at most eight columns (Item, At, To, Value, End value, Unit, Case, Note), got ${got(i)}. Select fewer, or add a header row with at least Item and At.`,
  'header-incomplete': (i) =>
    `this looks like a header row, but it has no ${i.expected ?? 'Item'} column${i.found === undefined ? '' : ` (it has "${i.found}")`}: expected at least Item and At.`,
  'header-late': () => 'a header row must be the first row of the beam range.',
  'duplicate-column': (i) => `the header names the column ${i.column ?? '?'} twice.`,
  'no-positions': () =>
    'No row names a position: expected supports and loads with At, so that the beam has two ends.',
  'no-length-beam': (i) =>
    `Every row stands at ${got(i)}: expected at least two positions, so that the beam has a length.`,
  'no-supports': () => 'No row holds the beam: expected a pin, fixed, guided, spring or foundation row.',

  // Cells
  'cell-error': (i) => `the cell${ofName(i)} holds the error ${got(i)}.`,
  'cell-boolean': (i) => `expected a number, got ${got(i)}.`,
  'no-item': (i) =>
    `expected an item such as pin or uniform, got a blank cell beside ${detail(i, 'at')} = ${got(i)}.`,
  'item-not-word': (i) => `expected an item such as pin or uniform, got ${got(i)}.`,
  'unknown-item': (i) => `${got(i)} is not an item.`,
  'unused-cell': (i) =>
    `${a(detail(i, 'item'))} row takes no ${i.column ?? 'such cell'}, got ${got(i)}. Move it to its column or clear the cell.`,
  'unclosed-quote': (i) => `the quotation mark in ${got(i)} is never closed.`,
  'too-many-cells': (i) => `expected at most eight cells, got ${got(i)} after them.`,
  'cell-twice': (i) => `this cell is given twice; the second time as ${got(i)}.`,

  // Numbers and expressions
  'ambiguous-number': (i) =>
    `${got(i)}${ofName(i)} can be read in two ways (a decimal comma or groups of three). Write it as a number, or with a decimal point.`,
  'not-finite': (i) => `${got(i)} does not give a finite number.`,
  'not-understood': (i) => `expected a number, a number with a unit, or an expression, got "${got(i)}".`,
  'not-allowed': (i) =>
    `an expression holds numbers, names, + - * / ^ ( ) and sqrt abs min max sin cos tan exp log pi only, got ${got(i)} in "${detail(i, 'text')}".`,
  'missing-operator': (i) => `a * is missing in "${detail(i, 'text')}": a product is written with its *.`,
  'function-without-brackets': (i) =>
    `${got(i)} is a function: expected ${got(i)}(...) in "${detail(i, 'text')}".`,
  'unknown-function': (i) =>
    `${got(i)} is not a function here: expected one of sqrt, abs, min, max, sin, cos, tan, exp, log.`,
  'wrong-arguments': (i) => `${got(i)} has the wrong number of arguments in "${detail(i, 'text')}".`,
  'expression-too-long': () =>
    'the expression is too long or too deeply nested (500 characters, 30 brackets).',
  'x-not-allowed': (i) =>
    `x is the position along the beam and may only stand in the Value of E, I, EI, GA or varying, got "${got(i)}".`,
  'end-with-law': (i) =>
    `a Value in x already says how the row varies: expected a blank End value, got ${got(i)}.`,
  'unknown-name': (i) => {
    const names = listed(i, 'names');
    const known =
      names.length === 0
        ? 'no names are given; give them in the last two arguments, names and values'
        : `known names: ${list(names)}`;
    return `there is no name "${got(i)}" (${known}).`;
  },

  // Units
  'unknown-unit': (i) => {
    const expected = detail(i, 'expected');
    const hint = expected === '?' || expected === '' ? '' : `: expected a unit like ${expected}`;
    const text = detail(i, 'text');
    const inside = text === '?' || text === got(i) ? '' : ` in "${text}"`;
    return `"${got(i)}"${inside}${ofName(i)} is not a unit${hint}.`;
  },
  'foreign-unit': (i) => `"${got(i)}"${ofName(i)} is not a unit of forces, lengths and angles.`,
  'wrong-dimension': (i) =>
    i.expected === undefined || i.expected === ''
      ? `the unit ${got(i)} does not fit here.`
      : `expected a unit like ${i.expected}, got ${got(i)}.`,
  'unit-missing': (i) =>
    `with a units row this number must state its unit, got ${got(i)}. Write for example ${i.suggestion ?? 'a unit'} in the Unit column.`,
  'unit-not-text': (i) => `expected a unit such as kN/m, got ${got(i)}.`,
  'unit-twice': (i) =>
    `${got(i)} brings its own unit although the Unit column says ${i.expected ?? 'another'}. State one of them.`,
  'mixed-dimensions': (i) => `"${got(i)}" adds or compares quantities of different kinds.`,
  'units-row-missing': (i) =>
    `${got(i)}${ofName(i)} states a unit, but the table has no units row. Add a row such as: units, kN, m, mm.`,
  'units-incomplete': (i) => `a units row needs ${i.expected ?? 'units'} here, got ${got(i)}.`,
  'setting-twice': (i) => `${a(got(i))} row may stand once; row ${detail(i, 'first')} is one already.`,
  'bad-axis': (i) => `expected down or up, got ${got(i)}.`,

  // Stretches and values
  'to-blank': (i) =>
    `the ${detail(i, 'item')} row begins at ${got(i)}, but To is blank or 0: expected where it ends (a stretch that ends at 0 writes it as the text '0).`,
  reversed: (i) =>
    `the ${detail(i, 'item')} row runs backwards, from ${detail(i, 'at')} to ${got(i)}: expected To greater than At. Swap them${detail(i, 'item') === 'varying' ? ' together with Value and End value' : ''}.`,
  'no-length': (i) =>
    `the ${detail(i, 'item')} row runs from ${detail(i, 'at')} to ${got(i)}: expected a stretch with a length.`,
  'not-positive': (i) => `${a(detail(i, 'item'))} row needs a number greater than 0, got ${got(i)}.`,
  'bad-law': (i) =>
    `the expression in x must be ${i.expected ?? 'finite, and greater than 0 for a stiffness'}${i.found === undefined ? ', and is not' : `, got ${i.found}`} at x = ${detail(i, 'x')}.`,

  // Supports, releases, section
  'support-conflict': (i) => {
    const both = new Set([got(i), detail(i, 'other')]);
    const hint =
      both.has('pin') && both.has('guided') ? ' Together they are one fixed row.' : ' Keep one of them.';
    return `the ${got(i)} contradicts the ${detail(i, 'other')} of row ${detail(i, 'otherRow')}, at the same place ${detail(i, 'at')}.${hint}`;
  },
  'spring-twice': (i) =>
    `there is a ${got(i)} at ${detail(i, 'at')} already, in row ${detail(i, 'otherRow')}. If both act, write their sum in one row.`,
  'settlement-unsupported': (i) =>
    `a settlement displaces a support, and nothing holds or springs the deflection at ${got(i)} (supports that do: ${detail(i, 'supports')}).`,
  'rotation-unsupported': (i) =>
    `a rotation turns a support, and nothing holds or springs the rotation at ${got(i)} (supports that do: ${detail(i, 'supports')}).`,
  'hinge-at-clamp': (i) =>
    `a hinge at ${got(i)} contradicts row ${detail(i, 'otherRow')}, which holds or springs the rotation there. If the end is pinned write pin; if the hinge is beside the support move it a little.`,
  'release-at-support': (i) =>
    `a shear release at ${got(i)} contradicts row ${detail(i, 'otherRow')}, which supports the beam there. Move it a little to the side that is released.`,
  'cut-in-two': (i) =>
    `with the release of row ${detail(i, 'otherRow')} the beam is cut in two at ${got(i)}. Write two beams instead.`,
  'load-at-release': (i) =>
    `a ${detail(i, 'item')} at ${got(i)} stands on the ${detail(i, 'release')} of row ${detail(i, 'otherRow')}, and it is unclear on which side it acts. Move it a little to one side.`,
  'release-loaded': (i) => `a load at ${got(i)} stands on a release. Move it a little to one side.`,
  'section-missing': (i) =>
    `No row gives ${i.expected ?? 'the section'}: E and I, or EI, must cover the whole beam once.`,
  'section-gap': (i) =>
    `${i.expected ?? 'EI'} is missing from ${detail(i, 'from')} to ${detail(i, 'to')}: E and I, or EI, must cover the whole beam once.`,
  'section-overlap': (i) =>
    `${got(i)} is given twice from ${detail(i, 'from')} to ${detail(i, 'to')} (rows ${detail(i, 'rows')}): it must be given once.`,
  'foundation-overlap': (i) =>
    `the foundation is given twice from ${detail(i, 'from')} to ${detail(i, 'to')} (rows ${detail(i, 'rows')}). If both act, write their sum in one row.`,

  // Cases, combinations, limits
  'bad-case': (i) => `a case name is a letter, then letters, digits or _, got ${got(i)}.`,
  'unknown-case': (i) => {
    const cases = listed(i, 'cases');
    return `no row has the case ${got(i)} (${cases.length === 0 ? 'no row names a case' : `cases: ${list(cases)}`}).`;
  },
  'bad-combination': (i) =>
    `expected a sum of cases such as 1.35 G + 1.5 Q, got ${got(i)}${i.detail?.text === undefined ? '' : ` in "${detail(i, 'text')}"`}.`,
  'combination-without-case': (i) =>
    `expected a sum of cases such as 1.35 G + 1.5 Q, got ${got(i)} without a case in "${detail(i, 'text')}".`,
  'not-linear': (i) =>
    `cases are added, not multiplied with each other: ${got(i)} in "${detail(i, 'text')}".`,
  'combination-shape': (i) => `expected one text, or two columns (case, factor), got ${got(i)} columns.`,
  'bad-factor': (i) => `expected a factor, got ${got(i)}.`,
  'case-twice': (i) => `the case ${got(i)} is listed twice.`,
  'bad-combinations': (i) =>
    `expected ${i.expected ?? 'combinations'}, got ${got(i)}${i.detail?.cell === undefined ? '' : ` in cell ${detail(i, 'cell')}`}${i.detail?.cases === undefined ? '' : ` (cases: ${detail(i, 'cases')})`}.`,
  'bad-limit': (i) => `expected a deflection greater than 0 or a text such as span/360, got ${got(i)}.`,

  // The other arguments of a formula
  'names-size': (i) =>
    `names and values must be ranges of the same size, got ${i.expected ?? '?'} names and ${got(i)} values.`,
  'bad-name': (i) => `a name is a letter, then letters, digits or _, got ${got(i)}.`,
  'reserved-name': (i) => `${got(i)} has a meaning of its own in expressions and cannot be a name.`,
  'name-twice': (i) => `the name ${got(i)} is given twice.`,
  'bad-value': (i) => `expected a number or a number with a unit${ofName(i)}, got ${got(i)}.`,
  'bad-position': (i) =>
    `expected ${i.expected ?? 'a number'}, or a text such as "3-", "3+" or "3.5 m", got ${got(i)}.`,
  'outside-beam': (i) => `the beam reaches from ${detail(i, 'from')} to ${detail(i, 'to')}, got ${got(i)}.`,
  'no-such-word': (i) => `expected one of ${i.expected ?? detail(i, 'words')}, got ${got(i)}.`,
  'no-support': (i) => {
    const supports = listed(i, 'supports');
    const unit = i.detail?.unit === undefined || i.detail.unit === '' ? '' : ` ${detail(i, 'unit')}`;
    return `expected ${i.expected ?? 'a support'}, got ${got(i)}${got(i) === 'none' ? '' : unit} (such supports: ${supports.length === 0 ? 'none' : `${list(supports)}${unit}`}).`;
  },
  'bad-points': (i) => `expected ${i.expected ?? 'a whole number of points'}, got ${got(i)}.`,
  'bad-axles': (i) =>
    `expected ${i.expected ?? 'two columns of numbers'}, got ${got(i)}${i.detail?.axle === undefined ? '' : ` in row ${detail(i, 'axle')}`}.`,
  'no-limit': (i) => `expected ${i.expected ?? 'a limit'}, got ${got(i)}.`,
  'no-span': (i) => `expected ${i.expected ?? 'a beam with spans'}, got ${got(i)}.`,
  'no-modulus': (i) => `expected ${i.expected ?? 'one E'}, got ${got(i)}.`,
  'needs-units': (i) => `expected ${i.expected ?? 'a units row'}, got ${got(i)}.`,
  'no-mass': (i) => `expected ${i.expected ?? 'vertical loads'}, got ${got(i)}.`,
  'not-by-stiffness': (i) => `expected ${i.expected ?? 'a limit that stiffness can meet'}, got ${got(i)}.`,

  // Solving
  unstable: (i) => {
    const motions: Record<string, string> = {
      rotate: `free to rotate${i.detail?.about === undefined ? '' : ` about x = ${detail(i, 'about')}`}`,
      translate: 'free to move up and down',
      fold: 'free to fold at its releases',
      any: 'held by nothing',
    };
    const motion = motions[String(i.detail?.motion)] ?? 'free to move';
    return `The beam is not held: from x = ${detail(i, 'from')} to ${detail(i, 'to')} it is ${motion}. Add a support or remove a release.`;
  },
  'past-critical-load': (i) =>
    `The ${i.detail?.sense === 'tension' ? 'tension' : 'compression'} ${detail(i, 'applied')} is at or past the critical load ${detail(i, 'critical')}: the beam buckles. Expected a smaller axial force.`,
  'self-check-failed': (i) =>
    `The solution did not pass its own check (${detail(i, 'which')}, residual ${detail(i, 'residual')}), so no number is given. Look for stiffnesses or lengths of very different size.`,
  'too-stiff': (i) =>
    `the foundation, or the compression, is so large for the beam's stiffness that it cannot be resolved near x = ${detail(i, 'x')}. Check its unit.`,

  // Cautions
  'number-as-text': (i) => `the number ${got(i)} is stored as text; it was read as ${i.expected ?? '?'}.`,
  'zero-value': (i) => `this ${detail(i, 'item')} is 0 or blank and does nothing.`,
  'ignored-heading': (i) =>
    `the column "${got(i)}" is ignored. Did you mean ${i.suggestion ?? 'a column of the table'}?`,
  'similar-cases': (i) =>
    `the cases ${detail(i, 'other')} and ${got(i)} differ only in capitals and are two cases.`,
  'release-at-end': (i) =>
    `a ${detail(i, 'item')} at the end of the beam (${got(i)}) releases nothing and is left out.`,
  'release-twice': (i) =>
    `the ${detail(i, 'item')} at ${got(i)} stands in row ${detail(i, 'otherRow')} already.`,
  'modulus-unlikely': (i) => `E = ${got(i)} is outside 0.1 to 1000 GPa. Check its unit.`,
  'load-far-out': (i) =>
    `this ${detail(i, 'item')} stands outside every span, on an overhang of ${got(i)}, longer than the longest span (${i.expected ?? '?'}). Check At.`,
  'limit-unlikely': (i) =>
    `a limit of ${got(i)} is more than a tenth of the beam. Did you mean ${i.suggestion ?? 'span/...'}?`,
  'large-slope': (i) =>
    `The slope reaches ${got(i)} at x = ${detail(i, 'x')}: expected ${i.expected ?? 'a small one'}.`,
  'large-deflection': (i) =>
    `The deflection of ${detail(i, 'span')} reaches ${got(i)} at x = ${detail(i, 'x')}: expected ${i.expected ?? 'a small one'}.`,
  uplift: (i) =>
    `The support at x = ${detail(i, 'x')} is pulled up by the beam, its reaction is ${got(i)}: expected ${i.expected ?? 'a push'}.`,
  'standing-caution': () =>
    'Linear elastic theory of small deflections; for review by a qualified engineer. Local codes and licensed practice decide limits, loads and combinations.',
};

// A map, because a code is looked up by a name from outside and an object also knows "constructor".
const WORDED: ReadonlyMap<string, Sentence> = new Map(Object.entries(SENTENCES));

/** Every code that has a sentence of its own. */
export const CODES: readonly string[] = [...WORDED.keys()];

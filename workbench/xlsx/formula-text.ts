/**
 * Formula text between a sheet and a file. In a file our functions carry the host's prefix for functions of add-ins and an underscore for
 * the dot: `_xldudf_SPANROW_DEFLECTION(`. Text in quotes ("…") and quoted sheet names ('…') are left alone.
 */

const PREFIX = '_xldudf_SPANROW_';
const IN_FILE = /(?<![\w.])_xldudf_SPANROW_([A-Z][A-Z0-9_]*)(?=\()/gi;
const IN_SHEET = /(?<![\w.!])SPANROW\.([A-Z][A-Z0-9_.]*)(?=\()/gi;
const ADD_IN = /(?<![\w.])_xldudf_([A-Z0-9_]+)(?=\()/gi;

/** Applies `change` to the parts of a formula that stand outside quotes. */
export function outsideQuotes(formula: string, change: (part: string) => string): string {
  // an unclosed quote runs to the end and is left alone too
  return formula.replace(/"(?:[^"]|"")*(?:"|$)|'(?:[^']|'')*(?:'|$)|[^"']+/g, (part) =>
    part.startsWith('"') || part.startsWith("'") ? part : change(part),
  );
}

/** `_xldudf_SPANROW_CHECK(…)` -> `SPANROW.CHECK(…)`, whatever the case. */
export function fromFile(formula: string): string {
  return outsideQuotes(formula, (part) =>
    part.replace(IN_FILE, (_, name: string) => `SPANROW.${name.toUpperCase()}`).replace(FUTURE_IN_FILE, ''),
  );
}

/** `SPANROW.CHECK(…)` -> `_xldudf_SPANROW_CHECK(…)`; functions newer than the file format get the prefix it asks for. */
export function toFile(formula: string): string {
  return outsideQuotes(formula, (part) =>
    part
      .replace(IN_SHEET, (_, name: string) => PREFIX + name.toUpperCase().replace(/\./g, '_'))
      .replace(FUTURE_IN_SHEET, (name) => FUTURE_PREFIX.get(name.toUpperCase()) + name.toUpperCase()),
  );
}

/** Whether a formula (as shown in the sheet) calls one of our functions. */
export function callsSpanrow(formula: string): boolean {
  let found = false;
  outsideQuotes(formula, (part) => {
    found ||= part.search(IN_SHEET) >= 0;
    return part;
  });
  return found;
}

/** Names of functions of other add-ins that a formula of a file calls. */
export function otherAddIns(formula: string): string[] {
  const found: string[] = [];
  outsideQuotes(formula, (part) => {
    for (const [, name] of part.matchAll(ADD_IN))
      if (name !== undefined && !/^SPANROW_/i.test(name)) found.push(name);
    return part;
  });
  return found;
}

/** Functions that the file format stores with a prefix because it is older than they are (public list of the format's vendor). */
const FUTURE_PREFIX = new Map<string, string>([
  ...`ACOT ACOTH AGGREGATE ARABIC BASE BYCOL BYROW CEILING.MATH CHOOSECOLS CHOOSEROWS COMBINA CONCAT COT COTH CSC CSCH DAYS DECIMAL
  DROP EXPAND FLOOR.MATH FORMULATEXT HSTACK IFNA IFS ISFORMULA ISOWEEKNUM LAMBDA LET MAKEARRAY MAP MAXIFS MINIFS MUNIT NUMBERVALUE
  PERCENTILE.EXC PERCENTILE.INC QUARTILE.EXC QUARTILE.INC RANDARRAY RANK.AVG RANK.EQ REDUCE SCAN SEC SECH SEQUENCE SHEET SHEETS
  SORTBY STDEV.P STDEV.S SWITCH TAKE TEXTAFTER TEXTBEFORE TEXTJOIN TEXTSPLIT TOCOL TOROW UNICHAR UNICODE UNIQUE VAR.P VAR.S VSTACK
  WRAPCOLS WRAPROWS XLOOKUP XMATCH XOR`
    .split(/\s+/)
    .map((name) => [name, '_xlfn.'] as const),
  ['FILTER', '_xlfn._xlws.'],
  ['SORT', '_xlfn._xlws.'],
]);
const FUTURE_IN_FILE = /(?<![\w.])(?:_xlfn\.)?(?:_xlws\.|_xlfn\.)/gi;
const FUTURE_IN_SHEET = new RegExp(
  `(?<![\\w.])(?:${[...FUTURE_PREFIX.keys()].map((name) => name.replace('.', '\\.')).join('|')})(?=\\()`,
  'gi',
);

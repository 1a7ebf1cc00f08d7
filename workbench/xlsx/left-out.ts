/**
 * What a file holds that the embedded spreadsheet does not: found by the parts and tags of the file, said in words, so that
 * nothing is lost silently when the workbook is saved from here.
 */
import { decode } from './xml';

/** Parts of a file by the start of their name, and what a person calls them. */
const PARTS: readonly (readonly [RegExp, string, string])[] = [
  [/^xl\/charts\/chart[^/]*\.xml$/, 'chart', 'charts'],
  [/^xl\/media\//, 'picture', 'pictures'],
  [/^xl\/(threadedComments\/|comments)[^/]*\.xml$/, 'sheet with comments', 'sheets with comments'],
  [/^xl\/pivotTables\/[^/]*\.xml$/, 'pivot table', 'pivot tables'],
  [/^xl\/externalLinks\/[^/]*\.xml$/, 'link to another workbook', 'links to other workbooks'],
  [/^xl\/vbaProject\.bin$/, 'set of macros (never run here)', 'sets of macros (never run here)'],
  [/^xl\/(ctrlProps|activeX|embeddings)\//, 'embedded object', 'embedded objects'],
  [/^xl\/(slicers|timelines)\/[^/]*\.xml$/, 'slicer', 'slicers'],
  [/^xl\/chartsheets\/[^/]*\.xml$/, 'chart sheet', 'chart sheets'],
];

/** Tags of a worksheet part. */
const TAGS: readonly (readonly [RegExp, string])[] = [
  [/<(?:\w+:)?conditionalFormatting[ >]/, 'conditional formatting'],
  [/<(?:\w+:)?dataValidation[ >]/, 'data validation'],
  [/<(?:\w+:)?hyperlink[ >]/, 'hyperlinks (their text is kept)'],
  [/<(?:\w+:)?sheetProtection[ >/]/, 'sheet protection'],
  [/<(?:\w+:)?autoFilter[ >/]/, 'filters'],
  [/<(?:\w+:)?(?:row|col)\b[^>]*\soutlineLevel="[1-9]/, 'outline groups'],
  [/<(?:\w+:)?(?:pageSetup|headerFooter|printOptions|rowBreaks|colBreaks)[ >/]/, 'page set-up for printing'],
  [/<(?:\w+:)?sparklineGroup[ >]/, 'sparklines'],
  [/<(?:\w+:)?oleObject[ >]/, 'embedded objects'],
];

export function partsLeftOut(names: readonly string[]): string[] {
  const notes: string[] = [];
  for (const [pattern, one, many] of PARTS) {
    const count = names.filter((name) => pattern.test(name)).length;
    if (count > 0) notes.push(`${count} ${count === 1 ? one : many}.`);
  }
  return notes;
}

export function sheetLeftOut(name: string, part: Uint8Array | undefined): string[] {
  const xml = decode(part);
  const found = TAGS.filter(([pattern]) => pattern.test(xml)).map(([, words]) => words);
  return found.length === 0 ? [] : [`Sheet "${name}": ${found.join(', ')}.`];
}

/** Whether shared strings carry formatting inside a text (rich runs). */
export function mixedTexts(sharedStrings: Uint8Array | undefined): boolean {
  return /<(?:\w+:)?r>/.test(decode(sharedStrings));
}

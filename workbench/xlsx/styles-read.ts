/**
 * Cell formats of a file -> styles of the embedded spreadsheet: fonts, fills, borders, alignment, number formats, theme colours.
 * The format index of a cell (`s`) points into `cellXfs`; everything a cell looks like is collected there once.
 */
import type { IBorderData, IColorStyle, IStyleData } from '@univerjs/core';
import { tags, type Tag } from './xml';

export interface FileStyles {
  /** by format index; null where the format is plain */
  readonly styles: readonly (IStyleData | null)[];
}

/** Number formats that files name by number only (part of the open file format). */
const BUILT_IN: Readonly<Record<number, string>> = {
  1: '0', 2: '0.00', 3: '#,##0', 4: '#,##0.00', 9: '0%', 10: '0.00%', 11: '0.00E+00', 12: '# ?/?', 13: '# ??/??',
  14: 'yyyy-mm-dd', 15: 'd-mmm-yy', 16: 'd-mmm', 17: 'mmm-yy', 18: 'h:mm AM/PM', 19: 'h:mm:ss AM/PM', 20: 'h:mm',
  21: 'h:mm:ss', 22: 'yyyy-mm-dd h:mm', 37: '#,##0;(#,##0)', 38: '#,##0;[Red](#,##0)', 39: '#,##0.00;(#,##0.00)',
  40: '#,##0.00;[Red](#,##0.00)', 45: 'mm:ss', 46: '[h]:mm:ss', 47: 'mm:ss.0', 48: '##0.0E+0', 49: '@',
}; // prettier-ignore

/** The file format's border words and the spreadsheet's numbers for them. */
export const BORDERS: Readonly<Record<string, number>> = {
  thin: 1, hair: 2, dotted: 3, dashed: 4, dashDot: 5, dashDotDot: 6, double: 7, medium: 8, mediumDashed: 9,
  mediumDashDot: 10, mediumDashDotDot: 11, slantDashDot: 12, thick: 13,
}; // prettier-ignore
export const HORIZONTAL: Readonly<Record<string, number>> = { left: 1, center: 2, right: 3, justify: 4 };
export const VERTICAL: Readonly<Record<string, number>> = { top: 1, center: 2, bottom: 3 };
export const WRAP = 3;
const EDGES: Readonly<Record<string, keyof IBorderData>> = { left: 'l', right: 'r', top: 't', bottom: 'b' };

/** Reads `xl/styles.xml`; theme colours come from `xl/theme/theme1.xml`. Both may be missing. */
export function readStyles(stylesXml: string, themeXml: string): FileStyles {
  const theme = readTheme(themeXml);
  const formats = new Map<number, string>(Object.entries(BUILT_IN).map(([id, code]) => [Number(id), code]));
  const fonts: IStyleData[] = [];
  const fills: (IColorStyle | null)[] = [];
  const borders: IBorderData[] = [];
  const styles: (IStyleData | null)[] = [];
  let section = '';
  let edge: keyof IBorderData | null = null;
  let format: { attributes: Tag['attributes']; alignment: Tag['attributes'] | null } | null = null;

  const SECTIONS = new Set([
    'numFmts',
    'fonts',
    'fills',
    'borders',
    'cellStyleXfs',
    'cellXfs',
    'cellStyles',
    'dxfs',
  ]);
  const finish = () => {
    if (format !== null)
      styles.push(compose(format.attributes, format.alignment, { formats, fonts, fills, borders }));
    format = null;
  };

  for (const tag of tags(stylesXml)) {
    if (SECTIONS.has(tag.name)) {
      section = tag.closing ? '' : tag.name;
      continue;
    }
    const { name, attributes } = tag;
    if (section === 'numFmts' && name === 'numFmt')
      formats.set(Number(attributes.numFmtId), attributes.formatCode ?? 'General');
    else if (section === 'fonts' && !tag.closing) {
      if (name === 'font') fonts.push({});
      else readFontTag(tag, fonts[fonts.length - 1], theme);
    } else if (section === 'fills' && !tag.closing) {
      if (name === 'fill') fills.push(null);
      else if (name === 'fgColor') fills[fills.length - 1] = readColour(attributes, theme);
      else if (name === 'patternFill' && attributes.patternType === 'none') fills[fills.length - 1] = null;
    } else if (section === 'borders') {
      if (name === 'border' && !tag.closing) borders.push({});
      const side = EDGES[name];
      const border = borders[borders.length - 1];
      if (side !== undefined && border !== undefined) {
        edge = tag.closing || tag.empty ? null : side;
        const kind = BORDERS[attributes.style ?? ''];
        if (!tag.closing && kind !== undefined) border[side] = { s: kind, cl: { rgb: '#000000' } };
      } else if (name === 'color' && edge !== null && border?.[edge]) {
        border[edge]!.cl = readColour(attributes, theme) ?? { rgb: '#000000' };
      }
    } else if (section === 'cellXfs') {
      if (name === 'xf' && !tag.closing) {
        finish();
        format = { attributes, alignment: null };
        if (tag.empty) finish();
      } else if (name === 'alignment' && format !== null) format.alignment = attributes;
      else if (name === 'xf') finish();
    }
  }
  return { styles };
}

interface Tables {
  readonly formats: ReadonlyMap<number, string>;
  readonly fonts: readonly IStyleData[];
  readonly fills: readonly (IColorStyle | null)[];
  readonly borders: readonly IBorderData[];
}

function compose(
  xf: Tag['attributes'],
  alignment: Tag['attributes'] | null,
  tables: Tables,
): IStyleData | null {
  // font 0 is the workbook's plain font: its face and size are everybody's and need not stand in every cell
  const font = Number(xf.fontId ?? 0);
  const style: IStyleData = font === 0 ? {} : { ...tables.fonts[font] };
  const fill = tables.fills[Number(xf.fillId ?? 0)];
  if (fill && Number(xf.fillId) > 1) style.bg = fill;
  const border = tables.borders[Number(xf.borderId ?? 0)];
  if (border && Object.keys(border).length > 0) style.bd = border;
  const pattern = tables.formats.get(Number(xf.numFmtId ?? 0));
  if (pattern !== undefined && pattern !== 'General') style.n = { pattern };
  const horizontal = HORIZONTAL[alignment?.horizontal ?? ''];
  if (horizontal !== undefined) style.ht = horizontal;
  const vertical = VERTICAL[alignment?.vertical ?? ''];
  if (vertical !== undefined) style.vt = vertical;
  if (isTrue(alignment?.wrapText)) style.tb = WRAP;
  return Object.keys(style).length === 0 ? null : style;
}

const isTrue = (text: string | undefined) => text === '1' || text === 'true';

function readFontTag(
  { name, attributes }: Tag,
  font: IStyleData | undefined,
  theme: readonly string[],
): void {
  if (font === undefined) return;
  const on = attributes.val === undefined || isTrue(attributes.val) ? 1 : 0;
  if (name === 'b' && on) font.bl = 1;
  else if (name === 'i' && on) font.it = 1;
  else if (name === 'u' && attributes.val !== 'none') font.ul = { s: 1 };
  else if (name === 'strike' && on) font.st = { s: 1 };
  else if (name === 'sz' && Number(attributes.val) > 0) font.fs = Number(attributes.val);
  else if ((name === 'name' || name === 'rFont') && attributes.val) font.ff = attributes.val;
  else if (name === 'color') {
    const colour = readColour(attributes, theme);
    if (colour !== null && colour.rgb !== '#000000') font.cl = colour;
  }
}

/** Theme slots in the order in which cells number them: light 1, dark 1, light 2, dark 2, then the accents. */
const THEME_ORDER = [
  'lt1',
  'dk1',
  'lt2',
  'dk2',
  'accent1',
  'accent2',
  'accent3',
  'accent4',
  'accent5',
  'accent6',
  'hlink',
  'folHlink',
];

function readTheme(xml: string): string[] {
  const colours = new Map<string, string>();
  let slot = '';
  for (const { name, attributes, closing } of tags(xml)) {
    if (THEME_ORDER.includes(name)) slot = closing ? '' : name;
    else if (slot !== '' && !closing) {
      const hex = name === 'srgbClr' ? attributes.val : name === 'sysClr' ? attributes.lastClr : undefined;
      if (hex !== undefined && !colours.has(slot)) colours.set(slot, `#${hex}`);
    }
  }
  return THEME_ORDER.map((one) => colours.get(one) ?? '');
}

function readColour(attributes: Tag['attributes'], theme: readonly string[]): IColorStyle | null {
  const hex = /^[0-9a-f]{8}$/i.test(attributes.rgb ?? '') ? attributes.rgb?.slice(2) : undefined;
  const base =
    hex !== undefined
      ? `#${hex.toLowerCase()}`
      : attributes.theme === undefined
        ? ''
        : (theme[Number(attributes.theme)] ?? '');
  return base === '' ? null : { rgb: tinted(base, Number(attributes.tint ?? 0)) };
}

/** Tint as the file format defines it, on each channel: towards black below 0, towards white above. */
function tinted(colour: string, tint: number): string {
  if (!(tint >= -1 && tint <= 1) || tint === 0) return colour.toLowerCase();
  const channels = [1, 3, 5].map((at) => parseInt(colour.slice(at, at + 2), 16));
  const mixed = channels.map((one) => Math.round(tint < 0 ? one * (1 + tint) : one + (255 - one) * tint));
  return `#${mixed.map((one) => one.toString(16).padStart(2, '0')).join('')}`;
}

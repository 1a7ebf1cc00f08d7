/** Styles of the embedded spreadsheet -> `xl/styles.xml`: equal formats are written once, cells point to them by index. */
import type { IBorderData, IStyleData, Nullable } from '@univerjs/core';
import { BORDERS, HORIZONTAL, VERTICAL, WRAP } from './styles-read';
import { XML_HEAD, escapeXml } from './xml';

export interface StyleSheet {
  /** index of a style among the cell formats; 0 is the plain one */
  indexOf(style: Nullable<IStyleData>): number;
  xml(): string;
}

const FIRST_OWN_FORMAT = 164; // numbers below are the file format's own
const MAIN = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const BORDER_WORDS = invert(BORDERS);
const HORIZONTAL_WORDS = invert(HORIZONTAL);
const VERTICAL_WORDS = invert(VERTICAL);

export function createStyleSheet(): StyleSheet {
  const fonts = new Pool('<font><sz val="11"/><name val="Calibri"/><family val="2"/></font>');
  const fills = new Pool(
    '<fill><patternFill patternType="none"/></fill>',
    '<fill><patternFill patternType="gray125"/></fill>',
  );
  const borders = new Pool('<border><left/><right/><top/><bottom/><diagonal/></border>');
  const formats = new Pool();
  const cells = new Pool('<xf numFmtId="0" fontId="0" fillId="0" borderId="0" xfId="0"/>');
  const known = new Map<string, number>();

  function add(style: IStyleData): number {
    const pattern = style.n?.pattern;
    const numFmt =
      pattern === undefined || pattern === 'General' ? 0 : FIRST_OWN_FORMAT + formats.add(escapeXml(pattern));
    const font = fonts.add(fontXml(style));
    const fill = fills.add(fillXml(style));
    const border = borders.add(borderXml(style.bd));
    const alignment = alignmentXml(style);
    const applied = [
      numFmt > 0 ? ' applyNumberFormat="1"' : '',
      font > 0 ? ' applyFont="1"' : '',
      fill > 0 ? ' applyFill="1"' : '',
      border > 0 ? ' applyBorder="1"' : '',
      alignment === '' ? '' : ' applyAlignment="1"',
    ].join('');
    const head = `<xf numFmtId="${numFmt}" fontId="${font}" fillId="${fill}" borderId="${border}" xfId="0"${applied}`;
    return cells.add(alignment === '' ? `${head}/>` : `${head}>${alignment}</xf>`);
  }

  return {
    indexOf(style) {
      if (!style) return 0;
      const key = JSON.stringify(style);
      const found = known.get(key) ?? add(style);
      known.set(key, found);
      return found;
    },
    xml() {
      const own = formats.items.map(
        (code, index) => `<numFmt numFmtId="${FIRST_OWN_FORMAT + index}" formatCode="${code}"/>`,
      );
      return [
        `${XML_HEAD}<styleSheet xmlns="${MAIN}">`,
        own.length > 0 ? `<numFmts count="${own.length}">${own.join('')}</numFmts>` : '',
        fonts.xml('fonts'),
        fills.xml('fills'),
        borders.xml('borders'),
        '<cellStyleXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0"/></cellStyleXfs>',
        cells.xml('cellXfs'),
        '<cellStyles count="1"><cellStyle name="Normal" xfId="0" builtinId="0"/></cellStyles>',
        '</styleSheet>',
      ].join('');
    },
  };
}

class Pool {
  readonly items: string[];
  private readonly index = new Map<string, number>();
  constructor(...first: string[]) {
    this.items = [...first];
    first.forEach((one, at) => this.index.set(one, at));
  }
  add(item: string): number {
    const found = this.index.get(item);
    if (found !== undefined) return found;
    this.index.set(item, this.items.length);
    return this.items.push(item) - 1;
  }
  xml(name: string): string {
    return `<${name} count="${this.items.length}">${this.items.join('')}</${name}>`;
  }
}

function fontXml(style: IStyleData): string {
  const face = style.ff ?? 'Calibri';
  return [
    '<font>',
    Number(style.bl) === 1 ? '<b/>' : '',
    Number(style.it) === 1 ? '<i/>' : '',
    Number(style.st?.s) === 1 ? '<strike/>' : '',
    Number(style.ul?.s) === 1 ? '<u/>' : '',
    `<sz val="${style.fs ?? 11}"/>`,
    colourXml('color', style.cl?.rgb),
    `<name val="${escapeXml(face)}"/><family val="2"/></font>`,
  ].join('');
}

function fillXml(style: IStyleData): string {
  const colour = colourXml('fgColor', style.bg?.rgb);
  return colour === ''
    ? '<fill><patternFill patternType="none"/></fill>'
    : `<fill><patternFill patternType="solid">${colour}<bgColor indexed="64"/></patternFill></fill>`;
}

function borderXml(border: Nullable<IBorderData>): string {
  const side = (name: string, edge: IBorderData['l']) => {
    const word = edge ? BORDER_WORDS.get(edge.s) : undefined;
    return word === undefined || !edge
      ? `<${name}/>`
      : `<${name} style="${word}">${colourXml('color', edge.cl.rgb) || '<color auto="1"/>'}</${name}>`;
  };
  return `<border>${side('left', border?.l)}${side('right', border?.r)}${side('top', border?.t)}${side('bottom', border?.b)}<diagonal/></border>`;
}

function alignmentXml(style: IStyleData): string {
  const horizontal = HORIZONTAL_WORDS.get(style.ht ?? 0);
  const vertical = VERTICAL_WORDS.get(style.vt ?? 0);
  const inside = [
    horizontal === undefined ? '' : ` horizontal="${horizontal}"`,
    vertical === undefined ? '' : ` vertical="${vertical}"`,
    Number(style.tb) === WRAP ? ' wrapText="1"' : '',
  ].join('');
  return inside === '' ? '' : `<alignment${inside}/>`;
}

/** "#2c6665" or "rgb(44, 102, 101)" -> a colour element; '' for anything else. */
function colourXml(element: string, colour: Nullable<string>): string {
  const hex = /^#([0-9a-f]{6})$/i.exec(colour ?? '')?.[1];
  const channels = /^rgba?\((\d{1,3}),\s*(\d{1,3}),\s*(\d{1,3})/.exec(colour ?? '');
  const found =
    hex ??
    channels
      ?.slice(1, 4)
      .map((one) => Math.min(255, Number(one)).toString(16).padStart(2, '0'))
      .join('');
  return found === undefined ? '' : `<${element} rgb="FF${found.toUpperCase()}"/>`;
}

function invert(words: Readonly<Record<string, number>>): Map<number, string> {
  return new Map(Object.entries(words).map(([word, number]) => [number, word]));
}

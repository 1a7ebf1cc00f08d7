/** As much XML as the parts of a workbook need: tags with attributes in document order, entities, escaping. No entity is ever defined. */

export interface Tag {
  /** local name, without a namespace prefix */
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly closing: boolean;
  readonly empty: boolean;
  /** text between this tag and the next */
  readonly text: string;
}

const TAG = /<(\/?)(?:[\w.-]+:)?([\w.-]+)((?:\s+[\w:.-]+\s*=\s*(?:"[^"]*"|'[^']*'))*)\s*(\/?)>([^<]*)/g;
const ATTRIBUTE = /(?:[\w.-]+:)?([\w.-]+)\s*=\s*(?:"([^"]*)"|'([^']*)')/g;

export function* tags(xml: string): Generator<Tag> {
  for (const [, slash, name, inside, empty, text] of xml.matchAll(TAG))
    yield {
      name: name ?? '',
      attributes: attributesOf(inside ?? ''),
      closing: slash === '/',
      empty: empty === '/',
      text: text ?? '',
    };
}

function attributesOf(inside: string): Record<string, string> {
  const found: Record<string, string> = Object.create(null) as Record<string, string>;
  for (const [, name, double, single] of inside.matchAll(ATTRIBUTE))
    found[name ?? ''] = unescapeXml(double ?? single ?? '');
  return found;
}

const ENTITIES: Readonly<Record<string, string>> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" };

export function unescapeXml(text: string): string {
  if (!text.includes('&')) return text;
  return text.replace(
    /&(?:#x([0-9a-f]{1,6})|#(\d{1,7})|(\w+));/gi,
    (whole, hex?: string, decimal?: string, name?: string) => {
      if (name !== undefined) return ENTITIES[name] ?? whole;
      const code = hex === undefined ? Number(decimal) : parseInt(hex, 16);
      return code <= 0x10ffff ? String.fromCodePoint(code) : whole;
    },
  );
}

/** Escapes text for XML and drops what XML 1.0 cannot hold (control characters other than tab and line breaks). */
export function escapeXml(text: string): string {
  return (
    text
      // eslint-disable-next-line no-control-regex -- these are exactly the characters XML 1.0 forbids
      .replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g, '')
      .replace(/&/g, '&amp;')
      .replace(/</g, '&lt;')
      .replace(/>/g, '&gt;')
      .replace(/"/g, '&quot;')
  );
}

export const decode = (bytes: Uint8Array | undefined): string =>
  bytes === undefined ? '' : new TextDecoder().decode(bytes);
export const encode = (text: string): Uint8Array => new TextEncoder().encode(text);
export const XML_HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';

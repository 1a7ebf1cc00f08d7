/**
 * The zip container of an .xlsx file, read with limits: the sizes an entry declares are not believed, inflation stops at the limit.
 * Inflation and deflation are the platform's own (browser and Node alike).
 */

export interface ZipLimits {
  /** bytes of the file itself */
  readonly file: number;
  /** bytes of all parts together, after inflation */
  readonly inflated: number;
  readonly entries: number;
}

/** Wide enough for a workbook of a few hundred thousand cells, narrow enough for a browser tab. */
export const LIMITS: ZipLimits = { file: 30_000_000, inflated: 250_000_000, entries: 3_000 };

/** A file that is refused, with the reason in words. */
export class FileProblem extends Error {}

const END = 0x06054b50;
const CENTRAL = 0x02014b50;
const LOCAL = 0x04034b50;
const END_SIZE = 22;
const LONGEST_COMMENT = 65_535;
const STORED = 0;
const DEFLATED = 8;

interface Entry {
  readonly name: string;
  readonly method: number;
  readonly compressed: number;
  readonly offset: number;
}

const megabytes = (bytes: number) => `${Math.round(bytes / 1e6)} MB`;

/** Reads every part of a zip file whose name passes `wanted`, by name. */
export async function unzip(
  bytes: Uint8Array,
  wanted: (name: string) => boolean = () => true,
  limits: ZipLimits = LIMITS,
): Promise<Map<string, Uint8Array>> {
  if (bytes.length > limits.file)
    throw new FileProblem(`it is larger than ${megabytes(limits.file)} (${megabytes(bytes.length)}).`);
  const parts = new Map<string, Uint8Array>();
  let left = limits.inflated;
  for (const entry of readDirectory(bytes, limits)) {
    if (entry.name.endsWith('/') || !wanted(entry.name)) continue;
    const part = await readEntry(bytes, entry, left);
    left -= part.length;
    parts.set(entry.name, part);
  }
  return parts;
}

/** The names of all parts, without inflating anything. */
export function zipNames(bytes: Uint8Array, limits: ZipLimits = LIMITS): string[] {
  return readDirectory(bytes, limits).map(({ name }) => name);
}

function readDirectory(bytes: Uint8Array, limits: ZipLimits): Entry[] {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  let end = bytes.length - END_SIZE;
  const stop = Math.max(0, end - LONGEST_COMMENT);
  while (end >= stop && view.getUint32(end, true) !== END) end -= 1;
  if (end < stop || end < 0)
    throw new FileProblem('it is not an .xlsx file, or its end is missing (an .xlsx file is a zip archive).');
  const count = view.getUint16(end + 10, true);
  if (count > limits.entries)
    throw new FileProblem(`it has ${count} parts; at most ${limits.entries} are read.`);
  const entries: Entry[] = [];
  const text = new TextDecoder();
  let at = view.getUint32(end + 16, true);
  for (let index = 0; index < count; index++) {
    if (at + 46 > bytes.length || view.getUint32(at, true) !== CENTRAL)
      throw new FileProblem('its table of contents is damaged.');
    const nameLength = view.getUint16(at + 28, true);
    const name = text.decode(bytes.subarray(at + 46, at + 46 + nameLength)).replace(/^\//, '');
    const flags = view.getUint16(at + 8, true);
    if ((flags & 1) !== 0) throw new FileProblem('it is encrypted.');
    entries.push({
      name,
      method: view.getUint16(at + 10, true),
      compressed: view.getUint32(at + 20, true),
      offset: view.getUint32(at + 42, true),
    });
    at += 46 + nameLength + view.getUint16(at + 30, true) + view.getUint16(at + 32, true);
  }
  return entries;
}

async function readEntry(bytes: Uint8Array, entry: Entry, left: number): Promise<Uint8Array> {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (entry.offset + 30 > bytes.length || view.getUint32(entry.offset, true) !== LOCAL)
    throw new FileProblem(`its part ${entry.name} is missing or damaged.`);
  const start =
    entry.offset + 30 + view.getUint16(entry.offset + 26, true) + view.getUint16(entry.offset + 28, true);
  const packed = bytes.subarray(start, start + entry.compressed);
  if (packed.length < entry.compressed) throw new FileProblem(`it is cut short in its part ${entry.name}.`);
  if (entry.method === STORED) {
    if (packed.length > left) throw new FileProblem(TOO_LARGE);
    return packed;
  }
  if (entry.method !== DEFLATED) throw new FileProblem(`its part ${entry.name} is packed in an unknown way.`);
  return inflate(packed, left, entry.name);
}

const TOO_LARGE = `it would unpack to more than ${megabytes(LIMITS.inflated)}.`;

async function inflate(packed: Uint8Array, most: number, name: string): Promise<Uint8Array> {
  const reader = streamOf(packed).pipeThrough(new DecompressionStream('deflate-raw')).getReader();
  const chunks: Uint8Array[] = [];
  let size = 0;
  try {
    for (;;) {
      const { done, value } = await reader.read();
      if (done) break;
      size += value.length;
      if (size > most) throw new FileProblem(TOO_LARGE);
      chunks.push(value);
    }
  } catch (error) {
    await reader.cancel().catch(() => undefined);
    throw error instanceof FileProblem ? error : new FileProblem(`its part ${name} is damaged.`);
  }
  return join(chunks, size);
}

/** Hands bytes over in slices: a small bomb must not inflate in one gulp. */
function streamOf(bytes: Uint8Array): ReadableStream<Uint8Array<ArrayBuffer>> {
  const SLICE = 16_384;
  let at = 0;
  return new ReadableStream({
    pull(controller) {
      if (at >= bytes.length) controller.close();
      else controller.enqueue(new Uint8Array(bytes.subarray(at, (at += SLICE))));
    },
  });
}

function join(chunks: readonly Uint8Array[], size: number): Uint8Array {
  const whole = new Uint8Array(size);
  let at = 0;
  for (const chunk of chunks) {
    whole.set(chunk, at);
    at += chunk.length;
  }
  return whole;
}

/** Packs parts into a zip file, in their order. `deflate: false` only stores them. */
export async function zip(
  parts: ReadonlyMap<string, Uint8Array>,
  options: { deflate?: boolean } = {},
): Promise<Uint8Array<ArrayBuffer>> {
  const files: Uint8Array[] = [];
  const directory: Uint8Array[] = [];
  let offset = 0;
  for (const [name, part] of parts) {
    const packed = options.deflate === false ? part : await deflate(part);
    const header = entryHeader(name, part, packed.length, options.deflate === false ? STORED : DEFLATED);
    const local = join([word(LOCAL), header, new TextEncoder().encode(name)], 4 + 26 + byteLength(name));
    directory.push(
      join(
        [word(CENTRAL), half(20), header, zeros(10), word(offset), new TextEncoder().encode(name)],
        4 + 2 + 26 + 10 + 4 + byteLength(name),
      ),
    );
    files.push(local, packed);
    offset += local.length + packed.length;
  }
  const size = directory.reduce((sum, one) => sum + one.length, 0);
  const count = half(parts.size);
  const end = join([word(END), zeros(4), count, count, word(size), word(offset), zeros(2)], END_SIZE);
  const all = [...files, ...directory, end];
  return join(all, offset + size + END_SIZE) as Uint8Array<ArrayBuffer>;
}

/** The 26 bytes that a local header and a directory entry share. Dates are fixed, so that equal content gives equal files. */
function entryHeader(name: string, part: Uint8Array, packed: number, method: number): Uint8Array {
  const DATE = 0x5c21; // 2026-01-01, the format's own bit fields
  const NAMES_IN_UTF8 = 0x0800;
  return join(
    [
      half(20),
      half(NAMES_IN_UTF8),
      half(method),
      half(0),
      half(DATE),
      word(crc32(part)),
      word(packed),
      word(part.length),
      half(byteLength(name)),
      half(0),
    ],
    26,
  );
}

async function deflate(part: Uint8Array): Promise<Uint8Array> {
  const packed = await new Response(
    streamOf(part).pipeThrough(new CompressionStream('deflate-raw')),
  ).arrayBuffer();
  return new Uint8Array(packed);
}

const byteLength = (text: string) => new TextEncoder().encode(text).length;
const zeros = (count: number) => new Uint8Array(count);
const half = (value: number) => new Uint8Array([value & 255, (value >> 8) & 255]);
const word = (value: number) =>
  new Uint8Array([value & 255, (value >>> 8) & 255, (value >>> 16) & 255, (value >>> 24) & 255]);

const CRC_TABLE = Uint32Array.from({ length: 256 }, (_, index) => {
  let value = index;
  for (let bit = 0; bit < 8; bit++) value = (value & 1) === 1 ? (value >>> 1) ^ 0xedb88320 : value >>> 1;
  return value;
});

function crc32(bytes: Uint8Array): number {
  let crc = 0xffffffff;
  for (const byte of bytes) crc = (crc >>> 8) ^ (CRC_TABLE[(crc ^ byte) & 255] ?? 0);
  return (crc ^ 0xffffffff) >>> 0;
}

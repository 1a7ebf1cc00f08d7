/**
 * A memo keyed by the content of cell ranges.
 *
 * A host hands every call fresh arrays, so identity says nothing: the key is the content. A look-up hashes the cells
 * (numbers by their 64 bits, strings by their char codes), then verifies the hit cell by cell, so a collision costs
 * time and never an answer. Both passes read each cell once and allocate nothing.
 * Bounded by entries and by bytes; when either is exceeded, the quarter used longest ago goes.
 * A hit only stamps the entry, so ageing costs nothing on the warm path.
 */

const numberView = new Float64Array(1);
const bitView = new Uint32Array(numberView.buffer);
/** FNV-1a's prime; any odd multiplier with spread bits serves, because hits are verified. */
const PRIME = 0x01000193;
const SEED = 0x811c9dc5 | 0;
const NULL_TAG = 0x5bd1e995;

function mix(hash: number, bits: number): number {
  const mixed = Math.imul(hash ^ bits, PRIME);
  return mixed ^ (mixed >>> 15);
}

function hashText(hash: number, text: string): number {
  let h = hash ^ text.length;
  for (let i = 0; i < text.length; i++) h = Math.imul(h ^ text.charCodeAt(i), PRIME);
  return h ^ (h >>> 15);
}

function hashCell(hash: number, cell: unknown): number {
  if (typeof cell === 'number') {
    // small integers are most of what a table holds, and their low word is always zero: hash them by value
    if ((cell | 0) === cell) return mix(hash, cell | 0);
    numberView[0] = cell;
    return mix(mix(hash, bitView[0] as number), bitView[1] as number);
  }
  if (typeof cell === 'string') return hashText(hash, cell);
  if (typeof cell === 'boolean') return mix(hash, cell ? 3 : 5);
  if (cell === null || cell === undefined) return mix(hash, NULL_TAG);
  // a rich cell: its basic value speaks for it, and `sameCell` decides
  return hashCell(mix(hash, 7), (cell as { basicValue?: unknown }).basicValue ?? null);
}

/** Hash of a scalar or a range (rows of cells), chained onto `hash`. */
export function hashRange(range: unknown, hash: number = SEED): number {
  if (!Array.isArray(range)) return hashCell(hash, range);
  let h = mix(hash, range.length);
  for (let i = 0; i < range.length; i++) {
    const row: unknown = range[i];
    if (!Array.isArray(row)) {
      h = hashCell(h, row);
      continue;
    }
    h = mix(h, row.length);
    for (let j = 0; j < row.length; j++) h = hashCell(h, row[j]);
  }
  return h;
}

function sameCell(a: unknown, b: unknown): boolean {
  if (a === b) return true;
  if (typeof a === 'number') return typeof b === 'number' && a !== a && b !== b; // NaN is content too
  if (a === null || b === null || typeof a !== 'object' || typeof b !== 'object') return false;
  const left = Object.entries(a);
  if (left.length !== Object.keys(b).length) return false;
  return left.every(([key, value]) => sameCell(value, (b as Record<string, unknown>)[key]));
}

/** Same shape and same cells. */
export function sameRange(a: unknown, b: unknown): boolean {
  if (!Array.isArray(a) || !Array.isArray(b)) return sameCell(a, b);
  if (a.length !== b.length) return false;
  for (let i = 0; i < a.length; i++) {
    const left: unknown = a[i];
    const right: unknown = b[i];
    if (!Array.isArray(left) || !Array.isArray(right)) {
      if (!sameCell(left, right)) return false;
      continue;
    }
    if (left.length !== right.length) return false;
    for (let j = 0; j < left.length; j++) {
      if (left[j] !== right[j] && !sameCell(left[j], right[j])) return false;
    }
  }
  return true;
}

/** A copy that later changes of the caller's arrays cannot reach. */
export function copyRange(range: unknown): unknown {
  if (!Array.isArray(range)) return copyCell(range);
  return range.map((row: unknown) => (Array.isArray(row) ? row.map(copyCell) : copyCell(row)));
}

function copyCell(cell: unknown): unknown {
  return typeof cell === 'object' && cell !== null ? (JSON.parse(JSON.stringify(cell)) as unknown) : cell;
}

/** Rough size of a range: a boxed slot per cell, two bytes per character, an array header per row. */
export function rangeBytes(range: unknown): number {
  if (typeof range === 'string') return 32 + 2 * range.length;
  if (!Array.isArray(range)) return 32;
  let bytes = 32;
  for (const row of range as unknown[]) bytes += Array.isArray(row) ? rangeBytes(row) : cellBytes(row);
  return bytes;
}

function cellBytes(cell: unknown): number {
  return typeof cell === 'string' ? 32 + 2 * cell.length : 16;
}

interface Entry<V> {
  readonly hash: number;
  readonly keys: readonly unknown[];
  readonly value: V;
  bytes: number;
  used: number;
}

export class ContentMemo<V> {
  private readonly buckets = new Map<number, Entry<V>[]>();
  private entries = 0;
  private bytes = 0;
  private clock = 0;

  /** `maxEntries` and `maxBytes`: the bounds; keys are one or more ranges or scalars. */
  constructor(
    private readonly maxEntries: number,
    private readonly maxBytes: number,
  ) {}

  /** The value kept for one key, or undefined. */
  find(hash: number, key: unknown): V | undefined {
    const bucket = this.buckets.get(hash);
    if (bucket === undefined) return undefined;
    for (const entry of bucket) {
      if (sameRange(entry.keys[0], key)) {
        entry.used = ++this.clock;
        return entry.value;
      }
    }
    return undefined;
  }

  /** The value kept for a key of three parts (kept apart from `find`: no array is made on the warm path). */
  find3(hash: number, a: unknown, b: unknown, c: unknown): V | undefined {
    const bucket = this.buckets.get(hash);
    if (bucket === undefined) return undefined;
    for (const entry of bucket) {
      if (entry.keys[0] === a && sameRange(entry.keys[1], b) && sameRange(entry.keys[2], c)) {
        entry.used = ++this.clock;
        return entry.value;
      }
    }
    return undefined;
  }

  /** Keeps a value; `bytes` is the caller's estimate of key and value together. Keys must already be copies. */
  keep(hash: number, keys: readonly unknown[], value: V, bytes: number): V {
    const entry: Entry<V> = { hash, keys, value, bytes, used: ++this.clock };
    const bucket = this.buckets.get(hash);
    if (bucket === undefined) this.buckets.set(hash, [entry]);
    else bucket.push(entry);
    this.entries++;
    this.bytes += bytes;
    if (this.entries > this.maxEntries || this.bytes > this.maxBytes) this.evict(entry);
    return value;
  }

  /** Entries and estimated bytes held now. */
  size(): { entries: number; bytes: number } {
    return { entries: this.entries, bytes: this.bytes };
  }

  clear(): void {
    this.buckets.clear();
    this.entries = 0;
    this.bytes = 0;
  }

  /** Drops the longest unused until both bounds hold with a quarter to spare; the entry just made always stays. */
  private evict(newest: Entry<V>): void {
    const all: Entry<V>[] = [];
    for (const bucket of this.buckets.values()) all.push(...bucket);
    all.sort((a, b) => a.used - b.used);
    for (const entry of all) {
      if (this.entries <= 0.75 * this.maxEntries && this.bytes <= 0.75 * this.maxBytes) return;
      if (entry !== newest) this.drop(entry);
    }
  }

  private drop(entry: Entry<V>): void {
    const bucket = this.buckets.get(entry.hash);
    if (bucket === undefined) return;
    const rest = bucket.filter((other) => other !== entry);
    if (rest.length === 0) this.buckets.delete(entry.hash);
    else this.buckets.set(entry.hash, rest);
    this.entries--;
    this.bytes -= entry.bytes;
  }
}

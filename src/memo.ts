/**
 * A memo keyed by the content of cell ranges.
 *
 * A host hands every call fresh arrays, so identity says nothing: the key is the content. A look-up hashes the cells
 * (numbers by their 64 bits, strings by their char codes), then verifies the hit cell by cell, so a collision costs
 * time and never an answer. Both passes read each cell once and allocate nothing.
 * Bounded by entries and by bytes; what was used longest ago goes first (see ContentMemo).
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
  readonly keys: readonly unknown[];
  readonly value: V;
  readonly bytes: number;
}

/** Entries made or used in one stretch of time. */
class Generation<V> {
  readonly buckets = new Map<number, Entry<V>[]>();
  entries = 0;
  bytes = 0;

  add(hash: number, entry: Entry<V>): void {
    const bucket = this.buckets.get(hash);
    if (bucket === undefined) this.buckets.set(hash, [entry]);
    else bucket.push(entry);
    this.entries++;
    this.bytes += entry.bytes;
  }

  remove(hash: number, entry: Entry<V>): void {
    const bucket = this.buckets.get(hash)!;
    bucket.splice(bucket.indexOf(entry), 1);
    this.entries--;
    this.bytes -= entry.bytes;
  }
}

/**
 * Two generations, each bounded by half of the bounds. What is made or used goes into the young one; when that is full it becomes the
 * old one, and what stood in the old one, unused since, is dropped as a whole: no sorting, and no deleting one by one, which would
 * leave the garbage collector chains of half-dead tables to follow.
 */
export class ContentMemo<V> {
  private young = new Generation<V>();
  private old = new Generation<V>();

  /** `maxEntries` and `maxBytes`: the bounds; keys are one or more ranges or scalars. */
  constructor(
    private readonly maxEntries: number,
    private readonly maxBytes: number,
  ) {}

  /** The value kept for one key, or undefined. */
  find(hash: number, key: unknown): V | undefined {
    for (let age = 0; age < 2; age++) {
      const bucket = (age === 0 ? this.young : this.old).buckets.get(hash);
      if (bucket === undefined) continue;
      for (const entry of bucket) {
        if (sameRange(entry.keys[0], key)) return age === 0 ? entry.value : this.renew(hash, entry);
      }
    }
    return undefined;
  }

  /** The value kept for a key of three parts (kept apart from `find`: no array is made on the warm path). */
  find3(hash: number, a: unknown, b: unknown, c: unknown): V | undefined {
    for (let age = 0; age < 2; age++) {
      const bucket = (age === 0 ? this.young : this.old).buckets.get(hash);
      if (bucket === undefined) continue;
      for (const entry of bucket) {
        if (entry.keys[0] === a && sameRange(entry.keys[1], b) && sameRange(entry.keys[2], c)) {
          return age === 0 ? entry.value : this.renew(hash, entry);
        }
      }
    }
    return undefined;
  }

  /** Keeps a value; `bytes` is the caller's estimate of key and value together. Keys must already be copies. */
  keep(hash: number, keys: readonly unknown[], value: V, bytes: number): V {
    this.put(hash, { keys, value, bytes });
    return value;
  }

  /** Entries and estimated bytes held now. */
  size(): { entries: number; bytes: number } {
    return { entries: this.young.entries + this.old.entries, bytes: this.young.bytes + this.old.bytes };
  }

  clear(): void {
    this.young = new Generation();
    this.old = new Generation();
  }

  private renew(hash: number, entry: Entry<V>): V {
    this.old.remove(hash, entry);
    this.put(hash, entry);
    return entry.value;
  }

  private put(hash: number, entry: Entry<V>): void {
    const { young } = this;
    const full =
      young.entries >= Math.max(1, this.maxEntries >> 1) || young.bytes + entry.bytes > 0.5 * this.maxBytes;
    if (full && young.entries > 0) {
      this.old = young;
      this.young = new Generation();
    }
    this.young.add(hash, entry);
    // one entry larger than half the bound leaves no room for the old ones; it is kept itself until the next
    if (this.size().bytes > this.maxBytes) this.old = new Generation();
  }
}

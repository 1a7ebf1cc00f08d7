/**
 * Banded linear systems: Gaussian elimination with row interchanges inside the band.
 *
 * Rows are first scaled by powers of two to comparable size (no rounding), which is what makes "the largest pivot" mean something when
 * rows are conditions of different kind. Cost and memory grow linearly with the number of unknowns.
 * Golub & Van Loan, Matrix Computations, 4th ed., section 4.3.5 (band Gaussian elimination with partial pivoting); 3.5.3 for the
 * refinement step, which brings the answer to the accuracy of the data even when the elimination lost some digits.
 */

/** Workspace kept between systems: they are solved one after the other, and making large arrays costs more than the elimination. */
let workspace = new Float64Array(0);
/** A beam of ten thousand spans (16 MB); larger workspaces are let go. */
const KEEP = 1 << 21;

function take(size: number): Float64Array {
  if (workspace.length >= size) {
    const part = workspace.subarray(0, size);
    part.fill(0);
    return part;
  }
  const fresh = new Float64Array(size);
  if (size <= KEEP) workspace = fresh;
  return fresh;
}

let last: BandMatrix | null = null;

/** One system at a time: asking for a second BandMatrix ends the life of the first. */
export class BandMatrix {
  /** A matrix of zeros; the members of a schedule have one shape, so the last one is used again when it fits. */
  static zeros(n: number, kl: number, ku: number, columns = 1): BandMatrix {
    if (last && last.n === n && last.kl === kl && last.ku === ku && last.b.length === n * columns) {
      last.a.fill(0);
      last.b.fill(0);
      return last;
    }
    const made = new BandMatrix(n, kl, ku, columns);
    last = made.kept ? made : null;
    return made;
  }

  readonly n: number;
  readonly kl: number;
  readonly ku: number;
  private readonly width: number;
  /** row r holds columns r-kl .. r+ku (+kl of fill-in) */
  private readonly a: Float64Array;
  private readonly original: Float64Array;
  private readonly rowScale: Float64Array;
  private readonly pivotRow: Float64Array;
  private readonly lower: Float64Array;
  private readonly rhs: Float64Array;
  private readonly residual: Float64Array;
  private readonly x: Float64Array;
  private readonly kept: boolean;
  /** right-hand sides, one after the other, in unscaled rows; `solve` puts the solution in their place */
  readonly b: Float64Array;

  private constructor(n: number, kl: number, ku: number, columns: number) {
    this.n = n;
    this.kl = kl;
    this.ku = ku;
    this.width = kl + ku + 1 + kl;
    const size = n * this.width;
    const total = 2 * size + n * (kl + 5 + columns);
    this.kept = total <= KEEP;
    const all = take(total);
    let at = 0;
    const part = (length: number): Float64Array => all.subarray(at, (at += length));
    this.a = part(size);
    this.original = part(size);
    this.lower = part(n * kl);
    this.rowScale = part(n);
    this.pivotRow = part(n);
    this.rhs = part(n);
    this.residual = part(n);
    this.x = part(n);
    this.b = part(n * columns);
  }

  set(row: number, column: number, value: number): void {
    this.a[row * this.width + column - row + this.kl] = value;
  }

  /** Eliminates; returns the smallest pivot relative to its scaled row (0 = singular). */
  factor(): number {
    const { n, kl, ku, width, a, lower, rowScale, pivotRow } = this;
    for (let r = 0; r < n; r++) {
      let largest = 0;
      const base = r * width;
      for (let k = 0; k < width; k++) largest = Math.max(largest, Math.abs(a[base + k]!));
      if (!(largest > 0) || !Number.isFinite(largest)) return 0;
      // most rows need none: within a factor of four of 1 the choice of pivots is as good
      const scale = largest >= 0.25 && largest <= 4 ? 1 : 2 ** -Math.round(Math.log2(largest));
      rowScale[r] = scale;
      if (scale !== 1) for (let k = 0; k < width; k++) a[base + k]! *= scale;
    }
    this.original.set(a);
    let smallest = Infinity;
    for (let c = 0; c < n; c++) {
      const last = Math.min(n - 1, c + kl);
      let pivot = c;
      let best = Math.abs(a[c * width + kl]!);
      for (let r = c + 1; r <= last; r++) {
        const value = Math.abs(a[r * width + c - r + kl]!);
        if (value > best) {
          best = value;
          pivot = r;
        }
      }
      pivotRow[c] = pivot;
      if (!(best > 0)) return 0;
      if (best < smallest) smallest = best;
      const span = Math.min(n - 1, c + ku + kl);
      const cBase = c * width - c + kl;
      if (pivot !== c) {
        const pBase = pivot * width - pivot + kl;
        for (let k = c; k <= span; k++) {
          const t = a[cBase + k]!;
          a[cBase + k] = a[pBase + k]!;
          a[pBase + k] = t;
        }
      }
      const inverse = 1 / a[cBase + c]!;
      for (let r = c + 1; r <= last; r++) {
        const rBase = r * width - r + kl;
        const factor = a[rBase + c]! * inverse;
        lower[c * kl + r - c - 1] = factor;
        if (factor !== 0) {
          a[rBase + c] = 0;
          for (let k = c + 1; k <= span; k++) a[rBase + k]! -= factor * a[cBase + k]!;
        }
      }
    }
    return smallest;
  }

  /**
   * Solves for right-hand side `column`, with one step of refinement; the solution takes its place in `b`.
   * Returns the largest residual before that step, relative to the largest row of terms.
   */
  solve(column: number): number {
    const { n, kl, ku, width, rowScale, original, rhs, residual, x, b } = this;
    const at = column * n;
    for (let r = 0; r < n; r++) x[r] = rhs[r] = b[at + r]! * rowScale[r]!;
    this.substitute(x);
    let worst = 0;
    let scale = 0;
    for (let r = 0; r < n; r++) {
      let sum = rhs[r]!;
      let size = Math.abs(sum);
      const base = r * width - r + kl;
      const last = Math.min(n - 1, r + ku);
      for (let c = Math.max(0, r - kl); c <= last; c++) {
        const term = original[base + c]! * x[c]!;
        sum -= term;
        size += Math.abs(term);
      }
      residual[r] = sum;
      if (Math.abs(sum) > worst) worst = Math.abs(sum);
      if (size > scale) scale = size;
    }
    this.substitute(residual);
    for (let r = 0; r < n; r++) x[r]! += residual[r]!;
    for (let r = 0; r < n; r++) b[at + r] = x[r]!;
    return scale > 0 ? worst / scale : 0;
  }

  private substitute(x: Float64Array): void {
    const { n, kl, ku, width, a, lower, pivotRow } = this;
    for (let c = 0; c < n; c++) {
      const p = pivotRow[c]!;
      const t = x[p]!;
      if (p !== c) {
        x[p] = x[c]!;
        x[c] = t;
      }
      if (t !== 0) {
        const last = Math.min(n - 1, c + kl);
        for (let r = c + 1; r <= last; r++) x[r]! -= lower[c * kl + r - c - 1]! * t;
      }
    }
    for (let r = n - 1; r >= 0; r--) {
      const base = r * width - r + kl;
      let sum = x[r]!;
      const last = Math.min(n - 1, r + ku + kl);
      for (let c = r + 1; c <= last; c++) sum -= a[base + c]! * x[c]!;
      x[r] = sum / a[base + r]!;
    }
  }
}

/**
 * Timing for the benches: warmed, repeated, reported as median and spread, compared as ratios inside one run. Times are CPU time of
 * this process, so that a busy machine disturbs them less; results are summed and the sum is looked at, so that no work is optimised away.
 */
export interface Timing {
  /** microseconds per call */
  readonly median: number;
  /** half the distance between the quartiles, relative to the median */
  readonly spread: number;
}

const WARM_MILLISECONDS = 1500;

export function measure(f: () => number, minimumMilliseconds = 40, repeats = 9): Timing {
  // find a batch that takes long enough to be read off the clock
  let batch = 1;
  for (;;) {
    const spent = run(f, batch);
    if (spent >= minimumMilliseconds * 1000 || batch > 1e7) break;
    batch = Math.max(
      batch + 1,
      Math.ceil(batch * Math.min(10, (minimumMilliseconds * 1200) / Math.max(spent, 50))),
    );
  }
  // warm up: the compiler works beside the program and is late on a busy machine, so for a fixed while, not a number of calls
  const until = process.hrtime.bigint() + BigInt(WARM_MILLISECONDS) * 1_000_000n;
  let each = run(f, batch) / batch;
  while (process.hrtime.bigint() < until) each = run(f, batch) / batch;
  batch = Math.max(batch, Math.ceil((minimumMilliseconds * 1000) / Math.max(each, 0.001)));
  const times: number[] = [];
  for (let i = 0; i < repeats; i++) times.push(run(f, batch) / batch);
  times.sort((a, b) => a - b);
  const at = (q: number): number => times[Math.min(times.length - 1, Math.floor(q * times.length))]!;
  return { median: at(0.5), spread: (at(0.75) - at(0.25)) / 2 / at(0.5) };
}

/** microseconds of CPU time for `batch` calls */
function run(f: () => number, batch: number): number {
  const before = process.cpuUsage();
  let sum = 0;
  for (let i = 0; i < batch; i++) sum += f();
  const spent = process.cpuUsage(before);
  // asks for the sum, so that no work is optimised away
  if (!Number.isFinite(sum)) throw new Error('a measured result is not finite');
  return spent.user + spent.system;
}

export function show(name: string, timing: Timing, note = ''): void {
  const us = timing.median < 1 ? timing.median.toFixed(3) : timing.median.toFixed(1);
  console.log(`  ${name.padEnd(64)} ${us.padStart(10)} us  +-${(100 * timing.spread).toFixed(0)} %  ${note}`);
}

/** A ratio against the target of the issue; `atLeast` or `atMost`. */
export function ratio(name: string, value: number, target: { atLeast?: number; atMost?: number }): void {
  const met =
    (target.atLeast === undefined || value >= target.atLeast) &&
    (target.atMost === undefined || value <= target.atMost);
  const wanted =
    target.atLeast !== undefined ? `at least ${target.atLeast}` : `at most ${target.atMost ?? Infinity}`;
  console.log(`  -> ${name}: ${value.toPrecision(3)} (${wanted}) ${met ? 'met' : 'NOT MET'}`);
}

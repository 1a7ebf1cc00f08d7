/**
 * The engine against an independent solution in extended precision (tests/helpers/oracle.ts): worst error relative to each quantity's
 * peak, on seeded random beams with all items mixed and on the hard set, group by group.
 */
import { compare } from '../tests/helpers/oracle-compare';
import { hardSet, randomBeam } from '../tests/helpers/random';

const BEAMS = Number(process.env.BEAMS ?? 40);
const COMBINATIONS: readonly (readonly number[] | null)[] = [null, [1, 0.3, 0], [1.35, 1.5, -0.9]];

export function bench(): void {
  console.log('accuracy: worst error relative to the peak of each quantity');
  let worst = 0;
  let solved = 0;
  for (let seed = 1; seed <= BEAMS; seed++) {
    const result = compare(randomBeam(seed), COMBINATIONS[seed % 3]);
    if (result.verdict !== 'both solve') continue;
    solved++;
    worst = Math.max(worst, result.worst);
  }
  line(`${solved} random beams, all items mixed`, worst, 1e-11);
  const groups = new Map<string, number>();
  for (const { group, model } of hardSet()) {
    groups.set(group, Math.max(groups.get(group) ?? 0, compare(model).worst));
  }
  for (const [group, error] of groups) line(`hard: ${group}`, error, 1e-8);
}

function line(name: string, error: number, bound: number): void {
  console.log(
    `  ${name.padEnd(64)} ${error.toExponential(1)} (at most ${bound}) ${error <= bound ? 'met' : 'NOT MET'}`,
  );
}

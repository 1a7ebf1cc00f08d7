/** A compiled table: every row read, waiting only for the numbers of its names. */
import type { Combination, Limit } from '../beam/model';
import type { Issue } from '../issue';
import type { Scalar } from './scalar';
import type { UnitSystem } from './system';
import type { Unit } from './units';
import type { ItemName } from './words';

/** One row that stands on the beam or acts on it. */
export interface Placed {
  readonly row: number;
  readonly item: ItemName;
  /** index into Plan.places of At and To; -1: none, or the whole beam */
  readonly from: number;
  readonly to: number;
  readonly value: Scalar | null;
  readonly end: Scalar | null;
  /** index into Plan.cases, -1 = acts always */
  readonly case: number;
  /** must be greater than 0 */
  readonly positive: boolean;
  /** -1 where `axis up` turns the number over */
  readonly sign: 1 | -1;
}

export interface PlannedLimit {
  readonly row: number;
  /** the number, or the divisor of span/... */
  readonly scalar: Scalar;
  readonly kind: Limit['kind'];
  readonly text: string;
  readonly combination: Combination | null;
}

export interface Plan {
  readonly system: UnitSystem | null;
  readonly axis: 1 | -1;
  readonly unitsRow: number | null;
  readonly axisRow: number | null;
  readonly cases: readonly string[];
  /** names in the order of their slots (slot 0 is x) */
  readonly names: readonly string[];
  /** where each name is first used */
  readonly uses: ReadonlyMap<string, { readonly row: number; readonly column: string }>;
  readonly places: readonly Scalar[];
  readonly placed: readonly Placed[];
  readonly limits: readonly PlannedLimit[];
  readonly secondMoment: Unit | null;
  /** cautions that reading the table gave */
  readonly cautions: readonly Issue[];
}

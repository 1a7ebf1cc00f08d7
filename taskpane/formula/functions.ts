/** The worksheet functions and the order of their parameters, as far as the pane reads and composes them. */

export type Parameter =
  | 'beam'
  | 'x'
  | 'combination'
  | 'names'
  | 'values'
  | 'quantity'
  | 'sense'
  | 'give'
  | 'at'
  | 'part'
  | 'points'
  | 'limit'
  | 'combinations'
  | 'pattern'
  | 'axles';

const LAST = ['combination', 'names', 'values'] as const;
const AT_X: readonly Parameter[] = ['beam', 'x', ...LAST];
const WITH_LIMIT: readonly Parameter[] = ['beam', 'limit', ...LAST];

/** Keys without the namespace, in capitals. */
export const FUNCTIONS: Readonly<Record<string, readonly Parameter[]>> = {
  DEFLECTION: AT_X,
  SLOPE: AT_X,
  MOMENT: AT_X,
  SHEAR: AT_X,
  MAXDEFLECTION: ['beam', ...LAST],
  PEAK: ['beam', 'quantity', 'sense', 'give', ...LAST],
  REACTION: ['beam', 'at', 'part', ...LAST],
  REACTIONS: ['beam', ...LAST],
  PROFILE: ['beam', 'points', ...LAST],
  REGIONS: ['beam', ...LAST],
  CHECK: WITH_LIMIT,
  USED: WITH_LIMIT,
  REQUIREDI: WITH_LIMIT,
  STIFFNESSFACTOR: WITH_LIMIT,
  ENVELOPE: ['beam', 'quantity', 'combinations', 'pattern', 'points', 'names', 'values'],
  INFLUENCE: ['beam', 'quantity', 'at', 'points', 'names', 'values'],
  ROLLING: ['beam', 'quantity', 'at', 'axles', 'sense', 'give', 'names', 'values'],
  FREQUENCY: ['beam', ...LAST],
  READBACK: ['beam', 'names', 'values'],
};

/** Functions whose result spills: a selected cell without a formula may belong to one of them. */
export const SPILLING = new Set([
  'REACTIONS',
  'PROFILE',
  'REGIONS',
  'CHECK',
  'ENVELOPE',
  'INFLUENCE',
  'READBACK',
]);

/**
 * "SPANROW.DEFLECTION" and the stored form "_xldudf_SPANROW_DEFLECTION" (any case) -> "DEFLECTION"; null for any other.
 */
export function ownFunction(name: string): string | null {
  const match = /^(?:_xlfn\.)?(?:SPANROW\.|_xldudf_SPANROW[_.])([A-Z]+)$/i.exec(name);
  const short = match?.[1]?.toUpperCase();
  return short !== undefined && short in FUNCTIONS ? short : null;
}

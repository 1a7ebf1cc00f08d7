/** Raw cell values as plain ones. */

/** The basic value of a rich cell; anything else as it is. */
export function basicOf(value: unknown): unknown {
  if (typeof value === 'object' && value !== null && 'basicValue' in value) {
    return value.basicValue;
  }
  return value;
}

/** Text of a plain value; '' for blanks and for what is no plain value. */
export function textOf(raw: unknown): string {
  const value = basicOf(raw);
  return typeof value === 'string' || typeof value === 'number' || typeof value === 'boolean'
    ? String(value)
    : '';
}

export function isBlank(raw: unknown): boolean {
  const value = basicOf(raw);
  return value === null || value === undefined || value === '';
}

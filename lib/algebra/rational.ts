/** Exact rational n/d in lowest terms, d > 0. */
export interface Rational {
  readonly n: number;
  readonly d: number;
}

/** Greatest common divisor of two safe integers, never negative; gcd(0, 0) = 0. */
export function gcd(a: number, b: number): number {
  let x = Math.abs(a);
  let y = Math.abs(b);
  while (y !== 0) {
    const rest = x % y;
    x = y;
    y = rest;
  }
  return x;
}

/** Least common multiple of two positive safe integers. */
export function lcm(a: number, b: number): number {
  return (a / gcd(a, b)) * b;
}

/** Remainder of a by m > 0 in [0, m); never -0. */
export function mod(a: number, m: number): number {
  const r = a % m;
  return r < 0 ? r + m : r + 0;
}

/**
 * The number itself, if it is exact. Products and sums of safe integers that leave the safe range round to numbers
 * outside it, so checking each intermediate result is enough.
 * @throws RangeError if it is not a safe integer
 */
export function exact(n: number): number {
  if (!Number.isSafeInteger(n)) throw new RangeError(`beyond exact integers: ${n}`);
  return n;
}

/**
 * The rational n/d in lowest terms.
 * @throws RangeError if d is 0, or if n or d is not a safe integer: exactness would be lost silently
 */
export function rational(n: number, d = 1): Rational {
  if (!Number.isSafeInteger(n) || !Number.isSafeInteger(d) || d === 0) {
    throw new RangeError(`not an exact fraction: ${n}/${d}`);
  }
  const g = gcd(n, d) * Math.sign(d);
  return { n: n / g + 0, d: d / g };
}

export const ZERO: Rational = { n: 0, d: 1 };

/** @throws RangeError if exactness is lost, as all arithmetic here does */
export function addRational(a: Rational, b: Rational): Rational {
  return rational(exact(a.n * b.d) + exact(b.n * a.d), a.d * b.d);
}

export function negateRational(a: Rational): Rational {
  return { n: -a.n + 0, d: a.d };
}

export function multiplyRational(a: Rational, b: Rational): Rational {
  return rational(a.n * b.n, a.d * b.d);
}

/** @throws RangeError if b is 0 */
export function divideRational(a: Rational, b: Rational): Rational {
  return rational(a.n * b.d, a.d * b.n);
}

/** Negative, 0 or positive as a is below, equal to or above b. @throws RangeError if exactness is lost */
export function compareRational(a: Rational, b: Rational): number {
  return exact(a.n * b.d) - exact(b.n * a.d);
}

/** `1/2`, `-3/4`, `2`. */
export function formatRational(a: Rational): string {
  return a.d === 1 ? String(a.n) : `${a.n}/${a.d}`;
}

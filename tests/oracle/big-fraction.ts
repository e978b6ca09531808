/** Fractions of arbitrary integers: the slow, obvious twin of lib/algebra/rational.ts. */
export interface BigFraction {
  readonly n: bigint;
  readonly d: bigint;
}

export function bigGcd(a: bigint, b: bigint): bigint {
  if (b === 0n) return a < 0n ? -a : a;
  return bigGcd(b, a % b);
}

export function big(n: bigint, d: bigint): BigFraction {
  const g = bigGcd(n, d) * (d < 0n ? -1n : 1n);
  return { n: n / g, d: d / g };
}

export function bigOf({ n, d }: { readonly n: number; readonly d: number }): BigFraction {
  return big(BigInt(n), BigInt(d));
}

export const bigAdd = (a: BigFraction, b: BigFraction) => big(a.n * b.d + b.n * a.d, a.d * b.d);
export const bigMultiply = (a: BigFraction, b: BigFraction) => big(a.n * b.n, a.d * b.d);
export const bigDivide = (a: BigFraction, b: BigFraction) => big(a.n * b.d, a.d * b.n);

/** True where both terms of the fraction are safe integers, so that a result in numbers can be asked for. */
export function representable({ n, d }: BigFraction): boolean {
  return Number.isSafeInteger(Number(n)) && Number.isSafeInteger(Number(d));
}

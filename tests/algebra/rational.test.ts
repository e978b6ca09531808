import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import {
  addRational,
  compareRational,
  divideRational,
  formatRational,
  gcd,
  lcm,
  mod,
  multiplyRational,
  negateRational,
  type Rational,
  rational,
  ZERO,
} from "../../lib/algebra/index.ts";
import { exact } from "../../lib/algebra/rational.ts";
import {
  type BigFraction,
  bigAdd,
  bigDivide,
  bigGcd,
  bigMultiply,
  bigOf,
  representable,
} from "../oracle/big-fraction.ts";

const MOST = Number.MAX_SAFE_INTEGER;
const integer = fc.oneof(fc.integer({ min: -60, max: 60 }), fc.maxSafeInteger());
const denominator = integer.filter((d) => d !== 0);
const fraction = fc.tuple(integer, denominator).map(([n, d]) => rational(n, d));
const small = fc
  .tuple(fc.integer({ min: -99, max: 99 }), fc.integer({ min: 1, max: 48 }))
  .map(([n, d]) => rational(n, d));

/** The result in numbers must be the true one, or be refused; refused it may be only if a step leaves the integers. */
function agrees(run: () => Rational, truth: BigFraction, steps: readonly bigint[]): void {
  let result: Rational;
  try {
    result = run();
  } catch (error) {
    expect(error).toBeInstanceOf(RangeError);
    expect(steps.some((s) => s > BigInt(MOST) || s < -BigInt(MOST))).toBe(true);
    return;
  }
  expect(representable(truth)).toBe(true);
  expect(result).toEqual({ n: Number(truth.n), d: Number(truth.d) });
}

describe("rational", () => {
  it.each([
    [2, 4, 1, 2],
    [-6, 4, -3, 2],
    [6, -4, -3, 2],
    [-6, -4, 3, 2],
    [0, -5, 0, 1],
    [-0, 7, 0, 1],
    [MOST, MOST, 1, 1],
  ])("brings %i/%i to lowest terms with a positive denominator", (n, d, rn, rd) => {
    expect(rational(n, d)).toEqual({ n: rn, d: rd });
  });

  it.each([
    [1, 0],
    [0.5, 1],
    [1, 1.5],
    [Number.NaN, 1],
    [Number.POSITIVE_INFINITY, 1],
    [MOST + 1, 1],
    [1, -MOST - 1],
  ])("refuses %d/%d by name", (n, d) => {
    expect(() => rational(n, d)).toThrow(new RangeError(`not an exact fraction: ${n}/${d}`));
  });

  it("is an integer when no denominator is given", () => expect(rational(-3)).toEqual({ n: -3, d: 1 }));
});

describe("arithmetic of rationals", () => {
  test("is that of big integers, or refused where a step would be rounded", () => {
    fc.assert(
      fc.property(fraction, fraction, (a, b) => {
        const [A, B] = [bigOf(a), bigOf(b)];
        const products = [A.n * B.d, B.n * A.d, A.d * B.d];
        agrees(() => addRational(a, b), bigAdd(A, B), [...products, A.n * B.d + B.n * A.d]);
        agrees(() => multiplyRational(a, b), bigMultiply(A, B), [A.n * B.n, A.d * B.d]);
        if (b.n !== 0) agrees(() => divideRational(a, b), bigDivide(A, B), [A.n * B.d, A.d * B.n]);
      }),
      { numRuns: 2000 },
    );
  });

  test("is refused, not rounded, where two large products would cancel", () => {
    const [a, b] = [rational(5e15 + 1, 5), rational(-7e15 - 1, 7)]; // the sum is 2/35, rounding makes it 4/35
    expect(() => addRational(a, b)).toThrow(RangeError);
    expect(() => compareRational(a, negateRational(b))).toThrow(RangeError);
  });

  test("adds and multiplies as the field of fractions does", () => {
    fc.assert(
      fc.property(small, small, small, (a, b, c) => {
        expect(addRational(a, negateRational(a))).toEqual(ZERO);
        expect(addRational(addRational(a, b), c)).toEqual(addRational(a, addRational(b, c)));
        expect(multiplyRational(a, addRational(b, c))).toEqual(
          addRational(multiplyRational(a, b), multiplyRational(a, c)),
        );
        if (b.n !== 0) expect(multiplyRational(divideRational(a, b), b)).toEqual(a);
      }),
    );
  });

  test("compares as the quotients do", () => {
    fc.assert(
      fc.property(small, small, (a, b) => {
        expect(Math.sign(compareRational(a, b))).toBe(Math.sign(a.n / a.d - b.n / b.d));
      }),
    );
  });

  it("cannot divide by zero", () => expect(() => divideRational(rational(1, 2), ZERO)).toThrow(RangeError));
});

describe("integers", () => {
  test("gcd and lcm are those of big integers", () => {
    fc.assert(
      fc.property(integer, integer, (a, b) => {
        expect(gcd(a, b)).toBe(Number(bigGcd(BigInt(a), BigInt(b))));
      }),
    );
    const positive = fc.integer({ min: 1, max: 90_000_000 });
    fc.assert(
      fc.property(positive, positive, (a, b) => {
        expect(lcm(a, b)).toBe(Number((BigInt(a) * BigInt(b)) / bigGcd(BigInt(a), BigInt(b))));
      }),
    );
  });

  it("have gcd(0, 0) = 0", () => expect(gcd(0, 0)).toBe(0));

  test("mod lies in [0, m) and differs by a multiple of m", () => {
    fc.assert(
      fc.property(fc.maxSafeInteger(), fc.integer({ min: 1, max: 1e6 }), (a, m) => {
        const r = mod(a, m);
        expect(r).toBe(Number(((BigInt(a) % BigInt(m)) + BigInt(m)) % BigInt(m)));
        expect(Object.is(r, -0)).toBe(false);
      }),
    );
  });

  it.each([
    [-6, 3],
    [-0, 5],
    [0, 5],
  ])("mod(%d, %i) is 0 without a sign", (a, m) => expect(mod(a, m)).toBe(0));

  it("are exact up to 2^53 - 1", () => {
    expect(exact(-MOST)).toBe(-MOST);
    expect(() => exact(MOST + 1)).toThrow(new RangeError("beyond exact integers: 9007199254740992"));
  });
});

describe("formatRational", () => {
  it.each([
    [1, 2, "1/2"],
    [-3, 4, "-3/4"],
    [4, 2, "2"],
    [0, 3, "0"],
  ])("writes %i/%i as %s", (n, d, text) => expect(formatRational(rational(n, d))).toBe(text));
});

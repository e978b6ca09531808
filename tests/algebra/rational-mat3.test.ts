import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import {
  addVectors,
  asInteger,
  component,
  equalVectors,
  formatRational,
  type IntMat3,
  inverseRatMat,
  modOne,
  multiplyRatMat,
  negateVector,
  RAT_IDENTITY,
  type RatMat3,
  type RatVec3,
  ratDeterminant,
  rational,
  ratMat3,
  ratVec3,
  rowTimes,
  subtractVectors,
  transformVector,
  vectorOf,
  ZERO_VECTOR,
} from "../../lib/algebra/index.ts";
import { type BigFraction, big, bigAdd, bigGcd, bigOf } from "../oracle/big-fraction.ts";
import { bigDeterminant, bigMatrix, bigRatProduct, rowsOf } from "../oracle/big-matrix.ts";

const entry = fc.integer({ min: -30, max: 30 });
const denominator = fc.constantFrom(1, 2, 3, 4, 6, 8, 12, 24, -5, 7);
const vector = fc.tuple(fc.tuple(entry, entry, entry), denominator).map(([n, d]) => ratVec3(n, d));
const matrix = fc
  .tuple(fc.array(entry, { minLength: 9, maxLength: 9 }), denominator)
  .map(([n, d]) => ratMat3(n as unknown as IntMat3, d));
const fractions = (v: RatVec3 | RatMat3): BigFraction[] => v.n.map((n) => big(BigInt(n), BigInt(v.d)));

/** Least denominator, positive, and no -0: the form that makes equal values equal as data. */
function expectLowest(v: RatVec3 | RatMat3): void {
  const least = fractions(v).reduce((m, f) => (m / bigGcd(m, f.d)) * f.d, 1n);
  expect(BigInt(v.d)).toBe(least);
  expect(v.n.filter((e) => Object.is(e, -0))).toEqual([]);
}

describe("rational vectors", () => {
  test("are stored over their least common denominator", () => {
    fc.assert(fc.property(vector, (v) => expectLowest(v)));
    fc.assert(fc.property(matrix, (m) => expectLowest(m)));
  });

  test("add, subtract and negate by component", () => {
    fc.assert(
      fc.property(vector, vector, (a, b) => {
        const [A, B] = [fractions(a), fractions(b)];
        expect(fractions(addVectors(a, b))).toEqual(A.map((f, i) => bigAdd(f, B[i]!)));
        expect(addVectors(subtractVectors(a, b), b)).toEqual(a);
        expect(addVectors(a, negateVector(a))).toEqual(ZERO_VECTOR);
        expectLowest(addVectors(a, b));
        expectLowest(negateVector(a));
      }),
    );
  });

  test("are reduced to [0, 1) by whole numbers", () => {
    fc.assert(
      fc.property(vector, (v) => {
        const r = modOne(v);
        expectLowest(r);
        for (const n of r.n) {
          expect(n).toBeGreaterThanOrEqual(0);
          expect(n).toBeLessThan(r.d);
        }
        expect(subtractVectors(v, r).d).toBe(1);
      }),
    );
  });

  test("are made of their components", () => {
    fc.assert(
      fc.property(vector, vector, (a, b) => {
        expect(vectorOf(component(a, 0), component(a, 1), component(a, 2))).toEqual(a);
        expect([0, 1, 2].map((i) => bigOf(component(a, i)))).toEqual(fractions(a));
        expect(equalVectors(a, b)).toBe([0, 1, 2].every((i) => text(a, i) === text(b, i)));
        expect(equalVectors(a, ratVec3([...a.n], a.d))).toBe(true);
      }),
    );
  });

  const text = (v: RatVec3, i: number) => formatRational(component(v, i));

  it("refuse what is no exact fraction", () => {
    expect(() => ratVec3([1, 2, 3], 0)).toThrow(new RangeError("not a denominator: 0"));
    expect(() => ratVec3([0.5, 2, 3])).toThrow(new RangeError("not an exact integer: 0.5"));
    expect(() => ratVec3([Number.NaN, 2, 3], 2)).toThrow(RangeError);
    expect(() => ratVec3([1, 1, 1], 2.5)).toThrow(RangeError);
  });
});

describe("rational matrices", () => {
  test("multiply each other and columns as fractions do", () => {
    fc.assert(
      fc.property(matrix, matrix, vector, (a, b, v) => {
        expect(fractions(multiplyRatMat(a, b))).toEqual(bigRatProduct(a, b));
        expect(fractions(transformVector(a, v))).toEqual(bigRatProduct(a, v));
        expectLowest(multiplyRatMat(a, b));
        expectLowest(transformVector(a, v));
      }),
    );
  });

  test("have an inverse from both sides unless the determinant is 0", () => {
    fc.assert(
      fc.property(matrix, (m) => {
        const det = ratDeterminant(m);
        expect(bigOf(det)).toEqual(big(bigDeterminant(bigMatrix(rowsOf(m.n))), BigInt(m.d) ** 3n));
        if (det.n === 0) {
          expect(() => inverseRatMat(m)).toThrow(new RangeError(`singular matrix: ${m.n.join(" ")}`));
          return;
        }
        expect(multiplyRatMat(m, inverseRatMat(m))).toEqual(RAT_IDENTITY);
        expect(multiplyRatMat(inverseRatMat(m), m)).toEqual(RAT_IDENTITY);
        expectLowest(inverseRatMat(m));
      }),
    );
  });

  it("name a singular matrix", () => {
    expect(() => inverseRatMat(ratMat3([1, 2, 3, 2, 4, 6, 0, 0, 1]))).toThrow("singular matrix: 1 2 3 2 4 6 0 0 1");
  });

  test("are multiplied by a row from the left", () => {
    fc.assert(
      fc.property(fc.tuple(entry, entry, entry), matrix, (v, m) => {
        const transposed = ratMat3([0, 1, 2].flatMap((j) => [0, 1, 2].map((i) => m.n[3 * i + j]!)) as never, m.d);
        expect(rowTimes(v, m)).toEqual(transformVector(transposed, ratVec3(v)));
      }),
    );
  });

  it("are integer when their denominator is 1", () => {
    expect(asInteger(ratMat3([2, 0, 0, 0, 2, 0, 0, 0, 4], 2))).toEqual([1, 0, 0, 0, 1, 0, 0, 0, 2]);
    expect(asInteger(ratMat3([1, 0, 0, 0, 2, 0, 0, 0, 4], 2))).toBeNull();
  });

  it("refuse entries whose products would be rounded, where the rounding could cancel unseen", () => {
    const large = 94_906_267; // its square is the first above 2^53
    const m = ratMat3([large, large - 1, 0, large + 1, large, 0, 0, 0, 1]);
    expect(() => ratDeterminant(m)).toThrow("too large to stay exact");
    expect(() => inverseRatMat(m)).toThrow("too large to stay exact");
    expect(() => multiplyRatMat(m, m)).toThrow("too large to stay exact");
    expect(() => transformVector(m, ratVec3([large, -large, 0]))).toThrow("too large to stay exact");
    expect(() => rowTimes([large, -large, 0], m)).toThrow("too large to stay exact");
    const [a, b] = [ratVec3([5e15 + 1, 0, 0], 5), ratVec3([7e15 + 1, 0, 0], 7)]; // a - b is 2/35, rounding makes it 4/35
    expect(() => subtractVectors(a, b)).toThrow(RangeError);
    expect(() => vectorOf(rational(1, 94_906_267), rational(1, 94_906_266), rational(1, 94_906_265))).toThrow(
      RangeError,
    );
  });
});

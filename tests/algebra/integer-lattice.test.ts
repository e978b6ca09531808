import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { gcd, hermiteRows, integerNullspace, primitiveRow, smithForm } from "../../lib/algebra/index.ts";
import { bigDeterminant, bigMatrix, bigProduct, bigRank, invariantFactors, minorsGcd } from "../oracle/big-matrix.ts";
import { integerMatrix, unimodular } from "./arbitraries.ts";

const matrix = integerMatrix(fc.integer({ min: 1, max: 5 }), fc.integer({ min: 1, max: 4 }));
const numbers = (m: readonly (readonly bigint[])[]) => m.map((row) => row.map(Number));
const product = (a: readonly (readonly number[])[], b: readonly (readonly number[])[]) =>
  numbers(bigProduct(bigMatrix(a), bigMatrix(b)));
const pivotOf = (row: readonly number[]) => row.findIndex((e) => e !== 0);

/** What is left of a row after subtracting multiples of echelon rows; zero exactly for members of their lattice. */
function remainder(row: readonly number[], echelon: readonly (readonly number[])[]): number[] {
  return echelon.reduce<number[]>(
    (rest, basis) => {
      const at = pivotOf(basis);
      const k = Math.floor(rest[at]! / basis[at]!);
      return rest.map((e, j) => e - k * basis[j]! + 0);
    },
    [...row],
  );
}

describe("hermiteRows", () => {
  test("is in echelon form with positive pivots and reduced entries above them", () => {
    fc.assert(
      fc.property(matrix, (a) => {
        const h = hermiteRows(a);
        const pivots = h.map(pivotOf);
        expect(pivots).toEqual([...pivots].sort((x, y) => x - y));
        expect(new Set(pivots).size).toBe(h.length);
        h.forEach((row, i) => {
          const at = pivots[i]!;
          expect(row[at]).toBeGreaterThan(0);
          for (const above of h.slice(0, i)) {
            expect(above[at]).toBeGreaterThanOrEqual(0);
            expect(above[at]).toBeLessThan(row[at]!);
          }
        });
      }),
    );
  });

  test("spans the same lattice: every given row lies in it, and its rank and minors are theirs", () => {
    fc.assert(
      fc.property(matrix, (a) => {
        const h = hermiteRows(a);
        const rank = bigRank(bigMatrix(a));
        expect(h.length).toBe(rank);
        for (const row of a) expect(remainder(row, h).every((e) => e === 0)).toBe(true);
        if (rank > 0) expect(minorsGcd(bigMatrix(h), rank)).toBe(minorsGcd(bigMatrix(a), rank));
      }),
    );
  });

  test("depends on the lattice alone, not on the rows that were given", () => {
    const pair = fc
      .integer({ min: 1, max: 4 })
      .chain((r) => fc.tuple(integerMatrix(fc.constant(r), fc.integer({ min: 1, max: 4 })), unimodular(r)));
    fc.assert(
      fc.property(pair, ([a, u]) => {
        expect(hermiteRows(product(u, a))).toEqual(hermiteRows(a));
      }),
    );
  });

  it("leaves its argument alone, drops zero rows, takes no rows", () => {
    const rows = [
      [0, 0],
      [4, 6],
      [6, 4],
    ];
    expect(hermiteRows(rows)).toEqual([
      [2, 8],
      [0, 10],
    ]);
    expect(rows[1]).toEqual([4, 6]);
    expect(hermiteRows([])).toEqual([]);
    expect(hermiteRows([[0, 0]])).toEqual([]);
  });

  it("refuses to go on with rounded entries", () => {
    const large = 2 ** 52;
    const rows = [
      [1, large, 3],
      [5, 1 - large, 7],
    ];
    expect(() => hermiteRows(rows)).toThrow(RangeError);
  });
});

describe("integerNullspace", () => {
  test("holds independent solutions, as many as the rank leaves", () => {
    fc.assert(
      fc.property(matrix, (a) => {
        const m = a[0]!.length;
        const basis = integerNullspace(a, m);
        expect(basis.length).toBe(m - bigRank(bigMatrix(a)));
        for (const v of basis)
          expect(
            product(
              a,
              v.map((e) => [e]),
            )
              .flat()
              .every((e) => e === 0),
          ).toBe(true);
        expect(bigRank(bigMatrix(basis))).toBe(basis.length);
      }),
    );
  });

  test("is saturated: its maximal minors have no common factor", () => {
    fc.assert(
      fc.property(matrix, (a) => {
        const basis = integerNullspace(a, a[0]!.length);
        expect(minorsGcd(bigMatrix(basis), basis.length)).toBe(1n);
      }),
    );
  });

  it("gives the primitive solution where a multiple would do as well", () => {
    expect(integerNullspace([[2, -4]], 2)).toEqual([[2, 1]]);
    expect(integerNullspace([], 2)).toEqual([
      [1, 0],
      [0, 1],
    ]);
    expect(integerNullspace([[1]], 1)).toEqual([]);
  });
});

describe("smithForm", () => {
  test("U A V is the diagonal D, with U and V unimodular", () => {
    fc.assert(
      fc.property(matrix, (a) => {
        const { u, d, v } = smithForm(a);
        const diagonal = a.map((row, i) => row.map((_, j) => (i === j ? d[i]! : 0)));
        expect(product(product(u, a), v)).toEqual(diagonal);
        expect([1n, -1n]).toContain(bigDeterminant(bigMatrix(u)));
        expect([1n, -1n]).toContain(bigDeterminant(bigMatrix(v)));
      }),
    );
  });

  test("D holds the invariant factors: quotients of the greatest common divisors of the minors", () => {
    fc.assert(
      fc.property(matrix, (a) => {
        expect(smithForm(a).d.map(BigInt)).toEqual(invariantFactors(bigMatrix(a)));
      }),
    );
  });

  test("each diagonal entry divides the next and none is negative", () => {
    fc.assert(
      fc.property(matrix, (a) => {
        const { d } = smithForm(a);
        for (const e of d) expect(e).toBeGreaterThanOrEqual(0);
        for (let i = 1; i < d.length; i++) expect(d[i - 1] === 0 ? d[i] : d[i]! % d[i - 1]!).toBe(0);
      }),
    );
  });

  it.each([
    [
      [
        [2, 0],
        [0, 3],
      ],
      [1, 6],
    ],
    [
      [
        [2, 4, 4],
        [-6, 6, 12],
        [10, 4, 16],
      ],
      [2, 2, 156],
    ],
    [
      [
        [0, 0],
        [0, 0],
      ],
      [0, 0],
    ],
    [[[-5]], [5]],
    [[], []],
  ])("of %j has the diagonal %j", (a, d) => expect(smithForm(a).d).toEqual(d));
});

describe("primitiveRow", () => {
  test("has no common factor and the direction of the row given", () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -40, max: 40 }), { minLength: 1, maxLength: 4 }), (row) => {
        const p = primitiveRow(row);
        const g = row.reduce(gcd, 0);
        expect(p.reduce(gcd, 0)).toBe(g === 0 ? 0 : 1);
        expect(p.map((e) => e * g + 0)).toEqual(row.map((e) => e + 0));
      }),
    );
  });
});

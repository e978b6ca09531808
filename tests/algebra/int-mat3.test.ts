import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import {
  add,
  adjugate,
  apply,
  applyRow,
  determinant,
  equal,
  IDENTITY,
  type IntMat3,
  type IntVec3,
  inverseUnimodular,
  MINUS_IDENTITY,
  multiply,
  negate,
  scale,
  subtract,
  trace,
  transpose,
} from "../../lib/algebra/index.ts";
import { bigDeterminant, bigMatrix, bigProduct, rowsOf } from "../oracle/big-matrix.ts";
import { unimodular } from "./arbitraries.ts";

const entry = fc.oneof(fc.constantFrom(-1, 0, 1), fc.integer({ min: -1000, max: 1000 }));
const matrix = fc.array(entry, { minLength: 9, maxLength: 9 }).map((m) => m as unknown as IntMat3);
const vector = fc.tuple(entry, entry, entry);
const numbers = (m: readonly (readonly bigint[])[]) => m.flat().map(Number);
const rows = (m: readonly number[]) => bigMatrix(rowsOf(m));
const column = (v: IntVec3) => bigMatrix(v.map((e) => [e]));

describe("3 x 3 integer matrices", () => {
  test("multiply each other, columns and rows as the definition says", () => {
    fc.assert(
      fc.property(matrix, matrix, vector, (a, b, v) => {
        expect(multiply(a, b)).toEqual(numbers(bigProduct(rows(a), rows(b))));
        expect(apply(a, v)).toEqual(numbers(bigProduct(rows(a), column(v))));
        expect(applyRow(v, a)).toEqual(numbers(bigProduct(bigMatrix([v]), rows(a))));
      }),
    );
  });

  test("have the determinant of the expansion, and adjugate, transpose and trace that fit it", () => {
    fc.assert(
      fc.property(matrix, (m) => {
        const det = determinant(m);
        expect(det).toBe(Number(bigDeterminant(rows(m))));
        expect(multiply(m, adjugate(m))).toEqual(scale(IDENTITY, det));
        expect(multiply(adjugate(m), m)).toEqual(scale(IDENTITY, det));
        expect(determinant(transpose(m))).toBe(det);
        expect(rowsOf(transpose(m))).toEqual([0, 1, 2].map((j) => rowsOf(m).map((row) => row[j])));
        expect(trace(m)).toBe(m[0] + m[4] + m[8]);
      }),
    );
  });

  test("add, subtract and scale entry by entry", () => {
    fc.assert(
      fc.property(matrix, matrix, (a, b) => {
        expect(add(a, b)).toEqual(a.map((e, i) => e + b[i]!));
        expect(add(subtract(a, b), b)).toEqual(a);
        expect(add(a, negate(a))).toEqual(scale(a, 0));
        expect(equal(a, b)).toBe(a.join() === b.join());
        expect(equal(a, [...a] as unknown as IntMat3)).toBe(true);
      }),
    );
  });

  it("never hold -0, which prints as a sign", () => {
    const flip: IntMat3 = [0, 0, -1, 0, -1, 0, -1, 0, 0];
    const minus: IntMat3 = [-1, -1, -1, -1, -1, -1, -1, -1, -1];
    const plain = [
      multiply(scale(minus, 0), minus),
      multiply(MINUS_IDENTITY, flip),
      negate(IDENTITY),
      scale(flip, 0),
      adjugate(flip),
      apply(MINUS_IDENTITY, [0, 1, 0]),
      applyRow([0, -1, 0], flip),
      subtract(flip, flip),
      add(flip, negate(flip)),
      inverseUnimodular(flip),
      [determinant([0, 0, -1, 0, 0, 0, -1, 0, 0]), trace([-0, 0, 0, 0, -0, 0, 0, 0, -0])],
    ].flat();
    expect(plain.filter((e) => Object.is(e, -0))).toEqual([]);
  });
});

describe("inverseUnimodular", () => {
  test("undoes a unimodular matrix from both sides", () => {
    fc.assert(
      fc.property(unimodular(3), (u) => {
        const m = u.flat() as unknown as IntMat3;
        expect(multiply(m, inverseUnimodular(m))).toEqual(IDENTITY);
        expect(multiply(inverseUnimodular(m), m)).toEqual(IDENTITY);
      }),
    );
  });

  it("refuses another determinant by name", () => {
    expect(() => inverseUnimodular([2, 0, 0, 0, 1, 0, 0, 0, 1])).toThrow(
      new RangeError("not unimodular, determinant 2: 2 0 0 0 1 0 0 0 1"),
    );
    expect(() => inverseUnimodular([0, 0, 0, 0, 0, 0, 0, 0, 0])).toThrow("determinant 0");
  });
});

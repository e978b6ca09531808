import fc from "fast-check";
import { type IntMat3, modOne, type RatVec3, ratDeterminant, ratMat3, ratVec3 } from "../../lib/algebra/index.ts";
import {
  compose,
  IDENTITY_OPERATION,
  type Operation,
  parseOperation,
  type Transformation,
} from "../../lib/symmetry/index.ts";
import { unimodular } from "../algebra/arbitraries.ts";

const numerator = fc.integer({ min: -30, max: 30 });
const denominator = fc.constantFrom(1, 2, 3, 4, 5, 6, 8, 12, 24, 97);

export const shift: fc.Arbitrary<RatVec3> = fc
  .tuple(fc.tuple(numerator, numerator, numerator), denominator)
  .map(([n, d]) => ratVec3(n, d));

const matrix = unimodular(3).map((rows) => rows.flat() as unknown as IntMat3);

/** Any integer rotation part of determinant 1 or -1, of finite order or not, with a translation in [0, 1). */
export const operation: fc.Arbitrary<Operation> = fc.tuple(matrix, shift).map(([W, w]) => ({ W, w: modOne(w) }));

/** Changes of setting that keep the volume of the cell, so that every integer rotation part stays integer. */
export const sameVolume: fc.Arbitrary<Transformation> = fc.tuple(matrix, shift).map(([P, p]) => ({ P: ratMat3(P), p }));

/** Any change of setting with small fractions. */
export const transformation: fc.Arbitrary<Transformation> = fc
  .tuple(fc.array(fc.integer({ min: -4, max: 4 }), { minLength: 9, maxLength: 9 }), fc.constantFrom(1, 2, 3, 6), shift)
  .map(([n, d, p]) => ({ P: ratMat3(n as unknown as IntMat3, d), p }))
  .filter((t) => ratDeterminant(t.P).n !== 0);

/** Products of the operations given as text, so members of their group, translations not reduced. */
export function productOf(...texts: readonly string[]): fc.Arbitrary<Operation> {
  const generators = texts.map(parseOperation);
  return fc
    .array(fc.constantFrom(...generators), { maxLength: 8 })
    .map((list) => list.reduce(compose, IDENTITY_OPERATION));
}

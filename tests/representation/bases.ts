import fc from "fast-check";
import { apply, IDENTITY, type IntMat3, inverseUnimodular, multiply } from "../../lib/algebra/index.ts";
import { type AxisFrame, crystalMatrices, orientedSymbols } from "../../lib/representation/index.ts";

/** Random unimodular matrices: products of shears, permutations and changes of sign, of both determinants. */
export const basis: fc.Arbitrary<IntMat3> = fc
  .array(
    fc.oneof(
      fc
        .tuple(fc.integer({ min: 0, max: 2 }), fc.integer({ min: 1, max: 2 }), fc.integer({ min: -2, max: 2 }))
        .map(([i, step, k]) => entry(i, (i + step) % 3, k)),
      fc.constantFrom<IntMat3>([0, 1, 0, 1, 0, 0, 0, 0, 1], [0, 1, 0, 0, 0, 1, 1, 0, 0], [-1, 0, 0, 0, 1, 0, 0, 0, 1]),
    ),
    { maxLength: 5 },
  )
  .map((list) => list.reduce(multiply, IDENTITY));

function entry(i: number, j: number, k: number): IntMat3 {
  const m = [...IDENTITY];
  m[3 * i + j] = k;
  return m as unknown as IntMat3;
}

export const symbol: fc.Arbitrary<string> = fc.constantFrom(...orientedSymbols());

/** The matrices of a class in the basis (a, b, c) P. */
export function inBasis(matrices: readonly IntMat3[], P: IntMat3): IntMat3[] {
  const back = inverseUnimodular(P);
  return matrices.map((W) => multiply(multiply(back, W), P));
}

/** The old basis vectors in terms of the basis (a, b, c) P. */
export function carriedFrame(P: IntMat3): AxisFrame {
  const back = inverseUnimodular(P);
  return { x: apply(back, [1, 0, 0]), y: apply(back, [0, 1, 0]), z: apply(back, [0, 0, 1]) };
}

/** The 32 crystal classes, one symbol each, in a usual orientation. */
export const CLASSES = [
  ..."1 -1 2 m 2/m 222 mm2 mmm 4 -4 4/m 422 4mm -42m 4/mmm 3 -3 321 3m1 -3m1 6 -6 6/m 622 6mm -6m2 6/mmm".split(" "),
  ..."23 m-3 432 -43m m-3m".split(" "),
] as const;

export { crystalMatrices };

import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import {
  crystalMatrices,
  irrepIndex,
  irrepMatrices,
  type MolecularGroup,
  molecularGroup,
  orientedSymbols,
  type PointGroup,
  pointGroup,
  type Rows,
} from "../../lib/representation/index.ts";
import { basis, carriedFrame, inBasis, symbol } from "./bases.ts";

const MOLECULAR = "C3 C5v C7 D3d D4d D5h D6h D5d D8h S8 S10 S12 C5h C6v T Td Th O Oh I Ih D12d".split(" ");

function expectClose(D: Rows, expected: Rows): void {
  const differences = D.flatMap((row, i) => row.map((e, j) => Math.abs(e - expected[i]![j]!)));
  expect(Math.max(...differences)).toBeLessThan(1e-9);
}

/** Largest deviation from D(g) D(h) = D(gh), from orthogonality and from the characters, over all pairs. */
function deviation(group: PointGroup | MolecularGroup): number {
  let worst = 0;
  group.irreps.forEach((irrep, r) => {
    const D = irrepMatrices(group, r);
    const d = irrep.dimension;
    for (let g = 0; g < group.order; g++) {
      let sum = 0;
      for (let i = 0; i < d; i++) {
        sum += D[g]![i]![i]!;
        for (let j = 0; j < d; j++) {
          let norm = 0;
          for (let k = 0; k < d; k++) norm += D[g]![i]![k]! * D[g]![j]![k]!;
          worst = Math.max(worst, Math.abs(norm - (i === j ? 1 : 0)));
        }
      }
      worst = Math.max(worst, Math.abs(sum - irrep.characters[group.classOf[g]!]!));
      for (let h = 0; h < group.order; h++) {
        const product = D[group.products[group.order * g + h]!]!;
        for (let i = 0; i < d; i++) {
          for (let j = 0; j < d; j++) {
            let e = 0;
            for (let k = 0; k < d; k++) e += D[g]![i]![k]! * D[h]![k]![j]!;
            worst = Math.max(worst, Math.abs(e - product[i]![j]!));
          }
        }
      }
    }
  });
  return worst;
}

describe("matrices of the species", () => {
  it.each(orientedSymbols())(
    "of the crystal class %s are orthogonal, multiply like the elements and have their characters",
    (s) => {
      expect(deviation(pointGroup(crystalMatrices(s)))).toBeLessThan(1e-12);
    },
  );

  it.each(MOLECULAR)(
    "of the molecular group %s are orthogonal, multiply like the elements and have their characters",
    (name) => {
      expect(deviation(molecularGroup(name))).toBeLessThan(1e-12);
    },
  );

  test("stay so in any basis, and the same when the frame is carried along", () => {
    fc.assert(
      fc.property(symbol, basis, (s, P) => {
        const reference = pointGroup(crystalMatrices(s));
        const matrices = inBasis(reference.elements, P);
        expect(deviation(pointGroup(matrices))).toBeLessThan(1e-9);
        const carried = pointGroup(matrices, carriedFrame(P));
        reference.irreps.forEach((_, r) => {
          irrepMatrices(carried, r).forEach((D, g) => {
            const expected = irrepMatrices(reference, r)[g]!;
            expectClose(D, expected);
          });
        });
      }),
      { numRuns: 60 },
    );
  });

  it("of Eu of D4h are those of x and y, of T1u of Oh those of x, y, z", () => {
    const d4h = pointGroup(crystalMatrices("4/mmm"));
    irrepMatrices(d4h, irrepIndex(d4h, "Eu")).forEach((D, g) => {
      const W = d4h.elements[g]!;
      expect(D).toEqual([
        [W[0], W[1]],
        [W[3], W[4]],
      ]);
    });
    const oh = pointGroup(crystalMatrices("m-3m"));
    expect(irrepMatrices(oh, irrepIndex(oh, "T1u")).map((D) => D.flat())).toEqual(oh.elements);
  });

  it.each(["C3", "D3d", "C6v", "D5h", "D4d", "S8", "C5h", "S10", "D8h"])(
    "of E_k of %s turn the first partner towards the second by k times the smallest angle",
    (name) => {
      const group = molecularGroup(name);
      const central = group.classes.some((c) => c.name === "i" || c.name === "sigma_h");
      const angles = group.elements.map((M) => {
        const inPlane = M[0] * M[4] - M[1] * M[3] > 0 && (!central || M[8] > 0);
        const angle = Math.atan2(M[3], M[0]);
        return inPlane && angle > 1e-6 ? angle : 10;
      });
      const smallest = Math.min(...angles);
      group.irreps.forEach((irrep, r) => {
        if (irrep.dimension !== 2) return;
        const k = Number(/\d/.exec(irrep.label)?.[0] ?? 1);
        const D = irrepMatrices(group, r)[angles.indexOf(smallest)]!;
        expect(Math.atan2(D[1]![0]!, D[0]![0]!)).toBeCloseTo(k * smallest, 9);
      });
    },
  );

  it("of T1u of Ih are the matrices of the group themselves", () => {
    const ih = molecularGroup("Ih");
    irrepMatrices(ih, irrepIndex(ih, "T1u")).forEach((D, g) => {
      const M = ih.elements[g]!;
      expectClose(D, [M.slice(0, 3), M.slice(3, 6), M.slice(6, 9)]);
    });
  });
});

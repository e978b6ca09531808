import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import type { IntMat3 } from "../../lib/algebra/index.ts";
import {
  axialCharacter,
  cartesianMatrices,
  crystalMatrices,
  decompose,
  hyperRamanGeneralCharacter,
  irrepMatrices,
  type Matrix3,
  type MolecularGroup,
  matrixEntries,
  molecularGroup,
  type PointGroup,
  pointGroup,
  symmetricCubeCharacter,
  symmetricSquareCharacter,
  type TensorKind,
  tensorForms,
  vectorCharacter,
} from "../../lib/representation/index.ts";
import { symbol } from "./bases.ts";

const CHARACTERS: Readonly<Record<TensorKind, (W: IntMat3) => number>> = {
  vector: vectorCharacter,
  axial: axialCharacter,
  symmetric2: symmetricSquareCharacter,
  symmetric3: symmetricCubeCharacter,
  hyperRamanGeneral: hyperRamanGeneralCharacter,
};
const KINDS = Object.keys(CHARACTERS) as TensorKind[];

type Values = Map<string, number>;

/** Value of a tensor given by its independent components at an index tuple. */
function at(values: Values, kind: TensorKind, tuple: readonly number[]): number {
  const fixed = kind === "hyperRamanGeneral" ? 1 : 0;
  const sorted = [...tuple.slice(0, fixed), ...tuple.slice(fixed).sort((a, b) => a - b)];
  return values.get(sorted.map((i) => "xyz"[i]).join(""))!;
}

/** Component of the rotated tensor, by the definition T'_ij... = M_ia M_jb ... T_ab... */
function rotated(values: Values, kind: TensorKind, M: Matrix3, tuple: readonly number[]): number {
  const det =
    M[0] * (M[4] * M[8] - M[5] * M[7]) - M[1] * (M[3] * M[8] - M[5] * M[6]) + M[2] * (M[3] * M[7] - M[4] * M[6]);
  let sum = 0;
  for (let code = 0; code < 3 ** tuple.length; code++) {
    const inner = tuple.map((_, k) => Math.floor(code / 3 ** k) % 3);
    const weight = tuple.reduce((w, i, k) => w * M[3 * i + inner[k]!]!, kind === "axial" ? det : 1);
    if (weight !== 0) sum += weight * at(values, kind, inner);
  }
  return sum;
}

/** Largest deviation from the law of transformation: image of partner i = sum over j of D(g)_ji partner j. */
function deviation(group: PointGroup | MolecularGroup, matrices: readonly Matrix3[], kind: TensorKind): number {
  const { forms, components } = tensorForms(group, matrices, kind);
  let worst = 0;
  for (const form of forms) {
    const D = irrepMatrices(group, form.irrep);
    form.letters.forEach((_, letter) => {
      const partners = form.partners.map((p) => new Map(components.map((c, k) => [c, p.coefficients[k]![letter]!])));
      matrices.forEach((M, g) => {
        partners.forEach((values, i) => {
          for (const component of components) {
            const tuple = [...component].map((c) => "xyz".indexOf(c));
            const image = rotated(values, kind, M, tuple);
            const expected = partners.reduce((t, other, j) => t + D[g]![j]![i]! * other.get(component)!, 0);
            worst = Math.max(worst, Math.abs(image - expected));
          }
        });
      });
    });
  }
  return worst;
}

describe("tensor forms", () => {
  test("of a crystal class transform by the matrices of their species, with a letter for every repeat", () => {
    fc.assert(
      fc.property(symbol, fc.constantFrom(...KINDS), (s, kind) => {
        const group = pointGroup(crystalMatrices(s));
        const matrices = cartesianMatrices(group.elements);
        expect(deviation(group, matrices, kind)).toBeLessThan(1e-9);
        const multiplicities = decompose(group, group.elements.map(CHARACTERS[kind]));
        const { forms } = tensorForms(group, matrices, kind);
        const letters = group.irreps.map((_, r) => forms.find((f) => f.irrep === r)?.letters.length ?? 0);
        expect(letters).toEqual(multiplicities.map((m, r) => m * group.irreps[r]!.norm));
      }),
      { numRuns: 120 },
    );
  });

  it.each(["D5h", "D4d", "S8", "C7v", "I", "Ih"])(
    "of the molecular group %s transform by the matrices of their species",
    (name) => {
      const group = molecularGroup(name);
      for (const kind of ["vector", "symmetric2", "symmetric3"] as const) {
        expect(deviation(group, group.elements, kind)).toBeLessThan(1e-9);
      }
    },
  );

  it("in a monoclinic cell of any angle refer to x along a, y along b, z along c*", () => {
    const group = pointGroup(crystalMatrices("2/m"));
    const matrices = cartesianMatrices(group.elements, [64, 0, -30, 0, 81, 0, -30, 0, 100]);
    const forms = tensorForms(group, matrices, "symmetric2").forms;
    expect(
      forms.map((f) => [
        f.label,
        matrixEntries(f.partners[0]!.entries)
          .map((row) => row.join(" "))
          .join("; "),
      ]),
    ).toEqual([
      ["Ag", "a . b; . c .; b . d"],
      ["Bg", ". e .; e . f; . f ."],
    ]);
  });

  it("of a cell that obeys its symmetry only roughly are exact", () => {
    const group = pointGroup(crystalMatrices("3m1"));
    const matrices = cartesianMatrices(group.elements, [25, -12.49, 0.01, -12.49, 25.03, 0, 0.01, 0, 49]);
    expect(deviation(group, matrices, "symmetric2")).toBeLessThan(1e-12);
  });

  it("a metric that belongs to no cell is refused", () => {
    expect(() => cartesianMatrices([[1, 0, 0, 0, 1, 0, 0, 0, 1]], [1, 2, 0, 2, 1, 0, 0, 0, 1])).toThrow(RangeError);
  });
});

import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { determinant, type IntMat3, multiply, trace } from "../../lib/algebra/index.ts";
import {
  antisymmetricSquare,
  axialCharacter,
  composeCharacters,
  crystalMatrices,
  decompose,
  directProduct,
  hyperRamanGeneralCharacter,
  irrepIndex,
  type PointGroup,
  pointGroup,
  symmetricCubeCharacter,
  symmetricSquare,
  symmetricSquareCharacter,
  vectorCharacter,
} from "../../lib/representation/index.ts";
import { basis, CLASSES, inBasis, symbol } from "./bases.ts";

const GROUPS = new Map(CLASSES.map((s) => [s as string, pointGroup(crystalMatrices(s))]));

/** `T1u + 2T2g` of the multiplicities. */
function sum(group: PointGroup, multiplicities: readonly number[]): string {
  const terms = multiplicities.flatMap((m, r) => (m === 0 ? [] : [`${m > 1 ? m : ""}${group.irreps[r]!.label}`]));
  return terms.join(" + ");
}

function product(symbol: string, a: string, b: string): string {
  const group = GROUPS.get(symbol)!;
  return sum(group, directProduct(group, irrepIndex(group, a), irrepIndex(group, b)));
}

describe("decompose", () => {
  test("finds the multiplicities from which characters were composed", () => {
    const multiplicities = fc.array(fc.nat(9), { minLength: 12, maxLength: 12 });
    fc.assert(
      fc.property(fc.constantFrom(...GROUPS.values()), multiplicities, (group, numbers) => {
        const wanted = numbers.slice(0, group.irreps.length);
        expect(decompose(group, composeCharacters(group, wanted))).toEqual(
          wanted.concat(new Array(group.irreps.length - wanted.length).fill(0)),
        );
      }),
    );
  });

  it("refuses characters that no representation has", () => {
    const group = GROUPS.get("mmm")!;
    expect(() => decompose(group, [1, 0, 0, 0, 0, 0, 0, 0])).toThrow(RangeError);
    expect(() => decompose(group, [-8, 0, 0, 0, 0, 0, 0, 0])).toThrow(RangeError);
    expect(() => decompose(group, [8, 0, 0])).toThrow("3 characters for a group of order 8");
  });

  it("refuses a function that is not constant on classes although its sums are whole", () => {
    const group = GROUPS.get("4mm")!;
    const c4 = group.classes.find((c) => c.name === "2C4")!;
    const characters = composeCharacters(group, [2, 0, 0, 0, 0]);
    const bent = characters.map((x, i) => (i === c4.members[0] ? x + 1 : i === c4.members[1] ? x - 1 : x));
    expect(() => decompose(group, bent)).toThrow(RangeError);
  });
});

describe("products of species", () => {
  it.each([
    ["m-3m", "T1u", "T1u", "A1g + Eg + T1g + T2g"],
    ["m-3m", "Eg", "T2g", "T1g + T2g"],
    ["-43m", "E", "E", "A1 + A2 + E"],
    ["4/mmm", "Eg", "Eu", "A1u + A2u + B1u + B2u"],
    ["6/mmm", "E1g", "E2u", "B1u + B2u + E1u"],
    ["3", "E", "E", "2A + E"],
    ["mmm", "B1g", "B2g", "B3g"],
  ])("in %s, %s times %s is %s", (s, a, b, expected) => expect(product(s, a, b)).toBe(expected));

  test("symmetric and antisymmetric squares add up to the square", () => {
    for (const group of GROUPS.values()) {
      group.irreps.forEach((_, i) => {
        const parts = symmetricSquare(group, i).map((m, r) => m + antisymmetricSquare(group, i)[r]!);
        expect(parts).toEqual(directProduct(group, i, i));
      });
    }
  });

  it("the antisymmetric square of T1u is T1g, of E in D4 it is A2", () => {
    const oh = GROUPS.get("m-3m")!;
    expect(sum(oh, antisymmetricSquare(oh, irrepIndex(oh, "T1u")))).toBe("T1g");
    const d4 = GROUPS.get("422")!;
    expect(sum(d4, antisymmetricSquare(d4, irrepIndex(d4, "E")))).toBe("A2");
    expect(sum(d4, symmetricSquare(d4, irrepIndex(d4, "E")))).toBe("A1 + B1 + B2");
  });
});

describe("characters of tensors", () => {
  test("agree with traces of powers of the matrix in any basis", () => {
    fc.assert(
      fc.property(symbol, basis, (s, P) => {
        for (const W of inBasis(crystalMatrices(s), P)) {
          const W2 = multiply(W, W);
          const [t, t2, t3] = [trace(W), trace(W2), trace(multiply(W2, W))];
          expect(vectorCharacter(W)).toBe(t);
          expect(axialCharacter(W)).toBe((t * t - t2) / 2 + 0);
          expect(symmetricSquareCharacter(W)).toBe((t * t + t2) / 2 + 0);
          expect(symmetricCubeCharacter(W)).toBe((t ** 3 + 3 * t * t2 + 2 * t3) / 6 + 0);
          expect(hyperRamanGeneralCharacter(W)).toBe((t * (t * t + t2)) / 2 + 0);
          expect(Math.abs(determinant(W))).toBe(1);
        }
      }),
      { numRuns: 300 },
    );
  });

  it.each<[string, (W: IntMat3) => number, string]>([
    ["vector", vectorCharacter, "T1u"],
    ["axial vector", axialCharacter, "T1g"],
    ["symmetric square", symmetricSquareCharacter, "A1g + Eg + T2g"],
    ["symmetric cube", symmetricCubeCharacter, "A2u + 2T1u + T2u"],
    ["hyper-Raman tensor", hyperRamanGeneralCharacter, "A2u + Eu + 3T1u + 2T2u"],
  ])("in Oh the %s is what the products of T1u give", (_, character, expected) => {
    const oh = GROUPS.get("m-3m")!;
    expect(sum(oh, decompose(oh, oh.elements.map(character)))).toBe(expected);
  });
});

import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { IDENTITY, type IntMat3 } from "../../lib/algebra/index.ts";
import {
  characterOf,
  crystalClasses,
  crystalMatrices,
  orientedSymbols,
  pointGroup,
} from "../../lib/representation/index.ts";
import { basis, CLASSES, carriedFrame, inBasis, symbol } from "./bases.ts";

describe("recognition", () => {
  it("knows 32 crystal classes, each with its own Schoenflies symbol", () => {
    const found = CLASSES.map((s) => pointGroup(crystalMatrices(s)).schoenflies);
    expect(new Set(found)).toEqual(new Set(crystalClasses().keys()));
    expect(found.length).toBe(32);
  });

  it.each(orientedSymbols())("gives %s its symbol back, monoclinic classes without their axis", (s) => {
    const group = pointGroup(crystalMatrices(s));
    expect(group.hermannMauguin).toBe(group.crystalSystem === "monoclinic" ? s.replaceAll("1", "") : s);
  });

  test("a class is recognised in any basis, with or without the frame", () => {
    fc.assert(
      fc.property(symbol, basis, (s, P) => {
        const reference = pointGroup(crystalMatrices(s));
        const group = pointGroup(inBasis(reference.elements, P));
        expect(group.schoenflies).toBe(reference.schoenflies);
        expect(group.crystalClass).toBe(reference.crystalClass);
        expect(group.irreps.map((r) => r.label)).toEqual(reference.irreps.map((r) => r.label));
      }),
      { numRuns: 3000 },
    );
  });

  test("with the frame carried along, every label, name and direction stays where it was", () => {
    fc.assert(
      fc.property(symbol, basis, (s, P) => {
        const reference = pointGroup(crystalMatrices(s));
        const group = pointGroup(inBasis(reference.elements, P), carriedFrame(P));
        const { elements: _, frame: _f, ...table } = group;
        const { elements: __, frame: __f, ...expected } = reference;
        expect(table).toEqual(expected);
      }),
      { numRuns: 2000 },
    );
  });

  test("the order in which the matrices are listed changes no character", () => {
    fc.assert(
      fc.property(symbol, fc.infiniteStream(fc.nat()), (s, numbers) => {
        const matrices = crystalMatrices(s);
        const shuffled = matrices.map((W) => ({ W, at: numbers.next().value as number }));
        shuffled.sort((a, b) => a.at - b.at);
        const reference = pointGroup(matrices);
        const group = pointGroup(shuffled.map((e) => e.W));
        group.elements.forEach((W, i) => {
          const j = matrices.indexOf(W);
          group.irreps.forEach((irrep, r) => {
            expect(irrep.label).toBe(reference.irreps[r]!.label);
            expect(characterOf(group, r, i)).toBe(characterOf(reference, r, j));
          });
        });
      }),
    );
  });
});

describe("a list that is no group", () => {
  const quarter: IntMat3 = [0, -1, 0, 1, 0, 0, 0, 0, 1];
  it.each<[string, IntMat3[], string]>([
    ["without the identity", [quarter], "the identity is missing"],
    ["without a product", [IDENTITY, quarter], "the product of matrices 2 and 2 is missing"],
    ["with a matrix twice", [IDENTITY, IDENTITY], "a matrix is listed twice"],
    ["with a shear", [IDENTITY, [1, 1, 0, 0, 1, 0, 0, 0, 1]], "the product of matrices 2 and 2 is missing"],
    ["with a singular matrix", [IDENTITY, [0, 0, 0, 0, 1, 0, 0, 0, 1]], "has determinant 0"],
    ["with nothing", [], "the identity is missing"],
  ])("is refused: %s", (_, list, why) => {
    expect(() => pointGroup(list)).toThrow(why);
  });

  it("a frame of three vectors in one plane is refused", () => {
    expect(() => pointGroup([IDENTITY], { x: [1, 0, 0], y: [0, 1, 0], z: [1, 1, 0] })).toThrow(RangeError);
  });
});

describe("the table of each class", () => {
  describe.each(orientedSymbols())("%s", (s) => {
    const group = pointGroup(crystalMatrices(s));
    const { classes, irreps, order } = group;

    it("has rows orthogonal with weight the order times the norm", () => {
      for (const a of irreps) {
        for (const b of irreps) {
          const sum = classes.reduce((t, c, k) => t + c.size * a.characters[k]! * b.characters[k]!, 0);
          expect(sum).toBe(a === b ? order * a.norm : 0);
        }
      }
    });

    it("has columns orthogonal, where a class and its inverse count as one", () => {
      classes.forEach((c, k) => {
        const inverse = group.classOf[inverseOf(group, c.members[0]!)]!;
        classes.forEach((_, l) => {
          const sum = irreps.reduce((t, r) => t + (r.characters[k]! * r.characters[l]!) / r.norm, 0);
          const matches = (k === l ? 1 : 0) + (inverse === l ? 1 : 0);
          expect(sum).toBe(((order / c.size) * matches) / 2);
        });
      });
    });

    it("has as many complex species as classes, and squares of dimensions that add up to the order", () => {
      expect(irreps.reduce((t, r) => t + r.norm, 0)).toBe(classes.length);
      expect(irreps.reduce((t, r) => t + r.dimension ** 2 / r.norm, 0)).toBe(order);
      expect(new Set(irreps.map((r) => r.label)).size).toBe(irreps.length);
    });

    it("has classes that are closed under conjugation and fill the group", () => {
      const members = classes.flatMap((c) => c.members).sort((a, b) => a - b);
      expect(members).toEqual(Array.from({ length: order }, (_, i) => i));
      for (const c of classes) {
        for (const m of c.members) {
          for (let h = 0; h < order; h++) {
            const conjugate = group.products[order * group.products[order * h + m]! + inverseOf(group, h)]!;
            expect(c.members).toContain(conjugate);
          }
        }
      }
    });
  });
});

function inverseOf(group: { order: number; identity: number; products: readonly number[] }, g: number): number {
  for (let h = 0; h < group.order; h++) if (group.products[group.order * g + h] === group.identity) return h;
  throw new Error("no inverse");
}

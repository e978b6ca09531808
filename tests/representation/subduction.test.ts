import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { equal, IDENTITY, type IntMat3, multiply } from "../../lib/algebra/index.ts";
import { crystalMatrices, induce, type PointGroup, pointGroup, subduce } from "../../lib/representation/index.ts";
import { symbol } from "./bases.ts";

/** A random subgroup: closure of a few elements. */
const pair = fc.tuple(symbol, fc.array(fc.nat(), { maxLength: 3 })).map(([s, picks]) => {
  const elements = crystalMatrices(s);
  const list: IntMat3[] = [IDENTITY];
  const generators = picks.map((p) => elements[p % elements.length]!);
  for (let i = 0; i < list.length; i++) {
    for (const g of generators) {
      const p = multiply(list[i]!, g);
      if (!list.some((W) => equal(W, p))) list.push(p);
    }
  }
  return { group: pointGroup(elements), subgroup: pointGroup(list) };
});

function correlation(group: PointGroup, subgroup: PointGroup): string[] {
  return subduce(group, subgroup).map((row, g) => {
    const parts = row.flatMap((m, s) => (m ? [`${m > 1 ? m : ""}${subgroup.irreps[s]!.label}`] : []));
    return `${group.irreps[g]!.label} > ${parts.join(" + ")}`;
  });
}

describe("subduction and induction", () => {
  test("keep dimensions: subduced rows add up to the species, induced rows to the index times the species", () => {
    fc.assert(
      fc.property(pair, ({ group, subgroup }) => {
        subduce(group, subgroup).forEach((row, g) => {
          const dimension = row.reduce((t, m, s) => t + m * subgroup.irreps[s]!.dimension, 0);
          expect(dimension).toBe(group.irreps[g]!.dimension);
        });
        induce(subgroup, group).forEach((row, s) => {
          const dimension = row.reduce((t, m, g) => t + m * group.irreps[g]!.dimension, 0);
          expect(dimension).toBe((subgroup.irreps[s]!.dimension * group.order) / subgroup.order);
          for (const m of row) expect(Number.isInteger(m)).toBe(true);
        });
      }),
      { numRuns: 500 },
    );
  });

  test("inducing agrees with the character formula of Frobenius", () => {
    fc.assert(
      fc.property(pair, ({ group, subgroup }) => {
        const at = new Map(subgroup.elements.map((W, i) => [W.join(), i]));
        const inverses = group.elements.map((_, i) => {
          const row = group.products.slice(group.order * i, group.order * (i + 1));
          return row.indexOf(group.identity);
        });
        induce(subgroup, group).forEach((row, s) => {
          group.elements.forEach((_, g) => {
            let sum = 0;
            group.elements.forEach((__, h) => {
              const c = group.products[group.order * group.products[group.order * inverses[h]! + g]! + h]!;
              const i = at.get(group.elements[c]!.join());
              if (i !== undefined) sum += subgroup.irreps[s]!.characters[subgroup.classOf[i]!]!;
            });
            const found = row.reduce((t, m, r) => t + m * group.irreps[r]!.characters[group.classOf[g]!]!, 0);
            expect(found).toBe(sum / subgroup.order + 0);
          });
        });
      }),
      { numRuns: 100 },
    );
  });

  it("the species of D4h go to D2h with the same axes as published (Wilson, Decius and Cross, 1955; from memory)", () => {
    const d4h = pointGroup(crystalMatrices("4/mmm"));
    expect(correlation(d4h, pointGroup(crystalMatrices("mmm")))).toEqual([
      "A1g > Ag",
      "A2g > B1g",
      "B1g > Ag",
      "B2g > B1g",
      "Eg > B2g + B3g",
      "A1u > Au",
      "A2u > B1u",
      "B1u > Au",
      "B2u > B1u",
      "Eu > B2u + B3u",
    ]);
  });

  it("E of C3v is A' + A'' in Cs and the pair E in C3", () => {
    const c3v = pointGroup(crystalMatrices("3m1"));
    const mirror = c3v.elements.find((W) => !equal(W, IDENTITY) && equal(multiply(W, W), IDENTITY))!;
    expect(correlation(c3v, pointGroup([IDENTITY, mirror]))).toEqual(["A1 > A'", "A2 > A''", "E > A' + A''"]);
    const c3 = pointGroup(crystalMatrices("3"));
    expect(correlation(c3v, c3)).toEqual(["A1 > A", "A2 > A", "E > E"]);
    expect(induce(c3, c3v)).toEqual([
      [1, 1, 0],
      [0, 0, 2],
    ]);
  });

  it("a group that is no subgroup is refused", () => {
    expect(() => subduce(pointGroup(crystalMatrices("mmm")), pointGroup(crystalMatrices("4")))).toThrow(RangeError);
  });
});

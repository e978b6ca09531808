import { describe, expect, it } from "vitest";
import { extendedSymbol } from "../../lib/symmetry/extended-symbol.ts";
import { groupProperties } from "../../lib/symmetry/group-properties.ts";
import { settingOperations } from "../../lib/symmetry/setting-group.ts";
import { settingsOf } from "../../lib/symmetry/settings.ts";

const all = Array.from({ length: 230 }, (_, i) => groupProperties(i + 1));
const numbers = (test: (p: (typeof all)[number]) => boolean) => all.filter(test).map((p) => p.number);
const different = (of: (p: (typeof all)[number]) => string) => new Set(all.map(of)).size;

/** Counts from International Tables for Crystallography A (2016), chapters 1.3, 1.4 and 3.2, from memory. */
describe("properties of the 230 types", () => {
  it("count as they are known to count", () => {
    expect(numbers((p) => p.sohncke)).toHaveLength(65);
    expect(numbers((p) => p.symmorphic)).toHaveLength(73);
    expect(numbers((p) => p.centrosymmetric)).toHaveLength(92);
    expect(numbers((p) => p.polar)).toHaveLength(68);
    expect(numbers((p) => p.enantiomorph !== null)).toHaveLength(22);
    expect(numbers((p) => p.symmorphic && p.centrosymmetric)).toHaveLength(24);
    expect(different((p) => p.bravaisType)).toBe(14);
    expect(different((p) => p.crystalFamily)).toBe(6);
    expect(different((p) => p.geometricClass)).toBe(32);
    expect(different((p) => p.laueClass)).toBe(11);
    expect(different((p) => p.arithmeticClass)).toBe(73);
  });

  it("pairs the eleven enantiomorphic types with each other", () => {
    const pairs = all.filter((p) => p.enantiomorph !== null && p.enantiomorph > p.number);
    expect(pairs.map((p) => [p.number, p.enantiomorph])).toEqual([
      [76, 78],
      [91, 95],
      [92, 96],
      [144, 145],
      [151, 153],
      [152, 154],
      [169, 170],
      [171, 172],
      [178, 179],
      [180, 181],
      [212, 213],
    ]);
    for (const { number, enantiomorph } of pairs) expect(all[enantiomorph! - 1]!.enantiomorph).toBe(number);
  });

  it("has one symmorphic type in each arithmetic class", () => {
    const classes = all.filter((p) => p.symmorphic).map((p) => p.arithmeticClass);
    expect(new Set(classes).size).toBe(73);
  });

  it.each([
    [1, "aP", "1", "-1", 3],
    [7, "mP", "m", "2/m", 2],
    [5, "mS", "2", "2/m", 1],
    [41, "oS", "mm2", "mmm", 1],
    [36, "oS", "mm2", "mmm", 1],
    [62, "oP", "mmm", "mmm", 0],
    [122, "tI", "-42m", "4/mmm", 0],
    [161, "hR", "3m", "-3m", 1],
    [176, "hP", "6/m", "6/m", 0],
    [198, "cP", "23", "m-3", 0],
    [227, "cF", "m-3m", "m-3m", 0],
  ])("type %i is %s, %s, of Laue class %s, with %i polar dimensions", (number, bravais, point, laue, dimensions) => {
    expect(all[number - 1]).toMatchObject({ bravaisType: bravais, geometricClass: point, laueClass: laue });
    expect(all[number - 1]!.polarDirections).toHaveLength(dimensions);
  });

  it("gives polar directions in the axes in use", () => {
    const along = (number: number, name: string) => {
      const setting = settingsOf(number).find((s) => s.name === name)!;
      return groupProperties(number, settingOperations(setting)).polarDirections;
    };
    expect(along(33, "abc")).toEqual([[0, 0, 1]]);
    expect(along(33, "cab")).toEqual([[1, 0, 0]]);
    expect(along(161, ":R")).toEqual([[1, 1, 1]]);
    expect(along(8, "b1")).toEqual([
      [1, 0, 0],
      [0, 0, 1],
    ]);
  });
});

/** Source: International Tables for Crystallography A (2016), table 1.5.4.4, from memory. */
describe("extendedSymbol", () => {
  it.each([
    [5, "b1", "C 1 2,21 1"],
    [9, "b2", "A 1 n,a 1"],
    [14, "b1", "P 1 21/c 1"],
    [15, "b1", "C 1 2/c,21/n 1"],
    [15, "b3", "I 1 2/a,21/c 1"],
    [45, "abc", "I b,c a,c 2,21"],
    [62, "abc", "P 21/n 21/m 21/a"],
    [63, "abc", "C 2/m,21/b 2/c,21/n 21/m,n"],
    [71, "abc", "I 2/m,21/n 2/m,21/n 2/m,21/n"],
    [73, "abc", "I 21/b,2/c 21/c,2/a 21/a,2/b"],
    [97, "", "I 4,42 2,21 2,21"],
    [107, "", "I 4,42 m,n m,c"],
    [139, "", "I 4/m,42/n 2/m,21/n 2/m,21/c"],
    [146, ":H", "R 3,31,32"],
    [229, "", "I 4/m,42/n -3 2/m,21/c"],
  ])("of type %i in the setting %s is %s", (number, name, symbol) => {
    expect(extendedSymbol(settingsOf(number).find((s) => s.name === name)!)).toBe(symbol);
  });
});

import { describe, expect, it } from "vitest";
import { letterExchanges } from "../../lib/symmetry/euclidean-normaliser.ts";
import { operationKey } from "../../lib/symmetry/operation.ts";
import { referenceGroup } from "../../lib/symmetry/reference-group.ts";
import { formatTransformation } from "../../lib/symmetry/transformation-text.ts";
import { wyckoffPositions } from "../../lib/symmetry/wyckoff-positions.ts";
import { inSetting } from "./random-setting.ts";

/** Letters that change, as cycles would begin: `ab ba`. */
function changes(number: number): [string, string, boolean][] {
  return letterExchanges(number).map((e) => [
    formatTransformation(e.transformation),
    Object.entries(e.letters)
      .filter(([from, to]) => from !== to)
      .map(([from, to]) => from + to)
      .join(" "),
    e.anyCell,
  ]);
}

const SOME = [
  2, 5, 12, 15, 23, 36, 43, 53, 66, 70, 82, 88, 98, 109, 125, 141, 150, 155, 166, 182, 194, 203, 216, 224, 227,
];

describe("letterExchanges", () => {
  it("lists changes of setting that keep every operation", () => {
    for (const number of SOME) {
      const group = referenceGroup(number);
      const own = group.operations.map(operationKey).sort();
      for (const { transformation } of letterExchanges(number)) {
        expect(inSetting(group, transformation)!.map(operationKey).sort(), `${number}`).toEqual(own);
      }
    }
  });

  it("permutes letters among positions of one multiplicity and one kind of site group", () => {
    for (const number of SOME) {
      const byLetter = new Map(wyckoffPositions(number).map((p) => [p.letter, p]));
      for (const { letters } of letterExchanges(number)) {
        expect(new Set(Object.values(letters)).size).toBe(byLetter.size);
        for (const [from, to] of Object.entries(letters)) {
          expect(byLetter.get(to)!.multiplicity).toBe(byLetter.get(from)!.multiplicity);
          expect([...byLetter.get(to)!.siteSymmetry].sort()).toEqual([...byLetter.get(from)!.siteSymmetry].sort());
        }
      }
    }
  });

  // Equivalent origins as in International Tables for Crystallography A (2016), chapter 3.5, from memory.
  it.each([
    [62, [["a,b,c;0,0,1/2", "ab ba", true]]],
    [194, [["a,b,c;0,0,1/2", "cd dc", true]]],
    [221, [["a,b,c;1/2,1/2,1/2", "ab ba cd dc ef fe ij ji kl lk", true]]],
    [227, [["a,b,c;0,0,1/2", "ab ba cd dc", true]]],
    [229, []],
    [19, []],
  ])("of type %i are the known ones", (number, known) => {
    expect(changes(number)).toEqual(known);
  });

  it("turn the four special points of F -4 3 m round in steps of a quarter of the diagonal", () => {
    const quarter = changes(216).find(([t]) => t === "a,b,c;1/4,1/4,1/4");
    expect(quarter).toEqual(["a,b,c;1/4,1/4,1/4", "ad bc ca db fg gf", true]);
  });

  it("says where axes of unequal length would have to be alike", () => {
    const [exchange] = changes(16).filter(([t]) => t.startsWith("b,"));
    expect(exchange![2]).toBe(false);
  });
});

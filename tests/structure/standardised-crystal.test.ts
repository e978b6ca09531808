import { describe, expect, it } from "vitest";
import { type Crystal, standardisedCrystal } from "../../lib/structure/index.ts";
import { randomNumbers, randomStructure } from "../support/random-structures.ts";
import { retold } from "../support/retold.ts";

/** Cell and sites in numbers, to be compared. */
function told(crystal: Crystal) {
  const { crystal: standard, description } = standardisedCrystal(crystal);
  const { cell } = standard.metric;
  return {
    gamma: description.gamma.toFixed(6),
    cell: Object.values(cell).map((e) => e.toFixed(4)),
    sites: standard.sites.map((s) =>
      [s.label, ...s.symmetry.point.map((e) => (Math.round(e * 1e5) / 1e5 + 0).toFixed(5))].join(" "),
    ),
  };
}

describe("the standard description", () => {
  for (let first = 1; first <= 230; first += 23) {
    it(`is one whatever axes and origin a structure is given in: types ${first} to ${first + 22}`, {
      timeout: 120_000,
    }, () => {
      for (let number = first; number < first + 23; number++) {
        const random = randomNumbers(number * 7919);
        const crystal = randomStructure(number, random);
        const once = told(crystal);
        for (let k = 0; k < 2; k++) expect(told(retold(crystal, random)), `type ${number}`).toEqual(once);
      }
    });
  }
});

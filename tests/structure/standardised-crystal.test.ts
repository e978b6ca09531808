import { describe, expect, it } from "vitest";
import { IDENTITY } from "../../lib/algebra/index.ts";
import {
  type Crystal,
  crystalOf,
  lengthOf,
  metricOf,
  niggliReduction,
  standardisedCrystal,
} from "../../lib/structure/index.ts";
import { settingOperations, settingsOf, spaceGroup } from "../../lib/symmetry/index.ts";
import { atom } from "../support/crystals.ts";
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

describe("a cell of a shape that its group does not ask for", () => {
  const cube = { a: 8, b: 8, c: 8, alpha: 90, beta: 90, gamma: 90 };
  const shapes = [
    { name: "a cube", cell: cube, from: 1, to: 74 },
    { name: "a square prism", cell: { ...cube, b: 9 }, from: 1, to: 74 },
    { name: "a rhombohedron", cell: { ...cube, alpha: 80, beta: 80, gamma: 80 }, from: 1, to: 2 },
    { name: "a hexagonal prism", cell: { ...cube, b: 9, beta: 120 }, from: 3, to: 15 },
  ];

  it.each(shapes)("as $name leads to one description nevertheless", { timeout: 60_000 }, ({ cell, from, to }) => {
    for (let number = from; number <= to; number++) {
      const random = randomNumbers(number * 53);
      const group = spaceGroup(settingOperations(settingsOf(number)[0]!));
      const sites = ["Fe", "Cu", "O"].map((e) => atom(`${e}1`, e, [random(), random(), random()]));
      const crystal = crystalOf({ name: "", metric: metricOf(cell), group, sites, tolerance: 0.01 });
      expect(told(retold(crystal, random)), `type ${number}`).toEqual(told(crystal));
    }
  });
});

describe("the standard cell", () => {
  const standard = (number: number, seed: number) => {
    const random = randomNumbers(seed);
    return standardisedCrystal(retold(randomStructure(number, random), random)).crystal;
  };

  it("is the Niggli cell of a triclinic structure", () => {
    for (let seed = 1; seed < 12; seed++) {
      const { metric } = standard(1 + (seed % 2), seed);
      expect(niggliReduction(metric.toCartesian)).toEqual(IDENTITY);
    }
  });

  it("has a beta that is not acute and no shorter a or c in a monoclinic structure", () => {
    for (const number of [3, 7, 9, 12, 14, 15]) {
      for (let seed = 1; seed < 6; seed++) {
        const { metric } = standard(number, seed);
        const { a, b, c, beta } = metric.cell;
        expect([number, beta >= 90, b > 0]).toEqual([number, true, true]);
        // |a + 2c| and |c + 2a| keep every glide and centring
        expect(lengthOf(metric, [1, 0, 2])).toBeGreaterThanOrEqual(a - 1e-9);
        expect(lengthOf(metric, [2, 0, 1])).toBeGreaterThanOrEqual(c - 1e-9);
      }
    }
  });

  it("has ascending axes where the orthorhombic symbol permits all orders, and the shortest first where it permits three", () => {
    for (let seed = 1; seed < 6; seed++) {
      for (const number of [16, 19, 47, 71]) {
        const { a, b, c } = standard(number, seed).metric.cell;
        expect([number, a <= b, b <= c]).toEqual([number, true, true]);
      }
      const { a, b, c } = standard(61, seed).metric.cell;
      expect(a).toBe(Math.min(a, b, c));
    }
  });
});

describe("the standard order", () => {
  it("of sites runs down the letters, then up x, y, z, and numbers each element", () => {
    for (const number of [12, 47, 62, 123, 166, 194, 216, 225]) {
      const random = randomNumbers(number);
      const { crystal, description } = standardisedCrystal(randomStructure(number, random));
      const { sites } = description;
      for (let k = 1; k < sites.length; k++) {
        const [before, after] = [sites[k - 1]!, sites[k]!];
        expect(before.letter >= after.letter || before.letter === "A").toBe(true);
        if (before.letter === after.letter) expect(before.position[0]).toBeLessThanOrEqual(after.position[0] + 1e-6);
      }
      const counts = new Map<string, number>();
      for (const { label, element } of crystal.sites) {
        const next = (counts.get(element!) ?? 0) + 1;
        counts.set(element!, next);
        expect(label).toBe(`${element}${next}`);
      }
    }
  });
});

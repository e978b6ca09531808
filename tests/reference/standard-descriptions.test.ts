import { describe, expect, it } from "vitest";
import { type Cell, crystalOf, metricOf, standardisedCrystal, type Vec3 } from "../../lib/structure/index.ts";
import { settingOperations, settingsOf, spaceGroup } from "../../lib/symmetry/index.ts";
import { atom } from "../support/crystals.ts";
import { randomNumbers } from "../support/random-structures.ts";
import { retold } from "../support/retold.ts";

interface Published {
  readonly name: string;
  readonly number: number;
  readonly cell: Cell;
  /** Element, Wyckoff position, coordinates, in the order in which the standardised data are listed. */
  readonly sites: readonly (readonly [element: string, position: string, Vec3])[];
}

const hexagonal = (a: number, c: number): Cell => ({ a, b: a, c, alpha: 90, beta: 90, gamma: 120 });
const right = (a: number, b: number, c: number): Cell => ({ a, b, c, alpha: 90, beta: 90, gamma: 90 });

/**
 * Structure types in their standardised description, as listed in E. Parthe, L. Gelato, B. Chabot, M. Penzo, K. Cenzual,
 * R. Gladyshevskii, TYPIX (1993), and P. Villars, L. D. Calvert, Pearson's Handbook (1991); from memory.
 */
const PUBLISHED: readonly Published[] = [
  {
    name: "Cr3Si",
    number: 223,
    cell: right(4.556, 4.556, 4.556),
    sites: [
      ["Cr", "6c", [0.25, 0, 0.5]],
      ["Si", "2a", [0, 0, 0]],
    ],
  },
  {
    name: "AlB2",
    number: 191,
    cell: hexagonal(3.009, 3.262),
    sites: [
      ["B", "2d", [1 / 3, 2 / 3, 0.5]],
      ["Al", "1a", [0, 0, 0]],
    ],
  },
  {
    name: "NiAs",
    number: 194,
    cell: hexagonal(3.619, 5.034),
    sites: [
      ["As", "2c", [1 / 3, 2 / 3, 0.25]],
      ["Ni", "2a", [0, 0, 0]],
    ],
  },
  {
    name: "CaCu5",
    number: 191,
    cell: hexagonal(5.082, 4.078),
    sites: [
      ["Cu", "3g", [0.5, 0, 0.5]],
      ["Cu", "2c", [1 / 3, 2 / 3, 0]],
      ["Ca", "1a", [0, 0, 0]],
    ],
  },
  {
    name: "fluorite, CaF2",
    number: 225,
    cell: right(5.463, 5.463, 5.463),
    sites: [
      ["F", "8c", [0.25, 0.25, 0.25]],
      ["Ca", "4a", [0, 0, 0]],
    ],
  },
];

describe("published standardised data", () => {
  it.each(PUBLISHED)("are what we find for $name, from any description", ({ number, cell, sites }) => {
    const group = spaceGroup(settingOperations(settingsOf(number)[0]!));
    const rows = sites.map(([element, , position], i) => atom(`${element}${i}`, element, position));
    const crystal = crystalOf({ name: "", metric: metricOf(cell), group, sites: rows, tolerance: 0.01 });
    const random = randomNumbers(number);
    for (const given of [crystal, retold(crystal, random), retold(crystal, random)]) {
      const { crystal: standard, description } = standardisedCrystal(given);
      const found = standard.sites.map((s, i) => {
        const position = `${s.images.length}${description.sites[i]!.letter}`;
        return [s.element, position, s.symmetry.point.map((e) => Number(e.toFixed(6)))].join(" ");
      });
      const listed = sites.map(([e, position, x]) => [e, position, x.map((c) => Number(c.toFixed(6)))].join(" "));
      expect(found.sort()).toEqual(listed.sort());
      expect(Object.values(standard.metric.cell).map((e) => e.toFixed(3))).toEqual(
        Object.values(cell).map((e) => e.toFixed(3)),
      );
    }
  });
});

import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { inverseUnimodular, ratMat3, ratVec3 } from "../../lib/algebra/index.ts";
import { type AxisFrame, vectorCharacter } from "../../lib/representation/index.ts";
import { cellOfMetric, crystalOf, metricOf, siteSymmetry, type Vec3 } from "../../lib/structure/index.ts";
import { closeGroup, parseOperation, spaceGroup } from "../../lib/symmetry/index.ts";
import { factorGroupModes } from "../../lib/vibrations/index.ts";
import { atom, fixture, inSetting, invariantMetric, unimodular } from "../support/crystals.ts";

/** Generators of groups of all systems, centrings and kinds of axis; each one with its name for the report of a failure. */
const GROUPS: Readonly<Record<string, readonly string[]>> = {
  "P 1": [],
  "P -1": ["-x,-y,-z"],
  "P 21/c": ["-x,y+1/2,-z+1/2", "-x,-y,-z"],
  "C 2": ["-x,y,-z", "x+1/2,y+1/2,z"],
  "P 21 21 21": ["x+1/2,-y+1/2,-z", "-x,y+1/2,-z+1/2"],
  "F d d 2": ["-x,-y,z", "x+1/4,-y+1/4,z+1/4", "x,y+1/2,z+1/2", "x+1/2,y,z+1/2"],
  "P n m a": ["-x+1/2,-y,z+1/2", "-x,y+1/2,-z", "-x,-y,-z"],
  "P 41": ["-y,x,z+1/4"],
  "I -4 2 d": ["y,-x,-z", "-x,y+1/2,-z+1/4", "x+1/2,y+1/2,z+1/2"],
  "P 42/m n m": ["-y+1/2,x+1/2,z+1/2", "x+1/2,-y+1/2,-z+1/2", "-x,-y,-z"],
  "R 3 c": ["-y,x-y,z", "-y,-x,z+1/2", "x+2/3,y+1/3,z+1/3"],
  "P 31 2 1": ["-y,x-y,z+1/3", "y,x,-z"],
  "P 63/m m c": ["x-y,x,z+1/2", "y,x,-z", "-x,-y,-z"],
  "P 6": ["x-y,x,z"],
  "P a -3": ["-x+1/2,-y,z+1/2", "z,x,y", "-x,-y,-z"],
  "I -4 3 m": ["-x,-y,z", "z,x,y", "y,x,z", "x+1/2,y+1/2,z+1/2"],
  "F d -3 m": ["-y+3/4,x+1/4,z+1/2", "z,x,y", "-x,-y,-z", "x,y+1/2,z+1/2", "x+1/2,y,z+1/2"],
};

const coordinate = fc.integer({ min: 0, max: 2399 }).map((n) => n / 2400);
const seed = fc.tuple(fc.integer({ min: 0, max: 9 }), fc.integer({ min: 0, max: 9 }), fc.integer({ min: 0, max: 9 }));

/** A random crystal: a few sites, some of them moved onto the fixed points of operations that pass near them. */
const crystal = fc
  .record({
    name: fc.constantFrom(...Object.keys(GROUPS)),
    seed,
    sites: fc.array(
      fc.record({ x: fc.tuple(coordinate, coordinate, coordinate), reach: fc.constantFrom(0.01, 1.2, 2.5) }),
      {
        minLength: 1,
        maxLength: 4,
      },
    ),
  })
  .map(({ name, seed, sites }) => {
    const group = spaceGroup(closeGroup(GROUPS[name]!.map(parseOperation)));
    const metric = metricOf(cellOfMetric(invariantMetric(group, seed)));
    const atoms = sites.map(({ x, reach }, i) =>
      atom(`X${i}`, "Si", siteSymmetry(group.operations, metric, x as Vec3, reach).point),
    );
    return crystalOf({ name, metric, group, sites: atoms, tolerance: 0.01 });
  });

describe("species of the modes at k = 0", () => {
  test("of 1,000 random crystals add up to 3N and do not depend on origin or cell", () => {
    const shift = fc.tuple(
      ...([0, 1, 2].map(() => fc.integer({ min: 0, max: 23 })) as [
        fc.Arbitrary<number>,
        fc.Arbitrary<number>,
        fc.Arbitrary<number>,
      ]),
    );
    fc.assert(
      fc.property(crystal, unimodular, shift, (original, P, p) => {
        const modes = factorGroupModes(original);
        const dimension = modes.species.reduce((n, s) => n + s.total * s.dimension, 0);
        expect(dimension).toBe(3 * modes.atomsInPrimitiveCell);
        const moved = inSetting(original, { P: ratMat3(P), p: ratVec3(p, 24) })!;
        const Q = inverseUnimodular(P);
        const frame: AxisFrame = { x: [Q[0], Q[3], Q[6]], y: [Q[1], Q[4], Q[7]], z: [Q[2], Q[5], Q[8]] };
        expect(factorGroupModes(moved, frame).species).toEqual(modes.species);
      }),
      { numRuns: 1000 },
    );
  });

  test("of a centred cell are those of its primitive cell", () => {
    fc.assert(
      fc.property(crystal, (original) => {
        const primitive = inSetting(original, { P: original.group.primitive, p: ratVec3([0, 0, 0]) })!;
        const counts = (c: typeof original) => {
          const modes = factorGroupModes(c);
          return [
            modes.atomsInPrimitiveCell,
            modes.totals.opticModes,
            modes.species.length,
            modes.totals.infraredBands,
          ];
        };
        expect(primitive.group.centrings).toHaveLength(1);
        expect(counts(primitive)).toEqual(counts(original));
      }),
      { numRuns: 200 },
    );
  });

  test("hold three acoustic modes that transform as a vector", () => {
    for (const name of ["calcite", "rutile", "alpha-quartz", "gypsum", "halite"]) {
      const { species, group } = factorGroupModes(fixture(name));
      expect(species.reduce((n, s) => n + s.acoustic * s.dimension, 0)).toBe(3);
      group.elements.forEach((W, e) => {
        const sum = species.reduce((n, s, i) => n + s.acoustic * group.irreps[i]!.characters[group.classOf[e]!]!, 0);
        expect(sum).toBe(vectorCharacter(W));
      });
    }
  });
});

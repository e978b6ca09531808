import { describe, expect, it } from "vitest";
import { crystalOf, metricOf, nearestDistance, shortDistances } from "../../lib/structure/index.ts";
import { IDENTITY_OPERATION, spaceGroup } from "../../lib/symmetry/index.ts";
import { atom } from "../support/crystals.ts";
import { randomNumbers, randomStructure } from "../support/random-structures.ts";

const cubic = (a: number) => metricOf({ a, b: a, c: a, alpha: 90, beta: 90, gamma: 90 });
const alone = (a: number, sites: ReturnType<typeof atom>[]) =>
  crystalOf({ name: "", metric: cubic(a), group: spaceGroup([IDENTITY_OPERATION]), sites, tolerance: 1e-3 });

describe("the shortest distance", () => {
  it("is that of all pairs compared", () => {
    for (const number of [1, 14, 62, 167, 194, 216]) {
      const crystal = randomStructure(number, randomNumbers(number + 40));
      const atoms = crystal.sites.flatMap((s) => s.images.map((i) => ({ label: s.label, x: i.position })));
      const pairs = atoms.flatMap((a, i) =>
        atoms
          .slice(i + 1)
          .map((b) => ({ labels: [a.label, b.label].sort(), d: nearestDistance(crystal.metric, a.x, b.x) })),
      );
      const least = pairs.reduce((m, p) => (p.d < m.d ? p : m));
      const { shortest } = shortDistances(crystal);
      expect(shortest!.distance).toBeCloseTo(least.d, 8);
    }
  });

  it("of a single atom is that to its own image, however far", () => {
    expect(shortDistances(alone(35, [atom("Xe", "Xe", [0.1, 0, 0])])).shortest).toEqual({
      labels: ["Xe", "Xe"],
      distance: 35,
    });
  });

  it("leaves out atoms that take turns, and atoms of one position", () => {
    const split = alone(5, [atom("O1", "O", [0, 0, 0], 0.5), atom("O2", "O", [0.1, 0, 0], 0.5)]);
    expect(shortDistances(split).shortest).toBeNull();
    const mixed = alone(5, [
      atom("Ca", "Ca", [0, 0, 0], 0.5),
      atom("Mg", "Mg", [0, 0, 0], 0.5),
      atom("O", "O", [0.5, 0, 0]),
    ]);
    expect(shortDistances(mixed).shortest).toEqual({ labels: ["Ca", "O"], distance: 2.5 });
  });

  it("tells pairs nearer than atoms come, each pair of sites once", () => {
    const near = alone(10, [
      atom("C1", "C", [0, 0, 0]),
      atom("C2", "C", [0.12, 0, 0]), // triple bond
      atom("N1", "N", [0.3, 0, 0]),
      atom("N2", "N", [0.395, 0, 0]), // 0.95 angstrom: too near
    ]);
    expect(shortDistances(near).tooNear.map((p) => p.labels.join())).toEqual(["N1,N2"]);
  });
});

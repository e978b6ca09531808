import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fillings, inequivalentCount } from "../../lib/structure/arrangement-count.ts";
import {
  type AtomSite,
  type Crystal,
  cellContents,
  changeOfCell,
  chosenComponent,
  countConfigurations,
  crystalOf,
  metricOf,
  multiplesOf,
  orderedConfigurations,
  orderedCrystal,
  searchSymmetry,
} from "../../lib/structure/index.ts";
import { identify, operationsFromHall, spaceGroup } from "../../lib/symmetry/index.ts";
import { atom, fixture } from "../support/crystals.ts";
import { problemOf } from "../support/problem-of.ts";

function cubic(sites: readonly AtomSite[], hall = "-P 4 2 3"): Crystal {
  const metric = metricOf({ a: 4, b: 4, c: 4, alpha: 90, beta: 90, gamma: 90 });
  return crystalOf({ name: "cubic", metric, group: spaceGroup(operationsFromHall(hall).operations), sites });
}

/** Two metals share the corners of a primitive cubic cell, half and half. */
const alloy = cubic([atom("Cu", "Cu", [0, 0, 0], 0.5), atom("Au", "Au", [0, 0, 0], 0.5)]);

const permutation = (list: readonly number[]) => Int32Array.from(list);

describe("the number of inequivalent arrangements", () => {
  it("is that of necklaces: 4 of six beads, three of them black, under rotation", () => {
    const turns = [0, 1, 2, 3, 4, 5].map((k) => permutation([0, 1, 2, 3, 4, 5].map((i) => (i + k) % 6)));
    expect(inequivalentCount(turns, [{ from: 0, to: 6, counts: [3, 3] }])).toBe(4n);
  });

  it("counts fillings of single places by the multinomial coefficient", () => {
    expect(fillings(new Array<number>(10).fill(1), [5, 3, 2])).toBe(2520n);
    expect(fillings(new Array<number>(64).fill(1), [32, 32])).toBe(1832624140942590534n);
    expect(fillings([2, 2], [3, 1])).toBe(0n);
  });

  it("agrees with going through all fillings, for random permutation groups", () => {
    const element = fc.shuffledSubarray([0, 1, 2, 3, 4, 5], { minLength: 6, maxLength: 6 });
    fc.assert(
      fc.property(element, element, fc.integer({ min: 0, max: 6 }), (a, b, black) => {
        const group = generated([a, b]);
        const seen = new Set<number>();
        let orbits = 0;
        for (let set = 0; set < 64; set++) {
          const size = [0, 1, 2, 3, 4, 5].filter((i) => set & (1 << i)).length;
          if (size !== black || seen.has(set)) continue;
          orbits++;
          for (const g of group)
            seen.add([0, 1, 2, 3, 4, 5].reduce((s, i) => s | (set & (1 << i) ? 1 << g[i]! : 0), 0));
        }
        const count = inequivalentCount(group.map(permutation), [{ from: 0, to: 6, counts: [6 - black, black] }]);
        expect(count).toBe(BigInt(orbits));
      }),
    );
  });
});

function generated(generators: readonly (readonly number[])[]): (readonly number[])[] {
  const found = new Map<string, readonly number[]>([["0,1,2,3,4,5", [0, 1, 2, 3, 4, 5]]]);
  for (const g of found.values())
    for (const h of generators) {
      const product = h.map((i) => g[i]!);
      if (!found.has(product.join())) found.set(product.join(), product);
    }
  return [...found.values()];
}

describe("ordered structures of a disordered cell", () => {
  it.each([
    [[2, 1, 1], "2"],
    [[2, 2, 1], "6"],
    [[2, 2, 2], "70"],
    [[4, 2, 1], "70"],
  ] as const)("are as many as counted, their weights all arrangements, cell %j", ([a, b, c], arrangements) => {
    const { crystal } = changeOfCell(alloy, multiplesOf(a, b, c));
    const found = orderedConfigurations(crystal);
    expect(found.arrangements).toBe(arrangements);
    expect(found.configurations.length).toBe(Number(found.inequivalent));
    expect(found.configurations.reduce((s, x) => s + x.degeneracy, 0)).toBe(Number(arrangements));
    for (const { crystal: ordered } of found.configurations) {
      expect([...cellContents(ordered.sites)].sort()).toEqual([
        ["Au", (a * b * c) / 2],
        ["Cu", (a * b * c) / 2],
      ]);
      expect(ordered.sites.every((s) => s.occupancy === 1)).toBe(true);
      // no operation of the parent was lost: the atoms alone have at least this symmetry
      const searched = searchSymmetry(ordered);
      const size = (searched.group.members.length * searched.given.length) / searched.folded.atoms.species.length;
      expect(size % ordered.group.operations.length).toBe(0);
    }
  });

  it("hold caesium chloride and layers among those of two by two by two cells", () => {
    const { crystal } = changeOfCell(alloy, multiplesOf(2, 2, 2));
    const types = orderedConfigurations(crystal).configurations.map(
      (c) => identify(searchSymmetry(c.crystal).exact.operations).number,
    );
    expect(types).toContain(225); // corners alternate in all directions: rock salt
    expect(types).toContain(123); // layers
  });

  it("of ammonium chloride is one, in P -4 3 m, since hydrogen atoms keep apart", () => {
    const found = orderedConfigurations(fixture("ammonium-chloride"));
    expect([found.arrangements, found.inequivalent, found.excluded]).toEqual(["70", "6", 5]);
    expect(found.configurations.map((c) => [c.degeneracy, c.crystal.identified.number])).toEqual([[2, 215]]);
  });

  it("of a molecule in two ways move as a whole", () => {
    const half = (label: string, x: number, group: string) => ({
      ...atom(label, "C", [x, 0.1, 0.2], 0.5),
      assembly: "A",
      disorderGroup: group,
    });
    const sites = [half("C1", 0.1, "1"), half("C2", 0.4, "1"), half("C3", 0.2, "2"), half("C4", 0.5, "2")];
    const found = orderedConfigurations(cubic(sites, "-P 2y"));
    expect(found.places).toEqual([{ names: ["C1+C2", "C3+C4"], counts: [2, 2] }]);
    expect(found.arrangements).toBe("6");
    expect(found.inequivalent).toBe("3");
  });

  it("are counted, not made, where they are too many", () => {
    const { crystal } = changeOfCell(alloy, multiplesOf(4, 4, 4));
    expect(countConfigurations(crystal).arrangements).toBe("1832624140942590534");
    const problem = problemOf(() => orderedConfigurations(crystal));
    expect(problem.code).toBe("configurations-too-many");
    expect(problem.message).toContain("1832624140942590534 arrangements");
  });

  it("are refused where no whole numbers of atoms fit, with the cell that would do", () => {
    const problem = problemOf(() => orderedConfigurations(alloy));
    expect(problem.code).toBe("occupancy-not-whole");
    expect(problem.hint).toBe("a cell 2 times as large holds whole numbers");
  });

  it("of an ordered crystal are that crystal", () => {
    expect(countConfigurations(fixture("calcite"))).toEqual({ arrangements: "1", inequivalent: "1", places: [] });
    expect(orderedConfigurations(fixture("calcite")).configurations.map((c) => c.crystal.identified.number)).toEqual([
      167,
    ]);
  });
});

describe("a component of the disorder", () => {
  const part = (label: string, x: number, occupancy: number, group: string) => ({
    ...atom(label, "O", [x, 0.1, 0.2], occupancy),
    assembly: "A",
    disorderGroup: group,
  });
  const crystal = cubic([atom("Ti", "Ti", [0, 0, 0]), part("O1", 0.3, 0.7, "1"), part("O2", 0.4, 0.3, "2")], "-P 2y");

  it("is taken whole, the others left out", () => {
    for (const wanted of ["2", "A:2"]) {
      const { crystal: chosen, notes } = chosenComponent(crystal, wanted);
      expect(chosen.sites.map((s) => [s.label, s.occupancy])).toEqual([
        ["Ti", 1],
        ["O2", 1],
      ]);
      expect(notes.join()).toContain("left out: O1");
    }
  });

  it("is refused where there is none of that name", () => {
    const problem = problemOf(() => chosenComponent(crystal, "B:2"));
    expect([problem.code, problem.hint]).toEqual(["component-unknown", "there are A:1, A:2"]);
  });

  it("is the better occupied one in the ordered structure", () => {
    const { crystal: ordered } = orderedCrystal(crystal);
    expect(ordered.sites.map((s) => [s.label, s.occupancy])).toEqual([
      ["Ti", 1],
      ["O1", 1],
    ]);
    expect(orderedCrystal(alloy).crystal.sites.map((s) => [s.label, s.occupancy])).toEqual([["Cu", 1]]);
    expect(orderedCrystal(fixture("potassium-dihydrogen-phosphate")).crystal.identified.number).toBe(43);
    const vacant = cubic([atom("Fe", "Fe", [0, 0, 0], 0.9)]);
    expect(orderedCrystal(vacant).notes.join()).toContain("not decided: Fe");
  });
});

import { readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { decodeCif, readCif } from "../../lib/cif/index.ts";
import {
  type AtomSite,
  apply3,
  type Crystal,
  compareStructures,
  crystalFromBlock,
  crystalOf,
  metricOf,
  type Vec3,
} from "../../lib/structure/index.ts";
import { operationKey, parseTransformation, reduce, spaceGroup, transformOperation } from "../../lib/symmetry/index.ts";
import { CORPUS, CORPUS_FILES } from "../support/corpus.ts";
import { atom, fixture } from "../support/crystals.ts";
import { disguised, randomNumbers, randomStructure } from "../support/random-structures.ts";
import { retold } from "../support/retold.ts";

const rows = ({ sites }: Crystal): AtomSite[] =>
  sites.map(({ images: _, alsoListedAs: __, sharesPositionOf: ___, symmetry, ...site }) => ({
    ...site,
    position: symmetry.point,
  }));

/** The crystal with other rows. */
const withRows = ({ name, metric, group, tolerance }: Crystal, sites: readonly AtomSite[]): Crystal =>
  crystalOf({ name, metric, group, sites, tolerance });

/** The mirror image of a list of atoms in P 1. */
const mirrored = (crystal: Crystal): Crystal =>
  withRows(
    crystal,
    rows(crystal).map((r) => ({ ...r, position: r.position.map((e) => -e) as unknown as Vec3 })),
  );

const PLAIN = { multiple: [1, 1, 1], noise: 0, steps: 3 } as const;

describe("a structure and the list of all its atoms in another cell", () => {
  for (let first = 1; first <= 230; first += 46) {
    it(`are the same: types ${first} to ${first + 45}`, { timeout: 120_000 }, () => {
      for (let number = first; number < first + 46; number++) {
        const random = randomNumbers(number * 31);
        const crystal = randomStructure(number, random);
        const { answer } = compareStructures(crystal, disguised(crystal, PLAIN, random));
        expect([number, answer.verdict, answer.hand]).toEqual([number, "same", "same"]);
        expect(answer.displacement!.largest).toBeLessThan(1e-6);
        expect(answer.strain!.largest).toBeLessThan(1e-9);
        expect(answer.pairs.reduce((s, p) => s + p.atoms, 0)).toBe(answer.displacement!.atoms);
        expect(answer.alone).toEqual({ first: [], second: [] });
      }
    });
  }

  it("are the same in a cell several times as large, either way round", () => {
    for (const number of [1, 4, 14, 19, 62, 88, 146, 167, 186, 205, 227]) {
      const random = randomNumbers(number * 17);
      const crystal = randomStructure(number, random);
      const larger = disguised(crystal, { multiple: [2, 1, 2], noise: 0, steps: 2 }, random);
      for (const [a, b] of [
        [crystal, larger],
        [larger, crystal],
      ] as const) {
        const { answer } = compareStructures(a, b);
        expect([number, answer.verdict]).toEqual([number, "same"]);
        expect(answer.displacement!.largest).toBeLessThan(1e-6);
      }
      expect(compareStructures(crystal, larger).answer.second.multiple).toBe(4);
    }
  });

  it("differ by the displacements of the atoms, and by no more", () => {
    for (const number of [2, 15, 61, 152, 198, 225]) {
      const random = randomNumbers(number * 13);
      const crystal = randomStructure(number, random);
      const { answer } = compareStructures(crystal, disguised(crystal, { ...PLAIN, noise: 0.05 }, random));
      expect([number, answer.verdict]).toEqual([number, "same"]);
      expect(answer.displacement!.largest).toBeLessThan(0.05 * Math.sqrt(3) * 1.5);
      expect(answer.displacement!.largest).toBeGreaterThan(0.02);
    }
  });
});

describe("the transformation", () => {
  it("carries the atoms of the second onto those of the first", () => {
    const [first, second] = [fixture("gypsum-c2c"), fixture("gypsum-i2a")];
    const { transformation } = compareStructures(first, second).answer;
    const { P, p } = parseTransformation(`${transformation!.P};${transformation!.p}`);
    const points = first.sites.flatMap((s) => s.images.map((i) => i.position));
    for (const { position } of second.sites.flatMap((s) => s.images)) {
      const at = apply3(P.n, position).map((e, i) => e / P.d + p.n[i]! / p.d);
      const distance = (x: Vec3) => Math.hypot(...x.map((e, i) => e - at[i]! - Math.round(e - at[i]!)));
      expect(Math.min(...points.map(distance))).toBeLessThan(1e-4);
    }
  });

  it("is exact where the two groups fix the origin", () => {
    const { transformation } = compareStructures(fixture("scheelite-origin-1"), fixture("scheelite")).answer;
    expect(transformation!.p).toMatch(/^[-\d/]+,[-\d/]+,[-\d/]+$/);
  });

  it("carries one group onto the other where both files give operations", { timeout: 60_000 }, () => {
    for (let number = 2; number <= 230; number += 3) {
      const random = randomNumbers(number * 101);
      const crystal = randomStructure(number, random);
      const second = retold(crystal, random);
      const { answer, match } = compareStructures(crystal, second);
      expect([number, answer.verdict, match!.exact === null]).toEqual([number, "same", false]);
      const change = { P: match!.P, p: match!.exact!.origin };
      const moved = crystal.group.operations.map((a) => operationKey(reduce(transformOperation(a, change)!)));
      const theirs = new Set(second.group.operations.map(operationKey));
      expect([number, moved.every((key) => theirs.has(key))]).toEqual([number, true]);
      expect(answer.displacement!.largest).toBeLessThan(1e-6);
    }
  });

  it("is the identity for a structure and itself", () => {
    for (const name of ["calcite", "gypsum", "zincite", "urea", "albite"]) {
      const { transformation, displacement } = compareStructures(fixture(name), fixture(name)).answer;
      expect([name, transformation!.P, transformation!.p]).toEqual([name, "a,b,c", "0,0,0"]);
      expect(displacement!.largest).toBeLessThan(1e-9);
    }
  });
});

describe("the hand", () => {
  it("of the mirror image of a chiral structure is the other", () => {
    for (const number of [1, 4, 19, 76, 92, 152, 198, 212]) {
      const random = randomNumbers(number * 7);
      const crystal = randomStructure(number, random);
      const { answer } = compareStructures(crystal, mirrored(disguised(crystal, PLAIN, random)));
      expect([number, answer.verdict, answer.hand]).toEqual([number, "same", "other"]);
    }
  });

  it("of an achiral structure does not change in a mirror", () => {
    for (const number of [2, 7, 33, 82, 161, 215]) {
      const random = randomNumbers(number * 7);
      const crystal = randomStructure(number, random);
      const { answer } = compareStructures(crystal, mirrored(disguised(crystal, PLAIN, random)));
      expect([number, answer.verdict, answer.hand]).toEqual([number, "same", "same"]);
    }
  });
});

describe("structures that are not the same", () => {
  it("are told apart by composition, lattice and positions", () => {
    const reason = (a: string, b: string) => compareStructures(fixture(a), fixture(b)).answer.disagreement;
    expect(reason("siderite", "calcite")).toBe("composition");
    expect(reason("aragonite", "calcite")).toBe("lattice");
    const rutile = fixture("rutile");
    const moved = rows(rutile).map((r) => (r.element === "O" ? { ...r, position: [0.2, 0.2, 0] as Vec3 } : r));
    const { answer } = compareStructures(rutile, withRows(rutile, moved));
    expect([answer.verdict, answer.disagreement]).toEqual(["different", "positions"]);
    expect(answer.nearest!.largest).toBeGreaterThan(0.3);
  });

  it("are told apart by elements on the same places", () => {
    const metric = metricOf({ a: 4, b: 4, c: 8, alpha: 90, beta: 90, gamma: 90 });
    const chain = (elements: string) =>
      crystalOf({
        name: "",
        metric,
        group: spaceGroup([]),
        sites: [...elements].map((e, i) => atom(`${e}${i}`, e, [0, 0, i / 8])),
      });
    const { answer } = compareStructures(chain("CCCNNNOO"), chain("CNCNCNOO"));
    expect([answer.verdict, answer.disagreement]).toEqual(["different", "elements"]);
  });

  it("do not let two atoms share one partner", () => {
    const metric = metricOf({ a: 5, b: 5, c: 5, alpha: 90, beta: 90, gamma: 90 });
    const row = (...x: number[]) =>
      crystalOf({
        name: "",
        metric,
        group: spaceGroup([]),
        sites: x.map((e, i) => atom(`O${i}`, "O", [e / 5, 0, 0])),
      });
    const { answer } = compareStructures(row(0.2, 0.5), row(0.35, 3));
    expect([answer.verdict, answer.disagreement]).toEqual(["different", "positions"]);
  });

  it("are told apart by a strain beyond the limit, which is given", () => {
    const { a, b, c, alpha, beta, gamma } = fixture("calcite").metric.cell;
    const calcite = fixture("calcite");
    const metric = metricOf({ a, b, c: 1.05 * c, alpha, beta, gamma });
    const stretched = crystalOf({ name: "", metric, group: calcite.group, sites: rows(calcite) });
    const { answer } = compareStructures(calcite, stretched);
    expect(answer.disagreement).toBe("lattice");
    expect(answer.strain!.largest).toBeCloseTo(0.05, 6);
    const wider = compareStructures(calcite, stretched, { strain: 0.06 }).answer;
    expect([wider.verdict, wider.displacement!.largest < 1e-6]).toEqual(["same", true]);
  });

  it("are told apart by occupancies", () => {
    const calcite = fixture("calcite");
    const less = rows(calcite).map((r) => (r.element === "Ca" ? { ...r, occupancy: 0.7 } : r));
    const { answer } = compareStructures(calcite, withRows(calcite, less));
    expect([answer.verdict, answer.disagreement]).toEqual(["different", "occupancy"]);
    expect(answer.largestOccupancyDifference).toBeCloseTo(0.3, 9);
  });

  it("are the same but for atoms that one file lacks", () => {
    const gypsum = fixture("gypsum");
    const bare = withRows(
      gypsum,
      rows(gypsum).filter((r) => r.element !== "H"),
    );
    const { answer } = compareStructures(gypsum, bare);
    expect(answer.verdict).toBe("incomplete");
    expect(answer.alone.first.map((x) => x.site.element)).toEqual(["H", "H"]);
    expect(answer.alone.second).toEqual([]);
    const back = compareStructures(bare, gypsum).answer;
    expect([back.verdict, back.alone.second.length]).toEqual(["incomplete", 2]);
  });

  it("may share sites: two rows of one element at one position count together", () => {
    const calcite = fixture("calcite");
    const split = rows(calcite).flatMap((r) =>
      r.element === "Ca"
        ? [
            { ...r, occupancy: 0.6, charge: 2 },
            { ...r, label: "Ca2", occupancy: 0.4, charge: 1 },
          ]
        : [r],
    );
    const { answer } = compareStructures(withRows(calcite, split), calcite);
    expect([answer.verdict, answer.largestOccupancyDifference]).toEqual(["same", 0]);
    expect(answer.pairs[0]!.first.label).toBe("Ca1+Ca2");
  });
});

describe("isotypic structures", () => {
  it("are found with the elements that stand for each other", () => {
    const { answer } = compareStructures(fixture("magnesite"), fixture("calcite"), { isotypic: true });
    expect(answer.verdict).toBe("isotypic");
    expect(answer.elements).toContainEqual({ first: "Mg", second: "Ca" });
    const celestine = compareStructures(fixture("celestine"), fixture("barite"), { isotypic: true }).answer;
    expect([celestine.verdict, celestine.scale < 1]).toEqual(["isotypic", true]);
  });

  it("are not those of another arrangement or composition", () => {
    const verdict = (a: string, b: string) =>
      compareStructures(fixture(a), fixture(b), { isotypic: true }).answer.verdict;
    expect(verdict("halite", "caesium-chloride")).toBe("different");
    expect(verdict("rutile", "fluorite")).toBe("different");
    expect(verdict("calcite", "halite")).toBe("different");
  });
});

/** Pairs of files of the corpus that hold one structure, found by comparing all files of like content. */
const SAME = [
  // asymmetric unit, and all atoms in P 1 from another calculation
  ["journal/AFG-2.cif", "journal/AFG.cif"],
  // two temperatures
  ["journal/2155883.cif", "journal/2155884.cif"],
] as const;

if (CORPUS_FILES.length > 0) {
  describe("files of the corpus", () => {
    const crystal = (path: string) => {
      const { blocks } = readCif(decodeCif(readFileSync(join(CORPUS, path))).text).value;
      return crystalFromBlock(blocks[0]!);
    };

    it.each(SAME)("%s and %s hold one structure, either way round", (a, b) => {
      const [first, second] = [crystal(a), crystal(b)];
      expect(compareStructures(first, second).answer.verdict).toBe("same");
      const back = compareStructures(second, first).answer;
      expect(back.verdict).toBe("same");
      expect(back.displacement!.largest).toBeLessThan(0.3);
    });

    it("has a structure whose subcell is another file", () => {
      const { answer } = compareStructures(crystal("journal/2155881.cif"), crystal("journal/2155883.cif"));
      expect([answer.verdict, answer.transformation!.P]).toEqual(["incomplete", "a,b,1/6c"]);
    });
  });
}

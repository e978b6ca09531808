import { readdirSync } from "node:fs";
import { describe, expect, it } from "vitest";
import {
  type Crystal,
  composeAnswer,
  composedCrystal,
  nearestDistance,
  parseSiteTable,
  sitesAnswer,
} from "../../lib/structure/index.ts";
import { reverse, settingsOf } from "../../lib/symmetry/index.ts";
import { fixture, inSetting } from "../support/crystals.ts";
import { problemOf } from "../support/problem-of.ts";
import { randomNumbers, randomStructure } from "../support/random-structures.ts";
import { type TableStyle, tableOf } from "../support/site-tables.ts";

const composed = (text: string): Crystal => composedCrystal(parseSiteTable(text));
const STYLES: readonly TableStyle[] = ["coordinates", "letters", "parameters"];

/** Every image of every site lies where it should, and nothing else is there. */
function expectSame(found: Crystal, meant: Crystal, within: number) {
  const operations = ({ identified }: Crystal) => [...identified.summary.operations].sort();
  expect(operations(found)).toEqual(operations(meant));
  expect(sitesAnswer(found).sites.map((s) => [s.label, s.multiplicity, s.wyckoff, s.siteSymmetry])).toEqual(
    sitesAnswer(meant).sites.map((s) => [s.label, s.multiplicity, s.wyckoff, s.siteSymmetry]),
  );
  found.sites.forEach((site, i) => {
    const { images, occupancy, element, charge } = meant.sites[i]!;
    expect([site.occupancy, site.element, site.charge]).toEqual([occupancy, element, charge]);
    const distances = site.images.map((a) =>
      Math.min(...images.map((b) => nearestDistance(meant.metric, a.position, b.position))),
    );
    expect(Math.max(...distances)).toBeLessThan(within);
  });
}

describe("a structure composed from a list of its sites", () => {
  const names = readdirSync("fixtures").flatMap((f) => (f.endsWith(".cif") ? [f.slice(0, -4)] : []));
  it.each(names)("is the structure, %s", (name) => {
    const crystal = fixture(name);
    for (const style of STYLES) expectSame(composed(tableOf(crystal, style)), crystal, 1e-5);
  });

  it.each(Array.from({ length: 230 }, (_, i) => i + 1))("is the structure in any setting, type %i", (number) => {
    const settings = settingsOf(number);
    const { toReference } = settings[(7 * number) % settings.length]!;
    const crystal = inSetting(randomStructure(number, randomNumbers(number + 500)), reverse(toReference))!;
    expectSame(composed(tableOf(crystal, STYLES[number % 3]!)), crystal, 1e-5);
  });
});

const CALCITE = "group R -3 c\ncell a=4.99 c=17.06\n";
const RUTILE = "group P 42/m n m\ncell a=4.593 c=2.959\n";

describe("positions and coordinates", () => {
  it("may be another point of the same position", () => {
    const first = composed(`${RUTILE}Ti 2a\nO 4f x=0.305`);
    for (const o of ["O 4f 0.305,0.305,0", "O 4f -0.305 -0.305 1", "O 4f 0.805,0.195,0.5", "O f 1-x,1-x,0 x=.305"]) {
      const other = composed(`${RUTILE}Ti 2a\n${o}`);
      const { images } = first.sites[1]!;
      const near = other.sites[1]!.images.map((a) =>
        Math.min(...images.map((b) => nearestDistance(first.metric, a.position, b.position))),
      );
      expect(near.length).toBe(4);
      expect(Math.max(...near)).toBeLessThan(1e-9);
    }
  });

  it("tell the letter where it is left out, and are moved onto it with a note", () => {
    const crystal = composed("group P 63/m m c\ncell a=3.16 c=12.3\nMo 0.333 0.667 0.25\nS 0.3333 0.6667 0.621");
    expect(sitesAnswer(crystal).sites.map((s) => s.referencePosition)).toEqual(["2c", "4f"]);
    expect(crystal.sites[0]!.symmetry.point).toEqual([1 / 3, 2 / 3, 0.25]);
    expect(crystal.notes[1]).toBe("moved onto their positions: Mo by 0.002 Å");
  });

  it("keep to a less special position that is named, even next to a more special one", () => {
    const line = "O 36f 0.2568 0.001 0.25"; // 0.004 angstrom from 18e
    expect(sitesAnswer(composed(`${CALCITE}${line}`)).sites[0]!.wyckoff).toBe("f");
    expect(sitesAnswer(composed(`${CALCITE}O 0.2568 0.001 0.25`)).sites[0]!.wyckoff).toBe("e");
  });

  it("carry s.u. where they may move", () => {
    const { sites } = composed(`${RUTILE}Ti 0.0000(1) 0 0\nO1 4f x=0.3053(2)\nN 8i 0.1(1) 0.32(3) 0.0(1)`);
    expect(sites.map((s) => s.su)).toEqual([
      [null, null, null],
      [0.0002, 0.0002, null],
      [0.1, 0.03, null],
    ]);
  });

  it("have a sum of squares for s.u. of combined parameters", () => {
    const { sites } = composed(
      "group P 3 m 1\ncell a=5 c=6\nO 3d x,-x,z x=.1(3) z=.2(4)\nS 3d (2x,x,z) x=0.15(1) z=0.7",
    );
    expect(sites[0]!.su).toEqual([0.3, 0.3, 0.4]);
    expect(sites[1]!.su).toEqual([0.02, 0.01, null]);
  });
});

describe("what a name leaves open", () => {
  it.each([
    ["the letter with its coordinates", "Zr 4a 0,0,0\nSi 4b", ":1"],
    ["the same in the other origin", "Zr 4a 0 3/4 1/8\nSi 4b", "reference"],
  ])("is settled by %s", (_, sites, setting) => {
    const crystal = composed(`group I 41/a m d\ncell a=6.607 c=5.982\n${sites}`);
    expect(crystal.identified.summary.settingName).toBe(setting);
    expect(crystal.notes[0]).toContain("cell and sites fit no other");
  });

  it("is settled by distances where letters alone cannot", () => {
    // scheelite type: oxygen of wulfenite about the origin on -4 and about the centre of symmetry
    for (const [oxygen, setting] of [
      ["0.2352 0.1366 0.0811", ":1"],
      ["0.2352 -0.1134 -0.0439", "reference"],
    ]) {
      const crystal = composed(`group I 41/a\ncell a=5.433 c=12.11\nPb 4b\nMo 4a\nO 16f ${oxygen}`);
      expect(crystal.identified.summary.settingName).toBe(setting);
      expect(crystal.notes[0]).toContain("since about the other origin atoms are too near");
    }
  });

  it("is no question of distances where axes are open", () => {
    const random = randomStructure(60, randomNumbers(3060));
    const crystal = composed(tableOf(random, "parameters", "60")); // only in other axes all distances would be long
    expect(crystal.identified.summary.settingName).toBe("reference");
    expect(composeAnswer(crystal).notes[0]).toContain("nearer than atoms come");
  });

  it("is settled by the cell", () => {
    const monoclinic = (cell: string) => composed(`group P 21/c\ncell ${cell}\nXe 2a`).identified.summary.settingName;
    expect(monoclinic("a=5 b=6 c=7 beta=100")).toBe("reference");
    const rhombohedral = composed("group R -3 c\ncell a=6.37 alpha=46.1\nCa 2b\nC 2a");
    expect(rhombohedral.identified.summary.settingName).toBe(":R");
  });

  it("is the most usual one where nothing decides, which is told", () => {
    const { notes, identified } = composed("group 227\ncell a=3.567\nC 8a");
    expect(identified.summary.settingName).toBe("reference");
    expect(notes[0]).toContain("the most usual of 2 that cell and sites fit");
  });
});

describe("a table is refused", () => {
  it.each([
    [`${CALCITE}O 18e 0.2568,0,0.1`, "position-unlike", "O 18e 0.2568,0,0.1", 6],
    [`${CALCITE}O 36f x=0.25 y=0 z=1/4`, "position-unlike", "x=0.25", 0],
    [`${CALCITE}O 36f 0.2568,0,0.25`, "position-unlike", "0.2568", 0],
    [`${CALCITE}O 18e`, "parameter-missing", "18e", 0],
    [`${CALCITE}O 18e x=0.2568 y=0`, "parameter-idle", "x=0.2568", 0],
    [`${CALCITE}O 18e x,0,1/4`, "parameter-missing", "x,0,1/4", 0],
    [`${CALCITE}O 0.25,0,1/4 x=0.25`, "parameter-idle", "0.25,0,1/4", 0],
    [`${CALCITE}Ca 12b`, "multiplicity-wrong", "12b", 0],
    [`${CALCITE}Ca 6g`, "position-unknown", "6g", 0],
    [`${CALCITE}Ca`, "position-unknown", "Ca", 0],
    [`${CALCITE}M1 6b`, "element-unknown", "M1 6b", 0],
    [`${CALCITE}Ca Jj 6b`, "element-unknown", "Jj", 0],
    [`${CALCITE}Ca 6b occ=1.2`, "occupancy-impossible", "occ=1.2", 0],
    [`${CALCITE}Ca 6b occ=0`, "occupancy-impossible", "occ=0", 0],
    [`${CALCITE}Ca 6b occ=0.7\nMg 0,0,0.5 occ=0.4`, "position-overfull", "Mg 0,0,0.5", 0],
    [`${CALCITE}Ca 6b occ=0.5\nCa2 0,0,0.5 occ=0.5`, "position-overfull", "Ca2 0,0,0.5", 0],
    ["group R -3 q\ncell a=4.99 c=17.06\nCa 6b", "group-name-unreadable", "q", 0],
    ["group hall -Q 2\ncell a=4.99 c=17.06\nCa 6b", "hall-unreadable", "Q", 0],
    ["group R -3 c\ncell a=4.99 c=17.06 gamma=119\nCa 6b", "cell-contradiction", "gamma", 0],
    ["group P 21/c\ncell a=4.99 c=17.06\nCa 2b", "cell-incomplete", "a=4.99", 0],
  ])("%j: %s", (text, code, at, offset) => {
    const problem = problemOf(() => composed(text));
    expect([problem.code, problem.span?.start]).toEqual([code, text.indexOf(at) + offset]);
    expect(problem.hint).not.toBe("");
  });

  it("tells the position that the coordinates are on and the nearest point of the one named", () => {
    const { message } = problemOf(() => composed(`${CALCITE}O 18e 0.2568,0,0.24`));
    expect(message).toBe(
      "O at 0.2568,0,0.24 is not on 18e but on 36f (site symmetry 1); the nearest point of 18e is 0.2568,0,0.25, 0.17 Å away",
    );
  });

  it("tells what is wrong in the axes that the cell fits", () => {
    expect(problemOf(() => composed("group R -3 c\ncell a=6.37 alpha=46.1\nO 18e x=0.25")).message).toContain(
      "in the cell of the reference setting, but 6 points in this cell, not 18",
    );
    expect(problemOf(() => composed("group R -3 c\ncell a=6.37 gamma=91 alpha=90\nO 6e x=0.25")).code).toBe(
      "cell-contradiction",
    );
  });

  it("tells the multiplicity of another cell", () => {
    const { message } = problemOf(() => composed("group R -3 c:R\ncell a=6.37 alpha=46.1\nCa 6b"));
    expect(message).toContain("has in the cell of the reference setting, but 2 points in this cell, not 6");
  });
});

describe("what is told of a composed structure", () => {
  it("formula, Z, mass, density and shortest distance of nitratine", () => {
    // G. L. Paul, A. W. Pryor, Acta Crystallographica B27 (1971) 2700; density 2.26 in mineralogical handbooks (from memory)
    const { answer, notes } = composeAnswer(composed("group R -3 c\ncell a=5.07 c=16.82\nNa 6b\nN 6a\nO 18e x=0.245"));
    const { contents, shortest, higher } = answer;
    expect([contents.sum, contents.formula, contents.z]).toEqual(["N Na O3", "NaNO3", 6]);
    expect(contents.weight).toBeCloseTo(84.995, 2);
    expect(contents.density).toBeCloseTo(2.26, 2);
    expect(shortest!.labels).toEqual(["N", "O"]);
    expect(shortest!.distance).toBeCloseTo(5.07 * 0.245, 9);
    expect([higher, notes]).toEqual([null, []]);
  });

  it("a formula that mixed positions leave", () => {
    const text = "group R -3 c\ncell a=4.98 c=17\nCa 6b occ=0.95\nMg 6b occ=0.05\nC 6a\nO 18e x=0.2568";
    const { contents } = composeAnswer(composed(text)).answer;
    expect([contents.formula, contents.z]).toEqual(["C Ca0.95 Mg0.05 O3", 6]);
  });

  it("atoms nearer than atoms come", () => {
    const { notes } = composeAnswer(composed(`${CALCITE}Ca 6b\nC 6a\nO 18e x=0.15`));
    expect(notes[0]).toMatch(/^nearer than atoms come: C-O 0\.75 Å; /);
  });

  it("no distance between atoms that take turns", () => {
    const { answer, notes } = composeAnswer(composed("group P m -3 m\ncell a=3.9\nN 1b\nH 8g x=0.35 occ=0.5\nCl 1a"));
    expect(answer.shortest!.labels).toEqual(["H", "N"]); // H-H across a cube edge is 1.17, but never there together
    expect(notes).toEqual([]);
  });

  it("symmetry that the sites have beyond the group", () => {
    const { answer, notes } = composeAnswer(
      composed("group P 4/m m m\ncell a=3.905 c=3.905\nSr 1a\nTi 1d\nO1 1c\nO2 2e"),
    );
    expect(answer.higher).toEqual({ number: 221, hermannMauguin: "P m -3 m", index: 3 });
    expect(notes[0]).toContain("P m -3 m (No. 221), 3 times that of the group named");
  });
});

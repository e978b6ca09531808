import { describe, expect, it } from "vitest";
import {
  type CrystalSite,
  completedCell,
  nearestDistance,
  pointsAnswer,
  sitesAnswer,
  type Vec3,
} from "../../lib/structure/index.ts";
import { identifyGroup, namedGroup, parsePoint } from "../../lib/symmetry/index.ts";
import { fixture } from "../support/crystals.ts";
import { randomNumbers, randomStructure } from "../support/random-structures.ts";

const identifiedBy = (name: string) => identifyGroup(namedGroup(name).settings[0].group);
const ask = (name: string, points: readonly string[]) =>
  pointsAnswer({ identified: identifiedBy(name), points: points.map(parsePoint), near: null, images: false });

describe("points of a group", () => {
  it.each([
    ["62", "0.1,1/4,0.3", "4c", ".m.", "Cs", "x,1/4,z", "u11,u22,u33,0,u13,0"],
    ["62", "0,0,0", "4a", "-1", "Ci", "0,0,0", "u11,u22,u33,u12,u13,u23"],
    ["P n a m", "0.1,0.3,1/4", "4c", "..m", "Cs", "x,y,1/4", "u11,u22,u33,u12,0,0"],
    ["F m -3 m", "1/4,1/4,1/4", "8c", "-43m", "Td", "1/4,1/4,1/4", "u11,u11,u11,0,0,0"],
    ["P m m m", "0.1,0.2,0.3", "8A", "1", "C1", "x,y,z", "u11,u22,u33,u12,u13,u23"],
    ["R -3 c:R", "0.1,0.4,1/4", "18e", ".2", "C2", "x,-x+1/2,1/4", "u11,u11,u33,u12,u13,u13"],
  ])("No. %s at %s: %s, %s (%s)", (name, point, position, symbol, schoenflies, constraint, adp) => {
    const [site] = ask(name, [point]).sites;
    expect([site!.referencePosition, site!.siteSymmetry, site!.schoenflies, site!.constraint, site!.adp]).toEqual([
      position,
      symbol,
      schoenflies,
      constraint,
      adp,
    ]);
    expect([site!.label, site!.shift]).toEqual([point, 0]);
  });

  it("are taken at their word without a cell; what rounded decimals may mean is told", () => {
    const { sites, notes } = ask("194", ["0.333,0.667,0.25", "1/3,2/3,1/4", "0.3334,0.6666,0.2", "0.31,0.67,0.1"]);
    expect(sites.map((s) => s.wyckoff)).toEqual(["h", "c", "k", "l"]);
    expect(notes.map((n) => n.split(" ")[0])).toEqual(["0.333,0.667,0.25", "0.3334,0.6666,0.2"]);
    expect(notes[0]).toContain("1/3,2/3,0.25 is meant: 2c, site symmetry -6m2");
  });

  it("are moved onto special positions within the tolerance of a cell", () => {
    const identified = identifiedBy("194");
    const metric = completedCell({ a: 3.16, c: 12.3 }, identified.group, { groupName: "", spans: {} });
    const points = ["0.333,0.667,0.25"].map(parsePoint);
    const near = (tolerance: number) =>
      pointsAnswer({ identified, points, near: { metric, tolerance }, images: true }).sites[0]!;
    expect(near(0.05).wyckoff).toBe("c");
    expect(near(0.05).shift).toBeCloseTo(0.0018, 4);
    expect(near(0.05).images!.map((i) => i.coordinates)).toEqual(["0.333333,0.666667,0.25", "0.666667,0.333333,0.75"]);
    expect(near(0.001).wyckoff).toBe("h");
  });

  it("have as many different images as they say, each made by its operation", () => {
    for (const number of [2, 15, 62, 88, 122, 148, 167, 194, 205, 227, 230]) {
      const crystal = randomStructure(number, randomNumbers(number));
      const { identified } = crystal;
      const points = ["0.1,0.2,0.3", "0,0,0", "1/4,1/4,1/4", "1/8,1/8,1/8", "1/3,2/3,1/4"].map(parsePoint);
      for (const site of pointsAnswer({ identified, points, near: null, images: true }).sites) {
        expect(site.images!.length).toBe(site.multiplicity);
        const places = site.images!.map((i) => i.position);
        places.forEach((a, i) => {
          expect(places.slice(i + 1).every((b) => nearestDistance(crystal.metric, a, b) > 1e-3)).toBe(true);
        });
        expect(new Set(site.images!.map((i) => i.operation)).size).toBe(site.multiplicity);
      }
    }
  });

  it("say of the atoms of a file what the file says", () => {
    for (const name of ["calcite", "gypsum-i2a", "niter", "scheelite-origin-1", "almandine"]) {
      const { identified, metric, sites, tolerance } = fixture(name);
      const points = sites.map((s) => parsePoint(decimals(s)));
      const found = pointsAnswer({ identified, points, near: { metric, tolerance }, images: false }).sites;
      const file = sitesAnswer(fixture(name)).sites;
      expect(found.map(({ label: _, element: __, occupancy: ___, snapped, ...rest }) => rest)).toEqual(
        file.map(({ label: _, element: __, occupancy: ___, snapped, ...rest }) => rest),
      );
    }
  });
});

const decimals = ({ position }: CrystalSite): string => (position as Vec3).map(String).join(",");

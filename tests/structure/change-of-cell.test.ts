import { describe, expect, it } from "vitest";
import { determinant, IDENTITY, type IntMat3, inverseRatMat, ratMat3, ratVec3 } from "../../lib/algebra/index.ts";
import {
  apply3,
  type Crystal,
  cellContents,
  changeOfCell,
  crystalOf,
  expandedAtoms,
  formatCellRequest,
  nearestDistance,
  parseCellRequest,
  requestedCell,
  searchSymmetry,
  type Vec3,
} from "../../lib/structure/index.ts";
import {
  formatTransformation,
  IDENTITY_OPERATION,
  identify,
  type Operation,
  parseTransformation,
  reduce,
  spaceGroup,
  transformOperation,
} from "../../lib/symmetry/index.ts";
import { fixture } from "../support/crystals.ts";
import { problemOf } from "../support/problem-of.ts";
import { randomNumbers, randomStructure } from "../support/random-structures.ts";

const types = Array.from({ length: 230 }, (_, i) => i + 1);

function densities(crystal: Crystal): [string, number][] {
  return [...cellContents(crystal.sites)]
    .map(([e, n]): [string, number] => [e, n / crystal.metric.volume])
    .sort((a, b) => a[0].localeCompare(b[0]));
}

function expectSameComposition(a: Crystal, b: Crystal) {
  const [p, q] = [densities(a), densities(b)];
  expect(q.map(([e]) => e)).toEqual(p.map(([e]) => e));
  q.forEach(([, density], i) => {
    expect(density).toBeCloseTo(p[i]![1], 8);
  });
}

/** The group that the search finds in a crystal written without symmetry, as far as its cell can hold it. */
function foundGroup(crystal: Crystal) {
  const { folded, exact } = searchSymmetry(withoutSymmetry(crystal), { tolerance: 0.02 });
  const t = { P: inverseRatMat(folded.basis), p: { n: [0, 0, 0] as const, d: 1 } };
  const lattice = [0, 1, 2].map((j): Operation => {
    const { n, d } = folded.basis;
    return { W: IDENTITY, w: ratVec3([n[j]!, n[3 + j]!, n[6 + j]!], d) };
  });
  return spaceGroup([...exact.operations.flatMap((a) => transformOperation(a, t) ?? []), ...lattice].map(reduce));
}

function withoutSymmetry(crystal: Crystal): Crystal {
  const sites = expandedAtoms(crystal).map((a, i) => ({
    ...crystal.sites[a.site]!,
    label: `X${i}`,
    position: a.position,
  }));
  return crystalOfSites(crystal, sites);
}

function crystalOfSites(crystal: Crystal, sites: Crystal["sites"]): Crystal {
  return crystalOf({ name: "bare", metric: crystal.metric, group: spaceGroup([IDENTITY_OPERATION]), sites });
}

describe("a crystal in a supercell", () => {
  it.each(types)("keeps density, composition and the operations its cell can hold, type %i", (number) => {
    const random = randomNumbers(number + 900);
    const crystal = randomStructure(number, random);
    const small = crystal.group.operations.length > 48;
    const P = (
      [
        [2, 0, 0, 0, 1, 0, 0, 0, 1],
        [1, 1, 0, -1, 1, 0, 0, 0, 1],
        [1, 0, 0, 0, 1, 0, 0, 0, 2],
      ] as IntMat3[]
    )[number % 3]!;
    const t = { P: ratMat3(small ? [1, 0, 0, 0, 1, 0, 0, 0, 2] : P), p: { n: [1, 0, 2] as const, d: 8 } };
    const { crystal: larger, rotations } = changeOfCell(crystal, t);
    expect(larger.metric.volume / crystal.metric.volume).toBeCloseTo(determinant(t.P.n), 8);
    expectSameComposition(crystal, larger);
    // as many translations per volume
    expect(larger.group.centrings.length).toBe(crystal.group.centrings.length * determinant(t.P.n));
    expect(larger.group.representatives.length).toBe(rotations.after);
    const found = foundGroup(larger);
    expect(found.operations.length).toBe(larger.group.operations.length);
    expect(identify(found.operations).number).toBe(identify(larger.group.operations).number);
  });

  it("is the same structure as the atoms expanded without symmetry", () => {
    for (const name of ["calcite", "urea", "rutile", "halite", "gypsum", "benzene"]) {
      const crystal = fixture(name);
      const t = parseTransformation("2a,b-a,c+a;1/8,0,1/3");
      const kept = expandedAtoms(changeOfCell(crystal, t).crystal);
      const plain = expandedAtoms(crystal, { transformation: t });
      const { metric } = changeOfCell(crystal, t).crystal;
      expect(plain.length).toBe(kept.length);
      for (const a of plain) {
        const element = crystal.sites[a.site]!.element;
        const twin = kept.find((b) => nearestDistance(metric, a.position, b.position) < 1e-4);
        expect(twin).toBeDefined();
        expect(changeOfCell(crystal, t).crystal.sites[twin!.site]!.element).toBe(element);
      }
    }
  });
});

describe("a change of cell", () => {
  it("carries displacement tensors: the mean square along a direction of the crystal stays", () => {
    const crystal = fixture("gypsum-c2c");
    const u = [0.01, 0.02, 0.03, 0.001, 0.006, 0.002] as const;
    const sites = crystal.sites.map((s) => ({
      ...s,
      displacement: { kind: "anisotropic", u, su: [null, null, null, null, null, null] } as const,
    }));
    const given = { ...crystal, sites };
    const t = parseTransformation("a+c,b,-a;0,0,1/4");
    const { crystal: moved } = changeOfCell(given, t);
    expect(moved.sites.length).toBe(given.sites.length);
    const hkl: Vec3 = [1, -2, 3];
    const inNew = [0, 1, 2].map((j) =>
      [0, 1, 2].reduce((s, i) => s + hkl[i]! * t.P.n[3 * i + j]!, 0),
    ) as unknown as Vec3;
    moved.sites.forEach((site, i) => {
      expect(meanSquare(moved, i, inNew)).toBeCloseTo(meanSquare(given, i, hkl), 12);
      expect(site.displacement?.kind).toBe("anisotropic");
    });
  });

  it("goes to the reference setting and to a primitive cell and keeps the type", () => {
    for (const name of ["gypsum-i2a", "forsterite-pbnm", "scheelite-origin-1", "calcite", "spinel", "graphite-2h"]) {
      const crystal = fixture(name);
      for (const kind of ["primitive", "reference"] as const) {
        const { crystal: moved } = changeOfCell(crystal, requestedCell(crystal, { kind }));
        expect(moved.identified.number).toBe(crystal.identified.number);
        if (kind === "reference") expect(moved.identified.isReference).toBe(true);
        else expect(moved.group.centrings.length).toBe(1);
        expectSameComposition(crystal, moved);
      }
    }
  });

  it("leaves a crystal alone where nothing changes", () => {
    const crystal = fixture("calcite");
    expect(changeOfCell(crystal, parseTransformation("a,b,c")).crystal).toBe(crystal);
  });

  it.each([
    ["a,b", "triplet-unreadable"],
    ["2,2", "cell-unreadable"],
    ["1,0,0,0,1,0,1,1,0", "cell-singular"],
    ["b,a,c", "cell-left-handed"],
    ["a/2,b,c", "cell-no-lattice"],
    ["40,40,40", "operations-too-many"],
    ["4000,4000,40", "cell-too-large"],
  ])("refuses %s", (text, code) => {
    expect(
      problemOf(() => changeOfCell(fixture("calcite"), requestedCell(fixture("calcite"), parseCellRequest(text)))).code,
    ).toBe(code);
  });

  it("is asked for in words, multiples, a matrix, or axes", () => {
    const axes = (text: string) => {
      const request = parseCellRequest(text);
      return request.kind === "axes" ? formatTransformation(request.transformation) : request.kind;
    };
    expect(axes("primitive")).toBe("primitive");
    expect(axes("2,2,1")).toBe("2a,2b,c;0,0,0");
    expect(axes("1 1 0 -1 1 0 0 0 1")).toBe("a-b,a+b,c;0,0,0");
    expect(axes("a-b,a+b,c;0,0,1/4")).toBe("a-b,a+b,c;0,0,1/4");
    for (const text of ["reference", "3,1,2", "a-b,a+b,c;0,0,1/4"]) {
      expect(parseCellRequest(formatCellRequest(parseCellRequest(text)))).toEqual(parseCellRequest(text));
    }
  });
});

/** Mean square displacement along a reciprocal vector, times its length squared. */
function meanSquare({ sites, metric: { toFractional: r } }: Crystal, site: number, h: Vec3): number {
  const d = sites[site]!.displacement;
  if (d?.kind !== "anisotropic") throw new Error("no tensor");
  const [p, q, s] = [0, 1, 2].map((i) => h[i]! * Math.hypot(...r.slice(3 * i, 3 * i + 3))) as [number, number, number];
  const [u11, u22, u33, u12, u13, u23] = d.u;
  return u11 * p * p + u22 * q * q + u33 * s * s + 2 * (u12 * p * q + u13 * p * s + u23 * q * s);
}

describe("the atoms of a range", () => {
  const crystal = fixture("halite");
  const range = [
    [0, 1],
    [0, 1],
    [0, 1],
  ] as const;

  it("hold its ends or not", () => {
    expect(expandedAtoms(crystal).length).toBe(8);
    expect(expandedAtoms(crystal, { range }).length).toBe(27);
    expect(expandedAtoms(crystal, { range, boundary: "out" }).length).toBe(1);
    expect(
      expandedAtoms(crystal, {
        range: [
          [0, 0],
          [0, 1],
          [-0.5, 0.5],
        ],
      }).length,
    ).toBe(9);
  });

  it("lie where their operation and whole cells put the listed atom", () => {
    for (const name of ["calcite", "urea", "gypsum-c2c", "spinel"]) {
      const c = fixture(name);
      const t = requestedCell(c, { kind: "primitive" });
      const back = { transformation: t };
      for (const a of expandedAtoms(c, back)) {
        const { W, w } = c.group.operations[a.operation]!;
        const listed = apply3(W, c.sites[a.site]!.symmetry.point).map((e, i) => e + w.n[i]! / w.d + a.cells[i]!);
        const inOld = apply3(t.P.n.map((e) => e / t.P.d) as never, a.position);
        inOld.forEach((e, i) => {
          expect(e + t.p.n[i]! / t.p.d).toBeCloseTo(listed[i]!, 8);
        });
      }
      expect(expandedAtoms(c, back).length * c.group.centrings.length).toBe(expandedAtoms(c).length);
    }
  });

  it("refuses a range that ends before it begins", () => {
    expect(
      problemOf(() =>
        expandedAtoms(crystal, {
          range: [
            [1, 0],
            [0, 1],
            [0, 1],
          ],
        }),
      ).code,
    ).toBe("range-empty");
  });
});

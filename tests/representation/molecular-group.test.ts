import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { multiply, transpose } from "../../lib/algebra/index.ts";
import {
  cartesianMatrices,
  crystalMatrices,
  decompose,
  type Matrix3,
  molecularGroup,
  nearestEmbedding,
  orthogonalGroup,
  pointGroup,
  subduceBy,
} from "../../lib/representation/index.ts";
import { symbol } from "./bases.ts";

/** Every family up to order 240; prime, even and odd n. */
const AXES = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 12, 13, 15, 16, 30, 60];
const NAMES = [
  ...AXES.flatMap((n) => [`C${n}`, ...(n > 1 ? [`C${n}v`, `C${n}h`, `D${n}`, `D${n}h`, `D${n}d`, `S${2 * n}`] : [])]),
  ..."Cs Ci T Td Th O Oh I Ih C120 C240 D120 C120v".split(" "),
];

/** A rotation by a unit quaternion drawn at random. */
const rotation = fc
  .tuple(...([0, 1, 2, 3] as const).map(() => fc.double({ min: -1, max: 1, noNaN: true })))
  .filter((q) => Math.hypot(...q) > 0.1)
  .map((q): Matrix3 => {
    const [w, x, y, z] = q.map((e) => e / Math.hypot(...q)) as [number, number, number, number];
    return [
      1 - 2 * (y * y + z * z),
      2 * (x * y - w * z),
      2 * (x * z + w * y),
      2 * (x * y + w * z),
      1 - 2 * (x * x + z * z),
      2 * (y * z - w * x),
      2 * (x * z - w * y),
      2 * (y * z + w * x),
      1 - 2 * (x * x + y * y),
    ];
  });

const turned = (list: readonly Matrix3[], R: Matrix3): Matrix3[] =>
  list.map((M) => multiply(multiply(R, M), transpose(R)));

describe.each(NAMES)("the molecular group %s", (name) => {
  const group = molecularGroup(name);
  const { classes, irreps, order } = group;

  it("is recognised by its matrices", () => expect(group.schoenflies).toBe(name));

  it("has orthogonal rows and columns", () => {
    for (const a of irreps) {
      for (const b of irreps) {
        const sum = classes.reduce((t, c, k) => t + c.size * a.characters[k]! * b.characters[k]!, 0);
        expect(Math.abs(sum - (a === b ? order * a.norm : 0))).toBeLessThan(1e-9);
      }
    }
    const inverse = classes.map((c) => {
      const g = c.members[0]!;
      return group.classOf[group.products.indexOf(group.identity, order * g) - order * g]!;
    });
    classes.forEach((c, k) => {
      classes.forEach((_, l) => {
        const sum = irreps.reduce((t, r) => t + (r.characters[k]! * r.characters[l]!) / r.norm, 0);
        const matches = ((k === l ? 1 : 0) + (inverse[k] === l ? 1 : 0)) / 2;
        expect(Math.abs(sum - (order / c.size) * matches)).toBeLessThan(1e-9);
      });
    });
  });

  it("has as many complex species as classes, each with its own label, and squares of dimensions that give the order", () => {
    expect(irreps.reduce((t, r) => t + r.norm, 0)).toBe(classes.length);
    expect(irreps.reduce((t, r) => t + r.dimension ** 2 / r.norm, 0)).toBe(order);
    expect(new Set(irreps.map((r) => r.label)).size).toBe(irreps.length);
    expect(new Set(classes.map((c) => c.name)).size).toBe(classes.length);
  });

  it("has orthogonal matrices that multiply as the table says", () => {
    for (let g = 0; g < order; g += 1 + Math.floor(order / 30)) {
      for (let h = 0; h < order; h++) {
        const product = multiply(group.elements[g]!, group.elements[h]!);
        const expected = group.elements[group.products[order * g + h]!]!;
        expect(Math.max(...product.map((e, k) => Math.abs(e - expected[k]!)))).toBeLessThan(1e-9);
      }
    }
  });
});

describe("names", () => {
  it.each([
    ["S2", "Ci"],
    ["C1h", "Cs"],
    ["S3", "C3h"],
    ["C3i", "S6"],
    ["Vd", "D2d"],
    ["D1", "C2"],
  ])("%s is %s", (alias, name) => expect(molecularGroup(alias).schoenflies).toBe(name));

  it.each(["", "X", "C0", "C3d", "D3v", "S4h", "C4vv", "Cinfv", "constructor"])("%s is refused", (name) => {
    expect(() => molecularGroup(name)).toThrow(RangeError);
  });

  it("a group of order 244 is refused", () => expect(() => molecularGroup("D61h")).toThrow("240"));
});

describe("recognition", () => {
  test("does not depend on the orientation", () => {
    fc.assert(
      fc.property(
        fc.constantFrom("C2v C3v D2d D3d D4h D5h D6h S8 Td Oh Ih D5d C2h D2h Cs".split(" ")),
        rotation,
        (names, R) => {
          for (const name of names) {
            const reference = molecularGroup(name);
            const group = orthogonalGroup(turned(reference.elements, R));
            expect(group.schoenflies).toBe(name);
            expect(group.irreps.map((r) => r.label)).toEqual(reference.irreps.map((r) => r.label));
            const vector = decompose(
              group,
              group.elements.map((M) => M[0] + M[4] + M[8]),
            );
            const expected = decompose(
              reference,
              reference.elements.map((M) => M[0] + M[4] + M[8]),
            );
            // B1 and B2, or B1 to B3, may change places where the orientation decides them
            if (!["C2v", "D2h"].includes(name)) expect(vector).toEqual(expected);
          }
        },
      ),
      { numRuns: 25 },
    );
  });

  test("agrees with the crystallographic table for the matrices of a crystal class in its Cartesian frame", () => {
    fc.assert(
      fc.property(symbol, (s) => {
        const crystal = pointGroup(crystalMatrices(s));
        const molecule = orthogonalGroup(cartesianMatrices(crystal.elements));
        expect(molecule.schoenflies.replace("S6", "C3i")).toBe(crystal.schoenflies);
        expect(molecule.irreps.map((r) => r.label)).toEqual(crystal.irreps.map((r) => r.label));
        for (const r of molecule.irreps.keys()) expect(molecule.irreps[r]!.norm).toBe(crystal.irreps[r]!.norm);
      }),
    );
  });

  it("refuses what is not orthogonal or not a group", () => {
    expect(() => orthogonalGroup([[1, 1e-3, 0, 0, 1, 0, 0, 0, 1]])).toThrow("not orthogonal");
    expect(() => orthogonalGroup([[0, -1, 0, 1, 0, 0, 0, 0, 1]])).toThrow("do not form a group");
  });
});

describe("a molecule on a site", () => {
  it("of Td on a twofold axis splits as published: T2 is A + 2B", () => {
    const td = molecularGroup("Td");
    const site = pointGroup(crystalMatrices("112"));
    const embedded = nearestEmbedding(td, site, cartesianMatrices(site.elements));
    const rows = subduceBy(td, site, embedded).map((row, r) => `${td.irreps[r]!.label} ${row.join(" ")}`);
    expect(rows).toEqual(["A1 1 0", "A2 1 0", "E 2 0", "T1 1 2", "T2 1 2"]);
  });

  it("a few degrees out of orientation is still matched; a wrong group is refused", () => {
    const td = molecularGroup("Td");
    const site = pointGroup(crystalMatrices("-4"));
    const angle = (3 * Math.PI) / 180;
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    const tilted = turned(cartesianMatrices(site.elements), [1, 0, 0, 0, c, -s, 0, s, c]);
    expect(nearestEmbedding(td, site, tilted)).toHaveLength(4);
    const four = pointGroup(crystalMatrices("4"));
    expect(() => nearestEmbedding(td, four, cartesianMatrices(four.elements))).toThrow("no element of Td");
    // Far enough, every element has a neighbour; but a quarter turn has none that multiplies like it.
    expect(() => nearestEmbedding(td, four, cartesianMatrices(four.elements), 2)).toThrow("do not form a group");
  });
});

import { describe, expect, it } from "vitest";
import { IDENTITY, type IntMat3, negate } from "../../lib/algebra/index.ts";
import { type AxisFrame, crystalMatrices, pointGroup, pointGroupTable } from "../../lib/representation/index.ts";
import { carriedFrame, inBasis } from "./bases.ts";

/** Classes with their directions, `2C2' [100] [010]`. */
function classes(rotations: readonly IntMat3[], frame?: AxisFrame): string[] {
  return pointGroup(rotations, frame).classes.map((c) => [c.name, ...c.directions].join(" "));
}

/** Label of the species whose character is +1 on one matrix, among one-dimensional species other than the first. */
function speciesKept(rotations: readonly IntMat3[], W: IntMat3): string[] {
  const group = pointGroup(rotations);
  const at = group.classOf[rotations.findIndex((R) => R.join() === W.join())]!;
  return group.irreps.slice(1).flatMap((r) => (r.dimension === 1 && r.characters[at] === 1 ? [r.label] : []));
}

const X: IntMat3 = [1, 0, 0, 0, -1, 0, 0, 0, -1];
const Y: IntMat3 = [-1, 0, 0, 0, 1, 0, 0, 0, -1];
const Z: IntMat3 = [-1, 0, 0, 0, -1, 0, 0, 0, 1];
const PLUS: IntMat3 = [0, 1, 0, 1, 0, 0, 0, 0, -1]; // about [110]
const MINUS: IntMat3 = [0, -1, 0, -1, 0, 0, 0, 0, -1]; // about [1-10]

describe("axes of labels", () => {
  it("D2: B1 is +1 on the twofold axis along c, B2 along b, B3 along a", () => {
    const list = [IDENTITY, X, Y, Z];
    expect([Z, Y, X].map((W) => speciesKept(list, W))).toEqual([["B1"], ["B2"], ["B3"]]);
  });

  it("D2 with axes along [110], [1-10], [001]: z along c, x along [110]", () => {
    const list = [IDENTITY, PLUS, MINUS, Z];
    expect(pointGroup(list).axes).toMatchObject({ x: [1, 1, 0], y: [-1, 1, 0], z: [0, 0, 1] });
    expect([Z, MINUS, PLUS].map((W) => speciesKept(list, W))).toEqual([["B1"], ["B2"], ["B3"]]);
  });

  it.each<[string, IntMat3, [IntMat3, IntMat3], string]>([
    ["c", Z, [negate(Y), negate(X)], "x along [100], y along [010], z along [001]"],
    ["a", X, [negate(Z), negate(Y)], "x along [010], y along [001], z along [100]"],
    ["b", Y, [negate(X), negate(Z)], "x along [001], y along [100], z along [010]"],
    ["[110]", PLUS, [negate(MINUS), negate(Z)], "x along [001], y along [1-10], z along [110]"],
  ])("C2v with its axis along %s: x and y as documented, B1 is +1 on sigma(xz)", (_, axis, [xz, yz], text) => {
    const list = [IDENTITY, axis, xz, yz];
    expect(pointGroup(list).axes.text).toBe(text);
    expect(speciesKept(list, xz)).toEqual(["B1"]);
    expect(speciesKept(list, yz)).toEqual(["B2"]);
    expect(speciesKept(list, axis)).toEqual(["A2"]);
  });

  it("D4h with the fourfold axis along a: secondary directions along b and c", () => {
    const cyclic: IntMat3 = [0, 1, 0, 0, 0, 1, 1, 0, 0];
    const list = inBasis(crystalMatrices("4/mmm"), cyclic);
    const named = classes(list);
    expect(named).toContain("2C4 [100]");
    expect(named).toContain("2C2' [010] [001]");
    expect(named).toContain("2sigma_d [011] [01-1]");
  });

  it("D4h in the primitive basis of an I lattice: the frame decides, and without it the shorter lattice vectors", () => {
    // Columns: primitive vectors (-1/2 1/2 1/2), (1/2 -1/2 1/2), (1/2 1/2 -1/2); a = p2 + p3 and so on.
    const frame: AxisFrame = { x: [0, 1, 1], y: [1, 0, 1], z: [1, 1, 0] };
    const doubled: IntMat3 = [0, 1, 1, 1, 0, 1, 1, 1, 0];
    const half = [-1, 1, 1, 1, -1, 1, 1, 1, -1] as const; // inverse of `doubled` times 2
    const list = crystalMatrices("4/mmm").map(
      (W) => product(product(doubled, W), half).map((e) => e / 2) as unknown as IntMat3,
    );
    expect(classes(list, frame)).toEqual(classes(crystalMatrices("4/mmm")));
    const bare = pointGroup(list);
    const framed = pointGroup(list, frame);
    bare.irreps.forEach((r, i) => {
      const values = (g: typeof bare) => list.map((_, k) => g.irreps[i]!.characters[g.classOf[k]!]!);
      expect(r.label).toBe(framed.irreps[i]!.label);
      expect(values(bare)).toEqual(values(framed));
    });
  });

  it("D3d in rhombohedral axes has no oriented symbol; with the hexagonal frame it is -3m1", () => {
    // a_h = a - b, b_h = b - c, c_h = a + b + c in rhombohedral axes
    const frame: AxisFrame = { x: [1, -1, 0], y: [0, 1, -1], z: [1, 1, 1] };
    const three: IntMat3 = [0, 0, 1, 1, 0, 0, 0, 1, 0];
    const two: IntMat3 = [0, -1, 0, -1, 0, 0, 0, 0, -1];
    const list = closed([three, two, negate(IDENTITY)]);
    expect(pointGroup(list).hermannMauguin).toBe("-3m");
    expect(pointGroup(list, frame).hermannMauguin).toBe("-3m1");
    expect(classes(list, frame)).toContain("3C2' [100] [010] [110]");
    expect(pointGroup(list).axes.text).toContain("z along [111]");
  });

  it.each([
    ["2mm", "2mm"],
    ["-4m2", "-4m2"],
    ["312", "312"],
    ["31m", "31m"],
  ])("the orientation of %s is seen through a frame carried along", (s, expected) => {
    const P: IntMat3 = [1, 1, 0, 0, 1, 2, 0, 0, 1];
    expect(pointGroup(inBasis(crystalMatrices(s), P), carriedFrame(P)).hermannMauguin).toBe(expected);
  });

  it("the axes are described in words with the names of the classes", () => {
    expect(pointGroup(crystalMatrices("4/mmm")).axes.text).toBe(
      "x along [100], y along [010], z along [001]; C2' along [100] [010]; C2'' along [110] [1-10]; " +
        "sigma_v normal to [100] [010]; sigma_d normal to [110] [1-10]",
    );
  });
});

describe("tables by name", () => {
  it.each([
    ["-3m", "D3d"],
    ["-3 2/m", "D3d"],
    ["4/m -3 2/m", "Oh"],
    ["m3m", "Oh"],
    ["2/m 2/m 2/m", "D2h"],
    ["12/m1", "C2h"],
    ["Vd", "D2d"],
    ["C3i", "S6"],
  ])("%s is understood", (name, expected) => expect(pointGroupTable(name).group.schoenflies).toBe(expected));

  it.each(["", "5m", "D3v", "Cinfv", "mmmm", "toString"])("%s is refused with advice", (name) => {
    expect(() => pointGroupTable(name)).toThrow(expect.objectContaining({ code: "unknown-point-group" }));
  });
});

function product(a: readonly number[], b: readonly number[]): number[] {
  return Array.from({ length: 9 }, (_, k) => {
    const [i, j] = [Math.floor(k / 3), k % 3];
    return a[3 * i]! * b[j]! + a[3 * i + 1]! * b[3 + j]! + a[3 * i + 2]! * b[6 + j]! + 0;
  });
}

function closed(generators: readonly IntMat3[]): IntMat3[] {
  const list: IntMat3[] = [IDENTITY];
  for (let i = 0; i < list.length; i++) {
    for (const g of generators) {
      const p = product(list[i]!, g) as unknown as IntMat3;
      if (!list.some((W) => W.join() === p.join())) list.push(p);
    }
  }
  return list;
}

import { describe, expect, it } from "vitest";
import {
  addVectors,
  apply,
  type IntMat3,
  type RatVec3,
  ratVec3,
  subtractVectors,
  transformVector,
} from "../../lib/algebra/index.ts";
import { operationsFromHall } from "../../lib/symmetry/hall-symbol.ts";
import { identify } from "../../lib/symmetry/identification.ts";
import type { Operation } from "../../lib/symmetry/operation.ts";
import { parseOperation } from "../../lib/symmetry/operation-text.ts";
import { referenceGroup } from "../../lib/symmetry/reference-group.ts";
import { assignWyckoff, type SiteAssignment } from "../../lib/symmetry/site-assignment.ts";
import { type SpaceGroup, spaceGroup } from "../../lib/symmetry/space-group.ts";
import { scalesAlike, tensorConstraint } from "../../lib/symmetry/tensor-constraint.ts";
import { reverse } from "../../lib/symmetry/transformation.ts";
import { wyckoffPositions } from "../../lib/symmetry/wyckoff-positions.ts";
import { randomSetting, seeded } from "./random-setting.ts";

const ALL = Array.from({ length: 230 }, (_, i) => i + 1);

/** The operations, unreduced, that fix an exact point. */
function siteGroup(operations: readonly Operation[], x: RatVec3): Operation[] {
  return operations.flatMap((a) => {
    const image = addVectors(ratVec3(apply(a.W, x.n), x.d), a.w);
    const t = subtractVectors(x, image);
    return t.d === 1 ? [{ W: a.W, w: addVectors(a.w, t) }] : [];
  });
}

function assign(group: SpaceGroup, x: RatVec3): SiteAssignment {
  const { number, transformation } = identify(group.operations);
  return assignWyckoff({ group, number, toReference: transformation }, siteGroup(group.operations, x));
}

/** A point of a position with no further symmetry, from a letter's triplet at fractions that meet no special value. */
function genericPoint(number: number, letter: string, k: number): RatVec3 {
  const { M, t } = wyckoffPositions(number).find((p) => p.letter === letter)!.form;
  return addVectors(transformVector(M, ratVec3([7 + k, 18 - k, 31 + 2 * k], 101)), t);
}

describe("assignWyckoff", () => {
  it("finds the letter of a point of every position in a random setting of each type", () => {
    const random = seeded(11);
    for (const number of ALL) {
      const { operations } = randomSetting(referenceGroup(number), random);
      const group = spaceGroup(operations);
      const { transformation } = identify(operations);
      const back = reverse(transformation);
      for (const p of wyckoffPositions(number)) {
        // from the reference setting to the random one: x = P x' + p
        const there = genericPoint(number, p.letter, 0);
        const x = addVectors(transformVector(transformation.P, there), transformation.p);
        const found = assign(group, x);
        expect(`${number}${found.letter}`).toBe(`${number}${p.letter}`);
        expect(found.order).toBe(p.order);
        expect(found.referenceSiteSymmetry).toBe(p.siteSymmetry);
        expect(found.multiplicity * p.order).toBe(operations.length);
        // the constraint is kept by the point itself
        const { M, t } = found.form;
        expect(addVectors(transformVector(M, x), t)).toEqual(x);
        expect(back.P.d).toBeGreaterThan(0);
      }
    }
  });

  // -P 2yn goes to P 21/c by a,b,a+c, so its 0,0,1/2 is -1/2,0,1/2 there.
  it.each([
    // hall, point over 24, letter, symbol, constraint, tensor; conventions as in International Tables A
    ["-P 2ac 2n", [5, 6, 7], "c", ".m.", "x,1/4,z", "u11,u22,u33,0,u13,0"],
    ["-P 2c 2ab", [5, 7, 6], "c", "..m", "x,y,1/4", "u11,u22,u33,u12,0,0"],
    ["-P 2yn", [0, 0, 12], "d", "-1", "0,0,1/2", "u11,u22,u33,u12,u13,u23"],
    ['-R 3 2"c', [5, 0, 6], "e", ".2", "x,0,1/4", "u11,u22,u33,u22/2,u13,2u13"],
    ['-R 3 2"c', [0, 0, 6], "a", "32", "0,0,1/4", "u11,u11,u33,u11/2,0,0"],
    ["-P 6c 2c", [8, 16, 6], "c", "-6m2", "1/3,2/3,1/4", "u11,u11,u33,u11/2,0,0"],
    ["-F 4vw 2vw 3", [3, 3, 3], "a", "-43m", "1/8,1/8,1/8", "u11,u11,u11,0,0,0"],
    ["-F 4vw 2vw 3", [5, 5, 5], "e", ".3m", "x,x,x", "u11,u11,u11,u12,u12,u12"],
    ["-P 4n 2n", [5, 5, 0], "f", "m.2m", "x,x,0", "u11,u11,u33,u12,0,0"],
    ["-I 4 2", [5, 5, 7], "m", "..m", "x,x,z", "u11,u11,u33,u12,u13,u13"],
  ] as const)("puts a point of %s at %s/24 on position %s", (hall, n, letter, symbol, constraint, tensor) => {
    const group = spaceGroup(operationsFromHall(hall).operations);
    const found = assign(group, ratVec3(n, 24));
    expect([found.letter, found.siteSymmetry, found.constraint, found.tensor.text]).toEqual([
      letter,
      symbol,
      constraint,
      tensor,
    ]);
    expect(found.tensorHoldsFor).toBe("U");
  });

  it("gives the symbol along the axes in use and along those of the reference setting", () => {
    const found = assign(spaceGroup(operationsFromHall("-P 2c 2ab").operations), ratVec3([5, 7, 6], 24));
    expect([found.siteSymmetry, found.referenceSiteSymmetry]).toEqual(["..m", ".m."]);
    expect(found.referenceConstraint).toMatch(/^x,[13]\/4,z$/);
  });

  it("exchanges secondary and tertiary places in a tetragonal cell turned by 45 degrees", () => {
    const turned = "C -4 2"; // P -4 m 2 on the axes a-b, a+b
    const found = assign(spaceGroup(operationsFromHall(turned).operations), ratVec3([0, 0, 0], 1));
    expect([found.siteSymmetry, found.referenceSiteSymmetry]).toEqual(["-42m", "-4m2"]);
  });

  it("refuses operations that are not the whole site group", () => {
    const group = spaceGroup(operationsFromHall("-P 2ac 2n").operations);
    const { transformation } = identify(group.operations);
    const half = [parseOperation("x,y,z"), { W: [-1, 0, 0, 0, -1, 0, 0, 0, -1] as const, w: ratVec3([1, 1, 0], 2) }];
    const context = { group, number: 62, toReference: transformation };
    expect(() => assignWyckoff(context, half)).toThrow("not the whole site-symmetry group");
  });
});

describe("tensorConstraint", () => {
  it("gives a matrix that keeps every allowed tensor and a projection onto them", () => {
    for (const number of ALL) {
      for (const p of wyckoffPositions(number)) {
        const rotations = p.stabiliser.map((i) => referenceGroup(number).representatives[i]!.W);
        const c = tensorConstraint(rotations);
        const allowed = times(c.projection, [13, 29, 7, 3, 5, -11]);
        expect(times(c.matrix, allowed).map((e) => Math.round(e * 1e9))).toEqual(
          allowed.map((e) => Math.round(e * 1e9)),
        );
        for (const W of rotations) expect(carried(W, allowed).map(rounded)).toEqual(allowed.map(rounded));
        expect(c.text.split(",").length).toBe(6);
      }
    }
  });

  it("holds for U in every reference setting, but not in a cell skewed by a diagonal axis", () => {
    for (const number of ALL) {
      const all = referenceGroup(number).representatives.map((a) => a.W);
      expect(scalesAlike(all, all)).toBe(true);
    }
    const mirror: IntMat3 = [1, 0, 0, 0, -1, -1, 0, 0, 1]; // plane normal b in the cell a, b, c + b/2
    expect(scalesAlike([mirror], [mirror])).toBe(false);
  });
});

function times(m: { readonly n: readonly number[]; readonly d: number }, u: readonly number[]): number[] {
  return [0, 1, 2, 3, 4, 5].map((i) => u.reduce((sum, e, j) => sum + m.n[6 * i + j]! * e, 0) / m.d);
}

const rounded = (e: number) => Math.round(e * 1e9) + 0;

/** W u W^T written out on the full matrix, the slow way. */
function carried(W: IntMat3, [a, b, c, d, e, f]: readonly number[]): number[] {
  const u = [a!, d!, e!, d!, b!, f!, e!, f!, c!];
  const at = (i: number, j: number) => {
    let sum = 0;
    for (let k = 0; k < 3; k++) for (let l = 0; l < 3; l++) sum += W[3 * i + k]! * u[3 * k + l]! * W[3 * j + l]!;
    return sum;
  };
  return [at(0, 0), at(1, 1), at(2, 2), at(0, 1), at(0, 2), at(1, 2)];
}

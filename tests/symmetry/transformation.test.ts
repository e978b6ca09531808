import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import {
  addVectors,
  multiplyRatMat,
  RAT_IDENTITY,
  type RatVec3,
  ratMat3,
  ratVec3,
  transformVector,
} from "../../lib/algebra/index.ts";
import {
  chain,
  closeGroup,
  compose,
  formatOperation,
  formatTransformation,
  IDENTITY_TRANSFORMATION,
  type Operation,
  operationKey,
  parseOperation,
  parseTransformation,
  reduce,
  reverse,
  type Transformation,
  transformOperation,
} from "../../lib/symmetry/index.ts";
import { problemOf } from "../support/problem-of.ts";
import { operation, productOf, sameVolume, shift, transformation } from "./arbitraries.ts";
import { GROUPS } from "./groups.ts";

/** Old coordinates of a point given in the new setting: x = P x' + p. */
const oldOf = (t: Transformation, x: RatVec3) => addVectors(transformVector(t.P, x), t.p);
const image = (a: Operation, x: RatVec3) => addVectors(transformVector(ratMat3(a.W), x), a.w);

describe("changes of setting", () => {
  test("form a group: chain is associative, reverse is the inverse", () => {
    fc.assert(
      fc.property(transformation, transformation, transformation, (a, b, c) => {
        expect(chain(chain(a, b), c)).toEqual(chain(a, chain(b, c)));
        expect(chain(a, reverse(a))).toEqual(IDENTITY_TRANSFORMATION);
        expect(chain(reverse(a), a)).toEqual(IDENTITY_TRANSFORMATION);
        expect(chain(a, IDENTITY_TRANSFORMATION)).toEqual(a);
      }),
    );
  });

  test("carry points: the chain leads from the last setting through the middle one to the first", () => {
    fc.assert(
      fc.property(transformation, transformation, shift, (a, b, x) => {
        expect(oldOf(chain(a, b), x)).toEqual(oldOf(a, oldOf(b, x)));
        expect(oldOf(reverse(a), oldOf(a, x))).toEqual(x);
      }),
    );
  });

  it("refuse a basis without volume", () => {
    expect(() => reverse({ P: ratMat3([1, 0, 0, 0, 1, 0, 1, 1, 0]), p: ratVec3([0, 0, 0]) })).toThrow(/singular/);
  });
});

describe("transformOperation", () => {
  test("does in the new setting what the operation does in the old", () => {
    fc.assert(
      fc.property(operation, sameVolume, shift, (a, t, x) => {
        const moved = transformOperation(a, t)!;
        expect(oldOf(t, image(moved, x))).toEqual(image(a, oldOf(t, x)));
      }),
    );
  });

  test("respects products, chains and the way back", () => {
    fc.assert(
      fc.property(operation, operation, sameVolume, sameVolume, (a, b, s, t) => {
        const move = (x: Operation) => transformOperation(x, s)!;
        expect(move(compose(a, b))).toEqual(compose(move(a), move(b)));
        expect(transformOperation(move(a), t)).toEqual(transformOperation(a, chain(s, t)));
        expect(transformOperation(move(a), reverse(s))).toEqual(a);
        expect(transformOperation(a, s, reverse(s))).toEqual(move(a));
      }),
    );
  });

  test("returns null exactly where the new lattice is not mapped onto itself", () => {
    const cubic = productOf("-y,x,z", "z,x,y", "-x,-y,-z");
    fc.assert(
      fc.property(cubic, transformation, (a, t) => {
        const W = multiplyRatMat(multiplyRatMat(reverse(t).P, ratMat3(a.W)), t.P);
        expect(transformOperation(a, t) === null).toBe(W.d !== 1);
      }),
    );
    expect(transformOperation(parseOperation("-y,x,z"), parseTransformation("2a,b,c"))).toBeNull();
    expect(transformOperation(parseOperation("-x,-y,z"), parseTransformation("2a,b,c"))).not.toBeNull();
  });

  it("moves the origin: an inversion at 1/4,1/4,1/4 comes to the origin", () => {
    const moved = transformOperation(parseOperation("-x+1/2,-y+1/2,-z+1/2"), parseTransformation("a,b,c;1/4,1/4,1/4"));
    expect(formatOperation(moved!)).toBe("-x,-y,-z");
  });

  it("carries the 192 operations of Fd-3m to 48 in a primitive cell, and R-3c from hexagonal to rhombohedral axes", () => {
    const distinct = (name: keyof typeof GROUPS, basis: string) => {
      const group = closeGroup(GROUPS[name].generators.map(parseOperation));
      const t = parseTransformation(basis);
      return new Set(group.map((a) => operationKey(reduce(transformOperation(a, t)!))));
    };
    expect(distinct("Fd-3m", "1/2b+1/2c,1/2a+1/2c,1/2a+1/2b").size).toBe(48);
    const rhombohedral = closeGroup(GROUPS["R-3c, rhombohedral axes"].generators.map(parseOperation));
    expect(distinct("R-3c, hexagonal axes", "2/3a+1/3b+1/3c,-1/3a+1/3b+1/3c,-1/3a-2/3b+1/3c")).toEqual(
      new Set(rhombohedral.map(operationKey)),
    );
  });
});

describe("parseTransformation", () => {
  test("undoes formatTransformation", () => {
    fc.assert(
      fc.property(transformation, (t) => {
        expect(parseTransformation(formatTransformation(t))).toEqual(t);
      }),
    );
  });

  it("takes the axes as columns of P", () => {
    expect(parseTransformation("a-b,a+b,c;1/4,0,-1/2")).toEqual({
      P: ratMat3([1, 1, 0, -1, 1, 0, 0, 0, 1]),
      p: ratVec3([1, 0, -2], 4),
    });
  });

  it.each([
    ["a,b,c", "a,b,c;0,0,0"],
    ["A, B, C ; 0,0,0", "a,b,c;0,0,0"],
    ["a,b+1/2,c", "a,b,c;0,1/2,0"],
    ["a,b+1/2,c;0,0,0", "a,b,c;0,1/2,0"],
    ["c,a,b;.25,-0.3333,1", "c,a,b;1/4,-1/3,1"],
    ["1/2a-1/2b,b,2c;0,0,0", "1/2a-1/2b,b,2c;0,0,0"],
  ])("reads %s as %s", (text, meant) => expect(formatTransformation(parseTransformation(text))).toBe(meant));

  it.each([
    ["a,b,a+b;0,0,0", "transformation-singular", 0, 7, "its axes lie in one plane"],
    ["a,b", "triplet-unreadable", 3, 3, "it ends too early"],
    ["a,b,c;0,0,q", "shift-unreadable", 10, 11, 'character 5, "q", does not fit'],
    ["a,b,c;0,0,0;0", "shift-unreadable", 11, 12, 'character 6, ";", does not fit'],
    ["a,b,c;x,0,0", "shift-unreadable", 6, 11, "its shift holds letters"],
    ["a+1/2,b,c;1/4,0,0", "shift-unreadable", 10, 17, "both inside the axes and after the semicolon"],
    ["a,b,c;0,0,1/99999999999999999999", "shift-unreadable", 6, 32, "too long to be kept exact"],
    ["9007199254740991a,b,c", "number-too-long", 0, 21, "too long to be kept exact"],
  ])("refuses %s as %s", (text, code, start, end, why) => {
    const problem = problemOf(() => parseTransformation(text));
    expect(problem.code).toBe(code);
    expect(problem.message).toContain(why);
    expect(problem.span).toEqual({ start, end });
    expect(problem.hint).not.toBe("");
  });

  it("knows the identity", () => expect(parseTransformation("a,b,c").P).toEqual(RAT_IDENTITY));
});

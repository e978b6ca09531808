import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { rational, ratVec3, vectorOf } from "../../lib/algebra/index.ts";
import { InputProblem } from "../../lib/problem.ts";
import {
  closeGroup,
  compose,
  formatOperation,
  IDENTITY_OPERATION,
  invert,
  LARGEST_GROUP,
  missingProduct,
  type Operation,
  operationKey,
  parseOperation,
  reduce,
  transformOperation,
} from "../../lib/symmetry/index.ts";
import { slowClosure } from "../oracle/group-closure.ts";
import { sameVolume } from "./arbitraries.ts";
import { GROUPS } from "./groups.ts";

const keys = (operations: readonly Operation[]) => operations.map((a) => operationKey(reduce(a)));
const groups = Object.entries(GROUPS).map(([name, { generators, order }]) => ({
  name,
  order,
  generators: generators.map(parseOperation),
}));

describe("closeGroup", () => {
  it.each(groups)("finds the $order operations of $name", ({ generators, order }) => {
    const group = closeGroup(generators);
    expect(group.length).toBe(order);
    expect(new Set(keys(group)).size).toBe(order);
    expect(missingProduct(group)).toBeNull();
    const known = new Set(keys(group));
    for (const a of group) expect(known.has(operationKey(reduce(invert(a))))).toBe(true);
  });

  it.each(groups.filter((g) => g.order <= 48))("finds for $name what trying all products finds", (g) => {
    expect(new Set(keys(closeGroup(g.generators)))).toEqual(slowClosure(g.generators));
  });

  it("puts the identity first and the given operations next, in their order", () => {
    const given = GROUPS["Ia-3d"].generators.map(parseOperation);
    expect(closeGroup(given).slice(0, 7).map(formatOperation)).toEqual(["x,y,z", ...GROUPS["Ia-3d"].generators]);
    expect(closeGroup([])).toEqual([IDENTITY_OPERATION]);
  });

  it("reduces what it is given, whole translations and repetitions included", () => {
    const far: Operation = { W: parseOperation("-x,-y,-z").W, w: ratVec3([-3, 5, 2]) };
    expect(closeGroup([far, far, IDENTITY_OPERATION]).map(formatOperation)).toEqual(["x,y,z", "-x,-y,-z"]);
    expect(closeGroup([{ ...IDENTITY_OPERATION, w: ratVec3([4, 0, -1]) }])).toEqual([IDENTITY_OPERATION]);
  });

  test("does not depend on the order of the generators, nor on the setting", () => {
    const names = fc.constantFrom(...groups.filter((g) => g.order > 1 && g.order <= 96));
    const shuffled = names.chain((g) =>
      fc.tuple(fc.constant(g), fc.shuffledSubarray(g.generators, { minLength: g.generators.length }), sameVolume),
    );
    fc.assert(
      fc.property(shuffled, ([g, order, t]) => {
        const group = closeGroup(g.generators);
        expect(new Set(keys(closeGroup(order)))).toEqual(new Set(keys(group)));
        const moved = closeGroup(order.map((a) => transformOperation(a, t)!));
        expect(new Set(keys(moved))).toEqual(new Set(keys(group.map((a) => transformOperation(a, t)!))));
      }),
      { numRuns: 40 },
    );
  });

  it.each(["x+1/4,y,z", "x,y+1/4,z", "x,y,z+1/4"])("tells translations along each axis apart: %s", (text) => {
    const multiples = ["1/4", "1/2", "3/4"].map((f) => text.replace("1/4", f));
    expect(new Set(closeGroup([parseOperation(text)]).map(formatOperation))).toEqual(new Set(["x,y,z", ...multiples]));
  });

  it("takes unusual fractions exactly", () => {
    const seventh = { ...IDENTITY_OPERATION, w: ratVec3([1, 0, 3], 7) };
    expect(closeGroup([seventh, parseOperation("-x,-y,-z+1/11")]).length).toBe(14);
    const fine = { W: parseOperation("-x,-y,-z").W, w: ratVec3([1, 2, 3], 99_991) };
    expect(closeGroup([fine])).toEqual([IDENTITY_OPERATION, fine]);
  });

  it.each([
    ["a shear", "x+y,y,z"],
    ["a stretch, whose powers soon leave the exact integers", "2x+y,x+y,z"],
    ["a fine translation", "x+1/99991,y,z"],
  ])("refuses %s as endless", (_, text) => {
    expect(() => closeGroup([parseOperation(text)])).toThrow(InputProblem);
    expect(() => closeGroup([parseOperation(text)])).toThrow(
      `the operations generate more than ${LARGEST_GROUP} others, so they belong to no space group in this cell`,
    );
  });

  it("refuses translations without a common denominator that stays exact", () => {
    const [a, b] = [rational(1, 94_906_267), rational(1, 94_906_249)];
    const inversion = parseOperation("-x,-y,-z");
    const operations = [a, b].map((r) => ({ W: inversion.W, w: vectorOf(r, rational(0), rational(0)) }));
    expect(() => closeGroup(operations)).toThrow(/no common denominator/);
  });

  it("keeps to the limit it is given", () => {
    const inversion = [parseOperation("-x,-y,-z")];
    expect(closeGroup(inversion, 2).length).toBe(2);
    expect(() => closeGroup(inversion, 1)).toThrow("more than 1 others");
    const quarters = [parseOperation("x+1/4,y,z")];
    expect(closeGroup(quarters, 4).length).toBe(4);
    expect(() => closeGroup(quarters, 3)).toThrow("more than 3 others");
  });
});

describe("missingProduct", () => {
  it("names the first pair whose product is not in the list", () => {
    const list = ["x,y,z", "-x,y+1/2,-z+1/2", "-x,-y,-z"].map(parseOperation);
    const missing = missingProduct(list)!;
    expect(Object.values(missing).map(formatOperation)).toEqual(["-x,y+1/2,-z+1/2", "-x,-y,-z", "x,-y+1/2,z+1/2"]);
  });

  it("misses the identity before anything else", () => {
    expect(missingProduct([parseOperation("-x,-y,-z")])?.product).toEqual(IDENTITY_OPERATION);
    expect(missingProduct([])?.product).toEqual(IDENTITY_OPERATION);
  });

  it("compares modulo whole translations", () => {
    const far: Operation = { W: parseOperation("-x,-y,-z").W, w: ratVec3([7, -1, 0]) };
    expect(missingProduct([IDENTITY_OPERATION, far])).toBeNull();
  });

  test("finds a gap wherever one operation but the identity is left out of a group", () => {
    const group = closeGroup(GROUPS["P63/mmc"].generators.map(parseOperation));
    fc.assert(
      fc.property(fc.integer({ min: 1, max: group.length - 1 }), (i) => {
        const rest = group.filter((_, j) => j !== i);
        const missing = missingProduct(rest)!;
        expect(missing.product).toEqual(group[i]);
        expect(reduce(compose(missing.first, missing.second))).toEqual(group[i]);
      }),
    );
  });
});

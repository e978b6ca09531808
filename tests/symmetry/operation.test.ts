import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { determinant, ratVec3 } from "../../lib/algebra/index.ts";
import {
  compose,
  IDENTITY_OPERATION,
  invert,
  type Operation,
  operationKey,
  parseOperation,
  reduce,
  sameOperation,
  transformPoint,
} from "../../lib/symmetry/index.ts";
import { operation, shift } from "./arbitraries.ts";

const sixteenth = fc.integer({ min: -64, max: 64 }).map((n) => n / 16);
const point = fc.tuple(sixteenth, sixteenth, sixteenth);

describe("operations", () => {
  test("compose associatively, the identity being neutral", () => {
    fc.assert(
      fc.property(operation, operation, operation, (a, b, c) => {
        expect(compose(compose(a, b), c)).toEqual(compose(a, compose(b, c)));
        expect(compose(a, IDENTITY_OPERATION)).toEqual(a);
        expect(compose(IDENTITY_OPERATION, a)).toEqual(a);
      }),
    );
  });

  test("have an inverse from both sides, and the inverse of a product is that of its parts turned round", () => {
    fc.assert(
      fc.property(operation, operation, (a, b) => {
        expect(compose(a, invert(a))).toEqual(IDENTITY_OPERATION);
        expect(compose(invert(a), a)).toEqual(IDENTITY_OPERATION);
        expect(invert(compose(a, b))).toEqual(compose(invert(b), invert(a)));
      }),
    );
  });

  test("compose as their images of points do: first b, then a", () => {
    fc.assert(
      fc.property(operation, operation, point, (a, b, x) => {
        const [left, right] = [transformPoint(compose(a, b), x), transformPoint(a, transformPoint(b, x))];
        left.forEach((e, i) => {
          expect(e).toBeCloseTo(right[i]!, 9);
        });
      }),
    );
  });

  it("compose in the order that matters", () => {
    const [a, b] = [parseOperation("-y,x,z"), parseOperation("x+1/2,y,z")];
    expect(compose(a, b)).toEqual(parseOperation("-y,x+1/2,z"));
    expect(compose(b, a)).toEqual(parseOperation("-y+1/2,x,z"));
  });

  test("multiply their determinants", () => {
    fc.assert(
      fc.property(operation, operation, (a, b) => {
        expect(determinant(compose(a, b).W)).toBe(determinant(a.W) * determinant(b.W));
      }),
    );
  });

  it("leave translations beyond the cell until they are reduced", () => {
    const screw = parseOperation("-x,y+1/2,-z+3/4");
    const twice: Operation = { W: IDENTITY_OPERATION.W, w: ratVec3([0, 1, 0]) };
    expect(compose(screw, screw)).toEqual(twice);
    expect(reduce(twice)).toEqual(IDENTITY_OPERATION);
    expect(invert(screw).w).toEqual(ratVec3([0, -2, 3], 4));
    expect(reduce(invert(screw)).w).toEqual(ratVec3([0, 2, 3], 4));
  });

  test("share a key exactly when they are equal, and a reduced key when they differ by whole translations", () => {
    fc.assert(
      fc.property(operation, operation, shift, (a, b, s) => {
        expect(operationKey(a) === operationKey(b)).toBe(sameOperation(a, b));
        expect(sameOperation(a, { W: [...a.W] as unknown as Operation["W"], w: { ...a.w } })).toBe(true);
        const moved = compose({ W: IDENTITY_OPERATION.W, w: s }, a);
        expect(operationKey(reduce(moved)) === operationKey(reduce(a))).toBe(s.d === 1);
      }),
    );
  });

  it("move a point given in floating point", () => {
    expect(transformPoint(parseOperation("-y+1/4,x-y,z+1/3"), [0.1, 0.3, 0.2])).toEqual([
      -0.3 + 0.25,
      0.1 - 0.3,
      0.2 + 1 / 3,
    ]);
  });
});

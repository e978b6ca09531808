import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  addVectors,
  equalVectors,
  multiply,
  type RatVec3,
  ratMat3,
  ratVec3,
  transformVector,
} from "../../lib/algebra/index.ts";
import { parseTriplet } from "../../lib/symmetry/affine-text.ts";
import { geometricMeaning } from "../../lib/symmetry/geometric-meaning.ts";
import { matrixOrder } from "../../lib/symmetry/intrinsic-part.ts";
import type { Operation } from "../../lib/symmetry/operation.ts";
import { rotationType } from "../../lib/symmetry/rotation-type.ts";
import { settingOperations } from "../../lib/symmetry/setting-group.ts";
import { settingsOf } from "../../lib/symmetry/settings.ts";
import { transformOperation } from "../../lib/symmetry/transformation.ts";

const image = (a: Operation, x: RatVec3) => addVectors(transformVector(ratMat3(a.W), x), a.w);

/** The point of an element, `0,y+1/4,y`, where its letters have the values given (in 24ths). */
function pointOf(element: string, values: readonly [number, number, number]): RatVec3 {
  return parseTriplet(element, "xyz")
    .map((row) => {
      const sum = row.coefficients.reduce((s, c, i) => s + (c.n * values[i]!) / c.d, 0);
      return 24 * 60 * (sum / 24 + row.constant.n / row.constant.d);
    })
    .map(Math.round)
    .reduce<RatVec3>((v, e, i) => addVectors(v, ratVec3([i === 0 ? e : 0, i === 1 ? e : 0, i === 2 ? e : 0], 1440)), {
      n: [0, 0, 0],
      d: 1,
    });
}

const operation = fc
  .constantFrom(...Array.from({ length: 230 }, (_, i) => i + 1))
  .chain((number) => fc.constantFrom(...settingsOf(number)))
  .chain((setting) => fc.constantFrom(...settingOperations(setting)));
const twelfths = fc.tuple(
  ...([0, 1, 2].map(() => fc.integer({ min: -24, max: 24 })) as [never, never, never]),
) as fc.Arbitrary<[number, number, number]>;

describe("geometricMeaning", () => {
  it("moves every point of the element by the intrinsic translation and by nothing else", () => {
    fc.assert(
      fc.property(operation, twelfths, twelfths, (a, shift, values) => {
        const moved = { W: a.W, w: addVectors(a.w, ratVec3(shift, 12)) };
        const { element, intrinsic, kind } = geometricMeaning(moved);
        if (element === null) return;
        const x = pointOf(element, values);
        expect([kind, equalVectors(image(moved, x), addVectors(x, intrinsic))]).toEqual([
          kind,
          kind !== "rotoinversion" || equalVectors(image(moved, x), x),
        ]);
      }),
      { numRuns: 400 },
    );
  });

  it("keeps the inversion point of a rotoinversion, which lies on its axis", () => {
    fc.assert(
      fc.property(operation, twelfths, (a, shift) => {
        const moved = { W: a.W, w: addVectors(a.w, ratVec3(shift, 12)) };
        const { element, point, kind } = geometricMeaning(moved);
        expect(point !== null).toBe(kind === "rotoinversion");
        if (point === null || element === null) return;
        const p = pointOf(point, [0, 0, 0]);
        expect(equalVectors(image(moved, p), p)).toBe(true);
      }),
      { numRuns: 300 },
    );
  });

  it("does not change kind, symbol or intrinsic translation when the origin is moved", () => {
    fc.assert(
      fc.property(operation, twelfths, (a, shift) => {
        const elsewhere = transformOperation(a, { P: ratMat3([1, 0, 0, 0, 1, 0, 0, 0, 1]), p: ratVec3(shift, 24) })!;
        const { kind, symbol, intrinsic } = geometricMeaning(a);
        expect(geometricMeaning(elsewhere)).toMatchObject({ kind, symbol, intrinsic });
      }),
      { numRuns: 300 },
    );
  });

  it("gives the inverse the opposite sense", () => {
    fc.assert(
      fc.property(operation, ({ W }) => {
        const k = matrixOrder(W);
        let inverse = W;
        for (let i = 2; i < k; i++) inverse = multiply(inverse, W);
        if (k > 1) expect(rotationType(inverse).sense + rotationType(W).sense).toBe(0);
        expect(rotationType(inverse).axis).toEqual(rotationType(W).axis);
      }),
      { numRuns: 200 },
    );
  });

  it("writes one letter for a glide along an axis and the vector for every other glide or screw", () => {
    const text = (W: Operation["W"], n: [number, number, number], d: number) =>
      geometricMeaning({ W, w: ratVec3(n, d) }).text;
    const mz = [1, 0, 0, 0, 1, 0, 0, 0, -1] as const;
    expect(text(mz, [1, 0, 0], 2)).toBe("a x,y,0");
    expect(text(mz, [-1, 0, 1], 2)).toBe("a x,y,1/4");
    expect(text(mz, [1, 1, 0], 2)).toBe("n(1/2,1/2,0) x,y,0");
    expect(text(mz, [1, 3, 0], 4)).toBe("d(1/4,3/4,0) x,y,0");
    expect(text(mz, [1, 0, 0], 1)).toBe("g(1,0,0) x,y,0");
    expect(text(mz, [1, 0, 0], 4)).toBe("g(1/4,0,0) x,y,0");
    expect(text([1, 0, 0, 0, 1, 0, 0, 0, 1], [0, 0, 0], 1)).toBe("1");
  });
});

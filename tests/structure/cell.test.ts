import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { InputProblem } from "../../lib/problem.ts";
import { apply3, cellOfMetric, lengthOf, metricMisfit, metricOf, multiply3 } from "../../lib/structure/index.ts";

const cell = fc.record({
  a: fc.double({ min: 2, max: 30, noNaN: true }),
  b: fc.double({ min: 2, max: 30, noNaN: true }),
  c: fc.double({ min: 2, max: 30, noNaN: true }),
  alpha: fc.double({ min: 70, max: 110, noNaN: true }),
  beta: fc.double({ min: 70, max: 110, noNaN: true }),
  gamma: fc.double({ min: 70, max: 110, noNaN: true }),
});
const point = fc.tuple(
  fc.double({ min: -2, max: 2, noNaN: true }),
  fc.double({ min: -2, max: 2, noNaN: true }),
  fc.double({ min: -2, max: 2, noNaN: true }),
);

describe("metricOf", () => {
  test("gives the volume of calcite's hexagonal cell, 367.8 cubic angstrom", () => {
    // Effenberger, Mereiter & Zemann, Z. Kristallogr. 156 (1981) 233: a 4.9896, c 17.0610 (from memory).
    const m = metricOf({ a: 4.9896, b: 4.9896, c: 17.061, alpha: 90, beta: 90, gamma: 120 });
    expect(m.volume).toBeCloseTo(4.9896 ** 2 * 17.061 * Math.sin(Math.PI / 3), 9);
    expect(m.volume).toBeCloseTo(367.85, 1);
  });

  test("measures a vector alike by the metric tensor and in Cartesian axes, which undo each other", () => {
    fc.assert(
      fc.property(cell, point, (c, x) => {
        const m = metricOf(c);
        const cartesian = apply3(m.toCartesian, x);
        expect(Math.hypot(...cartesian)).toBeCloseTo(lengthOf(m, x), 8);
        for (const i of [0, 1, 2] as const) expect(apply3(m.toFractional, cartesian)[i]).toBeCloseTo(x[i], 8);
        expect(m.toCartesian[3]).toBe(0); // x along a
        expect(m.toCartesian[6]).toBe(0);
        expect(m.toCartesian[7]).toBe(0); // b in the xy plane
      }),
    );
  });

  test("is undone by cellOfMetric", () => {
    fc.assert(
      fc.property(cell, (c) => {
        const back = cellOfMetric(metricOf(c).g);
        for (const key of ["a", "b", "c", "alpha", "beta", "gamma"] as const) expect(back[key]).toBeCloseTo(c[key], 7);
      }),
    );
  });

  it.each([
    [{ a: 0, b: 5, c: 5, alpha: 90, beta: 90, gamma: 90 }],
    [{ a: 5, b: 5, c: 5, alpha: 30, beta: 40, gamma: 90 }],
    [{ a: -5, b: 5, c: 5, alpha: 90, beta: 90, gamma: 90 }],
  ])("refuses %j, which encloses no volume", (bad) => {
    expect(() => metricOf(bad)).toThrow(InputProblem);
    expect(() => metricOf(bad)).toThrow(/encloses no volume/);
  });
});

describe("metricMisfit", () => {
  const hexagonal = metricOf({ a: 5, b: 5, c: 9, alpha: 90, beta: 90, gamma: 120 });
  test("is nothing for a threefold axis of a hexagonal cell", () => {
    expect(metricMisfit(hexagonal, [0, -1, 0, 1, -1, 0, 0, 0, 1])).toBeLessThan(1e-12);
  });
  test("is large for a fourfold axis of a hexagonal cell", () => {
    expect(metricMisfit(hexagonal, [0, -1, 0, 1, 0, 0, 0, 0, 1])).toBeGreaterThan(0.5);
  });
});

test("multiply3 agrees with applying one matrix after the other", () => {
  const a = [1, 2, 3, 4, 5, 6, 7, 8, 10] as const;
  const b = [2, 0, 1, 1, 3, 0, 0, 1, 4] as const;
  expect(apply3(multiply3(a, b), [1, -1, 2])).toEqual(apply3(a, apply3(b, [1, -1, 2])));
});

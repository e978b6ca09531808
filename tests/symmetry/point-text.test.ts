import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { rational } from "../../lib/algebra/index.ts";
import { formatPoint, parsePoint, unroundedPoint, type WrittenCoordinate } from "../../lib/symmetry/index.ts";
import { problemOf } from "../support/problem-of.ts";

const fraction = fc
  .tuple(fc.integer({ min: -50, max: 50 }), fc.integer({ min: 1, max: 48 }))
  .map(([n, d]): WrittenCoordinate => ({ value: rational(n, d), decimals: null }));
const decimal = fc
  .tuple(fc.integer({ min: 1, max: 6 }), fc.integer({ min: -3_000_000, max: 3_000_000 }))
  .map(([decimals, n]): WrittenCoordinate => ({ value: rational(n, 10 ** decimals), decimals }));
const coordinate = fc.oneof(fraction, decimal);

test("a point reads back as it is written", () => {
  fc.assert(
    fc.property(coordinate, coordinate, coordinate, (x, y, z) => {
      expect(parsePoint(formatPoint([x, y, z]))).toEqual([x, y, z]);
    }),
  );
});

describe("a point", () => {
  it.each([
    ["0.1,1/4,0.3", ["1/10", "1/4", "3/10"]],
    ["0 0 0", ["0/1", "0/1", "0/1"]],
    [" -.5 , \u22121/3 , + 2/6", ["-1/2", "-1/3", "1/3"]],
    ["0.333,1.,-0", ["333/1000", "1/1", "0/1"]],
  ])("%j is exact", (text, values) => {
    expect(parsePoint(text).map(({ value }) => `${value.n}/${value.d}`)).toEqual(values);
  });

  it.each([
    ["0.1,0.2", 7],
    ["0.1,x,0", 4],
    ["1/0,0,0", 2],
    ["0,0,0,0", 5],
    ["", 0],
    ["0.1234567891,0,0", 11],
  ])("%j is refused at character %i", (text, start) => {
    const { code, span } = problemOf(() => parsePoint(text));
    expect([code, span!.start]).toEqual(["point-unreadable", start]);
  });

  it("with numbers beyond exact ones is refused", () => {
    expect(problemOf(() => parsePoint("1/90071992547409931,0,0")).code).toBe("number-too-long");
  });
});

describe("decimals that may be rounded fractions", () => {
  it.each([
    ["0.333,0.667,0.25", "1/3,2/3,0.25"],
    ["0.33,0.67,1/4", "1/3,2/3,1/4"],
    ["0.3333,0.6666,0", "1/3,2/3,0"],
    ["-0.333,0.12,0.167", "-1/3,1/8,1/6"],
    ["0.375,0.04,0", "0.375,1/24,0"],
  ])("%s may be %s", (text, meant) => expect(formatPoint(unroundedPoint(parsePoint(text))!)).toBe(meant));

  it.each(["0.3,0.7,0.2", "0.31,0.7,0.25", "1/3,0.5,0.125", "0,0,0"])("%s is none", (text) => {
    expect(unroundedPoint(parsePoint(text))).toBeNull();
  });
});

import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { formatRational, type Rational, rational } from "../../lib/algebra/index.ts";
import { type AffineExpression, formatExpression, parseTriplet } from "../../lib/symmetry/index.ts";
import { problemOf } from "../support/problem-of.ts";

const number: fc.Arbitrary<Rational> = fc
  .tuple(fc.integer({ min: -20, max: 20 }), fc.integer({ min: 1, max: 30 }))
  .map(([n, d]) => rational(n, d));
const expression: fc.Arbitrary<AffineExpression> = fc
  .tuple(fc.tuple(number, number, number), number)
  .map(([coefficients, constant]) => ({ coefficients, constant }));
const letters = fc.constantFrom("xyz", "abc", "hkl", "uvw");

describe("affine expressions", () => {
  test("are read back as they were written, in any letters", () => {
    fc.assert(
      fc.property(fc.tuple(expression, expression, expression), letters, (triplet, names) => {
        const text = triplet.map((e) => formatExpression(e, names)).join(",");
        expect(parseTriplet(text, names)).toEqual(triplet);
      }),
    );
  });

  it.each([
    ["2x-y/3,0,1/2*z", ["2", "-1/3", "0", "0"], ["0", "0", "0", "0"], ["0", "0", "1/2", "0"]],
    ["3/2x+.5y,-1/4,x+y+z", ["3/2", "1/2", "0", "0"], ["0", "0", "0", "-1/4"], ["1", "1", "1", "0"]],
    ["_x_,y - x,z", ["1", "0", "0", "0"], ["-1", "1", "0", "0"], ["0", "0", "1", "0"]],
  ])("%s has the coefficients and constants that were meant", (text, ...rows) => {
    const read = parseTriplet(text, "xyz").map((e) => [...e.coefficients, e.constant].map(formatRational));
    expect(read).toEqual(rows);
  });

  it.each([
    [[1, 0, 0], 0, "x"],
    [[-1, 1, 0], 0, "-x+y"],
    [[0, 0, 0], 0, "0"],
    [[0, 0, 0], -3, "-3"],
    [[2, 0, -3], 1, "2x-3z+1"],
  ])("%j and %i are written %4$s", (row, constant, text) => {
    const [a, b, c] = row.map((n) => rational(n));
    expect(formatExpression({ coefficients: [a!, b!, c!], constant: rational(constant) }, "xyz")).toBe(text);
  });

  it("names the letters that belong", () => {
    const problem = problemOf(() => parseTriplet("a-b,a+b,z", "abc"));
    expect(problem.message).toBe('"a-b,a+b,z" is not three expressions in a, b, c: character 9, "z", does not fit');
    expect(problem.span).toEqual({ start: 8, end: 9 });
    expect(problem.hint).toBe("write it like a-b,a+b,c");
  });
});

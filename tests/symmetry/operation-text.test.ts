import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { ratVec3 } from "../../lib/algebra/index.ts";
import {
  DECIMAL_TOLERANCE,
  formatOperation,
  fractionFromDecimal,
  type Operation,
  parseOperation,
} from "../../lib/symmetry/index.ts";
import { problemOf } from "../support/problem-of.ts";
import { operation } from "./arbitraries.ts";

describe("parseOperation", () => {
  it.each([
    ["x,y,z", "x,y,z"],
    ["-X,Y+1/2,-Z", "-x,y+1/2,-z"],
    ["1/2-x, +y ,\tz-.5", "-x+1/2,y,z+1/2"],
    ["'-x, y, z'", "-x,y,z"],
    ['  "x,y,z+1/4" ', "x,y,z+1/4"],
    ["x-y,x,z+.3333", "x-y,x,z+1/3"],
    ["x,y,z+0.6667", "x,y,z+2/3"],
    ["x+.125,y-0.125,z", "x+1/8,y+7/8,z"],
    ["x+0.16667,y+.8333,z+0.0417", "x+1/6,y+5/6,z+1/24"],
    ["x+4/3,y-5/4,z+2", "x+1/3,y+3/4,z"],
    ["x+1/97,y,z", "x+1/97,y,z"],
    ["-y+x,x,z", "x-y,x,z"],
    ["2x-x,1*y,z", "x,y,z"],
    ["x+1/4+1/4,y,z", "x+1/2,y,z"],
    ["x+1 / 2,y,z", "x+1/2,y,z"],
    ["\u2212x,y,z", "-x,y,z"],
    ["-x,-y,-z+1/2\r\n", "-x,-y,-z+1/2"],
    ["x/1,y,z", "x,y,z"],
  ])("reads %j as %s", (text, meant) => {
    expect(formatOperation(parseOperation(text))).toBe(meant);
  });

  it("gives rows of W in the order of the expressions", () => {
    const read: Operation = { W: [0, -1, 0, 1, -1, 0, 0, 0, 1], w: ratVec3([0, 0, 1], 3) };
    expect(parseOperation("-y,x-y,z+1/3")).toEqual(read);
  });

  it.each([
    ["x,y", 3, 3, "it ends too early"],
    ["", 0, 0, "it ends too early"],
    ["x,y,z,", 5, 6, 'character 6, ",", does not fit'],
    ["x,y,q", 4, 5, 'character 5, "q", does not fit'],
    [" 'x,y,w'", 6, 7, 'character 7, "w", does not fit'],
    ["''", 1, 2, `character 2, "'", does not fit`],
    ["x,y,--z", 5, 6, 'character 6, "-", does not fit'],
    ["x y,z,z", 2, 3, 'character 3, "y", does not fit'],
    ["x,y,z+.33", 6, 9, ".33 was found where a decimal within 0.002 of a fraction"],
    ["x,.33+y,z", 2, 5, ".33 was found where a decimal within 0.002 of a fraction"],
    ["x,y,z+1/0", 6, 9, "1/0 was found where a denominator other than 0 belongs"],
  ])("refuses %j and marks %i to %i", (text, start, end, why) => {
    const problem = problemOf(() => parseOperation(text));
    expect(problem.code).toBe("triplet-unreadable");
    expect(problem.span).toEqual({ start, end });
    expect(problem.message).toContain(`"${text}" is not three expressions in x, y, z: ${why}`);
    expect(problem.hint).toMatch(/^write /);
  });

  it.each([
    ["x,x,z", "its rotation part has determinant 0, not 1 or -1"],
    ["2x,y,z", "its rotation part has determinant 2, not 1 or -1"],
    ["x/2,y,z", "its rotation part is not integer in this cell"],
    ["x+.3333y,y,z", "its rotation part is not integer in this cell"],
  ])("refuses %s, which maps no lattice onto itself", (text, why) => {
    const problem = problemOf(() => parseOperation(text));
    expect(problem.code).toBe("operation-impossible");
    expect(problem.message).toBe(`"${text}" is not a symmetry operation: ${why}`);
    expect(problem.span).toEqual({ start: 0, end: text.length });
    expect(problem.hint).not.toBe("");
  });

  it.each([
    "x,y,z+99999999999999999999",
    "x,y,z+1/99999999999999999999",
    "x,y,z+1/9007199254740991+1/9007199254740990",
  ])("refuses %s, whose numbers cannot be kept exact", (text) =>
    expect(problemOf(() => parseOperation(text)).code).toBe("number-too-long"),
  );

  it("refuses three denominators without an exact common one", () => {
    const text = "x+1/94906267,y+1/94906249,z+1/94906247";
    expect(problemOf(() => parseOperation(text)).code).toBe("number-too-long");
  });
});

describe("formatOperation", () => {
  test("is undone by parseOperation", () => {
    fc.assert(
      fc.property(operation, (a) => {
        expect(parseOperation(formatOperation(a))).toEqual(a);
      }),
    );
  });

  test("means the same however blanks, capitals and the order of terms are changed", () => {
    const noise = fc.tuple(operation, fc.array(fc.boolean(), { minLength: 4, maxLength: 4 }));
    fc.assert(
      fc.property(noise, ([a, [capitals, blanks, turned, quoted]]) => {
        let text = formatOperation(a);
        if (turned) text = text.split(",").map(turnRound).join(",");
        if (capitals) text = text.toUpperCase();
        if (blanks) text = ` ${[...text].join(" ").replace(/(\d) (?=\d)/g, "$1")} `;
        if (quoted) text = `'${text}'`;
        expect(parseOperation(text)).toEqual(a);
      }),
    );
  });
});

/** The terms of a sum in the opposite order. */
function turnRound(sum: string): string {
  return sum
    .split(/(?=[+-])/)
    .reverse()
    .join("+")
    .replace(/\+([+-])/g, "$1");
}

describe("fractionFromDecimal", () => {
  it.each([
    [".3333", 1, 3],
    ["0.6667", 2, 3],
    ["-0.125", -1, 8],
    ["0.333", 1, 3],
    [".667", 2, 3],
    ["0.0417", 1, 24],
    [".5833", 7, 12],
    ["1.25", 5, 4],
    ["-0.0000", 0, 1],
    ["3", 3, 1],
  ])("reads %s as %i/%i", (text, n, d) => {
    expect(fractionFromDecimal(Number(text))).toEqual({ n, d });
  });

  it.each([".33", ".67", "0.1", "0.2", "0.02", "0.4", "0.7"])(
    "refuses %s, which could as well be a misprint",
    (text) => {
      expect(fractionFromDecimal(Number(text))).toBeNull();
    },
  );

  test("finds every crystallographic fraction from three decimals, and no other within the tolerance", () => {
    const fraction = fc
      .constantFrom(1, 2, 3, 4, 6, 8, 12, 24)
      .chain((d) => fc.tuple(fc.integer({ min: -2 * d, max: 2 * d }), fc.constant(d)));
    fc.assert(
      fc.property(fraction, ([n, d]) => {
        const read = fractionFromDecimal(Number((n / d).toFixed(3)))!;
        expect(read.n * d).toBe(n * read.d + 0);
      }),
    );
    expect(2 * DECIMAL_TOLERANCE).toBeLessThan(1 / 24);
  });
});

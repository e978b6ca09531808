import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { modOne, vectorOf } from "../../lib/algebra/index.ts";
import { parseTriplet } from "../../lib/symmetry/index.ts";
import { plainOperation } from "../../lib/symmetry/plain-operation.ts";

/** What the grammar reads, or null where it refuses. */
function byGrammar(text: string) {
  try {
    const rows = parseTriplet(text, "xyz");
    const W = rows.flatMap((r) => r.coefficients.map((c) => (c.d === 1 ? c.n : Number.NaN)));
    return { W, w: modOne(vectorOf(rows[0].constant, rows[1].constant, rows[2].constant)) };
  } catch {
    return null;
  }
}

describe("plainOperation", () => {
  it.each(["x,y,z", "-X, 1/2+Y, z-3/4", "x-y,x,z+1/3", " -y + z+3/4 , -x+z+1/4,z+1/2", "-x+5/6,y,z"])(
    "reads %s itself",
    (text) => {
      expect(plainOperation(text)).toEqual(byGrammar(text));
      expect(plainOperation(text)).not.toBeNull();
    },
  );

  it.each([
    "x,y",
    "x,y,z,",
    "2x,y,z",
    "x+.5,y,z",
    "x+0.3333,y,z",
    "'x,y,z'",
    "x y,z,x",
    "x--y,y,z",
    "x/2,y,z",
    "x+1/5,y,z",
    "",
    "x+x,y,z",
    "x+,y,z",
    "1/2x,y,z",
  ])("leaves %j to the grammar", (text) => expect(plainOperation(text)).toBeNull());

  test("agrees with the grammar on whatever it reads", () => {
    const piece = fc.constantFrom(
      "x",
      "y",
      "z",
      "X",
      "-",
      "+",
      ",",
      "1/2",
      "1/4",
      "2/3",
      "11/24",
      " ",
      "1",
      "/",
      "y+1/2",
      "-x,",
      "z",
    );
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 12 }), (pieces) => {
        const text = pieces.join("");
        const plain = plainOperation(text);
        if (plain) expect(plain).toEqual(byGrammar(text));
      }),
      { numRuns: 3000 },
    );
  });
});

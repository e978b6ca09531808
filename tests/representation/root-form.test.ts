import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { formatRoot, rootForm } from "../../lib/representation/index.ts";

describe("rootForm", () => {
  test("gives back the integers and the denominator that a vector was made of", () => {
    const integer = fc.integer({ min: -60, max: 60 });
    fc.assert(
      fc.property(
        fc.array(integer, { minLength: 1, maxLength: 8 }),
        fc.integer({ min: 1, max: 400 }),
        (squares, norm) => {
          const vector = squares.map((n) => Math.sign(n) * Math.sqrt(Math.abs(n) / norm));
          const form = rootForm([vector])!;
          const gcd = (a: number, b: number): number => (b === 0 ? Math.abs(a) : gcd(b, a % b));
          const divisor = [...squares, norm].reduce(gcd);
          expect(form).toEqual({ norm: norm / divisor, squares: [squares.map((n) => n / divisor + 0)] });
        },
      ),
    );
  });

  it.each([Math.PI / 4, Math.cos(1), 0.123456789012345])("knows that %d is no root of a small fraction", (x) => {
    expect(rootForm([[x]])).toBeNull();
  });

  it("takes vectors together", () => {
    expect(
      rootForm([
        [0.5, 0],
        [0, Math.sqrt(0.75)],
      ]),
    ).toEqual({
      norm: 4,
      squares: [
        [1, 0],
        [0, 3],
      ],
    });
  });
});

describe("formatRoot", () => {
  it.each([
    [0, "0"],
    [1, "1"],
    [-4, "-2"],
    [3, "sqrt3"],
    [-12, "-2sqrt3"],
    [50, "5sqrt2"],
  ])("writes the root of %i as %s", (n, text) => expect(formatRoot(n)).toBe(text));
});

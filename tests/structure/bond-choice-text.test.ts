import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  type BondPattern,
  formatBondPatterns,
  formatUnitMembers,
  parseBondPatterns,
  parseUnitMembers,
} from "../../lib/structure/index.ts";

const name = fc.oneof(
  fc.constantFrom("W", "O", "*", "Fe1", "O1'", "C(2)", "H2A", "O_1#2"),
  fc.stringMatching(/^[A-Za-z][A-Za-z0-9 ,<>;-]{0,5}$/),
);
const limit = fc.option(fc.double({ min: 0, max: 9, noNaN: true }).map((x) => x + 0));
const pattern: fc.Arbitrary<BondPattern> = fc
  .record({ ends: fc.tuple(name, name), above: limit, below: limit })
  .filter((p) => p.above === null || p.below === null || p.above < p.below);

describe("bond patterns", () => {
  test("are read back as they were written", () => {
    fc.assert(
      fc.property(fc.array(pattern, { minLength: 1, maxLength: 4 }), (list) => {
        expect(parseBondPatterns(formatBondPatterns(list))).toEqual(list);
      }),
    );
  });

  test.each([
    ["W-O<1.95", [{ ends: ["W", "O"], above: null, below: 1.95 }]],
    [" Ca - O ", [{ ends: ["Ca", "O"], above: null, below: null }]],
    ["Fe1-O3<2.3>1.8", [{ ends: ["Fe1", "O3"], above: 1.8, below: 2.3 }]],
    [
      'Pb-*, "C-1"–N<.9',
      [
        { ends: ["Pb", "*"], above: null, below: null },
        { ends: ["C-1", "N"], above: null, below: 0.9 },
      ],
    ],
  ])("reads %s", (text, expected) => expect(parseBondPatterns(text)).toEqual(expected));

  test.each([
    ["W", 1, "it ends too early"],
    ["W-O<", 4, "it ends too early"],
    ["W=O", 1, 'character 2, "=", does not fit'],
    ["W-O<1.95 Å", 9, 'character 10, "Å", does not fit'],
    ["", 0, "it ends too early"],
  ])("refuses %s at character %i", (text, start, words) => {
    const read = () => parseBondPatterns(text);
    expect(read).toThrow(words);
    expect(read).toThrow(
      expect.objectContaining({ code: "bond-pattern-unreadable", span: expect.objectContaining({ start }) }),
    );
  });

  test("refuses a range that holds no distance", () => {
    expect(() => parseBondPatterns("W-O>2<1.9")).toThrow(expect.objectContaining({ code: "bond-pattern-empty" }));
  });
});

describe("members of a unit", () => {
  test("are read back as they were written", () => {
    fc.assert(
      fc.property(fc.array(name, { minLength: 1, maxLength: 5 }), (list) => {
        expect(parseUnitMembers(formatUnitMembers(list))).toEqual(list);
      }),
    );
  });

  test("may stand with commas or blanks between them", () => {
    expect(parseUnitMembers("W1, O1 O2")).toEqual(["W1", "O1", "O2"]);
    expect(() => parseUnitMembers("W1,,O1")).toThrow(expect.objectContaining({ code: "unit-unreadable" }));
  });
});

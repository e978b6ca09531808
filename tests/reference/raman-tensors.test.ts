import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { matrixEntries, pointGroupTable } from "../../lib/representation/index.ts";

/**
 * Raman tensors of the crystal classes: R. Loudon, Advances in Physics 13 (1964) 423, table 1 (from memory); z along
 * the principal axis, y along the twofold axis of monoclinic classes, x along a. Entries xx xy xz; yy yz; zz.
 * Letters are used anew in every species.
 */
const TABLE: readonly (readonly [string, string, readonly string[]])[] = [
  ["2/m", "Ag", ["a . d / b . / c"]],
  ["2/m", "Bg", [". e . / . f / ."]],
  ["2", "A", ["a . d / b . / c"]],
  ["m", "A''", [". e . / . f / ."]],
  ["222", "A", ["a . . / b . / c"]],
  ["mm2", "B1", [". . e / . . / ."]],
  ["mm2", "B2", [". . . / . f / ."]],
  ["mmm", "B1g", [". d . / . . / ."]],
  ["3", "A", ["a . . / a . / b"]],
  ["3", "E", ["c d e / -c f / .", "d -c -f / -d e / ."]],
  ["-3", "Eg", ["c d e / -c f / .", "d -c -f / -d e / ."]],
  ["321", "E", ["c . . / -c d / .", ". -c -d / . . / ."]],
  ["3m1", "E", ["c . . / -c d / .", ". -c -d / . . / ."]],
  ["-3m1", "Eg", ["c . . / -c d / .", ". -c -d / . . / ."]],
  ["4", "B", ["c d . / -c . / ."]],
  ["4", "E", [". . e / . f / .", ". . -f / . e / ."]],
  ["-4", "E", [". . e / . f / .", ". . f / . -e / ."]],
  ["4/m", "Bg", ["c d . / -c . / ."]],
  ["4/m", "Eg", [". . e / . f / .", ". . -f / . e / ."]],
  ["4mm", "B1", ["c . . / -c . / ."]],
  ["4mm", "B2", [". d . / . . / ."]],
  ["4mm", "E", [". . e / . . / .", ". . . / . e / ."]],
  ["422", "E", [". . . / . e / .", ". . -e / . . / ."]],
  ["-42m", "E", [". . . / . e / .", ". . e / . . / ."]],
  ["4/mmm", "A1g", ["a . . / a . / b"]],
  ["4/mmm", "Eg", [". . . / . e / .", ". . -e / . . / ."]],
  ["6", "E1", [". . c / . d / .", ". . -d / . c / ."]],
  ["6", "E2", ["e f . / -e . / .", "f -e . / -f . / ."]],
  ["-6", "E'", ["e f . / -e . / .", "f -e . / -f . / ."]],
  ["-6", "E''", [". . c / . d / .", ". . -d / . c / ."]],
  ["622", "E1", [". . . / . c / .", ". . -c / . . / ."]],
  ["622", "E2", ["d . . / -d . / .", ". -d . / . . / ."]],
  ["6mm", "E1", [". . c / . . / .", ". . . / . c / ."]],
  ["-6m2", "E'", ["d . . / -d . / .", ". -d . / . . / ."]],
  ["-6m2", "E''", [". . c / . . / .", ". . . / . c / ."]],
  ["6/mmm", "E2g", ["d . . / -d . / .", ". -d . / . . / ."]],
  ["m-3m", "A1g", ["a . . / a . / a"]],
  ["m-3m", "Eg", ["b . . / b . / -2b", "-sqrt3b . . / sqrt3b . / ."]],
  ["m-3m", "T2g", [". . . / . d / .", ". . d / . . / .", ". d . / . . / ."]],
  ["-43m", "T2", [". . . / . d / .", ". . d / . . / .", ". d . / . . / ."]],
  ["432", "E", ["b . . / b . / -2b", "-sqrt3b . . / sqrt3b . / ."]],
];

/** Value of an entry such as `-2b`, `sqrt3 b`, `.` for given values of the letters, the first letter met first. */
function evaluate(entry: string, values: readonly number[], met: string[]): number {
  const match = /^(-?)(\d*)(?:sqrt(\d))? ?([a-z])$/.exec(entry);
  if (!match) {
    expect(entry).toBe(".");
    return 0;
  }
  const [, sign, factor, root, letter = ""] = match;
  if (!met.includes(letter)) met.push(letter);
  return (sign ? -1 : 1) * Number(factor || 1) * Math.sqrt(Number(root ?? 1)) * values[met.indexOf(letter)]!;
}

/** Full tensors of the partners, for values of the letters in order of appearance. */
function tensors(partners: readonly (readonly string[])[], values: readonly number[]): number[][][] {
  const met: string[] = [];
  return partners.map((entries) => {
    const [xx, xy, xz, yy, yz, zz] = entries.map((e) => evaluate(e, values, met));
    return [
      [xx!, xy!, xz!],
      [xy!, yy!, yz!],
      [xz!, yz!, zz!],
    ];
  });
}

/** Scattered intensity, the sum over partners of (incident . tensor . scattered)^2: blind to the choice of partners. */
function intensity(list: readonly number[][][], incident: readonly number[], scattered: readonly number[]): number {
  return list.reduce((total, T) => {
    const amplitude = T.reduce((t, row, i) => t + row.reduce((u, e, j) => u + incident[i]! * e * scattered[j]!, 0), 0);
    return total + amplitude ** 2;
  }, 0);
}

const vector = fc.array(fc.integer({ min: -9, max: 9 }), { minLength: 4, maxLength: 4 });

describe("Raman tensors", () => {
  it.each(TABLE)("of %s, %s scatter as published in every geometry", (symbol, label, published) => {
    const form = pointGroupTable(symbol).raman.forms.find((f) => f.label === label)!;
    const expected = published.map((text) => text.split(/[ /]+/));
    const found = form.partners.map((p) => p.entries);
    fc.assert(
      fc.property(vector, vector, vector, (values, incident, scattered) => {
        const [a, b] = [tensors(found, values), tensors(expected, values)];
        expect(intensity(a, incident, scattered)).toBeCloseTo(intensity(b, incident, scattered), 6);
      }),
      { numRuns: 30 },
    );
  });

  it("of quartz (321) and of rutile-like classes read letter by letter as Loudon prints them", () => {
    const print = (symbol: string, label: string) =>
      pointGroupTable(symbol)
        .raman.forms.find((f) => f.label === label)!
        .partners.map((p) =>
          matrixEntries(p.entries)
            .map((row) => row.join(" "))
            .join("; "),
        );
    expect(print("321", "E")).toEqual(["c . .; . -c d; . d .", ". -c -d; -c . .; -d . ."]);
    expect(print("3", "E")).toEqual(["c d e; d -c f; e f .", "d -c -f; -c -d e; -f e ."]);
    expect(print("4/mmm", "B1g")).toEqual(["c . .; . -c .; . . ."]);
    expect(print("m-3m", "Eg")).toEqual(["b . .; . b .; . . -2b", "-sqrt3 b . .; . sqrt3 b .; . . ."]);
  });
});

import { describe, expect, it } from "vitest";
import { determinant } from "../../lib/algebra/index.ts";
import { groupsInCell } from "../../lib/audit/groups-in-cell.ts";
import { EXPECTED_ACENTRIC, EXPECTED_CENTRIC, EXPECTED_TWINNED } from "../../lib/audit/intensity-statistics.ts";
import {
  extinctionSymbol,
  rotationParts,
  settingOperations,
  settingsOf,
  spaceGroup,
} from "../../lib/symmetry/index.ts";

/** Extinction symbols of the lattices with the full symmetry of a Laue class, given by number and setting. */
function symbols(laueClass: string, lattices: readonly (readonly [number, string])[]): string[] {
  return lattices.flatMap(([number, name]) => {
    const setting = settingsOf(number).find((s) => s.name === name)!;
    const group = spaceGroup(settingOperations(setting));
    const rotations = rotationParts(group).filter((W) => determinant(W) === 1);
    return groupsInCell(laueClass, rotations, group.centrings).map((e) => e.symbol);
  });
}

// A. Looijenga-Vos, M. J. Buerger, International Tables for Crystallography A (2005), tables 3.1.4.1: numbers and
// symbols from memory.
describe("extinction symbols of International Tables", () => {
  it("are 14 in the monoclinic system, unique axis b", () => {
    const found = symbols("2/m", [
      [10, "b"],
      [12, "b1"],
      [12, "b2"],
      [12, "b3"],
    ]);
    expect(new Set(found)).toEqual(
      new Set([
        "P 1 - 1",
        "P 1 21 1",
        "P 1 a 1",
        "P 1 c 1",
        "P 1 n 1",
        "P 1 21/a 1",
        "P 1 21/c 1",
        "P 1 21/n 1",
        "C 1 - 1",
        "C 1 c 1",
        "A 1 - 1",
        "A 1 n 1",
        "I 1 - 1",
        "I 1 a 1",
      ]),
    );
    expect(found).toHaveLength(14);
  });

  it("are 111 in the orthorhombic system", () => {
    const found = symbols("mmm", [
      [47, "abc"],
      [65, "abc"],
      [65, "cab"],
      [65, "bca"],
      [71, "abc"],
      [69, "abc"],
    ]);
    expect(found).toHaveLength(111);
    expect(new Set(found).size).toBe(111);
  });

  it("are 31 in the tetragonal system", () => {
    const low = symbols("4/m", [
      [83, ""],
      [87, ""],
    ]);
    const high = symbols("4/mmm", [
      [123, ""],
      [139, ""],
    ]);
    expect(new Set([...low, ...high]).size).toBe(31);
  });

  it.each([
    [14, "P 1 21/c 1"],
    [20, "C - - 21"],
    [33, "P n a -"],
    [43, "F d d -"],
    [46, "I - (ac) -"],
    [62, "P n - a"],
    [64, "C - c (ab)"],
    [70, "F d d d"],
    [73, "I b c a"],
    [74, "I - - (ab)"],
    [76, "P 41 - -"],
    [86, "P 42/n - -"],
    [88, "I 41/a - -"],
    [92, "P 41 21 -"],
    [122, "I - - d"],
    [141, "I a - d"],
    [161, "R(obv) - c"],
    [178, "P 61 - -"],
    [194, "P - - c"],
    [205, "P a - -"],
    [220, "I - - d"],
    [227, "F d - -"],
    [228, "F d - c"],
    [230, "I a - d"],
  ])("of No. %i is %s", (number, symbol) => {
    const setting = settingsOf(number)[0]!;
    expect(extinctionSymbol(setting, spaceGroup(settingOperations(setting)))).toBe(symbol);
  });
});

/** Midpoint rule over [0, 60], fine enough for the peak of the centric density, which is taken over the amplitude. */
function expectation(density: (amplitude: number) => number, deviation: (square: number) => number): number {
  const step = 1e-4;
  let sum = 0;
  for (let i = 0; i < 120000; i++) {
    const e = (i + 0.5) * step;
    sum += density(e) * deviation(e * e) * step;
  }
  return sum;
}

// A. J. C. Wilson, Acta Cryst. 2 (1949) 318; for twins E. Stanley, J. Appl. Cryst. 5 (1972) 191 (numbers from memory).
describe("expectations of <|E^2 - 1|>", () => {
  const deviation = (square: number) => Math.abs(square - 1);

  it("are 2/e = 0.736 for acentric and 0.968 for centric distributions", () => {
    expect(expectation((e) => 2 * e * Math.exp(-e * e), deviation)).toBeCloseTo(2 / Math.E, 5);
    expect(EXPECTED_ACENTRIC).toBeCloseTo(2 / Math.E, 3);
    const centric = expectation((e) => Math.sqrt(2 / Math.PI) * Math.exp((-e * e) / 2), deviation);
    expect(EXPECTED_CENTRIC).toBeCloseTo(centric, 3);
  });

  it("are 4/e^2 = 0.541 for the mean of two independent acentric intensities", () => {
    // z has density 4 z exp(-2z), z = e^2
    const twinned = expectation((e) => 8 * e ** 3 * Math.exp(-2 * e * e), deviation);
    expect(twinned).toBeCloseTo(4 / Math.E ** 2, 5);
    expect(EXPECTED_TWINNED).toBeCloseTo(twinned, 3);
  });
});

import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { equal, IDENTITY, modOne, ratMat3, ratVec3 } from "../../lib/algebra/index.ts";
import { InputProblem } from "../../lib/problem.ts";
import { missingProduct } from "../../lib/symmetry/group-closure.ts";
import { operationsFromHall } from "../../lib/symmetry/hall-symbol.ts";
import { hallSymbolOf } from "../../lib/symmetry/hall-symbol-of.ts";
import { formatHallSymbol, parseHallSymbol } from "../../lib/symmetry/hall-symbol-text.ts";
import { type Operation, operationKey } from "../../lib/symmetry/operation.ts";
import { formatOperation } from "../../lib/symmetry/operation-text.ts";
import { spaceGroupTypes } from "../../lib/symmetry/space-group-type.ts";
import { reverse, transformOperation } from "../../lib/symmetry/transformation.ts";

const keys = (operations: readonly Operation[]) => operations.map(operationKey).sort();
const xyz = (symbol: string) => operationsFromHall(symbol).operations.map(formatOperation);

/** Orders of the crystallographic point groups by the Schoenflies symbol. */
const ORDERS: Record<string, number> = {
  C1: 1,
  Ci: 2,
  Cs: 2,
  C2: 2,
  C3: 3,
  C4: 4,
  C6: 6,
  S4: 4,
  C2h: 4,
  C3h: 6,
  C3i: 6,
  C4h: 8,
  C6h: 12,
  C2v: 4,
  C3v: 6,
  C4v: 8,
  C6v: 12,
  D2: 4,
  D3: 6,
  D4: 8,
  D6: 12,
  D2h: 8,
  D3h: 12,
  D4h: 16,
  D6h: 24,
  D2d: 8,
  D3d: 12,
  T: 12,
  Th: 24,
  O: 24,
  Td: 24,
  Oh: 48,
};
const CENTRINGS: Record<string, number> = { P: 1, A: 2, C: 2, I: 2, R: 3, F: 4 };

describe("operationsFromHall", () => {
  it.each(spaceGroupTypes().map((t) => [t.number, t.hall, t] as const))(
    "gives type %i, %s, as many operations as its point group and lattice have",
    (_, hall, type) => {
      const { operations, centrings } = operationsFromHall(hall);
      const points = CENTRINGS[type.hermannMauguin[0]!]!;
      expect(centrings).toHaveLength(points);
      expect(operations).toHaveLength(ORDERS[type.schoenflies.split("^")[0]!]! * points);
      expect(equal(operations[0]!.W, IDENTITY) && operations[0]!.w.n.every((n) => n === 0)).toBe(true);
      expect(operations.every((a) => a.w.n.every((n) => n >= 0 && n < a.w.d))).toBe(true);
      if (operations.length <= 48) expect(missingProduct(operations)).toBeNull();
    },
  );

  // International Tables for Crystallography A, general positions, from memory.
  it.each([
    ["-P 2ybc", ["x,y,z", "-x,y+1/2,-z+1/2", "-x,-y,-z", "x,-y+1/2,z+1/2"]],
    [
      "-P 2ac 2n",
      [
        ...["x,y,z", "-x+1/2,-y,z+1/2", "-x,y+1/2,-z", "x+1/2,-y+1/2,-z+1/2"],
        ...["-x,-y,-z", "x+1/2,y,-z+1/2", "x,-y+1/2,z", "-x+1/2,y+1/2,z+1/2"],
      ],
    ],
    ["P 41", ["x,y,z", "-x,-y,z+1/2", "-y,x,z+1/4", "y,-x,z+3/4"]],
    ["P 31 2 (0 0 4)", ["x,y,z", "-y,x-y,z+1/3", "-x+y,-x,z+2/3", "-y,-x,-z+2/3", "-x+y,y,-z+1/3", "x,x-y,-z"]],
    ["P 2 -2c", ["x,y,z", "-x,-y,z", "x,-y,z+1/2", "-x,y,z+1/2"]],
    ["P 4n -2n", ["x,y,z", "-x,-y,z", "-y+1/2,x+1/2,z+1/2", "y+1/2,-x+1/2,z+1/2"]],
  ])("%s holds the operations that are printed for it", (hall, printed) => {
    expect(xyz(hall)).toEqual(expect.arrayContaining(printed));
  });

  it("reads a change of basis as new coordinates in terms of the old ones", () => {
    expect(keys(operationsFromHall("C 2y (x,y,-x+z)").operations)).toEqual(keys(operationsFromHall("I 2y").operations));
    expect(xyz("P 2 (x+1/4,y,z)")).toEqual(["x,y,z", "-x+1/2,-y,z"]);
    expect(keys(operationsFromHall("P 2y (x/2+y/2,-x/2+y/2,z)").operations)).toHaveLength(4);
  });

  it("refuses a change of basis to axes that are no translations of the lattice", () => {
    expect(() => operationsFromHall("P 2y (2x,y,z)")).toThrow(/no lattice translations/);
  });

  it.each([
    ["-p_2ybc", "-P 2ybc"],
    ["-P2YBC", "-P 2ybc"],
    ["r 3 2''", 'R 3 2"'],
    ["  -P  2ac   2n ", "-P 2ac 2n"],
    ["P 3*", "P 3*"],
    ["\u2212P 2ac 2n", "-P 2ac 2n"],
    ["P 4z 2x", "P 4 2"],
    ["P 6 2'", "P 6 2"],
    ["P 61 2 ( 0 0 5 )", "P 61 2 (0 0 5)"],
    ["P 2 2 (0 0 -1)", "P 2 2 (0 0 -1)"],
  ])("reads %s as %s", (written, plain) => {
    expect(formatHallSymbol(parseHallSymbol(written))).toBe(plain);
    expect(keys(operationsFromHall(written).operations)).toEqual(keys(operationsFromHall(plain).operations));
  });

  it("writes all 230 symbols as they stand in the table", () => {
    for (const { hall } of spaceGroupTypes()) expect(formatHallSymbol(parseHallSymbol(hall))).toBe(hall);
  });

  it.each([
    ["", 0],
    ["Q 2", 0],
    ["-P 2ac 5n", 7],
    ["-P 2ac 2q", 8],
    ["P 2a(0 0 1", 4],
    ["P 4 2 4", 6],
    ["P 2* 2", 2],
    ["P 33", 2],
    ["P 2 (0 0)", 4],
    ["P 2 (x,x,z)", 4],
    ["P 2 (x,y,k)", 4],
  ])("refuses %j and points at character %i", (text, start) => {
    let problem: unknown;
    try {
      operationsFromHall(text);
    } catch (e) {
      problem = e;
    }
    expect(problem).toBeInstanceOf(InputProblem);
    expect(problem).toMatchObject({ code: "hall-unreadable", span: { start } });
    expect((problem as InputProblem).hint).not.toBe("");
  });
});

describe("hallSymbolOf", () => {
  const type = fc.constantFrom(...spaceGroupTypes());
  const eighth = fc.integer({ min: -12, max: 12 });
  const shear = fc.tuple(fc.integer({ min: -2, max: 2 }), fc.integer({ min: -2, max: 2 }), fc.boolean());

  it("gives the reference symbol for the reference setting", () => {
    for (const n of [1, 14, 62, 88, 152, 167, 178, 227]) {
      const { hall } = spaceGroupTypes()[n - 1]!;
      expect(hallSymbolOf(operationsFromHall(hall).operations)).toBe(hall);
    }
  });

  it.each([
    ["-P 2yn", "-P 2yn"],
    ["P 31 2 (0 0 2)", "P 31 2 (0 0 2)"],
    ["H 31 2 (0 0 2)", "H 31 2 (0 0 2)"],
    ["I 4bw 2bw -1bw", "I 4bw 2bw -1bw"],
    ["P 2yb (x+1/8,y,z)", "P 2ybu"],
    ["P 3* 2", "P 3* 2"],
    ['T 3 -2"c', 'T 3 -2"c'],
    ["-A 2ac 2n", "-A 2ab 2a"], // modulo 0,1/2,1/2 c is b and n is a,
  ])("writes the group of %s as %s", (symbol, written) => {
    expect(hallSymbolOf(operationsFromHall(symbol).operations)).toBe(written);
  });

  it("gives a symbol of exactly the operations given, in any skew cell and with any origin", () => {
    fc.assert(
      fc.property(type, eighth, eighth, eighth, shear, ({ hall }, i, j, k, [s, t, turn]) => {
        const P = ratMat3(turn ? [0, 0, 1, 1, 0, s, t, 1, 0] : [1, s, 0, 0, 1, t, 0, 0, 1]);
        const change = { P, p: ratVec3([i, j, k], 24) };
        const back = reverse(change);
        const moved = operationsFromHall(hall).operations.map((a) => {
          const b = transformOperation(a, change, back)!;
          return { W: b.W, w: modOne(b.w) };
        });
        const symbol = hallSymbolOf(moved);
        expect(keys(operationsFromHall(symbol).operations)).toEqual(keys(moved));
      }),
      { numRuns: 60 },
    );
  });
});

describe("parseHallSymbol and formatHallSymbol", () => {
  const lattice = fc.constantFrom("P", "-P", "-A", "B", "-C", "I", "-F", "R", "T", "H");
  const axes = fc.constantFrom(["2"], ["-2y"], ["4", "2"], ["-4", "-2"], ["2", "2", "3"], ["6", '-2"'], ["3*", "2"]);
  const letters = fc.array(fc.constantFrom("", "a", "c", "n", "ab", "uv", "d", "bw"), { minLength: 3, maxLength: 3 });
  const bracket = fc.oneof(
    fc.constant(""),
    fc.tuple(fc.integer({ min: 1, max: 11 }), fc.integer({ min: -11, max: 11 })).map(([i, j]) => ` (${i} 0 ${j})`),
    fc.constantFrom(" (x-y,x+y,z)", " (1/2x+1/2y,-1/2x+1/2y,z+1/8)", " (z,x,y)"),
  );
  const symbol = fc
    .tuple(lattice, axes, letters, bracket)
    .map(([l, a, t, b]) => `${l} ${a.map((r, i) => r + t[i]).join(" ")}${b}`);

  it("are inverse, whatever the spelling", () => {
    fc.assert(
      fc.property(symbol, fc.boolean(), (text, upper) => {
        const parsed = parseHallSymbol(text);
        expect(formatHallSymbol(parsed)).toBe(text);
        const spelt = upper ? text.toUpperCase() : text.replaceAll(" ", "_");
        expect(formatHallSymbol(parseHallSymbol(spelt))).toBe(text);
        for (const r of parsed.rotations) expect(text.slice(r.span.start, r.span.end)).toMatch(/^-?[1-6]/);
      }),
    );
  });
});

import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { InputProblem } from "../../lib/problem.ts";
import { readGroupName } from "../../lib/symmetry/hermann-mauguin.ts";
import { operationKey } from "../../lib/symmetry/operation.ts";
import { settingOperations } from "../../lib/symmetry/setting-group.ts";
import { settingsOf } from "../../lib/symmetry/settings.ts";
import { settleByCell } from "../../lib/symmetry/settle-by-cell.ts";
import { spaceGroupTypes } from "../../lib/symmetry/space-group-type.ts";
import { formatTransformation } from "../../lib/symmetry/transformation-text.ts";

const numbers = Array.from({ length: 230 }, (_, i) => i + 1);
const brief = (text: string) => readGroupName(text).candidates.map((c) => `${c.number}${c.setting.name}`);

describe("readGroupName", () => {
  it.each([
    ["P21/c", ["14b1", "14a3"]],
    ["P 1 21/c 1", ["14b1"]],
    ["P2(1)/c", ["14b1", "14a3"]],
    ["p_21/c", ["14b1", "14a3"]],
    ["P 2~1~/c", ["14b1", "14a3"]],
    ["P2\u2081/c", ["14b1", "14a3"]],
    ["P2_1/c", ["14b1", "14a3"]],
    ["P 2 1/c", ["14b1", "14a3"]],
    ["'P 21/n'", ["14b2", "14c2", "14a2"]],
    ["P 1 1 21/b", ["14c3"]],
    ["p21/b11", ["14a1"]],
    ["P21/c:b1", ["14b1"]],
    ["P 21/c (unique axis b, cell choice 1)", ["14b1"]],
    ["P 21/c (No. 14)", ["14b1", "14a3"]],
    ["Fd-3m:1", ["227:1"]],
    ["Fd3m", ["227:2", "227:1"]],
    ["Fd\u22123m", ["227:2", "227:1"]],
    ["F d 3\u0305 m", ["227:2", "227:1"]],
    ["F 41/d -3 2/m :2", ["227:2"]],
    ["R -3 c :H", ["167:H"]],
    ["R-3c:R", ["167:R"]],
    ["R 3 c r", ["161:R"]],
    ["R -3 m {hexagonal axes}", ["166:H"]],
    ["R-3c", ["167:H", "167:R"]],
    ["R -3 m 1", ["166:H", "166:R"]],
    ["I41/amd:2", ["141:2"]],
    ["I41/amdS", ["141:1"]],
    ["I 41/a m d Z", ["141:2"]],
    ["I 41/a m d (origin choice 1)", ["141:1"]],
    ["Pnma Z", ["62abc"]],
    ["Cmce", ["64abc"]],
    ["Cmca", ["64abc"]],
    ["Bmab", ["64a-cb"]],
    ["Bmeb", ["64a-cb"]],
    ["Pbnm", ["62cab"]],
    ["PNAM", ["62a-cb"]],
    ["P 21/n 21/m 21/a", ["62abc"]],
    ["C 1", ["1C"]],
    ["P-1", ["2"]],
    ["F-1", ["2F"]],
    ["P212121", ["19abc"]],
    ["P_21_21_21", ["19abc"]],
    ["P 2_1 2_1 2_1", ["19abc"]],
    ["P_2_2_2", ["16abc"]],
    ["P2221", ["17abc"]],
    ["P42212", ["94"]],
    ["P4212", ["90"]],
    ["P43212", ["96"]],
    ["P432", ["207"]],
    ["P4232", ["208"]],
    ["P4332", ["212"]],
    ["I4132", ["214"]],
    ["P6122", ["178"]],
    ["P312", ["149"]],
    ["P3112", ["151"]],
    ["P31m", ["157"]],
    ["P31", ["144"]],
    ["P32", ["145"]],
    ["P 3 2", ["149", "150"]],
    ["R32", ["155:H", "155:R"]],
    ["P213", ["198"]],
    ["P23", ["195"]],
    ["P42", ["77"]],
    ["P211", ["3a"]],
    ["P121", ["3b"]],
    ["P1211", ["4b"]],
    ["Pa3", ["205"]],
    ["Pb-3", ["205ba-c"]],
    ["C-42m", ["115C"]],
    ["F41/ddm:2", ["141F:2"]],
    ["H 3 m 1", ["157H"]],
    ["Ccca:1", ["68abc:1"]],
    ["Pnmm:2", ["59cab:2"]],
    ["D2h^16", ["62abc", "62ba-c", "62cab", "62-cba", "62bca", "62a-cb"]],
    ["D2h-28", ["74abc", "74ba-c", "74cab", "74-cba", "74bca", "74a-cb"]],
    ["D_{6h}^{4}", ["194"]],
    ["S6^2", ["148:H", "148:R"]],
    ["62:cab", ["62cab"]],
    ["14:b2", ["14b2"]],
    ["48:2", ["48abc:2"]],
    ["225", ["225"]],
  ])("reads %s", (text, expected) => {
    expect(brief(text)).toEqual(expected);
  });

  it.each([
    ["P21/c", "unique axis"],
    ["P 4/n", "origin choice"],
    ["R 3", "hexagonal or rhombohedral axes"],
    ["P -3 m", "type: 162 or 164"],
    ["14", "cell choice"],
    ["62", "order of the axes"],
    ["C 1 21 1", "elements that the conventional symbol does not name, so the origin is open"],
  ])("says of %s that it leaves open: %s", (text, open) => {
    expect(readGroupName(text).ambiguity).toContain(open);
  });

  it("leaves nothing open where the name says all", () => {
    for (const text of ["P 1 21/c 1", "Pnma", "F d -3 m :1", "R -3 c :R", "P 63/m m c"]) {
      expect(readGroupName(text).ambiguity).toEqual([]);
    }
  });

  it("takes a change of basis behind the symbol as new axes and origin, or as new coordinates", () => {
    const [shifted] = readGroupName("P 42/m m c (a,b+1/2,c)").candidates;
    expect(formatTransformation(shifted!.transformation)).toBe("a,b,c;0,-1/2,0");
    const [moved] = readGroupName("P 42/m m c (x,y-1/2,z)").candidates;
    expect(moved!.transformation).toEqual(shifted!.transformation);
    const halved = readGroupName("I 4/m m m (1/2a+1/2b,-1/2a+1/2b,c)").candidates[0]!;
    expect(formatTransformation(halved.transformation)).toBe("a-b,a+b,c;0,0,0");
  });

  it.each([
    ["", "group-name-unreadable", 0],
    ["foo", "group-name-unreadable", 1],
    ["P 21/q", "group-name-unreadable", 5],
    ["P 21/c !", "group-name-unreadable", 7],
    ["Pnam:004", "group-name-extension", 4],
    ["P 4/n :H", "group-name-extension", 5],
    ["Pmmn:cab", "group-name-extension", 4],
    ["Pnma (a,a,c)", "group-name-extension", 4],
    ["F43m", "group-name-unknown", 0],
    ["231", "group-name-unknown", 0],
    ["0", "group-name-unknown", 0],
  ])("refuses %j with %s and points at character %i", (text, code, start) => {
    let problem: unknown;
    try {
      readGroupName(text);
    } catch (e) {
      problem = e;
    }
    expect(problem).toBeInstanceOf(InputProblem);
    expect(problem).toMatchObject({ code, span: { start } });
    expect((problem as InputProblem).hint).not.toBe("");
  });

  it("asks whether a near symbol was meant", () => {
    expect(() => readGroupName("F43m")).toThrow(expect.objectContaining({ hint: expect.stringContaining("F -4 3 m") }));
  });

  it("finds every setting of every type by its short, full and older symbol and its code", () => {
    for (const number of numbers) {
      for (const setting of settingsOf(number)) {
        const { short, full, older } = setting.hermannMauguin;
        for (const symbol of [short, full, older ?? short]) {
          const found = readGroupName(setting.choice ? `${symbol}:${setting.choice}` : symbol).candidates;
          const same = found.some((c) => c.number === number && c.setting.hermannMauguin.full === full);
          expect([symbol, same]).toEqual([symbol, true]);
        }
      }
    }
  });

  it("takes monoclinic settings of one full symbol for one and the same group of operations", () => {
    for (let number = 3; number <= 15; number++) {
      const bySymbol = new Map<string, string>();
      for (const setting of settingsOf(number)) {
        const keys = settingOperations(setting).map(operationKey).sort().join(" ");
        const known = bySymbol.get(setting.hermannMauguin.full);
        expect(known ?? keys).toBe(keys);
        bySymbol.set(setting.hermannMauguin.full, keys);
      }
    }
  });

  it("reads the 230 reference symbols however they are spaced and spelt", () => {
    const spelling = fc.constantFrom(
      (s: string) => s,
      (s: string) => s.replaceAll(" ", ""),
      (s: string) => s.replaceAll(" ", "_"),
      (s: string) => ` ${s}  `,
      (s: string) => s.toUpperCase(),
      (s: string) => s.replace(/([2346])([1-5])(?=$|[ /])/g, "$1($2)"),
      (s: string) => `'${s}'`,
    );
    fc.assert(
      fc.property(fc.constantFrom(...spaceGroupTypes()), spelling, (type, spell) => {
        const found = readGroupName(spell(type.hermannMauguin)).candidates;
        expect(new Set(found.map((c) => c.number))).toEqual(new Set([type.number]));
      }),
      { numRuns: 300 },
    );
  });

  it("refuses any other text by an InputProblem with a span inside it", () => {
    fc.assert(
      fc.property(fc.string({ unit: fc.constantFrom(..."PCIR2346/-mnabcd1 :()_+,") }), (text) => {
        try {
          expect(readGroupName(text).candidates.length).toBeGreaterThan(0);
        } catch (e) {
          expect(e).toBeInstanceOf(InputProblem);
          const { span } = e as InputProblem;
          expect(span && span.start >= 0 && span.end <= Math.max(text.length, 1)).toBe(true);
        }
      }),
      { numRuns: 500 },
    );
  });
});

describe("settleByCell", () => {
  const cell = { a: 5.1, b: 6.2, c: 7.3, alpha: 90, beta: 90, gamma: 90 };
  it.each([
    ["P 21/c", { ...cell, beta: 101.2 }, ["b1"]],
    ["P 21/c", { ...cell, alpha: 101.2 }, ["a3"]],
    ["P 21", { ...cell, gamma: 95 }, ["c"]],
    ["R -3 c", { a: 5, b: 5, c: 17, alpha: 90, beta: 90, gamma: 120 }, [":H"]],
    ["R -3 c", { a: 6.4, b: 6.4, c: 6.4, alpha: 46.1, beta: 46.1, gamma: 46.1 }, [":R"]],
    ["P 21/n", { ...cell, alpha: 90.2, beta: 97.5, gamma: 89.9 }, ["b2"]],
    ["P 21/n", cell, ["b2", "c2", "a2"]],
    ["P 4/n", { ...cell, b: 5.1 }, [":2", ":1"]],
  ])("keeps of %s the settings that the cell allows", (text, shape, names) => {
    const settled = settleByCell(readGroupName(text), shape);
    expect(settled.candidates.map((c) => c.setting.name)).toEqual(names);
    expect(settled.ambiguity.length > 0).toBe(names.length > 1);
  });

  it("judges a change of axes behind the symbol by the axes meant", () => {
    const halved = readGroupName("I 4/m m m (1/2a+1/2b-1/2c,1/2a-1/2b+1/2c,-1/2a+1/2b+1/2c)");
    const c = Math.hypot(2, 2, 3); // primitive axes of a cell with a = b = 4, c = 6
    const angle = (x: number) => (Math.acos(x / (c * c)) * 180) / Math.PI;
    const shape = { a: c, b: c, c, alpha: angle(-4 - 4 + 9), beta: angle(-4 + 4 - 9), gamma: angle(4 - 4 - 9) };
    expect(settleByCell(halved, shape).ambiguity).toEqual([]);
    expect(settleByCell(halved, { ...shape, gamma: 90 }).ambiguity).toContain("the cell fits none of them");
  });

  it("says so where the cell fits no candidate", () => {
    const settled = settleByCell(readGroupName("Fm-3m"), cell);
    expect(settled.candidates).toHaveLength(1);
    expect(settled.ambiguity).toEqual(["the cell fits none of them"]);
  });
});

describe("old letters of glides in C-centred tetragonal cells", () => {
  it.each([
    ["C -4 2 b", 117],
    ["C -4 2 n", 118],
    ["C 4 c n", 104],
    ["C 4 m b", 100],
    ["C 4/m m b", 127],
  ])("%s is No. %i", (name, number) => {
    const { candidates } = readGroupName(name);
    expect([...new Set(candidates.map((c) => c.number))]).toEqual([number]);
    expect(candidates[0]!.setting.axes).toBe("C");
  });
});

import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { type AbsencesOptions, absencesAnswer, absencesQuestion, type Reflection } from "../../lib/audit/index.ts";
import { readCif } from "../../lib/cif/index.ts";
import { problemOf } from "../support/problem-of.ts";

const TEXT = readFileSync(new URL("../../fixtures/reflections/thenardite.cif", import.meta.url), "utf8");

/** Lines of the loop of reflections. */
const LINES = TEXT.slice(TEXT.indexOf("_refln_F_squared_sigma\n") + 23)
  .trim()
  .split("\n");
const HEAD = TEXT.slice(0, TEXT.lastIndexOf("loop_"));

function answer(text: string, options: AbsencesOptions = {}) {
  const { blocks } = readCif(text).value;
  return absencesAnswer(absencesQuestion(blocks[0]!, blocks, options).question);
}

/** The list with other indices, as a plain text in fixed columns. */
function fixedColumns(change: (h: number, k: number, l: number) => readonly number[]): string {
  const rows = LINES.map((line) => {
    const [h, k, l, value, sigma] = line.split(" ").map(Number) as [number, number, number, number, number];
    return (
      change(h, k, l)
        .map((e) => String(e).padStart(4))
        .join("") +
      value.toFixed(2).padStart(8) +
      sigma.toFixed(2).padStart(8)
    );
  });
  return `${rows.join("\n")}\n   0   0   0    0.00    0.00\n`;
}

describe("absences of thenardite, computed with harmonics and multiple diffraction", () => {
  const found = answer(TEXT);

  it("agree with F d d d, which stands alone at the head of the candidates", () => {
    expect(found.verdict).toBe("met");
    expect(found.extinctionSymbol).toBe("F d d d");
    expect(found.candidates[0]).toMatchObject({ number: 70, hermannMauguin: "F d d d", declared: true, evidence: 0 });
    expect(found.candidates[1]!.evidence).toBeLessThan(-5);
    expect(found.centring).toMatchObject({ letter: "F" });
    expect(found.laueClasses.find((c) => c.chosen)?.laueClass).toBe("mmm");
  });

  it("list the raised reflections, the strongest first, each with the narrowest condition that forbids it", () => {
    expect(found.violations.length).toBe(found.tested.violations);
    const overSigma = found.violations.map((v) => v.value / v.sigma);
    expect(overSigma).toEqual([...overSigma].sort((a, b) => b - a));
    expect(Math.min(...overSigma)).toBeGreaterThan(3);
    expect(found.violations.find((v) => v.h === 0 && v.k === 0)?.condition).toBe("00l: l=4n");
    expect(found.violations[0]).toMatchObject({ h: 2, k: 7, l: 3, condition: "hkl: h+k,h+l,k+l=2n" });
  });

  it.each([
    ["P b c a", "met"], // it forbids less than F d d d
    ["I m m m", "violated"],
    ["I b a m", "violated"],
    ["F d d 2", "met"],
    ["F m m m", "met"],
    ["P m m m", "no conditions"],
  ])("against %s: %s", (group, verdict) => expect(answer(TEXT, { group }).verdict).toBe(verdict));

  it("hold only finite numbers, as JSON needs them", () => {
    const numbers: number[] = [];
    JSON.stringify(found, (_, v) => {
      if (typeof v === "number") numbers.push(v);
      return v;
    });
    expect(numbers.length).toBeGreaterThan(100);
    expect(numbers.every(Number.isFinite)).toBe(true);
    expect(JSON.parse(JSON.stringify(found))).toEqual(found);
  });
});

describe("a list indexed in another cell", () => {
  // listed (h', k', l') = (l, -k, h+l), so h = -h'+l', k = -k', l = h'
  const turned = fixedColumns((h, k, l) => [l, -k, h + l]);
  const withMatrix = `${HEAD}\n_some_notes\n;\nABCD 4 1 -1 0 1 0 -1 0 1 0 0\n;\n_some_list\n;\n${turned};\n`;

  it("contradicts the group as it stands", () => {
    const found = answer(`${HEAD}\n_some_list\n;\n${turned};\n`);
    expect(found.verdict).toBe("violated");
    expect(found.reflections).toMatchObject({ matrix: null, source: "the text of _some_list", quantity: "F^2" });
  });

  it("is settled by the matrix in the file, and the answer says so", () => {
    const found = answer(withMatrix);
    expect(found.reflections.matrix).toBe("-h+l,-k,h");
    expect(found.reflections.matrixWhy).toContain("violate reflection conditions of the declared group");
    expect(found.verdict).toBe("met");
    expect(found.extinctionSymbol).toBe("F d d d");
  });

  it("is settled by a matrix that the user gives", () => {
    const other = { name: "list", text: turned };
    expect(answer(HEAD, { reflections: other, matrix: "-1 0 1 0 -1 0 1 0 0" }).verdict).toBe("met");
    expect(answer(HEAD, { reflections: other }).verdict).toBe("violated");
  });

  it("is not spoilt by a matrix that does not belong to it", () => {
    const plain = fixedColumns((h, k, l) => [h, k, l]);
    const found = answer(`${HEAD}\n_some_notes\n;\nABCD 4 1 -1 0 1 0 -1 0 1 0 0\n;\n_some_list\n;\n${plain};\n`);
    expect(found.reflections.matrix).toBeNull();
    expect(found.reflections.matrixWhy).toBe("with the matrix, more conditions are violated");
    expect(found.verdict).toBe("met");
  });
});

describe("absencesQuestion", () => {
  it("takes reflections from another block or another file", () => {
    const list = TEXT.slice(TEXT.lastIndexOf("loop_"));
    const twoBlocks = answer(`${HEAD}\ndata_list\n${list}`);
    expect(twoBlocks.reflections.source).toBe("the loop of _refln_F_squared_meas in block list");
    expect(answer(HEAD, { reflections: { name: "x", text: `data_list\n${list}` } }).verdict).toBe("met");
  });

  it("says what is missing", () => {
    const { blocks } = readCif(HEAD).value;
    const problem = problemOf(() => absencesQuestion(blocks[0]!, blocks));
    expect(problem.code).toBe("reflections-missing");
    expect(problem.hint).toContain("--reflections");
  });

  it("does without a declared group", () => {
    const bare = TEXT.replace(/loop_\n_space_group_symop_id[\s\S]*?\n\n/, "").replace(/^_space_group_.*\n/gm, "");
    const found = answer(bare);
    expect(found.verdict).toBe("no group");
    expect(found.conditions).toEqual([]);
    expect(found.candidates[0]!.number).toBe(70);
  });

  it("takes values for F when told so", () => {
    const squares = answer(TEXT);
    const amplitudes = answer(TEXT, { quantity: "F" });
    expect(amplitudes.reflections).toMatchObject({ quantity: "F", quantityFrom: "given" });
    expect(amplitudes.statistics.meanDeviation).not.toBe(squares.statistics.meanDeviation);
  });

  it("assumes uncertainties where the list has none", () => {
    const rows = LINES.map((line) => line.split(" ").slice(0, 4));
    const names = ["_refln_index_h", "_refln_index_k", "_refln_index_l", "_refln_F_squared_meas"];
    const loop = { names, rows };
    const text = `${HEAD}\nloop_\n${loop.names.join("\n")}\n${loop.rows.map((r) => r.join(" ")).join("\n")}\n`;
    const found = answer(text);
    expect(found.reflections.uncertainties).toBe("assumed");
    expect(found.verdict).toBe("met");
    expect(found.extinctionSymbol).toBe("F d d d");
  });
});

describe("lists that say next to nothing", () => {
  const lists: Readonly<Record<string, readonly Reflection[]>> = {
    "one reflection": [{ h: [1, 0, 0], value: 5, sigma: 1 }],
    "zeros without uncertainty": grid(() => ({ value: 0, sigma: 0 })),
    "negative values": grid(() => ({ value: -3, sigma: 1 })),
    "one reflection many times": Array.from({ length: 40 }, () => ({ h: [1, 1, 1], value: 3, sigma: null })),
    "indices beyond any crystal": [
      { h: [300, 2, 1], value: 1e9, sigma: 1e-9 },
      { h: [1, 2, 3], value: -1e9, sigma: 1e9 },
    ],
    "the direct beam": Array.from({ length: 30 }, () => ({ h: [0, 0, 0], value: 9, sigma: 1 })),
  };

  function grid(of: () => { value: number; sigma: number }): Reflection[] {
    return Array.from({ length: 60 }, (_, i) => ({ h: [i % 4, i % 3, (i % 7) + 1], ...of() }));
  }

  it.each(Object.keys(lists))("%s: an answer of finite numbers, and no contradiction", (name) => {
    const { blocks } = readCif(TEXT).value;
    const { question } = absencesQuestion(blocks[0]!, blocks);
    const found = absencesAnswer({ ...question, list: { ...question.list, reflections: lists[name]! } });
    expect(found.verdict).not.toBe("violated");
    expect(JSON.parse(JSON.stringify(found))).toEqual(found);
  });
});

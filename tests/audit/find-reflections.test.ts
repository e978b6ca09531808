import { describe, expect, it } from "vitest";
import { findReflections, formatIndexMatrix, parseIndexMatrix } from "../../lib/audit/index.ts";
import { asSquares } from "../../lib/audit/reflection-list.ts";
import { readCif } from "../../lib/cif/index.ts";
import { problemOf } from "../support/problem-of.ts";

const block = (text: string) => readCif(`data_x\n${text}`).value.blocks[0]!;
const loop = (names: string, rows: string) => `loop_\n${names.split(" ").join("\n")}\n${rows}\n`;
const LINES = "1 2 3 4.5 0.6\n".repeat(22);

describe("findReflections", () => {
  it("prefers F^2 with its uncertainty among the columns of a loop", () => {
    const names =
      "_refln_index_h _refln_index_k _refln_index_l _refln_F_meas _refln_F_squared_meas _refln_F_squared_sigma";
    const { lists } = findReflections(block(loop(names, "1 0 0 3 9.1 0.2\n0 2 -1 ? ? ?\n1 1 0 2 4 .1")));
    expect(lists).toHaveLength(1);
    expect(lists[0]).toMatchObject({ quantity: "F^2", quantityFrom: "data name", kind: "refln" });
    expect(lists[0]!.reflections).toEqual([
      { h: [1, 0, 0], value: 9.1, sigma: 0.2 },
      { h: [1, 1, 0], value: 4, sigma: 0.1 },
    ]);
    expect(lists[0]!.notes).toEqual(["rows without readable indices or value, left out: 1"]);
  });

  it("squares F and carries its uncertainty, also where F is 0 or negative", () => {
    const names = "_refln.index_h _refln.index_k _refln.index_l _refln.F_meas _refln.F_meas_su";
    const { lists } = findReflections(block(loop(names, "1 0 0 3 0.5\n2 0 0 0 0.5\n3 0 0 -2 0.5")));
    expect(asSquares(lists[0]!)).toEqual([
      { h: [1, 0, 0], value: 9, sigma: 3.25 },
      { h: [2, 0, 0], value: 0, sigma: 0.25 },
      { h: [3, 0, 0], value: -4, sigma: 2.25 },
    ]);
  });

  it("reads an uncertainty written in parentheses", () => {
    const names = "_diffrn_refln_index_h _diffrn_refln_index_k _diffrn_refln_index_l _diffrn_refln_intensity_net";
    const { lists } = findReflections(block(loop(names, "1 0 0 31.2(12)\n2 0 0 5.0(3)")));
    expect(lists[0]).toMatchObject({ kind: "diffrn_refln", reflections: [{ sigma: 1.2 }, { sigma: 0.3 }] });
  });

  it("finds a list in a text field of any name, and the CIF inside another", () => {
    const names = "_refln_index_h _refln_index_k _refln_index_l _refln_F_squared_meas _refln_F_squared_sigma";
    const inner = `data_y\n${loop(names, "1 0 0 5 1")}`;
    const { lists } = findReflections(block(`_some_list\n;\n${LINES};\n_some_cif\n;\n${inner};\n`));
    expect(lists.map((l) => [l.kind, l.source, l.reflections.length])).toEqual([
      ["text", "the text of _some_list", 22],
      ["nested", "the loop of _refln_F_squared_meas of the CIF in the text of _some_cif", 1],
    ]);
  });

  it("finds matrices in texts and in the items of the dictionary, and passes over the identity", () => {
    const text = "_how\n;\nABCD 4 1 0 0 1 0 1 0 -1 0 -1\nABCD 4 1 1 0 0 0 1 0 0 0 1\nABCD 4\n;\n";
    const elements = [0, 1, 0, 0, 0, 1, 1, 0, 0];
    const items = elements.map((e, i) => `_diffrn_reflns_transf_matrix_${Math.floor(i / 3) + 1}${(i % 3) + 1} ${e}`);
    const { matrices } = findReflections(block(`${text}${items.join("\n")}\n`));
    expect(matrices.map((m) => formatIndexMatrix(m.M))).toEqual(["l,k,-h-l", "l,h,k"]); // (h k l) T: h' = l
    expect(matrices[0]!.source).toBe('the line "ABCD 4 1 0 0 1 0 1 0 -1 0 -1" in the text of _how');
    expect(matrices.map((m) => m.diffractionListOnly)).toEqual([false, true]);
  });
});

describe("parseIndexMatrix", () => {
  it.each([
    ["0 0 1  0 1 0  -1 0 -1", "l,k,-h-l"],
    ["1,0,0; 0,1,0; 1/2,0,0.5", "h,k,1/2h+1/2l"],
    ["0.3333 0.6667 0.667 1 0 0 0 1 0", "1/3h+2/3k+2/3l,h,k"],
  ])("reads %s as %s", (text, shown) => expect(formatIndexMatrix(parseIndexMatrix(text))).toBe(shown));

  it.each(["1 0 0 0 1 0 0 0", "1 0 0 2 0 0 0 0 1", "1 0 0 0 x 0 0 0 1", "0.37 0 0 0 1 0 0 0 1"])(
    "refuses %s",
    (text) => {
      expect(problemOf(() => parseIndexMatrix(text)).code).toBe("index-matrix");
    },
  );
});

import { describe, expect, it } from "vitest";
import { readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import { neighboursText } from "../../lib/report/index.ts";
import { crystalFromBlock, type NeighboursOptions, neighboursAnswer } from "../../lib/structure/index.ts";

interface Input {
  readonly cell?: string;
  readonly angle?: string;
  readonly group?: string;
  readonly formula?: string;
  readonly rows: readonly string[];
}

function textOf(
  { cell = "5.64(1)", group = "F m -3 m", formula, rows }: Input,
  options: NeighboursOptions = {},
  all = false,
) {
  const lengths = ["a", "b", "c"].map((k) => `_cell_length_${k} ${cell}`);
  const angles = ["alpha", "beta", "gamma"].map((k) => `_cell_angle_${k} 90`);
  const loop = [
    "loop_",
    "_atom_site_label",
    "_atom_site_type_symbol",
    ...["x", "y", "z"].map((c) => `_atom_site_fract_${c}`),
  ];
  const sum = formula ? [`_chemical_formula_sum '${formula}'`] : [];
  const lines = [
    "data_x",
    ...lengths,
    ...angles,
    `_symmetry_space_group_name_H-M '${group}'`,
    ...sum,
    ...loop,
    ...rows,
  ];
  const block = requireClean(readCif(lines.join("\n"))).blocks[0]!;
  return neighboursText(neighboursAnswer(crystalFromBlock(block), { block, ...options }), { all });
}

const SALT = ["Na1 Na 0 0 0", "Cl1 Cl 0.5 0.5 0.5"];

describe("the text of neighbours", () => {
  it("writes uncertainties behind the last digits, and none of what symmetry fixes", () => {
    const text = textOf({ rows: SALT }, { angles: true });
    expect(text).toMatch(
      /^Na1 +1 +6 +NaCl6 +2\.820\(5\) +2\.820\(5\) +6\.00 +6\.00 +0\.981\(13\) for 1\+ +octahedron 0\.00$/m,
    );
    expect(text).toMatch(/^ {2}Cl1 +×6 +2\.820\(5\) +0\.164 +16\.7 +\d+_\d{3} /m);
    expect(text).toMatch(/^ {2}Cl1\(\S+\)-Na1-Cl1\(\S+\) +90 +×12$/m);
    expect(text).toContain("s.u.: from the cell alone");
  });

  it("says how coordinates and cell went in, and what the file does not give", () => {
    const rows = ["Fe1 Fe 0 0 0", "S1 S 0.385(1) 0.385(1) 0.385(1)"];
    expect(textOf({ group: "P a -3", cell: "5.417(1)", rows })).toContain("s.u.: from coordinates and cell");
    expect(textOf({ group: "P a -3", cell: "5.417", rows })).toContain("s.u.: from coordinates alone");
    expect(textOf({ group: "P a -3", cell: "5.417", rows: rows.map((r) => r.replace(/\(1\)/g, "")) })).toContain(
      "s.u.: the file gives none",
    );
  });

  it("lists every image on its own line if asked for", () => {
    const images = (text: string) => text.match(/^ {2}Cl1 /gm)!.length;
    expect([images(textOf({ rows: SALT })), images(textOf({ rows: SALT }, {}, true))]).toEqual([1, 6]);
  });

  it("numbers operations itself where the file lists none, and shows the list", () => {
    expect(textOf({ rows: SALT }).replace(/\n {2}/g, " ")).toMatch(
      /symmetry codes: number of the operation in the list 1 x,y,z; 2 .*; and \d+ more, as group lists them, then 5/,
    );
  });

  it("shows metals only where there are many sites, and everything if asked for", () => {
    const rows = Array.from({ length: 20 }, (_, k) => `C${k} C ${(0.05 * k).toFixed(2)} 0.1 0.1`);
    const structure = { group: "P 1", cell: "30", rows: [...rows, "Zn1 Zn 0.5 0.5 0.5", "O1 O 0.565 0.5 0.5"] };
    const text = textOf(structure);
    expect(text).toMatch(/^Zn1: ZnO,/m);
    expect(text).not.toMatch(/^C1: /m);
    expect(text).toContain("distances are shown for 1 metal site only");
    expect(textOf(structure, {}, true)).toMatch(/^C1: /m);
  });

  it("marks hydrogen that the file does not place", () => {
    const rows = ["O1 O 0.40 0.5 0.5", "O2 O 0.68 0.5 0.5", "C1 C 0.74 0.605 0.5"];
    const text = textOf({ group: "P 1", cell: "10", formula: "C H2 O2", rows });
    expect(text).toMatch(/^O1 +\(missing\) +O2 +2\.800 +×1$/m);
    expect(text).toContain("the file lacks hydrogen of its formula");
  });
});

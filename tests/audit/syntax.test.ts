import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { problemsByBlock, vetAnswer } from "../../lib/audit/index.ts";
import { decodeCif, readCif } from "../../lib/cif/index.ts";
import { runCommand } from "../support/run-command.ts";

const FOLDER = new URL("../../fixtures/damaged/", import.meta.url);
const NAMES = readdirSync(FOLDER).filter((f) => f.endsWith(".cif"));

function read(name: string) {
  return readCif(decodeCif(readFileSync(new URL(name, FOLDER))).text);
}

function findingsOf(text: string) {
  const { value, problems } = readCif(text);
  return vetAnswer(value.blocks[0]!, 0.05, problemsByBlock(problems, value.blocks)[0]).findings;
}

const atoms = "loop_\n_atom_site_label\n_atom_site_fract_x\n_atom_site_fract_y\n_atom_site_fract_z\nNa1 0 0 0\n";

describe("faults of syntax", () => {
  it.each(NAMES.filter((n) => read(n).value.blocks.length > 0))("of %s are all told", (name) => {
    const { value, problems } = read(name);
    const dealt = problemsByBlock(problems, value.blocks);
    const told = value.blocks.flatMap((block, i) =>
      vetAnswer(block, 0.05, dealt[i]).findings.flatMap((f) => [f.message, ...(f.evidence.also ?? [])]),
    );
    for (const { message } of problems) expect(told.join("\n")).toContain(message);
  });

  it("are told with line, data name and what to do", () => {
    const [found] = findingsOf("data_a\n_cell_length_a 5\n_space_group_name_H-M_alt F m -3 m\n");
    expect(found).toMatchObject({
      id: "cif-syntax",
      severity: "doubt",
      where: { dataName: "_space_group_name_H-M_alt", line: 3 },
      evidence: { stated: { value: "m -3 m" } },
      advice: "Values that contain blanks must be in quotes.",
    });
  });

  it("of one kind are gathered where there are many, each with its line", () => {
    const items = ["a", "b", "c", "d", "e"].map((c) => `_x_${c} one two`).join("\n");
    const found = findingsOf(`data_a\n${items}\n`).filter((f) => f.id === "cif-syntax");
    expect(found).toHaveLength(1);
    expect(found[0]!.message).toMatch(/; 4 more of this kind$/);
    expect(found[0]!.evidence.also).toHaveLength(4);
    expect(found[0]!.evidence.also![3]).toMatch(/^line 6: /);
  });

  it("that cost no value are remarks", () => {
    const found = findingsOf("data_a\n_exptl_special_details 'Å'\n").find((f) => f.id === "cif-characters");
    expect(found?.severity).toBe("remark");
  });

  it("go to the block they stand in, those before any to the first", () => {
    const { value, problems } = readCif("stray\ndata_a\n_x 1\ndata_b\n_y 1 2\n");
    const dealt = problemsByBlock(problems, value.blocks).map((list) => list.map((p) => p.code));
    expect(dealt).toEqual([["text-before-block"], ["value-without-name"]]);
  });

  it("of a name that cannot be read are told where nothing else gives the group", () => {
    const cell = "_cell_length_a 5\n_cell_length_b 5\n_cell_length_c 5\n";
    const angles = "_cell_angle_alpha 90\n_cell_angle_beta 90\n_cell_angle_gamma 90\n";
    const found = findingsOf(`data_a\n${cell}${angles}_space_group_name_H-M_alt F\n${atoms}`);
    expect(found).toContainEqual(
      expect.objectContaining({
        id: "symmetry-unreadable",
        where: { dataName: "_space_group_name_H-M_alt", line: 8 },
      }),
    );
  });

  it("are findings of the command, the encoding among them, and not repeated on standard error", async () => {
    const { out, err } = await runCommand("vet", ["fixtures/damaged/latin-1.cif"]);
    expect(out).toContain("cif-characters: not UTF-8; read as Latin-1");
    expect(err).toBe("");
  });
});

describe("a formula without what belongs to it", () => {
  const cell = "_cell_length_a 5\n_cell_length_b 5\n_cell_length_c 5\n";
  const angles = "_cell_angle_alpha 90\n_cell_angle_beta 90\n_cell_angle_gamma 90\n_space_group_name_H-M_alt 'P 1'\n";
  const told = (items: string) =>
    findingsOf(`data_a\n${cell}${angles}${items}${atoms}`).find((f) => f.id === "formula-missing");
  it.each([
    ["", "Add _chemical_formula_sum and _cell_formula_units_Z;"],
    ["_chemical_formula_sum Na\n", "Add _cell_formula_units_Z;"],
    ["_cell_formula_units_Z 1\n", "Add _chemical_formula_sum;"],
  ])("%j: the advice names only what is missing", (items, advice) => {
    expect(told(items)?.advice).toContain(advice);
  });
  it("is no matter where both are given", () => {
    expect(told("_chemical_formula_sum Na\n_cell_formula_units_Z 1\n")).toBeUndefined();
  });
});

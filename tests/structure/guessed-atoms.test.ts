import { describe, expect, test } from "vitest";
import { sitesText } from "../../lib/report/index.ts";
import { sitesAnswer } from "../../lib/structure/index.ts";
import { crystalOfText, fixture } from "../support/crystals.ts";
import { runCommand } from "../support/run-command.ts";

/** Notes on a list of atoms `label x y z` with further columns. */
function notesOf(rows: readonly string[], columns = "", items = ""): string {
  const names = ["label", "fract_x", "fract_y", "fract_z", ...columns.split(" ").filter(Boolean)];
  const cell = ["a", "b", "c"].map((x) => `_cell_length_${x} 9`);
  const angles = ["alpha", "beta", "gamma"].map((x) => `_cell_angle_${x} 90`);
  const list = ["loop_", ...names.map((n) => `_atom_site_${n}`), ...rows, ""];
  const text = ["data_x", ...cell, ...angles, "_space_group_name_H-M_alt 'P 1'", items, ...list].join("\n");
  return crystalOfText(text).notes.join("\n");
}

describe("what the reader of atoms guesses", () => {
  test("is told where a label goes on with letters and no type symbol is given", () => {
    const notes = notesOf(["Wat1 0 0 0", "Cent .5 .5 .5", "Na1 .2 .2 .2", "C12 .1 .1 .1"]);
    expect(notes).toContain("no type symbol is given: Wat1 (W), Cent (Ce)");
    expect(notes).not.toContain("Na1 (");
    expect(notes).not.toContain("C12 (");
  });

  test("is no guess where the type symbol or the formula names the element", () => {
    expect(notesOf(["Wat1 0 0 0 O"], "type_symbol")).not.toContain("guessed");
    expect(notesOf(["OW1 0 0 0"], "", "_chemical_formula_sum 'H2 O'")).not.toContain("guessed");
  });

  test("is told where an occupancy is ?, not where it is . or absent", () => {
    expect(notesOf(["Na1 0 0 0 ?", "Na2 .5 0 0 ."], "occupancy")).toContain("occupancy is ? and taken as 1: Na1");
    expect(notesOf(["Na1 0 0 0 ?", "Na2 .5 0 0 ."], "occupancy")).not.toContain("Na2");
    expect(notesOf(["Na1 0 0 0"])).not.toContain("occupancy");
  });
});

describe("two formats of one answer", () => {
  test.each([
    ["split", "--svg"],
    ["symmetrise", "--cif"],
  ])("%s %s --json is refused", async (command, flag) => {
    const { status, err, out } = await runCommand(command, ["fixtures/calcite.cif", flag, "--json"]);
    expect({ status, out }).toEqual({ status: 2, out: "" });
    expect(err).toContain(`${flag} and --json ask for two formats`);
  });
});

describe("the text of group and sites", () => {
  test("names the group of a file once, and again in the setting asked for", async () => {
    const named = async (...words: string[]) =>
      (await runCommand("group", ["fixtures/calcite.cif", ...words])).out.match(/^space group/gm)!.length;
    expect(await named()).toBe(1);
    expect(await named("--setting", ":R")).toBe(2);
  });

  test("explains a multiplicity that is not that of the position", () => {
    const items = ["a", "b", "c"].map((x) => `_cell_length_${x} 3.988`);
    const angles = ["alpha", "beta", "gamma"].map((x) => `_cell_angle_${x} 60`);
    const names = ["label", "fract_x", "fract_y", "fract_z"].map((n) => `_atom_site_${n}`);
    const name = "_space_group_name_H-M_alt 'F m -3 m'";
    const text = ["data_x", ...items, ...angles, name, "loop_", ...names, "Na1 0 0 0", ""].join("\n");
    expect(sitesText(sitesAnswer(crystalOfText(text)))).toContain("position 4a has multiplicity 1 here");
    expect(sitesText(sitesAnswer(fixture("calcite")))).not.toContain("has multiplicity");
  });
});

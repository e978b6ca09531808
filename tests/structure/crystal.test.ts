import { readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { readCif } from "../../lib/cif/index.ts";
import { type Crystal, crystalFromBlock, crystalOf, POSITION_TOLERANCE } from "../../lib/structure/index.ts";
import { crystalOfText, fixture } from "../support/crystals.ts";
import { problemOf } from "../support/problem-of.ts";

/** A small CIF of a cubic cell of 4 angstrom, with whatever else the case is about. */
function cubic(symmetry: string, atoms: string, extra = ""): string {
  const cell = ["a", "b", "c"].map((e) => `_cell_length_${e} 4`).join("\n");
  const angles = ["alpha", "beta", "gamma"].map((e) => `_cell_angle_${e} 90`).join("\n");
  const loop = "loop_\n_atom_site_label\n_atom_site_fract_x\n_atom_site_fract_y\n_atom_site_fract_z";
  return `data_x\n${cell}\n${angles}\n${symmetry}\n${extra}\n${loop}\n${atoms}\n`;
}

const P_MINUS_1 = "loop_\n_space_group_symop_operation_xyz\nx,y,z\n-x,-y,-z";

describe("crystalFromBlock", () => {
  test("moves a rounded third onto the special position and says how far", () => {
    const text = readFileSync(new URL("../../fixtures/damaged/thirds-as-0.3333.cif", import.meta.url), "utf8");
    const crystal = crystalFromBlock(readCif(text).value.blocks[0]!);
    const moved = crystal.sites.filter((s) => s.symmetry.shift > 0);
    expect(moved.length).toBeGreaterThan(0);
    for (const s of moved) {
      expect(s.symmetry.shift).toBeLessThan(POSITION_TOLERANCE);
      const thirds = s.symmetry.point.filter((e) => Math.abs(e * 3 - Math.round(e * 3)) < 1e-12);
      expect(thirds.length).toBeGreaterThan(0);
    }
  });

  test.each([
    ["an empty list", "", "the list is empty"],
    ["a list without coordinates", "Na 0.1 ? 0.3\nCl . . .", "of 2 rows, 2 lack coordinates and 0 are dummies"],
  ])("refuses %s, of which nothing can be counted", (_, atoms, why) => {
    const { value } = readCif(cubic(P_MINUS_1, atoms)); // which complains of an empty loop and goes on
    const problem = problemOf(() => crystalFromBlock(value.blocks[0]!));
    expect(problem).toMatchObject({ code: "atoms-missing", message: `block "x" places no atom: ${why}` });
    expect(problem.span).not.toBeNull();
  });

  test("folds the rows of a whole cell that operations make anyway", () => {
    const crystal = crystalOfText(cubic(P_MINUS_1, "Na1 0.1 0.2 0.3\nNa2 0.9 0.8 0.7\nCl 0.5 0.5 0.5"));
    expect(crystal.sites.map((s) => [s.label, s.images.length, s.alsoListedAs])).toEqual([
      ["Na1", 2, ["Na2"]],
      ["Cl", 1, []],
    ]);
    expect(crystal.notes.join()).toContain("Na1 (also Na2)");
  });

  test("keeps two species on one position apart and says that they share it", () => {
    const atoms =
      "loop_\n_atom_site_label\n_atom_site_fract_x\n_atom_site_fract_y\n_atom_site_fract_z\n_atom_site_occupancy";
    const text = cubic(P_MINUS_1, "").replace(
      /loop_\n_atom[\s\S]*$/,
      `${atoms}\nCa 0.1 0.2 0.3 0.6\nMg 0.1 0.2 0.3 0.4\n`,
    );
    const crystal = crystalOfText(text);
    expect(crystal.sites.map((s) => s.sharesPositionOf)).toEqual([null, 0]);
  });

  test.each([
    ["operations", "_space_group_name_H-M_alt 'P -1'\nloop_\n_space_group_symop_operation_xyz\nx,y,z", 1],
    ["hall", "_space_group_name_Hall '-P 1'\n_space_group_name_H-M_alt 'P 1'", 2],
    ["name", "_space_group_name_H-M_alt 'P -1'\n_space_group_IT_number 1", 2],
    ["number", "_space_group_IT_number 2", 2],
  ])("takes the symmetry from the %s where that comes first", (source, symmetry, order) => {
    const crystal = crystalOfText(cubic(symmetry, "Na 0.1 0.2 0.3"));
    expect(crystal.symmetrySource).toBe(source);
    expect(crystal.group.operations).toHaveLength(order);
  });

  test("tells every statement that disagrees with the operations", () => {
    const symmetry = `${P_MINUS_1}\n_space_group_name_H-M_alt 'P 21/c'\n_space_group_IT_number 2\n_space_group_name_Hall '-P 2ybc'`;
    const { disagreements } = crystalOfText(cubic(symmetry, "Na 0.1 0.2 0.3"));
    expect(disagreements.map((d) => [d.kind, d.level])).toEqual([
      ["hall", "type"],
      ["name", "type"],
    ]);
    expect(disagreements[1]!.message).toContain("No. 14");
  });

  test("knows operations of a primitive cell under a centred name", () => {
    const symmetry = "_space_group_name_H-M_alt 'I m m m'\nloop_\n_space_group_symop_operation_xyz\n";
    const primitive = ["x,y,z", "-x,-y,-z", "y,x,z", "-y,-x,-z"]; // C2/m of a skew cell, so the type differs
    const { disagreements } = crystalOfText(cubic(symmetry + primitive.join("\n"), "Na 0.1 0.2 0.3"));
    expect(disagreements.map((d) => d.level)).toEqual(["type"]);
  });

  test("settles an origin that the name leaves open by the contents of the cell", () => {
    const diamond = (x: string, formula: string) =>
      cubic(
        "_space_group_name_H-M_alt 'F d -3 m'",
        `C ${x}`,
        `_chemical_formula_sum '${formula}'\n_cell_formula_units_Z 8`,
      );
    // 0,0,0 is 8a of the first origin and 16c of the second; only with silicon can the formula tell them apart
    const both = "Mg 0 0 0\nAl 0.625 0.625 0.625\nO 0.387 0.387 0.387";
    const spinel = cubic("_space_group_name_H-M_alt 'F d -3 m'", both, "_chemical_formula_sum 'Al2 Mg O4'");
    const crystal = crystalOfText(spinel);
    expect(crystal.sites.map((s) => s.images.length)).toEqual([8, 16, 32]);
    expect(crystal.notes.join()).toMatch(/origin choice; .*:1 is used, since only there/);
    expect(crystalOfText(diamond("0.125 0.125 0.125", "C")).notes.join()).toContain("nothing in the file decides");
  });

  it.each([
    ["cell-missing", "data_x\nloop_\n_atom_site_label\n_atom_site_fract_x\nC 0\n", /no value for _cell_length_a/],
    ["symmetry-missing", cubic("", "Na 0 0 0"), /states no symmetry/],
    ["number-unreadable", cubic(P_MINUS_1, "Na 0.1 0.2 abc"), /_atom_site.fract_z of Na is "abc"/],
    [
      "operations-not-closed",
      cubic("loop_\n_space_group_symop_operation_xyz\nx,y,z\n-x,y+1/3,-z", "Na 0 0 0"),
      /are no group/,
    ],
    [
      "operation-impossible",
      cubic("loop_\n_space_group_symop_operation_xyz\nx,y,z\n-x,2y,-z", "Na 0 0 0"),
      /determinant 2/,
    ],
  ])("refuses with %s, at a place in the file", (code, text, message) => {
    const problem = problemOf(() => crystalOfText(text));
    expect(problem.code).toBe(code);
    expect(problem.message).toMatch(message);
    expect(problem.span).not.toBeNull();
    expect(problem.hint).not.toBe("");
  });

  test("refuses a tolerance that cannot tell atoms apart", () => {
    expect(problemOf(() => crystalOfText(cubic(P_MINUS_1, "Na 0 0 0"), 2)).code).toBe("tolerance-impossible");
  });
});

test("the images of a site do not depend on which of them the file lists", () => {
  const names = ["calcite", "gypsum", "rutile", "alpha-quartz", "pyrope"];
  const places = (crystal: Crystal) =>
    crystal.sites.map((s) => s.images.map((i) => i.position.map((e) => (e % 1).toFixed(6)).join()).sort());
  fc.assert(
    fc.property(fc.constantFrom(...names), fc.nat(), (name, pick) => {
      const crystal = fixture(name);
      const sites = crystal.sites.map((s) => ({ ...s, position: s.images[pick % s.images.length]!.position }));
      const { name: title, metric, group, tolerance } = crystal;
      expect(places(crystalOf({ name: title, metric, group, tolerance, sites }))).toEqual(places(crystal));
    }),
    { numRuns: 25 },
  );
});

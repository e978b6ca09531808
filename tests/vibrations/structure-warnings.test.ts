import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { parseFormula } from "../../lib/structure/index.ts";
import { structureWarnings } from "../../lib/vibrations/index.ts";
import { crystalOfText, fixture } from "../support/crystals.ts";

/** A crystal of P m m m, 5 x 6 x 7 angstrom, with the rows `label element x y z occupancy`. */
function orthorhombic(rows: readonly string[], tolerance = 0.05) {
  const columns = ["label", "type_symbol", "fract_x", "fract_y", "fract_z", "occupancy"].map((c) => `_atom_site_${c}`);
  return crystalOfText(
    `data_x
_cell_length_a 5\n_cell_length_b 6\n_cell_length_c 7
_cell_angle_alpha 90\n_cell_angle_beta 90\n_cell_angle_gamma 90
_space_group_name_H-M_alt 'P m m m'
loop_\n${columns.join("\n")}\n${rows.join("\n")}\n`,
    tolerance,
  );
}

const warningsOf = (rows: readonly string[], formula: string | null = null, tolerance?: number) =>
  structureWarnings(orthorhombic(rows, tolerance), formula === null ? null : parseFormula(formula));

describe("warnings where the average structure lies", () => {
  it("are none for an ordered structure with all its hydrogen", () => {
    expect(structureWarnings(fixture("gypsum"), parseFormula("Ca H4 O6 S"))).toEqual([]);
    expect(warningsOf(["Na Na 0 0 0 1", "Cl Cl 0.5 0.5 0.5 1"], "Na Cl")).toEqual([]);
  });

  it("name sites of partial occupancy", () => {
    expect(warningsOf(["Na Na 0 0 0 1", "Cl Cl 0.5 0.5 0.5 0.8"])).toEqual([
      expect.stringMatching(/^partial occupancy: Cl \(0\.8\) count/),
    ]);
  });

  it("name sites that share a position, once, and not as partial", () => {
    expect(warningsOf(["Ca Ca 0 0 0 0.6", "Mg Mg 0 0 0 0.4", "O O 0.5 0.5 0.5 1"])).toEqual([
      expect.stringMatching(/^mixed occupancy: Ca and Mg count as one vibrating site/),
    ]);
  });

  it("name split sites", () => {
    const warnings = warningsOf(["Na Na 0 0 0 1", "O1 O 0.2 0.5 0.5 0.7", "O2 O 0.3 0.5 0.5 0.3"]);
    expect(warnings).toContainEqual(expect.stringMatching(/^split sites: O2 and the sites/));
  });

  it("name sites whose images exclude each other", () => {
    expect(structureWarnings(fixture("ammonium-chloride"), null)).toContainEqual(
      expect.stringMatching(/^images of H exclude each other/),
    );
  });

  it.each([
    [["Na Na 0 0 0 1", "O O 0.5 0.5 0.5 1"], "Na O H", /has 1 H, no site lists hydrogen/],
    [["Na Na 0 0 0 1", "O O 0.5 0.5 0.5 1", "H H 0.5 0.5 0.36 1"], "Na O H3", /has 3 H, the sites hold 2 of it/],
  ])("tell missing hydrogen: %j of %s", (rows, formula, pattern) => {
    expect(warningsOf(rows, formula)).toContainEqual(expect.stringMatching(pattern));
  });

  it("count deuterium as hydrogen, and need a formula to miss any", () => {
    expect(warningsOf(["Na Na 0 0 0 1", "O O 0.5 0.5 0.5 1", "D D 0.5 0.5 0.36 1"], "Na O D2")).toEqual([]);
    expect(warningsOf(["Na Na 0 0 0 1", "O O 0.5 0.5 0.5 1"])).toEqual([]);
  });

  it("tell symmetry that a list of the whole cell in P 1 leaves out, and only there", () => {
    const listed = (atoms: string) =>
      crystalOfText(`data_x
_cell_length_a 4\n_cell_length_b 4\n_cell_length_c 4
_cell_angle_alpha 90\n_cell_angle_beta 90\n_cell_angle_gamma 90
_space_group_name_H-M_alt 'P 1'
loop_\n_atom_site_label\n_atom_site_fract_x\n_atom_site_fract_y\n_atom_site_fract_z\n${atoms}\n`);
    expect(structureWarnings(listed("Cs 0 0 0\nCl 0.5 0.5 0.5"), null)).toEqual([
      expect.stringMatching(/^missed symmetry: .* keep 48 times as many within 0\.05 A/),
    ]);
    expect(structureWarnings(listed("Cs 0 0 0\nCl 0.4 0.3 0.2\nNa 0.7 0.1 0.3"), null)).toEqual([]);
  });

  it("tell of special positions missed by rounding where nothing is moved onto them", () => {
    // 0.66667 for 2/3 would put the silicon into general positions, twice as many of them
    const quartz = readFileSync(new URL("../../fixtures/alpha-quartz.cif", import.meta.url), "utf8");
    expect(structureWarnings(crystalOfText(quartz, 0), null)).toEqual([
      expect.stringMatching(/^just off a special position: Si 0\.000 A/),
    ]);
  });

  it("tell atoms just off a special position, within three tolerances", () => {
    // 0.08 angstrom from the mirror at x = 0: its image is 0.16 angstrom away
    const off = (x: number) => warningsOf([`O O ${x} 0.31 0.27 1`], null, 0.06);
    expect(off(0.016)).toEqual([expect.stringMatching(/^just off a special position: O 0\.080 A from m\.\. \(\w\)/)]);
    expect(off(0.03)).toEqual([]); // image 0.3 angstrom away
    expect(off(0.004)).toEqual([]); // snapped onto it
  });

  it("leave disorder about a special position alone", () => {
    const warnings = warningsOf(["O O 0.016 0.31 0.27 0.5"], null, 0.06);
    expect(warnings.filter((w) => w.startsWith("just off"))).toEqual([]);
  });
});

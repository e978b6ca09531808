import { describe, expect, it } from "vitest";
import { aliasesOf, canonicalName, cellOf, columnName, findLoop, findValue } from "../../lib/cif/index.ts";
import { cleanBlock, plain } from "./plain.ts";

describe("data names that mean the same", () => {
  it.each([
    ["_cell_length_a", "_cell.length_a"],
    ["_CELL_LENGTH_A", "_cell.length_a"],
    ["_cell.length_a", "_cell.length_a"],
    ["_cell_volume", "_cell.volume"],
    ["_cell.Z_PDB", "_cell.formula_units_z"],
    ["_cell_formula_units_Z", "_cell.formula_units_z"],
    ["_cell_measurement_temperature", "_cell_measurement.temperature"],
    ["_cell_measurement_temp", "_cell_measurement.temperature"],
    ["_diffrn_ambient_temperature", "_diffrn.ambient_temperature"],
    ["_symmetry_equiv_pos_as_xyz", "_space_group_symop.operation_xyz"],
    ["_symmetry_equiv.pos_as_xyz", "_space_group_symop.operation_xyz"],
    ["_space_group_symop_operation_xyz", "_space_group_symop.operation_xyz"],
    ["_symmetry_equiv_pos_site_id", "_space_group_symop.id"],
    ["_symmetry_space_group_name_H-M", "_space_group.name_h-m_alt"],
    ["_symmetry.space_group_name_H-M", "_space_group.name_h-m_alt"],
    ["_space_group_name_H-M_alt", "_space_group.name_h-m_alt"],
    ["_space_group_name_H-M_full", "_space_group.name_h-m_full"],
    ["_symmetry_space_group_name_Hall", "_space_group.name_hall"],
    ["_space_group_name_Hall", "_space_group.name_hall"],
    ["_symmetry_Int_Tables_number", "_space_group.it_number"],
    ["_symmetry.Int_Tables_number", "_space_group.it_number"],
    ["_space_group_IT_number", "_space_group.it_number"],
    ["_symmetry_cell_setting", "_space_group.crystal_system"],
    ["_space_group_crystal_system", "_space_group.crystal_system"],
    ["_space_group_transform_Pp_abc", "_space_group.transform_pp_abc"],
    ["_space_group_Wyckoff_letter", "_space_group_wyckoff.letter"],
    ["_atom_site_fract_x", "_atom_site.fract_x"],
    ["_atom_site.id", "_atom_site.label"],
    ["_atom_site_thermal_displace_type", "_atom_site.adp_type"],
    ["_atom_site_adp_type", "_atom_site.adp_type"],
    ["_atom_site_symmetry_multiplicity", "_atom_site.site_symmetry_multiplicity"],
    ["_atom_site_site_symmetry_order", "_atom_site.site_symmetry_order"],
    ["_atom_site_Wyckoff_symbol", "_atom_site.wyckoff_symbol"],
    ["_atom_site_refinement_flags_posn", "_atom_site.refinement_flags_posn"],
    ["_atom_site_anisotrop.U[1][2]", "_atom_site_aniso.u_12"],
    ["_atom_site.aniso_U[1][2]", "_atom_site_aniso.u_12"],
    ["_atom_site_aniso_U_12", "_atom_site_aniso.u_12"],
    ["_atom_type_oxidation_number", "_atom_type.oxidation_number"],
    ["_chemical_formula_sum", "_chemical_formula.sum"],
    ["_exptl_crystal_density_diffrn", "_exptl_crystal.density_diffrn"],
    ["_geom_bond_distance", "_geom_bond.distance"],
    ["_geom_angle", "_geom_angle.value"],
    ["_diffrn_radiation_wavelength", "_diffrn_radiation_wavelength.value"],
    ["_refln_F_squared_sigma", "_refln.f_squared_meas_su"],
    ["_refln_observed_status", "_refln.include_status"],
    ["_diffrn_refln_intensity_net", "_diffrn_refln.intensity_net"],
    ["_reflns_number_observed", "_reflns.number_gt"],
    ["_parent_space_group.IT_number", "_parent_space_group.it_number"],
    ["_wall_course", "_wall_course"],
  ])("%s is %s", (name, canonical) => {
    expect(canonicalName(name)).toBe(canonical);
  });

  it("have one canonical name each, found from all of them", () => {
    for (const name of ["_cell.length_a", "_space_group_symop.operation_xyz", "_refln.include_status"]) {
      const aliases = aliasesOf(name);
      expect(aliases[0]).toBe(name);
      expect(aliases).toContain(name.replace(".", "_"));
      for (const alias of aliases) expect(aliasesOf(alias)).toBe(aliases);
    }
  });

  it("have their two plain forms where the table has none", () => {
    expect(aliasesOf("_wall.course")).toEqual(["_wall.course", "_wall_course"]);
  });
});

describe("findValue", () => {
  it("finds a value under any alias, and tells the name as written", () => {
    const block = cleanBlock("data_a\n_Symmetry_Int_Tables_Number 225\n");
    const found = findValue(block, "_space_group.IT_number")!;
    expect([plain(found.value), found.name]).toEqual(["225", "_Symmetry_Int_Tables_Number"]);
    expect(findValue(block, "_space_group_IT_number")).toEqual(found);
    expect(findValue(block, "_cell.length_a")).toBeNull();
  });

  it("prefers a known value to an unknown one", () => {
    const block = cleanBlock("data_a\n_space_group_IT_number ?\n_symmetry_Int_Tables_number 225\n_cell_volume ?\n");
    expect(findValue(block, "_space_group.IT_number")!.name).toBe("_symmetry_Int_Tables_number");
    expect(findValue(block, "_cell.volume")!.value.kind).toBe("unknown");
  });

  it("takes the first row of a loop", () => {
    const block = cleanBlock("data_a\nloop_\n_diffrn_radiation_wavelength\n0.71073\n1.54056\n");
    expect(plain(findValue(block, "_diffrn_radiation_wavelength.value")!.value)).toBe("0.71073");
  });
});

describe("findLoop", () => {
  const block = cleanBlock(
    "data_halite\n_symmetry_equiv_pos_as_xyz 'x,y,z'\n_symmetry_equiv_pos_site_id 1\n_cell_length_a 5.64\n" +
      "loop_\n_atom_site_fract_x\n_atom_site_Label\n0 Na1\n0.5 Cl1\n",
  );

  it("finds a loop, its columns and cells under any alias", () => {
    const loop = findLoop(block, "_atom_site.label")!;
    expect(loop).toBe(block.loop("_atom_site_fract_x"));
    expect(columnName(loop, "_atom_site.label")).toBe("_atom_site_Label");
    expect(columnName(loop, "_atom_site.fract_y")).toBeNull();
    expect(plain(cellOf(loop, 1, "_atom_site.label"))).toBe("Cl1");
    expect(cellOf(loop, 2, "_atom_site.label")).toBeNull();
    expect(cellOf(loop, 0, "_atom_site.fract_y")).toBeNull();
  });

  it("presents a category written without a loop as a loop of one row", () => {
    const loop = findLoop(block, "_space_group_symop.operation_xyz")!;
    expect([loop.rowCount, loop.names]).toEqual([1, ["_symmetry_equiv_pos_as_xyz", "_symmetry_equiv_pos_site_id"]]);
    expect(plain(cellOf(loop, 0, "_space_group_symop.operation_xyz"))).toBe("x,y,z");
    expect(plain(loop.value(0, "_SYMMETRY_equiv_pos_site_id"))).toBe("1");
    expect([loop.at(1, 0), loop.at(0, 2), loop.value(0, "_cell_length_a"), loop.has("_cell_length_a")]).toEqual([
      null,
      null,
      null,
      false,
    ]);
    expect(block.source.slice(loop.span.start, loop.span.end)).toBe(
      "_symmetry_equiv_pos_as_xyz 'x,y,z'\n_symmetry_equiv_pos_site_id 1",
    );
  });

  it("answers null where the block has none of the names", () => {
    expect(findLoop(block, "_atom_site_aniso.label")).toBeNull();
  });
});

import type { Deposition } from "./deposition.ts";

/** A deposition as CIF. */
export function writeDeposition(d: Deposition): string {
  return [
    "data_deposition",
    ...Object.entries(d.items).map(([name, text]) => `${name} ${quoted(text)}`),
    loop(
      ["_space_group_symop_id", "_space_group_symop_operation_xyz"],
      d.operations.map((text, i) => [String(i + 1), text]),
    ),
    loop(
      ["label", "type_symbol", "fract_x", "fract_y", "fract_z", "occupancy", "site_symmetry_multiplicity"]
        .concat(["site_symmetry_order", "Wyckoff_symbol", "U_iso_or_equiv"])
        .map((name) => `_atom_site_${name}`),
      d.atoms.map((a) => [a.label, a.type, a.x, a.y, a.z, a.occupancy, a.multiplicity, a.order, a.letter, a.uiso]),
    ),
    loop(
      ["label", "U_11", "U_22", "U_33", "U_12", "U_13", "U_23"].map((name) => `_atom_site_aniso_${name}`),
      d.tensors.map(({ label, u }) => [label, ...u]),
    ),
    loop(
      ["atom_site_label_1", "atom_site_label_2", "distance", "site_symmetry_2"].map((name) => `_geom_bond_${name}`),
      d.bonds.map((b) => [b.a, b.b, b.distance, b.code]),
    ),
    loop(
      [
        "_atom_site_label_1",
        "_atom_site_label_2",
        "_atom_site_label_3",
        "",
        "_site_symmetry_1",
        "_site_symmetry_3",
      ].map((name) => `_geom_angle${name}`),
      d.angles.map((a) => [a.a, a.b, a.c, a.angle, a.codeA, a.codeC]),
    ),
    loop(
      ["index_h", "index_k", "index_l", "F_squared_meas", "F_squared_sigma"].map((name) => `_refln_${name}`),
      d.reflections.map(({ h, value, sigma }) => [...h.map(String), value.toFixed(2), sigma.toFixed(2)]),
    ),
    "",
  ].join("\n");
}

function loop(names: readonly string[], rows: readonly (readonly string[])[]): string {
  if (rows.length === 0) return "";
  return ["loop_", ...names, ...rows.map((row) => row.map(quoted).join(" "))].join("\n");
}

function quoted(text: string): string {
  if (text === "?" || text.startsWith("'")) return text;
  return /\s|^[_#$'"[\]]|^$/.test(text) ? (text.includes("'") ? `"${text}"` : `'${text}'`) : text;
}

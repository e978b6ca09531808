import { type WritableBlock, type WritableItem, writeCif } from "../cif/index.ts";
import type { SymmetriseAnswer } from "../structure/index.ts";
import { blockName } from "./block-name.ts";
import { formatNumber } from "./format-number.ts";

/**
 * The symmetrised structure as a CIF 1.1: cell, symmetry with all operations, sites. S.u. and displacement parameters
 * are left out, since they belong to the atoms as they were.
 */
export function symmetrisedCif(answer: SymmetriseAnswer, name: string): string {
  const { found, cell, sites, transformation, originShift, tolerance, moved } = answer;
  const shift = originShift.map((e) => formatNumber(e, 6)).join(", ");
  const note = [
    `Made symmetric within ${tolerance.displacement} angstrom; atoms moved by up to ${formatNumber(moved.largest, 4)} angstrom.`,
    `Axes ${transformation.P}, origin ${transformation.p} in terms of the cell before, its origin moved by ${shift}.`,
  ].join("\n");
  const items: WritableItem[] = [
    { kind: "comment", text: note },
    ...["length_a", "length_b", "length_c", "angle_alpha", "angle_beta", "angle_gamma"].map((part, i) =>
      item(`_cell_${part}`, formatNumber(cell[i]!, i < 3 ? 5 : 4)),
    ),
    ...(found.settingName === "unconventional" ? [] : [item("_space_group_name_H-M_alt", found.hermannMauguin)]),
    item("_space_group_name_Hall", found.hall),
    item("_space_group_IT_number", String(found.number)),
    {
      kind: "loop",
      names: ["_space_group_symop_id", "_space_group_symop_operation_xyz"],
      rows: found.operations.map((xyz, i) => [String(i + 1), xyz]),
    },
    siteLoop(sites),
  ];
  const block: WritableBlock = { name: blockName(name, "_symmetrised"), items };
  return writeCif([block], "1.1");
}

function siteLoop(sites: SymmetriseAnswer["sites"]): WritableItem {
  const names = ["label", "type_symbol", "fract_x", "fract_y", "fract_z", "occupancy"].map((n) => `_atom_site_${n}`);
  const rows = sites.map((s) => [
    s.label,
    s.element ?? ({ kind: "unknown" } as const),
    ...s.position.map((e) => formatNumber(e, 6)),
    String(s.occupancy),
    String(s.multiplicity),
    s.wyckoff === "A" ? "alpha" : s.wyckoff,
  ]);
  return {
    kind: "loop",
    names: [...names, "_atom_site_site_symmetry_multiplicity", "_atom_site_Wyckoff_symbol"],
    rows,
  };
}

function item(name: string, value: string): WritableItem {
  return { kind: "item", name, value };
}

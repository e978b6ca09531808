import { type WritableBlock, type WritableItem, type WritableValue, writeCif } from "../cif/index.ts";
import type { CoordinateList } from "../structure/index.ts";
import { blockName } from "./block-name.ts";
import { formatNumber } from "./format-number.ts";
import { residueNames, UNKNOWN_LIGAND } from "./residue-names.ts";

const UNKNOWN = { kind: "unknown" } as const;
const INAPPLICABLE = { kind: "inapplicable" } as const;
const EIGHT_PI_SQUARED = 8 * Math.PI * Math.PI;

const CELL = ["length_a", "length_b", "length_c", "angle_alpha", "angle_beta", "angle_gamma"] as const;
const ATOM = [
  "group_PDB",
  "id",
  "type_symbol",
  "label_atom_id",
  "label_alt_id",
  "label_comp_id",
  "label_asym_id",
  "label_entity_id",
  "label_seq_id",
  "Cartn_x",
  "Cartn_y",
  "Cartn_z",
  "occupancy",
  "B_iso_or_equiv",
  "pdbx_formal_charge",
  "auth_seq_id",
  "auth_comp_id",
  "auth_asym_id",
  "auth_atom_id",
  "pdbx_PDB_model_num",
] as const;

/**
 * All atoms of a cell as a file of the category atom_site with Cartesian coordinates, in P 1.
 * Source of the data names: PDBx/mmCIF dictionary, version 5 (wwPDB): entry, entity, chem_comp, struct_asym, cell,
 * symmetry, atom_type, atom_site.
 * @example
 * ```ts
 * const halite = composedCrystal(parseSiteTable("group 225\ncell a=5.64\nNa 4a\nCl 4b"));
 * const block = requireClean(readCif(mmcifText(coordinateList(atomModel(halite, { symmetry: "none" }))))).blocks[0]!;
 * findLoop(block, "_atom_site.Cartn_x")!.rowCount; // 8
 * ```
 */
export function mmcifText(list: CoordinateList): string {
  const id = blockName(list.name, "");
  const nameOf = residueNames(list);
  const named = list.atoms.map(nameOf);
  const chains = [...new Set(named.map((n) => n.chain))];
  const symbols = [...new Set(list.atoms.map((a) => a.element ?? "X"))];
  const items: WritableItem[] = [
    item("_entry.id", id),
    loop("_entity", ["id", "type"], [["1", "non-polymer"]]),
    loop("_chem_comp", ["id", "type"], [[UNKNOWN_LIGAND, "non-polymer"]]),
    loop(
      "_struct_asym",
      ["id", "entity_id"],
      chains.map((chain) => [chain, "1"]),
    ),
    ...(list.cell ? cellItems(list, id) : []),
    loop(
      "_atom_type",
      ["symbol"],
      symbols.map((s) => [s]),
    ),
    loop(
      "_atom_site",
      ATOM,
      list.atoms.map((atom, i): WritableValue[] => {
        const { name, residue, chain } = named[i]!;
        const [x, y, z] = atom.cartesian;
        return [
          "HETATM",
          String(i + 1),
          atom.element ?? "X",
          name,
          atom.disorderGroup ?? INAPPLICABLE,
          UNKNOWN_LIGAND,
          chain,
          "1",
          INAPPLICABLE,
          formatNumber(x, 6),
          formatNumber(y, 6),
          formatNumber(z, 6),
          String(atom.occupancy),
          atom.displacement === null ? UNKNOWN : formatNumber(atom.displacement * EIGHT_PI_SQUARED, 3),
          atom.charge === null || !Number.isInteger(atom.charge) ? UNKNOWN : String(atom.charge),
          String(residue),
          UNKNOWN_LIGAND,
          chain,
          name,
          "1",
        ];
      }),
    ),
  ];
  const block: WritableBlock = { name: id, items };
  return writeCif([block], "1.1");
}

function cellItems({ cell }: CoordinateList, id: string): WritableItem[] {
  return [
    item("_cell.entry_id", id),
    ...CELL.map((part, i) => item(`_cell.${part}`, formatNumber(cell![i]!, i < 3 ? 6 : 5))),
    item("_symmetry.entry_id", id),
    item("_symmetry.space_group_name_H-M", "P 1"),
    item("_symmetry.Int_Tables_number", "1"),
  ];
}

function loop(category: string, names: readonly string[], rows: readonly (readonly WritableValue[])[]): WritableItem {
  return { kind: "loop", names: names.map((n) => `${category}.${n}`), rows };
}

function item(name: string, value: string): WritableItem {
  return { kind: "item", name, value };
}

import { type CifVersion, type WritableItem, type WritableValue, writeCif } from "../cif/index.ts";
import type { ListedSite, ListedStructure } from "../structure/index.ts";
import { blockName } from "./block-name.ts";
import { formatNumber } from "./format-number.ts";
import { numberWithSu } from "./number-with-su.ts";

const UNKNOWN = { kind: "unknown" } as const;
const INAPPLICABLE = { kind: "inapplicable" } as const;
const CELL = ["length_a", "length_b", "length_c", "angle_alpha", "angle_beta", "angle_gamma"] as const;
const TENSOR = ["11", "22", "33", "12", "13", "23"] as const;

/** Decimals of a coordinate without s.u.; rounding stays below 1e-6 angstrom in a cell of 100 angstrom. */
const DECIMALS = 8;

/** What stands above the data. */
export interface CifHeading {
  /** Lines of comment: where the structure comes from. */
  readonly comment: string;
  readonly ending: string;
  /** What else is known of the structure, written before the cell. */
  readonly items?: readonly WritableItem[];
}

/**
 * A structure as a CIF: cell, symmetry with all operations, sites, displacement parameters.
 * @example
 * ```ts
 * const halite = composedCrystal(parseSiteTable("group 225\ncell a=5.64\nNa 4a\nCl 4b"));
 * const cif = structureCif(listedStructure(atomModel(halite)), "1.1", { comment: "table salt", ending: "" });
 * const again = crystalFromBlock(requireClean(readCif(cif)).blocks[0]!);
 * again.identified.summary.hermannMauguin; // "F m -3 m"
 * cellContents(again.sites); // new Map([["Na", 4], ["Cl", 4]])
 * ```
 */
export function structureCif(structure: ListedStructure, version: CifVersion, heading: CifHeading): string {
  const { cell, volume, spaceGroup, sites } = structure;
  const named = spaceGroup !== null && spaceGroup.settingName !== "unconventional";
  const items: WritableItem[] = [
    ...(heading.comment === "" ? [] : [{ kind: "comment", text: heading.comment } as const]),
    ...(heading.items ?? []),
    ...CELL.map((part, i) => item(`_cell_${part}`, plain(cell[i]!, i < 3 ? 6 : 5))),
    item("_cell_volume", plain(volume, 4)),
    ...(spaceGroup === null ? [item("_space_group_name_H-M_alt", "P 1")] : []),
    ...(named ? [item("_space_group_name_H-M_alt", spaceGroup.hermannMauguin)] : []),
    item("_space_group_name_Hall", spaceGroup?.hall ?? "P 1"),
    item("_space_group_IT_number", String(spaceGroup?.number ?? 1)),
    {
      kind: "loop",
      names: ["_space_group_symop_id", "_space_group_symop_operation_xyz"],
      rows: (spaceGroup?.operations ?? ["x,y,z"]).map((xyz, i) => [String(i + 1), xyz]),
    },
    siteLoop(sites),
    ...tensorLoop(sites),
  ];
  return writeCif([{ name: blockName(structure.name, heading.ending), items }], version);
}

/** A column of the atom list, left out where no site has it. */
interface SiteColumn {
  readonly name: string;
  readonly value: (site: ListedSite) => WritableValue;
  readonly wanted?: (site: ListedSite) => boolean;
}

const COLUMNS: readonly SiteColumn[] = [
  { name: "label", value: (s) => s.label },
  { name: "type_symbol", value: (s) => s.typeSymbol ?? s.element ?? UNKNOWN },
  ...[0, 1, 2].map((k) => ({
    name: `fract_${"xyz"[k]}`,
    value: (s: ListedSite) => coordinate(s.position[k]!, s.su[k] ?? null),
  })),
  { name: "occupancy", value: (s) => plain(s.occupancy, 6) },
  { name: "site_symmetry_multiplicity", value: (s) => String(s.multiplicity), wanted: (s) => s.wyckoff !== null },
  { name: "site_symmetry_order", value: (s) => String(s.order), wanted: (s) => s.wyckoff !== null },
  {
    name: "Wyckoff_symbol",
    value: (s) => (s.wyckoff === "A" ? "alpha" : (s.wyckoff ?? UNKNOWN)),
    wanted: (s) => s.wyckoff !== null,
  },
  {
    name: "adp_type",
    value: (s) => (s.displacement === null ? UNKNOWN : s.displacement.kind === "isotropic" ? "Uiso" : "Uani"),
    wanted: (s) => s.displacement !== null,
  },
  {
    name: "U_iso_or_equiv",
    value: ({ displacement: d, equivalent }) => {
      if (d?.kind === "isotropic") return numberWithSu(d.iso, d.su, 5);
      return equivalent === null ? UNKNOWN : numberWithSu(equivalent, null, 5);
    },
    wanted: (s) => s.displacement !== null,
  },
  { name: "disorder_assembly", value: (s) => s.assembly ?? INAPPLICABLE, wanted: (s) => s.assembly !== null },
  { name: "disorder_group", value: (s) => s.disorderGroup ?? INAPPLICABLE, wanted: (s) => s.disorderGroup !== null },
];

function siteLoop(sites: readonly ListedSite[]): WritableItem {
  const columns = COLUMNS.filter(({ wanted }) => !wanted || sites.some(wanted));
  return {
    kind: "loop",
    names: columns.map((c) => `_atom_site_${c.name}`),
    rows: sites.map((s) => columns.map((c) => c.value(s))),
  };
}

function tensorLoop(sites: readonly ListedSite[]): WritableItem[] {
  const rows = sites.flatMap(({ label, displacement: d }): WritableValue[][] =>
    d?.kind === "anisotropic" ? [[label, ...d.u.map((u, i) => numberWithSu(u, d.su[i] ?? null, 5))]] : [],
  );
  if (rows.length === 0) return [];
  const names = ["_atom_site_aniso_label", ...TENSOR.map((c) => `_atom_site_aniso_U_${c}`)];
  return [{ kind: "loop", names, rows }];
}

function coordinate(x: number, su: number | null): string {
  return su === null ? plain(x, DECIMALS) : numberWithSu(x, su, DECIMALS);
}

/** A number without idle zeros at its end. */
function plain(x: number, decimals: number): string {
  const text = formatNumber(x, decimals);
  return text.includes(".") ? text.replace(/\.?0+$/, "") : text;
}

function item(name: string, value: string): WritableItem {
  return { kind: "item", name, value };
}

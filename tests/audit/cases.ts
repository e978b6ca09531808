import { readFileSync } from "node:fs";
import { type CifBlock, readCif } from "../../lib/cif/index.ts";
import { type Deposition, deposit } from "./mutation/deposition.ts";
import { writeDeposition } from "./mutation/write-deposition.ts";

/** First block of a text. */
export function blockOf(text: string): CifBlock {
  return readCif(text).value.blocks[0]!;
}

/** A fixture as it is. */
export function fixture(name: string): CifBlock {
  return blockOf(readFileSync(new URL(`../../fixtures/${name}.cif`, import.meta.url), "utf8"));
}

/** A fixture with all that a careful depositor adds, changed by `change`, and with further text behind it. */
export function deposition(name: string, change: (d: Deposition) => void = () => {}, behind = ""): CifBlock {
  const d = deposit(fixture(name));
  change(d);
  return blockOf(writeDeposition(d) + behind);
}

/** The same with some items set. */
export function stating(name: string, items: Readonly<Record<string, string>>): CifBlock {
  return deposition(name, (d) => Object.assign(d.items, items));
}

/** A loop as text. */
export function loop(category: string, columns: string, ...rows: readonly string[]): string {
  return ["loop_", ...columns.split(" ").map((c) => `${category}_${c}`), ...rows, ""].join("\n");
}

const COORDINATES = "label type_symbol fract_x fract_y fract_z";

/** A small structure: items, operations, atoms as `label type x y z`, with further columns if they are named. */
export function small(
  items: string,
  operations: readonly string[],
  atoms: readonly string[],
  columns = "",
  behind = "",
): CifBlock {
  const symmetry = operations.length > 0 ? loop("_space_group_symop", "operation_xyz", ...operations) : "";
  const list = loop("_atom_site", columns ? `${COORDINATES} ${columns}` : COORDINATES, ...atoms);
  return blockOf(["data_small", items, symmetry, list, behind].join("\n"));
}

/** Six parameters as items. */
export function cell(a: string, b = a, c = a, alpha = "90", beta = "90", gamma = "90"): string {
  const lengths = [a, b, c].map((t, i) => `_cell_length_${"abc"[i]} ${t}`);
  const angles = [alpha, beta, gamma].map((t, i) => `_cell_angle_${["alpha", "beta", "gamma"][i]} ${t}`);
  return [...lengths, ...angles].join("\n");
}

import { type CifBlock, cellOf, findLoop, numbOf } from "../cif/index.ts";
import type { AtomSite } from "./atom-site.ts";

/** Stated oxidation numbers by label of the site: from the list of atom types, else from the type symbol. */
export function oxidationStates(
  block: CifBlock | null,
  sites: readonly Pick<AtomSite, "label" | "typeSymbol" | "charge">[],
): ReadonlyMap<string, number> {
  const loop = block && findLoop(block, "_atom_type.symbol");
  const byType = new Map<string, number>();
  for (let row = 0; loop && row < loop.rowCount; row++) {
    const symbol = cellOf(loop, row, "_atom_type.symbol");
    const value = numbOf(cellOf(loop, row, "_atom_type.oxidation_number"));
    if (symbol?.kind === "text" && symbol.text.trim() !== "" && value) byType.set(symbol.text.trim(), value.value);
  }
  const found = new Map<string, number>();
  for (const { label, typeSymbol, charge } of sites) {
    const value = byType.get(typeSymbol ?? "") ?? charge;
    if (value !== null) found.set(label, value);
  }
  return found;
}

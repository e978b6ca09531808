import type { CifVersion, WritableItem } from "../cif/index.ts";
import type { ComposeAnswer, ListedSite, ListedStructure } from "../structure/index.ts";
import { composedFacts } from "./compose-text.ts";
import { formatNumber } from "./format-number.ts";
import { structureCif } from "./structure-cif.ts";

/**
 * A composed structure as a CIF: besides cell, symmetry and sites its formula, Z, mass and density, of which the
 * comment says that they are computed.
 * @example
 * ```ts
 * const rutile = composedCrystal(parseSiteTable("group 136\ncell a=4.59 c=2.96\nTi Ti4+ 2a\nO O2- 4f x=0.305"));
 * const { answer, notes } = composeAnswer(rutile);
 * const cif = composedCif(listedStructure(atomModel(rutile)), answer, notes, "1.1");
 * const block = requireClean(readCif(cif)).blocks[0]!;
 * findNumb(block, "_cell.formula_units_Z")!.value; // 2
 * findLoop(block, "_atom_type.oxidation_number")!.rowCount; // 2
 * ```
 */
export function composedCif(
  structure: ListedStructure,
  answer: ComposeAnswer,
  notes: readonly string[],
  version: CifVersion,
): string {
  const [, ...facts] = composedFacts(answer);
  const { sum, weight, density, z } = answer.contents;
  const item = (name: string, value: string): WritableItem => ({ kind: "item", name, value });
  const comment = ["Composed from a list of Wyckoff sites.", ...notes, ...facts].join("\n");
  return structureCif(structure, version, {
    comment: version === "1.1" ? plainLetters(comment) : comment,
    ending: "",
    items: [
      item("_chemical_formula_sum", sum),
      ...(weight === null ? [] : [item("_chemical_formula_weight", formatNumber(weight, 3))]),
      item("_cell_formula_units_Z", String(z)),
      ...(density === null ? [] : [item("_exptl_crystal_density_diffrn", formatNumber(density, 4))]),
      ...typeLoop(structure.sites),
    ],
  });
}

/** CIF 1.1 holds ASCII only. */
function plainLetters(text: string): string {
  return text
    .replaceAll("Å³", "angstrom^3")
    .replaceAll("Å", "angstrom")
    .replaceAll("cm⁻³", "cm^-3")
    .replaceAll("°", " degrees");
}

/** Oxidation numbers of the atom types that state one. */
function typeLoop(sites: readonly ListedSite[]): WritableItem[] {
  const charges = new Map<string, number>();
  for (const { typeSymbol, charge } of sites)
    if (typeSymbol !== null && charge !== null) charges.set(typeSymbol, charge);
  if (charges.size === 0) return [];
  const rows = [...charges].map(([symbol, charge]) => [symbol, String(charge)]);
  return [{ kind: "loop", names: ["_atom_type_symbol", "_atom_type_oxidation_number"], rows }];
}

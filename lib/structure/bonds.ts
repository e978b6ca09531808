import { type BondChoice, summariseBonds } from "./bond-choice.ts";
import { type BondOptions, BondOverrides } from "./bond-overrides.ts";
import { applyElementRules } from "./bond-rules.ts";
import { type CellAtom, cellAtoms } from "./cell-atoms.ts";
import { type BondRule, ContactTable } from "./contact-table.ts";
import type { Crystal } from "./crystal.ts";
import { chooseComponents, excludeEachOther } from "./disorder.ts";
import { withinOneCopy } from "./disorder-copy.ts";
import { applyHydrogenRule } from "./hydrogen-rule.ts";
import { applyLigandRule } from "./ligand-rule.ts";
import type { Contact } from "./neighbour-search.ts";
import { freeWater } from "./water.ts";

/** A bond of the periodic structure, once per cell. */
export interface Bond extends Contact {
  readonly rule: BondRule;
}

/** The bonds of a crystal and how they were chosen. */
export interface BondList {
  /** Atoms of the cell that take part; one component of each disorder. */
  readonly atoms: readonly CellAtom[];
  /** `first` and `second` are indices into `atoms`. */
  readonly bonds: readonly Bond[];
  readonly choice: BondChoice;
  readonly notes: readonly string[];
  /** Distances computed in the search, to test its growth. */
  readonly compared: number;
}

/**
 * Chooses the bonds of a crystal by rule: among non-metals, within oxo-, thio- and halo-anions, and in ammine, cyano,
 * carbonyl and like complexes; not between a metal and water or an ordinary anion, and no hydrogen bonds. Distances are
 * compared with sums of covalent radii. Every choice can be overruled.
 * @throws InputProblem `bond-name-unknown`
 */
export function bondsOf(crystal: Crystal, options: BondOptions = {}): BondList {
  const components = chooseComponents(crystal);
  const atoms = cellAtoms(crystal, (site) => components.chosen[site]!);
  const overrides = new BondOverrides(crystal, options);
  const siteOf = (atom: number) => crystal.sites[atoms[atom]!.site]!;
  const together = withinOneCopy(crystal, atoms);
  const excluded = (c: Contact) => excludeEachOther(siteOf(c.first), siteOf(c.second), c.distance) || !together(c);
  const { table, bonds, centred } = judgedBonds(crystal, atoms, overrides, excluded);
  const notes = [...components.notes];
  if (components.contested.length > 0) {
    const contested = components.contested.map((i) => crystal.sites[i]!.label).join(", ");
    notes.push(`images of a partly occupied site exclude each other, and symmetry keeps them all: ${contested}`);
  }
  const labels = [...new Set(centred.map((atom) => siteOf(atom).label))];
  if (labels.length > 0) notes.push(`hydrogen centred between two atoms is bonded to neither: ${labels.join(", ")}`);
  return { atoms, bonds, choice: summariseBonds(crystal, table), notes, compared: table.compared };
}

/**
 * The bonds among given atoms, alternatives of a disorder included.
 * @param excluded contacts of atoms that are never there at the same time
 */
export function judgedBonds(
  crystal: Crystal,
  atoms: readonly CellAtom[],
  overrides: BondOverrides,
  excluded: (contact: Contact) => boolean,
): { table: ContactTable; bonds: Bond[]; centred: number[] } {
  const table = new ContactTable(crystal, atoms, overrides.limits(), excluded);
  applyElementRules(table);
  const centred = applyHydrogenRule(table);
  applyLigandRule(table);
  freeWater(table);
  overrides.apply(table);
  const bonds: Bond[] = [];
  table.contacts.forEach((contact, k) => {
    const rule = table.rules[k];
    if (rule) bonds.push({ ...contact, rule });
  });
  return { table, bonds, centred };
}

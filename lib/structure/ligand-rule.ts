import { bondClasses } from "./bond-class.ts";
import { BOND_TOLERANCE, type BondRule, type ContactTable, radiusSum } from "./contact-table.ts";

/** A carbon-nitrogen bond shorter than this is the triple bond of a cyanide; angstrom. */
const TRIPLE_BOND = 1.25;

/**
 * Bonds of metals to the ligands of complexes, told by what the ligand atom is bonded to: nitrogen (ammines, amines,
 * nitro, isothiocyanate; not the far end of a cyanide), carbon (cyanide, carbonyl, organic groups), phosphorus and sulfur
 * bearing carbon; then the oxygen of a ligand that holds the same metal by another atom already. Oxygen of water,
 * hydroxide, oxo-anions, alkoxides and carboxylates is not among them otherwise.
 */
export function applyLigandRule(table: ContactTable): void {
  const ligands = pieces(table);
  bindDonors(table);
  bindChelates(table, ligands);
}

function bindDonors(table: ContactTable): void {
  const { ligandMetal, organometal, nonMetal } = bondClasses();
  table.elements.forEach((element, atom) => {
    if (!element || !nonMetal.has(element)) return;
    const rule = ligandKind(table, atom, element);
    if (!rule) return;
    const metals = rule === "carbon ligand" ? organometal : ligandMetal;
    for (const k of table.around(atom)) {
      const centre = table.other(k, atom);
      const metal = table.elements[centre];
      if (!metal || !metals.has(metal)) continue;
      table.judge(k, rule, radiusSum(metal, element)! + BOND_TOLERANCE);
    }
  });
}

function ligandKind(table: ContactTable, atom: number, element: string): BondRule | null {
  const { nonMetal } = bondClasses();
  const bonded = table.bonded(atom).filter((j) => nonMetal.has(table.elements[j] ?? ""));
  const elements = bonded.map((j) => table.elements[j]!);
  switch (element) {
    case "N":
      return elements.length > 0 && !isCyanide(table, atom, bonded) ? "nitrogen ligand" : null;
    case "C":
      return elements.length > 0 ? "carbon ligand" : null;
    case "P":
    case "As":
    case "S":
    case "Se":
      return elements.includes("C") ? "phosphorus or sulfur ligand" : null;
    default:
      return null;
  }
}

/** Nitrogen of an ion CN: bonded to carbon alone, which has no other non-metal. */
function isCyanide(table: ContactTable, atom: number, bonded: readonly number[]): boolean {
  const carbon = bonded[0];
  if (bonded.length !== 1 || carbon === undefined || table.elements[carbon] !== "C") return false;
  const { nonMetal } = bondClasses();
  const far = table.bonded(carbon).filter((j) => nonMetal.has(table.elements[j] ?? ""));
  const bond = table.around(atom).find((k) => table.other(k, atom) === carbon);
  return far.length === 1 && bond !== undefined && table.contacts[bond]!.distance < TRIPLE_BOND;
}

/** Number of the piece of each atom, pieces being held together by the bonds chosen so far. */
function pieces(table: ContactTable): Int32Array {
  const piece = new Int32Array(table.atoms.length).fill(-1);
  for (let start = 0; start < piece.length; start++) {
    if (piece[start] !== -1) continue;
    piece[start] = start;
    const queue = [start];
    for (let head = 0; head < queue.length; head++) {
      for (const next of table.bonded(queue[head]!)) {
        if (piece[next] !== -1) continue;
        piece[next] = start;
        queue.push(next);
      }
    }
  }
  return piece;
}

/** Oxygen of amino acids, phenols with imine arms and the like, once nitrogen or another donor holds the metal. */
function bindChelates(table: ContactTable, ligands: Int32Array): void {
  const { ligandMetal } = bondClasses();
  table.elements.forEach((metal, atom) => {
    if (!metal || !ligandMetal.has(metal)) return;
    const held = new Set(table.bonded(atom).map((j) => ligands[j]!));
    for (const k of table.around(atom)) {
      const oxygen = table.other(k, atom);
      if (table.elements[oxygen] !== "O" || !held.has(ligands[oxygen]!)) continue;
      if (table.bonded(oxygen).some((j) => table.elements[j] === "C")) {
        table.judge(k, "chelate oxygen", radiusSum(metal, "O")! + BOND_TOLERANCE);
      }
    }
  });
}

import { bondClasses, isHydrogen } from "./bond-class.ts";
import { BOND_TOLERANCE, type ContactTable, radiusSum } from "./contact-table.ts";

/** Hydrogen between two neighbours whose distances differ by less than this is centred; angstrom. */
export const CENTRED_HYDROGEN = 0.1;

/** Bonds of hydrogen to metals may exceed the sum of the radii by this (AlH4, FeH6); angstrom. */
const HYDRIDE_TOLERANCE = 0.15;

/** Elements to which hydrogen bonds as a bridge, without a hydrogen bond. */
const BRIDGED = new Set(["B", "Al", "Ga"]);

/**
 * Bonds of hydrogen: one, to the nearest atom, so that hydrogen bonds are none. Exceptions: bridges of boron, aluminium
 * and metals; the centred hydrogen of FHF and its like, which keeps both bonds; centred hydrogen between other atoms,
 * which keeps none; H2.
 * @returns atoms of hydrogen that were left without a bond because they are centred
 */
export function applyHydrogenRule(table: ContactTable): number[] {
  const centred: number[] = [];
  table.elements.forEach((element, atom) => {
    if (isHydrogen(element) && !bondHydrogen(table, atom)) centred.push(atom);
  });
  table.contacts.forEach((contact, k) => {
    const [a, b] = table.pair(k);
    if (!isHydrogen(a) || !isHydrogen(b)) return;
    const free = (atom: number) => table.around(atom).every((c) => c === k || table.rules[c] === null);
    if (free(contact.first) && free(contact.second)) table.judge(k, "hydrogen", radiusSum(a, b)! + BOND_TOLERANCE);
  });
  return centred;
}

/** False where the atom is centred in a hydrogen bond. */
function bondHydrogen(table: ContactTable, atom: number): boolean {
  const { nonMetal, halogen } = bondClasses();
  const elementAt = (k: number) => table.elements[table.other(k, atom)]!;
  const others = table.around(atom).filter((k) => !isHydrogen(elementAt(k)));
  const limit = (k: number) => {
    const tolerance = nonMetal.has(elementAt(k)) ? BOND_TOLERANCE : HYDRIDE_TOLERANCE;
    return radiusSum(elementAt(k), table.elements[atom]!)! + tolerance;
  };
  const near = others.filter((k) => table.contacts[k]!.distance <= limit(k));
  const [first, second] = near;
  if (first === undefined) return true;
  const bridged = (k: number) => BRIDGED.has(elementAt(k)) || !nonMetal.has(elementAt(k));
  if (bridged(first)) {
    const rule = nonMetal.has(elementAt(first)) ? "hydrogen" : "hydride";
    for (const k of near) if (bridged(k)) table.judge(k, rule, limit(k));
    return true;
  }
  const rival = second !== undefined && !bridged(second) && difference(table, first, second) < CENTRED_HYDROGEN;
  if (!rival) {
    table.judge(first, "hydrogen", limit(first));
    return true;
  }
  if (!halogen.has(elementAt(first)) || !halogen.has(elementAt(second))) return false;
  for (const k of [first, second]) table.judge(k, "hydrogen", limit(k));
  return true;
}

function difference(table: ContactTable, first: number, second: number): number {
  return table.contacts[second]!.distance - table.contacts[first]!.distance;
}

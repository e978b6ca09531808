import { type BondClasses, bondClasses, isHydrogen } from "./bond-class.ts";
import { BOND_TOLERANCE, type ContactTable, radiusSum } from "./contact-table.ts";

/** Bonds of metals to halogens may exceed the sum of the radii by this; ionic halides begin above; angstrom. */
export const HALIDE_TOLERANCE = 0.1;

/**
 * The coordination shell of a metal in an oxo-anion ends where the next neighbour is farther by more than this;
 * angstrom. Bridges in V2O5 and wolframite differ by up to 0.22, equatorial and uranyl oxygen by 0.5.
 */
export const SHELL_GAP = 0.3;

/** No shell of short bonds reaches farther than the sum of the radii and this; angstrom. */
const SHELL_TOLERANCE = 0.1;

/** Bonds that element and distance decide: among non-metals, oxo- and thio-anions, halo complexes, mercury(I). */
export function applyElementRules(table: ContactTable): void {
  const classes = bondClasses();
  table.contacts.forEach((_, k) => {
    judgePair(table, k, classes);
  });
  table.elements.forEach((element, atom) => {
    if (!element) return;
    if (classes.tetrahedralMetal.has(element)) tetrahedron(table, atom);
    for (const ligand of ["O", "S", "Se"]) {
      const short = classes.shortBond.get(`${element}-${ligand}`);
      if (short !== undefined) shell(table, atom, ligand, short);
    }
  });
}

function judgePair(table: ContactTable, k: number, classes: BondClasses): void {
  const [a, b] = table.pair(k);
  if (isHydrogen(a) || isHydrogen(b)) return;
  const sum = radiusSum(a, b);
  if (sum === null) return;
  if (classes.nonMetal.has(a) && classes.nonMetal.has(b)) table.judge(k, "non-metals", sum + BOND_TOLERANCE);
  else if (isHalide(a, b, classes) || isHalide(b, a, classes)) table.judge(k, "halo complex", sum + HALIDE_TOLERANCE);
  else {
    const pair = classes.metalPair.get(`${a}-${b}`);
    if (pair !== undefined) table.judge(k, "metal pair", pair);
  }
}

function isHalide(metal: string, halogen: string, classes: BondClasses): boolean {
  return classes.halideMetal.has(metal) && classes.halogen.has(halogen);
}

/** Al and Ga: four oxygen neighbours make a tetrahedron of a framework, five or six an ordinary cation. */
function tetrahedron(table: ContactTable, atom: number): void {
  const limit = radiusSum(table.elements[atom]!, "O")! + BOND_TOLERANCE;
  const oxygen = neighboursOf(table, atom, "O").filter((k) => table.contacts[k]!.distance <= limit);
  if (oxygen.length === 4) for (const k of oxygen) table.judge(k, "tetrahedral oxo-anion", limit);
}

/** The short bonds of a metal of high oxidation state, with the rest of their shell. */
function shell(table: ContactTable, atom: number, ligand: string, short: number): void {
  const near = neighboursOf(table, atom, ligand);
  const first = near[0];
  if (first === undefined || table.contacts[first]!.distance > short) return;
  const most = radiusSum(table.elements[atom]!, ligand)! + SHELL_TOLERANCE;
  const rule = ligand === "O" ? "oxo-anion" : "thio-anion";
  let last = table.contacts[first]!.distance;
  for (const k of near) {
    const { distance } = table.contacts[k]!;
    table.judge(k, rule, Math.min(most, last + SHELL_GAP));
    if (table.rules[k] === null) return;
    last = distance;
  }
}

/** Contacts of an atom with one element, shortest first. */
function neighboursOf(table: ContactTable, atom: number, element: string): number[] {
  return table.around(atom).filter((k) => table.elements[table.other(k, atom)] === element);
}

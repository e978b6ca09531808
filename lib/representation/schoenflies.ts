import type { GroupElement } from "./group-analysis.ts";

/** Name of a point group and its place among the crystal classes. */
export interface CrystalClass {
  readonly schoenflies: string;
  /** International symbol without orientation: `-42m` also for -4m2. */
  readonly hermannMauguin: string;
  readonly crystalSystem: CrystalSystem;
}

export type CrystalSystem =
  | "triclinic"
  | "monoclinic"
  | "orthorhombic"
  | "tetragonal"
  | "trigonal"
  | "hexagonal"
  | "cubic";

/**
 * Schoenflies symbol of a finite group from its elements. A group without inversion but with improper elements is
 * isomorphic, by W to -W for these, to a group of rotations; the pair of that group and its proper half is the name.
 * S6 is called C3i, as crystallographers do.
 * Source: the classification is Weyl's, Symmetry (1952), appendix B.
 */
export function schoenfliesOf(elements: readonly GroupElement[]): string {
  const proper = elements.filter((e) => e.proper);
  const count = (order: number) => proper.filter((e) => e.order === order).length;
  const order = elements.length;
  const inversion = elements.some((e) => !e.proper && e.order === 1);
  const allProper = proper.length === order;
  if (count(5) === 24) return allProper ? "I" : "Ih";
  if (count(3) === 8) {
    if (inversion) return order === 48 ? "Oh" : "Th";
    if (allProper) return order === 24 ? "O" : "T";
    return "Td";
  }
  const n = Math.max(...proper.map((e) => e.order));
  const dihedral = proper.length === 2 * n && n > 1;
  if (allProper) return dihedral ? `D${n}` : `C${n}`;
  if (inversion) return centric(n, dihedral);
  if (dihedral) return n % 2 === 0 ? `D${n}d` : `D${n}h`;
  if (n > 1 && Math.max(...elements.map((e) => e.order)) === n) return `C${n}v`;
  if (n === 1) return "Cs";
  return n % 2 === 0 ? `S${2 * n}` : `C${n}h`;
}

function centric(n: number, dihedral: boolean): string {
  if (dihedral) return n % 2 === 0 ? `D${n}h` : `D${n}d`;
  if (n === 1) return "Ci";
  if (n === 3) return "C3i";
  return n % 2 === 0 ? `C${n}h` : `S${2 * n}`;
}

/** The 32 crystal classes. Source: International Tables for Crystallography A (2016), table 3.2.1.4 (from memory). */
const CLASSES = `triclinic C1 1, Ci -1
monoclinic C2 2, Cs m, C2h 2/m
orthorhombic D2 222, C2v mm2, D2h mmm
tetragonal C4 4, S4 -4, C4h 4/m, D4 422, C4v 4mm, D2d -42m, D4h 4/mmm
trigonal C3 3, C3i -3, D3 32, C3v 3m, D3d -3m
hexagonal C6 6, C3h -6, C6h 6/m, D6 622, C6v 6mm, D3h -6m2, D6h 6/mmm
cubic T 23, Th m-3, O 432, Td -43m, Oh m-3m`;

let classes: ReadonlyMap<string, CrystalClass> | null = null;

/** The 32 crystal classes by Schoenflies symbol, in the order of International Tables A. */
export function crystalClasses(): ReadonlyMap<string, CrystalClass> {
  if (classes) return classes;
  const map = new Map<string, CrystalClass>();
  for (const line of CLASSES.split("\n")) {
    const blank = line.indexOf(" ");
    for (const pair of line.slice(blank + 1).split(", ")) {
      const [schoenflies = "", hermannMauguin = ""] = pair.split(" ");
      map.set(schoenflies, { schoenflies, hermannMauguin, crystalSystem: line.slice(0, blank) as CrystalSystem });
    }
  }
  classes = map;
  return map;
}

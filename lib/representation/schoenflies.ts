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

/** Numbers that identify a finite group of rotations and rotoinversions. */
export interface ElementCounts {
  readonly order: number;
  readonly proper: number;
  /** Proper rotations of order 3. */
  readonly threefold: number;
  /** Proper rotations of order 5. */
  readonly fivefold: number;
  readonly inversion: boolean;
  /** Highest order of a proper rotation. */
  readonly highestProper: number;
  /** Highest order of a rotation part (W or -W). */
  readonly highest: number;
}

/**
 * Schoenflies symbol from counts. A group without inversion but with improper elements is isomorphic, by W to -W for
 * these, to a group of rotations; the pair of that group and its proper half is the name.
 * Source: the classification is Weyl's, Symmetry (1952), appendix B.
 */
export function schoenfliesSymbol(c: ElementCounts): string {
  const allProper = c.proper === c.order;
  if (c.fivefold === 24) return allProper ? "I" : "Ih";
  if (c.threefold === 8) {
    if (c.inversion) return c.order === 48 ? "Oh" : "Th";
    if (allProper) return c.order === 24 ? "O" : "T";
    return "Td";
  }
  const n = c.highestProper;
  const dihedral = c.proper === 2 * n && c.proper > 2;
  if (allProper) return dihedral ? `D${n}` : `C${n}`;
  if (c.inversion) return centric(n, dihedral);
  if (dihedral) return n % 2 === 0 ? `D${n}d` : `D${n}h`;
  if (c.highest === n && n > 1) return `C${n}v`;
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

import { determinant, type IntMat3, trace } from "../algebra/index.ts";

export type CrystalFamily = "triclinic" | "monoclinic" | "orthorhombic" | "tetragonal" | "hexagonal" | "cubic";

/** One of the 32 geometric crystal classes (types of point groups), by Hermann-Mauguin symbol. */
export type GeometricClass = keyof typeof ROTATIONS;

/** Order n of a rotation, or -n for a rotoinversion: 1, 2, 3, 4, 6, -1, -2 (a reflection), -3, -4, -6. */
export type SignedOrder = 1 | 2 | 3 | 4 | 6 | -1 | -2 | -3 | -4 | -6;

const ORDER_BY_TRACE: Readonly<Record<number, SignedOrder>> = { 3: 1, [-1]: 2, 0: 3, 1: 4, 2: 6 };

/**
 * Type of a rotation part from its determinant and trace; both are the same in every basis.
 * @throws RangeError if no crystallographic rotation has this determinant and trace
 * Source: International Tables for Crystallography A (2016), section 1.2.2.4 (number from memory).
 */
export function signedOrder(W: IntMat3): SignedOrder {
  const det = determinant(W);
  const order = Math.abs(det) === 1 ? ORDER_BY_TRACE[trace(W) * det] : undefined;
  if (order === undefined) throw new RangeError(`no crystallographic rotation: ${W.join(" ")}`);
  return (order * det) as SignedOrder;
}

/**
 * Numbers of operations of types 2, 3, 4, 6, -1, m, -3, -4, -6 in each geometric class. No two classes share them.
 * They are recounted by a test.
 */
const ROTATIONS = {
  "1": "0,0,0,0,0,0,0,0,0",
  "-1": "0,0,0,0,1,0,0,0,0",
  "2": "1,0,0,0,0,0,0,0,0",
  m: "0,0,0,0,0,1,0,0,0",
  "2/m": "1,0,0,0,1,1,0,0,0",
  "222": "3,0,0,0,0,0,0,0,0",
  mm2: "1,0,0,0,0,2,0,0,0",
  mmm: "3,0,0,0,1,3,0,0,0",
  "4": "1,0,2,0,0,0,0,0,0",
  "-4": "1,0,0,0,0,0,0,2,0",
  "4/m": "1,0,2,0,1,1,0,2,0",
  "422": "5,0,2,0,0,0,0,0,0",
  "4mm": "1,0,2,0,0,4,0,0,0",
  "-42m": "3,0,0,0,0,2,0,2,0",
  "4/mmm": "5,0,2,0,1,5,0,2,0",
  "3": "0,2,0,0,0,0,0,0,0",
  "-3": "0,2,0,0,1,0,2,0,0",
  "32": "3,2,0,0,0,0,0,0,0",
  "3m": "0,2,0,0,0,3,0,0,0",
  "-3m": "3,2,0,0,1,3,2,0,0",
  "6": "1,2,0,2,0,0,0,0,0",
  "-6": "0,2,0,0,0,1,0,0,2",
  "6/m": "1,2,0,2,1,1,2,0,2",
  "622": "7,2,0,2,0,0,0,0,0",
  "6mm": "1,2,0,2,0,6,0,0,0",
  "-6m2": "3,2,0,0,0,4,0,0,2",
  "6/mmm": "7,2,0,2,1,7,2,0,2",
  "23": "3,8,0,0,0,0,0,0,0",
  "m-3": "3,8,0,0,1,3,8,0,0",
  "432": "9,8,6,0,0,0,0,0,0",
  "-43m": "3,8,0,0,0,6,0,6,0",
  "m-3m": "9,8,6,0,1,9,8,6,0",
} as const;

const COUNTED: readonly SignedOrder[] = [2, 3, 4, 6, -1, -2, -3, -4, -6];
let byCounts: Map<string, GeometricClass> | null = null;

export function geometricClassNames(): GeometricClass[] {
  return Object.keys(ROTATIONS) as GeometricClass[];
}

/** Geometric class of a point group from the types of all its rotation parts, or null if no group has such types. */
export function geometricClass(types: readonly SignedOrder[]): GeometricClass | null {
  byCounts ??= new Map(geometricClassNames().map((name) => [ROTATIONS[name], name]));
  const counts = [0, 0, 0, 0, 0, 0, 0, 0, 0];
  for (const type of types) {
    const at = COUNTED.indexOf(type);
    if (at >= 0) counts[at]!++;
  }
  return byCounts.get(counts.join()) ?? null;
}

/** Crystal family; the trigonal classes belong to the hexagonal family. */
export function crystalFamily(name: GeometricClass): CrystalFamily {
  if (name === "1" || name === "-1") return "triclinic";
  if (name === "2" || name === "m" || name === "2/m") return "monoclinic";
  if (name === "222" || name === "mm2" || name === "mmm") return "orthorhombic";
  if (name === "23" || name === "m-3" || name === "432" || name === "-43m" || name === "m-3m") return "cubic";
  return /^-?4/.test(name) ? "tetragonal" : "hexagonal";
}

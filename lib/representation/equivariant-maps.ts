import type { Matrix3 } from "./cartesian.ts";
import type { Rows } from "./irrep-matrices.ts";
import { reducedRows } from "./reduced-rows.ts";

/** A map from the partners of a species to vectors, flat: the image of partner q has components map[3q], map[3q+1], map[3q+2]. */
export type PartnerMap = readonly number[];

/** What is left of a map after the ones before it is nothing if its square is below this; dimensionless, maps are about 1. */
const NOTHING = 1e-9;

/**
 * All maps t from a species to vectors with R(g) t = t D(g), for the elements g of a group or of a subgroup: an
 * orthonormal set from which every such map is a sum with real factors or, for a pair of complex species (norm 2), with
 * complex ones, where i stands for the quarter turn of the partners. The product of maps t and u is the trace of t^T u
 * over the dimension, so each map is an isometry in the mean.
 * @param matrices R(g), orthogonal, of the elements wanted
 * @param species D(g) of the same elements
 * @param norm of the species in the whole group
 */
export function equivariantMaps(matrices: readonly Matrix3[], species: readonly Rows[], norm: 1 | 2): PartnerMap[] {
  const d = species[0]!.length;
  const rows: number[][] = [];
  for (let q = 0; q < d; q++) for (let c = 0; c < 3; c++) rows.push(meanOfUnit(matrices, species, c, q));
  const done: number[][] = [];
  for (const row of reducedRows(rows)) {
    for (const t of done) {
      const [a, b] = [mapProduct(t, row), norm === 2 ? mapProduct(quarterTurn(t), row) : 0];
      const u = b === 0 ? t : t.map((e, k) => a * e + b * quarterTurn(t)[k]!);
      const f = b === 0 ? a : 1;
      for (let k = 0; k < row.length; k++) row[k] = row[k]! - f * u[k]!;
    }
    const square = mapProduct(row, row);
    if (square > NOTHING) done.push(row.map((e) => e / Math.sqrt(square)));
  }
  return done;
}

/** Mean of R(g) E D(g)^-1, where E takes partner q to the component c. */
function meanOfUnit(matrices: readonly Matrix3[], species: readonly Rows[], c: number, q: number): number[] {
  const d = species[0]!.length;
  const mean = new Array<number>(3 * d).fill(0);
  matrices.forEach((R, g) => {
    for (let p = 0; p < d; p++) {
      const weight = species[g]![p]![q]! / matrices.length;
      for (let e = 0; e < 3; e++) mean[3 * p + e]! += weight * R[3 * e + c]!;
    }
  });
  return mean;
}

/** Trace of t^T u over the dimension. */
export function mapProduct(t: PartnerMap, u: PartnerMap): number {
  let sum = 0;
  for (let k = 0; k < t.length; k++) sum += t[k]! * u[k]!;
  return (3 * sum) / t.length;
}

/**
 * A map of a species of dimension 2 after a quarter turn of the partners, the first towards the second. For a pair of
 * complex species, whose matrices are rotations of the two partners, it is equivariant too.
 */
export function quarterTurn(t: PartnerMap): number[] {
  return [t[3]!, t[4]!, t[5]!, -t[0]! + 0, -t[1]! + 0, -t[2]! + 0];
}

/** R t D^-1: the map carried to another place by an element. */
export function carriedMap(t: PartnerMap, R: Matrix3, D: Rows): number[] {
  const d = D.length;
  const carried = new Array<number>(3 * d).fill(0);
  for (let q = 0; q < d; q++) {
    for (let c = 0; c < 3; c++) {
      const turned = R[3 * c]! * t[3 * q]! + R[3 * c + 1]! * t[3 * q + 1]! + R[3 * c + 2]! * t[3 * q + 2]!;
      for (let p = 0; p < d; p++) carried[3 * p + c]! += D[p]![q]! * turned;
    }
  }
  return carried;
}

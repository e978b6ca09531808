import type { Vec3 } from "./cell.ts";
import { hullVolume } from "./hull-volume.ts";
import { angle } from "./measure.ts";
import { length3 } from "./rotation-fit.ts";
import type { ShapeMeasure } from "./shape-measure.ts";

/** Figures of distortion of a polyhedron, by their authors; null where one is not defined for it. */
export interface PolyhedronDistortion {
  /** Of the convex hull of the neighbours, cubic angstrom. */
  readonly volume: number | null;
  /** Mean deviation of the distances from their mean, over it: W. H. Baur, Acta Crystallographica B30 (1974) 1195-1215. */
  readonly lengthDistortion: number;
  /**
   * Of tetrahedra and octahedra: mean square of the distances over that of the regular polyhedron of equal volume, and the
   * variance of the angles about the ideal one, square degrees: K. Robinson, G. V. Gibbs, P. H. Ribbe, Science 172
   * (1971) 567-570.
   */
  readonly quadraticElongation: number | null;
  readonly angleVariance: number | null;
  /** 1 for a tetrahedron, 0 for a square: L. Yang, D. R. Powell, R. P. Houser, Dalton Transactions (2007) 955-964. */
  readonly tau4: number | null;
  /**
   * 1 for a trigonal bipyramid, 0 for a square pyramid: A. W. Addison, T. N. Rao, J. Reedijk, J. van Rijn, G. C.
   * Verschoor, J. Chem. Soc., Dalton Trans. (1984) 1349-1356.
   */
  readonly tau5: number | null;
}

const CENTRE: Vec3 = [0, 0, 0];
const TETRAHEDRAL = (Math.acos(-1 / 3) * 180) / Math.PI;

/** A regular polyhedron: its volume at distance 1, its angle between neighbouring corners, and how many there are. */
const REGULAR: Readonly<Record<number, { symbol: string; volume: number; angle: number; angles: number }>> = {
  4: { symbol: "T-4", volume: 8 / (9 * Math.sqrt(3)), angle: TETRAHEDRAL, angles: 6 },
  6: { symbol: "OC-6", volume: 4 / 3, angle: 90, angles: 12 },
};

/**
 * @param neighbours seen from the centre, Cartesian, angstrom
 * @param shapes their shape measures
 */
export function polyhedronDistortion(
  neighbours: readonly Vec3[],
  shapes: readonly ShapeMeasure[],
): PolyhedronDistortion | null {
  const n = neighbours.length;
  if (n < 2) return null;
  const lengths = neighbours.map(length3);
  const mean = lengths.reduce((s, l) => s + l, 0) / n;
  const volume = n >= 4 ? hullVolume(neighbours) : 0;
  const angles = pairs(n).map(([i, j]) => angle([neighbours[i]!, CENTRE, neighbours[j]!]));
  const largest = [...angles].sort((a, b) => b - a);
  const regular = REGULAR[n];
  const ideal = regular ? shapes.find((s) => s.symbol === regular.symbol) : undefined;
  // only where it is the nearest shape: a square has no angles of a tetrahedron
  const isRegular = regular !== undefined && ideal !== undefined && shapes[0] === ideal && volume > 0;
  return {
    volume: volume > 1e-6 ? volume : null,
    lengthDistortion: clean(lengths.reduce((s, l) => s + Math.abs(l - mean), 0) / (n * mean)),
    quadraticElongation: isRegular
      ? lengths.reduce((s, l) => s + l * l, 0) / (n * (volume / regular.volume) ** (2 / 3))
      : null,
    angleVariance: isRegular ? clean(variance(angles, ideal, regular)) : null,
    tau4: n === 4 ? clean((360 - largest[0]! - largest[1]!) / (360 - 2 * TETRAHEDRAL)) : null,
    tau5: n === 5 ? clean((largest[0]! - largest[1]!) / 60) : null,
  };
}

/** Without the rounding of sums of doubles, so that 0 is 0. */
function clean(x: number): number {
  return Math.abs(x) < 1e-9 ? 0 : x;
}

function pairs(n: number): (readonly [number, number])[] {
  return Array.from({ length: n }, (_, i) =>
    Array.from({ length: n - i - 1 }, (_, k) => [i, i + k + 1] as const),
  ).flat();
}

/** Of the angles between corners that are neighbours in the ideal shape; corners 0 1, 2 4, 3 5 of the octahedron are not. */
function variance(
  angles: readonly number[],
  ideal: ShapeMeasure,
  regular: { readonly angle: number; readonly angles: number },
): number {
  const opposite = (i: number, j: number) => {
    const [a, b] = [ideal.order[i]!, ideal.order[j]!].sort((p, q) => p - q) as [number, number];
    return (a === 0 && b === 1) || (a >= 2 && b - a === 2);
  };
  const counted = pairs(ideal.order.length).flatMap(([i, j], k) => {
    return regular.angles === 12 && opposite(i, j) ? [] : [angles[k]!];
  });
  return counted.reduce((s, a) => s + (a - regular.angle) ** 2, 0) / (regular.angles - 1);
}

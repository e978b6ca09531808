import { IDENTITY, type IntMat3, multiply, type RatMat3 } from "../algebra/index.ts";
import { type Cell, cellOfMetric, type Mat3, type Metric, multiply3 } from "./cell.ts";

/** Cartesian columns in angstrom: three vectors that span a lattice. */
export type LatticeAxes = Mat3;

/** The axes of a basis given in terms of the cell: columns of `basis`. */
export function axesOf(metric: Metric, basis: RatMat3): LatticeAxes {
  return multiply3(metric.toCartesian, basis.n).map((e) => e / basis.d) as unknown as LatticeAxes;
}

/** The axes (a, b, c) P. */
export function changeAxes(axes: LatticeAxes, P: IntMat3): LatticeAxes {
  return multiply3(axes, P);
}

/** Metric tensor of the axes, square angstrom. */
export function gramOf(axes: LatticeAxes): Mat3 {
  const transposed = [0, 3, 6, 1, 4, 7, 2, 5, 8].map((k) => axes[k]!) as unknown as Mat3;
  return multiply3(transposed, axes);
}

export function cellOfAxes(axes: LatticeAxes): Cell {
  return cellOfMetric(gramOf(axes));
}

/** Volume of the cell of the axes, cubic angstrom; positive where they are right-handed. */
export function volumeOfAxes(m: LatticeAxes): number {
  return m[0] * (m[4] * m[8] - m[5] * m[7]) - m[1] * (m[3] * m[8] - m[5] * m[6]) + m[2] * (m[3] * m[7] - m[4] * m[6]);
}

/** Every step makes one vector shorter by more than this share; less is rounding. */
const PROGRESS = 1e-9;
/** Euclid's algorithm on entries of 10^6 needs some thirty rounds; this is a bound, not an expectation. */
const MOST_ROUNDS = 1000;

/**
 * Columns of a unimodular matrix that leads to three vectors, each the shortest of all that differ from it by multiples
 * of one of the others: Lagrange's reduction, pair by pair. It takes long steps, so that the finer reductions, which take
 * single ones, begin next to their end. The determinant is 1.
 */
export function shortenPairs(axes: LatticeAxes): IntMat3 {
  let P: IntMat3 = IDENTITY;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const step = shorteningStep(gramOf(changeAxes(axes, P)));
    if (!step) break;
    P = multiply(P, step);
  }
  return P;
}

/** The step that shortens the longest vector it can: column i minus k times column j. */
function shorteningStep(g: Mat3): IntMat3 | null {
  const order = [0, 1, 2].sort((i, j) => g[4 * j]! - g[4 * i]!);
  for (const i of order) {
    for (const j of order) {
      if (i === j) continue;
      const k = Math.round(g[3 * i + j]! / g[4 * j]!);
      const shorter = g[4 * i]! - 2 * k * g[3 * i + j]! + k * k * g[4 * j]!;
      if (k === 0 || shorter >= g[4 * i]! * (1 - PROGRESS)) continue;
      const step = [...IDENTITY];
      step[3 * j + i] = -k;
      return step as unknown as IntMat3;
    }
  }
  return null;
}

import { multiplyRatMat, type RatMat3, type RatVec3, ratDeterminant, ratMat3 } from "../algebra/index.ts";
import { type BravaisType, centringLetter, formatBasis, formatVector, primitiveBasis } from "../symmetry/index.ts";
import { type Cell, cellOfMetric, type Metric } from "./cell.ts";
import { conventionalCell } from "./conventional-cell.ts";
import { delaunayReduction } from "./delaunay-reduction.ts";
import { axesOf, changeAxes, gramOf, type LatticeAxes } from "./lattice-axes.ts";
import { latticeSymmetries } from "./lattice-symmetry.ts";
import { niggliReduction } from "./niggli-reduction.ts";

/** Deviation up to which a lattice is taken to have a symmetry; some s.u. of the angles of a measured cell; degrees. */
export const LATTICE_TOLERANCE = 0.1;

/** Higher symmetries of the lattice are told of up to this deviation; degrees. */
const FARTHEST_DEVIATION = 3;

/** a, b, c in angstrom, alpha, beta, gamma in degrees. */
export type CellNumbers = readonly [number, number, number, number, number, number];

/** A cell of the lattice; (a', b', c') = (a, b, c) P, P written as `a-b,a+b,c`. */
export interface LatticeCell {
  readonly cell: CellNumbers;
  readonly P: string;
  /** Cubic angstrom. */
  readonly volume: number;
}

/** A conventional cell that goes with a symmetry of the lattice. */
export interface SymmetricCell extends LatticeCell {
  readonly lattice: BravaisType;
  /** Largest angle by which the lattice misses this symmetry, degrees. */
  readonly deviation: number;
}

export interface ReduceAnswer {
  readonly cell: CellNumbers;
  readonly volume: number;
  /** Letter of the centring of the cell given, null where it has none of the usual ones. */
  readonly centring: string | null;
  readonly centrings: readonly string[];
  readonly niggli: LatticeCell;
  readonly delaunay: LatticeCell;
  /** The highest symmetry within the tolerance. */
  readonly conventional: SymmetricCell;
  /** Symmetries from triclinic upwards, in the order of their deviation, those beyond the tolerance included. */
  readonly lattices: readonly SymmetricCell[];
  /** Degrees. */
  readonly angleTolerance: number;
}

/**
 * Niggli, Delaunay and conventional cell of the lattice of a cell with its centrings.
 * @param centrings translations in [0, 1) that form a group modulo the cell, 0 included
 * @param angleTolerance degrees
 * @throws InputProblem `cell-too-skew`
 */
export function reduceAnswer(
  metric: Metric,
  centrings: readonly RatVec3[],
  angleTolerance: number = LATTICE_TOLERANCE,
): ReduceAnswer {
  const primitive = primitiveBasis(centrings);
  const axes = axesOf(metric, primitive);
  const whole = (P: RatMat3) => latticeCell(metric, multiplyRatMat(primitive, P));
  const niggli = niggliReduction(axes);
  const reduced = changeAxes(axes, niggli);
  const lattices = symmetricCells(reduced, Math.max(angleTolerance, FARTHEST_DEVIATION)).map(
    ({ P, lattice, deviation }) => ({ ...whole(multiplyRatMat(ratMat3(niggli), P)), lattice, deviation }),
  );
  return {
    cell: cellNumbers(metric.cell),
    volume: metric.volume,
    centring: centringLetter(centrings),
    centrings: centrings.map(formatVector),
    niggli: whole(ratMat3(niggli)),
    delaunay: whole(ratMat3(delaunayReduction(axes))),
    conventional: lattices.filter((l) => l.deviation <= angleTolerance).at(-1)!, // triclinic has deviation 0
    lattices,
    angleTolerance,
  };
}

/** Number of rotations of a lattice of each family: fewer make no lattice symmetry of their own. */
const ROTATIONS = { a: 1, m: 2, o: 4, t: 8, hR: 6, hP: 12, c: 24 } as const;

/** Deviations that differ by less than this are one: the higher symmetry is told of, the lower is not; degrees. */
const SAME_DEVIATION = 1e-4;

function symmetricCells(reduced: LatticeAxes, limit: number) {
  const cells = latticeSymmetries(reduced, limit).flatMap((symmetry) => {
    const { type, P } = conventionalCell(reduced, symmetry);
    const family = type === "hR" || type === "hP" ? type : (type[0] as "a" | "m" | "o" | "t" | "c");
    const whole = symmetry.rotations.length === ROTATIONS[family];
    return whole ? [{ lattice: type, P, deviation: symmetry.deviation }] : [];
  });
  return cells.filter((c, i) => !cells.slice(i + 1).some((d) => d.deviation <= c.deviation + SAME_DEVIATION));
}

function latticeCell(metric: Metric, P: RatMat3): LatticeCell {
  const axes = axesOf(metric, P);
  const { n, d } = ratDeterminant(P);
  return { cell: cellNumbers(cellOfMetric(gramOf(axes))), P: formatBasis(P), volume: (metric.volume * n) / d };
}

export function cellNumbers({ a, b, c, alpha, beta, gamma }: Cell): CellNumbers {
  return [a, b, c, alpha, beta, gamma];
}

import {
  IDENTITY,
  type IntMat3,
  type IntVec3,
  inverseRatMat,
  modOne,
  multiplyRatMat,
  RAT_IDENTITY,
  type RatMat3,
  type RatVec3,
  ratVec3,
  rowTimes,
  transformVector,
  transpose,
} from "../algebra/index.ts";
import { cellOfMetric, conventionalCell, type Mat3, type Metric, metricOf, multiply3 } from "../structure/index.ts";
import { centringsOf, closeGroup } from "../symmetry/index.ts";
import { type Extinction, groupsInCell } from "./groups-in-cell.ts";
import type { LaueGroup } from "./laue-groups.ts";
import type { Family } from "./merge-reflections.ts";
import { type ReducedLattice, rotationsIn } from "./reduced-lattice.ts";

/** A cell in which the space groups of a Laue class have conventional settings, with these groups. */
export interface CandidateCell {
  /** (a, b, c) of this cell = (a, b, c) of the cell of the indices times P; indices, as rows, change likewise. */
  readonly P: RatMat3;
  readonly rotations: readonly IntMat3[];
  readonly centrings: readonly RatVec3[];
  readonly extinctions: readonly Extinction[];
}

/** The cell of the indices if it is conventional for the Laue class, else the conventional cell of the lattice. */
export function candidateCell(lattice: ReducedLattice, centrings: readonly RatVec3[], laue: LaueGroup): CandidateCell {
  const own = groupsOn(RAT_IDENTITY, centrings, lattice, laue);
  if (own) return own;
  const { rotations } = laue;
  const { P } = conventionalCell(lattice.axes, { rotations, deviation: lattice.deviation });
  const whole = multiplyRatMat(lattice.basis, P);
  const found = groupsOn(whole, carriedCentrings(P), lattice, laue);
  if (!found) throw new RangeError(`no setting of ${laue.laueClass} in its conventional cell`);
  return found;
}

function groupsOn(
  P: RatMat3,
  centrings: readonly RatVec3[],
  { basis }: ReducedLattice,
  laue: LaueGroup,
): CandidateCell | null {
  const rotations = rotationsIn(multiplyRatMat(inverseRatMat(basis), P), laue.rotations);
  if (!rotations) return null;
  const extinctions = groupsInCell(laue.laueClass, rotations, centrings);
  return extinctions.length > 0 ? { P, rotations, centrings, extinctions } : null;
}

/** Centrings of the cell (a, b, c) P of a primitive lattice. */
function carriedCentrings(P: RatMat3): RatVec3[] {
  const back = inverseRatMat(P);
  const unit = [ratVec3([0, 0, 0]), ratVec3([1, 0, 0]), ratVec3([0, 1, 0]), ratVec3([0, 0, 1])];
  return centringsOf(closeGroup(unit.map((e) => ({ W: IDENTITY, w: modOne(transformVector(back, e)) }))));
}

/** Families with their indices in the cell (a, b, c) P; those that its lattice forbids are left out. */
export function familiesIn(families: readonly Family[], P: RatMat3): Family[] {
  return families.flatMap((family) => {
    const { n, d } = rowTimes(family.h, P);
    return d === 1 ? [{ ...family, h: n as IntVec3 }] : [];
  });
}

/** Metric of the cell (a, b, c) P. */
export function metricIn({ g }: Metric, { n, d }: RatMat3): Metric {
  const product = multiply3(transpose(n), multiply3(g, n));
  return metricOf(cellOfMetric(product.map((e) => e / (d * d)) as unknown as Mat3));
}

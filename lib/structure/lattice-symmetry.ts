import {
  add,
  determinant,
  equal,
  IDENTITY,
  type IntMat3,
  type IntVec3,
  multiply,
  primitiveRow,
  trace,
} from "../algebra/index.ts";
import { apply3, inverse3, type Vec3 } from "./cell.ts";
import type { LatticeAxes } from "./lattice-axes.ts";
import { cross3, dot3, length3 } from "./rotation-fit.ts";

/** Rotations that a lattice has within some tolerance. */
export interface LatticeSymmetry {
  /** Rotation parts of determinant 1 in the basis of the axes given, a group; with -1 they are all. */
  readonly rotations: readonly IntMat3[];
  /** Largest angle between a twofold axis and the normal of the lattice plane across it, degrees; 0 for no axis. */
  readonly deviation: number;
}

/** Rotations of the cube and of the hexagonal prism: no lattice has more. */
const MOST_ROTATIONS = 24;

/**
 * Symmetries of a lattice, from the identity alone to the highest within the limit, in the order of the deviation they
 * ask for. Every rotation of a lattice is a product of twofold ones, and these have entries -1, 0, 1 in a reduced basis.
 * @param axes a Niggli cell
 * @param limit degrees
 * Source: Y. Le Page, J. Appl. Cryst. 15 (1982) 255.
 */
export function latticeSymmetries(axes: LatticeAxes, limit: number): LatticeSymmetry[] {
  const inverse = inverse3(axes);
  const measured = twofoldMatrices()
    .map((W) => ({ W, deviation: twofoldDeviation(axes, inverse, W) }))
    .filter((t) => t.deviation <= limit)
    .sort((s, t) => s.deviation - t.deviation);
  let last: LatticeSymmetry = { rotations: [IDENTITY], deviation: 0 };
  const found = [last];
  for (const { W } of measured) {
    if (last.rotations.some((R) => equal(R, W))) continue;
    const rotations = closure([...last.rotations, W]);
    if (!rotations) continue;
    const deviation = rotations.reduce(
      (worst, R) => (isTwofold(R) ? Math.max(worst, twofoldDeviation(axes, inverse, R)) : worst),
      0,
    );
    if (deviation > limit) continue;
    last = { rotations, deviation };
    found.push(last);
  }
  return found;
}

let twofolds: readonly IntMat3[] | null = null;

/** The twofold rotations with entries -1, 0, 1. */
function twofoldMatrices(): readonly IntMat3[] {
  twofolds ??= smallMatrices().filter(isTwofold);
  return twofolds;
}

let small: readonly IntMat3[] | null = null;

/** All matrices with entries -1, 0, 1 and determinant 1: the rotations of any lattice in a reduced basis are among them. */
export function smallMatrices(): readonly IntMat3[] {
  if (small) return small;
  const found: IntMat3[] = [];
  for (let code = 0; code < 3 ** 9; code++) {
    const m: number[] = [];
    for (let i = 0, rest = code; i < 9; i++, rest = Math.floor(rest / 3)) m.push((rest % 3) - 1);
    if (determinant(m as unknown as IntMat3) === 1) found.push(m as unknown as IntMat3);
  }
  small = found;
  return found;
}

function isTwofold(W: IntMat3): boolean {
  return trace(W) === -1 && determinant(W) === 1 && equal(multiply(W, W), IDENTITY);
}

/** Angle between the direct and the reciprocal direction that a twofold rotation keeps, degrees. */
function twofoldDeviation(axes: LatticeAxes, inverse: LatticeAxes, W: IntMat3): number {
  const kept = add(W, IDENTITY); // of rank 1: columns along the axis, rows along the normal
  const column = [0, 1, 2].map((j) => [kept[j]!, kept[3 + j]!, kept[6 + j]!]).find(isNonzero)!;
  const row = [0, 1, 2].map((i) => [kept[3 * i]!, kept[3 * i + 1]!, kept[3 * i + 2]!]).find(isNonzero)!;
  const axis = apply3(axes, primitiveRow(column) as unknown as IntVec3);
  const h = primitiveRow(row);
  const normal = [0, 1, 2].map((j) => h[0]! * inverse[j]! + h[1]! * inverse[3 + j]! + h[2]! * inverse[6 + j]!);
  const n = normal as unknown as Vec3;
  return Math.atan2(length3(cross3(axis, n)), Math.abs(dot3(axis, n))) * (180 / Math.PI);
}

function isNonzero(v: readonly number[]): boolean {
  return v.some((e) => e !== 0);
}

/** The group that rotations generate, the identity first, or null where it is larger than that of any lattice. */
function closure(generators: readonly IntMat3[]): IntMat3[] | null {
  const found: IntMat3[] = [IDENTITY];
  for (let i = 0; i < found.length; i++) {
    for (const g of generators) {
      const product = multiply(found[i]!, g);
      if (found.some((m) => equal(m, product))) continue;
      if (found.length >= MOST_ROTATIONS) return null;
      found.push(product);
    }
  }
  return found;
}

import { type IntMat3, negate, transpose } from "../algebra/index.ts";
import { type Mat3, multiply3 } from "./cell.ts";
import { gramOf, type LatticeAxes } from "./lattice-axes.ts";
import { smallMatrices } from "./lattice-symmetry.ts";

/** A rotation part that keeps a lattice, nearly. */
export interface LatticeRotation {
  readonly W: IntMat3;
  /** Largest change of a term of the metric tensor, over the lengths of its two axes; dimensionless. */
  readonly strain: number;
}

/**
 * Rotations, proper and improper, that strain a lattice by less than a limit, the best first.
 * @param axes a Niggli cell, where they have entries -1, 0, 1
 */
export function latticeRotations(axes: LatticeAxes, limit: number): LatticeRotation[] {
  const g = gramOf(axes);
  const found: LatticeRotation[] = [];
  for (const W of smallMatrices()) {
    const strain = strainOf(g, W, limit);
    if (strain > limit) continue;
    found.push({ W, strain }, { W: negate(W), strain });
  }
  return found.sort((a, b) => a.strain - b.strain);
}

function strainOf(g: Mat3, W: IntMat3, limit: number): number {
  if (lengthStrain(g, W) > limit) return Number.POSITIVE_INFINITY; // most matrices end here
  const image = multiply3(transpose(W), multiply3(g, W));
  let worst = 0;
  for (let i = 0; i < 3; i++) {
    for (let j = i; j < 3; j++) {
      const change = Math.abs(image[3 * i + j]! - g[3 * i + j]!);
      worst = Math.max(worst, change / Math.sqrt(g[4 * i]! * g[4 * j]!));
    }
  }
  return worst;
}

/** Change of the square of the first axis, over that square. */
function lengthStrain(g: Mat3, W: IntMat3): number {
  const [p, , , q, , , r] = W;
  const square = g[0] * p * p + g[4] * q * q + g[8] * r * r + 2 * (g[1] * p * q + g[2] * p * r + g[5] * q * r);
  return Math.abs(square - g[0]) / g[0];
}

import { equal, type IntMat3, type IntVec3, MINUS_IDENTITY } from "../algebra/index.ts";
import { presentDensity } from "./absence-likelihood.ts";
import { keepsReflection, type Observation } from "./observations.ts";
import { acentricDensity, centricDensity } from "./wilson-density.ts";

/** Share of reflections that follow no distribution, and how much weaker they are; keeps one of them from deciding. */
const STRAY = { share: 0.1, scale: 0.1 } as const;

/**
 * Logarithm of how much likelier a crystal class makes the reflections in special zones and rows than nothing but the
 * mean intensity does: a rotation or plane
 * that keeps a reflection multiplies its mean intensity, and one that reverses it makes its distribution centric.
 * @param list special reflections that the group does not forbid
 * @param rotations all rotation parts of the group
 * Source: D. Rogers, Acta Cryst. 3 (1950) 455 (from memory).
 */
export function classEvidence(list: readonly Observation[], rotations: readonly IntMat3[]): number {
  const inversion = rotations.some((W) => equal(W, MINUS_IDENTITY));
  let sum = 0;
  for (const r of list) {
    const multiple = rotations.filter((W) => keepsReflection(W, r.h)).length;
    const centric = inversion || rotations.some((W) => reverses(W, r.h));
    const density = centric ? centricDensity : acentricDensity;
    const mean = multiple * r.mean;
    const likely = density(r.value, r.sigma, mean);
    const stray = density(r.value, r.sigma, STRAY.scale * mean);
    // far below zero both vanish: an outlier of that kind says nothing
    const p = (1 - STRAY.share) * likely + STRAY.share * stray;
    const known = presentDensity(r.value, r.sigma, r.mean);
    if (p > 0 && known > 0) sum += Math.log(p / known);
  }
  return sum;
}

/** h W = -h. */
function reverses(W: IntMat3, h: IntVec3): boolean {
  return keepsReflection(W.map((e) => -e) as unknown as IntMat3, h);
}

import { vectorCharacter } from "../representation/index.ts";
import { type Crystal, planeReach, type Vec3 } from "../structure/index.ts";
import type { Operation } from "../symmetry/index.ts";
import type { VibratingSite } from "./vibrating-sites.ts";

/** Snapped positions are right to rounding error only; two points nearer than this are the same point; angstrom. */
const SAME_POINT = 1e-6;

/**
 * Characters of the representation of all displacements, one per representative of the factor group, by the textbook
 * count: atoms of the primitive cell that the operation leaves in place (modulo the lattice) times its trace. Uses
 * positions only, no site groups, so it checks the correlation method independently.
 * Source: S. Bhagavantam and T. Venkatarayudu, Proc. Indian Acad. Sci. A9 (1939) 224 (method).
 */
export function countedCharacters(crystal: Crystal, sites: readonly VibratingSite[]): number[] {
  const isFixed = fixedPointTest(crystal);
  return crystal.group.representatives.map((a) => {
    const trace = vectorCharacter(a.W);
    if (trace === 0) return 0; // whatever the number of atoms
    let fixed = 0;
    for (const { site } of sites) for (const image of site.images) if (isFixed(a, image.position)) fixed++;
    return (fixed / crystal.group.centrings.length) * trace + 0;
  });
}

/** Whether an operation carries a point onto itself modulo all translations. */
function fixedPointTest({ group, metric }: Crystal): (a: Operation, x: Vec3) => boolean {
  const reach = planeReach(metric, SAME_POINT);
  const centrings = group.centrings.map(({ n, d }) => [n[0] / d, n[1] / d, n[2] / d] as const);
  return ({ W, w }, x) => {
    for (let k = 0; k < centrings.length; k++) {
      let i = 0;
      for (; i < 3; i++) {
        const moved = W[3 * i]! * x[0] + W[3 * i + 1]! * x[1] + W[3 * i + 2]! * x[2] + w.n[i]! / w.d - x[i]!;
        const apart = moved + centrings[k]![i]!;
        if (Math.abs(apart - Math.round(apart)) > reach[i]!) break;
      }
      if (i === 3) return true;
    }
    return false;
  };
}

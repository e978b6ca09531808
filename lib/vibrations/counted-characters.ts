import { vectorCharacter } from "../representation/index.ts";
import type { Crystal, Vec3 } from "../structure/index.ts";
import { type Operation, transformPoint } from "../symmetry/index.ts";
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
    let fixed = 0;
    for (const { site } of sites) for (const image of site.images) if (isFixed(a, image.position)) fixed++;
    return (fixed / crystal.group.centrings.length) * vectorCharacter(a.W) + 0;
  });
}

/**
 * Whether an operation carries a point onto itself modulo all translations. Compared axis by axis: a point within
 * SAME_POINT is within that distance, over the spacing of the lattice planes, along every axis.
 */
function fixedPointTest({ group, metric }: Crystal): (a: Operation, x: Vec3) => boolean {
  const reach = [0, 1, 2].map((i) => SAME_POINT * Math.hypot(...metric.toFractional.slice(3 * i, 3 * i + 3)));
  const centrings = group.centrings.map(({ n, d }) => [n[0] / d, n[1] / d, n[2] / d] as const);
  return (a, x) => {
    const y = transformPoint(a, x);
    for (const t of centrings) {
      let i = 0;
      while (i < 3) {
        const e = y[i]! + t[i]! - x[i]!;
        if (Math.abs(e - Math.round(e)) > reach[i]!) break;
        i++;
      }
      if (i === 3) return true;
    }
    return false;
  };
}

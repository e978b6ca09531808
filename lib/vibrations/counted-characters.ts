import { vectorCharacter } from "../representation/index.ts";
import { type Crystal, lengthOf, type Vec3 } from "../structure/index.ts";
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
  return crystal.group.representatives.map((a) => {
    let fixed = 0;
    for (const { site } of sites) for (const image of site.images) if (isFixed(crystal, a, image.position)) fixed++;
    return (fixed / crystal.group.centrings.length) * vectorCharacter(a.W) + 0;
  });
}

function isFixed(crystal: Crystal, a: Operation, x: Vec3): boolean {
  const y = transformPoint(a, x);
  return crystal.group.centrings.some((t) => {
    const d = [0, 1, 2].map((i) => y[i]! + t.n[i]! / t.d - x[i]!);
    const rest = d.map((e) => e - Math.round(e)) as unknown as Vec3;
    return lengthOf(crystal.metric, rest) <= SAME_POINT;
  });
}

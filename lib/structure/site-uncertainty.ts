import { isHydrogen } from "./bond-class.ts";
import type { Vec3 } from "./cell.ts";
import type { Crystal, CrystalSite } from "./crystal.ts";
import { scaledDirections } from "./free-parameters.ts";

/** How a site may be displaced. */
export interface SiteUncertainty {
  /** Fractional displacements of the listed point, each scaled by its s.u.; none for a fixed point. */
  readonly directions: readonly Vec3[];
  /** False where the site is free to move and the file gives no uncertainty. */
  readonly known: boolean;
}

/**
 * Uncertainty of every listed point, along the directions that its site symmetry leaves free. A coordinate without
 * uncertainty beside others that have one counts as held; in a polar group one atom may be held along the polar
 * directions to fix the origin. Where an atom has no uncertainty at all, that of its distances is unknown.
 */
export function siteUncertainties(crystal: Crystal): SiteUncertainty[] {
  const found = crystal.sites.map((site) => scaledDirections(freeDirections(site), site.su));
  const anyKnown = found.some((s) => s.directions.length > 0);
  const isPolar = polarTest(crystal);
  const held = found.flatMap(({ directions, unknown }, i) => {
    const { element } = crystal.sites[i]!;
    return directions.length === 0 && unknown.length > 0 && !isHydrogen(element) && unknown.every(isPolar) ? [i] : [];
  });
  const origin = anyKnown && held.length === 1 ? held[0]! : null;
  return found.map(({ directions, unknown }, i) => ({
    directions: directions as unknown as readonly Vec3[],
    known: unknown.length === 0 || directions.length > 0 || i === origin,
  }));
}

/** Columns of the projection onto the fixed points of the site group. */
function freeDirections({ symmetry }: CrystalSite): number[][] {
  const { n, d } = symmetry.projection;
  return [0, 1, 2].map((j) => [n[j]! / d, n[3 + j]! / d, n[6 + j]! / d]);
}

/** Whether every operation of the group leaves a direction as it is. */
function polarTest({ group }: Crystal): (direction: readonly number[]) => boolean {
  return (v) =>
    group.representatives.every(({ W }) =>
      [0, 3, 6].every((r) => Math.abs(W[r]! * v[0]! + W[r + 1]! * v[1]! + W[r + 2]! * v[2]! - v[r / 3]!) < 1e-9),
    );
}

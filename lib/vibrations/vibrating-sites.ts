import type { Crystal, CrystalSite } from "../structure/index.ts";

/**
 * One vibrating site per position: sites of mixed occupancy that share a position move as one. The first in the list
 * stands for the others.
 */
export interface VibratingSite {
  /** Labels joined with `+`. */
  readonly label: string;
  readonly site: CrystalSite;
  /** All sites at the position. */
  readonly sites: readonly CrystalSite[];
  /** Atoms of this site in the primitive cell. */
  readonly count: number;
}

export function vibratingSites(crystal: Crystal): VibratingSite[] {
  const groups = new Map<number, CrystalSite[]>();
  crystal.sites.forEach((site, i) => {
    const key = site.sharesPositionOf ?? i;
    const list = groups.get(key);
    if (list) list.push(site);
    else groups.set(key, [site]);
  });
  return [...groups.values()].map((sites) => ({
    label: sites.map((s) => s.label).join("+"),
    site: sites[0]!,
    sites,
    count: sites[0]!.images.length / crystal.group.centrings.length,
  }));
}

/** Share of the atoms that the rounding of occupancies in files may add or take. */
const OCCUPANCY_ROUNDING = 1e-3;

/** Occupancy of the place of every site by all the sites that share it, in the order of the crystal's sites. */
export function placeOccupancies({ sites }: Crystal): number[] {
  const rootOf = (i: number) => sites[i]!.sharesPositionOf ?? i;
  const sums = sites.map(() => 0);
  sites.forEach((s, i) => {
    sums[rootOf(i)]! += s.occupancy;
  });
  return sites.map((_, i) => sums[rootOf(i)]!);
}

/** A sum of occupancies, a whole number where only rounding keeps it from being one. */
export function wholeAtoms(sum: number): number {
  const whole = Math.round(sum);
  return Math.abs(sum - whole) < OCCUPANCY_ROUNDING * Math.max(1, whole) ? whole : sum;
}

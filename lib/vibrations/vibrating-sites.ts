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

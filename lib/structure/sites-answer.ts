import { pointGroup } from "../representation/index.ts";
import type { IdentifiedGroup } from "../symmetry/index.ts";
import type { Vec3 } from "./cell.ts";
import type { Crystal } from "./crystal.ts";

/** A site of the file with its place in the space group. */
export interface SiteAnswer {
  readonly label: string;
  readonly element: string | null;
  readonly occupancy: number;
  /** Images in the cell of the file. */
  readonly multiplicity: number;
  readonly siteSymmetry: string;
  readonly schoenflies: string;
  readonly order: number;
  /** Fractional, as the file gives it. */
  readonly position: Vec3;
  /** On the special position. */
  readonly snapped: Vec3;
  /** Distance between the two, angstrom. */
  readonly shift: number;
}

export interface SitesAnswer {
  readonly sites: readonly SiteAnswer[];
}

/** Site symmetry of every site, in the order of the file. */
export function sitesAnswer(crystal: Crystal, { frames }: IdentifiedGroup): SitesAnswer {
  const frame = frames.own ?? frames.reference;
  return {
    sites: crystal.sites.map((site) => {
      const { operations, point, shift } = site.symmetry;
      const group = pointGroup(
        operations.map((a) => a.W),
        frame,
      );
      return {
        label: site.label,
        element: site.element,
        occupancy: site.occupancy,
        multiplicity: site.images.length,
        siteSymmetry: group.hermannMauguin,
        schoenflies: group.schoenflies,
        order: group.order,
        position: site.position,
        snapped: point,
        shift,
      };
    }),
  };
}

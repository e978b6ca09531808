import { pointGroup } from "../representation/index.ts";
import { assignWyckoff, type IdentifiedGroup } from "../symmetry/index.ts";
import type { Vec3 } from "./cell.ts";
import type { Crystal, CrystalSite } from "./crystal.ts";

/** A site of the file with its place in the space group. */
export interface SiteAnswer {
  readonly label: string;
  readonly element: string | null;
  readonly occupancy: number;
  /** Images in the cell of the file. */
  readonly multiplicity: number;
  /** Letter of the Wyckoff position; `A` stands for the alpha of P m m m. */
  readonly wyckoff: string;
  /** Multiplicity and letter in the reference setting: `4c`. */
  readonly referencePosition: string;
  /** Oriented symbol, `.m.`, along the axes of the file where they are symmetry directions. */
  readonly siteSymmetry: string;
  readonly schoenflies: string;
  readonly order: number;
  /** Fractional, as the file gives it. */
  readonly position: Vec3;
  /** On the special position. */
  readonly snapped: Vec3;
  /** Distance between the two, angstrom. */
  readonly shift: number;
  /** Where the site may move in the axes of the file: `x,1/4,z`. */
  readonly constraint: string;
  /** The same in the reference setting. */
  readonly referenceConstraint: string;
  /** What its displacement tensor may be, in the order 11 22 33 12 13 23: `u11,u22,u33,0,u13,0`. */
  readonly adp: string;
  /** Whether `adp` holds for U_ij as it stands, or only for beta_ij (axes of unequal length that symmetry mixes). */
  readonly adpHoldsFor: "U" | "beta";
  /** All images in the cell, where they were asked for. */
  readonly images?: readonly SiteImage[];
}

/** One of the equivalent positions of a site. */
export interface SiteImage {
  /** Exact where the point was given without a cell, else rounded: `3/5,3/4,4/5`. */
  readonly coordinates: string;
  readonly position: Vec3;
  /** The operation of the group that makes it, up to whole cells. */
  readonly operation: string;
}

export interface SitesAnswer {
  readonly sites: readonly SiteAnswer[];
}

/**
 * Site symmetry, Wyckoff position and constraints of every site, in the order of the file.
 * @example
 * ```ts
 * const rutile = composedCrystal(parseSiteTable("group 136\ncell a=4.59 c=2.96\nTi 2a\nO 4f x=0.305"));
 * const oxygen = sitesAnswer(rutile).sites[1]!;
 * oxygen.referencePosition; // "4f"
 * oxygen.siteSymmetry; // "m.2m"
 * oxygen.constraint; // "x,x,0"
 * oxygen.adp; // "u11,u11,u33,u12,0,0"
 * ```
 */
export function sitesAnswer(crystal: Crystal): SitesAnswer {
  return { sites: crystal.sites.map((site) => siteAnswer(site, crystal.identified)) };
}

/** What is told of a site. */
type PlacedSite = Pick<CrystalSite, "label" | "element" | "occupancy" | "position" | "symmetry">;

/** A site in its place in a group. */
export function siteAnswer(site: PlacedSite, identified: IdentifiedGroup): SiteAnswer {
  const { operations, point, shift } = site.symmetry;
  const assigned = assignWyckoff(identified, operations);
  return {
    label: site.label,
    element: site.element,
    occupancy: site.occupancy,
    multiplicity: assigned.multiplicity,
    wyckoff: assigned.letter,
    referencePosition: `${assigned.referenceMultiplicity}${assigned.letter}`,
    siteSymmetry: assigned.siteSymmetry,
    schoenflies: pointGroup(operations.map((a) => a.W)).schoenflies,
    order: assigned.order,
    position: site.position,
    snapped: point,
    shift,
    constraint: assigned.constraint,
    referenceConstraint: assigned.referenceConstraint,
    adp: assigned.tensor.text,
    adpHoldsFor: assigned.tensorHoldsFor,
  };
}

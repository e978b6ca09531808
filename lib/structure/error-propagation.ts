import type { IntMat3 } from "../algebra/index.ts";
import { apply3, type Mat3, type Vec3 } from "./cell.ts";
import { type CellUncertainties, cellStrains } from "./cell-uncertainty.ts";
import type { Crystal } from "./crystal.ts";
import { dot3 } from "./rotation-fit.ts";
import { type SiteUncertainty, siteUncertainties } from "./site-uncertainty.ts";

/** A point of a measured quantity: an atom of the crystal, with the rotation of the operation that makes it. */
export interface MeasuredPoint {
  /** Index of the site. */
  readonly site: number;
  /** Rotation part of the operation that carries the listed point to this one. */
  readonly W: IntMat3;
  /** angstrom */
  readonly cartesian: Vec3;
}

/** Smaller uncertainties are rounding: symmetry fixes the quantity. In angstrom, degrees or valence units. */
const FIXED = 1e-8;

/**
 * Propagates the uncertainties of coordinates and cell to quantities of a crystal. Images of one site move together, each
 * turned by its operation; special positions keep to their fixed points; cell parameters that symmetry ties move
 * together. The error of one atom is taken as equal in all directions that are free; other correlations are not in a CIF and
 * are taken as none.
 */
export class ErrorPropagation {
  private readonly crystal: Crystal;
  private readonly strains: readonly Mat3[];
  /** Of all free parameters of the cell, whether they have an uncertainty or not. */
  private readonly possibleStrains: readonly Mat3[];
  private readonly sites: readonly SiteUncertainty[];
  /** Whether the cell has uncertainties, and whether any coordinate has. */
  readonly ofCell: boolean;
  readonly ofSites: boolean;

  constructor(crystal: Crystal, cell: CellUncertainties) {
    this.crystal = crystal;
    this.strains = cellStrains(crystal.metric, crystal.group, cell);
    this.possibleStrains = cellStrains(crystal.metric, crystal.group, [1, 1, 1, 1, 1, 1]);
    this.sites = siteUncertainties(crystal);
    this.ofCell = this.strains.length > 0;
    this.ofSites = this.sites.some((s) => s.directions.length > 0);
  }

  /**
   * Standard uncertainty of a quantity that does not change when all points are shifted or turned together: 0 where
   * symmetry fixes it, null where that of an atom, or of everything it hangs on, is not known.
   * @param gradients change of the quantity per angstrom of each point
   */
  su(points: readonly MeasuredPoint[], gradients: readonly Vec3[]): number | null {
    if (points.some((p) => !this.sites[p.site]!.known)) return null;
    const su = Math.sqrt(this.fromStrains(this.strains, points, gradients) + this.fromSites(points, gradients));
    if (su > FIXED) return su;
    return Math.sqrt(this.fromStrains(this.possibleStrains, points, gradients)) > FIXED ? null : 0;
  }

  private fromStrains(strains: readonly Mat3[], points: readonly MeasuredPoint[], gradients: readonly Vec3[]): number {
    const origin = points[0]!.cartesian;
    let variance = 0;
    for (const strain of strains) {
      let change = 0;
      points.forEach(({ cartesian: r }, i) => {
        change += dot3(gradients[i]!, apply3(strain, [r[0] - origin[0], r[1] - origin[1], r[2] - origin[2]]));
      });
      variance += change * change;
    }
    return variance;
  }

  private fromSites(points: readonly MeasuredPoint[], gradients: readonly Vec3[]): number {
    const { toCartesian } = this.crystal.metric;
    let variance = 0;
    for (const site of new Set(points.map((p) => p.site))) {
      for (const direction of this.sites[site]!.directions) {
        let change = 0;
        points.forEach((p, i) => {
          if (p.site === site) change += dot3(gradients[i]!, apply3(toCartesian, apply3(p.W, direction)));
        });
        variance += change * change;
      }
    }
    return variance;
  }
}

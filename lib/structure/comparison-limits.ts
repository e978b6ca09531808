import { InputProblem } from "../problem.ts";
import type { MatchLimits } from "./structure-match.ts";

/** Two determinations of one structure differ by less in any atom, thermal expansion and all; angstrom. */
export const COMPARISON_DISPLACEMENT = 0.3;
/** And by less in any direction of the lattice; dimensionless. */
export const COMPARISON_STRAIN = 0.03;
/** Isotypic structures differ by more: radii of ions, not errors; angstrom, after scaling to one volume. */
export const ISOTYPIC_DISPLACEMENT = 0.7;
export const ISOTYPIC_STRAIN = 0.1;
/** Occupancies of partners that differ by more make another structure. */
export const OCCUPANCY_DIFFERENCE = 0.1;

export interface ComparisonOptions {
  /** Largest displacement of an atom, angstrom; default COMPARISON_DISPLACEMENT, or ISOTYPIC_DISPLACEMENT. */
  readonly displacement?: number;
  /** Largest principal strain of the lattice, dimensionless. */
  readonly strain?: number;
  /** Elements may stand for others; the second structure is scaled to the volume of the first. */
  readonly isotypic?: boolean;
}

/**
 * The limits asked for, or the usual ones.
 * @throws InputProblem `tolerance-impossible`
 */
export function comparisonLimits({ displacement, strain, isotypic = false }: ComparisonOptions): MatchLimits {
  const limits = {
    displacement: displacement ?? (isotypic ? ISOTYPIC_DISPLACEMENT : COMPARISON_DISPLACEMENT),
    strain: strain ?? (isotypic ? ISOTYPIC_STRAIN : COMPARISON_STRAIN),
  };
  requireBetween("displacement", limits.displacement, 1, "angstrom");
  requireBetween("strain", limits.strain, 0.2, "(a share of the cell edges)");
  return limits;
}

function requireBetween(what: string, value: number, most: number, unit: string): void {
  if (value > 0 && value <= most) return;
  throw new InputProblem(
    "tolerance-impossible",
    `a largest ${what} of ${value} cannot tell structures apart`,
    null,
    `give a number above 0, and up to ${most} ${unit}`,
  );
}

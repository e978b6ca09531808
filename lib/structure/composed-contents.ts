import { gcd } from "../algebra/index.ts";
import { cellContents } from "./composition.ts";
import type { Crystal } from "./crystal.ts";
import { DALTON_PER_CUBIC_ANGSTROM, massOf } from "./density.ts";
import { formatFormula, hillOrder } from "./formula-text.ts";
import { formulaUnits } from "./formula-units.ts";

/** What the cell holds, worked out from the sites. */
export interface ComposedContents {
  /** Of one formula unit, in Hill order with blanks: `C Ca O3`. */
  readonly sum: string;
  /** As chemists write it: `CaCO3`. */
  readonly formula: string;
  /** Formula units in the cell. */
  readonly z: number;
  /** Of one formula unit, dalton; null where an element has no standard mass. */
  readonly weight: number | null;
  /** g cm^-3 */
  readonly density: number | null;
}

/**
 * Formula, Z and density of a crystal: the smallest formula with whole numbers, or where occupancies leave none, the
 * contents over the largest common divisor of the multiplicities.
 */
export function composedContents(crystal: Crystal): ComposedContents {
  const { sites, metric, group } = crystal;
  const contents = cellContents(sites);
  const units = formulaUnits(crystal, null);
  const z = units ? units.inPrimitiveCell * group.centrings.length : sites.reduce((d, s) => gcd(d, s.images.length), 0);
  const one = hillOrder(new Map([...contents].map(([e, n]) => [e, n / z])));
  const weight = massOf(one);
  return {
    sum: formatFormula(one),
    formula: units?.formula ?? formatFormula(one),
    z,
    weight,
    density: weight === null ? null : (DALTON_PER_CUBIC_ANGSTROM * weight * z) / metric.volume,
  };
}

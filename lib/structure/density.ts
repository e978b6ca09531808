import { element } from "./elements.ts";
import type { Formula } from "./formula-text.ts";

/** g cm^-3 of one dalton per cubic angstrom. Source: CODATA 2018, atomic mass constant 1.66053907e-27 kg. */
export const DALTON_PER_CUBIC_ANGSTROM = 1.66053907;

/** Mass of the atoms of a formula, dalton; null where one has no standard mass. */
export function massOf(formula: Formula): number | null {
  let sum = 0;
  for (const [symbol, count] of formula) {
    const mass = element(symbol)?.mass ?? null;
    if (mass === null) return null;
    sum += count * mass;
  }
  return sum;
}

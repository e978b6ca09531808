import type { MolecularUnit } from "../structure/index.ts";
import { FREE_UNITS, type FreeUnit } from "./tables/free-units.ts";

/**
 * Free ions and molecules of the same composition and point group as a unit, those with a charge first: a crystal that
 * holds single atoms besides is a salt more often than not.
 * @param pointGroup Schoenflies symbol of the unit as found
 */
export function freeUnitsLike(unit: Pick<MolecularUnit, "atoms">, pointGroup: string): FreeUnit[] {
  const wanted = composition(unit.atoms.map((a) => a.element));
  return FREE_UNITS.filter((free) => free.pointGroup === pointGroup && formulaKey(free.formula) === wanted).sort(
    (a, b) => Number(b.charge !== 0) - Number(a.charge !== 0),
  );
}

/** Free units of the same composition whatever their point group. */
export function freeUnitsOf(unit: Pick<MolecularUnit, "atoms">): FreeUnit[] {
  const wanted = composition(unit.atoms.map((a) => a.element));
  return FREE_UNITS.filter((free) => formulaKey(free.formula) === wanted);
}

function composition(elements: readonly string[]): string {
  const counts = new Map<string, number>();
  for (const e of elements) {
    const symbol = e === "D" || e === "T" ? "H" : e;
    counts.set(symbol, (counts.get(symbol) ?? 0) + 1);
  }
  return keyOf(counts);
}

function formulaKey(formula: string): string {
  const counts = new Map<string, number>();
  for (const [, element = "", count] of formula.matchAll(/([A-Z][a-z]?)(\d*)/g)) {
    counts.set(element, (counts.get(element) ?? 0) + Number(count || 1));
  }
  return keyOf(counts);
}

function keyOf(counts: ReadonlyMap<string, number>): string {
  return [...counts]
    .sort(([a], [b]) => (a < b ? -1 : 1))
    .map(([e, n]) => `${e}${n}`)
    .join(" ");
}

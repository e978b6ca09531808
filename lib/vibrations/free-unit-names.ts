import type { MolecularUnit } from "../structure/index.ts";
import { FREE_UNITS, type FreeUnit } from "./tables/free-units.ts";

/**
 * Free ions and molecules of the same composition and point group as a unit, those with a charge first: a crystal that
 * holds single atoms besides is a salt more often than not. Deuterium is not hydrogen here: a unit that is heavy
 * throughout and has no entry of its own takes names and numbering of the light one but none of its wavenumbers, and one
 * with both isotopes has neither, since its modes are others.
 * @param pointGroup Schoenflies symbol of the unit as found
 */
export function freeUnitsLike(unit: Pick<MolecularUnit, "atoms">, pointGroup: string): FreeUnit[] {
  const elements = unit.atoms.map((a) => a.element);
  const own = alike(elements, pointGroup);
  const heavy = elements.some((e) => HEAVY.has(e));
  if (own.length > 0 || !heavy) return own;
  const isotopes = new Set(elements.filter((e) => e === "H" || HEAVY.has(e)));
  if (isotopes.size > 1) return [];
  return alike(elements.map(light), pointGroup).map(numberingOf);
}

/** Symbols of the heavy isotopes of hydrogen. */
const HEAVY: ReadonlySet<string> = new Set(["D", "T"]);

function light(element: string): string {
  return HEAVY.has(element) ? "H" : element;
}

function alike(elements: readonly string[], pointGroup: string): FreeUnit[] {
  const wanted = composition(elements);
  return FREE_UNITS.filter((free) => free.pointGroup === pointGroup && formulaKey(free.formula) === wanted).sort(
    (a, b) => Number(b.charge !== 0) - Number(a.charge !== 0),
  );
}

/** The same modes without wavenumbers, those of another isotope. */
function numberingOf(free: FreeUnit): FreeUnit {
  return {
    ...free,
    name: `${free.name}, deuterated`,
    note: "numbering only: the heavy isotope shifts the wavenumbers",
    modes: free.modes.map((m) => ({ ...m, wavenumber: null })),
  };
}

/** Free units of the same composition whatever their point group. */
export function freeUnitsOf(unit: Pick<MolecularUnit, "atoms">): FreeUnit[] {
  const wanted = composition(unit.atoms.map((a) => a.element));
  return FREE_UNITS.filter((free) => formulaKey(free.formula) === wanted);
}

function composition(elements: readonly string[]): string {
  const counts = new Map<string, number>();
  for (const e of elements) counts.set(e, (counts.get(e) ?? 0) + 1);
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

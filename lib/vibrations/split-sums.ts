import type { Crystal, UnitAnalysis } from "../structure/index.ts";
import type { FactorGroupModes } from "./factor-group.ts";
import { countsOf, type SpeciesCounts } from "./species-counts.ts";
import type { CorrelatedUnit } from "./unit-answer.ts";

/** Species by kind of motion, in the factor group; acoustic modes are part of `translations` and of `acoustic`. */
export interface SplitSums {
  readonly internal: SpeciesCounts;
  readonly librations: SpeciesCounts;
  readonly translations: SpeciesCounts;
  readonly extended: SpeciesCounts;
  readonly acoustic: SpeciesCounts;
  /** All but the acoustic modes. */
  readonly optic: SpeciesCounts;
  readonly total: SpeciesCounts;
}

/** Sites that share a position vibrate as one: the first of them stands for all. */
function rootSite(crystal: Crystal, site: number): number {
  return crystal.sites[site]!.sharesPositionOf ?? site;
}

/** Species of the factor group that the atoms of a site give, by its index in the crystal. */
export function siteContributions(crystal: Crystal, modes: FactorGroupModes): (site: number) => readonly number[] {
  const bySite = new Map(modes.sites.map((m) => [m.site, m.contributions]));
  return (site) => bySite.get(crystal.sites[rootSite(crystal, site)]!)!;
}

/** Sum of lists of numbers, species by species. */
export function addAll(modes: FactorGroupModes, lists: readonly (readonly number[])[]): number[] {
  return modes.species.map((_, i) => lists.reduce((s, list) => s + list[i]!, 0));
}

/**
 * Adds up units, single atoms and extended structures, and compares with the result atom by atom.
 * @throws RangeError if the two differ though every site is fully occupied: a defect of this program
 */
export function sumUp(
  crystal: Crystal,
  modes: FactorGroupModes,
  analysis: UnitAnalysis,
  correlated: readonly CorrelatedUnit[],
): { sums: SplitSums; notes: string[] } {
  const ofSite = siteContributions(crystal, modes);
  const lone = analysis.loneAtoms.map((a) => ofSite(a.site));
  const extended = addAll(
    modes,
    analysis.extended.flatMap((e) => e.sites.map((s) => ofSite(s))),
  );
  const internal = addAll(
    modes,
    correlated.flatMap(({ correlation }) => correlation.species.map((s) => s.factorGroup.map((n) => n * s.count))),
  );
  const librations = addAll(
    modes,
    correlated.map((c) => c.correlation.librations.factorGroup),
  );
  const translations = addAll(modes, [...correlated.map((c) => c.correlation.translations.factorGroup), ...lone]);
  const total = addAll(modes, [internal, librations, translations, extended]);
  const notes = compareWithAtoms(crystal, modes, analysis, total, ofSite);
  const counts = (numbers: readonly number[]) => countsOf(modes.group.irreps, numbers);
  return {
    sums: {
      internal: counts(internal),
      librations: counts(librations),
      translations: counts(translations),
      extended: counts(extended),
      acoustic: counts(modes.species.map((s) => s.acoustic)),
      optic: counts(modes.species.map((s, i) => total[i]! - s.acoustic)),
      total: counts(total),
    },
    notes,
  };
}

/** The self-check: units and single atoms together are the atoms, one by one. */
function compareWithAtoms(
  crystal: Crystal,
  modes: FactorGroupModes,
  analysis: UnitAnalysis,
  total: readonly number[],
  ofSite: (site: number) => readonly number[],
): string[] {
  const used = new Set<number>();
  const use = (site: number) => used.add(rootSite(crystal, site));
  for (const u of analysis.units) for (const a of u.atoms) use(a.site);
  for (const e of analysis.extended) for (const s of e.sites) use(s);
  for (const a of analysis.loneAtoms) use(a.site);
  const expected = addAll(modes, [...used].map(ofSite));
  const left = crystal.sites.filter((_, i) => rootSite(crystal, i) === i && !used.has(i));
  const notes =
    left.length > 0 ? [`not counted, as alternatives to others: ${left.map((s) => s.label).join(", ")}`] : [];
  if (expected.every((n, i) => n === total[i])) return notes;
  if (crystal.sites.some((s) => s.occupancy < 1)) {
    return [...notes, "some sites are occupied in part only, so the sum over units is not that over all atoms listed"];
  }
  const show = (numbers: readonly number[]) => modes.species.map((s, i) => `${numbers[i]}${s.label}`).join(" ");
  throw new RangeError(`the units give ${show(total)}, the atoms ${show(expected)}`);
}

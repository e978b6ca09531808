import { countsOf, type SpeciesCounts } from "./species-counts.ts";
import type { SplitAnswer } from "./split-answer.ts";
import type { UnitAnswer } from "./unit-answer.ts";

/** A kind of molecule or ion in one line: all its modes in the factor group. */
export interface UnitSummary {
  readonly formula: string;
  /** Name of the free ion or molecule, null where none is known. */
  readonly name: string | null;
  readonly labels: readonly string[];
  /** In the primitive cell. */
  readonly count: number;
  readonly pointGroup: string;
  readonly siteSymmetry: string;
  readonly schoenflies: string;
  readonly internal: SpeciesCounts;
  readonly librations: SpeciesCounts;
  readonly translations: SpeciesCounts;
}

/** Units, single atoms and extended structures of a crystal with their modes, acoustic ones among the translations. */
export interface UnitSummaries {
  readonly units: readonly UnitSummary[];
  readonly loneAtoms: SplitAnswer["loneAtoms"];
  readonly extended: SplitAnswer["extended"];
  readonly unitNotes: readonly string[];
}

/** Shortens the answer of `split` to a line for each unit. */
export function unitSummaries({ units, loneAtoms, extended, unitNotes, activity }: SplitAnswer): UnitSummaries {
  return {
    units: units.map((u) => ({
      formula: u.formula,
      name: u.freeName,
      labels: u.labels,
      count: u.count,
      pointGroup: u.pointGroup,
      siteSymmetry: u.siteSymmetry,
      schoenflies: u.schoenflies,
      internal: internalSum(u.internal, activity),
      librations: u.librations.factorGroup,
      translations: u.translations.factorGroup,
    })),
    loneAtoms,
    extended,
    unitNotes: [...unitNotes, ...averages(units)],
  };
}

/** Units that no unit is like at a time. */
function averages(units: readonly UnitAnswer[]): string[] {
  const mean = units.filter((u) => u.places !== u.atomsByOccupancy);
  return mean.map((u) => `${u.formula} is the average of a disorder: ${u.places} places in one, more than its atoms`);
}

/** In the order of the species. */
function internalSum(modes: UnitAnswer["internal"], species: SplitAnswer["activity"]): SpeciesCounts {
  const numbers = species.map(({ label }) => modes.reduce((n, m) => n + m.count * (m.factorGroup[label] ?? 0), 0));
  return countsOf(species, numbers);
}

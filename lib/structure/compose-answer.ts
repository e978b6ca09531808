import { identify, spaceGroupType } from "../symmetry/index.ts";
import { type ComposedContents, composedContents } from "./composed-contents.ts";
import type { Crystal } from "./crystal.ts";
import { type CellNumbers, cellNumbers } from "./reduce-answer.ts";
import { type NearPair, shortDistances } from "./shortest-distance.ts";
import { type SitesAnswer, sitesAnswer } from "./sites-answer.ts";
import { searchSymmetry } from "./symmetry-search.ts";

/** Displacements up to this are the rounding of coordinates with four digits; angstrom. */
const EXACT = 5e-3;

/** Most atoms in the cell for which symmetry beyond the group is looked for unasked; larger ones take seconds. */
const MOST_SEARCHED = 2000;

/** What is told of a composed structure besides its sites. */
export interface ComposeAnswer extends SitesAnswer {
  readonly cell: CellNumbers;
  /** Cubic angstrom. */
  readonly volume: number;
  /** Computed from the sites. */
  readonly contents: ComposedContents;
  /** Between atoms that can be there together. */
  readonly shortest: NearPair | null;
  /** The group that the sites really have, where it is higher than the one named. */
  readonly higher: HigherSymmetry | null;
}

export interface HigherSymmetry {
  readonly number: number;
  readonly hermannMauguin: string;
  /** How many times as many operations, per volume. */
  readonly index: number;
}

/** A composed structure with what follows from it, and notes on what is odd. */
export interface ComposeResult {
  readonly answer: ComposeAnswer;
  readonly notes: readonly string[];
}

/**
 * Sites, contents, distances and symmetry of a crystal made from a table.
 * @example
 * ```ts
 * const table = parseSiteTable("group R -3 c\ncell a=5.07 c=16.82\nNa 6b\nN 6a\nO 18e x=0.245");
 * const { answer, notes } = composeAnswer(composedCrystal(table));
 * answer.contents.formula; // "NaNO3"
 * answer.contents.z; // 6
 * answer.contents.density!.toFixed(2); // "2.26"
 * answer.shortest!.labels; // ["N", "O"]
 * notes; // []
 * ```
 */
export function composeAnswer(crystal: Crystal): ComposeResult {
  const { shortest, tooNear } = shortDistances(crystal);
  const higher = higherSymmetry(crystal);
  const answer: ComposeAnswer = {
    cell: cellNumbers(crystal.metric.cell),
    volume: crystal.metric.volume,
    ...sitesAnswer(crystal),
    contents: composedContents(crystal),
    shortest,
    higher,
  };
  return { answer, notes: [...nearNotes(tooNear), ...symmetryNotes(higher)] };
}

const SHOWN = 4;

function nearNotes(pairs: readonly NearPair[]): string[] {
  if (pairs.length === 0) return [];
  const shown = pairs.slice(0, SHOWN).map((p) => `${p.labels.join("-")} ${p.distance.toFixed(2)} Å`);
  const more = pairs.length > SHOWN ? ` and ${pairs.length - SHOWN} more` : "";
  return [
    `nearer than atoms come: ${shown.join(", ")}${more}; a coordinate, letter or origin may be wrong, or the atoms take turns (occ=)`,
  ];
}

function symmetryNotes(higher: HigherSymmetry | null): string[] {
  if (!higher) return [];
  return [
    `the sites have the symmetry ${higher.hermannMauguin} (No. ${higher.number}), ${higher.index} times that of the group named; sitefold symmetrise describes them in it`,
  ];
}

function higherSymmetry(crystal: Crystal): HigherSymmetry | null {
  const size = crystal.sites.reduce((n, s) => n + s.images.length, 0);
  if (size > MOST_SEARCHED) return null;
  const { given, folded, group, exact } = searchSymmetry(crystal, { tolerance: EXACT });
  const found = (group.members.length * given.length) / folded.atoms.species.length;
  const index = found / crystal.group.operations.length;
  if (index <= 1) return null;
  const { number } = identify(exact.operations);
  return { number, hermannMauguin: spaceGroupType(number).hermannMauguin, index };
}

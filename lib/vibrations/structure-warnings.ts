import {
  type Crystal,
  chooseComponents,
  type Formula,
  POSITION_TOLERANCE,
  searchSymmetry,
} from "../structure/index.ts";
import { FULL, isOrdered, orderedWarnings, some } from "./ordered-warnings.ts";
import { vibratingSites } from "./vibrating-sites.ts";

/** Larger lists without symmetry are not searched for any unasked: a search of this size takes as long as a start. */
const MOST_SEARCHED = 500;

/**
 * Where the average structure lies to a spectroscopist, as plain sentences: partial and mixed occupancy, alternatives that
 * are all counted, missing hydrogen, atoms just off a special position, symmetry that a list in P 1 leaves out.
 * @param formula the formula that the file states, if it does
 */
export function structureWarnings(crystal: Crystal, formula: Formula | null): string[] {
  const ordered = orderedWarnings(crystal, formula);
  if (isOrdered(crystal)) return ordered;
  return [
    ...occupancyWarnings(crystal),
    ...alternativeWarnings(crystal),
    ...ordered,
    ...missedSymmetryWarnings(crystal),
  ];
}

function occupancyWarnings(crystal: Crystal): string[] {
  const places = vibratingSites(crystal);
  const warnings: string[] = [];
  const mixed = places.filter((p) => p.sites.length > 1).map((p) => p.sites.map((s) => s.label).join(" and "));
  if (mixed.length > 0) {
    warnings.push(
      `mixed occupancy: ${some(mixed)} count as one vibrating site; each kind of atom may show bands of its own, and their disorder lifts selection rules`,
    );
  }
  const partial = places.filter((p) => p.sites.length === 1 && p.site.occupancy < FULL).map((p) => p.site);
  if (partial.length > 0) {
    const shown = partial.map((s) => `${s.label} (${Number(s.occupancy.toFixed(3))})`);
    warnings.push(
      `partial occupancy: ${some(shown)} count as if every place were filled; at a time there are fewer atoms, and less symmetry`,
    );
  }
  return warnings;
}

function alternativeWarnings(crystal: Crystal): string[] {
  const { sites } = crystal;
  if (sites.every((s) => s.occupancy >= FULL && s.disorderGroup === null)) return [];
  const { chosen, contested } = chooseComponents(crystal);
  const first = (i: number) => sites[i]!.sharesPositionOf ?? i;
  const filled = new Set(sites.flatMap((_, i) => (chosen[i] ? [first(i)] : [])));
  const split = sites.filter((s, i) => s.occupancy > 0 && s.sharesPositionOf === null && !filled.has(i));
  const warnings: string[] = [];
  if (split.length > 0) {
    warnings.push(
      `split sites: ${some(split.map((s) => s.label))} and the sites they stand in for are never there together; counts by site hold both, units one of them`,
    );
  }
  if (contested.length > 0) {
    const labels = some(contested.map((i) => sites[i]!.label));
    warnings.push(
      `images of ${labels} exclude each other: the average holds more atoms, and more symmetry, than there is at a time`,
    );
  }
  return warnings;
}

/** Computed structures are often listed atom by atom: in P 1 every mode is active everywhere, which is no prediction. */
function missedSymmetryWarnings(crystal: Crystal): string[] {
  const { group, sites } = crystal;
  if (group.representatives.length > 1 || sites.length < 2 || sites.length > MOST_SEARCHED) return [];
  const tolerance = crystal.tolerance || POSITION_TOLERANCE;
  const { given, folded, group: found } = searchSymmetry(crystal, { tolerance });
  const perCell = (found.members.length * given.length) / folded.atoms.species.length / group.operations.length;
  if (perCell === 1) return [];
  return [
    `missed symmetry: no operation but x,y,z is listed, yet the atoms keep ${perCell} times as many within ${tolerance} A; species and rules below are those of P 1 and far too lax (sitefold symmetrise)`,
  ];
}

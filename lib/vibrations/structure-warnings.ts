import {
  type Crystal,
  cellContents,
  chooseComponents,
  countNear,
  type Formula,
  POSITION_TOLERANCE,
  searchSymmetry,
  siteSymmetry,
} from "../structure/index.ts";
import { assignWyckoff } from "../symmetry/index.ts";
import { vibratingSites } from "./vibrating-sites.ts";

/** Occupancies count as full from here; files round them. */
const FULL = 0.995;

/** Hydrogen counts as missing where the sites hold less than this share of what the formula states. */
const ENOUGH_HYDROGEN = 0.95;

/** A site counts as just off a special position where it is within this many tolerances of one. */
const NEAR_TOLERANCES = 3;

/** Nothing farther than this from a special position is just off it, whatever the tolerance; angstrom. */
const FARTHEST = 0.5;

const SHOWN = 6;

/** Larger lists without symmetry are not searched for any unasked: a search of this size takes as long as a start. */
const MOST_SEARCHED = 500;

/**
 * Where the average structure lies to a spectroscopist, as plain sentences: partial and mixed occupancy, alternatives that
 * are all counted, missing hydrogen, atoms just off a special position, symmetry that a list in P 1 leaves out.
 * @param formula the formula that the file states, if it does
 */
export function structureWarnings(crystal: Crystal, formula: Formula | null): string[] {
  return [
    ...occupancyWarnings(crystal),
    ...alternativeWarnings(crystal),
    ...hydrogenWarnings(crystal, formula),
    ...positionWarnings(crystal),
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

function hydrogenWarnings({ sites }: Crystal, formula: Formula | null): string[] {
  if (!formula) return [];
  const wanted = (formula.get("H") ?? 0) + (formula.get("D") ?? 0);
  if (wanted === 0) return [];
  const contents = cellContents(sites);
  const heavy = (f: Formula) => [...f].reduce((sum, [e, n]) => (e === "H" || e === "D" ? sum : sum + n), 0);
  const found = heavy(contents) > 0 ? ((contents.get("H") ?? 0) * heavy(formula)) / heavy(contents) : 0;
  if (found >= ENOUGH_HYDROGEN * wanted) return [];
  const least = found < 0.01 ? "no site lists hydrogen" : `the sites hold ${Number(found.toFixed(2))} of it`;
  return [
    `missing hydrogen: the formula has ${wanted} H, ${least}; all modes of O-H, N-H and C-H groups and of water are missing`,
  ];
}

/** A site that would be on a special position if the tolerance were a little wider. */
function positionWarnings(crystal: Crystal): string[] {
  const { group, metric, tolerance, identified } = crystal;
  const wide = Math.min(Math.max(NEAR_TOLERANCES * tolerance, POSITION_TOLERANCE), FARTHEST);
  if (wide <= tolerance) return [];
  const near = crystal.sites.flatMap((s) => {
    if (s.occupancy < FULL || s.sharesPositionOf !== null) return [];
    const kept = s.symmetry.operations.length;
    if (countNear(group.operations, metric, s.position, wide) <= kept) return [];
    const wider = siteSymmetry(group.operations, metric, s.position, wide);
    if (wider.operations.length <= kept) return [];
    const { siteSymmetry: symbol, letter } = assignWyckoff(identified, wider.operations);
    return [`${s.label} ${wider.shift.toFixed(3)} A from ${symbol} (${letter})`];
  });
  if (near.length === 0) return [];
  return [
    `just off a special position: ${some(near)}; on it there would be fewer modes and stricter rules; --tolerance ${Number(wide.toFixed(3))} puts it there`,
  ];
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

function some(texts: readonly string[]): string {
  const more = texts.length - SHOWN;
  return texts.slice(0, SHOWN).join(", ") + (more > 0 ? ` and ${more} more` : "");
}

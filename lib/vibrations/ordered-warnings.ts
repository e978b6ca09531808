import {
  type Crystal,
  cellContents,
  countNear,
  type Formula,
  POSITION_TOLERANCE,
  siteSymmetry,
} from "../structure/index.ts";
import { nameSite } from "../symmetry/index.ts";

/** Occupancies count as full from here; files round them. */
export const FULL = 0.995;

/** Hydrogen counts as missing where the sites hold less than this share of what the formula states. */
const ENOUGH_HYDROGEN = 0.95;

/** A site counts as just off a special position where it is within this many tolerances of one. */
const NEAR_TOLERANCES = 3;

/** Nothing farther than this from a special position is just off it, whatever the tolerance; angstrom. */
const FARTHEST = 0.5;

const SHOWN = 6;

/** Whether every place is filled by one kind of atom, and more operations are listed than translations. */
export function isOrdered({ group, sites }: Crystal): boolean {
  const isPlain = (s: Crystal["sites"][number]) =>
    s.occupancy >= FULL && s.disorderGroup === null && s.sharesPositionOf === null;
  return group.representatives.length > 1 && sites.every(isPlain);
}

/**
 * What of `structureWarnings` may hold for an ordered structure with its symmetry: missing hydrogen, and atoms just off a
 * special position. Most files are such, and need no search for alternatives or symmetry.
 */
export function orderedWarnings(crystal: Crystal, formula: Formula | null): string[] {
  return [...hydrogenWarnings(crystal, formula), ...positionWarnings(crystal)];
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
    const { siteSymmetry: symbol, letter } = nameSite(identified, wider.operations);
    return [`${s.label} ${wider.shift.toFixed(3)} A from ${symbol} (${letter})`];
  });
  if (near.length === 0) return [];
  return [
    `just off a special position: ${some(near)}; on it there would be fewer modes and stricter rules; --tolerance ${Number(wide.toFixed(3))} puts it there`,
  ];
}

/** The first few of a list. */
export function some(texts: readonly string[]): string {
  const more = texts.length - SHOWN;
  return texts.slice(0, SHOWN).join(", ") + (more > 0 ? ` and ${more} more` : "");
}

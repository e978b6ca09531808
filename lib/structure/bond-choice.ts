import { bondClasses, isHydrogen } from "./bond-class.ts";
import { BOND_TOLERANCE, type BondRule, type ContactTable, NEAR_LIMIT, radiusSum } from "./contact-table.ts";
import { RADII_SOURCE } from "./covalent-radius.ts";
import type { Crystal } from "./crystal.ts";

/** Bonds between two elements that one rule made. Counts are per cell. */
export interface BondedPair {
  readonly elements: readonly [string, string];
  readonly rule: BondRule;
  readonly count: number;
  /** angstrom */
  readonly shortest: number;
  readonly longest: number;
}

/** Contacts no longer than bonds between two elements that were not taken for bonds. Counts are per cell. */
export interface LeftOutPair {
  readonly elements: readonly [string, string];
  /** `water`: the second is the oxygen of a molecule of water; `asked`: cut by the caller; else `ions`. */
  readonly why: "water" | "asked" | "ions";
  /** Where length decides, what it would have to be below; angstrom. */
  readonly bondedBelow: number | null;
  readonly count: number;
  /** angstrom */
  readonly shortest: number;
  readonly longest: number;
}

/** A contact whose length decided, and only just; one per pair of sites and distance. */
export interface NearLimit {
  readonly labels: readonly [string, string];
  /** angstrom */
  readonly distance: number;
  readonly limit: number;
  readonly bonded: boolean;
}

/** How bonds were chosen, for printing. */
export interface BondChoice {
  readonly radii: string;
  /** Above the sum of the radii, angstrom. */
  readonly tolerance: number;
  readonly bonded: readonly BondedPair[];
  readonly leftOut: readonly LeftOutPair[];
  readonly nearLimit: readonly NearLimit[];
}

/** Sums up the verdicts of a table. */
export function summariseBonds(crystal: Crystal, table: ContactTable): BondChoice {
  const bonded = new Map<string, BondedPair>();
  const leftOut = new Map<string, LeftOutPair>();
  const near = new Map<string, NearLimit>();
  table.contacts.forEach(({ first, second, distance }, k) => {
    const elements = orderedPair(table.pair(k));
    const rule = table.rules[k] ?? null;
    if (rule) {
      const key = `${elements.join()} ${rule}`;
      const old = bonded.get(key);
      bonded.set(key, { elements, rule, ...extended(old, distance) });
    } else if (
      distance <= (radiusSum(...elements) ?? 0) + BOND_TOLERANCE &&
      isMetal(elements[0]) &&
      !isHydrogen(elements[1])
    ) {
      const why = table.cuts[k] ?? "ions";
      const bondedBelow =
        why === "ions" ? (table.limits[k] ?? bondClasses().shortBond.get(elements.join("-")) ?? null) : null;
      const key = `${elements.join()} ${why}`;
      leftOut.set(key, { elements, why, bondedBelow, ...extended(leftOut.get(key), distance) });
    }
    const limit = table.limits[k] ?? null;
    if (limit === null || Math.abs(distance - limit) > NEAR_LIMIT || rule === "asked for") return;
    const labels = [first, second].map((a) => crystal.sites[table.atoms[a]!.site]!.label).sort();
    const key = `${labels.join()} ${distance.toFixed(3)}`;
    near.set(key, { labels: labels as [string, string], distance, limit, bonded: rule !== null });
  });
  const byElements = <T extends { elements: readonly [string, string] }>(a: T, b: T) =>
    a.elements.join().localeCompare(b.elements.join());
  return {
    radii: RADII_SOURCE,
    tolerance: BOND_TOLERANCE,
    bonded: [...bonded.values()].sort(byElements),
    leftOut: [...leftOut.values()].sort(byElements),
    nearLimit: [...near.values()].sort((a, b) => a.distance - b.distance),
  };
}

function isMetal(symbol: string): boolean {
  return !bondClasses().nonMetal.has(symbol);
}

/** Metal before non-metal, then by alphabet. */
function orderedPair([a, b]: readonly [string, string]): [string, string] {
  if (isMetal(a) !== isMetal(b)) return isMetal(a) ? [a, b] : [b, a];
  return a <= b ? [a, b] : [b, a];
}

interface Range {
  readonly count: number;
  readonly shortest: number;
  readonly longest: number;
}

function extended(old: Range | undefined, distance: number): Range {
  if (!old) return { count: 1, shortest: distance, longest: distance };
  return {
    count: old.count + 1,
    shortest: Math.min(old.shortest, distance),
    longest: Math.max(old.longest, distance),
  };
}

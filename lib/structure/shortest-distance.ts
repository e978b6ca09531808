import { lengthOf } from "./cell.ts";
import { radiusSum } from "./contact-table.ts";
import type { Crystal, CrystalSite } from "./crystal.ts";
import { type Contact, contactsWithin } from "./neighbour-search.ts";

/** A pair of atoms that can be there at the same time. */
export interface NearPair {
  readonly labels: readonly [string, string];
  /** angstrom */
  readonly distance: number;
}

export interface ShortDistances {
  /** The shortest distance; null where no two atoms are ever there together. */
  readonly shortest: NearPair | null;
  /** Pairs of sites nearer than atoms come, the shortest of each pair. */
  readonly tooNear: readonly NearPair[];
}

/** Less than this share of the sum of the covalent radii: N2 has 0.77 of it, triple bonds C-C 0.79. */
const NEAREST_SHARE = 0.7;

/** Start of the search, doubled until a pair is found; angstrom. */
const FIRST_REACH = 2;

/**
 * Shortest distances between atoms that can be there together: those whose occupancies add up to more than 1. Atoms on
 * one position are one.
 */
export function shortDistances(crystal: Crystal): ShortDistances {
  const { sites, metric } = crystal;
  const places = sites.filter((s) => s.sharesPositionOf === null);
  const atoms = places.flatMap((site) => site.images.map(({ position }) => ({ site, position })));
  const filled = new Map(places.map((p) => [p, occupied(crystal, p)]));
  const points = atoms.map((a) => a.position);
  const together = (i: number, j: number) => filled.get(atoms[i]!.site)! + filled.get(atoms[j]!.site)! > 1.001;
  const farthest = 2 * lengthOf(metric, [1, 1, 1]); // an image of any atom is nearer
  let contacts: readonly Contact[] = [];
  for (let reach = FIRST_REACH; contacts.length === 0 && reach < 2 * farthest; reach *= 2) {
    contacts = contactsWithin(metric, points, reach).contacts.filter((c) => together(c.first, c.second));
  }
  const pairs = contacts.map(({ first, second, distance }) => ({
    sites: [atoms[first]!.site, atoms[second]!.site] as const,
    distance,
  }));
  pairs.sort((a, b) => a.distance - b.distance);
  const near = pairs.filter(({ sites: [a, b], distance }) => distance < NEAREST_SHARE * limit(a, b));
  const named = near.map(nearPair);
  const tooNear = named.filter((p, i) => named.findIndex((q) => q.labels.join() === p.labels.join()) === i);
  return { shortest: pairs[0] ? nearPair(pairs[0]) : null, tooNear };
}

function limit(a: CrystalSite, b: CrystalSite): number {
  return radiusSum(a.element, b.element) ?? 0;
}

function nearPair({ sites: [a, b], distance }: { sites: readonly [CrystalSite, CrystalSite]; distance: number }) {
  const labels = a.label <= b.label ? ([a.label, b.label] as const) : ([b.label, a.label] as const);
  return { labels, distance };
}

function occupied({ sites }: Crystal, place: CrystalSite): number {
  const index = sites.indexOf(place);
  return sites.reduce((sum, s, i) => sum + (i === index || s.sharesPositionOf === index ? s.occupancy : 0), 0);
}

import { type Crystal, type CrystalSite, cellAtoms, contactsWithin, radiusSum } from "../structure/index.ts";

/** Contacts are looked for up to the sum of the covalent radii and this; angstrom. */
export const NEAR_REACH = 0.6;
/** For atoms without a radius; angstrom. */
const UNKNOWN_SUM = 2;

/** A contact seen from one site. */
export interface NearAtom {
  /** Index of the other site. */
  readonly site: number;
  /** angstrom */
  readonly distance: number;
  /** Distance over the sum of the covalent radii. */
  readonly share: number;
}

const known = new WeakMap<Crystal, readonly (readonly NearAtom[])[]>();

/** Contacts of every site in the order of the crystal's sites, one entry for each neighbouring atom, nearest first. */
export function nearAtoms(crystal: Crystal): readonly (readonly NearAtom[])[] {
  const old = known.get(crystal);
  if (old) return old;
  const fresh = search(crystal);
  known.set(crystal, fresh);
  return fresh;
}

function search(crystal: Crystal): NearAtom[][] {
  const { sites, metric } = crystal;
  const atoms = cellAtoms(crystal);
  const elements = [...new Set(sites.map((s) => s.element))];
  const kind = sites.map((s) => elements.indexOf(s.element));
  const sums = elements.map((a) => elements.map((b) => radiusSum(a, b) ?? UNKNOWN_SUM));
  const sum = (i: number, j: number) => sums[kind[atoms[i]!.site]!]![kind[atoms[j]!.site]!]!;
  const reach = Math.max(0, ...sums.flat()) + NEAR_REACH;
  const { contacts } = contactsWithin(
    metric,
    atoms.map((a) => a.position),
    reach,
    (i, j) => sum(i, j) + NEAR_REACH,
  );
  const near: NearAtom[][] = sites.map(() => []);
  // the first image of a site stands for all
  for (const { first, second, distance } of contacts) {
    const [a, b] = [atoms[first]!, atoms[second]!];
    const share = distance / sum(first, second);
    if (a.image === 0) near[a.site]!.push({ site: b.site, distance, share });
    if (b.image === 0) near[b.site]!.push({ site: a.site, distance, share });
  }
  for (const list of near) list.sort((p, q) => p.distance - q.distance);
  return near;
}

/** Occupancies add up to 1 at most, within rounding, where two sites are alternatives. */
const ALTERNATIVE_SLACK = 0.02;

/**
 * Whether two sites may be occupied at the same time near each other: not alternatives of a disorder, by their groups or
 * by occupancies that add up to no more than 1.
 */
export function mayMeet(a: CrystalSite, b: CrystalSite): boolean {
  const grouped = a.disorderGroup !== null && b.disorderGroup !== null;
  const negative = a.disorderGroup?.startsWith("-") || b.disorderGroup?.startsWith("-");
  if (grouped && a.assembly === b.assembly && a.disorderGroup !== b.disorderGroup) return false;
  if (negative) return false; // disordered about a symmetry element: images of its own atoms are alternatives
  return a.occupancy + b.occupancy > 1 + ALTERNATIVE_SLACK;
}

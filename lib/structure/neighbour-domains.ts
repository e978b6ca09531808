import type { Vec3 } from "./cell.ts";
import { latticeKey, type NeighbourAtoms } from "./neighbour-atoms.ts";
import type { NeighbourLists } from "./neighbour-choice.ts";
import type { NearAtom } from "./neighbour-search.ts";
import { atomDomain } from "./solid-angles.ts";

/** Solid angles of the domain of an atom. */
export interface SiteDomain {
  /** Shares of the sphere by the key of the neighbour. */
  readonly shares: ReadonlyMap<string, number>;
  readonly total: number;
  readonly largest: number;
}

/** Domains of sites, and all atoms near each, in order of distance. */
export interface SiteDomains {
  readonly domains: ReadonlyMap<number, SiteDomain>;
  readonly near: (site: number) => readonly NearAtom[];
}

/** Neighbours are looked for within the first of these; where they do not close the domain, within the next; angstrom. */
const REACHES = [6, 9] as const;

/** Domains of atoms; those that reach farther than half the last reach, into a void, are left out. */
export function atomDomains(source: NeighbourAtoms, lists: NeighbourLists, centres: readonly number[]): SiteDomains {
  const domains = new Map<number, SiteDomain>();
  const near = lists.around(REACHES[0], undefined, centres);
  let open = centres;
  for (const reach of REACHES) {
    const around = reach === REACHES[0] ? near : lists.around(reach, undefined, open);
    open = open.filter((site) => {
      const domain = closedDomain(source, site, around(site), reach);
      if (domain) domains.set(site, domain);
      return domain === null;
    });
  }
  return { domains, near };
}

function closedDomain(
  source: NeighbourAtoms,
  site: number,
  near: readonly NearAtom[],
  reach: number,
): SiteDomain | null {
  const centre = source.cartesian(source.listed(site));
  const places = near.map((n) => source.cartesian(n).map((e, i) => e - centre[i]!) as unknown as Vec3);
  const { shares, radius } = atomDomain(places);
  if (2 * radius > reach) return null;
  const faces = near.flatMap((n, i) => (shares[i]! > LEAST_SHARE ? [[latticeKey(n), shares[i]!] as const] : []));
  const sizes = faces.map(([, share]) => share);
  const total = sizes.reduce((s, x) => s + x, 0);
  return { shares: new Map(faces), total, largest: sizes.reduce((m, x) => Math.max(m, x), 0) };
}

/** Smaller faces are edges or corners, blurred by rounding. */
const LEAST_SHARE = 1e-9;

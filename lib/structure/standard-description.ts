import { apply3, type Vec3 } from "./cell.ts";
import type { Crystal } from "./crystal.ts";
import { wrap } from "./orbit.ts";
import { type Candidate, type Candidates, standardCandidates } from "./standard-candidates.ts";

/** A site in a description. */
export interface DescribedSite {
  /** Index of the site in the crystal. */
  readonly site: number;
  /** Index among its images of the one that stands for it. */
  readonly image: number;
  readonly letter: string;
  /** Fractional, in [0, 1). */
  readonly position: Vec3;
}

/** One way to describe a crystal in its reference setting. */
export interface Description {
  readonly candidate: Candidate;
  /** Shift of the old origin along free directions, fractional in the cell before. */
  readonly shift: Vec3;
  /** The standardisation parameter, dimensionless. */
  readonly gamma: number;
  /** Distance of the mean of the positions from the origin, in fractions of the axes. */
  readonly centre: number;
  /** In standard order. */
  readonly sites: readonly DescribedSite[];
}

export interface StandardDescription extends Description {
  readonly candidates: Candidates;
  /** Descriptions whose parameter is as small. */
  readonly tied: number;
  /** For each site of the crystal whether it counts: not where an earlier one is at the same position. */
  readonly counted: readonly boolean[];
}

/** Parameters and coordinates that differ by less are equal: rounding of doubles; dimensionless. */
const TIE = 1e-7;

/**
 * The standard description of a crystal in its reference setting: of all that the standard cell allows the one with the
 * smallest parameter gamma, the sum over all sites of the length sqrt(x^2 + y^2 + z^2) of the position that stands for
 * the site. Atoms that share a position count once.
 *
 * The position that stands for a site has coordinates from 0 to below 1, has the form of the first triplet that
 * International Tables list for its Wyckoff position, and of those the smallest length, then x, then y, then z. Where the
 * origin is free along an axis, every atom in turn is put at 0 there (in all free directions at once). Of descriptions
 * with the same gamma the one whose mean position is nearest to the origin, then with the smallest sum of x, of y, of z,
 * is chosen, then that whose sites, one after another, have the smaller coordinates, then the elements first in the
 * alphabet. Sites stand in the order of Wyckoff letters from the last to the first, then x, y, z.
 *
 * Source: E. Parthe and L. M. Gelato, Acta Cryst. A40 (1984) 169, and L. M. Gelato and E. Parthe, J. Appl. Cryst. 20
 * (1987) 139, from memory: gamma, range and choice of positions, first triplet, atoms at 0 in polar groups, order of
 * letters. Ours where the papers are not remembered to the letter: the tie-breaks after gamma, one atom at 0 in all free
 * directions, shared positions counted once, and the order of axes of orthorhombic groups (see `standardAxes`).
 */
export function standardDescription(crystal: Crystal): StandardDescription {
  const candidates = standardCandidates(crystal);
  const counted = countedSites(crystal);
  let best = Number.POSITIVE_INFINITY;
  let tied: { readonly candidate: Candidate; readonly shift: Vec3 }[] = [];
  for (const candidate of candidates.list) {
    for (const shift of candidates.origins) {
      const gamma = gammaOf(candidate, apply3(candidate.back, shift), counted, best + TIE);
      if (gamma > best + TIE) continue;
      if (gamma < best - TIE) tied = [];
      best = Math.min(best, gamma);
      tied.push({ candidate, shift });
    }
  }
  const described = tied.map(({ candidate, shift }) => describe(crystal, candidate, shift, counted));
  const first = described.reduce((a, b) => (compare(crystal, b, a) < 0 ? b : a));
  return { ...first, candidates, tied: tied.length, counted };
}

/** Atoms that share a position lie nearer than this; angstrom. */
const SHARED = 0.01;

function countedSites({ sites, metric }: Crystal): boolean[] {
  return sites.map(({ sharesPositionOf, symmetry }) => {
    if (sharesPositionOf === null) return true;
    return !sites[sharesPositionOf]!.images.some(({ position }) => {
      const d = position.map((e, i) => e - symmetry.point[i]! - Math.round(e - symmetry.point[i]!));
      return Math.hypot(...apply3(metric.toCartesian, d as unknown as Vec3)) < SHARED;
    });
  });
}

/** The parameter, or a number above the limit. */
function gammaOf({ sites }: Candidate, shift: Vec3, counted: readonly boolean[], limit: number): number {
  let sum = 0;
  for (let s = 0; s < sites.length && sum <= limit; s++) {
    if (!counted[s]) continue;
    const { points } = sites[s]!;
    let least = Number.POSITIVE_INFINITY;
    for (let k = 0; k < points.length; k += 3) {
      const x = wrap(points[k]! - shift[0]);
      const y = wrap(points[k + 1]! - shift[1]);
      const z = wrap(points[k + 2]! - shift[2]);
      least = Math.min(least, x * x + y * y + z * z);
    }
    sum += Math.sqrt(least);
  }
  return sum;
}

function describe(crystal: Crystal, candidate: Candidate, shift: Vec3, counted: readonly boolean[]): Description {
  const moved = apply3(candidate.back, shift);
  const sites = candidate.sites.map(({ letter, images, points }, site): DescribedSite => {
    const places = images.map((image, k) => {
      const position = [0, 1, 2].map((i) => wrap(points[3 * k + i]! - moved[i]!)) as unknown as Vec3;
      return { image, position };
    });
    const { image, position } = places.reduce((a, b) => (comparePlaces(b.position, a.position) < 0 ? b : a));
    return { site, image, letter, position };
  });
  const shown = sites.filter(({ site }) => counted[site]);
  const centre = Math.hypot(...[0, 1, 2].map((i) => sumOf(shown, i) / shown.length));
  const gamma = shown.reduce((s, { position }) => s + Math.hypot(...position), 0);
  return { candidate, shift, gamma, centre, sites: sites.sort((a, b) => compareSites(crystal, a, b)) };
}

function sumOf(sites: readonly DescribedSite[], i: number): number {
  return sites.reduce((s, { position }) => s + position[i]!, 0);
}

/** The shorter first, then the smaller x, y, z. */
function comparePlaces(a: Vec3, b: Vec3): number {
  return difference(Math.hypot(...a), Math.hypot(...b)) || comparePositions(a, b);
}

function comparePositions(a: Vec3, b: Vec3): number {
  return difference(a[0], b[0]) || difference(a[1], b[1]) || difference(a[2], b[2]);
}

function difference(x: number, y: number): number {
  return Math.abs(x - y) <= TIE ? 0 : x - y;
}

function compareSites({ sites }: Crystal, a: DescribedSite, b: DescribedSite): number {
  const [p, q] = [sites[a.site]!, sites[b.site]!];
  return (
    letterRank(b.letter) - letterRank(a.letter) ||
    comparePositions(a.position, b.position) ||
    compareTexts(p.element ?? p.typeSymbol ?? p.label, q.element ?? q.typeSymbol ?? q.label) ||
    q.occupancy - p.occupancy
  );
}

/** Place in the alphabet; the letter after z is written A. */
function letterRank(letter: string): number {
  return letter === "A" ? 26 : letter.charCodeAt(0) - 97;
}

function compareTexts(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

function compare(crystal: Crystal, a: Description, b: Description): number {
  const first = difference(a.centre, b.centre);
  if (first) return first;
  for (let i = 0; i < 3; i++) {
    const sum = difference(sumOf(a.sites, i), sumOf(b.sites, i));
    if (sum) return sum;
  }
  for (let k = 0; k < a.sites.length; k++) {
    const order = compareSites(crystal, a.sites[k]!, b.sites[k]!);
    if (order) return order;
  }
  return 0;
}

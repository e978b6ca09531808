import {
  type AxisFrame,
  decompose,
  induce,
  type PointGroup,
  pointGroup,
  vectorCharacter,
} from "../representation/index.ts";
import type { Crystal, CrystalSite } from "../structure/index.ts";
import { rotationParts } from "../symmetry/index.ts";
import { type Activity, activities } from "./activity.ts";
import { countedCharacters } from "./counted-characters.ts";
import { type VibratingSite, vibratingSites } from "./vibrating-sites.ts";

/** Numbers of modes at k = 0 of one species of the factor group. A degenerate species counts once per set. */
export interface ModeSpecies extends Activity {
  readonly label: string;
  readonly dimension: number;
  readonly total: number;
  readonly acoustic: number;
  readonly optic: number;
  /** Neither infrared nor Raman active. */
  readonly silent: boolean;
}

/** What one site contributes. */
export interface SiteModes {
  readonly label: string;
  readonly site: CrystalSite;
  readonly group: PointGroup;
  /** Atoms of the site in the primitive cell. */
  readonly count: number;
  /** Species of the vector in the site group, by number, in the order of the site group's irreps. */
  readonly siteSpecies: readonly number[];
  /** Number of each species of the factor group, in its order. */
  readonly contributions: readonly number[];
}

/** Bands and modes with optic numbers other than 0; a degenerate species is one band and `dimension` modes. */
export interface ModeTotals {
  readonly infraredBands: number;
  readonly ramanBands: number;
  readonly coincident: number;
  readonly silent: number;
  /** Silent bands of species that hyper-Raman scattering shows (totally symmetric tensor). */
  readonly silentHyperRaman: number;
  readonly opticModes: number;
  /** No species is both infrared and Raman active, as in every group with an inversion. */
  readonly mutualExclusion: boolean;
}

export interface FactorGroupModes {
  readonly group: PointGroup;
  readonly atomsInPrimitiveCell: number;
  readonly species: readonly ModeSpecies[];
  readonly sites: readonly SiteModes[];
  readonly totals: ModeTotals;
  /** Characters of all displacements, one per element of the group. */
  readonly characters: readonly number[];
}

/**
 * Species of all modes at k = 0: at each site the displacement vector is reduced in the site group and induced to the
 * factor group (correlation method), and the sum over sites is compared with a direct count of characters.
 * @param frame directions of the conventional axes that the labels refer to; default the axes of the cell
 * @throws RangeError if the two ways disagree, which would be a defect of this program
 * Source: R. S. Halford, J. Chem. Phys. 14 (1946) 8; W. G. Fateley, N. T. McDevitt and F. F. Bentley,
 * Appl. Spectrosc. 25 (1971) 155 (correlation method).
 */
export function factorGroupModes(crystal: Crystal, frame?: AxisFrame): FactorGroupModes {
  const group = pointGroup(rotationParts(crystal.group), frame);
  const vibrating = vibratingSites(crystal);
  const correlate = correlator(group, frame);
  const sites = vibrating.map((v) => correlate(v));
  const total = group.irreps.map((_, i) => sites.reduce((s, site) => s + site.contributions[i]!, 0));
  const characters = countedCharacters(crystal, vibrating);
  compareWays(group, total, characters);
  const acoustic = decompose(group, group.elements.map(vectorCharacter));
  const activity = activities(group);
  const species = group.irreps.map((irrep, i) => {
    const act = activity[i]!;
    const silent = !act.infrared && !act.raman;
    const numbers = { total: total[i]!, acoustic: acoustic[i]!, optic: total[i]! - acoustic[i]! };
    return { label: irrep.label, dimension: irrep.dimension, ...numbers, ...act, silent };
  });
  const atomsInPrimitiveCell = sites.reduce((s, site) => s + site.count, 0);
  return { group, atomsInPrimitiveCell, species, sites, totals: totalsOf(species), characters };
}

/** Correlates sites; site groups that consist of the same matrices are worked out once. */
function correlator(group: PointGroup, frame: AxisFrame | undefined): (v: VibratingSite) => SiteModes {
  const known = new Map<string, { siteGroup: PointGroup; siteSpecies: number[]; perSite: number[] }>();
  return ({ label, site, count }) => {
    const rotations = site.symmetry.operations.map((a) => a.W);
    const key = rotations.map((W) => W.join()).join(";");
    let found = known.get(key);
    if (!found) {
      const siteGroup = pointGroup(rotations, frame);
      const siteSpecies = decompose(siteGroup, siteGroup.elements.map(vectorCharacter));
      const induced = induce(siteGroup, group);
      const perSite = group.irreps.map((_, i) => siteSpecies.reduce((s, n, j) => s + n * induced[j]![i]!, 0));
      found = { siteGroup, siteSpecies, perSite };
      known.set(key, found);
    }
    return { label, site, count, group: found.siteGroup, siteSpecies: found.siteSpecies, contributions: found.perSite };
  };
}

function compareWays(group: PointGroup, total: readonly number[], characters: readonly number[]): void {
  const direct = decompose(group, characters);
  if (direct.every((n, i) => n === total[i])) return;
  const show = (numbers: readonly number[]) => group.irreps.map((r, i) => `${numbers[i]} ${r.label}`).join(" ");
  throw new RangeError(`site correlation gives ${show(total)}, the direct count ${show(direct)}`);
}

function totalsOf(species: readonly ModeSpecies[]): ModeTotals {
  const bands = (pick: (s: ModeSpecies) => boolean) => species.reduce((n, s) => n + (pick(s) ? s.optic : 0), 0);
  return {
    infraredBands: bands((s) => s.infrared),
    ramanBands: bands((s) => s.raman),
    coincident: bands((s) => s.infrared && s.raman),
    silent: bands((s) => s.silent),
    silentHyperRaman: bands((s) => s.silent && s.hyperRaman),
    opticModes: species.reduce((n, s) => n + s.optic * s.dimension, 0),
    mutualExclusion: !species.some((s) => s.infrared && s.raman),
  };
}

import { inverseRatMat, type RatMat3 } from "../algebra/index.ts";
import { nameSite } from "../symmetry/index.ts";
import { type AtomSet, floatMatrix } from "./atom-set.ts";
import { apply3, lengthOf, type Vec3 } from "./cell.ts";
import type { CellAtom } from "./cell-atoms.ts";
import { cellAtoms } from "./cell-atoms.ts";
import { kindOf } from "./compared-atoms.ts";
import type { Crystal, CrystalSite } from "./crystal.ts";
import { NearestAtom } from "./nearest-atom.ts";

/** A site of a structure in a comparison. */
export interface ComparedSite {
  /** Labels of all its rows where sites of one element share a position: `Fe1+Fe2`. */
  readonly label: string;
  readonly element: string | null;
  readonly occupancy: number;
  readonly wyckoff: string;
  readonly multiplicity: number;
}

/** Two sites whose atoms lie on each other. */
export interface SitePair {
  readonly first: ComparedSite;
  readonly second: ComparedSite;
  /** Atoms in the cell of the first structure that are paired so. */
  readonly atoms: number;
  /** Largest distance between partners, angstrom. */
  readonly largest: number;
}

/** Sites that have no partner in the other structure, or not for all of their atoms. */
export interface SiteAlone {
  readonly site: ComparedSite;
  /** Atoms in its cell without a partner. */
  readonly atoms: number;
}

export interface PairedSites {
  readonly pairs: readonly SitePair[];
  readonly alone: { readonly first: readonly SiteAlone[]; readonly second: readonly SiteAlone[] };
  /** Over all partners, angstrom. */
  readonly largest: number;
  readonly rootMeanSquare: number;
  /** Atoms in the cell of the first structure that have a partner. */
  readonly atoms: number;
}

/** A change of axes and origin between two structures: x(first) = P x(second) + p. */
export interface Carrying {
  readonly P: RatMat3;
  readonly p: Vec3;
}

/**
 * Partners of all atoms of both cells, each the nearest of its kind within reach.
 * @param reach angstrom
 * @param rename what kinds of the second structure are called in the first
 */
export function pairedSites(
  first: Crystal,
  second: Crystal,
  { P, p }: Carrying,
  reach: number,
  rename: (kind: string) => string,
): PairedSites {
  const back = floatMatrix(inverseRatMat(P));
  const forth = floatMatrix(P);
  const names = [first, second].map((c) => c.sites.map((s) => comparedSite(c, s))) as [ComparedSite[], ComparedSite[]];
  const kinds = {
    first: (site: number) => kindOf(first.sites[site]!),
    second: (site: number) => rename(kindOf(second.sites[site]!)),
  };
  const pairs = new Map<string, { i: number; j: number; atoms: number; largest: number }>();
  const note = (i: number, j: number, distance: number, counts: number) => {
    const known = pairs.get(`${i} ${j}`) ?? { i, j, atoms: 0, largest: 0 };
    pairs.set(`${i} ${j}`, { i, j, atoms: known.atoms + counts, largest: Math.max(known.largest, distance) });
  };
  let squares = 0;
  let atoms = 0;
  const onto = new Partners(second, kinds.second, reach);
  const aloneFirst = walk(first, (atom) => {
    const at = apply3(back, [atom.position[0] - p[0], atom.position[1] - p[1], atom.position[2] - p[2]]);
    const found = onto.find(at, kinds.first(atom.site));
    if (!found) return false;
    const distance = lengthOf(first.metric, apply3(forth, found.apart));
    note(atom.site, found.site, distance, 1);
    squares += distance ** 2;
    atoms++;
    return true;
  });
  const from = new Partners(first, kinds.first, reach);
  const aloneSecond = walk(second, (atom) => {
    const at = apply3(forth, atom.position).map((e, i) => e + p[i]!) as unknown as Vec3;
    const found = from.find(at, kinds.second(atom.site));
    if (found) note(found.site, atom.site, lengthOf(first.metric, found.apart), 0);
    return found !== null;
  });
  const list = [...pairs.values()].sort((x, y) => x.i - y.i || x.j - y.j);
  return {
    pairs: list.map(({ i, j, ...rest }) => ({ first: names[0][i]!, second: names[1][j]!, ...rest })),
    alone: { first: aloneOf(aloneFirst, names[0]), second: aloneOf(aloneSecond, names[1]) },
    largest: list.reduce((m, x) => Math.max(m, x.largest), 0),
    rootMeanSquare: atoms === 0 ? 0 : Math.sqrt(squares / atoms),
    atoms,
  };
}

function comparedSite({ identified }: Crystal, site: CrystalSite): ComparedSite {
  const { label, element, occupancy, images, symmetry } = site;
  const { letter } = nameSite(identified, symmetry.operations);
  return { label, element, occupancy, wyckoff: letter, multiplicity: images.length };
}

/** Number of atoms of each site for which the visitor finds nothing. */
function walk(crystal: Crystal, hasPartner: (atom: CellAtom) => boolean): Map<number, number> {
  const alone = new Map<number, number>();
  for (const atom of cellAtoms(crystal)) {
    if (!hasPartner(atom)) alone.set(atom.site, (alone.get(atom.site) ?? 0) + 1);
  }
  return alone;
}

function aloneOf(counts: ReadonlyMap<number, number>, names: readonly ComparedSite[]): SiteAlone[] {
  return [...counts].map(([site, atoms]) => ({ site: names[site]!, atoms }));
}

/** The atoms of a cell, looked up by place and kind. */
class Partners {
  private readonly atoms: readonly CellAtom[];
  private readonly set: AtomSet;
  private readonly species: ReadonlyMap<string, number>;
  private readonly nearest: NearestAtom;

  constructor(crystal: Crystal, kind: (site: number) => string, reach: number) {
    this.atoms = cellAtoms(crystal);
    const names = [...new Set(crystal.sites.map((_, i) => kind(i)))];
    this.species = new Map(names.map((name, i) => [name, i]));
    const x = new Float64Array(3 * this.atoms.length);
    this.atoms.forEach((a, k) => {
      x.set(a.position, 3 * k);
    });
    const species = Int32Array.from(this.atoms, (a) => this.species.get(kind(a.site))!);
    this.set = { axes: crystal.metric.toCartesian, x, species };
    this.nearest = new NearestAtom(this.set, reach);
  }

  /** The site of the nearest atom of a kind, and the vector from it to the point, fractional. */
  find(at: Vec3, kind: string): { readonly site: number; readonly apart: Vec3 } | null {
    const species = this.species.get(kind);
    if (species === undefined) return null;
    const k = this.nearest.find(at[0], at[1], at[2], species);
    if (k < 0) return null;
    const { site, position } = this.atoms[k]!;
    const cells = this.nearest.shift;
    return { site, apart: [0, 1, 2].map((i) => at[i]! - position[i]! - cells[i]!) as unknown as Vec3 };
  }
}

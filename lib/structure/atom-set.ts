import { type IntMat3, inverseRatMat, type RatMat3, ratMat3 } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import type { AtomSite } from "./atom-site.ts";
import { apply3, type Mat3, type Metric, type Vec3 } from "./cell.ts";
import { cellAtoms } from "./cell-atoms.ts";
import type { Crystal } from "./crystal.ts";
import { axesOf, type LatticeAxes } from "./lattice-axes.ts";
import { niggliReduction } from "./niggli-reduction.ts";

/** Atoms of a cell as bare points with a species: the rarest species first, so that atom 0 has the fewest equals. */
export interface AtomSet {
  /** A Niggli cell. */
  readonly axes: LatticeAxes;
  /** Fractional in these axes, in [0, 1), three for each atom. */
  readonly x: Float64Array;
  /** Number of the species of each atom, ascending. */
  readonly species: Int32Array;
}

/** Atoms of a lattice with fewer atoms to its cell than were given. */
export interface FoldedAtoms {
  readonly atoms: AtomSet;
  /** The axes of the set in terms of the cell given: columns. */
  readonly basis: RatMat3;
  /** For each atom given: the atom of the set that it is an image of. */
  readonly owner: Int32Array;
  /** Cartesian, angstrom, three for each atom given: where it lies, seen from that image. */
  readonly offset: Float64Array;
}

/** An atom of the cell given, with the site it comes from. */
export interface GivenAtom {
  readonly site: number;
  readonly position: Vec3;
}

/**
 * All atoms of the cell of a crystal, as the declared operations make them, on the Niggli axes of that cell; centrings
 * are not made use of.
 * @throws InputProblem `atoms-missing`
 */
export function wholeCell(crystal: Crystal): { readonly given: readonly GivenAtom[]; readonly folded: FoldedAtoms } {
  const given = cellAtoms(crystal);
  if (given.length === 0) {
    throw new InputProblem("atoms-missing", "there are no atoms to compare", null, "list atoms with coordinates");
  }
  const basis = ratMat3(niggliReduction(crystal.metric.toCartesian));
  const species = speciesByRarity(given.map((atom) => speciesName(crystal.sites[atom.site]!)));
  const order = given.map((_, i) => i).sort((i, j) => species[i]! - species[j]! || i - j);
  const owner = new Int32Array(given.length);
  for (let k = 0; k < order.length; k++) owner[order[k]!] = k;
  const points = order.map((i) => given[i]!.position);
  const atoms = atomSet(
    crystal.metric,
    basis,
    points,
    Int32Array.from(order, (i) => species[i]!),
  );
  return { given, folded: { atoms, basis, owner, offset: new Float64Array(3 * given.length) } };
}

/** Atoms are alike by element, charge apart, and occupancy; labels do not count. */
export function speciesName(site: AtomSite): string {
  return `${site.element ?? site.typeSymbol ?? site.label} ${site.occupancy.toFixed(3)}`;
}

function speciesByRarity(names: readonly string[]): number[] {
  const counts = new Map<string, number>();
  for (const name of names) counts.set(name, (counts.get(name) ?? 0) + 1);
  const ranked = [...counts].sort((a, b) => a[1] - b[1]).map(([name]) => name);
  const rank = new Map(ranked.map((name, i) => [name, i]));
  return names.map((name) => rank.get(name)!);
}

/** @param points fractional in the cell of the metric */
export function atomSet(metric: Metric, basis: RatMat3, points: readonly Vec3[], species: Int32Array): AtomSet {
  const back = floatMatrix(inverseRatMat(basis));
  const x = new Float64Array(3 * points.length);
  points.forEach((p, k) => {
    placeWrapped(x, k, apply3(back, p));
  });
  return { axes: axesOf(metric, basis), x, species };
}

/** Writes a point as atom k, wrapped into the cell. */
export function placeWrapped(x: Float64Array, k: number, p: Vec3): void {
  for (let i = 0; i < 3; i++) {
    const r = p[i]! - Math.floor(p[i]!);
    x[3 * k + i] = r < 1 ? r : 0; // a tiny negative number is wrapped to 1 by rounding
  }
}

export function pointOf(atoms: AtomSet, k: number): [number, number, number] {
  return [atoms.x[3 * k]!, atoms.x[3 * k + 1]!, atoms.x[3 * k + 2]!];
}

export function floatMatrix({ n, d }: { readonly n: IntMat3; readonly d: number }): Mat3 {
  return n.map((e) => e / d) as unknown as Mat3;
}

/** Number of atoms of the rarest species: atoms 0 to this one, exclusive. */
export function rarestCount(atoms: AtomSet): number {
  let k = 0;
  while (k < atoms.species.length && atoms.species[k] === 0) k++;
  return k;
}

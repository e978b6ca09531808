import type { IntVec3 } from "../algebra/index.ts";
import type { Operation } from "../symmetry/index.ts";
import type { Component } from "./bond-graph.ts";
import type { Bond } from "./bonds.ts";
import { apply3, inverse3, type Mat3, type Metric, multiply3, type Vec3 } from "./cell.ts";
import type { AtomAction, CellAtom, LatticeAtom } from "./cell-atoms.ts";
import type { Crystal } from "./crystal.ts";
import { element } from "./elements.ts";
import { type AtomGroup, hillFormula, unitFormula } from "./unit-formula.ts";

/** An atom of a molecule or ion, gathered across cell edges. */
export interface UnitAtom {
  /** Index of the site in the crystal. */
  readonly site: number;
  readonly label: string;
  readonly element: string;
  readonly occupancy: number;
  /** Index among the images of the site. */
  readonly image: number;
  /** Whole cells between that image and this atom. */
  readonly shift: IntVec3;
  readonly fractional: Vec3;
  /** angstrom, in the Cartesian frame of the cell (`Metric.toCartesian`). */
  readonly cartesian: Vec3;
}

/** The operations of the space group that carry a unit onto itself. */
export interface UnitSite {
  /** Exact, translations not reduced, the identity first. */
  readonly operations: readonly Operation[];
  /** Rotation part of each operation in the Cartesian frame of the cell; orthogonal. */
  readonly matrices: readonly Mat3[];
  /** Per operation: atom k of the unit is carried onto atom permutations[.][k]. */
  readonly permutations: readonly (readonly number[])[];
}

/** A kind of molecule or ion: one representative, and how many there are by symmetry. */
export interface MolecularUnit {
  /** As chemists write it: `CO3`, `NH4`, `Mg(H2O)6`; atoms that occupancy forbids at the same time are not counted. */
  readonly formula: string;
  readonly hill: string;
  /** Labels of the sites that take part, in the order of the file. */
  readonly labels: readonly string[];
  readonly atoms: readonly UnitAtom[];
  /** Pairs of indices into `atoms`. */
  readonly bonds: readonly (readonly [number, number])[];
  /** Equivalent units in the primitive cell. */
  readonly count: number;
  readonly site: UnitSite;
  /** Mean of the atoms, fractional and angstrom. */
  readonly centroid: { readonly fractional: Vec3; readonly cartesian: Vec3 };
  /** Of the elements' mean masses; atoms of unknown mass count as 0. */
  readonly centreOfMass: { readonly fractional: Vec3; readonly cartesian: Vec3 };
}

/** What units are described from. */
export interface UnitSource {
  readonly crystal: Crystal;
  /** Invariant under the space group. */
  readonly metric: Metric;
  readonly atoms: readonly CellAtom[];
  readonly components: readonly Component[];
  /** The bonds within each component. */
  readonly bonds: readonly (readonly Bond[])[];
}

/** Components of a graph sorted into orbits of the space group, by the first of each; exact. */
export interface ComponentOrbit {
  /** Index of the component of the lowest atom. */
  readonly first: number;
  readonly members: readonly number[];
  /** Operations of the group, reduced, that keep `first` modulo the lattice. */
  readonly keeping: readonly Operation[];
}

export function componentOrbits(source: UnitSource, action: AtomAction): ComponentOrbit[] {
  const { crystal, components, atoms } = source;
  const owner = new Int32Array(atoms.length);
  components.forEach((c, k) => {
    for (const m of c.members) owner[m.atom] = k;
  });
  const seen = new Set<number>();
  const orbits: ComponentOrbit[] = [];
  components.forEach((component, first) => {
    if (seen.has(first)) return;
    const members = new Set<number>();
    const keeping: Operation[] = [];
    for (const g of crystal.group.operations) {
      const image = owner[action.image(g, component.members[0]!).atom]!;
      members.add(image);
      if (image === first) keeping.push(g);
    }
    for (const m of members) seen.add(m);
    orbits.push({ first, members: [...members], keeping });
  });
  return orbits;
}

/** The representative unit of an orbit of finite components. */
export function describeUnit(source: UnitSource, action: AtomAction, orbit: ComponentOrbit): MolecularUnit {
  const { crystal, atoms, bonds, metric } = source;
  const members = [...source.components[orbit.first]!.members].sort((a, b) => a.atom - b.atom);
  const at = new Map(members.map((m, i) => [m.atom, i]));
  const unitAtoms = members.map((m) => unitAtom(source, m));
  const within = bonds[orbit.first]!.map((b) => [at.get(b.first)!, at.get(b.second)!] as const);
  const elements = unitAtoms.map((a) => a.element);
  const masses = elements.map((e) => element(e)?.mass ?? 0);
  const centre = (weights: readonly number[]) => {
    const fractional = weightedMean(unitAtoms, weights);
    return { fractional, cartesian: apply3(metric.toCartesian, fractional) };
  };
  const equal = elements.map(() => 1);
  const present = occupied(unitAtoms, within);
  return {
    formula: unitFormula(present),
    hill: hillFormula(present.elements),
    labels: [...new Set(members.map((m) => atoms[m.atom]!.site))].map((s) => crystal.sites[s]!.label),
    atoms: unitAtoms,
    bonds: within,
    count: orbit.members.length / crystal.group.centrings.length,
    site: unitSite(metric, action, orbit, members, at),
    centroid: centre(equal),
    centreOfMass: centre(masses.some((m) => m > 0) ? masses : equal),
  };
}

/** What is there at a time: of the atoms of a partly occupied site as many as its occupancy allows. */
function occupied(atoms: readonly UnitAtom[], bonds: readonly (readonly [number, number])[]): AtomGroup {
  const bySite = new Map<number, number[]>();
  atoms.forEach((a, i) => {
    bySite.set(a.site, [...(bySite.get(a.site) ?? []), i]);
  });
  const kept = new Map<number, number>();
  for (const list of bySite.values()) {
    const number = Math.max(1, Math.round(list.length * atoms[list[0]!]!.occupancy));
    for (const i of list.slice(0, number)) kept.set(i, kept.size);
  }
  const pairs = bonds.filter(([a, b]) => kept.has(a) && kept.has(b));
  return {
    elements: [...kept.keys()].map((i) => atoms[i]!.element),
    bonds: pairs.map(([a, b]) => [kept.get(a)!, kept.get(b)!]),
  };
}

function unitAtom({ crystal, metric, atoms }: UnitSource, member: LatticeAtom): UnitAtom {
  const atom = atoms[member.atom]!;
  const site = crystal.sites[atom.site]!;
  const fractional = [0, 1, 2].map((i) => atom.position[i]! + member.shift[i]!) as unknown as Vec3;
  return {
    site: atom.site,
    label: site.label,
    element: site.element ?? "?",
    occupancy: site.occupancy,
    image: atom.image,
    shift: member.shift,
    fractional,
    cartesian: apply3(metric.toCartesian, fractional),
  };
}

function weightedMean(atoms: readonly UnitAtom[], weights: readonly number[]): Vec3 {
  const total = weights.reduce((s, w) => s + w, 0);
  const mean = (i: number) => atoms.reduce((s, a, k) => s + weights[k]! * a.fractional[i]!, 0) / total;
  return [mean(0), mean(1), mean(2)];
}

/** The operations that keep the component modulo the lattice, each moved by the whole cells that bring it back. */
function unitSite(
  metric: Metric,
  action: AtomAction,
  orbit: ComponentOrbit,
  members: readonly LatticeAtom[],
  at: ReadonlyMap<number, number>,
): UnitSite {
  const operations: Operation[] = [];
  const permutations: number[][] = [];
  for (const g of orbit.keeping) {
    const images = members.map((m) => action.image(g, m));
    const permutation = images.map((image) => at.get(image.atom) ?? -1);
    const home = members[permutation[0]!]!.shift;
    const back = [0, 1, 2].map((i) => home[i]! - images[0]!.shift[i]!);
    const n = g.w.n.map((e, i) => e + back[i]! * g.w.d) as unknown as IntVec3;
    operations.push({ W: g.W, w: { n, d: g.w.d } });
    permutations.push(permutation);
  }
  const matrices = operations.map(({ W }) => cartesianMatrix(metric, W));
  return { operations, matrices, permutations };
}

/** A rotation part in the Cartesian frame of the cell. */
export function cartesianMatrix(metric: Metric, W: Operation["W"]): Mat3 {
  return multiply3(metric.toCartesian, multiply3(W, inverse3(metric.toCartesian)));
}

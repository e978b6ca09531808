import type { IntVec3 } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import type { Operation } from "../symmetry/index.ts";
import { apply3, type Metric, type Vec3 } from "./cell.ts";
import { AtomAction, type CellAtom, cellAtoms, type LatticeAtom } from "./cell-atoms.ts";
import { radiusSum } from "./contact-table.ts";
import { coordinationShell, SHELL_REACH, type ShellAtom } from "./coordination-shell.ts";
import type { Crystal } from "./crystal.ts";
import { chooseComponents } from "./disorder.ts";
import { element } from "./elements.ts";
import { invariantMetric } from "./invariant-metric.ts";
import { cartesianMatrix, type MolecularUnit, type UnitAtom, type UnitSite } from "./molecular-unit.ts";
import { contactsWithin } from "./neighbour-search.ts";
import { formatShellPattern, type ShellPattern } from "./shell-text.ts";
import { sequenceFormula } from "./unit-formula.ts";

/** A centre with its first shell; neighbours may belong to several polyhedra. */
export interface CoordinationPolyhedron {
  /** Label of the site of the centre. */
  readonly label: string;
  /** The centre, then its neighbours: `TiO6`. */
  readonly formula: string;
  /** Polyhedra of this kind in the primitive cell. */
  readonly count: number;
  /** angstrom */
  readonly shortest: number;
  readonly longest: number;
  /** As if it stood alone: the centre first, with one bond to each neighbour. */
  readonly unit: Pick<MolecularUnit, "atoms" | "bonds" | "site" | "centroid">;
  /** The same atoms in the crystal. */
  readonly members: readonly LatticeAtom[];
}

/** Polyhedra with the atoms of the cell that they are made of. */
export interface PolyhedronAnalysis {
  readonly polyhedra: readonly CoordinationPolyhedron[];
  /** Invariant under the space group. */
  readonly metric: Metric;
  readonly atoms: readonly CellAtom[];
  readonly action: AtomAction;
  readonly notes: readonly string[];
}

/**
 * The coordination polyhedra about all sites of the elements or labels asked for, one for each site.
 * @throws InputProblem `polyhedron-name-unknown`, `polyhedron-empty`
 */
export function coordinationPolyhedra(crystal: Crystal, patterns: readonly ShellPattern[]): PolyhedronAnalysis {
  const metric = invariantMetric(crystal.metric, crystal.group);
  const components = chooseComponents(crystal);
  const atoms = cellAtoms(crystal, (site) => components.chosen[site]!);
  const action = new AtomAction(crystal, atoms);
  const source: Source = { crystal, metric, atoms, action };
  const polyhedra = patterns.flatMap((pattern) => {
    const centres = atoms.flatMap((a, i) => (a.image === 0 && isMeant(crystal, a.site, pattern.centre) ? [i] : []));
    if (centres.length === 0) throw unknownName(crystal, pattern);
    return centres.map((centre) => polyhedronAbout(source, centre, pattern));
  });
  return { polyhedra, metric, atoms, action, notes: components.notes };
}

interface Source {
  readonly crystal: Crystal;
  readonly metric: Metric;
  readonly atoms: readonly CellAtom[];
  readonly action: AtomAction;
}

/** A site is meant by its element or label, or by those of a site that shares its position. */
function isMeant({ sites }: Crystal, site: number, name: string): boolean {
  const root = (i: number) => sites[i]!.sharesPositionOf ?? i;
  const here = sites.filter((_, i) => root(i) === root(site));
  return here.some((s) => (element(name) ? s.element === name : s.label === name));
}

function unknownName({ sites }: Crystal, pattern: ShellPattern): InputProblem {
  return new InputProblem(
    "polyhedron-name-unknown",
    `"${formatShellPattern(pattern)}": ${pattern.centre} is neither an element of this structure nor the label of a site`,
    null,
    `labels are ${sites
      .slice(0, 12)
      .map((s) => s.label)
      .join(", ")}${sites.length > 12 ? ", ..." : ""}`,
  );
}

function polyhedronAbout(source: Source, centre: number, pattern: ShellPattern): CoordinationPolyhedron {
  const { crystal, metric, atoms } = source;
  const shell = shellOf(source, centre, pattern.below);
  const site = crystal.sites[atoms[centre]!.site]!;
  if (shell.length === 0) {
    throw new InputProblem(
      "polyhedron-empty",
      `${site.label} has no neighbours${pattern.below === null ? "" : ` within ${pattern.below} angstrom`}`,
      null,
      `give a larger distance, such as "${pattern.centre}<4"`,
    );
  }
  const members: LatticeAtom[] = [{ atom: centre, shift: [0, 0, 0] }, ...shell];
  const unitAtoms = members.map((m) => unitAtom(crystal, metric, atoms, m));
  const bonds = shell.map((_, k) => [0, k + 1] as const);
  const distances = shell.map((n) => n.distance);
  const mean = (pick: (a: UnitAtom) => Vec3) =>
    [0, 1, 2].map((i) => unitAtoms.reduce((s, a) => s + pick(a)[i]!, 0) / unitAtoms.length) as unknown as Vec3;
  return {
    label: site.label,
    formula: unitAtoms[0]!.element + sequenceFormula(unitAtoms.slice(1).map((a) => a.element)),
    count: site.images.length / crystal.group.centrings.length,
    shortest: Math.min(...distances),
    longest: Math.max(...distances),
    unit: {
      atoms: unitAtoms,
      bonds,
      site: siteOf(source, members),
      centroid: { fractional: mean((a) => a.fractional), cartesian: mean((a) => a.cartesian) },
    },
    members: members.map(({ atom, shift }) => ({ atom, shift })),
  };
}

function shellOf(source: Source, centre: number, below: number | null): ShellAtom[] {
  const { crystal, metric, atoms } = source;
  const elementOf = (i: number) => crystal.sites[atoms[i]!.site]!.element;
  const limit = (i: number) => below ?? SHELL_REACH * (radiusSum(elementOf(centre), elementOf(i)) ?? 0);
  const reach = atoms.reduce((m, _, i) => Math.max(m, limit(i)), 0);
  const positions = atoms.map((a) => a.position);
  const { contacts } = contactsWithin(metric, positions, reach, (i, j) =>
    i === centre ? limit(j) : j === centre ? limit(i) : 0,
  );
  return coordinationShell(crystal, metric, atoms, centre, contacts, below);
}

function unitAtom(crystal: Crystal, metric: Metric, atoms: readonly CellAtom[], m: LatticeAtom): UnitAtom {
  const { site, image, position } = atoms[m.atom]!;
  const { label, element: symbol, occupancy } = crystal.sites[site]!;
  const fractional = position.map((e, i) => e + m.shift[i]!) as unknown as Vec3;
  const cartesian = apply3(metric.toCartesian, fractional);
  return { site, label, element: symbol ?? "?", occupancy, image, shift: m.shift, fractional, cartesian };
}

/** The operations that keep the centre, each moved by whole cells so that it keeps it as it stands. */
function siteOf({ crystal, metric, action }: Source, members: readonly LatticeAtom[]): UnitSite {
  const key = ({ atom, shift }: LatticeAtom) => `${atom} ${shift.join()}`;
  const at = new Map(members.map((m, k) => [key(m), k]));
  const operations: Operation[] = [];
  const permutations: number[][] = [];
  for (const g of crystal.group.operations) {
    const centre = action.image(g, members[0]!);
    if (centre.atom !== members[0]!.atom) continue;
    const back = centre.shift.map((e) => -e);
    const moved = members.map((m) => {
      const image = action.image(g, m);
      return at.get(
        key({ atom: image.atom, shift: image.shift.map((e, i) => e + back[i]! + 0) as unknown as IntVec3 }),
      );
    });
    if (moved.includes(undefined)) throw new RangeError("the shell does not keep the symmetry of its centre");
    operations.push({ W: g.W, w: { n: g.w.n.map((e, i) => e + back[i]! * g.w.d) as unknown as IntVec3, d: g.w.d } });
    permutations.push(moved as number[]);
  }
  return { operations, matrices: operations.map(({ W }) => cartesianMatrix(metric, W)), permutations };
}

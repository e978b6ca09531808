import type { IntVec3 } from "../algebra/index.ts";
import { invert, type Operation } from "../symmetry/index.ts";
import { apply3, type Vec3 } from "./cell.ts";
import { AtomAction, type CellAtom, cellAtoms, type LatticeAtom } from "./cell-atoms.ts";
import type { Crystal } from "./crystal.ts";
import { excludeEachOther } from "./disorder.ts";
import { withinOneCopy } from "./disorder-copy.ts";
import { wrapOf } from "./image-wrap.ts";
import { invariantMetric } from "./invariant-metric.ts";
import type { Contact } from "./neighbour-search.ts";

/**
 * All atoms of a crystal as neighbours of each other, alternatives of a disorder included. Sites at one position that are
 * occupied at random stand for one atom, the first of them.
 */
export class NeighbourAtoms {
  /** With the metric that the space group leaves unchanged. */
  readonly crystal: Crystal;
  readonly atoms: readonly CellAtom[];
  readonly action: AtomAction;
  /** Index of the first image of each site among the atoms; null for sites that another stands for, or that are empty. */
  readonly firstImage: readonly (number | null)[];
  /** Sites at the position of each, itself included, that are occupied at random. */
  readonly sharing: readonly (readonly number[])[];
  private readonly wraps: readonly IntVec3[];
  /** Per site, whether it is fully occupied and in no disorder group. */
  private readonly isWhole: readonly boolean[];
  private readonly together: (contact: Contact) => boolean;

  constructor(given: Crystal) {
    const crystal = { ...given, metric: invariantMetric(given.metric, given.group) };
    this.crystal = crystal;
    const representative = crystal.sites.map((_, i) => representativeOf(crystal, i));
    const sharing = crystal.sites.map((): number[] => []);
    crystal.sites.forEach((s, i) => {
      if (s.occupancy > 0) sharing[representative[i]!]!.push(i);
    });
    this.sharing = representative.map((r) => sharing[r]!);
    this.atoms = cellAtoms(crystal, (i) => representative[i] === i && this.sharing[i]!.length > 0);
    const first = crystal.sites.map((): number | null => null);
    this.atoms.forEach((a, index) => {
      if (a.image === 0) first[a.site] = index;
    });
    this.firstImage = first;
    this.action = new AtomAction(crystal, this.atoms);
    this.wraps = this.atoms.map((a) => wrapOf(crystal, a));
    this.isWhole = crystal.sites.map((s) => s.occupancy >= 1 && !isNamed(s.disorderGroup));
    this.together = withinOneCopy(crystal, this.atoms);
  }

  /** Whether two atoms are never there at the same time: alternatives of a disorder. */
  areApart(contact: Contact): boolean {
    const [a, b] = [this.atoms[contact.first]!.site, this.atoms[contact.second]!.site];
    const [p, q] = [this.crystal.sites[a]!, this.crystal.sites[b]!];
    if (contact.distance <= this.crystal.tolerance) return true;
    if (this.isWhole[a] && this.isWhole[b]) return false;
    if (isNamed(p.disorderGroup) && isNamed(q.disorderGroup) && p.assembly === q.assembly) {
      if (p.disorderGroup !== q.disorderGroup) return true;
    }
    return excludeEachOther(p, q, contact.distance) || !this.together(contact);
  }

  /** How often something is at the position of a neighbour when the centre is there: always, in one disorder group. */
  presence(centre: number, neighbour: number): number {
    const { sites } = this.crystal;
    const [p, q] = [sites[centre]!, sites[neighbour]!];
    if (isNamed(p.disorderGroup) && p.disorderGroup === q.disorderGroup && p.assembly === q.assembly) return 1;
    return this.occupancyAt(neighbour);
  }

  /** Sum of the occupancies of all sites at the position of one. */
  occupancyAt(site: number): number {
    return this.sharing[site]!.reduce((s, i) => s + this.crystal.sites[i]!.occupancy, 0);
  }

  /** Whether two atoms of the lattice are alternatives. */
  excludes(a: LatticeAtom, b: LatticeAtom): boolean {
    const shift = a.shift.map((e, i) => b.shift[i]! - e) as unknown as IntVec3;
    const [x, y] = [this.cartesian(a), this.cartesian(b)];
    const distance = Math.hypot(y[0] - x[0], y[1] - x[1], y[2] - x[2]);
    return this.areApart({ first: a.atom, second: b.atom, shift, distance });
  }

  /** The listed point of a site as an atom of the lattice. */
  listed(site: number): LatticeAtom {
    const atom = this.firstImage[site]!;
    const { point } = this.crystal.sites[site]!.symmetry;
    const { position } = this.atoms[atom]!;
    return { atom, shift: point.map((e, i) => Math.round(e - position[i]!) + 0) as unknown as IntVec3 };
  }

  /** The operation that carries the listed point of a site to one of its images: index in the group, and whole cells. */
  origin({ atom, shift }: LatticeAtom): { operation: number; cells: IntVec3 } {
    const { site, image } = this.atoms[atom]!;
    const wrap = this.wraps[atom]!;
    const operation = this.crystal.sites[site]!.images[image]!.operation;
    return { operation, cells: [wrap[0] + shift[0], wrap[1] + shift[1], wrap[2] + shift[2]] };
  }

  /** That operation with its whole cells. */
  operationTo(there: LatticeAtom): Operation {
    const { operation, cells } = this.origin(there);
    const { W, w } = this.crystal.group.operations[operation]!;
    return { W, w: { n: w.n.map((e, i) => e + cells[i]! * w.d) as unknown as IntVec3, d: w.d } };
  }

  /** Seen from the listed point of the neighbour's site, the image that a centre has there. */
  reverse(centre: LatticeAtom, neighbour: LatticeAtom): LatticeAtom {
    return this.action.image(invert(this.operationTo(neighbour)), centre);
  }

  /** Fractional. */
  position({ atom, shift }: LatticeAtom): Vec3 {
    const x = this.atoms[atom]!.position;
    return [x[0] + shift[0], x[1] + shift[1], x[2] + shift[2]];
  }

  /** angstrom */
  cartesian(there: LatticeAtom): Vec3 {
    return apply3(this.crystal.metric.toCartesian, this.position(there));
  }

  elementOf(atom: number): string | null {
    return this.crystal.sites[this.atoms[atom]!.site]!.element;
  }
}

export function latticeKey({ atom, shift }: LatticeAtom): string {
  return `${atom} ${shift[0]} ${shift[1]} ${shift[2]}`;
}

function isNamed(group: string | null): boolean {
  return group !== null && group !== "0";
}

/** The first site at the same position in the same disorder group. */
function representativeOf({ sites }: Crystal, site: number): number {
  const { sharesPositionOf: root, disorderGroup, assembly } = sites[site]!;
  if (root === null) return site;
  return sites.findIndex(
    (s, j) =>
      (j === root || s.sharesPositionOf === root) && s.disorderGroup === disorderGroup && s.assembly === assembly,
  );
}

import { apply, type IntVec3 } from "../algebra/index.ts";
import { compose, type Operation, operationKey, transformPoint } from "../symmetry/index.ts";
import type { Vec3 } from "./cell.ts";
import type { Crystal } from "./crystal.ts";

/** One atom of the cell: an image of a site. */
export interface CellAtom {
  /** Index of the site in the crystal. */
  readonly site: number;
  /** Index among the images of the site. */
  readonly image: number;
  /** Fractional, in [0, 1). */
  readonly position: Vec3;
}

/** An atom of the infinite crystal: an atom of the cell, moved by whole cells. */
export interface LatticeAtom {
  readonly atom: number;
  readonly shift: IntVec3;
}

/** All atoms of the cell, site by site; `chosen` leaves sites out. */
export function cellAtoms(crystal: Crystal, chosen: (site: number) => boolean = () => true): CellAtom[] {
  return crystal.sites.flatMap((s, site) =>
    chosen(site) ? s.images.map((image, k) => ({ site, image: k, position: image.position })) : [],
  );
}

/** How one coset of a site group moves the site: to which atom, and over how many whole cells from that atom. */
interface Landing {
  readonly atom: number;
  readonly shift: IntVec3;
}

/**
 * The space group acting on the atoms of a crystal, by operations alone: no coordinates are compared, so the answer
 * is exact however close two atoms lie.
 */
export class AtomAction {
  private readonly crystal: Crystal;
  private readonly atoms: readonly CellAtom[];
  /** Whole cells between each atom and the image of the listed point by its operation as it stands. */
  private readonly wraps: IntVec3[] = [];
  /** Per site, by key of an operation modulo the lattice: where that operation takes the listed point. */
  private readonly landings: ReadonlyMap<number, ReadonlyMap<string, Landing>>;

  constructor(crystal: Crystal, atoms: readonly CellAtom[]) {
    this.crystal = crystal;
    this.atoms = atoms;
    const landings = new Map<number, Map<string, Landing>>();
    atoms.forEach((atom, index) => {
      const map = landings.get(atom.site) ?? new Map<string, Landing>();
      landings.set(atom.site, map);
      this.addLandings(atom, index, map);
    });
    this.landings = landings;
  }

  private addLandings(atom: CellAtom, index: number, map: Map<string, Landing>): void {
    const { symmetry } = this.crystal.sites[atom.site]!;
    const a = this.operationOf(atom);
    // the atom stands at a x + wrap; a s x = a x for every s of the site group, without reduction
    const at = transformPoint(a, symmetry.point);
    const wrap = whole(atom.position, at);
    this.wraps.push(wrap);
    for (const s of symmetry.operations) {
      const [key, cells] = split(compose(a, s));
      map.set(key, { atom: index, shift: [-cells[0] - wrap[0], -cells[1] - wrap[1], -cells[2] - wrap[2]] });
    }
  }

  private operationOf(atom: CellAtom): Operation {
    return this.crystal.group.operations[this.crystal.sites[atom.site]!.images[atom.image]!.operation]!;
  }

  /**
   * Image of an atom under an operation of the space group (translations need not be reduced).
   * @throws RangeError if the operation is not in the space group
   */
  image(g: Operation, from: LatticeAtom): LatticeAtom {
    const atom = this.atoms[from.atom]!;
    const wrap = this.wraps[from.atom]!;
    const [key, cells] = split(compose(g, this.operationOf(atom)));
    const landing = this.landings.get(atom.site)!.get(key);
    if (!landing) throw new RangeError(`not an operation of the space group: ${operationKey(g)}`);
    const moved = apply(g.W, [wrap[0] + from.shift[0], wrap[1] + from.shift[1], wrap[2] + from.shift[2]]);
    const shift = [0, 1, 2].map((i) => landing.shift[i]! + cells[i]! + moved[i]! + 0);
    return { atom: landing.atom, shift: shift as unknown as IntVec3 };
  }
}

/** Integer difference of two points known to differ by whole cells. */
function whole(x: Vec3, y: Vec3): [number, number, number] {
  return [Math.round(x[0] - y[0]), Math.round(x[1] - y[1]), Math.round(x[2] - y[2])];
}

/** Key of an operation modulo the lattice, and the whole cells taken off its translation. */
function split(a: Operation): [string, [number, number, number]] {
  const { n, d } = a.w;
  const cells: [number, number, number] = [Math.floor(n[0] / d), Math.floor(n[1] / d), Math.floor(n[2] / d)];
  const w = { n: [n[0] - cells[0] * d, n[1] - cells[1] * d, n[2] - cells[2] * d] as IntVec3, d };
  return [operationKey({ W: a.W, w }), cells];
}

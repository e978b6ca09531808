import { IDENTITY } from "../algebra/index.ts";
import { AtomAction, type Crystal, cellAtoms, type Vec3 } from "../structure/index.ts";
import { rotationIndex } from "../symmetry/index.ts";
import { type VibratingSite, vibratingSites } from "./vibrating-sites.ts";

/** One atom of the primitive cell. */
export interface PrimitiveAtom {
  /** Index of its vibrating site. */
  readonly site: number;
  /** Fractional in the cell of the file, each in [0, 1). */
  readonly position: Vec3;
  /** Index in the operations of the space group of one that makes it from the listed atom. */
  readonly operation: number;
  /** Index of the rotation part of that operation among the representatives of the factor group. */
  readonly element: number;
}

/** The vibrating sites of a crystal and their atoms in one primitive cell, site by site, the listed atom first. */
export function primitiveAtoms(crystal: Crystal): { sites: VibratingSite[]; atoms: PrimitiveAtom[] } {
  const { group } = crystal;
  const sites = vibratingSites(crystal);
  const place = new Map(sites.map((v, i) => [crystal.sites.indexOf(v.site), i]));
  const inCell = cellAtoms(crystal, (site) => place.has(site));
  const action = new AtomAction(crystal, inCell);
  const centrings = group.centrings.slice(1).map((w) => ({ W: IDENTITY, w }));
  const copied = new Set<number>();
  const atoms: PrimitiveAtom[] = [];
  inCell.forEach((atom, i) => {
    if (copied.has(i)) return;
    for (const t of centrings) copied.add(action.image(t, { atom: i, shift: [0, 0, 0] }).atom);
    const { operation } = crystal.sites[atom.site]!.images[atom.image]!;
    const element = rotationIndex(group, group.operations[operation]!.W);
    atoms.push({ site: place.get(atom.site)!, position: atom.position, operation, element });
  });
  return { sites, atoms: atoms.sort((a, b) => a.site - b.site) };
}

import type { IntVec3 } from "../algebra/index.ts";
import { AtomAction, type CellAtom, type LatticeAtom } from "./cell-atoms.ts";
import type { Crystal } from "./crystal.ts";
import type { Contact } from "./neighbour-search.ts";

/**
 * Tells contacts within one copy of a disorder group from those between two. A group of negative number is disordered
 * about a special position (core CIF dictionary, `_atom_site.disorder_group`): its atoms as listed are there together,
 * and so are their images under one operation, but not images under different ones.
 */
export function withinOneCopy(crystal: Crystal, atoms: readonly CellAtom[]): (contact: Contact) => boolean {
  const blocks = new Map<string, LatticeAtom[]>();
  const blockOf = crystal.sites.map(({ assembly, disorderGroup }) =>
    disorderGroup?.startsWith("-") ? `${assembly ?? ""} ${disorderGroup}` : null,
  );
  if (blockOf.every((b) => b === null)) return () => true;
  atoms.forEach((atom, index) => {
    const block = blockOf[atom.site];
    if (atom.image !== 0 || block === null || block === undefined) return;
    blocks.set(block, [...(blocks.get(block) ?? []), listedAtom(crystal, atom, index)]);
  });
  const action = new AtomAction(crystal, atoms);
  const together = new Set<string>();
  for (const g of crystal.group.operations) {
    for (const members of blocks.values()) {
      const images = members.map((m) => action.image(g, m));
      for (const a of images) for (const b of images) together.add(pairKey(a, b));
    }
  }
  return ({ first, second, shift }) => {
    const [a, b] = [blockOf[atoms[first]!.site], blockOf[atoms[second]!.site]];
    if (a === null || a !== b) return true;
    return together.has(pairKey({ atom: first, shift: [0, 0, 0] }, { atom: second, shift }));
  };
}

/** A site where the file lists it, which need not be in the cell of its first image. */
function listedAtom(crystal: Crystal, atom: CellAtom, index: number): LatticeAtom {
  const { point } = crystal.sites[atom.site]!.symmetry;
  const shift = point.map((e, i) => Math.round(e - atom.position[i]!)) as unknown as IntVec3;
  return { atom: index, shift };
}

function pairKey(a: LatticeAtom, b: LatticeAtom): string {
  return `${a.atom} ${b.atom} ${b.shift.map((e, i) => e - a.shift[i]!).join()}`;
}

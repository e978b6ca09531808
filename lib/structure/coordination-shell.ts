import { bondClasses } from "./bond-class.ts";
import { apply3, type Metric, type Vec3 } from "./cell.ts";
import type { CellAtom, LatticeAtom } from "./cell-atoms.ts";
import { BOND_TOLERANCE, radiusSum } from "./contact-table.ts";
import type { Crystal } from "./crystal.ts";
import type { Contact } from "./neighbour-search.ts";
import { length3, minus3 } from "./rotation-fit.ts";

/** No first shell reaches beyond this many sums of the covalent radii. */
export const SHELL_REACH = 1.6;

/** An atom bonded to a non-metal that is nearer by more than this belongs to the second shell; angstrom. */
const BEHIND = 0.3;

/** A neighbour of a centre. */
export interface ShellAtom extends LatticeAtom {
  /** angstrom */
  readonly distance: number;
}

/** A neighbour with what decides whether it belongs to the first shell. */
export interface ShellCandidate extends ShellAtom {
  readonly element: string | null;
  readonly place: Vec3;
  /** Distance over the sum of the covalent radii. */
  readonly share: number;
}

/**
 * The first coordination shell of an atom of the cell: its neighbours up to the widest gap between distances, measured in
 * sums of covalent radii. Non-metals only, if the nearest is one; atoms bonded to a nearer neighbour stand behind it.
 * @param contacts all contacts of the atom within SHELL_REACH
 * @param below take all neighbours nearer than this instead of looking for a gap; angstrom
 */
export function coordinationShell(
  crystal: Crystal,
  metric: Metric,
  atoms: readonly CellAtom[],
  centre: number,
  contacts: readonly Contact[],
  below: number | null,
): ShellAtom[] {
  const direct = shellCandidates(crystal, metric, atoms, centre, neighboursOf(centre, contacts));
  const shell = below === null ? direct.slice(0, endOfShell(direct)) : direct.filter((c) => c.distance < below);
  return shell.map(({ atom, shift, distance }) => ({ atom, shift, distance }));
}

/**
 * What may belong to the first shell of an atom, nearest first in sums of covalent radii: none that is bonded to a nearer
 * non-metal, and non-metals only, if the nearest of the others is one.
 * @param near all atoms around it within SHELL_REACH
 */
export function shellCandidates(
  crystal: Crystal,
  metric: Metric,
  atoms: readonly CellAtom[],
  centre: number,
  near: readonly ShellAtom[],
): ShellCandidate[] {
  const own = crystal.sites[atoms[centre]!.site]!.element;
  const around = near
    .map((n): ShellCandidate => {
      const { element } = crystal.sites[atoms[n.atom]!.site]!;
      const position = atoms[n.atom]!.position.map((e, i) => e + n.shift[i]!) as unknown as Vec3;
      const sum = radiusSum(own, element);
      return { ...n, element, place: apply3(metric.toCartesian, position), share: sum ? n.distance / sum : Infinity };
    })
    .sort((a, b) => a.share - b.share);
  const { nonMetal } = bondClasses();
  const isNonMetal = (c: ShellCandidate) => c.element !== null && nonMetal.has(c.element);
  const direct = withoutThoseBehind(around);
  return direct[0] && isNonMetal(direct[0]) ? direct.filter(isNonMetal) : direct;
}

function neighboursOf(centre: number, contacts: readonly Contact[]): ShellAtom[] {
  return contacts.flatMap(({ first, second, shift, distance }) => {
    const there: ShellAtom = { atom: second, shift, distance };
    const back: ShellAtom = { atom: first, shift: [-shift[0] + 0, -shift[1] + 0, -shift[2] + 0], distance };
    return [...(first === centre ? [there] : []), ...(second === centre ? [back] : [])];
  });
}

function withoutThoseBehind(ligands: readonly ShellCandidate[]): ShellCandidate[] {
  const { nonMetal } = bondClasses();
  const direct: ShellCandidate[] = [];
  for (const far of [...ligands].sort((a, b) => a.distance - b.distance)) {
    const isBehind = direct.some((near) => {
      if (near.element === null || !nonMetal.has(near.element)) return false; // metals pack; nothing stands behind them
      const sum = radiusSum(near.element, far.element);
      if (sum === null || far.distance <= near.distance + BEHIND) return false;
      return length3(minus3(near.place, far.place)) <= sum + BOND_TOLERANCE;
    });
    if (!isBehind) direct.push(far);
  }
  return direct.sort((a, b) => a.share - b.share);
}

/** How many candidates stand before the widest gap; what lies beyond SHELL_REACH is unknown. */
export function endOfShell(candidates: readonly ShellCandidate[]): number {
  let end = 0;
  let widest = 0;
  candidates.forEach(({ share }, k) => {
    const gap = (candidates[k + 1]?.share ?? SHELL_REACH) / share;
    if (gap <= widest + 1e-9) return;
    widest = gap;
    end = k + 1;
  });
  return end;
}

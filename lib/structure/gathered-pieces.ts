import type { IntVec3 } from "../algebra/index.ts";
import { componentsOf } from "./bond-graph.ts";
import { bondsOf } from "./bonds.ts";
import type { Vec3 } from "./cell.ts";
import { type CellAtom, cellAtoms, type LatticeAtom } from "./cell-atoms.ts";
import type { Crystal } from "./crystal.ts";
import { contactsWithin } from "./neighbour-search.ts";

/** Atoms of left-out disorder components go with the nearest atom up to here; angstrom. */
const DISORDER_REACH = 2.5;

/** The bonds of a crystal between its cell atoms, all of them, disorder included. */
interface BondGraph {
  readonly atoms: readonly CellAtom[];
  readonly edges: readonly { readonly first: number; readonly second: number; readonly shift: IntVec3 }[];
}

function bondGraph(crystal: Crystal): BondGraph {
  const atoms = cellAtoms(crystal);
  const list = bondsOf(crystal);
  const index = new Map(atoms.map((a, i) => [`${a.site},${a.image}`, i]));
  const own = list.atoms.map((a) => index.get(`${a.site},${a.image}`)!);
  const edges = list.bonds.map(({ first, second, shift }) => ({ first: own[first]!, second: own[second]!, shift }));
  return { atoms, edges: [...edges, ...companions(crystal, atoms, new Set(own))] };
}

/** An edge from each atom of a component of disorder that was left out to the nearest atom that was taken. */
function companions(crystal: Crystal, atoms: readonly CellAtom[], taken: ReadonlySet<number>) {
  if (taken.size === atoms.length) return [];
  const nearest = new Map<number, { other: number; shift: IntVec3; distance: number }>();
  const offer = (left: number, other: number, shift: IntVec3, distance: number) => {
    const known = nearest.get(left);
    if (!known || distance < known.distance - 1e-6) nearest.set(left, { other, shift, distance });
  };
  const positions = atoms.map((a) => a.position);
  const limit = (i: number, j: number) => (taken.has(i) === taken.has(j) ? 0 : DISORDER_REACH);
  for (const { first, second, shift, distance } of contactsWithin(crystal.metric, positions, DISORDER_REACH, limit)
    .contacts) {
    if (taken.has(first) === taken.has(second)) continue;
    if (taken.has(second)) offer(first, second, shift, distance);
    else offer(second, first, shift.map((e) => -e + 0) as unknown as IntVec3, distance);
  }
  return [...nearest].map(([first, { other, shift }]) => ({ first, second: other, shift }));
}

/**
 * The atoms of a cell as molecules, each gathered across cell edges; what is bonded without end, and what is not bonded,
 * stays atom by atom.
 */
export function gatheredPieces(crystal: Crystal): LatticeAtom[][] {
  const { atoms, edges } = bondGraph(crystal);
  return componentsOf(atoms.length, edges).flatMap(({ members, translations }): LatticeAtom[][] => {
    const inOrder = [...members].sort((a, b) => a.atom - b.atom);
    return translations.length === 0 ? [inOrder] : inOrder.map(({ atom }) => [{ atom, shift: [0, 0, 0] }]);
  });
}

/**
 * One atom of every site, chosen so that they hang together as far as bonds reach: along bonds from an atom of the first
 * site, taking each site once. What no bond reaches begins at the image nearest to the first atom chosen.
 */
export function connectedUnit(crystal: Crystal): LatticeAtom[] {
  const { atoms, edges } = bondGraph(crystal);
  const around = atoms.map((): number[] => []);
  edges.forEach((e, k) => {
    around[e.first]!.push(k);
    around[e.second]!.push(k);
  });
  const chosen = new Map<number, LatticeAtom>(); // by site
  const centre = crystal.sites[0]?.symmetry.point ?? [0, 0, 0];
  crystal.sites.forEach((_, site) => {
    if (chosen.has(site)) return;
    const start = nearestImage(crystal, atoms, site, centre);
    chosen.set(site, start);
    const queue = [start];
    for (let head = 0; head < queue.length; head++) {
      const here = queue[head]!;
      for (const k of around[here.atom]!) {
        const next = alongEdge(here, edges[k]!);
        const to = atoms[next.atom]!.site;
        if (chosen.has(to)) continue;
        chosen.set(to, next);
        queue.push(next);
      }
    }
  });
  return crystal.sites.map((_, site) => chosen.get(site)!);
}

function alongEdge(here: LatticeAtom, edge: BondGraph["edges"][number]): LatticeAtom {
  const sign = edge.first === here.atom ? 1 : -1;
  const shift = [0, 1, 2].map((i) => here.shift[i]! + sign * edge.shift[i]! + 0) as unknown as IntVec3;
  return { atom: edge.first === here.atom ? edge.second : edge.first, shift };
}

/** The listed atom for the first site, else the image of a site nearest to a point. */
function nearestImage(crystal: Crystal, atoms: readonly CellAtom[], site: number, centre: Vec3): LatticeAtom {
  const { g } = crystal.metric;
  const around = cellsAround();
  let best: { atom: LatticeAtom; square: number } | null = null;
  atoms.forEach((atom, index) => {
    if (atom.site !== site) return;
    const whole = atom.position.map((e, i) => Math.round(centre[i]! - e));
    for (const [a, b, c] of around) {
      const shift: IntVec3 = [whole[0]! + a, whole[1]! + b, whole[2]! + c];
      const [x, y, z] = [0, 1, 2].map((i) => atom.position[i]! + shift[i]! - centre[i]!) as [number, number, number];
      const square = g[0] * x * x + g[4] * y * y + g[8] * z * z + 2 * (g[1] * x * y + g[2] * x * z + g[5] * y * z);
      if (!best || square < best.square - 1e-6) best = { atom: { atom: index, shift }, square };
    }
  });
  return best!.atom;
}

/** The cell itself and the 26 around it. */
function cellsAround(): IntVec3[] {
  const steps = [-1, 0, 1];
  return steps.flatMap((a) => steps.flatMap((b) => steps.map((c): IntVec3 => [a, b, c])));
}

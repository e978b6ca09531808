import { hermiteRows, type IntVec3 } from "../algebra/index.ts";
import type { LatticeAtom } from "./cell-atoms.ts";

/** An edge of a periodic graph: from node `first` in a cell to node `second` in the cell `shift` away. */
export interface PeriodicEdge {
  readonly first: number;
  readonly second: number;
  readonly shift: IntVec3;
}

/** A connected piece of a periodic graph, up to whole cells. */
export interface Component {
  /** One node each, with the cell in which a walk along edges from the first node meets it first. */
  readonly members: readonly LatticeAtom[];
  /** Hermite basis of the translations that carry the piece into itself: as many rows as it has dimensions. */
  readonly translations: readonly IntVec3[];
}

/**
 * Connected components of a periodic graph given by its quotient modulo the lattice. The translations along closed
 * walks of the quotient span the lattice of a component: rank 0 is finite, 1 a chain, 2 a layer, 3 a framework. Exact;
 * linear in nodes and edges.
 * Source: S. J. Chung, T. Hahn and W. E. Klee, Acta Cryst. A40 (1984) 42 (quotient graphs of nets).
 */
export function componentsOf(nodes: number, edges: readonly PeriodicEdge[]): Component[] {
  const around: number[][] = Array.from({ length: nodes }, () => []);
  edges.forEach((e, k) => {
    around[e.first]!.push(k);
    around[e.second]!.push(k);
  });
  const place: (IntVec3 | null)[] = new Array<IntVec3 | null>(nodes).fill(null);
  const components: Component[] = [];
  for (let start = 0; start < nodes; start++) {
    if (place[start]) continue;
    components.push(walk(start, around, edges, place));
  }
  return components;
}

function walk(
  start: number,
  around: readonly (readonly number[])[],
  edges: readonly PeriodicEdge[],
  place: (IntVec3 | null)[],
): Component {
  place[start] = [0, 0, 0];
  const queue = [start];
  let translations: number[][] = [];
  for (let head = 0; head < queue.length; head++) {
    const node = queue[head]!;
    const here = place[node]!;
    for (const k of around[node]!) {
      const { first, second, shift } = edges[k]!;
      const forward = first === node;
      const next = forward ? second : first;
      const sign = forward ? 1 : -1;
      const there = [0, 1, 2].map((i) => here[i]! + sign * shift[i]! + 0) as unknown as IntVec3;
      const known = place[next];
      if (!known) {
        place[next] = there;
        queue.push(next);
      } else {
        const loop = [there[0] - known[0], there[1] - known[1], there[2] - known[2]];
        if (loop.some((e) => e !== 0)) translations = hermiteRows([...translations, loop]);
      }
    }
  }
  const members = queue.map((atom) => ({ atom, shift: place[atom]! }));
  return { members, translations: translations as unknown as IntVec3[] };
}

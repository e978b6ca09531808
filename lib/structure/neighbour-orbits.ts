import type { LatticeAtom } from "./cell-atoms.ts";
import { latticeKey, type NeighbourAtoms } from "./neighbour-atoms.ts";

/** How the site symmetry of a centre permutes its neighbours: per operation, the neighbour that each goes to. */
export function neighbourPermutations(
  source: NeighbourAtoms,
  site: number,
  neighbours: readonly LatticeAtom[],
): number[][] {
  const at = new Map(neighbours.map((n, i) => [latticeKey(n), i]));
  return source.crystal.sites[site]!.symmetry.operations.map((g) =>
    neighbours.map((n) => at.get(latticeKey(source.action.image(g, n))) ?? -1),
  );
}

/** Of indices or tuples of them, the classes that the permutations make: members in order, by the first of each class. */
export function orbitsOf(
  tuples: readonly (readonly number[])[],
  permutations: readonly (readonly number[])[],
  keyOf: (tuple: readonly number[]) => string,
): number[][] {
  const at = new Map(tuples.map((t, i) => [keyOf(t), i]));
  const done = new Set<number>();
  const orbits: number[][] = [];
  tuples.forEach((tuple, i) => {
    if (done.has(i)) return;
    const images = permutations.flatMap((p) => at.get(keyOf(tuple.map((k) => p[k]!))) ?? []);
    const orbit = [...new Set([i, ...images])].sort((a, b) => a - b);
    for (const k of orbit) done.add(k);
    orbits.push(orbit);
  });
  return orbits;
}

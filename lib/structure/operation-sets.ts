import { type ApproximateOperation, operationId } from "./approximate-operations.ts";

/** Products among a list of operations: i after j is products[n * i + j], -1 where the list lacks it. */
export interface PartialTable {
  readonly size: number;
  readonly products: Int32Array;
}

export function partialTable(operations: readonly ApproximateOperation[]): PartialTable {
  const size = operations.length;
  const index = new Map(operations.map((o, i) => [operationId(o.permutation, o.determinant), i]));
  const products = new Int32Array(size * size);
  for (let i = 0; i < size; i++) {
    const a = operations[i]!;
    for (let j = 0; j < size; j++) {
      const b = operations[j]!;
      const product = b.permutation.map((k) => a.permutation[k]!);
      products[size * i + j] = index.get(operationId(product, a.determinant * b.determinant)) ?? -1;
    }
  }
  return { size, products };
}

/** The closed set that some operations generate, ascending, or null where it leaves the list. */
export function closedSet({ size, products }: PartialTable, generators: readonly number[]): number[] | null {
  const inside = new Uint8Array(size);
  const list: number[] = [];
  for (const g of generators) {
    if (inside[g]) continue;
    inside[g] = 1;
    list.push(g);
  }
  for (let i = 0; i < list.length; i++) {
    for (const g of generators) {
      const p = products[size * list[i]! + g]!;
      if (p < 0) return null;
      if (inside[p]) continue;
      inside[p] = 1;
      list.push(p);
    }
  }
  return list.sort((a, b) => a - b);
}

/** More sets than any finite point group has subgroups (Ih: 164; D60h, of order 240: some thousand). */
const MOST_SETS = 5000;

/**
 * All groups within a list of operations that hold a given group, largest first. Each arises from a smaller one by
 * adding one operation.
 * @param base indices of a group within the list
 */
export function groupsContaining(table: PartialTable, base: readonly number[]): number[][] {
  const known = new Map<string, readonly number[]>();
  const queue: { members: number[]; generators: readonly number[] }[] = [];
  const add = (generators: readonly number[]) => {
    const members = closedSet(table, generators);
    if (!members || known.has(members.join()) || known.size >= MOST_SETS) return;
    known.set(members.join(), members);
    queue.push({ members, generators });
  };
  add(base);
  for (let i = 0; i < queue.length; i++) {
    const { members, generators } = queue[i]!;
    const inside = new Set(members);
    for (let g = 0; g < table.size; g++) if (!inside.has(g)) add([...generators, g]);
  }
  return queue.map((q) => q.members).sort((a, b) => b.length - a.length);
}

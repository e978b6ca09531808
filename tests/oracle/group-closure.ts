import { compose, IDENTITY_OPERATION, type Operation, operationKey, reduce } from "../../lib/symmetry/index.ts";

/** All products of all pairs, again and again, until nothing new appears: keys of the group modulo the lattice. */
export function slowClosure(generators: readonly Operation[]): Set<string> {
  const members = new Map([IDENTITY_OPERATION, ...generators].map((a) => [operationKey(reduce(a)), a]));
  for (let size = 0; size < members.size; ) {
    size = members.size;
    const list = [...members.values()];
    for (const a of list) {
      for (const b of list) {
        const product = reduce(compose(a, b));
        members.set(operationKey(product), product);
      }
    }
  }
  return new Set(members.keys());
}

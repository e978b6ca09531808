import { type IntVec3, mod, ratVec3 } from "../algebra/index.ts";
import { type Operation, operationKey, reduce, type SpaceGroup } from "../symmetry/index.ts";

/** An operation of a list, and the whole cells that follow it. */
export interface ListedOperation {
  /** Index in the operations of the group. */
  readonly operation: number;
  readonly cells: IntVec3;
}

/**
 * Answers which listed operation, followed by which whole cells, is a listed operation followed by a translation n / d
 * of the crystal. Every translation modulo the cell is worked out once.
 * @throws RangeError if n / d is no translation of the crystal
 */
export function translatedOperations(group: SpaceGroup, d: number): (operation: number, n: IntVec3) => ListedOperation {
  const index = new Map(group.operations.map((a, i) => [operationKey(a), i]));
  const known = new Map<number, ListedOperation>();
  const workOut = (operation: number, r: IntVec3): ListedOperation => {
    const a = group.operations[operation]!;
    const k = a.w.d * d;
    const sum = [0, 1, 2].map((i) => a.w.n[i]! * d + r[i]! * a.w.d);
    const cells = sum.map((e) => Math.floor(e / k)) as unknown as IntVec3;
    const target: Operation = { W: a.W, w: ratVec3(sum as unknown as IntVec3, k) };
    const found = index.get(operationKey(reduce(target)));
    if (found === undefined) throw new RangeError(`no translation of the crystal: ${r.join(" ")} over ${d}`);
    return { operation: found, cells };
  };
  return (operation, n) => {
    const r: IntVec3 = [mod(n[0], d), mod(n[1], d), mod(n[2], d)];
    const key = ((operation * d + r[0]) * d + r[1]) * d + r[2];
    let first = known.get(key);
    if (!first) {
      first = workOut(operation, r);
      known.set(key, first);
    }
    const [a, b, c] = first.cells;
    return {
      operation: first.operation,
      cells: [a + (n[0] - r[0]) / d, b + (n[1] - r[1]) / d, c + (n[2] - r[2]) / d],
    };
  };
}

import { equal, type IntMat3 } from "../algebra/index.ts";

/** Finds matrices of a fixed list by value. */
export interface MatrixIndex {
  /** Index in the list, or -1. */
  readonly find: (W: IntMat3) => number;
}

/** @returns null if two matrices of the list are equal */
export function matrixIndex(list: readonly IntMat3[]): MatrixIndex | null {
  const buckets = new Map<number, number[]>();
  const find = (W: IntMat3): number => {
    const bucket = buckets.get(hash(W));
    if (bucket) for (const i of bucket) if (equal(list[i]!, W)) return i;
    return -1;
  };
  for (let i = 0; i < list.length; i++) {
    if (find(list[i]!) >= 0) return null;
    const h = hash(list[i]!);
    const bucket = buckets.get(h);
    if (bucket) bucket.push(i);
    else buckets.set(h, [i]);
  }
  return { find };
}

function hash(W: IntMat3): number {
  let h = 0;
  for (let i = 0; i < 9; i++) h = (Math.imul(h, 31) + W[i]!) | 0;
  return h;
}

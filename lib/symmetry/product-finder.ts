import { equal, lcm, mod, multiply } from "../algebra/index.ts";
import type { Operation } from "./operation.ts";

/** Index in a group's list of the product a b, taken modulo the lattice, or -1 where the list lacks it. */
export type ProductFinder = (a: Operation, b: Operation) => number;

const finders = new WeakMap<readonly Operation[], ProductFinder>();

/**
 * Finds products in a list of operations with translations in [0, 1). One common denominator serves all, and operations
 * with equal rotation parts and translations share a bucket, so that no object or text is made for a product. The list
 * is looked through once.
 */
export function productFinder(operations: readonly Operation[]): ProductFinder {
  const known = finders.get(operations);
  if (known) return known;
  const fresh = newFinder(operations);
  finders.set(operations, fresh);
  return fresh;
}

function newFinder(operations: readonly Operation[]): ProductFinder {
  const d = operations.reduce((m, a) => lcm(m, a.w.d), 1);
  const first = new Map<number, number>();
  const next = new Int32Array(operations.length).fill(-1);
  for (let i = operations.length - 1; i >= 0; i--) {
    const { W, w } = operations[i]!;
    const k = d / w.d;
    const h = hash(W, w.n[0] * k, w.n[1] * k, w.n[2] * k);
    next[i] = first.get(h) ?? -1;
    first.set(h, i);
  }
  return (a, b) => {
    const k = d / a.w.d;
    const m = d / b.w.d;
    const [x, y, z] = [b.w.n[0] * m, b.w.n[1] * m, b.w.n[2] * m];
    const at = (i: 0 | 1 | 2) => mod(a.W[3 * i]! * x + a.W[3 * i + 1]! * y + a.W[3 * i + 2]! * z + a.w.n[i] * k, d);
    const [u, v, w] = [at(0), at(1), at(2)];
    const W = multiply(a.W, b.W);
    for (let i = first.get(hash(W, u, v, w)) ?? -1; i >= 0; i = next[i]!) {
      const found = operations[i]!;
      const f = d / found.w.d;
      const { n } = found.w;
      if (n[0] * f === u && n[1] * f === v && n[2] * f === w && equal(found.W, W)) return i;
    }
    return -1;
  };
}

function hash(W: Operation["W"], x: number, y: number, z: number): number {
  let h = Math.imul(Math.imul(Math.imul(x, 31) + y, 31) + z, 31);
  for (let i = 0; i < 9; i++) h = (Math.imul(h, 31) + W[i]!) | 0;
  return h;
}

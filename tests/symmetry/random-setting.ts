import { IDENTITY, multiplyRatMat, type RatMat3, ratMat3, ratVec3 } from "../../lib/algebra/index.ts";
import { closeGroup } from "../../lib/symmetry/group-closure.ts";
import type { Operation } from "../../lib/symmetry/operation.ts";
import type { SpaceGroup } from "../../lib/symmetry/space-group.ts";
import { reverse, type Transformation, transformOperation } from "../../lib/symmetry/transformation.ts";

/** Numbers in [0, 1) from a seed (xorshift), the same on every machine. */
export function seeded(seed: number): () => number {
  let s = seed | 0 || 1;
  return () => {
    s ^= s << 13;
    s ^= s >>> 17;
    s ^= s << 5;
    return (s >>> 0) / 2 ** 32;
  };
}

function integer(random: () => number, low: number, high: number): number {
  return low + Math.floor(random() * (high - low + 1));
}

/** A product of elementary matrices and of cyclic exchanges of axes: determinant 1. */
export function randomUnimodular(random: () => number, steps = 4): RatMat3 {
  let m = ratMat3(IDENTITY);
  for (let s = 0; s < steps; s++) {
    const i = integer(random, 0, 2);
    const j = (i + integer(random, 1, 2)) % 3;
    const e = [...IDENTITY];
    e[3 * i + j] = integer(random, -2, 2);
    m = multiplyRatMat(m, ratMat3(e as unknown as typeof IDENTITY));
    if (random() < 0.3) m = multiplyRatMat(m, ratMat3([0, 1, 0, 0, 0, 1, 1, 0, 0]));
  }
  return m;
}

/** The group in the setting that t leads to, which may have another number of lattice points in its cell; or null. */
export function inSetting(group: Pick<SpaceGroup, "operations">, t: Transformation): Operation[] | null {
  const back = reverse(t);
  const cell: Operation[] = [ratVec3([1, 0, 0]), ratVec3([0, 1, 0]), ratVec3([0, 0, 1])].map((w) => ({
    W: IDENTITY,
    w,
  }));
  const moved: Operation[] = [];
  for (const a of [...cell, ...group.operations]) {
    const b = transformOperation(a, t, back);
    if (!b) return null;
    moved.push(b);
  }
  return closeGroup(moved);
}

/**
 * A random setting of a group: its own cell, its primitive cell or a multiple of them, skewed by a unimodular matrix,
 * with the origin at a random fraction.
 */
export function randomSetting(group: SpaceGroup, random: () => number): { t: Transformation; operations: Operation[] } {
  const starts: RatMat3[] = [
    ratMat3(IDENTITY),
    group.primitive,
    ratMat3([1, 1, 0, -1, 1, 0, 0, 0, 1]), // a-b, a+b, c
    ratMat3([2, 0, 0, 0, 2, 0, 0, 0, 2]),
    ratMat3([0, 1, 1, 1, 0, 1, 1, 1, 0]),
  ];
  for (;;) {
    const start = starts[integer(random, 0, random() < 0.8 ? 1 : starts.length - 1)]!;
    const d = [2, 3, 4, 6, 8, 12, 24, 7, 10][integer(random, 0, 8)]!;
    const p = ratVec3([integer(random, -d, d), integer(random, -d, d), integer(random, -d, d)], d);
    const t = { P: multiplyRatMat(start, randomUnimodular(random)), p };
    const operations = inSetting(group, t);
    if (operations) return { t, operations };
  }
}

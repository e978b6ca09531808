import { apply, IDENTITY, type IntMat3, lcm, mod, multiply, ratVec3 } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import { compose, IDENTITY_OPERATION, type Operation, operationKey, reduce } from "./operation.ts";

/** More operations than any crystal lists, a 4 x 4 x 4 cell of a face-centred cubic group included. */
export const LARGEST_GROUP = 192 * 64;

/** Entries of rotation parts beyond this mark an endless group; far below it lie those of any basis in use. */
const LARGEST_ENTRY = 1e6;
/** Up to here the sums of three products of such an entry and a translation stay exact. */
const LARGEST_DENOMINATOR = Math.floor(Number.MAX_SAFE_INTEGER / (3 * LARGEST_ENTRY));

/** An operation by the index of its rotation part, and its translation over the common denominator, in [0, d). */
interface Member {
  readonly r: number;
  readonly w: readonly [number, number, number];
}

/**
 * All operations, modulo the lattice Z^3, of the group that the given ones generate; translations in [0, 1), the
 * identity first, the given ones in their order next. One common denominator serves the whole group.
 * @throws InputProblem `operations-endless` if the translations have no common denominator, or if the group has more
 * members than the limit, so no finite group
 */
export function closeGroup(generators: readonly Operation[], limit: number = LARGEST_GROUP): Operation[] {
  const d = commonDenominator(generators);
  const rotations = new RotationTable(limit);
  const identity: Member = { r: rotations.add(IDENTITY), w: [0, 0, 0] };
  const given = generators.map((g) => memberOf(g, d, rotations));
  const found = new Map<number | string, Member>();
  const insert = (m: Member) => {
    const k = keyOf(m, d);
    if (found.has(k)) return;
    if (found.size >= limit) throw endless(limit);
    found.set(k, m);
  };
  for (const m of [identity, ...given]) insert(m);
  const chosen: Member[] = [];
  let spanned = new Set<number | string>([keyOf(identity, d)]);
  for (const g of given) {
    if (spanned.has(keyOf(g, d))) continue;
    chosen.push(g);
    spanned = span(identity, chosen, d, rotations, insert);
  }
  return [...found.values()].map((m) => ({ W: rotations.at(m.r), w: ratVec3(m.w, d) }));
}

function commonDenominator(operations: readonly Operation[]): number {
  const d = operations.reduce((m, g) => Math.min(lcm(m, g.w.d), LARGEST_DENOMINATOR + 1), 1);
  if (d <= LARGEST_DENOMINATOR) return d;
  throw new InputProblem(
    "operations-endless",
    `the translations of the operations have no common denominator up to ${LARGEST_DENOMINATOR}`,
    null,
    "look for a misprint in the fractions of the operations",
  );
}

/** Right products by the chosen generators, from the identity outwards, until nothing new appears. */
function span(
  identity: Member,
  chosen: readonly Member[],
  d: number,
  rotations: RotationTable,
  insert: (m: Member) => void,
): Set<number | string> {
  const spanned = new Set<number | string>([keyOf(identity, d)]);
  const queue = [identity];
  for (let i = 0; i < queue.length; i++) {
    for (const g of chosen) {
      const a = queue[i]!;
      const v = apply(rotations.at(a.r), g.w);
      const w = [mod(v[0] + a.w[0], d), mod(v[1] + a.w[1], d), mod(v[2] + a.w[2], d)] as const;
      const product: Member = { r: rotations.product(a.r, g.r), w };
      const k = keyOf(product, d);
      if (spanned.has(k)) continue;
      insert(product);
      spanned.add(k);
      queue.push(product);
    }
  }
  return spanned;
}

function memberOf(g: Operation, d: number, rotations: RotationTable): Member {
  const f = d / g.w.d;
  return { r: rotations.add(g.W), w: [mod(g.w.n[0] * f, d), mod(g.w.n[1] * f, d), mod(g.w.n[2] * f, d)] };
}

/** Largest denominator whose cube, times the number of rotation parts, is still a safe integer. */
const LARGEST_PACKED = 8192;

function keyOf({ r, w }: Member, d: number): number | string {
  return d <= LARGEST_PACKED ? ((r * d + w[0]) * d + w[1]) * d + w[2] : `${r}|${w.join()}`;
}

/** Rotation parts by index, with their products worked out once. */
class RotationTable {
  private readonly limit: number;
  private readonly matrices: IntMat3[] = [];
  private readonly index = new Map<string, number>();
  private readonly products: number[][] = [];

  constructor(limit: number) {
    this.limit = limit;
  }

  add(W: IntMat3): number {
    const k = W.join();
    const known = this.index.get(k);
    if (known !== undefined) return known;
    if (this.matrices.length >= this.limit || W.some((e) => Math.abs(e) > LARGEST_ENTRY)) throw endless(this.limit);
    this.index.set(k, this.matrices.length);
    this.products.push([]);
    return this.matrices.push(W) - 1;
  }

  at(r: number): IntMat3 {
    return this.matrices[r]!;
  }

  product(a: number, b: number): number {
    const row = this.products[a]!;
    row[b] ??= this.add(multiply(this.at(a), this.at(b)));
    return row[b];
  }
}

function endless(limit: number): InputProblem {
  return new InputProblem(
    "operations-endless",
    `the operations generate more than ${limit} others, so they belong to no space group in this cell`,
    null,
    "look for a wrong letter or sign in the list of operations",
  );
}

/** Two operations of a list whose product the list lacks. */
export interface MissingProduct {
  readonly first: Operation;
  readonly second: Operation;
  readonly product: Operation;
}

/** The first missing product of a list that should be a group modulo the lattice, or null if it is one. */
export function missingProduct(operations: readonly Operation[]): MissingProduct | null {
  const keys = new Set(operations.map((a) => operationKey(reduce(a))));
  if (!keys.has(operationKey(IDENTITY_OPERATION))) {
    return { first: IDENTITY_OPERATION, second: IDENTITY_OPERATION, product: IDENTITY_OPERATION };
  }
  for (const first of operations) {
    for (const second of operations) {
      const product = reduce(compose(first, second));
      if (!keys.has(operationKey(product))) return { first, second, product };
    }
  }
  return null;
}

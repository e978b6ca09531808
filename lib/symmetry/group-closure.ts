import { apply, IDENTITY, type IntMat3, lcm, mod, multiply, ratVec3 } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import { compose, IDENTITY_OPERATION, type Operation, operationKey, reduce } from "./operation.ts";

/** More operations than any crystal lists, a 4 x 4 x 4 cell of a face-centred cubic group included. */
export const LARGEST_GROUP = 192 * 64;

interface Member {
  readonly W: IntMat3;
  readonly w: readonly [number, number, number]; // over the common denominator
}

/**
 * All operations, modulo the lattice Z^3, of the group that the given ones generate; translations in [0, 1), the
 * identity first, the given ones in their order next. One common denominator serves the whole group.
 * @throws InputProblem `operations-endless` if the group has more than LARGEST_GROUP members, so no finite group
 */
export function closeGroup(generators: readonly Operation[], limit: number = LARGEST_GROUP): Operation[] {
  const d = generators.reduce((m, g) => lcm(m, g.w.d), 1);
  const given = generators.map((g) => member(g, d));
  const found = new Map<string, Member>();
  const insert = (m: Member) => {
    const k = key(m);
    if (found.has(k)) return;
    if (found.size >= limit) throw endless(limit);
    found.set(k, m);
  };
  insert({ W: IDENTITY, w: [0, 0, 0] });
  for (const g of given) insert(g);
  const chosen: Member[] = [];
  const spanned = new Set<string>([key({ W: IDENTITY, w: [0, 0, 0] })]);
  for (const g of given) {
    if (spanned.has(key(g))) continue;
    chosen.push(g);
    span(spanned, chosen, d, insert);
  }
  return [...found.values()].map((m) => ({ W: m.W, w: ratVec3(m.w, d) }));
}

/** Right products by the chosen generators, from the identity outwards, until nothing new appears. */
function span(spanned: Set<string>, chosen: readonly Member[], d: number, insert: (m: Member) => void): void {
  spanned.clear();
  const identity: Member = { W: IDENTITY, w: [0, 0, 0] };
  spanned.add(key(identity));
  const queue = [identity];
  for (let i = 0; i < queue.length; i++) {
    for (const g of chosen) {
      const product = times(queue[i]!, g, d);
      const k = key(product);
      if (spanned.has(k)) continue;
      insert(product);
      spanned.add(k);
      queue.push(product);
    }
  }
}

function member(g: Operation, d: number): Member {
  const f = d / g.w.d;
  return { W: g.W, w: [mod(g.w.n[0] * f, d), mod(g.w.n[1] * f, d), mod(g.w.n[2] * f, d)] };
}

function times(a: Member, b: Member, d: number): Member {
  const v = apply(a.W, b.w);
  return { W: multiply(a.W, b.W), w: [mod(v[0] + a.w[0], d), mod(v[1] + a.w[1], d), mod(v[2] + a.w[2], d)] };
}

function key(m: Member): string {
  return `${m.W.join()}|${m.w.join()}`;
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

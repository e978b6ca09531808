import {
  apply,
  equal,
  IDENTITY,
  type IntMat3,
  type IntVec3,
  mod,
  multiply,
  type RatVec3,
  ratVec3,
} from "../algebra/index.ts";
import { type ArithmeticClass, arithmeticClassOf } from "./arithmetic-class.ts";
import { primitiveBasis } from "./centring.ts";
import type { Operation } from "./operation.ts";
import type { SpaceGroup } from "./space-group.ts";

const cache: SpaceGroup[] = [];

/**
 * The space group of type `number` (1 to 230) in its reference setting. Its representatives come in the order in which
 * International Tables number the coordinate triplets of the general position; its operations repeat that list for
 * every centring. Built on first use.
 * @throws RangeError outside 1 to 230
 */
export function referenceGroup(number: number): SpaceGroup {
  const known = cache[number];
  if (known) return known;
  const parent = arithmeticClassOf(number);
  const representatives = compose(parent, number);
  const centrings = referenceCentrings(parent.centring);
  const operations = centrings.flatMap((t) => representatives.map((r) => translate(r, t)));
  const fresh: SpaceGroup = { operations, centrings, representatives, primitive: primitiveBasis(centrings) };
  cache[number] = fresh;
  return fresh;
}

/** Centring translations of the conventional cells used in the reference settings; R is obverse. */
export function referenceCentrings(letter: ArithmeticClass["centring"]): RatVec3[] {
  return CENTRINGS[letter].map((n) => ratVec3(n, 6));
}

const CENTRINGS: Readonly<Record<ArithmeticClass["centring"], readonly IntVec3[]>> = {
  P: [[0, 0, 0]],
  A: [
    [0, 0, 0],
    [0, 3, 3],
  ],
  C: [
    [0, 0, 0],
    [3, 3, 0],
  ],
  I: [
    [0, 0, 0],
    [3, 3, 3],
  ],
  F: [
    [0, 0, 0],
    [0, 3, 3],
    [3, 0, 3],
    [3, 3, 0],
  ],
  R: [
    [0, 0, 0],
    [4, 2, 2],
    [2, 4, 4],
  ],
};

interface Twelfths {
  readonly W: IntMat3;
  readonly w: IntVec3;
}

/** Each generator g in turn doubles or trebles the list so far: L, gL, ggL. */
function compose(parent: ArithmeticClass, number: number): Operation[] {
  const type = parent.types.find((t) => t.number === number)!;
  let list: Twelfths[] = [{ W: IDENTITY, w: [0, 0, 0] }];
  parent.generators.forEach((W, i) => {
    const g: Twelfths = { W, w: type.translations[i]! };
    const before = list;
    for (let power = g; !before.some((a) => equal(a.W, power.W)); power = times(g, power)) {
      list = [...list, ...before.map((a) => times(power, a))];
    }
  });
  return list.map(({ W, w }) => ({ W, w: ratVec3(w, 12) }));
}

function times(a: Twelfths, b: Twelfths): Twelfths {
  const v = apply(a.W, b.w);
  return { W: multiply(a.W, b.W), w: [mod(v[0] + a.w[0], 12), mod(v[1] + a.w[1], 12), mod(v[2] + a.w[2], 12)] };
}

function translate(a: Operation, t: RatVec3): Operation {
  const k = 12 / a.w.d;
  const m = 12 / t.d;
  const at = (i: number) => mod(a.w.n[i]! * k + t.n[i]! * m, 12);
  return { W: a.W, w: ratVec3([at(0), at(1), at(2)], 12) };
}

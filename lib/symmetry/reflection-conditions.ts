import { equal, gcd, IDENTITY, type IntVec3, lcm, mod, type RatVec3 } from "../algebra/index.ts";
import {
  type Congruence,
  congruencesOf,
  formatCongruences,
  generated,
  holds,
  type Residues,
  reduced,
} from "./congruence.ts";
import { causeOf } from "./extinction-cause.ts";
import { signedOrder } from "./geometric-class.ts";
import type { Operation } from "./operation.ts";
import { coordinatesIn, type Stratum, strataOf } from "./reciprocal-strata.ts";
import type { SpaceGroup } from "./space-group.ts";

/** A condition that reflections of a class must meet to be present. */
export interface ReflectionCondition {
  /** `h0l`; on hexagonal axes `hh(-2h)l`. */
  readonly reflections: string;
  /** `l=2n`; `k+l=4n, k,l=2n`; alternatives joined by `or`. */
  readonly condition: string;
  /** What brings it about: `glide plane c: x,-y+1/2,z+1/2`. */
  readonly cause: string;
  /** True where conditions on wider classes say as much. */
  readonly implied: boolean;
  readonly stratum: Stratum;
  /** The reflection is present where all congruences of one of these lists hold for its free letters. */
  readonly alternatives: readonly (readonly Congruence[])[];
}

/**
 * General reflection conditions of a group in its own cell, for one of each set of equivalent classes of reflections,
 * those included that follow from conditions on wider classes (`implied`). Exact; independent of the origin.
 * Source: International Tables for Crystallography A (2016), section 2.1.3.13; a reflection with h W = h is absent
 * where h . w is no integer.
 */
export function reflectionConditions(group: SpaceGroup): ReflectionCondition[] {
  const conditions: ReflectionCondition[] = [];
  for (const stratum of strataOf(group)) {
    const fixing = group.operations.filter((a) => stratum.basis.every((h) => fixes(a, h)));
    const N = commonDenominator(stratum, fixing);
    const size = stratum.basis.length;
    const wider = fixing.filter((a) => fixedDimension(a) > size);
    const known = generated(
      wider.map((a) => characterOn(stratum, a, N)),
      N,
      size,
    );
    const all = generated(
      fixing.map((a) => characterOn(stratum, a, N)),
      N,
      size,
    );
    if (all.length === 1) continue;
    const congruences = congruencesOf(all, N, []);
    const implied = known.length === all.length;
    conditions.push({
      reflections: stratum.name,
      condition: formatCongruences(congruences, stratum.letters),
      cause: causeOf(culprit(implied ? wider : fixing, stratum, implied ? [] : known, N), group),
      implied,
      stratum,
      alternatives: [congruences],
    });
  }
  return conditions;
}

/** The conditions that do not follow from one another, as a list to check or to print short. */
export function independentConditions(conditions: readonly ReflectionCondition[]): ReflectionCondition[] {
  return conditions.filter((c) => !c.implied);
}

/** Characters on a class of reflections, over N. */
export interface Characters {
  readonly characters: readonly Residues[];
  readonly N: number;
}

const cache = new WeakMap<SpaceGroup, Map<string, Characters>>();

/** The characters that are trivial on every reflection of the class that the general conditions leave; kept. */
export function generalCharacters(group: SpaceGroup, stratum: Stratum): Characters {
  const byClass = cache.get(group) ?? new Map<string, Characters>();
  cache.set(group, byClass);
  const known = byClass.get(stratum.key);
  if (known) return known;
  const fixing = group.operations.filter((a) => stratum.basis.every((h) => fixes(a, h)));
  const N = commonDenominator(stratum, fixing);
  const own = fixing.map((a) => characterOn(stratum, a, N));
  const fresh = { characters: generated(own, N, stratum.basis.length), N };
  byClass.set(stratum.key, fresh);
  return fresh;
}

/** Whether a reflection is absent for every structure with this group; straight from the operations. */
export function isSystematicallyAbsent(operations: readonly Operation[], h: IntVec3): boolean {
  return operations.some((a) => fixes(a, h) && mod(h[0] * a.w.n[0] + h[1] * a.w.n[1] + h[2] * a.w.n[2], a.w.d) !== 0);
}

/** Whether a reflection meets the conditions, those on classes equivalent to the named ones included. */
export function meetsConditions(
  conditions: readonly Pick<ReflectionCondition, "stratum" | "alternatives">[],
  group: SpaceGroup,
  h: IntVec3,
): boolean {
  return group.representatives.every(({ W }) => {
    const image: IntVec3 = [
      h[0] * W[0] + h[1] * W[3] + h[2] * W[6],
      h[0] * W[1] + h[1] * W[4] + h[2] * W[7],
      h[0] * W[2] + h[1] * W[5] + h[2] * W[8],
    ];
    return conditions.every(({ stratum, alternatives }) => {
      const m = coordinatesIn(stratum, image);
      return m === null || alternatives.some((list) => list.every((c) => holds(c, m)));
    });
  });
}

function fixes({ W }: Operation, [h, k, l]: IntVec3): boolean {
  return (
    h * W[0] + k * W[3] + l * W[6] === h && h * W[1] + k * W[4] + l * W[7] === k && h * W[2] + k * W[5] + l * W[8] === l
  );
}

/** Dimension of the reflections that the rotation part fixes: 3 for 1, 2 for m, 1 for a rotation, else 0. */
function fixedDimension({ W }: Operation): number {
  if (equal(W, IDENTITY)) return 3;
  const order = signedOrder(W);
  return order > 0 ? 1 : order === -2 ? 2 : 0;
}

/** h . w on the basis of the class, over N. */
function characterOn({ basis }: Stratum, { w }: Operation, N: number): Residues {
  return basis.map((h) => mod((along(h, w) * N) / w.d, N));
}

function along(h: IntVec3, w: RatVec3): number {
  return h[0] * w.n[0] + h[1] * w.n[1] + h[2] * w.n[2];
}

/** Of all h . w: they do not depend on the origin, so that an odd one (333/1000) does not count here. */
function commonDenominator({ basis }: Stratum, fixing: readonly Operation[]): number {
  return fixing.reduce((m, { w }) => basis.reduce((n, h) => lcm(n, w.d / gcd(w.d, along(h, w))), m), 1);
}

/** The operation that says most beyond what is known, of the class itself before those of wider ones. */
function culprit(fixing: readonly Operation[], stratum: Stratum, known: readonly Residues[], N: number): Operation {
  const trivial = new Set(known.map((c) => c.join()));
  const size = stratum.basis.length;
  trivial.add(new Array<number>(size).fill(0).join());
  const candidates = fixing.filter((a) => !trivial.has(characterOn(stratum, a, N).join()));
  const order = (a: Operation) => reduced(characterOn(stratum, a, N), N).modulus;
  const steps = (a: Operation) => a.w.n.filter((e) => e !== 0).length + (a.w.n[0] + a.w.n[1] + a.w.n[2]) / (4 * a.w.d);
  const distance = (a: Operation) => Math.abs(fixedDimension(a) - size);
  const sorted = [...candidates].sort(
    (a, b) => distance(a) - distance(b) || order(b) - order(a) || steps(a) - steps(b),
  );
  return sorted[0]!;
}

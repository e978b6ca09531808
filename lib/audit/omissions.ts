import { equal, IDENTITY, type IntMat3, type IntVec3, negate, type RatVec3 } from "../algebra/index.ts";
import type { Metric } from "../structure/index.ts";
import { isForbidden } from "./lattice-centring.ts";
import { indexKey, largestKey } from "./merge-reflections.ts";
import { inverseSquareSpacing, keepsReflection, type Observation } from "./observations.ts";

/** Reflections that the same rotations keep: a zone or a row, up to equivalence. */
interface SpecialClass {
  readonly listed: IntVec3[];
  /** Within the resolution of the list, but not in it. */
  readonly unlisted: IntVec3[];
}

/** Fewer unlisted reflections are chance. */
const FEWEST_UNLISTED = 3;
/** Share of the others that must be listed, and the most that counts, since no list is complete for sure. */
const SHARE = { least: 0.5, most: 0.9 } as const;
/** However many are left out, what that says is bounded: odds of e^10. */
const MOST_EVIDENCE = 10;

/** A list with more indices within its resolution than this is no list of a crystal of this cell; its gaps say nothing. */
const LARGEST_BOX = 1e7;

/** Special reflections of the lattice up to the resolution of a list, by class. */
export function specialClasses(
  list: readonly Observation[],
  metric: Metric,
  rotations: readonly IntMat3[],
  centrings: readonly RatVec3[],
): SpecialClass[] {
  const matrices = [...rotations, ...rotations.map(negate)];
  const others = matrices.filter((W) => !equal(W, IDENTITY));
  const known = new Set(list.map((r) => indexKey(r.h[0], r.h[1], r.h[2])));
  const farthest = list.reduce((x, r) => Math.max(x, r.x), 0);
  // |h| = |h . a| is at most a / d
  const { a, b, c } = metric.cell;
  const [H, K, L] = [a, b, c].map((e) => Math.floor(e * Math.sqrt(farthest))) as [number, number, number];
  if (H * K * L > LARGEST_BOX) return [];
  const classes = new Map<string, SpecialClass>();
  for (let h = -H; h <= H; h++) {
    for (let k = -K; k <= K; k++) {
      for (let l = 0; l <= L; l++) {
        const index: IntVec3 = [h, k, l];
        if (!others.some((W) => keepsReflection(W, index)) || (h === 0 && k === 0 && l === 0)) continue;
        const key = indexKey(h, k, l);
        if (key !== largestKey(index, matrices) || inverseSquareSpacing(metric, index) > farthest) continue;
        if (centrings.some((t) => isForbidden(t, index))) continue;
        const name = others.flatMap((W, i) => (keepsReflection(W, index) ? [i] : [])).join();
        const found = classes.get(name) ?? { listed: [], unlisted: [] };
        classes.set(name, found);
        (known.has(key) ? found.listed : found.unlisted).push(index);
      }
    }
  }
  return [...classes.values()];
}

/**
 * What the gaps of a list say for a group: where it lists most of a class but none of the reflections that the group
 * forbids, these have been left out as forbidden. Natural logarithm of the odds, 0 or positive.
 */
export function omissionEvidence(classes: readonly SpecialClass[], isAbsent: (h: IntVec3) => boolean): number {
  let sum = 0;
  for (const { listed, unlisted } of classes) {
    if (listed.some(isAbsent)) continue;
    const gone = unlisted.filter(isAbsent).length;
    const share = listed.length / (listed.length + unlisted.length - gone);
    if (gone < FEWEST_UNLISTED || !(share >= SHARE.least)) continue;
    sum += Math.min(MOST_EVIDENCE, -gone * Math.log(1 - Math.min(share, SHARE.most)));
  }
  return sum;
}

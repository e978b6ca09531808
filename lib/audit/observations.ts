import { equal, IDENTITY, type IntMat3, type IntVec3, negate } from "../algebra/index.ts";
import type { Metric } from "../structure/index.ts";
import { average, meanIntensity } from "./mean-intensity.ts";
import { type Family, joinFamilies, type Merged, mergeFamily } from "./merge-reflections.ts";

/** A merged reflection beside what is usual at its resolution. */
export interface Observation extends Merged {
  readonly sigma: number;
  /** 1/d^2, per square angstrom. */
  readonly x: number;
  /** Mean intensity of the reflections in general position at this resolution. */
  readonly mean: number;
  /** Some rotation or reflection of the Laue class keeps it. */
  readonly special: boolean;
}

/** Uncertainty taken where a list gives none, as a share of the mean intensity. Dimensionless. */
export const ASSUMED_SIGMA = 0.05;

/** Fewer reflections in general position than this make no mean; all are used then. */
const FEWEST_GENERAL = 30;

/** 1/d^2 of a reflection, per square angstrom. */
export function inverseSquareSpacing({ toFractional: m }: Metric, [h, k, l]: IntVec3): number {
  const x = h * m[0] + k * m[3] + l * m[6];
  const y = h * m[1] + k * m[4] + l * m[7];
  const z = h * m[2] + k * m[5] + l * m[8];
  return x * x + y * y + z * z;
}

/**
 * Merges reflections in a Laue class and sets them beside the mean intensity at their resolution.
 * @param rotations of the point group or its Laue class
 * @param isAbsent reflections that take no part in the mean
 */
export function observe(
  families: readonly Family[],
  metric: Metric,
  rotations: readonly IntMat3[],
  isAbsent: (h: IntVec3) => boolean,
): Observation[] {
  const keeping = [...rotations, ...rotations.map(negate)].filter((W) => !equal(W, IDENTITY));
  const list = joinFamilies(families, rotations).map((family) => {
    const merged = mergeFamily(family);
    const special = keeping.some((W) => keepsReflection(W, merged.h));
    return { ...merged, x: inverseSquareSpacing(metric, merged.h), special };
  });
  const present = list.filter((r) => !isAbsent(r.h));
  const general = present.filter((r) => !r.special);
  const meanAt = meanIntensity(general.length >= FEWEST_GENERAL ? general : present);
  return list.map((r) => {
    const mean = meanAt(r.x);
    return { ...r, mean, sigma: r.sigma ?? ASSUMED_SIGMA * mean };
  });
}

/** h W = h. */
export function keepsReflection(W: IntMat3, [h, k, l]: IntVec3): boolean {
  return (
    h * W[0] + k * W[3] + l * W[6] === h && h * W[1] + k * W[4] + l * W[7] === k && h * W[2] + k * W[5] + l * W[8] === l
  );
}

/** Mean intensity over mean uncertainty. */
export function signalToNoise(list: readonly Observation[]): number {
  return average(list.map((r) => r.value)) / average(list.map((r) => r.sigma));
}

import { type IntMat3, type IntVec3, negate } from "../algebra/index.ts";
import type { Reflection } from "./reflection-list.ts";

/** Values measured for a reflection and its opposite. */
export interface Family {
  readonly h: IntVec3;
  /** F^2 */
  readonly values: readonly number[];
  /** Standard uncertainties of the values; null where the list lacks any. */
  readonly sigmas: readonly (number | null)[];
}

/** The mean of the equivalents of a reflection. */
export interface Merged {
  /** The equivalent that stands for all. */
  readonly h: IntVec3;
  /** Mean F^2. */
  readonly value: number;
  /** Standard uncertainty of the mean: by those of the values or by their scatter, whichever is larger; or null. */
  readonly sigma: number | null;
  readonly count: number;
}

/** Agreement of equivalents. */
export interface MergingFigures {
  /** Sum |I - <I>| / sum I over the reflections with more than one value; null where there is none of positive sum. */
  readonly rInt: number | null;
  /** Values that went into it. */
  readonly compared: number;
}

/** Values of the same reflection or its opposite put together. */
export function familiesOf(list: readonly Reflection[]): Family[] {
  const families = new Map<number, { h: IntVec3; values: number[]; sigmas: (number | null)[] }>();
  for (const { h, value, sigma } of list) {
    const key = Math.max(indexKey(h[0], h[1], h[2]), indexKey(-h[0], -h[1], -h[2]));
    let family = families.get(key);
    if (!family) {
      family = { h: indexOfKey(key), values: [], sigmas: [] };
      families.set(key, family);
    }
    family.values.push(value);
    family.sigmas.push(sigma);
  }
  return [...families.values()];
}

/** Families that rotation parts of a point group carry into one another, by the key of the one that stands for all. */
function orbitsOf(families: readonly Family[], rotations: readonly IntMat3[]): Map<number, Family[]> {
  const matrices = [...rotations, ...rotations.map(negate)];
  const orbits = new Map<number, Family[]>();
  for (const family of families) {
    const key = largestKey(family.h, matrices);
    const orbit = orbits.get(key);
    if (orbit) orbit.push(family);
    else orbits.set(key, [family]);
  }
  return orbits;
}

/** Equivalent families put together; opposites count as one anyway. */
export function joinFamilies(families: readonly Family[], rotations: readonly IntMat3[]): Family[] {
  return Array.from(orbitsOf(families, rotations), ([key, orbit]) => ({
    h: indexOfKey(key),
    values: orbit.length === 1 ? orbit[0]!.values : orbit.flatMap((f) => f.values),
    sigmas: orbit.length === 1 ? orbit[0]!.sigmas : orbit.flatMap((f) => f.sigmas),
  }));
}

export function mergeFamily({ h, values, sigmas }: Family): Merged {
  const n = values.length;
  const mean = values.reduce((s, v) => s + v, 0) / n;
  return { h, value: mean, sigma: sigmaOfMean(values, sigmas, mean), count: n };
}

/** Agreement of the equivalents under rotation parts of a point group. */
export function mergingFigures(families: readonly Family[], rotations: readonly IntMat3[]): MergingFigures {
  let [difference, sum, compared] = [0, 0, 0];
  for (const orbit of orbitsOf(families, rotations).values()) {
    let [n, total] = [0, 0];
    for (const { values } of orbit) {
      n += values.length;
      for (const value of values) total += value;
    }
    if (n < 2) continue;
    for (const { values } of orbit) for (const value of values) difference += Math.abs(value - total / n);
    sum += total;
    compared += n;
  }
  return { rInt: sum > 0 ? difference / sum : null, compared };
}

function sigmaOfMean(values: readonly number[], sigmas: readonly (number | null)[], mean: number): number | null {
  const n = values.length;
  let squares = 0;
  for (const sigma of sigmas) {
    if (sigma === null) return null;
    squares += sigma * sigma;
  }
  // the scatter of two values is no measure
  const scatter = n > 2 ? values.reduce((s, v) => s + (v - mean) ** 2, 0) * (n / (n - 1)) : 0;
  return Math.sqrt(Math.max(squares, scatter)) / n;
}

/** Indices lie within +-LIMIT. */
const LIMIT = 1 << 15;

/** A number that tells indices apart, larger for larger l, then k, then h. */
export function indexKey(h: number, k: number, l: number): number {
  return ((l + LIMIT) * 2 * LIMIT + (k + LIMIT)) * 2 * LIMIT + (h + LIMIT);
}

function indexOfKey(key: number): IntVec3 {
  const width = 2 * LIMIT;
  const [h, rest] = [key % width, Math.floor(key / width)];
  return [h - LIMIT, (rest % width) - LIMIT, Math.floor(rest / width) - LIMIT];
}

/** The largest key of the equivalents h W. */
export function largestKey([h, k, l]: IntVec3, matrices: readonly IntMat3[]): number {
  let largest = 0;
  for (const W of matrices) {
    const key = indexKey(
      h * W[0] + k * W[3] + l * W[6],
      h * W[1] + k * W[4] + l * W[7],
      h * W[2] + k * W[5] + l * W[8],
    );
    if (key > largest) largest = key;
  }
  return largest;
}

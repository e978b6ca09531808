import {
  add,
  equal,
  equalVectors,
  type IntMat3,
  lcm,
  type RatMat3,
  type RatVec3,
  ratMat3,
  ratVec3,
} from "../algebra/index.ts";
import { compose, IDENTITY_OPERATION, type Operation, type SpaceGroup, siteOperations } from "../symmetry/index.ts";
import { lengthOf, type Metric, planeReach, type Vec3 } from "./cell.ts";

/** Largest order of a point group of a lattice in three dimensions. */
const LARGEST_SITE_GROUP = 48;

/**
 * A point of a crystal with the operations that keep it. `operations` carry exact, unreduced translations, so that
 * each one fixes `point` as it stands. The fixed points of all of them are x' = projection x + offset for any x.
 */
export interface SiteSymmetry {
  readonly operations: readonly Operation[];
  readonly projection: RatMat3;
  readonly offset: RatVec3;
  /** The point given, carried onto the fixed points: their mean image. Fractional. */
  readonly point: Vec3;
  /** How far that moved it, angstrom. */
  readonly shift: number;
}

/**
 * Site-symmetry group of a point: the operations whose image lies within the tolerance of it, closed to a group. Where
 * they close to none (two centres within the tolerance, say), those that move the point most are left out.
 * @param x fractional coordinates
 * @param tolerance angstrom
 */
export function siteSymmetry(
  operations: readonly Operation[],
  metric: Metric,
  x: Vec3,
  tolerance: number,
): SiteSymmetry {
  const near = nearOperations(operations, metric, x, tolerance);
  let kept = longestWithoutTranslation(near);
  while (kept > 1) {
    const group = closeAround(near.slice(0, kept).map((n) => n.operation));
    if (group) {
      const site = snap(group, metric, x);
      if (site.shift <= tolerance) return site;
    }
    const worst = near[kept - 1]!.distance;
    // operations that move the point equally far stand or fall together
    while (kept > 1 && near[kept - 1]!.distance > worst - 1e-6) kept--;
  }
  return snap([near[0]!.operation], metric, x);
}

/** Length of the longest beginning in which no rotation part comes twice: twice would mean a translation. */
function longestWithoutTranslation(near: readonly NearOperation[]): number {
  for (let i = 1; i < near.length; i++) {
    for (let j = 0; j < i; j++) if (equal(near[i]!.operation.W, near[j]!.operation.W)) return i;
  }
  return near.length;
}

/** Site-symmetry group of a point given exactly: nothing is near but what coincides, and no length is needed. */
export function exactSiteSymmetry(group: SpaceGroup, point: RatVec3): SiteSymmetry {
  const operations = siteOperations(group, point);
  const { n, d } = point;
  return { operations, ...meanOperation(operations), point: [n[0] / d, n[1] / d, n[2] / d], shift: 0 };
}

interface NearOperation {
  readonly operation: Operation;
  readonly distance: number; // angstrom
}

function nearOperations(operations: readonly Operation[], metric: Metric, x: Vec3, tolerance: number): NearOperation[] {
  const near: NearOperation[] = [];
  const farthest = planeReach(metric, tolerance);
  const t: [number, number, number] = [0, 0, 0];
  const apart: [number, number, number] = [0, 0, 0];
  for (let k = 0; k < operations.length; k++) {
    const { W, w } = operations[k]!;
    let i = 0;
    for (; i < 3; i++) {
      const image = W[3 * i]! * x[0] + W[3 * i + 1]! * x[1] + W[3 * i + 2]! * x[2] + w.n[i]! / w.d;
      // Rounding finds the nearest lattice point only for short vectors; tolerances are short against a cell.
      t[i] = Math.round(x[i]! - image) + 0;
      apart[i] = image + t[i]! - x[i]!;
      if (Math.abs(apart[i]!) > farthest[i]!) break; // most are told off by their first coordinate
    }
    if (i < 3) continue;
    const distance = lengthOf(metric, apart);
    if (distance > tolerance) continue;
    const n = [w.n[0] + t[0] * w.d, w.n[1] + t[1] * w.d, w.n[2] + t[2] * w.d] as const;
    near.push({ operation: { W, w: { n, d: w.d } }, distance });
  }
  return near.sort((p, q) => p.distance - q.distance);
}

/** The number of operations whose image of a point lies within a distance of it, angstrom; the identity is one. */
export function countNear(operations: readonly Operation[], metric: Metric, x: Vec3, distance: number): number {
  return nearOperations(operations, metric, x, distance).length;
}

/**
 * The finite group of affine operations (not reduced modulo the lattice) that the given ones generate, the given ones
 * first, or null if there is none: if a translation or too many operations appear.
 */
function closeAround(given: readonly Operation[]): Operation[] | null {
  const members: Operation[] = [];
  const insert = (a: Operation): "known" | "new" | "impossible" => {
    for (let i = 0; i < members.length; i++) {
      if (equal(a.W, members[i]!.W)) return equalVectors(a.w, members[i]!.w) ? "known" : "impossible";
    }
    if (members.length >= LARGEST_SITE_GROUP) return "impossible";
    members.push(a);
    return "new";
  };
  for (const a of given) if (insert(a) === "impossible") return null;
  // A member that the earlier generators reach needs no products of its own.
  const generators: Operation[] = [];
  let reached: Operation[] = [IDENTITY_OPERATION];
  for (const a of given) {
    if (reached.some((b) => equal(a.W, b.W))) continue;
    generators.push(a);
    reached = [IDENTITY_OPERATION];
    for (let i = 0; i < reached.length; i++) {
      for (const g of generators) {
        const product = compose(reached[i]!, g);
        if (insert(product) === "impossible") return null;
        if (!reached.some((b) => equal(product.W, b.W))) reached.push(product);
      }
    }
  }
  return members;
}

function snap(group: readonly Operation[], metric: Metric, x: Vec3): SiteSymmetry {
  const { projection, offset } = meanOperation(group);
  const point =
    group.length === 1
      ? x
      : ([0, 1, 2].map(
          (i) =>
            (projection.n[3 * i]! * x[0] + projection.n[3 * i + 1]! * x[1] + projection.n[3 * i + 2]! * x[2]) /
              projection.d +
            offset.n[i]! / offset.d,
        ) as unknown as Vec3);
  const shift = lengthOf(metric, [point[0] - x[0], point[1] - x[1], point[2] - x[2]]);
  return { operations: group, projection, offset, point, shift };
}

function meanOperation(group: readonly Operation[]): { projection: RatMat3; offset: RatVec3 } {
  const W = group.map((a) => a.W).reduce((s: IntMat3, m) => add(s, m), [0, 0, 0, 0, 0, 0, 0, 0, 0]);
  const d = group.reduce((m, a) => lcm(m, a.w.d), 1);
  const w = [0, 1, 2].map((i) => group.reduce((s, a) => s + a.w.n[i]! * (d / a.w.d), 0)) as [number, number, number];
  return { projection: ratMat3(W, group.length), offset: ratVec3(w, d * group.length) };
}

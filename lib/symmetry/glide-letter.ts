import { equalVectors, modOne, type RatVec3, ratVec3, subtractVectors } from "../algebra/index.ts";
import type { PlaneLetter } from "./hermann-mauguin-symbol.ts";

/**
 * Orientation of a plane by its normal: one of the cell axes, a face diagonal a-b (or a+b), or on hexagonal axes a
 * direction such as a whose plane holds c but no second cell axis.
 */
export type PlaneNormal = 0 | 1 | 2 | "diagonal" | "oblique";

/**
 * Letters that may name a plane whose glide vector is g: more than one where centring translations in the plane make
 * glides equivalent, `e` first then. The glide vector counts modulo the lattice translations in the plane.
 * @param g glide vector, parallel to the plane, in the basis of the cell
 * @param centrings pure translations in [0, 1), 0 included
 * Source: International Tables for Crystallography A (2016), section 1.4.1 and table 2.1.2.1 (definitions).
 */
export function glideLetters(g: RatVec3, normal: PlaneNormal, centrings: readonly RatVec3[]): PlaneLetter[] {
  const same = (half: readonly [number, number, number]): boolean => {
    const rest = modOne(subtractVectors(g, ratVec3(half, 2)));
    return centrings.some((t) => equalVectors(t, rest));
  };
  if (same([0, 0, 0])) return ["m"];
  if (normal === "diagonal" || normal === "oblique") {
    if (same([0, 0, 1])) return ["c"];
    if (normal === "oblique") return [(2 * g.n[2]) % g.d === 0 && g.n[2] % g.d !== 0 ? "n" : "g"];
    return [same([1, 1, 1]) ? "n" : diagonalGlide(g)];
  }
  const [j, k] = [0, 1, 2].filter((i) => i !== normal) as [number, number];
  const half = (...axes: number[]) => [0, 1, 2].map((i) => (axes.includes(i) ? 1 : 0)) as [number, number, number];
  const simple = [j, k].filter((i) => same(half(i))).map((i) => "abc"[i] as PlaneLetter);
  if (simple.length === 2) return ["e", ...simple];
  if (simple.length === 1) return simple;
  if (same(half(j, k))) return ["n"];
  return [4 % g.d === 0 && odd(g, j) && odd(g, k) ? "d" : "g"];
}

/** True where component i is an odd number of quarters. */
function odd(g: RatVec3, i: number): boolean {
  return Math.abs((g.n[i]! * (4 / g.d)) % 2) === 1;
}

function diagonalGlide(g: RatVec3): PlaneLetter {
  const quarters = g.n.map((n) => Math.abs((n * 4) / g.d) % 4);
  if (quarters.some((q) => !Number.isInteger(q))) return "g";
  if (quarters[0]! % 2 === 0) return "g";
  if (quarters[2]! % 2 === 1) return "d";
  return quarters[2] === 0 ? "g1" : "g2";
}

import type { Vec3 } from "./cell.ts";
import { cross3, dot3, length3, minus3 } from "./rotation-fit.ts";

/** A quantity of some points in Cartesian coordinates, angstrom. */
export type Measure = (points: readonly Vec3[]) => number;

/** A value with its change by a small displacement of every point: per angstrom along x, y, z. */
export interface MeasuredValue {
  readonly value: number;
  readonly gradients: readonly Vec3[];
}

const DEGREES = 180 / Math.PI;

/** Distance of two points, angstrom. */
export const distance: Measure = ([a, b]) => length3(minus3(b!, a!));

/** Angle at the second of three points, degrees. */
export const angle: Measure = ([a, b, c]) => {
  const [u, v] = [minus3(a!, b!), minus3(c!, b!)];
  return Math.atan2(length3(cross3(u, v)), dot3(u, v)) * DEGREES;
};

/** Torsion angle of four points in (-180, 180], degrees; positive if the far bond is turned clockwise. */
export const torsion: Measure = ([a, b, c, d]) => {
  const [u, v, w] = [minus3(b!, a!), minus3(c!, b!), minus3(d!, c!)];
  const [p, q] = [cross3(u, v), cross3(v, w)];
  return Math.atan2(length3(v) * dot3(u, q), dot3(p, q)) * DEGREES;
};

/** Distance of two different points with its gradients. */
export function distanceOf(a: Vec3, b: Vec3): MeasuredValue {
  const d = minus3(b, a);
  const value = length3(d);
  return { value, gradients: [times(d, -1 / value), times(d, 1 / value)] };
}

/**
 * Angle a-b-c in degrees with its gradients. At exactly 0 or 180 degrees the angle has none: they are null, as no
 * displacement changes it to first order in both senses.
 */
export function angleOf(a: Vec3, b: Vec3, c: Vec3): { value: number; gradients: readonly Vec3[] | null } {
  const [u, v] = [minus3(a, b), minus3(c, b)];
  const n = cross3(u, v);
  const [lu, lv, ln] = [length3(u), length3(v), length3(n)];
  const value = Math.atan2(ln, dot3(u, v)) * DEGREES;
  if (ln < STRAIGHT * lu * lv) return { value, gradients: null };
  // each end moves the angle by going around b, in the plane of the three
  const ga = times(cross3(u, n), DEGREES / (lu * lu * ln));
  const gc = times(cross3(n, v), DEGREES / (lv * lv * ln));
  return { value, gradients: [ga, times(plus(ga, gc), -1), gc] };
}

/** Sine of an angle below which three atoms stand in a line. */
const STRAIGHT = 1e-6;

/**
 * Torsion a-b-c-d in degrees with its gradients; null where three atoms in a line leave it undefined.
 * Gradients: A. Blondel, M. Karplus, J. Comput. Chem. 17 (1996) 1132-1141 (from memory).
 */
export function torsionOf(a: Vec3, b: Vec3, c: Vec3, d: Vec3): MeasuredValue | null {
  const [f, g, h] = [minus3(a, b), minus3(b, c), minus3(d, c)];
  const [p, q] = [cross3(f, g), cross3(h, g)];
  const [pp, qq, lg] = [dot3(p, p), dot3(q, q), length3(g)];
  if (pp < STRAIGHT * dot3(f, f) * lg * lg || qq < STRAIGHT * dot3(h, h) * lg * lg) return null;
  const value = torsion([a, b, c, d]);
  const ga = times(p, (-lg / pp) * DEGREES);
  const gd = times(q, (lg / qq) * DEGREES);
  const s = plus(times(p, (dot3(f, g) / (pp * lg)) * DEGREES), times(q, (-dot3(h, g) / (qq * lg)) * DEGREES));
  return { value, gradients: [ga, minus3(s, ga), minus3(times(s, -1), gd), gd] };
}

export function times(v: Vec3, k: number): Vec3 {
  return [v[0] * k, v[1] * k, v[2] * k];
}

export function plus(a: Vec3, b: Vec3): Vec3 {
  return [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
}

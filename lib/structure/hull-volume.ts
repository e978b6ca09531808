import type { Vec3 } from "./cell.ts";
import { cross3, dot3, length3, minus3 } from "./rotation-fit.ts";

/** Corners this near the plane of a face lie in it; angstrom. */
const IN_FACE = 1e-6;

/** Volume of the convex hull of a few points about one inside or outside, cubic angstrom; 0 where they lie in a plane. */
export function hullVolume(points: readonly Vec3[]): number {
  let volume = 0;
  const origin = points[0];
  if (!origin) return 0;
  for (const { normal, corners } of facesOf(points)) {
    const height = dot3(normal, minus3(corners[0]!, origin));
    volume += (height * polygonArea(corners, normal)) / 3;
  }
  return volume;
}

interface HullFace {
  /** Outward, of length 1. */
  readonly normal: Vec3;
  readonly corners: readonly Vec3[];
}

/** By the triples of points that have all others on one side; each face from its first triple. */
function facesOf(points: readonly Vec3[]): HullFace[] {
  const faces: HullFace[] = [];
  const done = new Set<string>();
  for (let i = 0; i < points.length; i++) {
    for (let j = i + 1; j < points.length; j++) {
      for (let k = j + 1; k < points.length; k++) {
        const face = faceThrough(points, i, j, k);
        if (!face || done.has(face.key)) continue;
        done.add(face.key);
        faces.push(face);
      }
    }
  }
  return faces;
}

function faceThrough(points: readonly Vec3[], i: number, j: number, k: number): (HullFace & { key: string }) | null {
  const base = points[i]!;
  const n = cross3(minus3(points[j]!, base), minus3(points[k]!, base));
  const l = length3(n);
  if (l < IN_FACE) return null;
  const heights = points.map((p) => dot3(n, minus3(p, base)) / l);
  const above = heights.some((h) => h > IN_FACE);
  const below = heights.some((h) => h < -IN_FACE);
  if (above === below) return null; // cuts through, or all points lie in it
  const sign = above ? -1 : 1;
  const inside = points.flatMap((_, m) => (Math.abs(heights[m]!) <= IN_FACE ? [m] : []));
  return {
    key: inside.join(),
    normal: [(sign * n[0]) / l, (sign * n[1]) / l, (sign * n[2]) / l],
    corners: inside.map((m) => points[m]!),
  };
}

/** Area of the convex polygon of points in a plane, in any order. */
function polygonArea(corners: readonly Vec3[], normal: Vec3): number {
  const mean = [0, 1, 2].map((i) => corners.reduce((s, c) => s + c[i]!, 0) / corners.length) as unknown as Vec3;
  const spokes = corners.map((c) => minus3(c, mean));
  const first = spokes[0]!;
  const side = cross3(normal, first);
  const turn = (v: Vec3) => Math.atan2(dot3(v, side), dot3(v, first));
  const ordered = [...spokes].sort((a, b) => turn(a) - turn(b));
  return ordered.reduce((s, a, i) => s + dot3(normal, cross3(a, ordered[(i + 1) % ordered.length]!)) / 2, 0);
}

import type { Mat3, Vec3 } from "./cell.ts";

/** Steps of Newton's method at most; a multiple root, as of a mirrored body, converges by halves, to five digits. */
const MOST_STEPS = 200;

/**
 * The largest trace of R^T M over all rotations R, without R itself: the largest root of the characteristic polynomial of
 * Davenport's matrix, which has no cubic term.
 * @param bound at least that root
 * Source: D. L. Theobald, Acta Crystallographica A61 (2005) 478-480 (from memory).
 */
export function largestOverlap(m: Mat3, bound: number): number {
  const [a, b, c, d, e, f, g, h, i] = m;
  const squares = m.reduce((s, x) => s + x * x, 0);
  if (squares === 0) return 0;
  const c2 = -2 * squares;
  const c1 = -8 * (a * (e * i - f * h) - b * (d * i - f * g) + c * (d * h - e * g));
  const c0 = determinant4([
    [a + e + i, h - f, c - g, d - b],
    [h - f, a - e - i, b + d, c + g],
    [c - g, b + d, e - a - i, f + h],
    [d - b, c + g, f + h, i - a - e],
  ]);
  if (Math.abs(c1) < 1e-14 * squares ** 1.5) {
    return Math.sqrt(Math.max(0, (-c2 + Math.sqrt(Math.max(0, c2 * c2 - 4 * c0))) / 2));
  }
  let x = bound;
  for (let step = 0; step < MOST_STEPS; step++) {
    const square = x * x;
    const slope = 4 * x * square + 2 * c2 * x + c1;
    if (!(slope > 0)) break;
    const change = (square * square + c2 * square + c1 * x + c0) / slope;
    x -= change;
    if (!(change > 1e-14 * bound)) break;
  }
  return x;
}

function determinant4(m: readonly (readonly number[])[]): number {
  const minor = (r: readonly [number, number], p: number, q: number) =>
    m[r[0]]![p]! * m[r[1]]![q]! - m[r[0]]![q]! * m[r[1]]![p]!;
  const [top, low] = [[0, 1] as const, [2, 3] as const];
  return (
    minor(top, 0, 1) * minor(low, 2, 3) -
    minor(top, 0, 2) * minor(low, 1, 3) +
    minor(top, 0, 3) * minor(low, 1, 2) +
    minor(top, 1, 2) * minor(low, 0, 3) -
    minor(top, 1, 3) * minor(low, 0, 2) +
    minor(top, 2, 3) * minor(low, 0, 1)
  );
}

/** Points about their mean, the last of them the centre at the origin before, and their sum of squares. */
export interface CentredPoints {
  readonly points: readonly Vec3[];
  readonly squares: number;
}

/** Corners and centre of a polyhedron, moved so that their mean is the origin. */
export function centred(corners: readonly Vec3[]): CentredPoints {
  const n = corners.length + 1;
  const mean = [0, 1, 2].map((i) => corners.reduce((s, p) => s + p[i]!, 0) / n);
  const points = [...corners, [0, 0, 0] as const].map(
    (p) => p.map((e, i) => e - mean[i]!) as unknown as [number, number, number],
  );
  return { points, squares: points.reduce((s, p) => s + p[0] * p[0] + p[1] * p[1] + p[2] * p[2], 0) };
}

/** Sum over corners of q_k p_order(k)^T, the centres with each other. */
export function overlapMatrix(q: CentredPoints, p: CentredPoints, order: readonly number[]): Mat3 {
  const sum = new Array<number>(9).fill(0);
  const last = q.points.length - 1;
  for (let k = 0; k <= last; k++) {
    const a = q.points[k]!;
    const b = p.points[k === last ? last : order[k]!]!;
    for (let i = 0; i < 3; i++) {
      sum[3 * i]! += a[i]! * b[0];
      sum[3 * i + 1]! += a[i]! * b[1];
      sum[3 * i + 2]! += a[i]! * b[2];
    }
  }
  return sum as unknown as Mat3;
}

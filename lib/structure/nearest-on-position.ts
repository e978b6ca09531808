import type { PositionPoints } from "../symmetry/index.ts";
import { apply3, inverse3, lengthOf, type Mat3, type Metric, type Vec3 } from "./cell.ts";

/** A point of a Wyckoff position and how far it is from the one asked about, angstrom. */
export interface NearestPoint {
  readonly point: Vec3;
  readonly distance: number;
}

/** Whole numbers about the nearest that are tried for each row, since rounding finds the nearest only on square axes. */
const STEPS = [-1, 0, 1] as const;

/** The point nearest to x on any of the points, lines or planes of a position, in any cell. */
export function nearestOnPosition(position: readonly PositionPoints[], metric: Metric, x: Vec3): NearestPoint {
  let best: NearestPoint | null = null;
  const inverse = inverse3(metric.g);
  for (const points of position) {
    const found = nearestOn(points, metric, inverse, x);
    if (!best || found.distance < best.distance - 1e-9) best = found;
  }
  if (!best) throw new RangeError("a position without points");
  return best;
}

/** Orthogonal projection on F y = c + m for the whole numbers m that bring it nearest. */
function nearestOn({ F, c }: PositionPoints, metric: Metric, inverse: Mat3, x: Vec3): NearestPoint {
  const across = F.map((f) => apply3(inverse, f)); // the columns of G^-1 F^T
  const gram = F.map((f) => across.map((a) => f[0] * a[0] + f[1] * a[1] + f[2] * a[2]));
  const off = F.map((f, i) => f[0] * x[0] + f[1] * x[1] + f[2] * x[2] - c[i]!);
  let best: NearestPoint = { point: x, distance: F.length === 0 ? 0 : Number.POSITIVE_INFINITY };
  for (const m of aroundRounded(off)) {
    const weights = solved(
      gram,
      off.map((e, i) => e - m[i]!),
    );
    const move = [0, 1, 2].map((k) => across.reduce((s, a, i) => s + a[k]! * weights[i]!, 0)) as unknown as Vec3;
    const distance = lengthOf(metric, move);
    if (distance < best.distance - 1e-9) best = { point: [x[0] - move[0], x[1] - move[1], x[2] - move[2]], distance };
  }
  return best;
}

function aroundRounded(off: readonly number[]): number[][] {
  return off.reduce<number[][]>(
    (lists, e) => lists.flatMap((list) => STEPS.map((step) => [...list, Math.round(e) + step])),
    [[]],
  );
}

/** Solution of a positive definite system of up to three equations, by elimination. */
function solved(matrix: readonly (readonly number[])[], right: readonly number[]): number[] {
  const rows = matrix.map((row, i) => [...row, right[i]!]);
  const n = rows.length;
  for (let i = 0; i < n; i++) {
    for (let k = i + 1; k < n; k++) {
      const factor = rows[k]![i]! / rows[i]![i]!;
      for (let j = i; j <= n; j++) rows[k]![j]! -= factor * rows[i]![j]!;
    }
  }
  const out = new Array<number>(n).fill(0);
  for (let i = n - 1; i >= 0; i--) {
    const rest = out.reduce((s, e, j) => (j > i ? s - e * rows[i]![j]! : s), rows[i]![n]!);
    out[i] = rest / rows[i]![i]!;
  }
  return out;
}

import type { Body } from "./approximate-operations.ts";
import { apply3, type Mat3, type Vec3 } from "./cell.ts";
import { ROUNDING } from "./group-search.ts";
import { cross3, dot3, length3, minus3, unit3 } from "./rotation-fit.ts";
import { symmetricEigen } from "./symmetric-eigen.ts";

/** A body idealised to one line. */
export interface FittedLine {
  readonly schoenflies: "Cinfv" | "Dinfh";
  /** Unit vector in the frame of the body; every known matrix carries it onto itself or its opposite. */
  readonly axis: Vec3;
  /** The points on the line, and paired about the centre in Dinfh. */
  readonly idealised: readonly Vec3[];
  /** Per known matrix: whether it reverses the axis. */
  readonly reverses: readonly boolean[];
}

/**
 * The line through the centroid nearest to all points, kept by the given matrices, or null where a point lies farther
 * from its idealised place than the tolerance.
 * @param matrices orthogonal, carrying the body onto itself exactly
 * @param tolerance angstrom
 * @param highest whether Dinfh may be found, or Cinfv only
 */
export function fitLine(
  body: Body,
  matrices: readonly Mat3[],
  tolerance: number,
  highest: "Cinfv" | "Dinfh" = "Dinfh",
): FittedLine | null {
  const { points } = body;
  const axis = commonAxis(longAxis(points), matrices);
  if (!axis) return null;
  const onLine = points.map((p) => dot3(p, axis));
  const reverses = matrices.map((m) => dot3(apply3(m, axis), axis) < 0);
  const ends = highest === "Dinfh" ? paired(body, onLine) : null;
  const within = (places: readonly number[]) => {
    const idealised = places.map((t): Vec3 => [t * axis[0], t * axis[1], t * axis[2]]);
    return idealised.every((q, k) => length3(minus3(q, points[k]!)) <= Math.max(tolerance, ROUNDING))
      ? idealised
      : null;
  };
  const centred = ends && within(ends);
  if (centred) return { schoenflies: "Dinfh", axis, idealised: centred, reverses };
  const polar = reverses.includes(true) ? null : within(onLine);
  return polar && { schoenflies: "Cinfv", axis, idealised: polar, reverses };
}

function longAxis(points: readonly Vec3[]): Vec3 {
  const moments = [0, 1, 2].map((i) => [0, 1, 2].map((j) => points.reduce((s, p) => s + p[i]! * p[j]!, 0)));
  return symmetricEigen(moments).vectors[0] as unknown as Vec3;
}

/** The axis, corrected so that every matrix keeps it exactly up to its sense; null where one turns it away. */
function commonAxis(axis: Vec3, matrices: readonly Mat3[]): Vec3 | null {
  const sum = [0, 0, 0];
  for (const m of matrices) {
    const image = apply3(m, axis);
    const sense = dot3(image, axis) < 0 ? -1 : 1;
    for (let i = 0; i < 3; i++) sum[i]! += sense * image[i]!;
  }
  const mean = unit3(sum as unknown as Vec3);
  const kept = matrices.every((m) => length3(cross3(apply3(m, mean), mean)) < 1e-9);
  if (!kept) return null;
  const first = mean.find((e) => Math.abs(e) > 1e-9) ?? 1;
  return first < 0 ? [-mean[0] + 0, -mean[1] + 0, -mean[2] + 0] : mean;
}

/** Places on the line made symmetric about 0, null where the two halves hold different atoms. */
function paired({ kinds }: Body, places: readonly number[]): number[] | null {
  const order = places.map((_, k) => k).sort((a, b) => places[a]! - places[b]!);
  const out = [...places];
  for (let i = 0; i < order.length; i++) {
    const [k, j] = [order[i]!, order[order.length - 1 - i]!];
    if (kinds[k] !== kinds[j]) return null;
    out[k] = (places[k]! - places[j]!) / 2;
  }
  return out;
}

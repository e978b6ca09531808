import { apply3, type Mat3, type Vec3 } from "./cell.ts";
import {
  correlationMatrix,
  cross3,
  dot3,
  length3,
  minus3,
  multiplyColumns,
  nearestOrthogonal,
  unit3,
} from "./rotation-fit.ts";

/** A body of points about its centroid. */
export interface Body {
  /** Cartesian, angstrom, centroid at 0. */
  readonly points: readonly Vec3[];
  /** Per point; only points of one kind are carried onto each other. */
  readonly kinds: readonly string[];
}

/** An operation that carries a body nearly onto itself. */
export interface ApproximateOperation {
  /** Point k is carried next to point permutation[k]. */
  readonly permutation: readonly number[];
  readonly determinant: 1 | -1;
  /** Orthogonal, fitted to the points. */
  readonly matrix: Mat3;
  /** Largest distance between an image and its point, angstrom. */
  readonly misfit: number;
}

/** A string that two operations share exactly when permutation and determinant agree. */
export function operationId(permutation: readonly number[], determinant: number): string {
  return `${determinant} ${permutation.join(",")}`;
}

/** Rounds of matching and fitting; a permutation settles in two or three. */
const MOST_ROUNDS = 6;

/** Points that a rough rotation puts farther off than this, beyond the tolerance, have no partner; angstrom. */
const ROUGH_MATCH = 0.8;

/**
 * Every operation about the centroid that carries a body onto itself with no point farther off than a limit. A body
 * whose points do not lie on one line is held by two of them, so their possible images suffice as starting points; each
 * start is matched and fitted in turn until the permutation settles.
 * @param limit angstrom
 */
export function approximateOperations(body: Body, limit: number): ApproximateOperation[] {
  const found = new Map<string, ApproximateOperation>();
  const pair = referencePair(body, limit);
  if (!pair) return [];
  const { points } = body;
  const [a, b] = pair;
  const separation = length3(minus3(points[a]!, points[b]!));
  const second = mates(body, b, limit);
  for (const p of mates(body, a, limit)) {
    for (const q of second) {
      if (Math.abs(length3(minus3(points[p]!, points[q]!)) - separation) > 2 * limit) continue;
      for (const determinant of [1, -1] as const) {
        const start = matrixBetween([points[a]!, points[b]!], [points[p]!, points[q]!], determinant);
        const operation = start && settle(body, start, determinant, limit);
        if (operation) found.set(operationId(operation.permutation, determinant), operation);
      }
    }
  }
  return [...found.values()].sort((x, y) => x.misfit - y.misfit);
}

/** Points of the same kind at the same distance from the centre. */
function mates(body: Body, i: number, limit: number): number[] {
  const r = length3(body.points[i]!);
  return body.points.flatMap((x, j) =>
    body.kinds[j] === body.kinds[i] && Math.abs(length3(x) - r) <= limit ? [j] : [],
  );
}

/** Two points far from the centre and from one line with it, with few mates; null if the body is too small for it. */
function referencePair(body: Body, limit: number): [number, number] | null {
  const radii = body.points.map(length3);
  const most = radii.reduce((m, r) => Math.max(m, r), 0);
  const count = body.points.map((_, i) => mates(body, i, limit).length);
  const fewest = (candidates: readonly number[]) =>
    candidates.reduce<number | null>((best, i) => (best === null || count[i]! < count[best]! ? i : best), null);
  const far = radii.flatMap((r, i) => (r > 0.4 * most ? [i] : []));
  const a = fewest(far);
  if (a === null || most === 0) return null;
  const sine = (i: number) =>
    length3(cross3(body.points[a]!, body.points[i]!)) / Math.max(1e-12, radii[a]! * radii[i]!);
  const height = (i: number) => length3(cross3(body.points[a]!, body.points[i]!)) / radii[a]!;
  const tallest = radii.reduce((m, _, i) => Math.max(m, height(i)), 0);
  const b = fewest(radii.flatMap((_, i) => (height(i) > 0.4 * tallest && sine(i) > 0.3 ? [i] : [])));
  const fallback = radii.findIndex((_, i) => height(i) === tallest);
  return [a, b ?? fallback];
}

/** The orthogonal matrix that carries one pair of directions as nearly as possible onto another. */
function matrixBetween(from: readonly [Vec3, Vec3], to: readonly [Vec3, Vec3], determinant: 1 | -1): Mat3 | null {
  const f = triad(from);
  const t = triad(to);
  if (!f || !t) return null;
  return multiplyColumns([t[0], t[1], [determinant * t[2][0], determinant * t[2][1], determinant * t[2][2]]], f);
}

function triad([a, b]: readonly [Vec3, Vec3]): [Vec3, Vec3, Vec3] | null {
  const normal = cross3(a, b);
  if (length3(a) < 1e-6 || length3(normal) < 1e-6) return null;
  const x = unit3(a);
  const z = unit3(normal);
  return [x, cross3(z, x), z];
}

function settle(body: Body, start: Mat3, determinant: 1 | -1, limit: number): ApproximateOperation | null {
  const { points } = body;
  let matrix = start;
  let permutation: number[] | null = null;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const next = match(body, matrix, limit + ROUGH_MATCH);
    if (!next) return null;
    if (permutation?.every((e, k) => e === next[k])) break; // the matrix is fitted to it already
    permutation = next;
    matrix = nearestOrthogonal(
      correlationMatrix(points, (k) => points[next[k]!]!),
      determinant,
    );
  }
  const misfit = points.reduce(
    (worst, x, k) => Math.max(worst, length3(minus3(apply3(matrix, x), points[permutation![k]!]!))),
    0,
  );
  return misfit <= limit ? { permutation: permutation!, determinant, matrix, misfit } : null;
}

/** The nearest point of its kind for every image, null unless each point is met once. */
function match(body: Body, matrix: Mat3, reach: number): number[] | null {
  const { points, kinds } = body;
  const taken = new Uint8Array(points.length);
  const permutation: number[] = [];
  for (let k = 0; k < points.length; k++) {
    const image = apply3(matrix, points[k]!);
    let best = -1;
    let least = reach * reach;
    for (let j = 0; j < points.length; j++) {
      if (kinds[j] !== kinds[k]) continue;
      const d = minus3(image, points[j]!);
      const square = dot3(d, d);
      if (square < least) {
        least = square;
        best = j;
      }
    }
    if (best < 0 || taken[best]) return null;
    taken[best] = 1;
    permutation.push(best);
  }
  return permutation;
}

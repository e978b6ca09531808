import { apply, trace } from "../algebra/index.ts";
import { dot, MATRIX_TOLERANCE, type Matrix3, snap, unit, type Vector3 } from "./cartesian.ts";

const GOLDEN = (1 + Math.sqrt(5)) / 2;

/**
 * The matrix of an icosahedral rotation, x, y, z along twofold axes, with the sign of sqrt 5 changed in every entry.
 * @throws RangeError if an entry is not 0, 1/2, 1, g/2 or (g - 1)/2 up to sign, with g the golden ratio
 */
export function conjugateMatrix(R: Matrix3): Matrix3 {
  return R.map((entry) => {
    const size = Math.abs(entry);
    const s = Math.sign(entry);
    for (const rational of [0, 0.5, 1]) if (Math.abs(size - rational) < 1e-6) return s * rational + 0;
    if (Math.abs(size - GOLDEN / 2) < 1e-6) return (s * (1 - GOLDEN)) / 2;
    if (Math.abs(size - (GOLDEN - 1) / 2) < 1e-6) return (-s * GOLDEN) / 2;
    throw new RangeError(`not an entry of an icosahedral rotation: ${entry}`);
  }) as unknown as Matrix3;
}

/**
 * Matrices of G: the rotations permute the five sets of three perpendicular twofold axes, and G is what this
 * permutation holds besides the totally symmetric function. The first partner sets the axes x, y, z against the other
 * four; the others have the signs of x, y, z under the half turns about these axes.
 * @param rotations the 60 rotations (each may occur twice), x, y, z along twofold axes
 */
export function fourfoldMatrices(rotations: readonly Matrix3[]): number[][][] {
  const systems = axisSystems(rotations);
  const h = 0.5;
  const r = 1 / Math.sqrt(20);
  // systems[1] is moved to systems[2], [3], [4] by the half turns about x, y, z
  const partners = [
    [4 * r, -r, -r, -r, -r],
    [0, h, h, -h, -h],
    [0, h, -h, h, -h],
    [0, h, -h, -h, h],
  ];
  return rotations.map((R) => {
    const to = systems.map((system) => systems.findIndex((other) => holds(other, apply(R, system[0]!))));
    return partners.map((p) => partners.map((q) => snap(q.reduce((sum, value, j) => sum + p[to[j]!]! * value, 0))));
  });
}

/** Three perpendicular axes, up to their signs. */
type AxisSystem = readonly Vector3[];

/** The five sets of perpendicular twofold axes: x, y, z; the one a third of a turn about [111] keeps; its images. */
function axisSystems(rotations: readonly Matrix3[]): AxisSystem[] {
  const axes: Vector3[] = [];
  for (const R of rotations) {
    if (Math.abs(trace(R) + 1) > MATRIX_TOLERANCE) continue;
    const axis = halfTurnAxis(R);
    if (!axes.some((a) => sameAxis(a, axis))) axes.push(axis);
  }
  const system = (a: Vector3) => axes.filter((b) => sameAxis(a, b) || Math.abs(dot(a, b)) < MATRIX_TOLERANCE);
  const kept = axes.map(system).find((s) => {
    const turned = apply(THIRD_TURN, s[0]!);
    return s.every((a) => Math.max(...a.map(Math.abs)) < 0.9) && holds(s, turned);
  })!;
  return [system([1, 0, 0]), kept, ...HALF_TURNS.map((H) => system(apply(H, kept[0]!)))];
}

const THIRD_TURN: Matrix3 = [0, 0, 1, 1, 0, 0, 0, 1, 0];
const HALF_TURNS: readonly Matrix3[] = [
  [1, 0, 0, 0, -1, 0, 0, 0, -1],
  [-1, 0, 0, 0, 1, 0, 0, 0, -1],
  [-1, 0, 0, 0, -1, 0, 0, 0, 1],
];

/** Axis of a rotation by half a turn, R = 2 n n^T - 1. */
function halfTurnAxis(R: Matrix3): Vector3 {
  const k = [R[0], R[4], R[8]].reduce((best, e, i, list) => (e > list[best]! ? i : best), 0);
  return unit([R[k]! + (k === 0 ? 1 : 0), R[3 + k]! + (k === 1 ? 1 : 0), R[6 + k]! + (k === 2 ? 1 : 0)]);
}

function sameAxis(a: Vector3, b: Vector3): boolean {
  return Math.abs(Math.abs(dot(a, b)) - 1) < MATRIX_TOLERANCE;
}

function holds(system: AxisSystem, axis: Vector3): boolean {
  return system.some((a) => sameAxis(a, axis));
}

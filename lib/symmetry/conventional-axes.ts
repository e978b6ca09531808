import {
  determinant,
  equal,
  IDENTITY,
  type IntMat3,
  type IntVec3,
  integerNullspace,
  multiply,
  negate,
  trace,
  transpose,
} from "../algebra/index.ts";
import type { CrystalFamily } from "./geometric-class.ts";
import { axisOf, powerSum } from "./rotation-axis.ts";

/**
 * Axes of a conventional cell read off the rotation parts: columns of the result, in the basis that the rotation parts
 * use, right-handed in it. They are shortest lattice vectors along the symmetry directions of the family, settled up to
 * `axisChanges(family)`; for triclinic groups, the basis as it is.
 * @param rotations all rotation parts, integer in a primitive basis
 * @param metric a positive definite quadratic form in that basis (row-major) with which ties in a plane are broken; it
 * need not be invariant
 * Source: R. W. Grosse-Kunstleve, Acta Cryst. A55 (1999) 383 (axes from the rotation parts).
 */
export function conventionalAxes(rotations: readonly IntMat3[], family: CrystalFamily, metric: IntMat3): IntMat3 {
  const proper = rotations.map((W) => (determinant(W) > 0 ? W : negate(W)));
  switch (family) {
    case "triclinic":
      return IDENTITY;
    case "monoclinic":
      return monoclinicAxes(proper.find((R) => trace(R) === -1)!, averaged(rotations, metric));
    case "orthorhombic":
      return orthogonalAxes(proper.filter((R) => trace(R) === -1));
    case "cubic": {
      const fourfold = proper.filter((R) => trace(R) === 1).map((R) => multiply(R, R));
      return orthogonalAxes(fourfold.length > 0 ? fourfold : proper.filter((R) => trace(R) === -1));
    }
    case "tetragonal":
      return uniaxialAxes(proper.find((R) => trace(R) === 1)!, 4, averaged(rotations, metric));
    case "hexagonal":
      return uniaxialAxes(proper.find((R) => trace(R) === 0)!, 3, averaged(rotations, metric));
    default:
      return family satisfies never;
  }
}

/** The metric averaged over the group (times its order): invariant under every rotation part. */
function averaged(rotations: readonly IntMat3[], metric: IntMat3): IntMat3 {
  const sum = [0, 0, 0, 0, 0, 0, 0, 0, 0];
  for (const W of rotations) {
    const image = multiply(multiply(transpose(W), metric), W);
    for (let i = 0; i < 9; i++) sum[i]! += image[i]!;
  }
  return sum as unknown as IntMat3;
}

function monoclinicAxes(R: IntMat3, metric: IntMat3): IntMat3 {
  const b = axisOf(R, 2);
  const [a, c] = shortestPair(planeAcross(R, 2), metric);
  return rightHanded(a, b, c);
}

function orthogonalAxes(twofold: readonly IntMat3[]): IntMat3 {
  const distinct = twofold.filter((R, i) => twofold.findIndex((S) => equal(R, S)) === i);
  const [a, b, c] = distinct.map((R) => firstPositive(axisOf(R, 2)));
  return rightHanded(a!, b!, c!);
}

function uniaxialAxes(R: IntMat3, order: 3 | 4, metric: IntMat3): IntMat3 {
  const c = axisOf(R, order);
  const [a] = shortestPair(planeAcross(R, order), metric);
  const b: IntVec3 = [
    R[0] * a[0] + R[1] * a[1] + R[2] * a[2],
    R[3] * a[0] + R[4] * a[1] + R[5] * a[2],
    R[6] * a[0] + R[7] * a[1] + R[8] * a[2],
  ];
  return rightHanded(a, b, c);
}

/** Basis of the lattice vectors normal to the axis: those that 1 + R + ... + R^(n-1) destroys. */
function planeAcross(R: IntMat3, n: number): [IntVec3, IntVec3] {
  const sum = powerSum(R, n);
  const rows = [sum.slice(0, 3), sum.slice(3, 6), sum.slice(6, 9)];
  return integerNullspace(rows, 3) as unknown as [IntVec3, IntVec3];
}

/** A reduced basis of a plane lattice (Lagrange, Gauss): the shortest vector, and the shortest beside it. */
function shortestPair(basis: readonly [IntVec3, IntVec3], metric: IntMat3): [IntVec3, IntVec3] {
  const dot = (u: IntVec3, v: IntVec3) => {
    let sum = 0;
    for (let i = 0; i < 3; i++) for (let j = 0; j < 3; j++) sum += u[i]! * metric[3 * i + j]! * v[j]!;
    return sum;
  };
  let [u, v] = basis;
  for (;;) {
    if (dot(u, u) > dot(v, v)) [u, v] = [v, u];
    const k = Math.round(dot(u, v) / dot(u, u));
    if (k === 0) return [firstPositive(u), firstPositive(v)];
    v = [v[0] - k * u[0], v[1] - k * u[1], v[2] - k * u[2]];
  }
}

function firstPositive(v: IntVec3): IntVec3 {
  const first = v.find((e) => e !== 0) ?? 0;
  return first < 0 ? [-v[0] + 0, -v[1] + 0, -v[2] + 0] : v;
}

/** The three columns; the last is reversed where they would be left-handed. */
function rightHanded(a: IntVec3, b: IntVec3, c: IntVec3): IntMat3 {
  const m: IntMat3 = [a[0], b[0], c[0], a[1], b[1], c[1], a[2], b[2], c[2]];
  if (determinant(m) > 0) return m;
  return [a[0], b[0], -c[0] + 0, a[1], b[1], -c[1] + 0, a[2], b[2], -c[2] + 0];
}

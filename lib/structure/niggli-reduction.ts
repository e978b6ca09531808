import { equal, IDENTITY, type IntMat3, multiply } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import { changeAxes, gramOf, type LatticeAxes, shortenPairs, volumeOfAxes } from "./lattice-axes.ts";

/**
 * Terms of the metric tensor that differ by less than this times V^(2/3) count as equal: 0.0025 A in a length of 10 A, a
 * few s.u. of a measured cell, so that a cell given in rounded numbers reduces as the exact one does. Dimensionless.
 */
export const REDUCTION_EPSILON = 5e-4;
/**
 * The same for the first reduction: rounding of doubles, in a cell whose axes are some thousand times the shortest ones.
 * Terms that differ by just as much can make the steps go round in a circle; then the next number decides.
 */
const ROUNDINGS = [1e-8, 1e-10, 1e-6, 1e-12] as const;

/** A reduction after the first one takes some ten steps. */
const MOST_STEPS = 500;

/** A, B, C, xi, eta, zeta = a.a, b.b, c.c, 2 b.c, 2 a.c, 2 a.b; square angstrom. */
type Form = readonly [number, number, number, number, number, number];

/**
 * The unimodular matrix (determinant 1) that leads from the axes of a primitive cell to its Niggli cell,
 * (a', b', c') = (a, b, c) P. The lattice is reduced as it stands first, and from there with the tolerance, so that the
 * result does not depend on the axes given even where terms are nearly equal.
 * @param epsilon see REDUCTION_EPSILON
 * @throws InputProblem `cell-too-skew` where rounding of the axes outweighs the lattice
 * Sources: I. Krivy and B. Gruber, Acta Cryst. A32 (1976) 297 (steps); R. W. Grosse-Kunstleve, N. K. Sauter and
 * P. D. Adams, Acta Cryst. A60 (2004) 1 (comparison with a tolerance; the form taken afresh from the axes each time).
 */
export function niggliReduction(axes: LatticeAxes, epsilon: number = REDUCTION_EPSILON): IntMat3 {
  const first = shortenPairs(axes);
  const scale = volumeOfAxes(changeAxes(axes, first)) ** (2 / 3);
  let reduced: IntMat3 | null = null;
  for (const rounding of ROUNDINGS) reduced ??= descend(axes, first, rounding * scale);
  if (!reduced) {
    throw new InputProblem(
      "cell-too-skew",
      "the cell is so skew that rounding of its lengths and angles hides the lattice",
      null,
      "give the cell on shorter axes, or with more digits",
    );
  }
  return descend(axes, reduced, epsilon * scale) ?? reduced; // or in a circle, as above
}

function descend(axes: LatticeAxes, first: IntMat3, eps: number): IntMat3 | null {
  let P = first;
  for (let i = 0; i < MOST_STEPS; i++) {
    const step = nextStep(formOf(changeAxes(axes, P)), eps);
    if (!step) return P;
    P = multiply(P, step);
  }
  return null;
}

function formOf(axes: LatticeAxes): Form {
  const g = gramOf(axes);
  return [g[0], g[4], g[8], 2 * g[5], 2 * g[2], 2 * g[1]];
}

/** The first of the eight steps that applies, as the matrix it multiplies with; null for a Niggli form. */
function nextStep(form: Form, eps: number): IntMat3 | null {
  const [A, B, C, xi, eta, zeta] = form;
  const above = (x: number, y: number) => x > y + eps;
  const same = (x: number, y: number) => Math.abs(x - y) <= eps;
  if (above(A, B) || (same(A, B) && above(Math.abs(xi), Math.abs(eta)))) return [0, -1, 0, -1, 0, 0, 0, 0, -1];
  if (above(B, C) || (same(B, C) && above(Math.abs(eta), Math.abs(zeta)))) return [-1, 0, 0, 0, 0, -1, 0, -1, 0];
  const signs = signStep([xi, eta, zeta], eps);
  if (!equal(signs, IDENTITY)) return signs;
  const k = (x: number) => (x > 0 ? -1 : 1);
  if (above(Math.abs(xi), B) || (same(xi, B) && above(zeta, 2 * eta)) || (same(xi, -B) && above(0, zeta))) {
    return [1, 0, 0, 0, 1, k(xi), 0, 0, 1];
  }
  if (above(Math.abs(eta), A) || (same(eta, A) && above(zeta, 2 * xi)) || (same(eta, -A) && above(0, zeta))) {
    return [1, 0, k(eta), 0, 1, 0, 0, 0, 1];
  }
  if (above(Math.abs(zeta), A) || (same(zeta, A) && above(eta, 2 * xi)) || (same(zeta, -A) && above(0, eta))) {
    return [1, k(zeta), 0, 0, 1, 0, 0, 0, 1];
  }
  const sum = xi + eta + zeta + A + B;
  if (above(0, sum) || (same(sum, 0) && above(2 * (A + eta) + zeta, 0))) return [1, 0, 1, 0, 1, 1, 0, 0, 1];
  return null;
}

/** Steps 3 and 4: all three products made positive, or none of them; the identity where they are so. */
function signStep(products: readonly [number, number, number], eps: number): IntMat3 {
  const [i, j, k] = normalSigns(products, eps);
  return [i, 0, 0, 0, j, 0, 0, 0, k];
}

/**
 * Signs of three axes, of product 1, that make the products b.c, a.c, a.b all positive, or all zero or negative: which
 * of the two is decided by the lattice.
 */
export function normalSigns(products: readonly [number, number, number], eps: number): [number, number, number] {
  const sign = products.map((p) => (p > eps ? 1 : p < -eps ? -1 : 0));
  if (sign[0]! * sign[1]! * sign[2]! > 0) {
    const s = sign.map((e) => (e < 0 ? -1 : 1)) as [number, number, number];
    return s;
  }
  const s = sign.map((e) => (e > 0 ? -1 : 1)) as [number, number, number];
  if (s[0] * s[1] * s[2] < 0) s[sign.indexOf(0)] = -1;
  return s;
}

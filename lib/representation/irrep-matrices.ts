import { determinant, multiply, negate, transpose } from "../algebra/index.ts";
import { twiceCosine } from "./axial-characters.ts";
import { MATRIX_TOLERANCE, type Matrix3, snap } from "./cartesian.ts";
import type { CharacterTable } from "./character-table.ts";
import { conjugateMatrix, fourfoldMatrices } from "./icosahedral-matrices.ts";
import { fraction, type PlaneAction, planeAction } from "./molecular-element.ts";
import type { MolecularGroup } from "./molecular-group.ts";
import { matricesInOwnAxes } from "./own-axes.ts";
import type { PointGroup } from "./point-group.ts";

/** Square matrix as rows. */
export type Rows = readonly (readonly number[])[];

/**
 * Real orthogonal matrices of a species, one per element, D(g)D(h) = D(gh). Partners refer to the axes x, y, z of the
 * group (`group.axes`):
 * - E of a group with a principal axis: the rotation by the smallest angle a about z turns the first partner towards
 *   the second by k a (k of E_k), and lateral elements that keep or reverse x keep or reverse the first partner up to
 *   a common sign; so E_1 transforms like x, y as far as the group allows, E_2 like x2-y2, 2xy;
 * - E of cubic groups: 2z2-x2-y2 and sqrt3 (x2-y2); T like x, y, z (T1 of O) or yz, xz, xy (T2 of O);
 * - I: T1 like x, y, z; T2 the same with the sign of sqrt 5 changed; H like 2z2-x2-y2, sqrt3 (x2-y2), 2yz, 2xz, 2xy;
 *   G: one partner that T leaves alone, like xyz, and three like x, y, z under T.
 * Parity multiplies by the character of i.
 * @param irrep index of the species
 */
export function irrepMatrices(group: PointGroup | MolecularGroup, irrep: number): Rows[] {
  const species = group.irreps[irrep]!;
  const values = group.classOf.map((k) => species.characters[k]!);
  if (species.dimension === 1) return values.map((c) => [[c]]);
  const own = matricesInOwnAxes(group);
  if (!own) throw new RangeError(`${group.schoenflies} has no axes for a species of dimension ${species.dimension}`);
  if (group.irreps.every((r) => r.dimension < 3)) return planeMatrices(group, own, values);
  const rotations = own.map((M) => (determinant(M) > 0 ? M : negate(M)));
  for (const base of candidates(rotations, species.dimension)) {
    for (const factor of group.irreps.filter((r) => r.dimension === 1)) {
      const list = base.map((D, g) => scaled(D, factor.characters[group.classOf[g]!]!));
      if (list.every((D, g) => Math.abs(traceOf(D) - values[g]!) < MATRIX_TOLERANCE)) return list;
    }
  }
  throw new RangeError(`no matrices found for the species ${species.label} of ${group.schoenflies}`);
}

/** Matrices of the rotation parts to which a species belongs, up to a factor of dimension one. */
function candidates(rotations: readonly Matrix3[], dimension: number): Rows[][] {
  switch (dimension) {
    case 2:
      return [rotations.map((R) => quadraticMatrix(R, 2))];
    case 3: {
      const icosahedral = rotations.length % 60 === 0;
      const vector = rotations.map(rows);
      return icosahedral ? [vector, rotations.map((R) => rows(conjugateMatrix(R)))] : [vector];
    }
    case 4:
      return [fourfoldMatrices(rotations)];
    default:
      return [rotations.map((R) => quadraticMatrix(R, 5))];
  }
}

/** Orthonormal tensors 2z2-x2-y2, x2-y2, yz, xz, xy as flat symmetric 3x3 matrices. */
const [P, Q, S] = [1 / Math.sqrt(6), Math.SQRT1_2, Math.SQRT1_2];
const QUADRATICS: readonly Matrix3[] = [
  [-P, 0, 0, 0, -P, 0, 0, 0, 2 * P],
  [Q, 0, 0, 0, -Q, 0, 0, 0, 0],
  [0, 0, 0, 0, 0, S, 0, S, 0],
  [0, 0, S, 0, 0, 0, S, 0, 0],
  [0, S, 0, S, 0, 0, 0, 0, 0],
];

/** Action of a rotation on the first `size` quadratics. */
function quadraticMatrix(R: Matrix3, size: number): Rows {
  const images = QUADRATICS.slice(0, size).map((q) => multiply(multiply(R, q), transpose(R)));
  return QUADRATICS.slice(0, size).map((p) =>
    images.map((image) => snap(image.reduce((sum, e, k) => sum + e * p[k]!, 0))),
  );
}

/** E of a group with a principal axis along z. */
function planeMatrices(group: CharacterTable, own: readonly Matrix3[], values: readonly number[]): Rows[] {
  const actions = own.map((M) => planeAction(M, [1, 0, 0], [0, 1, 0], [0, 0, 1]));
  const principal = principalElement(actions);
  const n = Math.round(1 / actions[principal]!.part);
  for (const parity of [1, -1]) {
    for (let k = 1; k < 2 * n; k++) {
      // k mod n below n / 2: the principal element turns the first partner towards the second by less than half a turn
      if (2 * (k % n) >= n) continue;
      const list = actions.map((a) => turned(a, k, a.flips ? parity : 1));
      if (list.every((D, g) => Math.abs(traceOf(D) - values[g]!) < MATRIX_TOLERANCE)) return list;
    }
  }
  throw new RangeError(`no rotation of a plane has the characters ${group.classes.map((c) => c.name).join(" ")}`);
}

/** Smallest rotation about z; one that keeps z where the group holds the inversion or the horizontal plane. */
function principalElement(actions: readonly PlaneAction[]): number {
  const central = actions.some((a) => a.flips && !a.reflects && (a.part === 0 || Math.abs(a.part - 0.5) < 1e-9));
  let best = -1;
  actions.forEach((a, i) => {
    if (a.reflects || a.part === 0 || (central && a.flips)) return;
    if (best < 0 || a.part < actions[best]!.part) best = i;
  });
  return best;
}

/** Rotation by k times the turn of the element, or reflection at the line at k times half of it. */
function turned(a: PlaneAction, k: number, sign: number): Rows {
  const { k: j, of } = fraction(a.part);
  const c = (sign * twiceCosine(j * k, of)) / 2 + 0;
  const s = (sign * twiceCosine(4 * j * k + 3 * of, 4 * of)) / 2 + 0; // sine as the cosine a quarter of a turn before
  return a.reflects
    ? [
        [c, s],
        [s, -c + 0],
      ]
    : [
        [c, -s + 0],
        [s, c],
      ];
}

function rows(m: Matrix3): Rows {
  return [m.slice(0, 3), m.slice(3, 6), m.slice(6, 9)];
}

function scaled(D: Rows, k: number): Rows {
  return k === 1 ? D : D.map((row) => row.map((e) => e * k + 0));
}

function traceOf(D: Rows): number {
  return D.reduce((sum, row, i) => sum + row[i]!, 0);
}

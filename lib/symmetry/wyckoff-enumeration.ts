import { apply, type IntMat3, inverseUnimodular, lcm, mod, smithForm } from "../algebra/index.ts";
import { type AffineSubspace, dimension, directionsOf, imageOf, pointOf, subspace } from "./affine-subspace.ts";
import { type PrimitiveGroup, type PrimitiveOperation, primitiveGroup } from "./primitive-group.ts";
import type { SpaceGroup } from "./space-group.ts";

/** A Wyckoff position found from the operations alone: one orbit of fixed subspaces. */
export interface EnumeratedPosition {
  /** One subspace of the orbit, in the primitive coordinates of the group. */
  readonly representative: AffineSubspace;
  /** Keys of all subspaces of the orbit, modulo the lattice. */
  readonly keys: readonly string[];
  /** Indices, into `group.representatives`, of the operations that fix the representative point by point. */
  readonly stabiliser: readonly number[];
  /** Points per cell of the group. */
  readonly multiplicity: number;
}

/**
 * All Wyckoff positions of a space group: every fixed point, line and plane of an operation, every point where two
 * rotation axes cross, and all of space, modulo the lattice, collected into orbits under the group. A site-symmetry
 * group without a rotoinversion of one fixed point is one of rotations, so nothing else can be fixed. Sorted: points
 * first, high site symmetry first.
 * Source: the definition of Wyckoff positions, International Tables for Crystallography A (2016), section 1.4.4.2; the
 * fixed sets by Smith normal forms, B. Eick, F. Gaehler, W. Nickel, Acta Cryst. A53 (1997) 467 (idea).
 */
export function enumerateWyckoff(group: SpaceGroup): EnumeratedPosition[] {
  const primitive = primitiveGroup(group);
  const fixed = new Map<string, AffineSubspace>();
  const keep = (s: AffineSubspace) => fixed.set(s.key, s);
  for (const a of primitive.operations.slice(1)) for (const s of fixedSubspaces(a, primitive.d)) keep(s);
  const axes = orbits(
    [...fixed.values()].filter((s) => dimension(s) === 1),
    primitive,
  );
  const lines = [...fixed.values()].filter((s) => dimension(s) === 1);
  const cross = crossings();
  for (const { representative } of axes) for (const line of lines) for (const s of cross(representative, line)) keep(s);
  keep(subspace([], 1));
  const cell = group.operations.length;
  return orbits([...fixed.values()], primitive)
    .map(({ representative, keys }) => {
      const stabiliser = pointwiseStabiliser(representative, primitive);
      return { representative, keys, stabiliser, multiplicity: cell / stabiliser.length };
    })
    .sort(
      (a, b) => dimension(a.representative) - dimension(b.representative) || b.stabiliser.length - a.stabiliser.length,
    );
}

/** Connected components, modulo the lattice, of the points that some (W, w + lattice vector) fixes. */
function fixedSubspaces(a: PrimitiveOperation, d: number): AffineSubspace[] {
  // (1 - W) x = w + t; with u (1 - W) v = diagonal and x = v y: d_i y_i = (u w)_i + integer
  const rows = [0, 1, 2].map((i) => [0, 1, 2].map((j) => (i === j ? 1 : 0) - a.W[3 * i + j]!));
  const { u, d: diagonal, v } = smithForm(rows);
  const right = u.map((row) => row[0]! * a.w[0] + row[1]! * a.w[1] + row[2]! * a.w[2]);
  return solutions(diagonal, right, inverseUnimodular(v.flat() as unknown as IntMat3), d);
}

/** y_i = (right_i / d + k_i) / diagonal_i for all k, as conditions on x = v y; none where a zero row has no integer. */
function solutions(
  diagonal: readonly number[],
  right: readonly number[],
  inverse: IntMat3,
  d: number,
): AffineSubspace[] {
  for (let i = 0; i < right.length; i++) if (!diagonal[i] && mod(right[i]!, d) !== 0) return [];
  const bound = diagonal.filter((e) => e !== 0);
  const one = d * bound.reduce((m, e) => lcm(m, e), 1);
  let partial: number[][][] = [[]];
  bound.forEach((e, i) => {
    const row = [inverse[3 * i]!, inverse[3 * i + 1]!, inverse[3 * i + 2]!];
    partial = partial.flatMap((rows) =>
      Array.from({ length: e }, (_, k) => [...rows, [...row, ((right[i]! + k * d) * one) / (d * e)]]),
    );
  });
  return partial.map((rows) => subspace(rows, one));
}

/** Crossing points of two lines modulo the lattice; the Smith form of each pair of directions is kept. */
function crossings(): (a: AffineSubspace, b: AffineSubspace) => AffineSubspace[] {
  const forms = new Map<string, { u: number[][]; d: number[]; inverse: IntMat3 } | null>();
  return (a, b) => {
    const key = `${a.F.join()};${b.F.join()}`;
    let form = forms.get(key);
    if (form === undefined) {
      const s = smithForm([...a.F, ...b.F]);
      form = s.d[2] === 0 ? null : { u: s.u, d: s.d, inverse: inverseUnimodular(s.v.flat() as unknown as IntMat3) };
      forms.set(key, form);
    }
    if (!form) return []; // parallel
    const d = lcm(a.d, b.d);
    const c = [...a.c.map((e) => e * (d / a.d)), ...b.c.map((e) => e * (d / b.d))];
    const right = form.u.map((row) => row.reduce((sum, e, i) => sum + e * c[i]!, 0));
    return solutions(form.d, right, form.inverse, d);
  };
}

interface Orbit {
  readonly representative: AffineSubspace;
  readonly keys: readonly string[];
}

function orbits(subspaces: readonly AffineSubspace[], primitive: PrimitiveGroup): Orbit[] {
  const found: Orbit[] = [];
  const seen = new Set<string>();
  for (const representative of subspaces) {
    if (seen.has(representative.key)) continue;
    const keys = orbitKeys(representative, primitive);
    for (const key of keys) seen.add(key);
    found.push({ representative, keys });
  }
  return found;
}

/** Keys of the images of a subspace under the whole group. */
export function orbitKeys(s: AffineSubspace, primitive: PrimitiveGroup): string[] {
  return [...new Set(primitive.operations.map((a) => imageOf(s, a, primitive.d).key))];
}

/** Indices of the operations that, after some lattice translation, fix every point of the subspace. */
export function pointwiseStabiliser(s: AffineSubspace, primitive: PrimitiveGroup): number[] {
  const directions = directionsOf(s);
  const { n, d } = pointOf(s);
  const one = lcm(d, primitive.d);
  const found: number[] = [];
  primitive.operations.forEach((a, index) => {
    if (!directions.every((v) => apply(a.W, v).every((e, i) => e === v[i]))) return;
    const image = apply(a.W, n);
    const still = image.every((e, i) => {
      const moved = (e - n[i]!) * (one / d) + a.w[i]! * (one / primitive.d);
      return moved % one === 0;
    });
    if (still) found.push(index);
  });
  return found;
}

import { determinant, trace } from "../algebra/index.ts";
import { cross3, dot3, length3, type Mat3, minus3, unit3, type Vec3 } from "../structure/index.ts";
import { across, along, times3 } from "./bond-coordinates.ts";
import type { InternalCoordinate } from "./internal-coordinate.ts";
import type { SparseRow } from "./invariant-span.ts";
import type { Scaffold, Star } from "./scaffold.ts";

/** A centre with all its neighbours within this of one plane is planar; angstrom. Ammonia is 0.38 high, C60 0.3. */
export const PLANAR_TOLERANCE = 0.1;

/** Two bonds tell a plane if the sine between them is larger; a straight pair tells none. */
const STEEP = 0.3;

/**
 * Motions across the plane of a planar centre with three or more neighbours: n + 1 atoms less one translation and two
 * rotations leave n - 2. The rows are displacements across, freed of translation and rotations of the star. Null where
 * the centre is not planar.
 */
export function outOfPlane<A>(s: Scaffold<A>, { centre, ligands }: Star<A>): InternalCoordinate<A> | null {
  const legs = ligands.map((l) => minus3(s.place(l), s.place(centre)));
  const normal = planeNormal(legs);
  if (!normal) return null;
  const atoms = [centre, ...ligands];
  const weights = freeWeights([[0, 0, 0], ...legs], normal);
  const rows = weights.map((row): SparseRow => row.map((w, j) => [s.index(atoms[j]!), times3(normal, w)] as const));
  // displacements across, less the translation across and the rotations about lines in the plane
  const character = (R: Mat3, isFixed: (atom: A) => boolean) => {
    const turn = along(R, normal);
    return turn * atoms.filter(isFixed).length - turn - Math.sign(determinant(R)) * (trace(R) - turn);
  };
  const key = ([first, ...others]: readonly A[]) =>
    others
      .map((l) => s.key([first!, l]))
      .sort((x, y) => (x < y ? -1 : 1))
      .join(" ");
  return { kind: "outOfPlane", name: s.element(centre), atoms, size: ligands.length - 2, rows, character, key };
}

/** Normal of the plane that three or more legs share; null where there is none. */
function planeNormal(legs: readonly Vec3[]): Vec3 | null {
  if (legs.length < 3) return null;
  const crossed = legs.flatMap((u, i) => legs.slice(i + 1).map((v) => cross3(unit3(u), unit3(v))));
  const steep = crossed.filter((n) => length3(n) > STEEP);
  if (steep.length === 0) return null;
  const largest = steep.reduce((a, b) => (length3(b) > length3(a) ? b : a));
  const sum = steep.reduce<Vec3>((s, n) => minus3(s, times3(n, dot3(n, largest) > 0 ? -1 : 1)), [0, 0, 0]);
  if (length3(sum) < STEEP) return null;
  const normal = unit3(sum);
  return legs.every((u) => Math.abs(dot3(u, normal)) <= PLANAR_TOLERANCE) ? normal : null;
}

/** Row k: atom k moves across, with what translation and rotations of all of them would do taken off. */
function freeWeights(places: readonly Vec3[], normal: Vec3): number[][] {
  const rigid = orthonormal([places.map(() => 1), ...across(normal).map((e) => places.map((r) => dot3(r, e)))]);
  return places.map((_, k) => places.map((_, j) => Number(j === k) - rigid.reduce((sum, q) => sum + q[k]! * q[j]!, 0)));
}

/** An orthonormal basis of a few independent rows, by Gram and Schmidt. */
function orthonormal(rows: readonly (readonly number[])[]): number[][] {
  const basis: number[][] = [];
  const product = (a: readonly number[], b: readonly number[]) => a.reduce((sum, e, i) => sum + e * b[i]!, 0);
  for (const row of rows) {
    let rest = [...row];
    for (const q of basis) {
      const c = product(rest, q);
      rest = rest.map((e, i) => e - c * q[i]!);
    }
    const length = Math.sqrt(product(rest, rest));
    basis.push(rest.map((e) => e / length));
  }
  return basis;
}

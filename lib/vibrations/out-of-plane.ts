import { determinant, trace } from "../algebra/index.ts";
import { cross3, dot3, length3, type Mat3, minus3, unit3, type Vec3 } from "../structure/index.ts";
import { across, along, times3 } from "./bond-coordinates.ts";
import type { SparseRow } from "./independent-species.ts";
import type { InternalCoordinate } from "./internal-coordinate.ts";
import type { Scaffold, Star } from "./scaffold.ts";

/** A centre with all its neighbours within this of one plane is planar; angstrom. Ammonia is 0.38 high, C60 0.3. */
export const PLANAR_TOLERANCE = 0.1;

/** Two bonds tell a plane if the sine between them is larger; a straight pair tells none. */
const STEEP = 0.3;

/** A row of which less than this share is new depends on others; half of any star's heights are far above. */
const DEPENDENT = 1e-6;

/**
 * Motions across the plane of a planar centre with three or more neighbours: n + 1 atoms less one translation and two
 * rotations leave n - 2. The rows change under no translation or rotation of the star, so that with its stretches they
 * leave exactly as many angles as a star has. Null where the centre is not planar.
 */
export function outOfPlane<A>(s: Scaffold<A>, { centre, ligands }: Star<A>): InternalCoordinate<A> | null {
  const legs = ligands.map((l) => minus3(s.place(l), s.place(centre)));
  const normal = planeNormal(legs);
  if (!normal) return null;
  const atoms = [centre, ...ligands];
  const rows = acrossRows([[0, 0, 0], ...legs], normal).map(
    (row): SparseRow => atoms.map((a, j) => [s.index(a), row.slice(3 * j, 3 * j + 3) as unknown as Vec3] as const),
  );
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

/** An orthonormal basis of the motions across the plane, three numbers per atom. */
function acrossRows(places: readonly Vec3[], normal: Vec3): number[][] {
  const flat = [places.map(() => 1), ...across(normal).map((e) => places.map((r) => dot3(r, e)))];
  const heights = places.map((_, k) => places.map((_, j) => Number(j === k)));
  const bent = orthonormal([...flat, ...heights]).slice(flat.length); // heights that no tilt of the plane explains
  const axes = [normal, ...across(normal)];
  const rigid = axes.flatMap((e) => [places.flatMap(() => e), places.flatMap((r) => cross3(e, r))]);
  const rows = bent.map((weights) => weights.flatMap((w) => times3(normal, w)));
  const fixed = orthonormal(rigid);
  return orthonormal([...fixed, ...rows]).slice(fixed.length);
}

/** An orthonormal basis of rows by Gram and Schmidt, in their order; dependent ones are left out. */
function orthonormal(rows: readonly (readonly number[])[]): number[][] {
  const basis: number[][] = [];
  const product = (a: readonly number[], b: readonly number[]) => a.reduce((sum, e, i) => sum + e * b[i]!, 0);
  for (const row of rows) {
    const length = Math.sqrt(product(row, row));
    let rest = row.map((e) => e / length);
    for (const q of [...basis, ...basis]) {
      const c = product(rest, q);
      rest = rest.map((e, i) => e - c * q[i]!);
    }
    const left = Math.sqrt(product(rest, rest));
    if (left > DEPENDENT) basis.push(rest.map((e) => e / left));
  }
  return basis;
}

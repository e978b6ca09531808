import type { Vec3 } from "./cell.ts";
import { plus, times } from "./measure.ts";
import { cross3, dot3, length3, minus3 } from "./rotation-fit.ts";

/** Half the edge of the cube that is cut down to the polyhedron; far beyond any neighbour; angstrom. */
const HALF_EDGE = 100;
/** Points this near a plane lie on it; angstrom. */
const ON_PLANE = 1e-7;

/** A face of a polyhedron about the origin: its corners in order, and the point that it separates from the origin. */
interface Face {
  readonly owner: number; // -1 for the cube
  readonly corners: readonly Vec3[];
}

/** The domain of an atom: all places nearer to it than to its neighbours. */
export interface AtomDomain {
  /** Solid angle of the face towards each neighbour, in the order given, as a share of the sphere. */
  readonly shares: readonly number[];
  /** Farthest corner, angstrom. Neighbours beyond twice this have no face. */
  readonly radius: number;
}

/**
 * Solid angles of the faces of the Dirichlet (Voronoi) domain of an atom at the origin.
 * @param neighbours Cartesian, angstrom, nearest first
 * Source: G. Voronoi, J. reine angew. Math. 134 (1908) 198-287; as weights of neighbours F. L. Carter, Acta
 * Crystallographica B34 (1978) 2962-2966 and M. O'Keeffe, Acta Crystallographica A35 (1979) 772-775 (from memory).
 */
export function atomDomain(neighbours: readonly Vec3[]): AtomDomain {
  let faces = cube();
  let radius = HALF_EDGE * Math.sqrt(3);
  for (const [owner, there] of neighbours.entries()) {
    const distance = length3(there);
    if (distance / 2 > radius) break;
    const cut = cutOff(faces, owner, times(there, 1 / distance), distance / 2);
    if (cut === null) continue;
    faces = cut;
    radius = faces.reduce((m, f) => f.corners.reduce((n, c) => Math.max(n, length3(c)), m), 0);
  }
  const shares = neighbours.map(() => 0);
  for (const { owner, corners } of faces) if (owner >= 0) shares[owner]! += solidAngle(corners) / (4 * Math.PI);
  return { shares, radius };
}

/** Faces of what is left on the near side of a plane; null where nothing is cut off. */
function cutOff(faces: readonly Face[], owner: number, normal: Vec3, height: number): Face[] | null {
  const beyond = (p: Vec3) => dot3(p, normal) - height;
  if (!faces.some((f) => f.corners.some((c) => beyond(c) > ON_PLANE))) return null;
  const left: Face[] = [];
  const rim: Vec3[] = [];
  for (const face of faces) {
    const corners = clipped(face.corners, beyond);
    for (const c of corners) if (Math.abs(beyond(c)) <= ON_PLANE) addNew(rim, c);
    if (corners.length > 2) left.push({ owner: face.owner, corners });
  }
  if (rim.length > 2) left.push({ owner, corners: around(rim, normal) });
  return left;
}

function clipped(corners: readonly Vec3[], beyond: (p: Vec3) => number): Vec3[] {
  const kept: Vec3[] = [];
  corners.forEach((a, i) => {
    const b = corners[(i + 1) % corners.length]!;
    const [da, db] = [beyond(a), beyond(b)];
    if (da <= ON_PLANE) kept.push(a);
    if ((da > ON_PLANE && db < -ON_PLANE) || (da < -ON_PLANE && db > ON_PLANE)) {
      kept.push(plus(a, times(minus3(b, a), da / (da - db))));
    }
  });
  return kept;
}

function addNew(points: Vec3[], p: Vec3): void {
  if (points.every((q) => length3(minus3(p, q)) > 10 * ON_PLANE)) points.push(p);
}

/** Points of a plane in order about their mean. */
function around(points: readonly Vec3[], normal: Vec3): Vec3[] {
  const centre = times(points.reduce(plus), 1 / points.length);
  const first = minus3(points[0]!, centre);
  const second = cross3(normal, first);
  const turn = (p: Vec3) => Math.atan2(dot3(minus3(p, centre), second), dot3(minus3(p, centre), first));
  return [...points].sort((a, b) => turn(a) - turn(b));
}

/** A. Van Oosterom, J. Strackee, IEEE Transactions on Biomedical Engineering 30 (1983) 125-126. */
function solidAngle(corners: readonly Vec3[]): number {
  let sum = 0;
  const a = corners[0]!;
  for (let i = 1; i + 1 < corners.length; i++) {
    const [b, c] = [corners[i]!, corners[i + 1]!];
    const [la, lb, lc] = [length3(a), length3(b), length3(c)];
    const volume = dot3(a, cross3(b, c));
    sum += 2 * Math.atan2(volume, la * lb * lc + dot3(a, b) * lc + dot3(a, c) * lb + dot3(b, c) * la);
  }
  return Math.abs(sum);
}

function cube(): Face[] {
  const h = HALF_EDGE;
  const square = (at: (u: number, v: number) => Vec3): Face => ({
    owner: -1,
    corners: [at(-h, -h), at(h, -h), at(h, h), at(-h, h)],
  });
  return [-h, h].flatMap((w) => [
    square((u, v) => [w, u, v]),
    square((u, v) => [u, w, v]),
    square((u, v) => [u, v, w]),
  ]);
}

import { type MolecularGroup, molecularGroup, orthogonalGroup } from "../representation/index.ts";
import { apply3, type Mat3, multiply3, type Vec3 } from "./cell.ts";
import type { KnownMatrices } from "./exact-representation.ts";
import {
  conjugate3,
  correlationMatrix,
  cross3,
  difference3,
  dot3,
  nearestRotation,
  scale3,
  sum3,
  transpose3,
} from "./rotation-fit.ts";

/** Points and bonds of a molecule about its centroid. */
export interface Skeleton {
  /** Cartesian, angstrom, as measured. */
  readonly points: readonly Vec3[];
  /** The same idealised: they obey the group exactly. */
  readonly places: readonly Vec3[];
  readonly bonds: readonly (readonly [number, number])[];
}

/** A molecular group in its standard orientation, and how the molecule stands to it. */
export interface FittedGroup {
  /** In standard orientation; labels and characters refer to it. */
  readonly group: MolecularGroup;
  /** Rotation from the frame of the molecule into the standard one: its rows are the axes x, y, z. */
  readonly frame: Mat3;
  /** Matrices of the elements of `group`, in its order, in the frame of the molecule. */
  readonly matrices: readonly Mat3[];
  /** Per element of `group`: index in the list that was given. */
  readonly order: readonly number[];
}

/** Entries of matrices of one group differ by more than this unless they are equal. */
const SAME_MATRIX = 1e-6;

/** Two places of an idealised molecule nearer than this are one; angstrom. */
const SAME_PLACE = 1e-4;

/** A group in standard orientation, and the rotations among which those into its other standard orientations are. */
interface Standard {
  readonly group: MolecularGroup;
  readonly turns: readonly Mat3[];
}

const standards = new Map<string, Standard>();

function standardGroup(name: string): Standard {
  const known = standards.get(name);
  if (known) return known;
  const group = molecularGroup(name);
  const standard = { group, turns: turnsOf(group) };
  standards.set(name, standard);
  return standard;
}

/**
 * Brings a group of orthogonal matrices into standard orientation. Where that leaves a choice between axes that labels
 * tell apart, it is R. S. Mulliken's, J. Chem. Phys. 23 (1955) 1997: x normal to the plane of most atoms in C2v, D2 and
 * D2h and z through most atoms, then across most bonds; C2' axes and sigma_v planes through most atoms, then bonds.
 * @param matrices exact to rounding, in any order
 * @param permutations of the atoms by each matrix
 */
export function fitToStandard(
  matrices: readonly Mat3[],
  permutations: readonly (readonly number[])[],
  skeleton: Skeleton,
  known: KnownMatrices,
): FittedGroup {
  const own = orthogonalGroup(matrices);
  const { group, turns } = standardGroup(own.schoenflies);
  const { x, y, z } = own.axes;
  const first: Mat3 = [...x, ...y, ...z] as unknown as Mat3;
  const frames = turns.map((turn) => multiply3(turn, first)).filter((F) => matches(group, matrices, F) !== null);
  const score = frames.map((F) => preference(group.schoenflies, skeleton, F));
  const best = frames.reduce((b, F, i) => {
    const d = compare(score[i]!, score[b]!);
    return d > 0 || (d === 0 && facing(F) > facing(frames[b]!) + SAME_MATRIX) ? i : b;
  }, 0);
  const start = frames[best];
  if (!start) throw new RangeError(`no orientation of ${group.schoenflies} fits its own matrices`);
  const order = matches(group, matrices, start)!;
  const frame = refine(group, start, order, permutations, skeleton, known);
  return { group, frame, matrices: group.elements.map((D) => conjugate3(transpose3(frame), D)), order };
}

/** How much a frame faces the way of the crystal's own. */
function facing(F: Mat3): number {
  return F[0] + F[4] + F[8];
}

/** Rotations among which are all that carry one standard orientation of a group into another. */
function turnsOf(group: MolecularGroup): Mat3[] {
  const highest = group.order > 2 ? Math.max(...group.elements.map((m) => turnOrder(m))) : 1;
  const aboutZ = Array.from({ length: 8 * highest }, (_, k): Mat3 => {
    const [c, s] = [Math.cos((k * Math.PI) / (4 * highest)), Math.sin((k * Math.PI) / (4 * highest))];
    return [c, -s, 0, s, c, 0, 0, 0, 1];
  });
  const tipped: Mat3[] = aboutZ.map(([c, , , s]) => [c, s, 0, s, -c, 0, 0, 0, -1]);
  return [...cubeRotations(), ...aboutZ, ...tipped];
}

/** Order of the rotation about z that a matrix holds, 1 for one that moves z. */
function turnOrder(m: Mat3): number {
  if (Math.abs(Math.abs(m[8]) - 1) > SAME_MATRIX || m[0] * m[4] - m[1] * m[3] < 0) return 1;
  const part = Math.abs(Math.atan2(m[3], m[0])) / (2 * Math.PI);
  if (part < SAME_MATRIX) return 1;
  for (let n = 2; n <= 240; n++) if (Math.abs(part * n - Math.round(part * n)) < SAME_MATRIX * n) return n;
  return 1;
}

function cubeRotations(): Mat3[] {
  const units: Vec3[] = [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
    [-1, 0, 0],
    [0, -1, 0],
    [0, 0, -1],
  ];
  return units.flatMap((a) =>
    units.filter((b) => dot3(a, b) === 0).map((b) => [...a, ...b, ...cross3(a, b)] as unknown as Mat3),
  );
}

/** Per standard element: which matrix it is when seen in the frame F; null if they are not the same group. */
function matches(group: MolecularGroup, matrices: readonly Mat3[], F: Mat3): number[] | null {
  const back = transpose3(F);
  const order: number[] = [];
  for (const D of group.elements) {
    const own = conjugate3(back, D);
    const found = matrices.findIndex((m) => sameMatrix(m, own));
    if (found < 0) return null;
    order.push(found);
  }
  return order;
}

function sameMatrix(a: Mat3, b: Mat3): boolean {
  for (let i = 0; i < 9; i++) if (Math.abs(a[i]! - b[i]!) > SAME_MATRIX) return false;
  return true;
}

/** Counts by which one orientation is preferred to another, the first that differs deciding. */
function preference(name: string, { places, bonds }: Skeleton, F: Mat3): number[] {
  if (!/^(?:D\d*[02468]h?|C\d*[02468]v)$/.test(name)) return [];
  const seen = places.map((p) => apply3(F, p));
  const middles = bonds.map(([i, j]): Vec3 => {
    const [p, q] = [seen[i]!, seen[j]!];
    return [(p[0] + q[0]) / 2, (p[1] + q[1]) / 2, (p[2] + q[2]) / 2];
  });
  const near = (...coordinates: number[]) => Math.hypot(...coordinates) < SAME_PLACE;
  const count = (list: readonly Vec3[], holds: (v: Vec3) => boolean) => list.filter(holds).length;
  if (["C2v", "D2", "D2h"].includes(name)) {
    const onZ = (v: Vec3) => near(v[0], v[1]);
    return [count(seen, ([x]) => near(x)), count(seen, onZ), count(middles, onZ), count(middles, ([x]) => near(x))];
  }
  const onX = name.startsWith("C") ? (v: Vec3) => near(v[1]) : (v: Vec3) => near(v[1], v[2]);
  return [count(seen, onX), count(middles, onX)];
}

function compare(a: readonly number[], b: readonly number[]): number {
  const k = a.findIndex((e, i) => e !== b[i]);
  return k < 0 ? 0 : a[k]! - b[k]!;
}

/** Rounds of fitting; the change falls by the share of noise in the structure each time. */
const MOST_ROUNDS = 100;

/** The frame that fits the atoms best: largest sum over elements and atoms of D F x . F x', the known ones kept exact. */
function refine(
  group: MolecularGroup,
  start: Mat3,
  order: readonly number[],
  permutations: readonly (readonly number[])[],
  { points }: Skeleton,
  known: KnownMatrices,
): Mat3 {
  const pulls = order.map((g) => transpose3(correlationMatrix(points, (k) => points[permutations[g]![k]!]!)));
  const scale = points.reduce((s, p) => s + p[0] * p[0] + p[1] * p[1] + p[2] * p[2], 0) * group.order;
  let F = start;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    // a share of F itself makes the form positive, so that every round climbs
    const next = nearestRotation(
      sum3([...group.elements.map((D, i) => multiply3(D, multiply3(F, pulls[i]!))), scale3(F, scale)]),
    );
    const change = difference3(next, F);
    F = next;
    if (change < 1e-14) break;
  }
  const inGroup = known.elements.map((g) => order.indexOf(g));
  return nearestRotation(
    sum3(known.matrices.map((S, s) => multiply3(group.elements[inGroup[s]!]!, multiply3(F, transpose3(S))))),
  );
}

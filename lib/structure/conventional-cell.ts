import {
  determinant,
  IDENTITY,
  type IntMat3,
  inverseUnimodular,
  multiplyRatMat,
  negate,
  type RatMat3,
  type RatVec3,
  ratMat3,
  ratVec3,
  ZERO_VECTOR,
} from "../algebra/index.ts";
import { type BravaisType, groupProperties, identify } from "../symmetry/index.ts";
import { type Mat3, multiply3 } from "./cell.ts";
import { gramOf, type LatticeAxes } from "./lattice-axes.ts";
import type { LatticeSymmetry } from "./lattice-symmetry.ts";

/** The conventional cell of a lattice taken as having a certain symmetry. */
export interface ConventionalCell {
  readonly type: BravaisType;
  /** Conventional axes in the basis of the axes given, (a', b', c') = (a, b, c) P, determinant positive. */
  readonly P: RatMat3;
}

/** How the axes may be changed within a conventional cell, and which of two cells is preferred. */
export interface AxisChoice {
  readonly changes: readonly IntMat3[];
  /** Smaller is better, term by term. */
  readonly order: (g: Mat3) => readonly number[];
}

/** Changes of the plane cell shorten it each time; a few rounds suffice, this is a bound. */
const MOST_ROUNDS = 50;

/**
 * The conventional cell: axes along the symmetry directions, b unique and a, c as short as can be, beta not acute for
 * monoclinic lattices (centring C), a not above b not above c for orthorhombic ones (where centred on one face: C, with a
 * not above b), obverse R on hexagonal axes; for triclinic lattices the cell given, which should be the Niggli cell.
 * @param axes a primitive, reduced cell
 */
export function conventionalCell(axes: LatticeAxes, symmetry: LatticeSymmetry): ConventionalCell {
  const operations = symmetry.rotations.flatMap((W) => [W, negate(W)]).map((W) => ({ W, w: ZERO_VECTOR }));
  const { number, transformation } = identify(operations);
  const type = groupProperties(number).bravaisType;
  return { type, P: preferred(axes, type, transformation.P) };
}

function preferred(axes: LatticeAxes, type: BravaisType, start: RatMat3): RatMat3 {
  const choice = axisChoice(type);
  if (!choice) return start;
  let P = start;
  let best = choice.order(gramIn(axes, P));
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const before = P;
    for (const N of choice.changes) {
      const next = multiplyRatMat(before, ratMat3(N));
      const order = choice.order(gramIn(axes, next));
      if (!precedes(order, best)) continue;
      best = order;
      P = next;
    }
    if (P === before) break;
  }
  return P;
}

function gramIn(axes: LatticeAxes, P: RatMat3): Mat3 {
  return gramOf(multiply3(axes, P.n).map((e) => e / P.d) as unknown as Mat3);
}

/** Differences below this share of the first term are ties; dimensionless. */
const TIE = 1e-9;

/** Whether terms come before others in order, rounding apart. */
export function precedes(x: readonly number[], y: readonly number[]): boolean {
  const tie = TIE * Math.abs(y[0]!);
  for (let i = 0; i < x.length; i++) {
    if (x[i]! < y[i]! - tie) return true;
    if (x[i]! > y[i]! + tie) return false;
  }
  return false;
}

/** The freedom of choice in a conventional cell of a type, null where symmetry leaves none. */
export function axisChoice(type: BravaisType): AxisChoice | null {
  switch (type) {
    case "mP":
      return { changes: planeChanges(() => true), order: monoclinicOrder };
    case "mS":
      return { changes: planeChanges((N) => keepsCentring(N, ratVec3([1, 1, 0], 2))), order: monoclinicOrder };
    case "oP":
    case "oI":
    case "oF":
      return { changes: AXIS_ORDERS, order: lengthsInOrder };
    case "oS":
      return { changes: AXIS_ORDERS.filter((N) => Math.abs(N[8]) === 1), order: lengthsInOrder };
    default:
      return null;
  }
}

/** a and c short, then beta obtuse, then a not above c. */
function monoclinicOrder(g: Mat3): number[] {
  return [g[0] + g[8], g[2] > TIE * g[0] ? 1 : 0, g[0]];
}

function lengthsInOrder(g: Mat3): number[] {
  return [g[0], g[4]];
}

const AXIS_ORDERS: readonly IntMat3[] = [
  IDENTITY,
  [0, 1, 0, 1, 0, 0, 0, 0, -1],
  [-1, 0, 0, 0, 0, 1, 0, 1, 0],
  [0, 0, 1, 0, -1, 0, 1, 0, 0],
  [0, 0, 1, 1, 0, 0, 0, 1, 0],
  [0, 1, 0, 0, 0, 1, 1, 0, 0],
];

/** Changes of a and c with entries -2 to 2, b kept up to its sense so that the axes stay right-handed. */
function planeChanges(keeps: (N: IntMat3) => boolean): IntMat3[] {
  const found: IntMat3[] = [];
  const entries = [-2, -1, 0, 1, 2];
  for (const p of entries) {
    for (const q of entries) {
      for (const r of entries) {
        for (const s of entries) {
          const det = p * s - q * r;
          const N: IntMat3 = [p, 0, q, 0, det, 0, r, 0, s];
          if (Math.abs(det) === 1 && determinant(N) === 1 && keeps(N)) found.push(N);
        }
      }
    }
  }
  return found;
}

/** Whether a centring halfway along the old axes is the same one on the new axes. */
function keepsCentring(N: IntMat3, centring: RatVec3): boolean {
  const back = inverseUnimodular(N);
  return [0, 1, 2].every((i) => {
    const sum = [0, 1, 2].reduce((s, j) => s + back[3 * i + j]! * centring.n[j]!, 0);
    return (sum - centring.n[i]!) % centring.d === 0;
  });
}

import {
  addVectors,
  type IntVec3,
  mod,
  modOne,
  type Rational,
  type RatVec3,
  rational,
  ratVec3,
  subtractVectors,
} from "../algebra/index.ts";
import { centringsOf } from "./centring.ts";
import { glideLetters, type PlaneNormal } from "./glide-letter.ts";
import type { PlaneLetter } from "./hermann-mauguin-symbol.ts";
import { splitTranslation } from "./intrinsic-part.ts";
import type { Operation } from "./operation.ts";
import { rotationType } from "./rotation-type.ts";

/** The symmetry elements whose axis, or whose normal, lies along one direction. */
export interface DirectionElements {
  /** Axes of the highest order there is, rotations before screws, `2`, `21`; or a rotoinversion `-3`, `-4`, `-6`. */
  readonly axes: readonly string[];
  /** Planes normal to the direction, one entry per kind with all letters that may name it, in order of priority. */
  readonly planes: readonly (readonly PlaneLetter[])[];
}

const PRIORITY: readonly PlaneLetter[] = ["m", "e", "a", "b", "c", "n", "d", "g", "g1", "g2"];

/**
 * The axes and planes that belong to a direction, found from all operations modulo Z^3.
 * @param operations all of them, centrings included
 * @param hexagonal true on hexagonal axes, where planes normal to [100] are not cell faces
 * Priority m, e, a, b, c, n, d as in International Tables for Crystallography A (2016), section 1.4.1.
 */
export function directionElements(
  operations: readonly Operation[],
  direction: IntVec3,
  hexagonal: boolean,
): DirectionElements {
  const centrings = centringsOf(operations);
  const axes = new Map<string, number>();
  const planes = new Map<string, readonly PlaneLetter[]>();
  const roto = new Set<number>();
  const period = latticePeriod(direction, centrings);
  for (const a of operations) {
    const type = rotationType(a.W);
    if (!type.axis || !parallel(type.axis, direction)) continue;
    if (type.improper && type.order === 2) {
      for (const g of glideVectors(a)) {
        const letters = glideLetters(g, normalOf(direction, hexagonal), centrings);
        planes.set(letters.join(), letters);
      }
    } else if (type.improper) roto.add(type.order);
    else {
      const sense = type.sense === 0 ? 1 : type.sense * (sameWay(type.axis, direction) ? 1 : -1);
      for (const k of screwNumbers(a, direction, period, type.order)) {
        const turns = mod(k * sense, type.order);
        axes.set(`${type.order}${turns || ""}`, type.order * 10 + turns);
      }
    }
  }
  // a face-centred mirror plane is a diagonal glide plane at the same time
  if (planes.has("m") && centrings.some((t) => liesInFace(t, direction))) planes.set("n", ["n"]);
  return { axes: highest(axes, roto), planes: [...planes.values()].sort((p, q) => rank(p) - rank(q)) };
}

/** True for the half diagonal of the cell face normal to a cell axis. */
function liesInFace(t: RatVec3, direction: IntVec3): boolean {
  return (
    t.d === 2 &&
    direction.filter((e) => e !== 0).length === 1 &&
    t.n.every((n, i) => (n === 0) === (direction[i] !== 0))
  );
}

function rank(letters: readonly PlaneLetter[]): number {
  return PRIORITY.indexOf(letters[0]!);
}

/** Rotoinversions outrank rotations of lower order: -4 over 2, -6 over 3, and -3 over 3 as the symbol has it. */
function highest(axes: ReadonlyMap<string, number>, roto: ReadonlySet<number>): string[] {
  const top = Math.max(1, ...[...axes.values()].map((v) => Math.floor(v / 10)));
  const inverted = Math.max(0, ...roto);
  if (inverted > top || (inverted === 3 && top === 3)) return [`-${inverted}`];
  return [...axes]
    .filter(([, v]) => Math.floor(v / 10) === top)
    .sort(([, v], [, w]) => v - w)
    .map(([name]) => name);
}

function normalOf(direction: IntVec3, hexagonal: boolean): PlaneNormal {
  const axes = [0, 1, 2].filter((i) => direction[i] !== 0);
  if (axes.length !== 1) return "diagonal";
  return hexagonal && axes[0] !== 2 ? "oblique" : (axes[0] as 0 | 1 | 2);
}

function parallel(a: IntVec3, b: IntVec3): boolean {
  return a[0] * b[1] === a[1] * b[0] && a[1] * b[2] === a[2] * b[1] && a[2] * b[0] === a[0] * b[2];
}

function sameWay(a: IntVec3, b: IntVec3): boolean {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2] > 0;
}

/** Length of the shortest lattice translation along a direction, in units of the direction. */
function latticePeriod(direction: IntVec3, centrings: readonly RatVec3[]): Rational {
  const known = new Set(centrings.map((t) => `${t.n.join()}/${t.d}`));
  for (const d of [6, 4, 3, 2]) {
    const v = modOne(ratVec3(direction, d));
    if (known.has(`${v.n.join()}/${v.d}`)) return rational(1, d);
  }
  return rational(1);
}

/** Screw numbers of all axes of one rotation part: its own and those after lattice translations. */
function screwNumbers(a: Operation, direction: IntVec3, period: Rational, order: number): Set<number> {
  const along = direction.findIndex((e) => e !== 0);
  const number = (v: RatVec3) => (v.n[along]! * period.d * order) / (v.d * direction[along]! * period.n);
  const own = number(splitTranslation(a).intrinsic);
  const steps = UNIT.map((e) => number(splitTranslation({ W: a.W, w: ratVec3(e) }).intrinsic));
  const found = new Set<number>([mod(own, order)]);
  for (let before = 0; before !== found.size; ) {
    before = found.size;
    for (const k of [...found]) for (const s of steps) found.add(mod(k + s, order));
  }
  return found;
}

const UNIT: readonly IntVec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/** Glide vectors of all planes of one reflection part: its own and those after lattice translations. */
function glideVectors(a: Operation): RatVec3[] {
  const steps = UNIT.map((e) => splitTranslation({ W: a.W, w: ratVec3(e) }).intrinsic);
  let found = [splitTranslation(a).intrinsic];
  for (const s of steps) found = found.flatMap((g) => [g, addVectors(g, s), subtractVectors(g, s)]);
  return found;
}

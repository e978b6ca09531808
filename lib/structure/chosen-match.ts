import { addVectors, type IntMat3, multiplyRatMat, type RatMat3, type RatVec3, ZERO_VECTOR } from "../algebra/index.ts";
import {
  formatVector,
  operationKey,
  reduce,
  reverse,
  type Transformation,
  transformOperation,
} from "../symmetry/index.ts";
import { apply3, lengthOf, type Vec3 } from "./cell.ts";
import type { Crystal } from "./crystal.ts";
import { exactOrigin } from "./exact-origin.ts";
import { inCell } from "./preferred-reference.ts";
import { keepsHand, type StructureMatch } from "./structure-match.ts";

/** A match with its origin as exact as the symmetry of the two structures makes it. */
export interface ChosenMatch extends StructureMatch {
  /** Exact part of p where there is one, and what has to be added to it: 0 unless the origin is free. */
  readonly exact: { readonly origin: RatVec3; readonly shift: Vec3 } | null;
  /** `1/2,0,0`; decimals where no fraction is meant. */
  readonly text: string;
}

/** Matches whose displacements differ by less are equally good: symmetry makes them so; angstrom. */
const EQUALLY_GOOD = 1e-3;
/** A mirror image is preferred only where it lies nearer by this; angstrom. */
const BETTER_BY = 0.05;
/** A free origin this near to a fraction is on it: coordinates are rounded by as much; angstrom. */
const ROUNDED_BY = 1e-4;

/** Of equally good matches the one nearest to the identity, of the same hand unless the other is clearly better. */
export function chosenMatch(first: Crystal, second: Crystal, matches: readonly StructureMatch[]): ChosenMatch | null {
  const own = matches.filter(keepsHand);
  const other = matches.filter((m) => !keepsHand(m));
  const [a, b] = [own[0], other[0]];
  const mirrored = b !== undefined && (a === undefined || b.rootMeanSquare < a.rootMeanSquare - BETTER_BY);
  const list = mirrored ? other : own;
  const best = list[0];
  if (!best) return null;
  const good = list.filter((m) => m.rootMeanSquare <= best.rootMeanSquare + EQUALLY_GOOD);
  const chosen = good.flatMap((m) => equivalents(first, m)).reduce((x, y) => (compare(y, x) < 0 ? y : x));
  return exactly(first, second, chosen);
}

/** The match with its origin moved by each lattice point of the cell. */
function equivalents({ group }: Crystal, match: StructureMatch): StructureMatch[] {
  return group.centrings.map(({ n, d }) => {
    return { ...match, p: wrapped(match.p.map((e, i) => e + n[i]! / d) as unknown as Vec3) };
  });
}

/** Into (-1/2, 1/2], as far as rounding lets it. */
function wrapped(p: Vec3): Vec3 {
  return p.map((e) => e - Math.ceil(e - 0.5 - 1e-6) + 0) as unknown as Vec3;
}

/** Few negative entries in P, then little change of axes, then a short shift, then the earlier entries positive. */
function compare(x: StructureMatch, y: StructureMatch): number {
  const terms = ({ P: { n, d }, p }: StructureMatch): number[] => [
    n.filter((e) => e < 0).length,
    n.reduce((s, e, i) => s + Math.abs(e / d - (i % 4 === 0 ? 1 : 0)), 0),
    p.reduce((s, e) => s + Math.abs(e), 0),
    ...n.map((e) => -e / d),
    ...p.map((e) => -e),
  ];
  const [s, t] = [terms(x), terms(y)];
  for (let i = 0; i < s.length; i++) if (Math.abs(s[i]! - t[i]!) > 1e-4) return s[i]! - t[i]!;
  return 0;
}

/** Components that operations of both structures fix are made exact; the others stay as measured, next to a fraction on it. */
function exactly(first: Crystal, second: Crystal, match: StructureMatch): ChosenMatch {
  const { P, p } = match;
  const found = exactOrigin(first.metric, first.group, primitiveFrame(second, P), p);
  const { origin } = found;
  const shift: Vec3 = lengthOf(first.metric, found.shift) <= ROUNDED_BY ? [0, 0, 0] : found.shift;
  const whole = origin.n.map((e, i) => e / origin.d + shift[i]!) as unknown as Vec3;
  const rest: Vec3 = [p[0] - whole[0], p[1] - whole[1], p[2] - whole[2]];
  const shared = sharedRotations(first, second, { P, p: origin });
  const free = shared ? meanImage(shared, rest) : rest;
  if (lengthOf(first.metric, free) <= ROUNDED_BY) {
    const isFraction = shift.every((e) => e === 0);
    return { ...match, p: whole, exact: { origin, shift }, text: isFraction ? formatVector(origin) : decimals(whole) };
  }
  const measured = whole.map((e, i) => e + free[i]!) as unknown as Vec3;
  const left = shift.map((e, i) => e + free[i]!) as unknown as Vec3;
  return { ...match, p: measured, exact: shared ? { origin, shift: left } : null, text: decimals(measured) };
}

/** The group of the second structure on primitive axes, which are given in terms of the first. */
function primitiveFrame({ group }: Crystal, P: RatMat3) {
  const change: Transformation = { P: group.primitive, p: ZERO_VECTOR };
  return { basis: multiplyRatMat(P, group.primitive), operations: inCell(group.operations, change) };
}

/** Rotation parts that both groups have, or null where their operations do not agree about the origin. */
function sharedRotations(first: Crystal, second: Crystal, change: Transformation): IntMat3[] | null {
  const back = reverse(change);
  const theirs = new Set(second.group.operations.map(operationKey));
  const rotations = new Set(second.group.representatives.map((a) => a.W.join()));
  const shared: IntMat3[] = [];
  for (const a of first.group.representatives) {
    const moved = transformOperation(a, change, back);
    if (!moved || !rotations.has(moved.W.join())) continue;
    const agrees = first.group.centrings.some((t) => {
      const translated = transformOperation({ W: a.W, w: addVectors(a.w, t) }, change, back)!;
      return theirs.has(operationKey(reduce(translated)));
    });
    if (!agrees) return null;
    shared.push(a.W);
  }
  return shared;
}

/** The part of a vector that rotations of a group leave as it is. */
function meanImage(rotations: readonly IntMat3[], v: Vec3): Vec3 {
  const sum: [number, number, number] = [0, 0, 0];
  for (const W of rotations) {
    apply3(W, v).forEach((e, i) => {
      sum[i]! += e / rotations.length;
    });
  }
  return sum;
}

function decimals(p: Vec3): string {
  return p.map((e) => String(Number(e.toFixed(6)) + 0)).join(",");
}

import { leastAssignment } from "./assignment.ts";
import { apply3, type Mat3, multiply3, type Vec3 } from "./cell.ts";
import { type IdealShape, idealShapes } from "./ideal-shapes.ts";
import { times } from "./measure.ts";
import { cross3, dot3, length3, minus3, nearestRotation, transpose3, unit3 } from "./rotation-fit.ts";
import { type CentredPoints, centred, largestOverlap, overlapMatrix } from "./shape-fit.ts";

/** Up to this many corners every assignment to the ideal corners is tried. */
export const EXHAUSTIVE_CORNERS = 6;

/** Measures are rounded to this; sums of doubles and double roots reach a tenth of it. */
const ROUNDING = 1e-6;

/** How far a polyhedron is from an ideal shape. */
export interface ShapeMeasure {
  readonly name: string;
  /** Polyhedral symbol of IUPAC, null where there is none. */
  readonly symbol: string | null;
  /** 0 for the ideal shape, at most 100. */
  readonly measure: number;
  /** The ideal corner that each neighbour stands for. */
  readonly order: readonly number[];
}

/**
 * Continuous shape measures of a polyhedron, best first: 100 times the least sum of squared distances of the corners and
 * the centre from those of the ideal shape, over their sum of squares about their mean; the least over size, position and
 * orientation of the ideal shape, and over assignments of corners. Every assignment is tried up to EXHAUSTIVE_CORNERS;
 * with more, assignment and rotation are improved by turns from every orientation that carries a pair of corners onto one
 * of several pairs of neighbours. Of 448 measures of distorted polyhedra with 7 and 8 corners that missed none.
 * @param neighbours seen from the centre, Cartesian
 * Source: H. Zabrodsky, S. Peleg, D. Avnir, J. Am. Chem. Soc. 114 (1992) 7843-7851; M. Pinsky, D. Avnir, Inorganic
 * Chemistry 37 (1998) 5575-5582.
 */
export function shapeMeasures(neighbours: readonly Vec3[]): ShapeMeasure[] {
  return idealShapes(neighbours.length)
    .map((shape) => measureOf(neighbours, shape))
    .sort((a, b) => a.measure - b.measure);
}

/** Measure of one shape; the search is the exhaustive one or that by turns. */
export function measureOf(
  neighbours: readonly Vec3[],
  shape: IdealShape,
  search: "exhaustive" | "turns" = neighbours.length <= EXHAUSTIVE_CORNERS ? "exhaustive" : "turns",
): ShapeMeasure {
  const [q, p] = [centred(neighbours), centred(shape.corners)];
  const bound = (q.squares + p.squares) / 2;
  const overlap = (order: readonly number[]) => largestOverlap(overlapMatrix(q, p, order), bound);
  let best = -1;
  let found: readonly number[] = [];
  const candidates = search === "exhaustive" ? allOrders(shape) : ordersByTurns(q, p, neighbours, shape);
  for (const order of candidates) {
    const value = overlap(order);
    if (value > best + 1e-12 * bound) {
      best = value;
      found = order;
    }
  }
  const exact = 100 * (1 - (best * best) / (q.squares * p.squares));
  const measure = Math.max(0, Math.round(exact / ROUNDING) * ROUNDING);
  return { name: shape.name, symbol: shape.symbol, measure, order: found };
}

const knownOrders = new WeakMap<IdealShape, readonly (readonly number[])[]>();
const knownRotations = new WeakMap<IdealShape, readonly (readonly number[])[]>();

/** One permutation of the corners of each class that the rotations of the ideal shape make: the first by order. */
function allOrders(shape: IdealShape): readonly (readonly number[])[] {
  const known = knownOrders.get(shape);
  if (known) return known;
  const orders: number[][] = [];
  const order: number[] = [];
  // rotations that keep the corners chosen so far tell which of the others are equivalent
  const extend = (keeping: readonly (readonly number[])[]) => {
    if (order.length === shape.corners.length) orders.push([...order]);
    for (let k = 0; k < shape.corners.length; k++) {
      if (order.includes(k) || keeping.some((r) => r[k]! < k)) continue;
      order.push(k);
      extend(keeping.length > 1 ? keeping.filter((r) => r[k] === k) : keeping);
      order.pop();
    }
  };
  extend(rotationsOf(shape));
  knownOrders.set(shape, orders);
  return orders;
}

/** Rotations of an ideal shape onto itself, as permutations of its corners. */
export function rotationsOf(shape: IdealShape): readonly (readonly number[])[] {
  const known = knownRotations.get(shape);
  if (known) return known;
  const { corners } = shape;
  const base = basePair(corners);
  const identity = corners.map((_, i) => i);
  const found = new Map([[identity.join(), identity]]);
  for (const rotation of base ? framesOnto(corners, corners, base, () => true) : []) {
    const image = corners.map((c) => {
      const to = apply3(rotation, c);
      return corners.findIndex((d) => length3(minus3(d, to)) < SAME_CORNER);
    });
    if (!image.includes(-1)) found.set(image.join(), image);
  }
  knownRotations.set(shape, [...found.values()]);
  return knownRotations.get(shape)!;
}

/** Distance below which corners of ideal shapes are one. */
const SAME_CORNER = 1e-6;
/** Two directions with a smaller sine give no orientation. */
const LEAST_SINE = 0.1;

/** The first corner, and the one nearest to a right angle with it; null where all stand in a line. */
function basePair(corners: readonly Vec3[], first = 0): readonly [number, number] | null {
  const sine = (k: number) => length3(cross3(unit3(corners[first]!), unit3(corners[k]!)));
  const second = corners.reduce((best, _, k) => (sine(k) > sine(best) + 1e-9 ? k : best), first);
  return sine(second) < LEAST_SINE ? null : [first, second];
}

/** Axes along one direction, and towards another. */
function frame(a: Vec3, b: Vec3): Mat3 {
  const x = unit3(a);
  const along = dot3(b, x);
  const y = unit3(minus3(b, times(x, along)));
  const z = cross3(x, y);
  return [x[0], y[0], z[0], x[1], y[1], z[1], x[2], y[2], z[2]];
}

/** Rotations that carry pairs of corners onto a pair of directions, as far as two pairs can agree. */
function framesOnto(
  corners: readonly Vec3[],
  directions: readonly Vec3[],
  [first, second]: readonly [number, number],
  isWanted: (i: number, j: number) => boolean,
): Mat3[] {
  const onto = frame(directions[first]!, directions[second]!);
  return corners.flatMap((a, i) =>
    corners.flatMap((b, j) => {
      if (i === j || !isWanted(i, j) || length3(cross3(unit3(a), unit3(b))) < LEAST_SINE) return [];
      return [multiply3(onto, transpose3(frame(a, b)))];
    }),
  );
}

/** Assignments reached by turns of assigning and rotating, from many orientations. */
function ordersByTurns(
  q: CentredPoints,
  p: CentredPoints,
  neighbours: readonly Vec3[],
  shape: IdealShape,
): (readonly number[])[] {
  const rotations = rotationsOf(shape);
  // of pairs that rotations of the shape carry into each other, one is enough
  const isFirst = (i: number, j: number) => rotations.every((r) => r[i]! > i || (r[i] === i && r[j]! >= j));
  const found = new Map<string, readonly number[]>();
  for (let first = 0; first < neighbours.length; first++) {
    const base = basePair(neighbours, first);
    for (const start of base ? framesOnto(shape.corners, neighbours, base, isFirst) : []) {
      const order = improved(q, p, start);
      found.set(order.join(), order);
    }
  }
  return [...found.values()];
}

/** Turns before giving up; two or three are usual. */
const MOST_TURNS = 30;

function improved(q: CentredPoints, p: CentredPoints, start: Mat3): number[] {
  const n = q.points.length - 1;
  let rotation = start;
  let order: number[] = [];
  for (let turn = 0; turn < MOST_TURNS; turn++) {
    const turned = p.points.map((b) => apply3(rotation, b));
    const cost = q.points.slice(0, n).map((a) => turned.slice(0, n).map((b) => -dot3(a, b)));
    const next = leastAssignment(cost);
    if (next.join() === order.join()) break;
    order = next;
    rotation = nearestRotation(overlapMatrix(q, p, order));
  }
  return order;
}

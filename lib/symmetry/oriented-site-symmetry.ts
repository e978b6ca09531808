import { apply, determinant, type IntMat3, type IntVec3, negate } from "../algebra/index.ts";
import { type SignedOrder, signedOrder } from "./geometric-class.ts";
import { axisOf } from "./rotation-axis.ts";

/** Which sets of symmetry directions a symbol names, and whether it writes dots. */
export type DirectionSets =
  | "triclinic"
  | "monoclinic"
  | "orthorhombic"
  | "tetragonal"
  | "hexagonal"
  | "rhombohedral"
  | "cubic";

const HEXAGONAL: readonly (readonly IntVec3[])[] = [
  [[0, 0, 1]],
  [
    [1, 0, 0],
    [0, 1, 0],
    [1, 1, 0],
  ],
  [
    [1, -1, 0],
    [1, 2, 0],
    [2, 1, 0],
  ],
];

/** Primary, secondary and tertiary directions; rhombohedral groups on hexagonal axes have no tertiary ones. */
const DIRECTIONS: Readonly<Record<DirectionSets, readonly (readonly IntVec3[])[]>> = {
  triclinic: [],
  monoclinic: [],
  orthorhombic: [[[1, 0, 0]], [[0, 1, 0]], [[0, 0, 1]]],
  tetragonal: [
    [[0, 0, 1]],
    [
      [1, 0, 0],
      [0, 1, 0],
    ],
    [
      [1, -1, 0],
      [1, 1, 0],
    ],
  ],
  hexagonal: HEXAGONAL,
  rhombohedral: HEXAGONAL.slice(0, 2),
  cubic: [
    [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ],
    [
      [1, 1, 1],
      [1, -1, -1],
      [-1, 1, -1],
      [-1, -1, 1],
    ],
    [
      [1, -1, 0],
      [1, 1, 0],
      [0, 1, -1],
      [0, 1, 1],
      [-1, 0, 1],
      [1, 0, 1],
    ],
  ],
};

/** The symmetry about one direction, and all directions of its set that the group makes equivalent to it. */
interface Element {
  readonly directions: readonly IntVec3[];
  readonly orders: ReadonlySet<SignedOrder>;
}

/**
 * Oriented site-symmetry symbol: one place per set of symmetry directions, a dot where a set carries nothing; within a
 * set, one character group for each class of directions that the site group does not exchange. In triclinic and
 * monoclinic groups no dots are written.
 * @param rotations all rotation parts of the site group, in conventional axes
 * @returns the symbol, or null if a rotation axis is none of the symmetry directions of `sets`
 * Source: International Tables for Crystallography A (2016), section 2.1.3.12.
 */
export function orientedSymbol(rotations: readonly IntMat3[], sets: DirectionSets): string | null {
  const byAxis = collect(rotations);
  if (byAxis.size === 0) return rotations.length === 1 ? "1" : "-1";
  if (sets === "triclinic") return null;
  if (sets === "monoclinic") {
    const [orders] = [...byAxis.values()];
    return byAxis.size === 1 ? elementSymbol(orders!, false) : null;
  }
  let used = 0;
  const places = DIRECTIONS[sets].map((directions) => {
    const elements = classes(directions, byAxis, rotations);
    used += elements.reduce((n, e) => n + e.directions.length, 0);
    return elements;
  });
  if (used !== byAxis.size) return null;
  const several = places.reduce((n, elements) => n + elements.length, 0) > 1;
  return places.map((elements) => place(elements, sets, several)).join("");
}

function place(elements: readonly Element[], sets: DirectionSets, several: boolean): string {
  if (elements.length === 0) return ".";
  // m-3 and m-3m: the three axes are equivalent and only the planes are written
  const symbols = elements.map((e) => {
    const symbol = elementSymbol(e.orders, several);
    return sets === "cubic" && e.directions.length === 3 ? symbol.replace(/^.\/m$/, "m") : symbol;
  });
  const rank = sets === "tetragonal" ? TWOFOLD_FIRST : PLANE_FIRST;
  return symbols.sort((a, b) => rank.indexOf(a) - rank.indexOf(b)).join("");
}

/** Order of inequivalent directions of one set: m.2m in tetragonal, but m.m2 and mm2.. in cubic groups. */
const TWOFOLD_FIRST = ["2", "m"];
const PLANE_FIRST = ["4/m", "-4", "4", "m", "2"];

function elementSymbol(orders: ReadonlySet<SignedOrder>, several: boolean): string {
  const top = Math.max(1, ...orders);
  const plane = orders.has(-2);
  if (top === 6) return plane ? "6/m" : "6";
  if (top === 4) return plane ? "4/m" : "4";
  if (orders.has(-6)) return "-6";
  if (orders.has(-4)) return "-4";
  if (top === 3) return orders.has(-3) ? "-3" : "3";
  if (top === 2) return plane ? (several ? "m" : "2/m") : "2";
  return "m";
}

/** Signed orders of the operations about every axis (normal of a reflection plane), by a key of the axis. */
function collect(rotations: readonly IntMat3[]): Map<string, Set<SignedOrder>> {
  const byAxis = new Map<string, Set<SignedOrder>>();
  for (const W of rotations) {
    const order = signedOrder(W);
    if (Math.abs(order) === 1) continue;
    const axis = axisOf(determinant(W) > 0 ? W : negate(W), Math.abs(order));
    const key = lineKey(axis);
    const orders = byAxis.get(key);
    if (orders) orders.add(order);
    else byAxis.set(key, new Set([order]));
  }
  return byAxis;
}

function classes(
  directions: readonly IntVec3[],
  byAxis: ReadonlyMap<string, ReadonlySet<SignedOrder>>,
  rotations: readonly IntMat3[],
): Element[] {
  const found: Element[] = [];
  const done = new Set<string>();
  for (const direction of directions) {
    const orders = byAxis.get(lineKey(direction));
    if (!orders || done.has(lineKey(direction))) continue;
    const images = new Set(rotations.map((W) => lineKey(apply(W, direction))));
    for (const key of images) done.add(key);
    found.push({ directions: directions.filter((d) => images.has(lineKey(d))), orders });
  }
  return found;
}

/** A direction up to its sign. */
function lineKey(v: IntVec3): string {
  const first = v[0] || v[1] || v[2];
  return first < 0 ? `${-v[0] + 0},${-v[1] + 0},${-v[2] + 0}` : v.join();
}

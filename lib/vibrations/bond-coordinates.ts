import { trace } from "../algebra/index.ts";
import {
  apply3,
  cross3,
  dot3,
  length3,
  type Mat3,
  minus3,
  sequenceFormula,
  unit3,
  type Vec3,
} from "../structure/index.ts";
import type { SparseRow } from "./independent-species.ts";
import type { InternalCoordinate } from "./internal-coordinate.ts";
import type { Scaffold } from "./scaffold.ts";

/** Angles from here on count as straight, with two bends across; degrees. No angle of a cage or a shell comes near. */
export const STRAIGHT_ANGLE = 170;

/** The text that a list and its reverse share. */
function eitherWay<A>(key: Scaffold<A>["key"]): Scaffold<A>["key"] {
  return (atoms) => [key(atoms), key([...atoms].reverse())].sort()[0]!;
}

/** Elements along a chain of bonds, hydrogen last, else the electropositive end first: `S-O`, `O-H`, `N-C-O`. */
export function nameAlong(elements: readonly string[]): string {
  const [first, last] = [elements[0]!, elements.at(-1)!];
  const isTurned = first === "H" || (last !== "H" && !sequenceFormula([first, last]).startsWith(first));
  return (isTurned ? [...elements].reverse() : elements).join("-");
}

function nameOf<A>({ element }: Scaffold<A>, atoms: readonly A[]): string {
  return nameAlong(atoms.map(element));
}

/** The stretch of a bond, written from the centre that it was found at. */
export function stretch<A>(s: Scaffold<A>, a: A, b: A): InternalCoordinate<A> {
  const e = unit3(minus3(s.place(b), s.place(a)));
  const row: SparseRow = [
    [s.index(a), times3(e, -1)],
    [s.index(b), e],
  ];
  const atoms = [a, b];
  return {
    kind: "stretch",
    name: nameOf(s, atoms),
    atoms,
    size: 1,
    rows: [row],
    character: () => 1,
    key: eitherWay(s.key),
  };
}

export function isStraight<A>(s: Scaffold<A>, a: A, centre: A, b: A): boolean {
  const [u, v] = [minus3(s.place(a), s.place(centre)), minus3(s.place(b), s.place(centre))];
  return dot3(unit3(u), unit3(v)) < Math.cos((STRAIGHT_ANGLE * Math.PI) / 180);
}

/** Change of the angle a-centre-b. Source: Wilson, Decius and Cross (1955), section 4-1. */
export function angleBend<A>(s: Scaffold<A>, a: A, centre: A, b: A): InternalCoordinate<A> {
  const [u, v] = [minus3(s.place(a), s.place(centre)), minus3(s.place(b), s.place(centre))];
  const [eu, ev] = [unit3(u), unit3(v)];
  const cosine = dot3(eu, ev);
  const sine = Math.sqrt(1 - cosine * cosine);
  const atA = times3(minus3(times3(eu, cosine), ev), 1 / (sine * length3(u)));
  const atB = times3(minus3(times3(ev, cosine), eu), 1 / (sine * length3(v)));
  const row: SparseRow = [
    [s.index(a), atA],
    [s.index(centre), minus3(times3(atA, -1), atB)],
    [s.index(b), atB],
  ];
  const atoms = [a, centre, b];
  return {
    kind: "bend",
    name: nameOf(s, atoms),
    atoms,
    size: 1,
    rows: [row],
    character: () => 1,
    key: eitherWay(s.key),
  };
}

/** The two bends across the line from a to b. */
export function straightBend<A>(s: Scaffold<A>, a: A, centre: A, b: A): InternalCoordinate<A> {
  const [u, v] = [minus3(s.place(a), s.place(centre)), minus3(s.place(b), s.place(centre))];
  const [p, q] = [length3(u), length3(v)];
  const axis = unit3(minus3(v, u));
  const rows = across(axis).map(
    (e): SparseRow => [
      [s.index(a), times3(e, q / (p + q))],
      [s.index(centre), times3(e, -1)],
      [s.index(b), times3(e, p / (p + q))],
    ],
  );
  const atoms = [a, centre, b];
  const character = (R: Mat3) => trace(R) - along(R, axis);
  return { kind: "bend", name: nameOf(s, atoms), atoms, size: 2, rows, character, key: eitherWay(s.key) };
}

/** Two unit vectors that span the plane across a third. */
export function across(axis: Vec3): [Vec3, Vec3] {
  const e = unit3(cross3(axis, Math.abs(axis[0]) < 0.7 ? [1, 0, 0] : [0, 1, 0]));
  return [e, cross3(axis, e)];
}

export function times3(v: Vec3, f: number): Vec3 {
  return [v[0] * f, v[1] * f, v[2] * f];
}

/** n . R n: 1 or -1 for a line that the operation keeps. */
export function along(R: Mat3, n: Vec3): number {
  return dot3(n, apply3(R, n));
}

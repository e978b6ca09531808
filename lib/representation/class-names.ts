import { gcd } from "../algebra/index.ts";
import type { AxialElement } from "./axial-element.ts";
import type { GroupElement } from "./group-analysis.ts";

/** Name of a class without its size, and its place in a table. */
export interface NamedClass {
  readonly name: string;
  readonly rank: number;
}

/** What the names of the classes of an axial group need besides the elements. */
export interface AxialNaming {
  readonly turns: number;
  readonly inversion: boolean;
  readonly horizontal: boolean;
  /** 0 for an element about a secondary direction, 1 about a tertiary one. */
  readonly rankOf: (element: number) => number;
  /** Names of a reflecting proper element (axis) and of a reflecting improper one (plane), by the same rank. */
  readonly axisNames: readonly [string, string];
  readonly planeNames: readonly [string, string];
}

/**
 * Names of the classes of an axial group: `C4`, `C2'`, `S6^5`, `sigma_h`, `sigma_v`.
 * Ranks give the usual order: rotations about z by rising angle, other axes, then the same times i (or sigma_h).
 */
export function axialClassName(
  members: readonly number[],
  elements: readonly AxialElement[],
  naming: AxialNaming,
): NamedClass {
  const e = elements[members[0]!]!;
  const { turns } = naming;
  const proper = e.flips === e.reflects;
  const block = !proper && (naming.inversion || naming.horizontal) ? 1e6 : 0;
  if (e.reflects) {
    const k = naming.rankOf(members[0]!);
    const name = proper ? naming.axisNames[k]! : naming.planeNames[k]!;
    return { name, rank: block + 1e5 + (proper ? 0 : 1e4) + k };
  }
  const shift = !proper && naming.inversion ? turns / 2 : 0;
  const smallest = Math.min(...members.map((m) => (elements[m]!.turn + shift) % turns));
  const names = members.map((m) => turnName(elements[m]!.turn, turns, e.flips));
  const simplest = names.reduce((a, b) => (b.power < a.power ? b : a));
  return { name: simplest.name, rank: block + smallest };
}

/** Name of a rotation (or rotoreflection, by `flips`) by turn/turns about the principal axis, and its power. */
export function turnName(turn: number, turns: number, flips: boolean): { name: string; power: number } {
  if (turn === 0) return { name: flips ? "sigma_h" : "E", power: 1 };
  if (flips && 2 * turn === turns) return { name: "i", power: 1 };
  const g = gcd(turn, turns);
  const n = turns / g;
  let power = turn / g;
  if (flips && power % 2 === 0) power += n; // S_n^k of even k would not reflect
  return { name: `${flips ? "S" : "C"}${n}${power > 1 ? `^${power}` : ""}`, power };
}

/**
 * Names of the classes of a cubic group.
 * @param main whether the axis of a twofold rotation part is one of the three main axes
 * @param sense 1 or -1 by the sense of the threefold rotations of the class where the group tells them apart, else 0
 */
export function cubicClassName(part: GroupElement, main: boolean, sense: number): NamedClass {
  const improper = part.proper ? 0 : 1e3;
  const power = sense < 0 ? 1 : 0;
  switch (part.order) {
    case 1:
      return { name: part.proper ? "E" : "i", rank: improper };
    case 2:
      if (main) return { name: part.proper ? "C2" : "sigma_h", rank: improper + 30 };
      return { name: part.proper ? "C2'" : "sigma_d", rank: improper + 50 };
    case 3:
      // The inversion turns a third of a turn into the inverse of a sixth with reflection.
      if (part.proper) return { name: power ? "C3^2" : "C3", rank: 10 + power };
      return { name: sense > 0 ? "S6^5" : "S6", rank: improper + 10 + power };
    default:
      return { name: part.proper ? "C4" : "S4", rank: improper + 40 };
  }
}

/** Names of the classes of I and Ih. The inversion takes C5 to S10^3 and C5^2 to S10. */
export function icosahedralClassName(part: GroupElement): NamedClass {
  const { proper, order } = part;
  const improper = proper ? 0 : 1e3;
  const single = part.trace > 0; // 1 + 2 cos 72 degrees against 1 + 2 cos 144 degrees
  switch (order) {
    case 1:
      return { name: proper ? "E" : "i", rank: improper };
    case 2:
      return { name: proper ? "C2" : "sigma", rank: improper + 40 };
    case 3:
      return { name: proper ? "C3" : "S6", rank: improper + 30 };
    default:
      if (proper) return { name: single ? "C5" : "C5^2", rank: single ? 10 : 20 };
      return { name: single ? "S10^3" : "S10", rank: improper + (single ? 20 : 10) };
  }
}

import { gcd } from "../algebra/index.ts";
import type { AxialElement } from "./axial-element.ts";
import type { GroupTable } from "./group-table.ts";

/** Character of a physically irreducible representation, one value per element. */
export interface ElementCharacter {
  readonly dimension: number;
  /** Mean of |character|^2: 2 for a pair of complex conjugate representations taken as one real species, else 1. */
  readonly norm: 1 | 2;
  readonly values: readonly number[];
}

/**
 * All physically irreducible characters of a group that keeps an axis, that is, of a subgroup of O(2) x {1, flip}.
 * The elements that do not reflect the plane form an abelian subgroup K inside C_n x {1, flip}. Its characters
 * exp(i k angle) (times -1 on flips), taken with their conjugates, give the two-dimensional species; the real ones
 * extend to the reflecting elements in two ways.
 * @param turns units per full turn of the `turn` of the elements
 */
export function axialCharacters(
  elements: readonly AxialElement[],
  turns: number,
  table: GroupTable,
): ElementCharacter[] {
  const unit = elements.reduce((g, e) => (e.reflects ? g : gcd(g, e.turn)), turns);
  const n = turns / unit;
  const parities = elements.some((e) => !e.reflects && e.flips && e.turn === 0) ? [1, -1] : [1];
  const reflection = elements.findIndex((e) => e.reflects);
  const list: ElementCharacter[] = [];
  for (const parity of parities) {
    for (let k = 0; 2 * k <= n; k++) {
      const cosines = elements.map((e) =>
        e.reflects ? 0 : twiceCosine((k * e.turn) / unit, n) * (e.flips ? parity : 1) + 0,
      );
      if (k !== 0 && 2 * k !== n) list.push({ dimension: 2, norm: reflection < 0 ? 2 : 1, values: cosines });
      else if (reflection < 0) list.push({ dimension: 1, norm: 1, values: cosines.map((c) => c / 2) });
      else list.push(...extensions(cosines, elements, reflection, table));
    }
  }
  return list;
}

/** The two one-dimensional characters of the whole group that agree with half of `cosines` on K. */
function extensions(
  cosines: readonly number[],
  elements: readonly AxialElement[],
  reflection: number,
  table: GroupTable,
): ElementCharacter[] {
  const row = table.order * reflection; // the reflection is its own inverse, so reflection * e lies in K
  return [1, -1].map((sign) => {
    const values = elements.map((e, i) =>
      e.reflects ? (sign * cosines[table.products[row + i]!]!) / 2 : cosines[i]! / 2,
    );
    return { dimension: 1, norm: 1, values };
  });
}

/** 2 cos(2 pi j / n), exact where it is an integer. */
export function twiceCosine(j: number, n: number): number {
  const value = 2 * Math.cos((2 * Math.PI * (j % n)) / n);
  const nearest = Math.round(value);
  return Math.abs(value - nearest) < 1e-12 ? nearest + 0 : value;
}

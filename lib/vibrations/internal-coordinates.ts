import { angleBend, isStraight, straightBend, stretch } from "./bond-coordinates.ts";
import type { InternalCoordinate } from "./internal-coordinate.ts";
import { outOfPlane } from "./out-of-plane.ts";
import type { Scaffold, Star } from "./scaffold.ts";

/**
 * Bond stretches, bends of the angles at the centres, and motions out of the plane of planar centres, each once.
 * Straight angles have two bends where the centre has no other neighbour; else its other angles describe them.
 * Source: E. B. Wilson, J. C. Decius and P. C. Cross, Molecular Vibrations, McGraw-Hill, New York 1955, chapter 4.
 */
export function internalCoordinates<A>(scaffold: Scaffold<A>, stars: readonly Star<A>[]): InternalCoordinate<A>[] {
  const known = new Set<string>();
  const isNew = (c: InternalCoordinate<A>) => {
    const key = `${c.kind} ${c.key(c.atoms)}`;
    if (known.has(key)) return false;
    known.add(key);
    return true;
  };
  return stars.flatMap((star) => coordinatesOf(scaffold, star)).filter(isNew);
}

function coordinatesOf<A>(scaffold: Scaffold<A>, star: Star<A>): InternalCoordinate<A>[] {
  const { centre, ligands } = star;
  const bends = ligands.flatMap((a, i) =>
    ligands.slice(i + 1).flatMap((b) => {
      if (!isStraight(scaffold, a, centre, b)) return [angleBend(scaffold, a, centre, b)];
      return ligands.length === 2 ? [straightBend(scaffold, a, centre, b)] : [];
    }),
  );
  const plane = outOfPlane(scaffold, star);
  return [...ligands.map((l) => stretch(scaffold, centre, l)), ...(plane ? [plane] : []), ...bends];
}

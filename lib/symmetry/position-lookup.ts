import { apply, type IntVec3, type RatVec3, ratVec3 } from "../algebra/index.ts";
import { directionsOfForm } from "./affine-form.ts";
import { subspaceThrough } from "./affine-subspace.ts";
import { type PrimitiveGroup, primitiveGroup } from "./primitive-group.ts";
import { referenceGroup } from "./reference-group.ts";
import { orbitKeys } from "./wyckoff-enumeration.ts";
import { tabulated, type WyckoffPosition, wyckoffPosition } from "./wyckoff-positions.ts";

/** What is known of a type so far: index of a position by key of every subspace of its orbit. */
interface Lookup {
  readonly byKey: Map<string, number>;
  readonly done: Set<number>;
}

const cache = new Map<number, Lookup>();

/**
 * The position of a space-group type whose orbit holds the points point + (span of directions), in the reference
 * setting, or null where they are the fixed points of no site-symmetry group. Orbits are worked out as they are needed.
 * @param directions integer vectors, dependent ones allowed
 * @param order order of the site-symmetry group if it is known: only positions of that order are looked at
 */
export function positionAt(
  number: number,
  point: RatVec3,
  directions: readonly IntVec3[],
  order: number | null = null,
): WyckoffPosition | null {
  const group = referenceGroup(number);
  const primitive = primitiveGroup(group);
  const { key } = inPrimitive(point, directions, primitive);
  const lookup = cache.get(number) ?? { byKey: new Map(), done: new Set() };
  cache.set(number, lookup);
  const known = lookup.byKey.get(key);
  if (known !== undefined) return wyckoffPosition(number, known);
  for (const [index, { multiplicity }] of tabulated(number).entries()) {
    if (lookup.done.has(index) || (order !== null && multiplicity * order !== group.operations.length)) continue;
    const { form } = wyckoffPosition(number, index);
    const s = inPrimitive(form.t, directionsOfForm(form), primitive);
    for (const k of orbitKeys(s, primitive)) lookup.byKey.set(k, index);
    lookup.done.add(index);
    if (lookup.byKey.get(key) === index) return wyckoffPosition(number, index);
  }
  return null;
}

function inPrimitive(point: RatVec3, directions: readonly IntVec3[], { toPrimitive }: PrimitiveGroup) {
  return subspaceThrough(
    ratVec3(apply(toPrimitive, point.n), point.d),
    directions.map((v) => apply(toPrimitive, v)),
  );
}

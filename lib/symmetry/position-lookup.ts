import { apply, type IntVec3, type RatVec3, ratVec3 } from "../algebra/index.ts";
import { directionsOfForm } from "./affine-form.ts";
import { subspaceThrough } from "./affine-subspace.ts";
import { type PrimitiveGroup, primitiveGroup } from "./primitive-group.ts";
import { referenceGroup } from "./reference-group.ts";
import { orbitKeys } from "./wyckoff-enumeration.ts";
import { type WyckoffPosition, wyckoffPositions } from "./wyckoff-positions.ts";

const cache = new Map<number, ReadonlyMap<string, number>>();

/**
 * The position of a space-group type whose orbit holds the points point + (span of directions), in the reference
 * setting, or null where they are the fixed points of no site-symmetry group.
 * @param directions integer vectors, dependent ones allowed
 */
export function positionAt(number: number, point: RatVec3, directions: readonly IntVec3[]): WyckoffPosition | null {
  const { key } = inPrimitive(point, directions, primitiveGroup(referenceGroup(number)));
  const index = positionsByKey(number).get(key);
  return index === undefined ? null : wyckoffPositions(number)[index]!;
}

/** Index of the position by key of every subspace of its orbit; built on first use. */
function positionsByKey(number: number): ReadonlyMap<string, number> {
  const known = cache.get(number);
  if (known) return known;
  const primitive = primitiveGroup(referenceGroup(number));
  const fresh = new Map<string, number>();
  wyckoffPositions(number).forEach(({ form }, index) => {
    const s = inPrimitive(form.t, directionsOfForm(form), primitive);
    for (const key of orbitKeys(s, primitive)) fresh.set(key, index);
  });
  cache.set(number, fresh);
  return fresh;
}

function inPrimitive(point: RatVec3, directions: readonly IntVec3[], { toPrimitive }: PrimitiveGroup) {
  return subspaceThrough(
    ratVec3(apply(toPrimitive, point.n), point.d),
    directions.map((v) => apply(toPrimitive, v)),
  );
}

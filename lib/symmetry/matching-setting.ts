import { IDENTITY, modOne, type RatVec3, ratDeterminant, ratVec3, transformVector } from "../algebra/index.ts";
import { operationKey, reduce } from "./operation.ts";
import { referenceGroup } from "./reference-group.ts";
import { type Setting, settingsOf } from "./settings.ts";
import type { SpaceGroup } from "./space-group.ts";
import { reverse, transformOperation } from "./transformation.ts";

/**
 * The conventional setting of a type in which a group is written exactly so, or null if it has no such setting. The
 * reference setting is tried first; a setting is left at the first operation of it that the group lacks.
 */
export function matchingSetting(number: number, group: Pick<SpaceGroup, "operations">): Setting | null {
  const keys = new Set(group.operations.map(operationKey));
  return settingsOf(number).find((setting) => isWrittenIn(setting, keys)) ?? null;
}

const UNIT: readonly RatVec3[] = [ratVec3([1, 0, 0]), ratVec3([0, 1, 0]), ratVec3([0, 0, 1])];

function isWrittenIn({ number, toReference }: Setting, keys: ReadonlySet<string>): boolean {
  const reference = referenceGroup(number);
  const { n, d } = ratDeterminant(toReference.P); // volume of the reference cell over that of this one
  if (keys.size * n !== reference.operations.length * d) return false;
  const isTranslation = (t: RatVec3) =>
    keys.has(operationKey({ W: IDENTITY, w: modOne(transformVector(toReference.P, t)) }));
  if (![...UNIT, ...reference.centrings].every(isTranslation)) return false;
  const change = reverse(toReference);
  return reference.representatives.every((a) => {
    const moved = transformOperation(a, change, toReference);
    return moved !== null && keys.has(operationKey(reduce(moved)));
  });
}

import { IDENTITY, modOne, ratDeterminant, ratVec3, transformVector } from "../algebra/index.ts";
import { closeGroup } from "./group-closure.ts";
import { hallSymbolBy } from "./hall-symbol-of.ts";
import type { Operation } from "./operation.ts";
import { referenceGroup } from "./reference-group.ts";
import type { Setting } from "./settings.ts";
import { reverse, transformOperation } from "./transformation.ts";

/** All operations of a setting modulo Z^3, translations in [0, 1), the identity first; computed at each call. */
export function settingOperations(setting: Pick<Setting, "number" | "toReference">): Operation[] {
  return carryGroup(referenceGroup(setting.number).operations, setting);
}

function carryGroup(reference: readonly Operation[], setting: Pick<Setting, "toReference">): Operation[] {
  const { toReference } = setting;
  const change = reverse(toReference);
  const moved = reference.map((a) => transformOperation(a, change, toReference));
  const kept = moved.filter((a) => a !== null);
  if (kept.length < moved.length) throw new RangeError("the cell of the setting is not kept by its operations");
  const det = ratDeterminant(toReference.P);
  // a cell of the same size with integer axes has the same translations, so the list is already whole
  if (toReference.P.d === 1 && Math.abs(det.n) === 1) return kept.map((a) => ({ W: a.W, w: modOne(a.w) }));
  const unit = [ratVec3([1, 0, 0]), ratVec3([0, 1, 0]), ratVec3([0, 0, 1])];
  const lattice = unit.map((e) => ({ W: IDENTITY, w: modOne(transformVector(toReference.P, e)) }));
  return closeGroup([...kept, ...lattice]);
}

/** Hall symbol of a setting: it denotes exactly the operations of the setting. */
export function settingHall(setting: Pick<Setting, "number" | "toReference">): string {
  return hallSymbolBy(settingOperations(setting), setting.number, setting.toReference);
}

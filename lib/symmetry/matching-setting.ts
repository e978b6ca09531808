import { type Operation, operationKey } from "./operation.ts";
import { settingOperations } from "./setting-group.ts";
import { type Setting, settingsOf } from "./settings.ts";

/** The conventional setting of a type in which a group is written exactly so, or null if it has no such setting. */
export function matchingSetting(number: number, operations: readonly Operation[]): Setting | null {
  const keys = new Set(operations.map(operationKey));
  for (const setting of settingsOf(number)) {
    const candidate = settingOperations(setting);
    if (candidate.length === keys.size && candidate.every((a) => keys.has(operationKey(a)))) return setting;
  }
  return null;
}

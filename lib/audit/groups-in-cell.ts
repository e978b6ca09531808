import { type IntMat3, type IntVec3, negate, type RatVec3 } from "../algebra/index.ts";
import {
  extinctionSymbol,
  formatVector,
  isSystematicallyAbsent,
  type Setting,
  type SpaceGroup,
  settingOperations,
  settingsOf,
  spaceGroup,
  spaceGroupTypes,
} from "../symmetry/index.ts";
import { keepsReflection } from "./observations.ts";

/** A space group written in a given cell. */
export interface GroupInCell {
  readonly setting: Setting;
  readonly group: SpaceGroup;
}

/** Space groups with the same absences. */
export interface Extinction {
  /** `P 1 21/c 1`. */
  readonly symbol: string;
  /** Reflections absent among a fixed set of small ones: orders symbols by how much they forbid. */
  readonly forbidden: number;
  /** One for each type, in the order of their numbers. */
  readonly groups: readonly GroupInCell[];
}

/** Crystal classes of each Laue class, by Schoenflies symbol. */
const CLASSES: Readonly<Record<string, string>> = {
  "-1": "C1 Ci",
  "2/m": "C2 Cs C2h",
  mmm: "D2 C2v D2h",
  "4/m": "C4 S4 C4h",
  "4/mmm": "D4 C4v D2d D4h",
  "-3": "C3 C3i",
  "-3m": "D3 C3v D3d",
  "6/m": "C6 C3h C6h",
  "6/mmm": "D6 C6v D3h D6h",
  "m-3": "T Th",
  "m-3m": "O Td Oh",
};

/**
 * Every space group of a Laue class that can be written conventionally in a cell, those with the same absences together.
 * @param rotations rotation parts of determinant 1 of the Laue class, in the basis of the cell
 * @param centrings of the cell
 */
export function groupsInCell(
  laueClass: string,
  rotations: readonly IntMat3[],
  centrings: readonly RatVec3[],
): Extinction[] {
  const laue = new Set([...rotations, ...rotations.map(negate)].map((W) => W.join()));
  const lattice = centrings.map(formatVector).sort().join(" ");
  const probes = specialIndices(rotations);
  const found = new Map<string, GroupInCell[]>();
  for (const { setting, group } of settingsOfClass(laueClass)) {
    const own = new Set(group.representatives.flatMap(({ W }) => [W.join(), negate(W).join()]));
    if (own.size !== laue.size || [...own].some((W) => !laue.has(W))) continue;
    if (group.centrings.map(formatVector).sort().join(" ") !== lattice) continue;
    const pattern = probes.map((h) => (isSystematicallyAbsent(group.operations, h) ? 1 : 0)).join("");
    const same = found.get(pattern);
    if (!same) found.set(pattern, [{ setting, group }]);
    else if (same.every((g) => g.setting.number !== setting.number)) same.push({ setting, group });
  }
  return [...found].map(([pattern, groups]) => ({
    symbol: extinctionSymbol(groups[0]!.setting, groups[0]!.group),
    forbidden: pattern.replaceAll("0", "").length,
    groups,
  }));
}

const known = new Map<string, readonly GroupInCell[]>();

/** Settings of the types of a Laue class, kept; the other origin choice has the same absences and is left out. */
function settingsOfClass(laueClass: string): readonly GroupInCell[] {
  const found = known.get(laueClass);
  if (found) return found;
  const classes = (CLASSES[laueClass] ?? "").split(" ");
  const types = spaceGroupTypes().filter((t) => classes.includes(t.schoenflies.split("^")[0]!));
  const settings = types.flatMap(({ number }) => settingsOf(number).filter((s) => s.choice !== "1"));
  const fresh = settings.map((setting) => ({ setting, group: spaceGroup(settingOperations(setting)) }));
  known.set(laueClass, fresh);
  return fresh;
}

/** Largest index tried: periods of screw axes and diamond glides divide 6 or 4. */
const PROBED = 6;

/** Small reflections that some rotation of the class or its opposite keeps: absences differ between groups only there. */
function specialIndices(rotations: readonly IntMat3[]): IntVec3[] {
  const keeping = [...rotations.slice(1), ...rotations.map(negate)];
  const found: IntVec3[] = [];
  for (let h = -PROBED; h <= PROBED; h++) {
    for (let k = -PROBED; k <= PROBED; k++) {
      for (let l = 0; l <= PROBED; l++) {
        if (keeping.some((W) => keepsReflection(W, [h, k, l]))) found.push([h, k, l]);
      }
    }
  }
  return found;
}

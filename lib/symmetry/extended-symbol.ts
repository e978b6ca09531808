import { directionElements } from "./direction-elements.ts";
import { directionSystem, type SymbolPart, splitSymbol, symmetryDirections } from "./hermann-mauguin-symbol.ts";
import { settingOperations } from "./setting-group.ts";
import type { Setting } from "./settings.ts";

/**
 * Symbol of a setting with all kinds of axes and planes along each symmetry direction, the ones of the full symbol
 * first, joined by commas: `C 1 2/c,21/n 1`, `I 4/m,42/n 2/m,21/n 2/m,21/c`. International Tables print the further
 * ones in lines below; found here from the operations.
 */
export function extendedSymbol(setting: Setting): string {
  const full = splitSymbol(setting.hermannMauguin.full);
  const system = directionSystem(setting.number);
  const rhombohedral = setting.choice === "R";
  const directions = symmetryDirections(system, rhombohedral);
  const hexagonal = !rhombohedral && (system === "trigonal" || system === "rhombohedral" || system === "hexagonal");
  const operations = settingOperations(setting);
  const parts = full.parts.map((part, i) => {
    const direction = directions[i];
    if (!direction || part.axis === "1") return part.axis ?? part.plane;
    const found = directionElements(operations, direction, hexagonal);
    const planes = found.planes.map((letters) =>
      part.plane && letters.includes(part.plane) ? part.plane : letters[0]!,
    );
    return pairs(part, found.axes, planes).join(",");
  });
  return [full.lattice, ...parts].join(" ");
}

/** `2/c`, `21/n`: the axes and the planes side by side, those that the symbol names in front. */
function pairs(part: SymbolPart, axes: readonly string[], planes: readonly string[]): string[] {
  const a = named(part.axis, axes);
  const p = named(part.plane, planes);
  return Array.from({ length: Math.max(a.length, p.length) }, (_, k) => {
    const axis = a[k] ?? "";
    const plane = p[k] ?? "";
    return axis && plane ? `${axis}/${plane}` : axis || plane;
  });
}

/** The list with the named member first; nothing where the symbol has no member of this sort. */
function named(name: string | null, list: readonly string[]): string[] {
  return name === null ? [] : [name, ...list.filter((e) => e !== name)];
}

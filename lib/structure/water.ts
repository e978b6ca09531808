import { bondClasses, isHydrogen } from "./bond-class.ts";
import type { ContactTable } from "./contact-table.ts";

/**
 * Frees the molecules of water: bonds between their oxygen and a metal are undone. A spectrum shows nu1 to nu3 and the
 * librations of water whether it is coordinated or not, and the bonds to a metal as its translations.
 */
export function freeWater(table: ContactTable): void {
  table.elements.forEach((_, atom) => {
    if (!isWater(table, atom)) return;
    for (const k of table.around(atom)) if (isMetal(table, table.other(k, atom))) table.cut(k, "water");
  });
}

/** Whether an atom is oxygen that bears two hydrogen atoms and no other non-metal. */
function isWater(table: ContactTable, atom: number): boolean {
  if (table.elements[atom] !== "O") return false;
  const { nonMetal } = bondClasses();
  const elements = table.bonded(atom).flatMap((j) => table.elements[j] ?? []);
  return elements.filter(isHydrogen).length >= 2 && elements.every((e) => isHydrogen(e) || !nonMetal.has(e));
}

function isMetal(table: ContactTable, atom: number): boolean {
  const element = table.elements[atom];
  return element != null && !bondClasses().nonMetal.has(element);
}

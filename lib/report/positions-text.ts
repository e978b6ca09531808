import type { PositionsAnswer } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";
import { textTable } from "./table.ts";

/** All positions of the cell, a line each. */
export function positionsText(answer: PositionsAnswer): string {
  const rows = answer.positions.map((p) => [
    p.label,
    p.element ?? "?",
    formatNumber(p.x, 6),
    formatNumber(p.y, 6),
    formatNumber(p.z, 6),
    occupancyText(p.occupancy),
    p.operation,
  ]);
  const right = { align: "right" } as const;
  return textTable(
    [
      { heading: "label" },
      { heading: "element" },
      { heading: "x", ...right },
      { heading: "y", ...right },
      { heading: "z", ...right },
      { heading: "occupancy", ...right },
      { heading: "made by" },
    ],
    rows,
  );
}

/** `1`, `0.5`, `0.333`. */
export function occupancyText(occupancy: number): string {
  return String(Number(formatNumber(occupancy, 4)));
}

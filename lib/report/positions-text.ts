import type { PositionsAnswer } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";
import { textTable } from "./table.ts";

/** All positions, a line each, orbit by orbit, with what made them; the cell first where it is another one. */
export function positionsText(answer: PositionsAnswer): string {
  const rows = answer.positions.map((p) => [
    p.label,
    p.element ?? "?",
    formatNumber(p.x, 6),
    formatNumber(p.y, 6),
    formatNumber(p.z, 6),
    occupancyText(p.occupancy),
    p.operation,
    p.code ?? "",
    p.meaning,
  ]);
  const right = { align: "right" } as const;
  const table = textTable(
    [
      { heading: "label" },
      { heading: "element" },
      { heading: "x", ...right },
      { heading: "y", ...right },
      { heading: "z", ...right },
      { heading: "occupancy", ...right },
      { heading: "made by" },
      { heading: "code" },
      { heading: "meaning" },
    ],
    rows,
  );
  return `${cellLines(answer)}${table}`;
}

function cellLines({ cell: { cell, P, p, symmetry, volume }, count }: PositionsAnswer): string {
  if (P === "a,b,c" && p === "0,0,0" && symmetry === "kept") return "";
  const numbers = cell.map((e, i) => formatNumber(e, i < 3 ? 4 : 3)).join(" ");
  const whose =
    symmetry === "kept" ? "of this cell" : "of the cell of the file; the new cell is written without symmetry";
  return [
    `cell ${numbers}, volume ${formatNumber(volume, 2)} A^3: axes ${P}, origin ${p} in terms of the cell of the file`,
    `${count} atoms; operations and codes are those ${whose}`,
    "",
    "",
  ].join("\n");
}

/** `1`, `0.5`, `0.333`. */
export function occupancyText(occupancy: number): string {
  return String(Number(formatNumber(occupancy, 4)));
}

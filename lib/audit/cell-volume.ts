import { metricOf } from "../structure/index.ts";
import { type AuditInput, rounding, statedNumber, statementOf } from "./audit-input.ts";
import { type Criterion, type Finding, finding } from "./finding.ts";
import { CELL_NAMES, cellTolerance, statedCell } from "./stated-cell.ts";

const VOLUME: Criterion = {
  id: "cell-volume",
  severity: "contradiction",
  criterion:
    "The volume stated differs from abc sqrt(1 - cos^2 alpha - cos^2 beta - cos^2 gamma + 2 cos alpha cos beta cos gamma) " +
    "by more than its standard uncertainty and the rounding of all seven numbers.",
  source: "Definition of the cell volume; International Tables for Crystallography A (2016), chapter 1.3.",
  advice: "Look for a wrong digit in the volume or in one of the six cell parameters.",
};

export const criteria: readonly Criterion[] = [VOLUME];

/** Is the stated volume that of the stated cell? */
export function check(input: AuditInput): Finding[] {
  const stated = statedNumber(input, "_cell.volume");
  const cell = statedCell(input);
  if (!stated || !cell || !input.metric) return [];
  const volume = input.metric.volume;
  const byCell = cellTolerance(cell, (c) => metricOf(c).volume);
  const tolerance = rounding(stated) + (stated.su ?? 0) + byCell;
  const difference = stated.value - volume;
  if (Math.abs(difference) <= tolerance) return [];
  const shown = volume.toFixed(Math.max(2, Math.min(4, stated.decimals)));
  const message = `the stated cell volume ${stated.text} Å^3 is not that of the cell, ${shown} Å^3`;
  return [
    finding(VOLUME, input.place(stated.name, stated.span), message, {
      stated: statementOf(stated),
      against: { what: `volume of ${CELL_NAMES}`, value: volume },
      difference,
      tolerance,
      unit: "Å^3",
    }),
  ];
}

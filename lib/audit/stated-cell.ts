import type { Cell } from "../structure/index.ts";
import { type AuditInput, rounding, type StatedNumber, statedNumber } from "./audit-input.ts";

/** The six cell parameters as written. */
export type StatedCell = Readonly<Record<keyof Cell, StatedNumber>>;

/** How messages call them together. */
export const CELL_NAMES = "the six cell parameters";

const ITEMS: Readonly<Record<keyof Cell, string>> = {
  a: "_cell.length_a",
  b: "_cell.length_b",
  c: "_cell.length_c",
  alpha: "_cell.angle_alpha",
  beta: "_cell.angle_beta",
  gamma: "_cell.angle_gamma",
};

const PARAMETERS = ["a", "b", "c", "alpha", "beta", "gamma"] as const;

/** The cell with places and uncertainties; null where a parameter is missing. */
export function statedCell(input: AuditInput): StatedCell | null {
  const read = PARAMETERS.map((p) => [p, statedNumber(input, ITEMS[p])] as const);
  return read.every(([, n]) => n !== null) ? (Object.fromEntries(read) as unknown as StatedCell) : null;
}

/** The parameters alone. */
export function cellOfStated(cell: StatedCell): Cell {
  return Object.fromEntries(PARAMETERS.map((p) => [p, cell[p].value])) as unknown as Cell;
}

/**
 * An angle written as a whole number of degrees that symmetry often fixes is exact: no rounding, no uncertainty.
 */
function slack(n: StatedNumber, kind: "rounding" | "su"): number {
  if (/^(?:90|120|60)(?:\.0*)?$/.test(n.text)) return 0;
  return kind === "rounding" ? rounding(n) : (n.su ?? 0);
}

/**
 * How much a quantity of the cell may change by the rounding of the six parameters: sum of the absolute changes.
 * @param of must be defined in the neighbourhood of the cell
 */
export function cellTolerance(cell: StatedCell, of: (cell: Cell) => number): number {
  return changes(cell, of, "rounding").reduce((s, d) => s + Math.abs(d), 0);
}

/** Standard uncertainty of a quantity of the cell, the parameters taken as independent. */
export function cellUncertainty(cell: StatedCell, of: (cell: Cell) => number): number {
  return Math.hypot(...changes(cell, of, "su"));
}

function changes(cell: StatedCell, of: (cell: Cell) => number, kind: "rounding" | "su"): number[] {
  const values = cellOfStated(cell);
  const start = of(values);
  return PARAMETERS.flatMap((p) => {
    const step = slack(cell[p], kind);
    return step > 0 ? [of({ ...values, [p]: values[p] + step }) - start] : [];
  });
}

import type { Span } from "../problem.ts";
import type { Vec3 } from "./cell.ts";
import type { WrittenCell } from "./cell-parameters-text.ts";
import type { DisplacementTensor } from "./displacement.ts";

/** A number of a paper, with its s.u. if it has one. */
export interface MeasuredNumber {
  readonly value: number;
  readonly su: number | null;
}

/** A coordinate as a paper writes it, `0.2568(3)`, `1/4`, `x+1/2`, `-2x`: linear in the free parameters x, y, z. */
export interface TableCoordinate {
  readonly coefficients: Vec3;
  readonly constant: number;
  readonly su: number | null;
}

export const PARAMETERS = ["x", "y", "z"] as const;
/** Values of the free parameters of a position. */
export type PositionParameters = Readonly<Partial<Record<(typeof PARAMETERS)[number], MeasuredNumber>>>;

/** One line of a table of sites. */
export interface TableSite {
  readonly label: string;
  /** Element with or without charge, `Ca2+`; null where the label tells it. */
  readonly species: string | null;
  /** Points of the position in the cell; null where only the letter is given, or none. */
  readonly multiplicity: number | null;
  /** Letter of the Wyckoff position, `A` for the alpha of P m m m; null where the coordinates are to tell it. */
  readonly letter: string | null;
  readonly coordinates: readonly [TableCoordinate, TableCoordinate, TableCoordinate] | null;
  readonly parameters: PositionParameters;
  readonly occupancy: number;
  readonly displacement: DisplacementTensor | null;
  readonly spans: SiteSpans;
}

/** Places of the parts of a line in the text; where a part is absent, of the whole line. */
export interface SiteSpans {
  readonly line: Span;
  readonly species: Span;
  readonly position: Span;
  readonly coordinates: Span;
  readonly occupancy: Span;
}

/** A structure as a paper gives it: group, cell, list of sites. */
export interface SiteTable {
  /** Empty if it has none. */
  readonly name: string;
  readonly group: { readonly text: string; readonly span: Span };
  readonly cell: WrittenCell;
  readonly sites: readonly TableSite[];
}

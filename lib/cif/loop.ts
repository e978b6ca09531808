import type { Span } from "../problem.ts";
import type { TokenSource } from "./token-buffer.ts";
import { type CifValue, valueAt } from "./value.ts";

/** A loop: rows of values under data names. Names are compared without regard to capitals. */
export interface CifLoop {
  /** Data names as written, in the order of the columns. */
  readonly names: readonly string[];
  readonly rowCount: number;
  readonly span: Span;
  has(name: string): boolean;
  /** Column of a data name, from 0, or -1. */
  columnIndex(name: string): number;
  /** Value in a row, both from 0, or null outside the loop. */
  at(row: number, column: number): CifValue | null;
  value(row: number, name: string): CifValue | null;
}

/** Where the values of a loop begin, as token indices. */
export interface LoopCells {
  readonly rowCount: number;
  readonly columnCount: number;
  /** First token of every value, row after row; null where the values are consecutive tokens from `first` on. */
  readonly starts: Int32Array | null;
  readonly first: number;
}

/** A loop over scanned tokens; a value is made when it is asked for. */
export class TokenLoop implements CifLoop {
  readonly names: readonly string[];
  readonly span: Span;
  readonly rowCount: number;
  readonly #from: TokenSource;
  readonly #cells: LoopCells;
  #columns: ReadonlyMap<string, number> | null = null;

  constructor(from: TokenSource, names: readonly string[], cells: LoopCells, span: Span) {
    this.names = names;
    this.span = span;
    this.rowCount = cells.rowCount;
    this.#from = from;
    this.#cells = cells;
  }

  has(name: string): boolean {
    return this.columnIndex(name) >= 0;
  }

  columnIndex(name: string): number {
    this.#columns ??= columnsOf(this.names);
    return this.#columns.get(name) ?? this.#columns.get(name.toLowerCase()) ?? -1;
  }

  at(row: number, column: number): CifValue | null {
    const { rowCount, columnCount, starts, first } = this.#cells;
    if (!(row >= 0 && row < rowCount && column >= 0 && column < columnCount)) return null;
    const cell = row * columnCount + column;
    return valueAt(this.#from, starts ? starts[cell]! : first + cell);
  }

  value(row: number, name: string): CifValue | null {
    return this.at(row, this.columnIndex(name));
  }
}

/** Columns by lower-case name, and by the name as written, which spares the usual caller the change of case. */
function columnsOf(names: readonly string[]): ReadonlyMap<string, number> {
  const columns = new Map<string, number>();
  for (let i = names.length - 1; i >= 0; i--) {
    columns.set(names[i]!.toLowerCase(), i);
    columns.set(names[i]!, i);
  }
  return columns;
}

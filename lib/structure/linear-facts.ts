/** Entries of rows below this are rounding: rows hold small fractions. */
const ROUNDING = 1e-9;

/** What is known of the unknowns of a linear system, equation by equation, in echelon form. */
export class LinearFacts {
  private readonly size: number;
  private readonly rows: { readonly at: number; readonly row: readonly number[]; readonly value: number }[] = [];

  constructor(size: number) {
    this.size = size;
  }

  /** The value of a combination of the unknowns, or null where it does not follow. */
  valueOf(row: readonly number[]): number | null {
    const { rest, value } = this.reduced(row, 0);
    return rest.some((e) => Math.abs(e) > ROUNDING) ? null : -value + 0;
  }

  /** Learns the value of a combination that did not follow before. */
  add(row: readonly number[], value: number): void {
    const { rest, value: left } = this.reduced(row, value);
    const sizes = rest.map(Math.abs);
    const at = sizes.indexOf(Math.max(...sizes));
    this.rows.push({ at, row: rest.map((e) => e / rest[at]!), value: left / rest[at]! });
  }

  /** Takes a combination as known without asking for its value; false if it was known before. */
  addIfNew(row: readonly number[]): boolean {
    if (this.rows.length === this.size || this.valueOf(row) !== null) return false;
    this.add(row, 0);
    return true;
  }

  private reduced(row: readonly number[], value: number): { rest: readonly number[]; value: number } {
    let rest = row;
    let left = value;
    for (const known of this.rows) {
      const k = rest[known.at]!;
      if (Math.abs(k) <= ROUNDING) continue;
      rest = rest.map((e, i) => e - k * known.row[i]!);
      left -= k * known.value;
    }
    return { rest, value: left };
  }
}

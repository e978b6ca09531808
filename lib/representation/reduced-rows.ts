/** Entries below it are rounding, not coefficients; dimensionless, for rows whose entries are about 1. */
const ZERO_TOLERANCE = 1e-9;

/**
 * Reduced row echelon form of real rows, zero rows dropped: every row starts with 1, above and below which there is 0.
 * @param rows of equal length, entries about 1 in size
 */
export function reducedRows(rows: readonly (readonly number[])[]): number[][] {
  const work = rows.map((row) => [...row]);
  const done: number[][] = [];
  const width = work[0]?.length ?? 0;
  for (let column = 0; column < width && work.length > 0; column++) {
    const best = work.reduce((b, row, i) => (Math.abs(row[column]!) > Math.abs(work[b]![column]!) ? i : b), 0);
    const pivot = work[best]![column]!;
    if (Math.abs(pivot) < ZERO_TOLERANCE) continue;
    const row = work.splice(best, 1)[0]!.map((e) => e / pivot);
    for (const other of [...work, ...done]) subtract(other, row, other[column]!);
    done.push(row);
  }
  return done;
}

function subtract(row: number[], by: readonly number[], k: number): void {
  if (k !== 0) for (let j = 0; j < row.length; j++) row[j] = row[j]! - k * by[j]!;
}

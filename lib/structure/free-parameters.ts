/** Entries below this, beside others near 1, come from rounding. */
const ROUNDING = 1e-9;

/**
 * Directions in which parameters may move, each scaled by its standard uncertainty: the covariance matrix of all
 * parameters is the sum of their outer products. Parameters that symmetry ties move together, by the uncertainty of the
 * first of them that has one; correlations among the others are left to the caller.
 */
export interface ScaledDirections {
  readonly directions: readonly (readonly number[])[];
  /** Parameters, one for each direction in which the space is free, that have no uncertainty themselves or tied. */
  readonly unknown: readonly (readonly number[])[];
}

/**
 * @param space vectors that span the free directions
 * @param su uncertainty of each parameter, null where none is stated
 */
export function scaledDirections(
  space: readonly (readonly number[])[],
  su: readonly (number | null)[],
): ScaledDirections {
  const known: number[][] = [];
  const unknown: number[][] = [];
  for (const direction of echelon(space)) {
    const leading = direction.findIndex((e, i) => Math.abs(e) > ROUNDING && su[i] !== null);
    if (leading < 0) unknown.push(direction);
    else known.push(direction.map((e) => (e * su[leading]!) / Math.abs(direction[leading]!)));
  }
  return { directions: known, unknown };
}

/** Reduced row echelon form without zero rows: every row leads with a 1 where all others have 0. */
function echelon(vectors: readonly (readonly number[])[]): number[][] {
  const rows = vectors.map((v) => [...v]);
  const width = rows[0]?.length ?? 0;
  const scale = rows.reduce((m, row) => row.reduce((n, e) => Math.max(n, Math.abs(e)), m), 0);
  let rank = 0;
  for (let column = 0; column < width && rank < rows.length; column++) {
    let best = rank;
    for (let i = rank; i < rows.length; i++) if (Math.abs(rows[i]![column]!) > Math.abs(rows[best]![column]!)) best = i;
    const pivot = rows[best]![column]!;
    if (Math.abs(pivot) <= ROUNDING * scale) continue;
    [rows[rank], rows[best]] = [rows[best]!, rows[rank]!];
    const lead = rows[rank]!.map((e) => e / pivot);
    rows[rank] = lead;
    rows.forEach((row, i) => {
      const factor = row[column]!;
      if (i !== rank && factor !== 0) rows[i] = row.map((e, j) => e - factor * lead[j]!);
    });
    rank++;
  }
  return rows.slice(0, rank).map((row) => row.map((e) => (Math.abs(e) < ROUNDING ? 0 : e)));
}

/**
 * The assignment of rows to columns of a square matrix with the least sum: column of each row.
 * Method: H. W. Kuhn, Naval Research Logistics Quarterly 2 (1955) 83-97, with potentials and shortest paths; cubic in size.
 */
export function leastAssignment(cost: readonly (readonly number[])[]): number[] {
  const n = cost.length;
  const u = new Array<number>(n + 1).fill(0);
  const v = new Array<number>(n + 1).fill(0);
  const rowOf = new Array<number>(n + 1).fill(0); // of each column, counted from 1; 0 is none
  for (let row = 1; row <= n; row++) {
    const way = shortestPath(cost, row, u, v, rowOf);
    let column = way.end;
    while (column !== 0) {
      const before = way.previous[column]!;
      rowOf[column] = rowOf[before]!;
      column = before;
    }
  }
  const columnOf = new Array<number>(n).fill(0);
  for (let column = 1; column <= n; column++) columnOf[rowOf[column]! - 1] = column - 1;
  return columnOf;
}

/** From a row to a free column; changes the potentials. */
function shortestPath(
  cost: readonly (readonly number[])[],
  row: number,
  u: number[],
  v: number[],
  rowOf: number[],
): { end: number; previous: number[] } {
  const n = cost.length;
  const least = new Array<number>(n + 1).fill(Infinity);
  const previous = new Array<number>(n + 1).fill(0);
  const used = new Array<boolean>(n + 1).fill(false);
  rowOf[0] = row;
  let column = 0;
  do {
    used[column] = true;
    const from = rowOf[column]!;
    let step = Infinity;
    let next = 0;
    for (let j = 1; j <= n; j++) {
      if (used[j]) continue;
      const reduced = cost[from - 1]![j - 1]! - u[from]! - v[j]!;
      if (reduced < least[j]!) {
        least[j] = reduced;
        previous[j] = column;
      }
      if (least[j]! < step) {
        step = least[j]!;
        next = j;
      }
    }
    for (let j = 0; j <= n; j++) {
      if (used[j]) {
        u[rowOf[j]!]! += step;
        v[j]! -= step;
      } else least[j]! -= step;
    }
    column = next;
  } while (rowOf[column] !== 0);
  return { end: column, previous };
}

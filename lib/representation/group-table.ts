/** Multiplication of a finite group by element indices. */
export interface GroupTable {
  readonly order: number;
  /** Index of the identity. */
  readonly identity: number;
  /** Flat: the product of elements i and j (i after j) is products[order * i + j]. */
  readonly products: readonly number[];
  readonly inverses: readonly number[];
}

/**
 * Multiplication table of a list of elements, from the right multiplications by a few generators.
 * @param timesElement index of the product of elements i and j, or -1 if it is not in the list
 * @returns null if the list lacks a product (it is not a group)
 */
export function groupTable(
  order: number,
  identity: number,
  timesElement: (i: number, j: number) => number,
): GroupTable | null {
  const generators: number[][] = [];
  // columns[j][i] is the index of the product i j, known once j is reached from the identity.
  const columns: (number[] | undefined)[] = new Array(order);
  columns[identity] = Array.from({ length: order }, (_, i) => i);
  const reached = [identity];
  for (let g = 0; g < order; g++) {
    if (columns[g]) continue;
    const right: number[] = [];
    for (let i = 0; i < order; i++) {
      const p = timesElement(i, g);
      if (p < 0) return null;
      right.push(p);
    }
    generators.push(right);
    extend(columns, reached, generators);
  }
  return assemble(order, identity, columns);
}

function extend(columns: (number[] | undefined)[], reached: number[], generators: readonly number[][]): void {
  for (let q = 0; q < reached.length; q++) {
    const j = reached[q]!;
    for (const right of generators) {
      const product = right[j]!;
      if (columns[product]) continue;
      columns[product] = columns[j]!.map((i) => right[i]!);
      reached.push(product);
    }
  }
}

function assemble(order: number, identity: number, columns: readonly (number[] | undefined)[]): GroupTable {
  const products: number[] = new Array(order * order);
  const inverses: number[] = new Array(order);
  for (let i = 0; i < order; i++) {
    for (let j = 0; j < order; j++) {
      const p = columns[j]![i]!;
      products[order * i + j] = p;
      if (p === identity) inverses[i] = j;
    }
  }
  return { order, identity, products, inverses };
}

/** Conjugacy classes as lists of element indices, each ascending, in order of their first member. */
export function conjugacyClasses(table: GroupTable): number[][] {
  const { order, products, inverses } = table;
  const seen = new Array<boolean>(order).fill(false);
  const classes: number[][] = [];
  for (let g = 0; g < order; g++) {
    if (seen[g]) continue;
    const members: number[] = [];
    for (let h = 0; h < order; h++) {
      const c = products[order * products[order * h + g]! + inverses[h]!]!;
      if (seen[c]) continue;
      seen[c] = true;
      members.push(c);
    }
    classes.push(members.sort((a, b) => a - b));
  }
  return classes;
}

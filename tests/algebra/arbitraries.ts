import fc from "fast-check";

/** Square integer matrices of determinant 1 or -1: products of elementary row operations, so with modest entries. */
export function unimodular(size: number): fc.Arbitrary<number[][]> {
  const index = fc.nat({ max: size - 1 });
  const step = fc.tuple(index, index, fc.integer({ min: -2, max: 2 }));
  return fc.array(step, { maxLength: 8 }).map((steps) => {
    const m = Array.from({ length: size }, (_, i) => Array.from({ length: size }, (_, j) => Number(i === j)));
    for (const [i, j, k] of steps) {
      if (i === j) m[i] = m[i]!.map((e) => 0 - e);
      else m[i] = m[i]!.map((e, c) => e + k * m[j]![c]!);
    }
    return m;
  });
}

/** Integer matrices with the given numbers of rows and columns, often of low rank and with zeros. */
export function integerMatrix(rows: fc.Arbitrary<number>, columns: fc.Arbitrary<number>): fc.Arbitrary<number[][]> {
  const entry = fc.oneof({ weight: 2, arbitrary: fc.constant(0) }, fc.integer({ min: -12, max: 12 }));
  return fc.tuple(rows, columns).chain(([r, c]) => {
    const row = fc.array(entry, { minLength: c, maxLength: c });
    const plain = fc.array(row, { minLength: r, maxLength: r });
    // The last row a combination of the others: rank below the number of rows.
    const dependent = fc.tuple(plain, fc.integer({ min: -3, max: 3 })).map(([m, k]) => {
      const first = m[0]!;
      return m.map((line, i) => (i > 0 && i === m.length - 1 ? first.map((e) => 0 + k * e + 0) : line));
    });
    return fc.oneof(plain, dependent);
  });
}

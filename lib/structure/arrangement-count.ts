/** Lengths of the cycles of a permutation, within each of the ranges that it keeps. */
export function cycleLengths(permutation: Int32Array, from: number, to: number): number[] {
  const seen = new Uint8Array(to - from);
  const lengths: number[] = [];
  for (let i = from; i < to; i++) {
    let length = 0;
    for (let k = i; !seen[k - from]; k = permutation[k]!) {
      seen[k - from] = 1;
      length++;
    }
    if (length > 0) lengths.push(length);
  }
  return lengths.sort((a, b) => a - b);
}

/**
 * In how many ways cycles can be filled, each with one kind throughout, so that every kind fills a given number of
 * places: the coefficient of the product over kinds of z^count in the product over cycles of (sum over kinds of z^length).
 * Source: G. Polya, Acta Math. 68 (1937) 145.
 */
export function fillings(lengths: readonly number[], counts: readonly number[]): bigint {
  let states = new Map<string, bigint>([[counts.join(), 1n]]);
  for (const length of lengths) {
    const next = new Map<string, bigint>();
    for (const [key, ways] of states) {
      const left = key.split(",").map(Number);
      left.forEach((e, k) => {
        if (e < length) return;
        const rest = left.map((r, j) => (j === k ? r - length : r)).join();
        next.set(rest, (next.get(rest) ?? 0n) + ways);
      });
    }
    states = next;
  }
  return states.get(counts.map(() => 0).join()) ?? 0n;
}

/** Equivalent places: where they begin in the numbering, and how many hold each kind. */
export interface PlaceRange {
  readonly from: number;
  readonly to: number;
  readonly counts: readonly number[];
}

/**
 * Arrangements that no operation carries into each other, by the lemma of Cauchy, Frobenius and Burnside: the mean number
 * of arrangements that an operation leaves as they are.
 * @param permutations of the places, one for each operation of a group
 * Source: W. Burnside, Theory of Groups of Finite Order (1911), section 145 (section from memory).
 */
export function inequivalentCount(permutations: readonly Int32Array[], ranges: readonly PlaceRange[]): bigint {
  const known = new Map<string, bigint>();
  let sum = 0n;
  for (const permutation of permutations) {
    let fixed = 1n;
    ranges.forEach(({ from, to, counts }, k) => {
      const lengths = cycleLengths(permutation, from, to);
      const key = `${k}:${lengths.join()}`;
      const ways = known.get(key) ?? fillings(lengths, counts);
      known.set(key, ways);
      fixed *= ways;
    });
    sum += fixed;
  }
  return sum / BigInt(permutations.length);
}

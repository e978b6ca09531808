/** Rounds of averaging; the mean converges by a factor of some hundred in each. */
const MOST_ROUNDS = 100;

/** Weights of neighbours in an effective coordination number. */
export interface EffectiveCoordination {
  /** Sum of the weights. */
  readonly number: number;
  /** In the order given; about 1 for the nearest. */
  readonly weights: readonly number[];
  /** Mean of the lengths by these weights. */
  readonly mean: number;
}

/**
 * Effective coordination number: every neighbour weighs exp(1 - (l / m)^6), m the mean of the lengths by these weights.
 * @param lengths distances, or distances in units of the sums of radii where the neighbours are of different elements
 * Source: R. Hoppe, Zeitschrift fuer Kristallographie 150 (1979) 23-52 (from memory), there with fictive ionic radii.
 */
export function effectiveCoordination(lengths: readonly number[]): EffectiveCoordination | null {
  let mean = lengths.reduce((m, l) => Math.min(m, l), Infinity);
  if (!Number.isFinite(mean) || mean <= 0) return null;
  const weigh = () => lengths.map((l) => Math.exp(1 - (l / mean) ** 6));
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const weights = weigh();
    const next = lengths.reduce((s, l, i) => s + l * weights[i]!, 0) / weights.reduce((s, w) => s + w, 0);
    const change = Math.abs(next - mean);
    mean = next;
    if (change < 1e-12 * mean) break;
  }
  const weights = weigh();
  return { number: weights.reduce((s, w) => s + w, 0), weights, mean };
}

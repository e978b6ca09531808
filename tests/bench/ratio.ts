/** One comparison: the time of ours over the time of the reference, both taken in the same run. */
export interface Measurement {
  readonly name: string;
  readonly ratio: number;
  /** What the time is compared with. */
  readonly reference: string;
  readonly detail?: string;
}

export interface Sides {
  /** Each does its whole work and returns a number made from the result. */
  readonly ours: () => number;
  readonly reference: () => number;
}

let sink = 0;

/** Fastest of so many rounds for each side, in milliseconds; the sides take turns, so that both see the same machine. */
export function fastest(sides: Sides, rounds = 20): { readonly ours: number; readonly reference: number } {
  const best = { ours: Number.POSITIVE_INFINITY, reference: Number.POSITIVE_INFINITY };
  for (let round = 0; round < rounds; round++) {
    for (const side of ["ours", "reference"] as const) {
      const start = performance.now();
      sink += sides[side](); // used, so that the work cannot be optimised away
      best[side] = Math.min(best[side], performance.now() - start);
    }
  }
  return best;
}

/** The ratio of the fastest rounds; values below 1 mean that ours is faster. */
export function ratio(name: string, reference: string, sides: Sides, rounds = 20): Measurement {
  const best = fastest(sides, rounds);
  const detail = `${milliseconds(best.ours)} against ${milliseconds(best.reference)}`;
  return { name, ratio: best.ours / best.reference, reference, detail };
}

/** A time with three digits at most: `0.42 ms`, `1240 ms`. */
export function milliseconds(time: number): string {
  return `${time < 100 ? time.toPrecision(3) : time.toFixed(0)} ms`;
}

/** Sum of everything returned; printed at the end, which makes it used. */
export function consumed(): number {
  return sink;
}

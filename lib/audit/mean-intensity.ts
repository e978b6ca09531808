/** Reflections to a shell: enough for a mean good to 10 % if they follow Wilson's distribution. */
const SHELL_SIZE = 100;
const MOST_SHELLS = 40;

/** Mean intensity as a function of 1/d^2. */
export type MeanIntensity = (inverseSquare: number) => number;

/** A value at 1/d^2 = x, per square angstrom. */
export interface ValueAt {
  readonly x: number;
  readonly value: number;
}

/**
 * Mean intensity in shells of equal number of reflections, joined by straight lines of its logarithm and level beyond the
 * ends. A shell whose mean is not positive takes that of the shell before it.
 * @param list reflections that are neither absent nor special; 1 everywhere if there are none of positive mean
 */
export function meanIntensity(list: readonly ValueAt[]): MeanIntensity {
  const sorted = [...list].sort((a, b) => a.x - b.x);
  const shells = Math.max(1, Math.min(MOST_SHELLS, Math.floor(sorted.length / SHELL_SIZE)));
  const points: { x: number; log: number }[] = [];
  for (let i = 0; i < shells; i++) {
    const shell = sorted.slice(
      Math.floor((i * sorted.length) / shells),
      Math.floor(((i + 1) * sorted.length) / shells),
    );
    const mean = average(shell.map((r) => r.value));
    const last = points.at(-1)?.log;
    if (!(mean > 0) && last === undefined) continue;
    points.push({ x: average(shell.map((r) => r.x)), log: mean > 0 ? Math.log(mean) : last! });
  }
  return (x) => Math.exp(interpolate(points, x));
}

export function average(values: readonly number[]): number {
  return values.reduce((s, v) => s + v, 0) / values.length;
}

function interpolate(points: readonly { readonly x: number; readonly log: number }[], x: number): number {
  const above = points.findIndex((p) => p.x > x);
  if (above < 0) return points.at(-1)?.log ?? 0;
  if (above === 0) return points[0]!.log;
  const [a, b] = [points[above - 1]!, points[above]!];
  return a.log + ((b.log - a.log) * (x - a.x)) / (b.x - a.x);
}

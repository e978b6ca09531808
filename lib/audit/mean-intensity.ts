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
 * ends. A mean is not taken to be less than its standard error from the scatter, so that shells of nothing but noise get
 * one that is far below their uncertainties and decide nothing.
 * @param list reflections that are neither absent nor special; 1 everywhere if there are none but zeros
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
    const variance = average(shell.map((r) => (r.value - mean) ** 2));
    const least = Math.max(mean, Math.sqrt(variance / shell.length));
    if (least > 0) points.push({ x: average(shell.map((r) => r.x)), log: Math.log(least) });
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

import { average } from "./mean-intensity.ts";
import { type Observation, signalToNoise } from "./observations.ts";

/** Expectations of <|E^2 - 1|>. Source: A. J. C. Wilson, Acta Cryst. 2 (1949) 318. */
export const EXPECTED_CENTRIC = 0.968;
export const EXPECTED_ACENTRIC = 0.736;
/** The same for a crystal of two merohedral twin domains of equal size, acentric. E. Stanley, J. Appl. Cryst. 5 (1972) 191. */
export const EXPECTED_TWINNED = 0.541;

export interface IntensityStatistics {
  /** Mean |E^2 - 1| of the reflections in general position; null with too few. */
  readonly meanDeviation: number | null;
  /** Standard error of this mean from its scatter; null likewise. */
  readonly standardError: number | null;
  readonly reflections: number;
  readonly expectedCentric: number;
  readonly expectedAcentric: number;
  /** Which of the two it is nearer to, where the difference is clear; `below acentric` is nearer to a twin's 0.541. */
  readonly verdict: "centric" | "acentric" | "below acentric" | "undecided";
}

/** Reflections to a shell of resolution. */
const SHELL_SIZE = 50;
/** Weaker shells show noise rather than structure: mean intensity over mean uncertainty. */
const LEAST_SIGNAL = 3;
/** Fewer reflections say nothing. */
const FEWEST = 50;
/**
 * Structures scatter about the expectations by this much, since few heavy atoms and pseudo-symmetry are common; from
 * it a call is made only where the mean lies beyond it on one side of the middle. Dimensionless.
 */
export const STRUCTURE_SCATTER = 0.05;

/**
 * Mean |E^2 - 1| over reflections in general position, each shell of resolution brought to <E^2> = 1 by itself.
 */
export function intensityStatistics(list: readonly Observation[]): IntensityStatistics {
  const general = list.filter((r) => !r.special).sort((a, b) => a.x - b.x);
  const shells = Math.max(1, Math.floor(general.length / SHELL_SIZE));
  const deviations: number[] = [];
  for (let i = 0; i < shells; i++) {
    const shell = general.slice(
      Math.floor((i * general.length) / shells),
      Math.floor(((i + 1) * general.length) / shells),
    );
    const mean = average(shell.map((r) => r.value));
    if (!(mean > 0) || signalToNoise(shell) < LEAST_SIGNAL) continue;
    for (const r of shell) deviations.push(Math.abs(r.value / mean - 1));
  }
  const expected = { expectedCentric: EXPECTED_CENTRIC, expectedAcentric: EXPECTED_ACENTRIC };
  const reflections = deviations.length;
  if (reflections < FEWEST) {
    return { meanDeviation: null, standardError: null, reflections, ...expected, verdict: "undecided" };
  }
  const meanDeviation = average(deviations);
  const variance = average(deviations.map((d) => (d - meanDeviation) ** 2));
  const standardError = Math.sqrt(variance / reflections);
  return { meanDeviation, standardError, reflections, ...expected, verdict: callOf(meanDeviation, standardError) };
}

function callOf(mean: number, error: number): IntensityStatistics["verdict"] {
  const middle = (EXPECTED_CENTRIC + EXPECTED_ACENTRIC) / 2;
  const doubt = Math.hypot(2 * error, STRUCTURE_SCATTER);
  if (Math.abs(mean - middle) < doubt) return "undecided";
  if (mean > middle) return "centric";
  return mean + doubt < (EXPECTED_ACENTRIC + EXPECTED_TWINNED) / 2 ? "below acentric" : "acentric";
}

/** Logarithm of the likelihood of a mean, up to a constant: normal about the expectation. */
export function centricityEvidence({ meanDeviation, standardError }: IntensityStatistics, centric: boolean): number {
  if (meanDeviation === null) return 0;
  const expected = centric ? EXPECTED_CENTRIC : EXPECTED_ACENTRIC;
  // a mean beyond both ends favours the nearer no more than at its expectation
  const mean = Math.max(EXPECTED_ACENTRIC, Math.min(EXPECTED_CENTRIC, meanDeviation));
  return -0.5 * ((mean - expected) / Math.hypot(standardError ?? 0, STRUCTURE_SCATTER)) ** 2 + 0; // no -0
}

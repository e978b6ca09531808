import { applyRow, type IntVec3 } from "../algebra/index.ts";
import { coordinatesIn, meetsConditions, type ReflectionCondition, type SpaceGroup } from "../symmetry/index.ts";
import { presenceEvidence, STRONG_EVIDENCE } from "./absence-likelihood.ts";
import { average } from "./mean-intensity.ts";
import type { Observation } from "./observations.ts";

/**
 * `met`: the odds that the reflections are forbidden are very strong; `violated`: that they are present, or too many are
 * raised; `undecided`: neither; `not listed`: the list has reflections of the class, but none that the condition forbids;
 * `not measured`: it has none of the class at all.
 */
export type ConditionVerdict = "met" | "violated" | "undecided" | "not listed" | "not measured";

/** A reflection condition set against the intensities. */
export interface ConditionTest {
  readonly reflections: string;
  readonly condition: string;
  readonly cause: string;
  readonly implied: boolean;
  /** Merged reflections of the class in the list. */
  readonly tested: number;
  /** Those of them that the condition forbids. */
  readonly forbidden: number;
  /** Mean and median of value over standard uncertainty of these; null where there are none. */
  readonly meanOverSigma: number | null;
  readonly medianOverSigma: number | null;
  /** Mean of their value over that of reflections in general position at their resolution; null likewise. */
  readonly meanShare: number | null;
  /** Those above VIOLATION_SIGMA standard uncertainties. */
  readonly above: number;
  /** Natural logarithm of the odds that they are present rather than forbidden. */
  readonly evidence: number;
  readonly verdict: ConditionVerdict;
  /** More of them are positive than chance allows: they carry some intensity, however weak. */
  readonly systematicallyWeak: boolean;
}

/** A forbidden reflection counts as a violation above this many standard uncertainties. */
export const VIOLATION_SIGMA = 3;

/** Sign test: the number of positive values lies this many standard deviations above one half. */
const SIGN_LIMIT = 4;

/** Sets a condition of a group against merged reflections. */
export function testCondition(
  condition: ReflectionCondition,
  group: SpaceGroup,
  observations: readonly Observation[],
): ConditionTest {
  const { reflections, condition: text, cause, implied } = condition;
  const tested = observations.filter((r) => isMember(condition, group, r.h));
  const forbidden = tested.filter((r) => isForbiddenBy(condition, group, r.h));
  const overSigma = forbidden.map((r) => r.value / r.sigma).sort((a, b) => a - b);
  const evidence = forbidden.reduce((sum, r) => sum + presenceEvidence(r.value, r.sigma, r.mean), 0);
  const n = forbidden.length;
  const positive = overSigma.filter((v) => v > 0).length;
  return {
    reflections,
    condition: text,
    cause,
    implied,
    tested: tested.length,
    forbidden: n,
    meanOverSigma: n > 0 ? average(overSigma) : null,
    medianOverSigma: n > 0 ? overSigma[Math.floor(n / 2)]! : null,
    meanShare: n > 0 ? average(forbidden.map((r) => r.value / r.mean)) : null,
    above: overSigma.filter((v) => v > VIOLATION_SIGMA).length,
    evidence,
    verdict: verdictOf(tested.length, forbidden, evidence),
    systematicallyWeak: n > 0 && (positive - n / 2) / (Math.sqrt(n) / 2) > SIGN_LIMIT,
  };
}

/** Whether a reflection or an equivalent belongs to the class that the condition speaks of. */
function isMember({ stratum }: ReflectionCondition, group: SpaceGroup, h: IntVec3): boolean {
  if (stratum.basis.length === 3) return true;
  return group.representatives.some(({ W }) => coordinatesIn(stratum, applyRow(h, W)) !== null);
}

export function isForbiddenBy(condition: ReflectionCondition, group: SpaceGroup, h: IntVec3): boolean {
  return !meetsConditions([condition], group, h);
}

/**
 * A forbidden reflection is raised if it is significant and above a tenth of the mean intensity. In sound measurements a
 * twentieth of them is, by multiple diffraction or an intruding domain; where more are, beyond chance, the many others
 * that are absent do not outweigh them: such a group forbids too much. Dimensionless.
 */
const RAISED = { share: 0.1, usual: 0.05, deviations: 4, fewest: 3 } as const;

function tooManyRaised(forbidden: readonly Observation[]): boolean {
  const raised = forbidden.filter((r) => r.value > VIOLATION_SIGMA * r.sigma && r.value > RAISED.share * r.mean).length;
  const expected = RAISED.usual * forbidden.length;
  const scatter = Math.sqrt(expected * (1 - RAISED.usual));
  return raised >= RAISED.fewest && raised > expected + RAISED.deviations * scatter;
}

function verdictOf(tested: number, forbidden: readonly Observation[], evidence: number): ConditionVerdict {
  if (tested === 0) return "not measured";
  if (forbidden.length === 0) return "not listed";
  if (evidence > STRONG_EVIDENCE || tooManyRaised(forbidden)) return "violated";
  return evidence < -STRONG_EVIDENCE ? "met" : "undecided";
}

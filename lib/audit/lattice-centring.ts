import { IDENTITY, type IntVec3, mod, type RatVec3, ratVec3 } from "../algebra/index.ts";
import { centringsOf, closeGroup, formatVector } from "../symmetry/index.ts";
import { presenceEvidence, STRONG_EVIDENCE } from "./absence-likelihood.ts";
import type { Observation } from "./observations.ts";
import { MANY_REFLECTIONS } from "./reflection-list.ts";

/** A translation that the absences may show. */
export interface TranslationTest {
  /** `1/2,1/2,0` */
  readonly translation: string;
  /** Reflections listed that it forbids. */
  readonly listed: number;
  /** Natural logarithm of the odds that they are present rather than forbidden. */
  readonly evidence: number;
  /** The translation is one of the lattice: they are forbidden, or none of them is listed. */
  readonly accepted: boolean;
}

export interface FoundCentring {
  /** Translations in [0, 1), 0 first, a group. */
  readonly centrings: readonly RatVec3[];
  readonly tests: readonly TranslationTest[];
}

/**
 * The lattice that reflections show in the cell they are indexed in: every translation by halves or thirds of the axes
 * whose forbidden reflections are absent. Finds centrings as well as a cell taken too large.
 */
export function latticeCentring(observations: readonly Observation[]): FoundCentring {
  const accepted: RatVec3[] = [];
  const tests = [...translations(2), ...translations(3)].map((t): TranslationTest => {
    const forbidden = observations.filter((r) => isForbidden(t, r.h));
    const evidence = forbidden.reduce((sum, r) => sum + presenceEvidence(r.value, r.sigma, r.mean), 0);
    const omitted = forbidden.length === 0 && observations.length >= MANY_REFLECTIONS;
    const isLattice = omitted || (forbidden.length > 0 && evidence < -STRONG_EVIDENCE);
    if (isLattice) accepted.push(t);
    return { translation: formatVector(t), listed: forbidden.length, evidence, accepted: isLattice };
  });
  const operations = accepted.map((w) => ({ W: IDENTITY, w }));
  return { centrings: centringsOf(closeGroup([{ W: IDENTITY, w: ratVec3([0, 0, 0]) }, ...operations])), tests };
}

/** Whether a translation forbids a reflection: h . t is no integer. */
export function isForbidden({ n, d }: RatVec3, h: IntVec3): boolean {
  return mod(h[0] * n[0] + h[1] * n[1] + h[2] * n[2], d) !== 0;
}

/** Translations of prime order p up to multiples, the first component that is not 0 being 1/p. */
function translations(p: number): RatVec3[] {
  const found: RatVec3[] = [];
  for (let code = 1; code < p ** 3; code++) {
    const n: IntVec3 = [Math.floor(code / (p * p)), Math.floor(code / p) % p, code % p];
    if (n.find((e) => e !== 0) === 1) found.push(ratVec3(n, p));
  }
  return found;
}

import { IDENTITY, type IntVec3, mod, type RatVec3, ratVec3, ZERO_VECTOR } from "../algebra/index.ts";
import { centringsOf, closeGroup, formatVector } from "../symmetry/index.ts";
import { presenceEvidence, STRONG_EVIDENCE } from "./absence-likelihood.ts";
import type { Observation } from "./observations.ts";
import { MANY_REFLECTIONS } from "./reflection-list.ts";

/** A translation that the absences may show. */
export interface TranslationTest {
  /** `1/2,1/2,0` */
  readonly translation: string;
  /** Reflections listed that it forbids and the translations before it do not. */
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
 * The lattice that reflections show in the cell they are indexed in: translations by halves or thirds of the axes whose
 * forbidden reflections are absent, the clearest first, each next one judged by the reflections that those before it
 * allow. Finds centrings as well as a cell taken too large.
 */
export function latticeCentring(observations: readonly Observation[]): FoundCentring {
  const accepted: { t: RatVec3; test: TranslationTest }[] = [];
  let allowed = observations.map((r) => ({ h: r.h, evidence: presenceEvidence(r.value, r.sigma, r.mean) }));
  for (;;) {
    const centrings = closed(accepted.map((a) => a.t));
    const known = new Set(centrings.map(formatVector));
    const open = [...translations(2), ...translations(3)].filter((t) => !known.has(formatVector(t)));
    const tests = open.map((t) => ({ t, test: testTranslation(t, allowed) }));
    tests.sort((a, b) => a.test.evidence - b.test.evidence);
    const best = tests.find((a) => a.test.accepted);
    if (!best) return { centrings, tests: [...accepted, ...tests].map((a) => a.test) };
    accepted.push(best);
    allowed = allowed.filter((r) => !isForbidden(best.t, r.h));
  }
}

function testTranslation(t: RatVec3, list: readonly { h: IntVec3; evidence: number }[]): TranslationTest {
  let [listed, evidence] = [0, 0];
  for (const r of list) {
    if (!isForbidden(t, r.h)) continue;
    listed++;
    evidence += r.evidence;
  }
  const omitted = listed === 0 && list.length >= MANY_REFLECTIONS;
  return { translation: formatVector(t), listed, evidence, accepted: omitted || evidence < -STRONG_EVIDENCE };
}

function closed(translations: readonly RatVec3[]): RatVec3[] {
  const operations = [ZERO_VECTOR, ...translations].map((w) => ({ W: IDENTITY, w }));
  return centringsOf(closeGroup(operations));
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

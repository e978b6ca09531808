/** Judgements on a deposited structure: one file per question, each giving findings with their evidence. */
export { presenceEvidence, STRONG_EVIDENCE } from "./absence-likelihood.ts";
export {
  type AbsencesAnswer,
  type AbsencesQuestion,
  type AbsencesVerdict,
  absencesAnswer,
  type LaueAnswer,
} from "./absences-answer.ts";
export { type AbsencesOptions, absencesQuestion } from "./absences-question.ts";
export type { CandidateAnswer } from "./candidates-answer.ts";
export { type ConditionTest, type ConditionVerdict, VIOLATION_SIGMA } from "./condition-test.ts";
export { type FoundReflections, findReflections, listOfText } from "./find-reflections.ts";
export type { Criterion, Evidence, Finding, Severity, Statement, Where } from "./finding.ts";
export { type ForbiddenReflection, forbiddenReflections } from "./forbidden-reflections.ts";
export { formatIndexMatrix, type IndexMatrix, parseIndexMatrix } from "./index-matrix.ts";
export { EXPECTED_ACENTRIC, EXPECTED_CENTRIC, type IntensityStatistics } from "./intensity-statistics.ts";
export type { TranslationTest } from "./lattice-centring.ts";
export { ASSUMED_SIGMA } from "./observations.ts";
export type { Quantity, Reflection, ReflectionList } from "./reflection-list.ts";
export { readReflectionText, type TextReflections } from "./reflection-text.ts";
export { problemsByBlock } from "./syntax.ts";
export { allCriteria, criterionOf, type VetAnswer, vetAnswer } from "./vet-answer.ts";

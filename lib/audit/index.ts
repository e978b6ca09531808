/** Judgements on a deposited structure: one file per question, each giving findings with their evidence. */
export type { Criterion, Evidence, Finding, Severity, Statement, Where } from "./finding.ts";
export { allCriteria, criterionOf, type VetAnswer, vetAnswer } from "./vet-answer.ts";

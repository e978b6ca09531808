import type { CifBlock } from "../cif/index.ts";
import type { InputProblem } from "../problem.ts";
import { POSITION_TOLERANCE } from "../structure/index.ts";
import { auditInput } from "./audit-input.ts";
import { CHECKS } from "./checks.ts";
import type { Criterion, Finding, Severity } from "./finding.ts";

/** What `vet` answers for one block. */
export interface VetAnswer {
  /** Contradictions first, then doubts, then remarks. */
  readonly findings: readonly Finding[];
  readonly counts: Readonly<Record<Severity, number>>;
}

const ORDER: readonly Severity[] = ["contradiction", "doubt", "remark"];

/**
 * Compares the statements of a block with each other and with what is physically likely. Faults of the file never
 * throw: they are findings, or leave a question unasked.
 * @param tolerance positions closer than this are one position; angstrom
 * @param syntaxProblems what the reader of the text got over in this block; they become findings
 * @throws InputProblem `tolerance-impossible`
 * @example
 * ```ts
 * const answer = vetAnswer(requireClean(readCif(text)).blocks[0]!);
 * answer.counts; // { contradiction: 0, doubt: 0, remark: 0 }
 * ```
 */
export function vetAnswer(
  block: CifBlock,
  tolerance: number = POSITION_TOLERANCE,
  syntaxProblems: readonly InputProblem[] = [],
): VetAnswer {
  const input = auditInput(block, tolerance, syntaxProblems);
  const found = CHECKS.flatMap(({ check }) => check(input));
  const findings = ORDER.flatMap((severity) => found.filter((f) => f.severity === severity));
  const number = (severity: Severity) => findings.filter((f) => f.severity === severity).length;
  const counts = { contradiction: number("contradiction"), doubt: number("doubt"), remark: number("remark") };
  return { findings, counts };
}

/** The criterion behind an id, or null if there is none of that name. */
export function criterionOf(id: string): Criterion | null {
  return allCriteria().find((c) => c.id === id) ?? null;
}

/** Every criterion, in the order of the checks. */
export function allCriteria(): readonly Criterion[] {
  return CHECKS.flatMap(({ criteria }) => criteria);
}

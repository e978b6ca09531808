import type { CifBlock } from "../cif/index.ts";
import type { InputProblem, Span } from "../problem.ts";
import type { AuditInput } from "./audit-input.ts";
import { type Criterion, type Finding, finding } from "./finding.ts";

const SYNTAX: Criterion = {
  id: "cif-syntax",
  severity: "doubt",
  criterion: "The text departs from the syntax of CIF; it was read around the fault, which may have cost values.",
  source: "CIF 1.1: International Tables for Crystallography G (2006), chapter 2.2; CIF 2.0: the IUCr specification.",
  advice: "Correct the text at the place named; other programs may read it otherwise or not at all.",
};

const CHARACTERS: Criterion = {
  id: "cif-characters",
  severity: "remark",
  criterion: "The text holds characters beyond the ASCII of CIF 1.1, or is not in UTF-8; no value is lost by it.",
  source: "CIF 1.1: International Tables for Crystallography G (2006), chapter 2.2; CIF 2.0: the IUCr specification.",
  advice: "Begin the file with #\\#CIF_2.0 and save it as UTF-8, or write the characters in CIF's backslash codes.",
};

export const criteria: readonly Criterion[] = [SYNTAX, CHARACTERS];

/** Codes of faults of which the meaning is plain all the same. */
const OF_CHARACTERS = ["encoding", "non-ascii-character"];

/** Faults of one kind that are told one by one; of more, the first with the places of the others. */
const TOLD_APART = 3;

/** Is the block written as CIF demands? Every fault that the reader got over is told. */
export function check(input: AuditInput): Finding[] {
  if (input.syntaxProblems.length === 0) return [];
  const names = placedNames(input.block);
  const codes = [...new Set(input.syntaxProblems.map((p) => p.code))];
  return codes.flatMap((code) => {
    const problems = input.syntaxProblems.filter((p) => p.code === code);
    return problems.length > TOLD_APART
      ? [syntaxFinding(input, names, problems[0]!, problems.slice(1))]
      : problems.map((problem) => syntaxFinding(input, names, problem, []));
  });
}

function syntaxFinding(
  input: AuditInput,
  names: readonly PlacedName[],
  { code, message, span, hint }: InputProblem,
  others: readonly InputProblem[],
): Finding {
  const criterion = OF_CHARACTERS.includes(code) ? CHARACTERS : SYNTAX;
  const also = others.map((p) => `line ${input.place("", p.span).line ?? "?"}: ${p.message}`);
  const found = finding(
    criterion,
    input.place(nameAt(names, span), span),
    also.length > 0 ? `${message}; ${also.length} more of this kind` : message,
    {
      stated: { what: "text", value: span ? excerpt(input.block.source, span) : "the file as a whole" },
      against: { what: "syntax of CIF", value: code.replaceAll("-", " ") },
      ...(also.length > 0 ? { also } : {}),
    },
  );
  return hint ? { ...found, advice: hint } : found;
}

interface PlacedName {
  readonly name: string;
  readonly start: number;
}

function placedNames(block: CifBlock): PlacedName[] {
  return block
    .names()
    .map((name) => ({ name, start: block.nameSpan(name)?.start ?? 0 }))
    .sort((a, b) => a.start - b.start);
}

/** Data name that the place belongs to: the last one that begins at or before it. */
function nameAt(names: readonly PlacedName[], span: Span | null): string {
  const before = span ? names.findLastIndex(({ start }) => start <= span.start) : -1;
  return before < 0 ? "data_" : names[before]!.name;
}

const LONGEST_EXCERPT = 40;

/** Text on one line without characters that a terminal would obey. */
function excerpt(source: string, { start, end }: Span): string {
  const text = source.slice(start, Math.min(end, start + LONGEST_EXCERPT + 1));
  const [line = ""] = text.split(/[\r\n]/);
  const cut = line.length > LONGEST_EXCERPT || line.length < text.length;
  const shown = Array.from(line.slice(0, LONGEST_EXCERPT), (c) => (isControl(c) ? "?" : c)).join("");
  return cut ? `${shown} ...` : shown;
}

function isControl(character: string): boolean {
  const code = character.codePointAt(0)!;
  return code < 0x20 || (code >= 0x7f && code < 0xa0);
}

/**
 * Deals out the faults of a text to its blocks: each to the last block that begins at or before it, those before the
 * first block, or without a place, to the first.
 * @returns one list for each block
 */
export function problemsByBlock(problems: readonly InputProblem[], blocks: readonly CifBlock[]): InputProblem[][] {
  const lists = blocks.map((): InputProblem[] => []);
  for (const problem of problems) {
    const start = problem.span?.start ?? -1;
    const owner = blocks.findLastIndex((b) => b.span.start <= start);
    lists[Math.max(owner, 0)]?.push(problem);
  }
  return lists;
}

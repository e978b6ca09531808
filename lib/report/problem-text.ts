import { type InputProblem, locate } from "../problem.ts";

/** Longest piece of a source line that is shown above the caret. */
const SHOWN = 100;

/**
 * A fault as a person reads it: place, what is wrong, the line with a caret, what to do.
 * @param file name to print; @param source text that the spans count in, null where there is none
 */
export function problemText(problem: InputProblem, file: string, source: string | null): string {
  const lines: string[] = [];
  if (problem.span && source !== null) {
    const place = locate(source, problem.span.start);
    lines.push(`${file}:${place.line}:${place.column}: ${problem.message}`);
    const from = Math.max(0, place.column - 1 - SHOWN / 2);
    const piece = place.text.slice(from, from + SHOWN).replace(/\t/g, " ");
    if (piece.trim() !== "") {
      const length = Math.max(
        1,
        Math.min(problem.span.end - problem.span.start, piece.length - (place.column - 1 - from)),
      );
      lines.push(`    ${piece}`, `    ${" ".repeat(place.column - 1 - from)}${"^".repeat(length)}`);
    }
  } else lines.push(`${file}: ${problem.message}`);
  if (problem.hint) lines.push(`  ${problem.hint}`);
  return lines.join("\n");
}

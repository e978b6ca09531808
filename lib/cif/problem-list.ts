import { InputProblem, type Span } from "../problem.ts";

/** Faults kept at most. A file with more is not a CIF in need of repair, and its list must not outgrow the file. */
export const MOST_PROBLEMS = 1000;

const LONGEST_EXCERPT = 48;

/** Offending text for a message: in quotes, on one line, control characters escaped, cut where it is long. */
export function excerpt(text: string): string {
  const cut = text.length > LONGEST_EXCERPT ? `${text.slice(0, LONGEST_EXCERPT)}...` : text;
  return JSON.stringify(cut);
}

/** The word at `at`, for a message; looks no further ahead than it shows. */
export function excerptWord(source: string, at: number): string {
  const ahead = source.slice(at, at + LONGEST_EXCERPT + 1);
  const blank = ahead.search(/\s/);
  return excerpt(blank < 0 ? ahead : ahead.slice(0, blank));
}

/** Faults as they are met; handed out in the order of the text. */
export class ProblemList {
  readonly #problems: InputProblem[] = [];
  #left = 0;

  add(code: string, message: string, span: Span, hint = ""): void {
    if (this.#problems.length < MOST_PROBLEMS) this.#problems.push(new InputProblem(code, message, span, hint));
    else this.#left++;
  }

  finish(): readonly InputProblem[] {
    const sorted = this.#problems.sort((a, b) => (a.span?.start ?? 0) - (b.span?.start ?? 0));
    if (this.#left > 0) {
      const message = `${this.#left} more problems are not listed`;
      sorted.push(new InputProblem("more-problems", message, null, "Correct the first ones and read the file again."));
    }
    return sorted;
  }
}

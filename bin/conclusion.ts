import type { InputProblem } from "../lib/problem.ts";
import { VERSION } from "./version.ts";

/** What is said, and the exit status, when a command ends by throwing. */
export interface Conclusion {
  readonly text: string;
  readonly status: 2 | 3 | 4;
}

/**
 * Status and words for whatever ended a command; a stack is never shown. Commands are bundled apart, so their errors are
 * told by name, not by class.
 */
export function conclusionOf(e: unknown): Conclusion {
  const { name, message, hint } = e as Partial<InputProblem>;
  switch (name as string | undefined) {
    case "UsageProblem":
      return { text: `sitefold: ${message}\n  sitefold COMMAND --help tells what there is`, status: 2 };
    case "LocatedProblem":
      return { text: String(message), status: 3 };
    case "InputProblem":
      return { text: `${message}${hint ? `\n  ${hint}` : ""}`, status: 3 };
    default:
      return { text: `defect in sitefold ${VERSION}, please report it with the input: ${String(e)}`, status: 4 };
  }
}

import { InputProblem } from "../lib/problem.ts";
import { UsageProblem } from "./problems.ts";

/** Runs `work` on options of the command line, whose faults are faults of usage. @throws UsageProblem */
export function usage<T>(work: () => T): T {
  try {
    return work();
  } catch (e) {
    throw e instanceof InputProblem ? usageProblem(e) : e;
  }
}

/** The fault of an input as one of the command line, where that is what it came from. */
export function usageProblem({ message, hint }: InputProblem): UsageProblem {
  return new UsageProblem(`${message}${hint ? `\n  ${hint}` : ""}`);
}

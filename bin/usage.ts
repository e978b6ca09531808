import { InputProblem } from "../lib/problem.ts";
import { UsageProblem } from "./problems.ts";

/** Runs `work` on options of the command line, whose faults are faults of usage. @throws UsageProblem */
export function usage<T>(work: () => T): T {
  try {
    return work();
  } catch (e) {
    throw e instanceof InputProblem ? new UsageProblem(`${e.message}${e.hint ? `\n  ${e.hint}` : ""}`) : e;
  }
}

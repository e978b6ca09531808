import { InputProblem } from "../../lib/problem.ts";

/** The problem that reading the text raises. */
export function problemOf(read: () => unknown): InputProblem {
  try {
    read();
  } catch (error) {
    if (error instanceof InputProblem) return error;
    throw error;
  }
  throw new Error("nothing was refused");
}

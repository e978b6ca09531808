/** Misuse of the command line; ends with status 2. */
export class UsageProblem extends Error {
  override readonly name = "UsageProblem";
}

/** A fault together with the file it lies in, ready to print; ends with status 3. */
export class LocatedProblem extends Error {
  override readonly name = "LocatedProblem";
}

import { renameSync, rmSync, statSync, writeFileSync } from "node:fs";
import type { Arguments } from "./arguments.ts";
import { LocatedProblem, UsageProblem } from "./problems.ts";
import { printOut } from "./standard-output.ts";
import { VERSION } from "./version.ts";

/** Fields that every JSON document begins with. */
export interface Heading {
  readonly command: string;
  readonly source: { readonly file: string; readonly block: string };
  readonly notes: readonly string[];
  readonly tolerance: { readonly position: number };
}

/** One JSON document: the heading, then the answer. Every number must be finite. */
export function jsonDocument(heading: Heading, answer: object): string {
  const document = { sitefold: VERSION, ...heading, ...answer };
  return `${JSON.stringify(document, refuseNonFinite, 2)}\n`;
}

function refuseNonFinite(key: string, value: unknown): unknown {
  if (typeof value === "number" && !Number.isFinite(value)) throw new RangeError(`${key} is ${value}`);
  return value;
}

/**
 * Writes an answer to the terminal (`--output -` too), or to --output: first beside it, then moved into place, so that a failure leaves
 * an older file as it was.
 * @param input a file that was read and is no operand, if any
 * @throws UsageProblem if that would overwrite what was read
 */
export async function deliver(text: string, args: Arguments, input: string | null): Promise<void> {
  const target = args.text("output");
  const whole = text.endsWith("\n") ? text : `${text}\n`;
  if (target === null || target === "-") {
    printOut(whole);
    return;
  }
  for (const read of [...args.operands, ...(input === null ? [] : [input])]) {
    if (sameFile(target, read)) throw new UsageProblem(`--output ${target} is the input itself; choose another name`);
  }
  const beside = `${target}.${process.pid}.part`;
  try {
    writeFileSync(beside, whole);
    renameSync(beside, target);
  } catch (e) {
    rmSync(beside, { force: true });
    throw new LocatedProblem(
      `${target}: could not be written (${(e as NodeJS.ErrnoException).code}); nothing was changed`,
    );
  }
}

/** Two names of one file, by path or by links. */
function sameFile(a: string, b: string): boolean {
  const [one, other] = [a, b].map((path) => statSync(path, { throwIfNoEntry: false, bigint: true }));
  return one !== undefined && other !== undefined && one.ino === other.ino && one.dev === other.dev;
}

import { decodeCif } from "../lib/cif/index.ts";
import type { Arguments } from "./arguments.ts";
import { bytesOf } from "./input.ts";
import { UsageProblem } from "./problems.ts";

/** A table of sites as text. */
export interface TableSource {
  readonly text: string;
  /** For messages. */
  readonly name: string;
  /** Path that was read, `-` for standard input; null where the table was given by options. */
  readonly file: string | null;
}

/** The table of a file, or the one of --group, --cell and --site, a line each. @throws UsageProblem, LocatedProblem */
export async function tableSource(args: Arguments): Promise<TableSource> {
  const [file, ...others] = args.operands;
  const lines = ["name", "group", "cell"].flatMap((key) => {
    const value = args.text(key);
    return value === null ? [] : [`${key} ${value}`];
  });
  lines.push(...args.texts("site"));
  if (file === undefined) {
    if (lines.length === 0)
      throw new UsageProblem("a table of sites is missing: a file, or --group, --cell and --site");
    return { text: lines.join("\n"), name: "options", file: null };
  }
  if (others.length > 0) throw new UsageProblem(`one table is wanted, and only one: ${args.operands.join(" ")}`);
  if (lines.length > 0) throw new UsageProblem("give either a file or --group, --cell, --site and --name, not both");
  const { text } = decodeCif(await bytesOf(file));
  return { text, name: file === "-" ? "standard input" : file, file };
}

import { readdirSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { conclusionOf } from "../../bin/conclusion.ts";
import type { Command } from "../../bin/load-command.ts";
import { redirectOutput } from "../../bin/standard-output.ts";

const FOLDER = fileURLToPath(new URL("../../bin/commands", import.meta.url));

/** The commands there are, by the files they lie in. */
export const COMMANDS: readonly string[] = readdirSync(FOLDER).map((file) => file.replace(/\.ts$/, ""));

/** What a command left behind. */
export interface Outcome {
  readonly status: number;
  readonly out: string;
  readonly err: string;
}

/** The command of this name, from its source. */
export const commandNamed = async (name: string): Promise<Command> => await import(`../../bin/commands/${name}.ts`);

/** Runs a command in this process, as `sitefold NAME WORDS` would. Paths are relative to the root of the repository. */
export async function runCommand(name: string, words: readonly string[]): Promise<Outcome> {
  const { run } = await commandNamed(name);
  const out: string[] = [];
  const err: string[] = [];
  const write = process.stderr.write;
  const restore = redirectOutput((text) => out.push(text));
  process.stderr.write = (text: string | Uint8Array) => err.push(String(text)) > 0;
  let status: number;
  try {
    status = await run(words);
  } catch (e) {
    const conclusion = conclusionOf(e);
    err.push(`${conclusion.text}\n`);
    status = conclusion.status;
  } finally {
    restore();
    process.stderr.write = write;
  }
  return { status, out: out.join(""), err: err.join("") };
}

/** Words of a command line as a shell splits them; quotes may hold blanks. */
export function wordsOf(line: string): string[] {
  return [...line.matchAll(/"([^"]*)"|'([^']*)'|(\S+)/g)].map((m) => m[1] ?? m[2] ?? m[3]!);
}

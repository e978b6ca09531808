import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { conclusionOf } from "../../bin/conclusion.ts";
import { type Command, loadCommand } from "../../bin/load-command.ts";
import type { Outcome } from "./run-command.ts";

const BUILT = fileURLToPath(new URL("../../dist/bin/commands", import.meta.url));

/** Runs commands in this process from their bundles, which are faster than sources under test. */
export class BuiltCommands {
  readonly #folder = mkdtempSync(join(tmpdir(), "sitefold-built-"));
  readonly #loaded = new Map<string, Command>();

  async run(name: string, words: readonly string[]): Promise<Outcome> {
    const command = this.#command(name);
    const answer = join(this.#folder, "answer");
    const err: string[] = [];
    const write = process.stderr.write;
    process.stderr.write = (text: string | Uint8Array) => err.push(String(text)) > 0;
    try {
      const status = await command.run([...words, "--output", answer]);
      return { status, out: readFileSync(answer, "utf8"), err: err.join("") };
    } catch (e) {
      const { status, text } = conclusionOf(e);
      return { status, out: "", err: `${err.join("")}${text}\n` };
    } finally {
      process.stderr.write = write;
    }
  }

  #command(name: string): Command {
    const command = this.#loaded.get(name) ?? loadCommand(name, BUILT);
    this.#loaded.set(name, command);
    return command;
  }

  remove(): void {
    rmSync(this.#folder, { recursive: true, force: true });
  }
}

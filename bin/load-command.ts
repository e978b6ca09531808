import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import { basename, dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { Script } from "node:vm";
import type { CommandSpec } from "./arguments.ts";

/** A command as its bundle exports it. */
export interface Command {
  readonly spec: CommandSpec;
  run(words: readonly string[]): Promise<number>;
}

/**
 * Loads a command from its bundle beside this one, which the build wrote as the function that a CommonJS module is. The
 * build leaves the compiled code of its example there too: with it a command starts a quarter sooner. Code of another
 * version of Node is refused by V8 itself, and compiled anew. A bundle is ASCII, which is read as Latin-1 without being
 * decoded.
 */
export function loadCommand(name: string, folder = commandFolder()): Command {
  const file = join(folder, `${name}.js`);
  const cachedData = compiledCode(file);
  const script = new Script(readFileSync(file, "latin1"), { filename: file, ...(cachedData ? { cachedData } : {}) });
  const module = { exports: {} as Command };
  const builtIn = createRequire(file);
  // What is loaded only when it is needed lies beside it, and is a command itself.
  const requires = (id: string): unknown =>
    id.startsWith("./") ? loadCommand(basename(id, ".js"), folder) : builtIn(id);
  script.runInThisContext()(module.exports, requires, module, file, folder);
  return module.exports;
}

function commandFolder(): string {
  return join(dirname(fileURLToPath(import.meta.url)), "commands");
}

function compiledCode(file: string): Buffer | null {
  try {
    return readFileSync(`${file}.cache`);
  } catch {
    return null; // a build without it works as well, only later
  }
}

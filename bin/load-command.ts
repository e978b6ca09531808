import { readFileSync } from "node:fs";
import Module, { createRequire } from "node:module";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { Script } from "node:vm";
import type { CommandSpec } from "./arguments.ts";

/** A command as its bundle exports it. */
export interface Command {
  readonly spec: CommandSpec;
  run(words: readonly string[]): Promise<number>;
}

/**
 * Loads a command from its bundle beside this one. The build leaves the compiled code of its example there too: with it a
 * command starts a quarter sooner. Code of another version of Node is refused by V8 itself, and compiled anew.
 */
export function loadCommand(name: string): Command {
  const file = join(dirname(fileURLToPath(import.meta.url)), "commands", `${name}.js`);
  const cachedData = compiledCode(file);
  // A bundle is ASCII, which is read as Latin-1 without being decoded.
  const script = new Script(Module.wrap(readFileSync(file, "latin1")), {
    filename: file,
    ...(cachedData ? { cachedData } : {}),
  });
  const module = { exports: {} as Command };
  script.runInThisContext()(module.exports, createRequire(file), module, file, dirname(file));
  return module.exports;
}

function compiledCode(file: string): Buffer | null {
  try {
    return readFileSync(`${file}.cache`);
  } catch {
    return null; // a build without it works as well, only later
  }
}

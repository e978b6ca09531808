import { describe, expect, it } from "vitest";
import { COMMANDS, commandNamed, runCommand, wordsOf } from "../support/run-command.ts";

/**
 * The lines printed that an example keeps: between two of its lines `...` stands for at least one. Where they part, the
 * rest is given as printed, for a difference that can be read.
 */
function asShortened(printed: readonly string[], example: readonly string[]): string[] {
  const kept: string[] = [];
  let at = 0;
  for (const [i, line] of example.entries()) {
    if (line === "...") {
      const next = example[i + 1];
      const found = next === undefined ? printed.length : printed.indexOf(next, at + 1);
      if (found <= at) return [...kept, ...printed.slice(at)];
      kept.push("...");
      at = found;
    } else {
      kept.push(printed[at] ?? "(no more lines)");
      at++;
    }
  }
  return [...kept, ...printed.slice(at)];
}

describe("the shortening of examples", () => {
  const printed = ["a", "b", "c", "d"];
  it.each([
    [["a", "b", "c", "d"], true],
    [["a", "...", "d"], true],
    [["...", "c", "d"], true],
    [["a", "b", "..."], true],
    [["a", "...", "b", "c", "d"], false],
    [["a", "b", "c", "d", "..."], false],
    [["a", "b"], false],
    [["a", "...", "e"], false],
    [["a", "c", "b", "d"], false],
  ])("as %j is honest: %s", (example, honest) => {
    expect(JSON.stringify(asShortened(printed, example)) === JSON.stringify(example)).toBe(honest);
  });
});

describe("the example in the help", () => {
  it.each(COMMANDS)("of %s is what its line prints", async (name) => {
    const { line, output } = (await commandNamed(name)).spec.example;
    const [program, command, ...words] = wordsOf(line);
    expect([program, command]).toEqual(["sitefold", name]);
    const { out, err } = await runCommand(name, words);
    expect(err).toBe("");
    const example = output.replace(/^\n|\n$/g, "").split("\n");
    expect(asShortened(out.trimEnd().split("\n"), example)).toEqual(example);
  });
});

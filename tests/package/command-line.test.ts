import { execFileSync } from "node:child_process";
import { readdirSync, readFileSync, statSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { installPacked, MANIFEST, type Packed } from "./packed.ts";

let packed: Packed;
let bin: string;
beforeAll(() => {
  packed = installPacked();
  bin = join(packed.home, "dist", "bin");
});
afterAll(() => packed.remove());

/** Chunks that a chunk loads before it runs; `import()` is not among them. */
function staticImports(chunk: string): string[] {
  const code = readFileSync(join(bin, chunk), "utf8");
  return [...code.matchAll(/(?:from|\bimport)\s*"\.\/([^"]+\.js)"/g)].map((m) => m[1]!);
}

function loadedWith(chunk: string, seen = new Set<string>()): Set<string> {
  if (seen.has(chunk)) return seen;
  seen.add(chunk);
  for (const next of staticImports(chunk)) loadedWith(next, seen);
  return seen;
}

const holdsYargs = (chunk: string) => readFileSync(join(bin, chunk), "utf8").includes("Did you mean");

describe("the bundled command line", () => {
  it("starts as a program of its own and tells the version of the package", () => {
    const main = join(bin, "main.js");
    expect(readFileSync(main, "utf8")).toMatch(/^#!\/usr\/bin\/env node\n/);
    if (process.platform !== "win32") expect(statSync(main).mode & 0o111).toBe(0o111);
    expect(execFileSync(process.execPath, [main, "--version"], { encoding: "utf8" }).trim()).toBe(MANIFEST.version);
  });

  it("holds yargs in one chunk, which no command loads to do its work", () => {
    const chunks = readdirSync(bin).filter((f) => f.endsWith(".js"));
    const [yargs, ...others] = chunks.filter(holdsYargs);
    expect(yargs).toBeDefined();
    expect(others).toEqual([]);
    const commands = readdirSync(new URL("../../bin/commands", import.meta.url)).map((f) => f.replace(/\.ts$/, ""));
    const working = chunks.filter((c) => c === "main.js" || commands.some((name) => c.startsWith(`${name}-`)));
    expect(working.length).toBe(commands.length + 1);
    for (const chunk of working) expect([...loadedWith(chunk)]).not.toContain(yargs);
  });

  it("starts without loading the science, which comes with the command", () => {
    // A Hall symbol that only the table of the space-group types holds.
    const science = (chunk: string) => readFileSync(join(bin, chunk), "utf8").includes("4vw 2vw 3");
    expect(readdirSync(bin).filter((f) => f.endsWith(".js") && science(f)).length).toBe(1);
    expect([...loadedWith("main.js")].filter(science)).toEqual([]);
  });

  it("carries the licences of what is bundled in it", () => {
    const text = readFileSync(join(bin, "LICENCES.txt"), "utf8");
    for (const name of ["parsimmon", "yargs", "yargs-parser"]) expect(text).toMatch(new RegExp(`^${name} \\d`, "m"));
  });
});

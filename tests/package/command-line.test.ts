import { execFileSync } from "node:child_process";
import { existsSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
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

/** Text that only yargs holds. */
const YARGS = "Did you mean";
/** A Hall symbol that only the table of the space-group types holds. */
const SCIENCE = "4vw 2vw 3";

const names = readdirSync(new URL("../../bin/commands", import.meta.url)).map((f) => f.replace(/\.ts$/, ""));
const bundle = (file: string) => readFileSync(join(bin, file), "utf8");

describe("the bundled command line", () => {
  it("starts as a program of its own and tells the version of the package", () => {
    const main = join(bin, "main.js");
    expect(readFileSync(main, "utf8")).toMatch(/^#!\/usr\/bin\/env node\n/);
    if (process.platform !== "win32") expect(statSync(main).mode & 0o111).toBe(0o111);
    expect(execFileSync(process.execPath, [main, "--version"], { encoding: "utf8" }).trim()).toBe(MANIFEST.version);
  });

  it("has one bundle for each command, and yargs in none of them", () => {
    expect(
      readdirSync(join(bin, "commands"))
        .filter((f) => f.endsWith(".js"))
        .sort(),
    ).toEqual(names.map((n) => `${n}.js`).sort());
    for (const name of names) expect([name, bundle(`commands/${name}.js`).includes(YARGS)]).toEqual([name, false]);
    expect(bundle("help.js")).toContain(YARGS);
    expect(bundle("main.js")).not.toContain(YARGS);
  });

  it("starts without loading the science, which comes with the command", () => {
    expect(bundle("commands/modes.js")).toContain(SCIENCE);
    expect(bundle("main.js")).not.toContain(SCIENCE);
  });

  it("answers the same with and without the code compiled at build time", () => {
    const run = () =>
      execFileSync(process.execPath, [join(bin, "main.js"), "group", "P 21/c", "--json"], { encoding: "utf8" });
    const cache = join(bin, "commands", "group.js.cache");
    expect(existsSync(cache)).toBe(true);
    const quick = run();
    rmSync(cache);
    expect(run()).toBe(quick);
    writeFileSync(cache, "not compiled code");
    expect(run()).toBe(quick);
  });

  it("carries the licences of what is bundled in it", () => {
    const text = readFileSync(join(bin, "LICENCES.txt"), "utf8");
    for (const name of ["parsimmon", "yargs", "yargs-parser"]) expect(text).toMatch(new RegExp(`^${name} \\d`, "m"));
  });
});

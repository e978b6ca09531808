import { type SpawnSyncReturns, spawnSync } from "node:child_process";
import { linkSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { COMMANDS } from "../support/run-command.ts";

const ROOT = fileURLToPath(new URL("../..", import.meta.url));
const MAIN = join(ROOT, "dist", "bin", "main.js");
const CALCITE = join(ROOT, "fixtures", "calcite.cif");
const DAMAGED = join(ROOT, "fixtures", "damaged");

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "sitefold-program-"));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** Runs the program as built, in a folder of its own. */
function sitefold(words: readonly string[], input: string | Uint8Array = ""): SpawnSyncReturns<string> {
  return spawnSync(process.execPath, [MAIN, ...words], { cwd: folder, input, encoding: "utf8" });
}

/** Nothing that only a programmer can read. */
function expectNoStack({ stdout, stderr }: SpawnSyncReturns<string>): void {
  expect(stdout + stderr).not.toMatch(/^\s+at .*[:(]\d+:\d+\)?$|node:internal|\.js:\d+/m);
}

describe("the program", () => {
  it("lists its commands, the same without words, with help and with --help", () => {
    const { status, stdout, stderr } = sitefold(["--help"]);
    expect([status, stderr]).toEqual([0, ""]);
    const listed = [...stdout.matchAll(/^ {2}([a-z]+) {2,}\S/gm)].map(([, name]) => name);
    expect(listed.sort()).toEqual([...COMMANDS].sort());
    expect(stdout).toMatch(/Exit status: 0 done, 1 answered with a contradiction, 2 bad usage/);
    expect(sitefold([]).stdout).toBe(stdout);
    expect(sitefold(["help"]).stdout).toBe(stdout);
  });

  it("explains a command with its options and an example", () => {
    const { status, stdout } = sitefold(["sites", "--help"]);
    expect(status).toBe(0);
    for (const part of ["--tolerance", "[ANGSTROM]", "-o, --output", "$ sitefold sites fixtures/calcite.cif", "18e"]) {
      expect(stdout).toContain(part);
    }
    expect(sitefold(["help", "sites"]).stdout).toBe(stdout);
  });

  it("answers from a file and from standard input alike", () => {
    const named = sitefold(["sites", CALCITE, "--json"]);
    const piped = sitefold(["sites", "-", "--json"], readFileSync(CALCITE));
    expect([named.status, piped.status, piped.stderr]).toEqual([0, 0, ""]);
    const expected = { ...JSON.parse(named.stdout), source: { file: "standard input", block: "calcite" } };
    expect(JSON.parse(piped.stdout)).toEqual(expected);
  });

  it.skipIf(process.platform === "win32")("ends in silence when nobody reads on", () => {
    const line = `"${process.execPath}" "${MAIN}" group "F d -3 c" | head -1; echo "\${PIPESTATUS[0]}"`;
    const { stdout, stderr } = spawnSync("bash", ["-c", line], { encoding: "utf8" });
    expect(stderr).toBe("");
    expect(stdout.split("\n")).toHaveLength(3);
    expect(stdout).toMatch(/\n0\n$/);
  });
});

describe("--output", () => {
  it("writes what would be printed, and nothing else is left behind", () => {
    const { status, stdout, stderr } = sitefold(["sites", CALCITE, "--output", "answer.txt"]);
    expect([status, stdout, stderr]).toEqual([0, "", ""]);
    expect(readFileSync(join(folder, "answer.txt"), "utf8")).toBe(sitefold(["sites", CALCITE]).stdout);
    expect(readdirSync(folder)).toEqual(["answer.txt"]);
  });

  it("refuses to overwrite the input, also by another name", () => {
    const text = readFileSync(CALCITE, "utf8");
    writeFileSync(join(folder, "wall.cif"), text);
    linkSync(join(folder, "wall.cif"), join(folder, "link.cif"));
    for (const target of ["wall.cif", "./wall.cif", join(folder, "wall.cif"), "link.cif"]) {
      for (const words of [
        ["sites", "wall.cif"],
        ["vet", CALCITE, "wall.cif"],
        ["group", "wall.cif"],
      ]) {
        const run = sitefold([...words, "-o", target]);
        const refused = [...words, target, 2, expect.stringContaining("is the input itself")];
        expect([...words, target, run.status, run.stderr]).toEqual(refused);
      }
      expect(readFileSync(join(folder, "wall.cif"), "utf8")).toBe(text);
    }
    const absences = ["absences", CALCITE, "--reflections", "wall.cif", "--output", "wall.cif"];
    expect(sitefold(absences).status).toBeGreaterThan(1);
    expect(readFileSync(join(folder, "wall.cif"), "utf8")).toBe(text);
  });

  it("leaves an older file as it was when the answer fails", () => {
    writeFileSync(join(folder, "kept.txt"), "kept");
    expect(sitefold(["sites", join(DAMAGED, "empty.cif"), "-o", "kept.txt"]).status).toBe(3);
    expect(readFileSync(join(folder, "kept.txt"), "utf8")).toBe("kept");
  });

  it("tells when a file cannot be written", () => {
    const run = sitefold(["sites", CALCITE, "-o", join("nowhere", "answer.txt")]);
    expect([run.status, run.stderr]).toEqual([3, expect.stringContaining("could not be written (ENOENT)")]);
  });
});

/** Words, status, and what is said first; FOLDER and the fixtures stand for their paths. */
const REFUSED: readonly (readonly [words: readonly string[], status: number, says: string])[] = [
  [["sties", CALCITE], 2, 'sitefold: there is no command "sties"'],
  [["sites"], 2, "sitefold: a CIF file is missing"],
  [["sites", CALCITE, CALCITE], 2, "sitefold: a CIF file is wanted, and only one: "],
  [["sites", CALCITE, "--tolerence", "0.1"], 2, "sitefold: sites has no option --tolerence; did you mean --tolerance?"],
  [["sites", CALCITE, "-x"], 2, "sitefold: sites has no option -x"],
  [["sites", CALCITE, "--tolerance"], 2, "sitefold: --tolerance needs a value"],
  [["sites", CALCITE, "--tolerance", "small"], 2, 'sitefold: --tolerance takes a number, not "small"'],
  [["sites", CALCITE, "--tolerance", "NaN"], 2, 'sitefold: --tolerance takes a number, not "NaN"'],
  [["sites", CALCITE, "--tolerance", "0.1", "--tolerance", "0.2"], 2, "sitefold: --tolerance is given 2 times"],
  [["sites", CALCITE, "--tolerance", "-1"], 2, "sitefold: a tolerance of -1 angstrom cannot tell atoms apart"],
  [["vet", CALCITE, "--tolerance", "7"], 2, "sitefold: a tolerance of 7 angstrom cannot tell atoms apart"],
  [["sites", CALCITE, "--block", "marble"], 3, 'no block "marble"; it has calcite'],
  [["sites", "absent.cif"], 3, "absent.cif: there is no such file"],
  [["sites", "."], 3, ".: this is a folder"],
  [["group", "P 9"], 2, 'sitefold: "P 9"'],
  [["vet", "absent.cif"], 3, "absent.cif: there is no such file"],
  [["sites", join(DAMAGED, "empty.cif")], 3, "no data block in it"],
  [["sites", join(DAMAGED, "open-quote.cif"), "--strict"], 3, "open-quote.cif:8:28: the quote that opens"],
  [["sites", join(DAMAGED, "operations-that-do-not-close.cif")], 3, ":11:1: the 4 operations listed are no group"],
];

describe("what cannot be answered", () => {
  it.each(REFUSED)("%j ends with status %i: %s", (words, status, says) => {
    const run = sitefold(words);
    expect([run.status, run.stdout]).toEqual([status, ""]);
    expect(run.stderr.split("\n")[0]).toContain(says);
    expectNoStack(run);
  });

  it("is told and read around unless --strict is set", () => {
    const run = sitefold(["sites", join(DAMAGED, "open-quote.cif")]);
    expect(run.status).toBe(0);
    expect(run.stderr).toContain("open-quote.cif:8:28: the quote that opens");
    expect(run.stdout).toContain("F m -3 m");
  });

  it("is a contradiction for vet: status 1, and the answer is printed", () => {
    const run = sitefold(["vet", join(DAMAGED, "operations-that-do-not-close.cif")]);
    expect([run.status, run.stderr]).toEqual([1, ""]);
    expect(run.stdout).toContain("CONTRADICTION operations-no-group");
  });
});

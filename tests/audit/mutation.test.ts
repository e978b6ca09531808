import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { fixture } from "./cases.ts";
import { CHOSEN } from "./mutation/fixtures.ts";
import { MUTATIONS } from "./mutation/mutations.ts";
import { runSuite } from "./mutation/suite.ts";

/** Share of planted contradictions that must be found. */
const OWED = 0.95;
/** A few of the forty, so that the whole run stays short: salts, a molecule, a high and a low symmetry. */
const FEW = ["anhydrite", "calcite", "naphthalene", "scheelite"];

const golden = readFileSync(new URL("../golden/mutation.txt", import.meta.url), "utf8");
const shareIn = (line: RegExp) => Number(line.exec(golden)![1]) / Number(line.exec(golden)![2]);

describe("the mutation suite", () => {
  it("has at least 25 kinds of slip, planted in forty fixtures", () => {
    expect(MUTATIONS.length).toBeGreaterThanOrEqual(25);
    expect(new Set(CHOSEN).size).toBe(40);
  });

  it("finds what it owes in a few fixtures, and nothing in them as they are", () => {
    const { falseAlarms, rates } = runSuite(FEW.map((name) => ({ name, block: fixture(name) })));
    expect(falseAlarms).toEqual([]);
    for (const owed of ["contradiction", "doubt"] as const) {
      const own = rates.filter((r) => r.owed === owed && r.planted > 0);
      const [found, planted] = [own.reduce((s, r) => s + r.found, 0), own.reduce((s, r) => s + r.planted, 0)];
      expect(
        found / planted,
        own.flatMap((r) => r.missed.map((m) => `${r.kind}: ${m}`)).join("; "),
      ).toBeGreaterThanOrEqual(OWED);
    }
  });
});

describe("the table that is kept of the whole suite", () => {
  it("has every kind in its order", () => {
    const kinds = golden.split("\n").flatMap((line) => /^(.+?) {2,}(?:contradiction|doubt) /.exec(line)?.[1] ?? []);
    expect(kinds).toEqual(MUTATIONS.map((m) => m.kind));
  });

  it("shows no contradiction in a sound deposition, and the share owed of those planted", () => {
    expect(golden).toMatch(/^40 sound depositions: 0 contradictions,/);
    expect(shareIn(/contradictions owed and found: (\d+) of (\d+)/)).toBeGreaterThanOrEqual(OWED);
  });
});

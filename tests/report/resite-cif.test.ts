import { describe, expect, it } from "vitest";
import { compareStructures, standardisedCrystal } from "../../lib/structure/index.ts";
import { crystalOfText, fixture } from "../support/crystals.ts";
import { runCommand } from "../support/run-command.ts";

const NAMES = ["albite", "gypsum-i2a", "zincite", "sodium-nitrite", "alpha-quartz", "calcite", "fullerene-pa-3"];

describe("a CIF that resite writes", () => {
  it.each(NAMES)("of %s is read as the same structure, in standard form already", async (name) => {
    const words = [`fixtures/${name}.cif`, "--standardised", "--format", "cif"];
    const { status, out, err } = await runCommand("resite", words);
    expect([status, err]).toEqual([0, ""]);
    const read = crystalOfText(out);
    const { answer } = compareStructures(fixture(name), read);
    expect([answer.verdict, answer.hand]).toEqual(["same", "same"]);
    expect(answer.displacement!.largest).toBeLessThan(1e-3); // s.u. decide how many digits are written
    const again = standardisedCrystal(read);
    expect(again.crystal.sites.map((s) => s.label)).toEqual(read.sites.map((s) => s.label));
    expect(again.transformation.P.n.join()).toBe("1,0,0,0,1,0,0,0,1");
  });

  it("on rhombohedral axes comes back to the hexagonal ones", async () => {
    const there = await runCommand("resite", ["fixtures/calcite.cif", "--setting", ":R", "--format", "cif2"]);
    expect(there.out).toMatch(/^#\\#CIF_2\.0/);
    const { answer } = compareStructures(fixture("calcite"), crystalOfText(there.out));
    expect([answer.verdict, answer.displacement!.largest < 1e-3]).toEqual(["same", true]);
  });

  it("cannot be asked for with two files from standard input", async () => {
    for (const to of [["--to=-"], ["--to", "-"]]) {
      const { status, err } = await runCommand("resite", ["-", ...to]);
      expect([status, err]).toEqual([2, expect.stringContaining("only one of the two files can be standard input")]);
    }
  });
});

describe("a lone minus as the value of an option", () => {
  it("is standard output for --output", async () => {
    const { status, out } = await runCommand("resite", ["fixtures/halite.cif", "--output", "-"]);
    expect([status, out.includes("F m -3 m")]).toEqual([0, true]);
  });
});

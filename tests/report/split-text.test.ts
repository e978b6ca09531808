import { describe, expect, it } from "vitest";
import { splitText, unitSummaryText } from "../../lib/report/index.ts";
import { splitAnswer, unitSummaries } from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";

describe("units that differ in nothing but their atoms", () => {
  it("stand in one table, every kind named: the waters of epsomite", () => {
    const text = splitText(splitAnswer(fixture("epsomite"))).replace(/\n {4}/g, " ");
    const heads = text.match(/^H2O .*$/gm);
    expect(heads).toHaveLength(1);
    expect(heads![0]).toContain("7 kinds, 4 of each in the primitive cell; the rows are for one kind: OW1 H1A H1B; ");
    expect(heads![0]).toMatch(/; OW7 H7A H7B$/);
    expect(text.match(/libration, twist/g)).toHaveLength(1);
  });

  it("are kept apart where formula, site or number differ: azurite", () => {
    const answer = splitAnswer(fixture("azurite"));
    const kinds = new Set(answer.units.map((u) => `${u.formula} ${u.siteSymmetry} ${u.count}`));
    const heads = splitText(answer).match(/^\w+ .*in the primitive cell.*$/gm)!;
    expect(answer.units.length).toBeGreaterThan(1);
    expect(heads).toHaveLength(kinds.size);
  });
});

describe("the summary of units with the modes", () => {
  it("counts kinds that are alike", () => {
    const text = unitSummaryText(unitSummaries(splitAnswer(fixture("epsomite"))));
    expect(text).toMatch(/^H2O +7 x 4 +C2v/m);
    expect(text).toContain("- count 7 x 4: 7 kinds, 4 of each; the sums are those of one kind");
  });
});

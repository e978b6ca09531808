import { describe, expect, it } from "vitest";
import { findSpecies, molecularGroup, plainLabel } from "../../lib/representation/index.ts";
import { problemOf } from "../support/problem-of.ts";

describe("labels as people write them", () => {
  it.each([
    ["F2g", "T2g"],
    ["t_{2g}", "T2g"],
    ["T₂g", "T2g"],
    ["a1G", "A1g"],
    ["E″", "E''"],
    ['a2"', "A2''"],
    [" e' ", "E'"],
    ["B_3u", "B3u"],
    ["hu", "Hu"],
  ])("%s is %s", (text, label) => expect(plainLabel(text)).toBe(label));

  it("leave what is no label alone", () => expect(plainLabel("Sigma+")).toBe("Sigma+"));

  it("are found by index, or refused with those that there are", () => {
    const { irreps } = molecularGroup("D3h");
    expect(findSpecies(irreps, "e''")).toBe(irreps.findIndex((r) => r.label === "E''"));
    const problem = problemOf(() => findSpecies(irreps, "T2"));
    expect(problem.code).toBe("unknown-species");
    expect(problem.hint).toBe("The species are A1', A2', E', A1'', A2'', E''.");
  });
});

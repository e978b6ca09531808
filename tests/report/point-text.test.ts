import { describe, expect, it } from "vitest";
import { classText, functionText, patternsText, pointText, speciesWriter } from "../../lib/report/index.ts";
import { patternsAnswer, pointAnswer } from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";

describe("names set for people", () => {
  it.each([
    ["2S8^3", "2S₈³"],
    ["3sigma_d", "3σd"],
    ["2C2''", "2C₂″"],
    ["C2(z)", "C₂(z)"],
    ["12S10^3", "12S₁₀³"],
    ["inf sigma_v", "∞σv"],
    ["sigma(xz)", "σ(xz)"],
  ])("%s is %s", (name, text) => expect(classText(name)).toBe(text));

  it("functions have powers and roots", () => expect(functionText("sqrt3(x2-y2)")).toBe("√3(x²-y²)"));

  it("triply degenerate species are T, or F by choice; other labels do not change", () => {
    const [t, f] = [speciesWriter("T"), speciesWriter("F")];
    expect([t.label("T2g"), f.label("T2g"), f.label("A2''"), f.label("Tu")]).toEqual(["T₂g", "F₂g", "A₂″", "Fu"]);
    expect(f.sum({ A1: 1, T2: 3 }, (l) => (l === "T2" ? ["IR"] : []))).toBe("A₁ + 3F₂(IR)");
  });
});

describe("the table of a point group as text", () => {
  it("reads like a table in a book", () => {
    const text = pointText(pointAnswer("C3v", { products: ["E x E"], subgroups: ["Cs"] }));
    expect(text).toContain("    E  2C₃  3σv\nA₁  1    1    1\nA₂  1    1   -1\nE   2   -1    0\n");
    expect(text).toContain("E × E = A₁(R,IR) + A₂ + E(R,IR); symmetric part A₁ + E, antisymmetric part A₂");
    expect(text).toMatch(/subgroup Cs \(m\), order 2: keeps E, σv\n[\s\S]*A₁ +A′\n +A₂ +A″\n +E +A′ \+ A″$/);
  });

  it("marks pairs of complex species and tells numbers that are not whole", () => {
    expect(pointText(pointAnswer("C3"))).toContain("* two complex conjugate species taken as one: E");
    expect(pointText(pointAnswer("I"), speciesWriter("F"))).toMatch(/F₁ +3 +1\.618 +-0\.618/);
  });

  it("prints nothing that has no value", () => {
    for (const name of ["Ih", "D4d", "Cinfv", "Dinfh", "C1", "-4m2", "m-3"]) {
      const text = pointText(pointAnswer(name, { tensors: true }));
      expect(text).not.toMatch(/undefined|NaN|null|-0\b(?!\.)/);
    }
  });
});

describe("mode patterns as text", () => {
  it("give coefficients under a root, partners side by side", () => {
    const text = patternsText(patternsAnswer(fixture("rutile"), { species: "A1g" }));
    expect(text).toContain("A₁g: Raman active\n\nA₁g of O, times 1/√8\n");
    expect(text).toMatch(/\n +3 {2}O +1 +1 +\.\n +4 {2}O +-1 +-1 +\.\n/);
    const eu = patternsText(patternsAnswer(fixture("rutile"), { species: "Eu" }));
    expect(eu).toContain("Eu: infrared active, 2 partners like (x, y)");
    expect(eu).toContain("rigid translation in Eu, along x and y: (Ti 1) + √2 (O 1), times 1/√3");
  });

  it("write F where that is wanted", () => {
    expect(patternsText(patternsAnswer(fixture("halite")), speciesWriter("F"))).toContain("F₁u of Na\n");
  });
});

import { describe, expect, it } from "vitest";
import { modesText, speciesWriter, unitSummaryText } from "../../lib/report/index.ts";
import { parseFormula } from "../../lib/structure/index.ts";
import { modesAnswer, splitAnswer, unitSummaries } from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";

describe("the answer of modes", () => {
  it("counts formula units of the stated formula in the primitive cell", () => {
    const benzene = modesAnswer(fixture("benzene"), parseFormula("C6 H6"));
    expect(benzene.formulaUnits).toEqual({ formula: "C6H6", inPrimitiveCell: 4, source: "file" });
    expect(modesAnswer(fixture("benzene")).formulaUnits).toEqual({
      formula: "CH",
      inPrimitiveCell: 24,
      source: "atoms",
    });
    expect(modesAnswer(fixture("calcite"), parseFormula("C Ca O3")).formulaUnits!.inPrimitiveCell).toBe(2);
    // a formula that the atoms do not bear out is not used
    expect(modesAnswer(fixture("calcite"), parseFormula("Na Cl")).formulaUnits!.formula).toBe("CaCO3");
  });

  it("says how the cell was reduced", () => {
    expect(modesAnswer(fixture("calcite")).centrings).toEqual(["2/3,1/3,1/3", "1/3,2/3,2/3"]);
    expect(modesAnswer(fixture("rutile")).centrings).toEqual([]);
  });

  it("shows at once that a site at an inversion centre is Raman-silent", () => {
    const { sites } = modesAnswer(fixture("calcite"));
    expect(sites.map((s) => [s.label, s.raman, s.infrared])).toEqual([
      ["Ca1", false, true],
      ["C1", true, true],
      ["O1", true, true],
    ]);
  });

  it("tells the silent bands that hyper-Raman scattering shows", () => {
    // calcite: 3 A2g + 2 A1u are silent; odd species may be hyper-Raman active, even ones never (Cyvin et al. 1965)
    expect(modesAnswer(fixture("calcite")).totals).toMatchObject({ silent: 5, silentHyperRaman: 2 });
  });

  it("names the polar species, and those that Raman sees as LO or TO", () => {
    expect(modesAnswer(fixture("alpha-quartz")).polarSpecies).toEqual([
      { label: "A2", modes: 4, raman: false },
      { label: "E", modes: 8, raman: true },
    ]);
    expect(modesAnswer(fixture("diamond")).polarSpecies).toEqual([]);
  });
});

describe("the text of modes", () => {
  const answer = modesAnswer(fixture("calcite"), parseFormula("C Ca O3"));
  const text = modesText(answer);

  it("gives each sum with its number of bands, in the order of a spectroscopist", () => {
    const wanted = [
      "10 vibrating atoms in the primitive cell: 2 CaCO3",
      "the cell of the file holds 3 primitive cells, apart by (2/3,1/3,1/3), (1/3,2/3,2/3)",
      "factor group -3m1 (D3d)",
      "Γ(total) = A₁g + 3A₂g + 4Eg + 2A₁u + 4A₂u + 6Eu: 30 modes",
      "Γ(acoustic) = A₂u + Eu: 3 modes",
      "Γ(optic) = A₁g(R) + 3A₂g + 4Eg(R) + 2A₁u + 3A₂u(IR) + 5Eu(IR): 18 bands from 27 modes",
      "Γ(Raman) = A₁g + 4Eg: 5 bands",
      "Γ(infrared) = 3A₂u + 5Eu: 8 bands",
      "Γ(silent) = 3A₂g + 2A₁u: 5 bands",
      "Γ(silent, but hyper-Raman active) = 2A₁u: 2 bands",
      "mutual exclusion",
      "no Raman active mode moves Ca1",
      "LO and TO parts differ in the polar species 3A₂u + 5Eu; none of them is Raman active",
    ];
    const places = wanted.map((line) => text.indexOf(line));
    expect(places).not.toContain(-1);
    expect(places).toEqual([...places].sort((a, b) => a - b));
  });

  it("tells coincidences where there is no inversion, and writes F if asked", () => {
    const sphalerite = modesText(modesAnswer(fixture("sphalerite")), speciesWriter("F"));
    expect(sphalerite).toContain("1 band is both infrared and Raman active");
    expect(sphalerite).toContain("Raman shows LO or TO of F₂ as the geometry has it");
  });

  it("says what B1 and B2 are called where the two kinds of lateral axes are taken the other way round", () => {
    // graphite is 2 B2g with R. J. Nemanich, G. Lucovsky, S. A. Solin, Solid State Commun. 23 (1977) 117 (from memory)
    expect(modesText(modesAnswer(fixture("graphite-2h")))).toMatch(/C2' and C2'' exchanged.* B₁g is B₂g\n/);
    expect(modesText(modesAnswer(fixture("wurtzite")))).toMatch(/sigma_v and sigma_d exchanged.* B₁ is B₂\n/);
    expect(modesText(modesAnswer(fixture("urea")))).not.toContain("exchanged");
    expect(text).not.toContain("exchanged");
  });

  it("keeps within the width of a terminal, tables apart", () => {
    const prose = text.split("\n").filter((l) => !/^(site|species|\S+ {2,})/.test(l));
    expect(Math.max(...prose.map((l) => l.length))).toBeLessThanOrEqual(110);
  });
});

describe("the lines of units", () => {
  it("add up to all modes, unit by unit", () => {
    for (const name of ["calcite", "gypsum", "alpha-quartz", "potassium-alum"]) {
      const crystal = fixture(name);
      const { units, loneAtoms, extended } = unitSummaries(splitAnswer(crystal));
      const parts = [
        ...units.flatMap((u) => [u.internal, u.librations, u.translations]),
        ...loneAtoms.map((a) => a.factorGroup),
        ...extended.map((e) => e.factorGroup),
      ];
      for (const s of modesAnswer(crystal).irreps) {
        expect(parts.reduce((n, p) => n + (p[s.label] ?? 0), 0)).toBe(s.total);
      }
    }
  });

  it("are one each for internal modes, R and T, in the order of the species", () => {
    const lines = unitSummaryText(unitSummaries(splitAnswer(fixture("calcite")))).split("\n");
    expect(lines.slice(2).map((l) => l.trim().replace(/ {2,}/g, " | "))).toEqual([
      "CO3 | 2 | D3h | 32 (D3) | internal | A₁g + A₂g + 2Eg + A₁u + A₂u + 2Eu",
      "R | A₂g + Eg + A₂u + Eu",
      "T | A₂g + Eg + A₂u + Eu",
      "Ca1 | 2 | -3. | T | A₁u + A₂u + 2Eu",
    ]);
  });
});

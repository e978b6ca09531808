import { describe, expect, it } from "vitest";
import { speciesSum, speciesWriter, typographicLabel } from "../../lib/report/index.ts";

describe("typographicLabel", () => {
  it.each([
    ["A1g", "A₁g"],
    ["B3u", "B₃u"],
    ["E''", "E″"],
    ["A1'", "A₁′"],
    ["T2g", "T₂g"],
    ["Sigmag+", "Σg⁺"],
    ["Sigma-", "Σ⁻"],
    ["Piu", "Πu"],
    ["E1g", "E₁g"],
  ])("sets %s as %s", (label, set) => expect(typographicLabel(label)).toBe(set));
});

describe("speciesSum", () => {
  it("leaves out what does not occur and writes no factor of one", () => {
    const terms = [
      { label: "A1g", count: 1, marks: ["R"] },
      { label: "A2g", count: 0 },
      { label: "Eu", count: 5, marks: ["IR"] },
    ];
    expect(speciesSum(terms)).toBe("A1g(R) + 5Eu(IR)");
    expect(speciesSum([])).toBe("0");
  });
});

describe("speciesWriter", () => {
  it("writes F for T where asked, and nothing else with another letter", () => {
    expect(speciesWriter("F").label("T2g")).toBe("F₂g");
    expect(speciesWriter("F").sum({ A1g: 1, T2g: 3 })).toBe("A₁g + 3F₂g");
    expect(speciesWriter().label("T2g")).toBe("T₂g");
  });
});

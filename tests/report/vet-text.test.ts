import { describe, expect, it } from "vitest";
import type { Finding, VetAnswer } from "../../lib/audit/index.ts";
import { criterionText, vetTable, vetText } from "../../lib/report/index.ts";

const VOLUME: Finding = {
  id: "cell-volume",
  severity: "contradiction",
  message: "the stated cell volume 370.00 Å^3 is not that of the cell, 367.85 Å^3",
  where: { dataName: "_cell_volume", line: 17 },
  evidence: {
    stated: { what: "_cell_volume", value: "370.00" },
    against: { what: "volume of the six cell parameters", value: 367.8512 },
    difference: 2.1488,
    tolerance: 0.0312,
    unit: "Å^3",
  },
  advice: "Look for a wrong digit.",
};

const ANSWER: VetAnswer = { findings: [VOLUME], counts: { contradiction: 1, doubt: 0, remark: 2 } };

describe("the text of vet", () => {
  it("tells where, what is said, what it is against, and what to do", () => {
    expect(vetText(ANSWER)).toBe(
      [
        "1 contradiction, no doubts, 2 remarks",
        "",
        "CONTRADICTION cell-volume: the stated cell volume 370.00 Å^3 is not that of the cell, 367.85 Å^3",
        "    at     line 17, _cell_volume",
        "    says   _cell_volume: 370.00",
        "    but    volume of the six cell parameters: 367.851",
        "    differ 2.149, allowed 0.0312 (Å^3)",
        "    do     Look for a wrong digit.",
      ].join("\n"),
    );
  });

  it("sums up many files in a table", () => {
    const table = vetTable([
      { file: "a.cif", block: "a", answer: ANSWER, problem: null },
      { file: "b.cif", block: "", answer: null, problem: "there is no such file" },
    ]);
    expect(table.split("\n").map((l) => l.replace(/ {2,}/g, "  "))).toEqual([
      "file  block  contradictions  doubts  remarks  contradictions and doubts, by id",
      "a.cif  a  1  0  2  cell-volume",
      "b.cif  not read: there is no such file",
      "",
      "1 block, 1 not read: 1 contradiction, no doubts, 2 remarks",
    ]);
  });

  it("explains a criterion with its source", () => {
    const text = criterionText({
      id: "a-b",
      severity: "doubt",
      criterion: "When.",
      source: "Whence.",
      advice: "What to do.",
    });
    expect(text).toBe("a-b (doubt)\nreported  When.\nsource    Whence.\nadvice    What to do.");
  });
});

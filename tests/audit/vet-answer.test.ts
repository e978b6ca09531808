import { describe, expect, it } from "vitest";
import { vetAnswer } from "../../lib/audit/index.ts";
import { blockOf, cell, deposition, small, stating } from "./cases.ts";

const findingsOf = (block: Parameters<typeof vetAnswer>[0]) => vetAnswer(block).findings;

describe("the answer of vet", () => {
  it("puts contradictions before doubts before remarks, and counts them", () => {
    const block = deposition("alpha-quartz", (d) => {
      d.items["_cell_volume"] = "99";
      d.atoms[0]!.label = d.atoms[1]!.label;
    });
    const { findings, counts } = vetAnswer(block);
    const order = ["contradiction", "doubt", "remark"];
    const ranks = findings.map((f) => order.indexOf(f.severity));
    expect(ranks).toEqual([...ranks].sort());
    expect(counts.contradiction).toBeGreaterThan(0);
    expect(counts.contradiction + counts.doubt + counts.remark).toBe(findings.length);
  });

  it("names the line, the two statements and their difference", () => {
    const block = blockOf(
      stating("calcite", { _cell_volume: "370.00" }).source.replace("data_deposition", "# a line\ndata_x"),
    );
    const found = findingsOf(block).find((f) => f.id === "cell-volume")!;
    const line = block.source.split("\n").findIndex((l) => l.startsWith("_cell_volume")) + 1;
    expect(found.where).toEqual({ dataName: "_cell_volume", line });
    expect(found.evidence.stated).toEqual({ what: "_cell_volume", value: "370.00" });
    expect(found.evidence.against.value).toBeCloseTo(367.85, 1);
    expect(found.evidence.difference).toBeCloseTo(2.15, 1);
  });

  it("goes on with the name where the operations listed are no group", () => {
    const block = deposition("barite", (d) => {
      d.operations[3] = d.operations[3]!.replace("z", "-z").replace("--", "");
      d.items["_cell_formula_units_Z"] = "8";
    });
    expect(findingsOf(block).map((f) => f.id)).toEqual(
      expect.arrayContaining(["operations-no-group", "formula-units"]),
    );
  });

  it("says what it can of a block with hardly anything in it", () => {
    expect(findingsOf(blockOf("data_empty")).map((f) => f.id)).toEqual(["cell-missing"]);
  });

  it("is plain data, ready for JSON", () => {
    const { findings } = vetAnswer(stating("calcite", { _cell_volume: "370.00", _cell_formula_units_Z: "5" }));
    expect(JSON.parse(JSON.stringify(findings))).toEqual(findings);
  });
});

describe("tolerances", () => {
  const volume = (stated: string, a = "5.6402(2)") =>
    findingsOf(small(`${cell(a)}\n_cell_volume ${stated}`, ["x,y,z"], ["Na1 Na 0 0 0"])).some(
      (f) => f.id === "cell-volume",
    );

  it("let a volume be rounded, and be off by its uncertainty, but no more", () => {
    expect(volume("179.4")).toBe(false);
    expect(volume("179.43")).toBe(false);
    expect(volume("179.49(8)")).toBe(false);
    expect(volume("179.52")).toBe(true);
  });

  it("let a listed distance be rounded, and be off by two uncertainties, but no more", () => {
    const listed = (change: (n: number) => number) =>
      findingsOf(
        deposition("albite", (d) => {
          const bond = d.bonds[0]!;
          const [, value, su] = /^([\d.]+)\((\d+)\)/.exec(bond.distance)!;
          bond.distance = `${(Number(value) + change(Number(su) / 1e4)).toFixed(4)}(${su})`;
        }),
      ).some((f) => f.id === "listed-distance");
    expect(listed((su) => su)).toBe(false);
    expect(listed(() => 0.0125)).toBe(true);
  });
});

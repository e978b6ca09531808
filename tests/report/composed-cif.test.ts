import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { vetAnswer } from "../../lib/audit/index.ts";
import { findLoop, findNumb, findValue, readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import { composedCif } from "../../lib/report/index.ts";
import {
  atomModel,
  composeAnswer,
  composedCrystal,
  listedStructure,
  parseSiteTable,
} from "../../lib/structure/index.ts";
import { fixture } from "../support/crystals.ts";
import { tableOf } from "../support/site-tables.ts";

function cifOf(table: string, version: "1.1" | "2.0" = "1.1"): string {
  const crystal = composedCrystal(parseSiteTable(table));
  const { answer, notes } = composeAnswer(crystal);
  return composedCif(listedStructure(atomModel(crystal)), answer, [...crystal.notes, ...notes], version);
}

const blockOf = (cif: string) => requireClean(readCif(cif)).blocks[0]!;
const tables = readdirSync("fixtures/tables").map((f) => readFileSync(`fixtures/tables/${f}`, "utf8"));
const names = readdirSync("fixtures").flatMap((f) => (f.endsWith(".cif") ? [f.slice(0, -4)] : []));

describe("the CIF of a composed structure", () => {
  it.each(tables.map((t) => [/^name\s+(.*)$/m.exec(t)![1]!, t]))("contradicts itself in nothing, %s", (_, table) => {
    const { counts, findings } = vetAnswer(blockOf(cifOf(table)));
    expect(findings.filter((f) => f.severity === "contradiction")).toEqual([]);
    expect(counts.contradiction).toBe(0);
  });

  it("contradicts itself in nothing that the structure does not, for every fixture", () => {
    for (const name of names) {
      const { findings } = vetAnswer(blockOf(cifOf(tableOf(fixture(name), "letters"))));
      const found = findings.filter((f) => f.severity === "contradiction").map((f) => `${name}: ${f.message}`);
      expect(found).toEqual([]);
    }
  });

  it("says what it was made from and what was computed", () => {
    const cif = cifOf(
      "name nitratine\ngroup R -3 c\ncell a=5.07 c=16.82\nNa Na+ 6b\nN N5+ 6a\nO O2- 18e x=0.2450(2) U=0.02",
    );
    const block = blockOf(cif);
    expect(block.name).toBe("nitratine");
    expect(cif).toContain("# computed from the sites: NaNO3, Z = 6, 84.99 Da\n");
    expect(cif).toContain("# density computed from formula, Z and cell: 2.262 g cm^-3\n");
    const value = (name: string) => findValue(block, name)?.value;
    expect(value("_chemical_formula.sum")).toMatchObject({ text: "N Na O3" });
    expect(findNumb(block, "_cell.formula_units_Z")!.value).toBe(6);
    expect(findNumb(block, "_exptl_crystal.density_diffrn")!.value).toBeCloseTo(2.2616, 4);
    expect(findNumb(block, "_chemical_formula.weight")!.value).toBeCloseTo(84.994, 3);
    expect(findLoop(block, "_atom_type.oxidation_number")!.rowCount).toBe(3);
    expect(cif).toMatch(/\nO +O2- +0\.2450\(2\) +0 +0\.25 +1 18 2 +e Uiso 0\.020*\n/);
  });

  it("is plain ASCII in CIF 1.1, and not in CIF 2.0", () => {
    const table = "group P m -3 m\ncell a=4\nO 0,0,0.012 occ=0.5\nO2 1b";
    const isAscii = (text: string) => [...text].every((c) => c.charCodeAt(0) < 128);
    expect(isAscii(cifOf(table))).toBe(true);
    expect(isAscii(cifOf(table, "2.0"))).toBe(false);
  });
});

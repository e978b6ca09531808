import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it, test } from "vitest";
import { findNumb, findValue, readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import { cellContents, crystalFromBlock, parseFormula } from "../../lib/structure/index.ts";

/**
 * Every fixture against what it states itself: the publication is named in its comment, and the formula, Z and group it
 * prints are independent of the sites and operations it lists.
 */
const folder = new URL("../../fixtures/", import.meta.url);
const names = readdirSync(folder).filter((f) => f.endsWith(".cif"));

test("at least 16 structures of salts and pigments are there, over all seven crystal systems", () => {
  const systems = new Set(names.map((n) => crystalFromBlock(blockOf(n)).identified.summary.crystalSystem));
  expect(names.length).toBeGreaterThanOrEqual(16);
  expect(systems.size).toBe(7);
});

function blockOf(name: string) {
  return requireClean(readCif(readFileSync(new URL(name, folder), "utf8"))).blocks[0]!;
}

describe.each(names)("%s", (name) => {
  const block = blockOf(name);
  const crystal = crystalFromBlock(block);

  it("names its publication in a comment", () => {
    expect(block.source).toMatch(/^#.*(1[89]|20)\d\d/m);
  });

  it("states no symmetry that its operations contradict", () => expect(crystal.disagreements).toEqual([]));

  it("holds Z formula units in the cell", () => {
    const stated = findValue(block, "_chemical_formula.sum")!.value;
    const formula = parseFormula(stated.kind === "text" ? stated.text : "");
    const z = findNumb(block, "_cell.formula_units_Z")!.value;
    const contents = cellContents(crystal.sites);
    for (const [element, n] of formula)
      expect([element, contents.get(element)]).toEqual([element, expect.closeTo(n * z, 3)]);
    expect([...contents.keys()].sort()).toEqual([...formula.keys()].sort());
  });
});

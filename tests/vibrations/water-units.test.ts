import { describe, expect, test } from "vitest";
import { splitText } from "../../lib/report/index.ts";
import { parseBondPatterns } from "../../lib/structure/index.ts";
import { splitAnswer } from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";

describe("water of hydrates", () => {
  test.each([
    ["epsomite", 7],
    ["chalcanthite", 5],
    ["vivianite", 2],
    ["potassium-alum", 2],
  ])("of %s is named mode by mode, coordinated or not", (name, kinds) => {
    const { units, bonds } = splitAnswer(fixture(name));
    const water = units.filter((u) => u.formula === "H2O");
    expect(water).toHaveLength(kinds);
    for (const u of water) {
      expect(u.internal.map((m) => m.name).sort()).toEqual(["nu1", "nu2", "nu3"]);
      expect(u.librationsBySpecies.map((l) => l.name).sort()).toEqual(["rock", "twist", "wag"]);
    }
    expect(bonds.leftOut.some((p) => p.why === "water")).toBe(true);
  });

  test("is said to be cut from its metal, with the words that join it", () => {
    const text = splitText(splitAnswer(fixture("epsomite")));
    expect(text).toContain(
      'not counted, so that water is a unit of its own: Mg-O 2.062 to 2.069 Å; --bond "Mg-O<2.08" counts them',
    );
    const joined = splitAnswer(fixture("epsomite"), { bonds: { bond: parseBondPatterns("Mg-O<2.08") } });
    expect(joined.units.map((u) => u.formula)).toContain("Mg(H2O)6");
  });
});

describe("the optic modes", () => {
  test.each(["calcite", "gypsum", "molybdenite-2h"])("of %s are all but the acoustic ones", (name) => {
    const { optic, acoustic, total } = splitAnswer(fixture(name)).sums;
    for (const label of Object.keys(total)) {
      expect((optic[label] ?? 0) + (acoustic[label] ?? 0)).toBe(total[label]);
    }
    expect(splitText(splitAnswer(fixture(name)))).toContain("Γ(optic) = ");
  });
});

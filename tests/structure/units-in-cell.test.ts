import { describe, expect, it } from "vitest";
import { type Crystal, compareStructures, resited, resitedOnto, type Vec3 } from "../../lib/structure/index.ts";
import { unitsInCell } from "../../lib/structure/units-in-cell.ts";
import { crystalOfText, fixture } from "../support/crystals.ts";

const points = (crystal: Crystal): Vec3[] => crystal.sites.map((s) => s.symmetry.point);

/** Carbon monoxide, 1.13 angstrom, across the face x = 0 of the cell, far outside, and one argon. */
const MOLECULE = `data_x
_cell_length_a 10
_cell_length_b 10
_cell_length_c 10
_cell_angle_alpha 90
_cell_angle_beta 90
_cell_angle_gamma 90
_space_group_name_H-M_alt 'P 1'
loop_
_atom_site_label
_atom_site_type_symbol
_atom_site_fract_x
_atom_site_fract_y
_atom_site_fract_z
C1 C -1.04 0.50(1) -0.25
O1 O 0.073 2.50 0.75
Ar1 Ar -0.96 1.25 0.00
`;

describe("the listed atoms of a resited structure", () => {
  it("hold together in a molecule, whose centroid lies in the cell; a lone atom lies in it itself", () => {
    const { crystal, notes } = resited(crystalOfText(MOLECULE), { kind: "reference" });
    const [C, O, Ar] = points(crystal);
    expect(C!.map((e) => e.toFixed(3))).toEqual(["-0.040", "0.500", "0.750"]);
    expect(O!.map((e) => e.toFixed(3))).toEqual(["0.073", "0.500", "0.750"]);
    expect(Ar!.map((e) => e.toFixed(3))).toEqual(["0.040", "0.250", "0.000"]);
    expect(crystal.sites[0]!.su[1]).toBeCloseTo(0.01, 12);
    expect(notes.some((n) => n.includes("centroid of its listed atoms lies in the cell"))).toBe(true);
  });

  it("lie in the cell one by one where bonds have no end or there are none", () => {
    for (const [name, setting] of [
      ["scheelite", ":1"],
      ["halite", "a,b,c;1/2,1/2,1/2"],
      ["corundum", ":R"],
      ["rutile", "-a,-b,c;1/2,1/2,1/2"],
    ] as const) {
      const given = fixture(name);
      const { crystal } = resited(given, { kind: "setting", text: setting });
      const all = points(crystal).flat();
      if (name !== "scheelite") expect([name, all.every((e) => e >= -1e-9 && e < 1)]).toEqual([name, true]);
      expect(compareStructures(given, crystal).answer.displacement!.largest).toBeLessThan(1e-6);
      expect(unitsInCell(crystal)).toBe(crystal); // nothing is left to move
    }
  });

  it("keep site symmetry, U and what a comparison finds", () => {
    const [first, second] = [fixture("gypsum-c2c"), fixture("gypsum-i2a")];
    const { crystal, answer, notes } = resitedOnto(first, second);
    expect(compareStructures(crystal, second).answer.displacement!.largest).toBeLessThan(1e-3);
    expect(answer.comparison!.verdict).toBe("same");
    expect(crystal.sites.map((s) => s.symmetry.operations.length)).toEqual(
      first.sites.map((s) => s.symmetry.operations.length),
    );
    expect(notes.some((n) => n.includes("kept whole"))).toBe(true);
  });
});

describe("a structure in a cell of another size", () => {
  it("has its atoms per volume, with a site for each part of an orbit that fell apart", () => {
    const halite = fixture("halite");
    for (const [text, ratio] of [
      ["2a,b,c", 2],
      ["a,b,2c", 2],
      ["1/2b+1/2c,1/2a+1/2c,1/2a+1/2b", 1 / 4],
    ] as const) {
      const { crystal } = resited(halite, { kind: "setting", text });
      const count = (c: Crystal) => c.sites.reduce((s, site) => s + site.images.length, 0);
      expect([text, count(crystal) / count(halite)]).toEqual([text, ratio]);
      expect(crystal.metric.volume / halite.metric.volume).toBeCloseTo(ratio, 9);
      const { answer } = compareStructures(halite, crystal);
      expect([text, answer.verdict]).toEqual([text, "same"]);
    }
  });

  it("is refused where the new axes are no axes of the lattice", () => {
    expect(() => resited(fixture("rutile"), { kind: "setting", text: "1/2a,b,c" })).toThrow(/lattice|translation/);
  });
});

import { describe, expect, test } from "vitest";
import { modesText, splitText, unitSummaryText } from "../../lib/report/index.ts";
import { molecularSymmetry, molecularUnits } from "../../lib/structure/index.ts";
import { modesAnswer, splitAnswer, unitSummaries } from "../../lib/vibrations/index.ts";
import { crystalOfText, fixture } from "../support/crystals.ts";
import { runCommand } from "../support/run-command.ts";

describe("an average structure", () => {
  // KH2PO4: 2 formula units of 8 atoms in the primitive cell; the hydrogen places are half filled
  test("tells places from atoms, and that counts are those of the average", () => {
    const answer = modesAnswer(fixture("potassium-dihydrogen-phosphate"));
    expect(answer).toMatchObject({ atomsInPrimitiveCell: 20, atomsByOccupancy: 16 });
    const text = modesText(answer);
    expect(text).toContain("20 places of vibrating atoms, 16 atoms by their occupancy, in the primitive cell");
    expect(text).toContain("all counts are those of the average structure");
  });

  test("is not spoken of where every place is filled, mixed occupancy included", () => {
    for (const name of ["calcite", "dolomite", "albite"]) {
      expect(modesText(modesAnswer(fixture(name)))).not.toContain("average structure");
    }
  });

  test("names a unit made of half atoms as what it is", () => {
    const answer = splitAnswer(fixture("potassium-dihydrogen-phosphate"));
    expect(answer.units[0]).toMatchObject({ formula: "H2PO4", places: 9, atomsByOccupancy: 7 });
    expect(splitText(answer)).toContain("H2PO4, the average of a disorder (9 places, 7 atoms by occupancy), 2 in");
    expect(unitSummaryText(unitSummaries(answer))).toContain("H2PO4 is the average of a disorder");
    expect(splitText(splitAnswer(fixture("gypsum")))).not.toContain("average");
  });

  test("is warned of by polarise in the words of modes", async () => {
    const file = "fixtures/potassium-dihydrogen-phosphate.cif";
    const warnings = async (command: string) => {
      const { out } = await runCommand(command, [file, "--json"]);
      return (JSON.parse(out).notes as string[]).filter((n) => /occupancy|images of/.test(n));
    };
    const ofModes = await warnings("modes");
    expect(ofModes).toHaveLength(2);
    expect(await warnings("polarise")).toEqual(ofModes);
  });
});

describe("isotopes of hydrogen in a molecule", () => {
  /** Water in P 1 with both hydrogen atoms 0.96 from oxygen, 104.5 degrees apart. */
  const water = (first: string, second: string) =>
    crystalOfText(
      [
        "data_w",
        ...["a", "b", "c"].map((x) => `_cell_length_${x} 10`),
        ...["alpha", "beta", "gamma"].map((x) => `_cell_angle_${x} 90`),
        "_space_group_name_H-M_alt 'P 1'",
        "loop_",
        ...["label", "type_symbol", "fract_x", "fract_y", "fract_z", "occupancy"].map((c) => `_atom_site_${c}`),
        "O1 O 0 0 0 1",
        `H1 ${first.replace(" ", " .0757 .0587 0 ")}`,
        `H2 ${second.replace(" ", " -.0757 .0587 0 ")}`,
        "",
      ].join("\n"),
    );
  const shape = (first: string, second: string) =>
    molecularSymmetry(molecularUnits(water(first, second)).units[0]!).schoenflies;

  test("differ where each has its place: HDO is Cs, H2O and D2O are C2v", () => {
    expect(shape("H 1", "H 1")).toBe("C2v");
    expect(shape("D 1", "D 1")).toBe("C2v");
    expect(shape("H 1", "D 1")).toBe("Cs");
    expect(shape("H 1", "T 1")).toBe("Cs");
  });

  test("are one element where they share partly filled places", () => {
    expect(shape("H 0.5", "D 0.5")).toBe("C2v");
  });
});

import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { structureCif } from "../../lib/report/index.ts";
import { atomModel, listedStructure, resited } from "../../lib/structure/index.ts";
import { crystalOfText } from "../support/crystals.ts";

const CALCITE = `${readFileSync("fixtures/calcite.cif", "utf8")}
loop_
_atom_site_aniso_label
_atom_site_aniso_U_11
_atom_site_aniso_U_22
_atom_site_aniso_U_33
_atom_site_aniso_U_12
_atom_site_aniso_U_13
_atom_site_aniso_U_23
O1 0.0100 0.0190 0.0160 0.0095 -0.0030 -0.0060
`;

describe("equivalent isotropic displacements of a list", () => {
  // hexagonal axes: U(eq) = (4 (U11 + U22 - U12) / 3 + U33) / 3. Source: R. X. Fischer, E. Tillmanns, Acta Cryst. C44 (1988) 775
  const expected = ((4 * (0.01 + 0.019 - 0.0095)) / 3 + 0.016) / 3;

  it("are a third of the trace on Cartesian axes, and written beside the tensor", () => {
    const list = listedStructure(atomModel(crystalOfText(CALCITE)));
    expect(list.sites.map((s) => s.equivalent)).toEqual([null, null, expect.closeTo(expected, 10)]);
    const cif = structureCif(list, "1.1", { comment: "", ending: "" });
    expect(cif).toMatch(new RegExp(`^ *O1 .*\\b${expected.toFixed(5)}\\b`, "m"));
    expect(cif).toContain("_atom_site_U_iso_or_equiv");
  });

  it("are the same in every setting", () => {
    const { crystal } = resited(crystalOfText(CALCITE), { kind: "setting", text: "R -3 c :R" });
    const oxygen = listedStructure(atomModel(crystal)).sites[2]!;
    expect(oxygen.displacement!.kind).toBe("anisotropic");
    expect(oxygen.equivalent).toBeCloseTo(expected, 10);
  });
});

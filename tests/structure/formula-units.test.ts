import { describe, expect, test } from "vitest";
import { formulaUnits } from "../../lib/structure/index.ts";
import { fixture } from "../support/crystals.ts";

// IUPAC, Nomenclature of Inorganic Chemistry (2005), IR-4.4.3.4: hydrogen last among the electropositive constituents
// (from memory); E. A. Hill, J. Am. Chem. Soc. 22 (1900) 478 for organic compounds
describe("the formula of the primitive cell", () => {
  test.each([
    ["potassium-dihydrogen-phosphate", "KH2PO4", 2],
    ["brucite", "MgH2O2", 1],
    ["goethite", "FeHO2", 4],
    ["gypsum", "CaH4SO6", 2],
    ["calcite", "CaCO3", 2],
    ["ammonium-chloride-ordered", "NH4Cl", 1],
    ["urea", "CH4N2O", 2],
    ["zircon", "ZrSiO4", 2],
  ] as const)("of %s is written %s", (name, formula, count) => {
    expect(formulaUnits(fixture(name), null)).toMatchObject({ formula, inPrimitiveCell: count });
  });
});

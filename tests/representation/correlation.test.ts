import { describe, expect, it } from "vitest";
import {
  type Correlation,
  correlations,
  crystalMatrices,
  type MolecularGroup,
  molecularGroup,
  pointGroup,
} from "../../lib/representation/index.ts";

/** `A1 > A1; E > A1 + A2` of the correlation with the subgroup of a name that keeps certain elements. */
function rows(group: MolecularGroup, list: readonly Correlation<MolecularGroup>[], name: string, kept: string): string {
  const found = list.filter((c) => c.subgroup.schoenflies === name && c.kept.includes(kept));
  expect(found).toHaveLength(1);
  const { table, subgroup } = found[0]!;
  return table
    .map((row, g) => {
      const parts = row.flatMap((m, s) => (m ? [`${m > 1 ? m : ""}${subgroup.irreps[s]!.label}`] : []));
      return `${group.irreps[g]!.label} > ${parts.join(" + ")}`;
    })
    .join("; ");
}

describe("subgroups", () => {
  // Known sizes of the subgroup lattices (from memory; 98 subgroups of m-3m in 33 classes are textbook numbers).
  it.each([
    ["m-3m", 98, 33],
    ["6/mmm", 54, 32],
    ["4/mmm", 35, 27],
    ["mmm", 16, 16],
    ["-43m", 30, 11],
    ["m-3", 26, 12],
    ["-3m1", 16, 10],
  ])("of %s are %i in %i classes", (s, all, classes) => {
    const list = correlations(pointGroup(crystalMatrices(s)));
    expect(list.reduce((t, c) => t + c.conjugates, 0)).toBe(all);
    expect(list).toHaveLength(classes);
  });

  it("of Ih are 164 in 22 classes, of I 59 in 9", () => {
    const ih = correlations(molecularGroup("Ih"));
    expect([ih.reduce((t, c) => t + c.conjugates, 0), ih.length]).toEqual([164, 22]);
    const i = correlations(molecularGroup("I"));
    expect([i.reduce((t, c) => t + c.conjugates, 0), i.length]).toEqual([59, 9]);
  });

  it("keep dimensions", () => {
    for (const name of ["D6h", "Oh", "Ih", "D4d", "C5h"]) {
      const group = molecularGroup(name);
      for (const { table, subgroup } of correlations(group)) {
        table.forEach((row, g) => {
          const sum = row.reduce((t, m, s) => t + m * subgroup.irreps[s]!.dimension, 0);
          expect(sum).toBe(group.irreps[g]!.dimension);
        });
      }
    }
  });
});

describe("correlation tables", () => {
  // As in E. Bright Wilson, J. C. Decius and P. C. Cross, Molecular Vibrations (1955), appendix X-8 (from memory).
  const td = molecularGroup("Td");
  const d4h = molecularGroup("D4h");
  const d6h = molecularGroup("D6h");
  const lists = new Map([td, d4h, d6h].map((g) => [g, correlations(g)]));
  it.each([
    [td, "C3v", "C3", "A1 > A1; A2 > A2; E > E; T1 > A2 + E; T2 > A1 + E"],
    [td, "D2d", "S4", "A1 > A1; A2 > B1; E > A1 + B1; T1 > A2 + E; T2 > B2 + E"],
    [td, "C2v", "C2", "A1 > A1; A2 > A2; E > A1 + A2; T1 > A2 + B1 + B2; T2 > A1 + B1 + B2"],
    [td, "Cs", "sigma_d", "A1 > A'; A2 > A''; E > A' + A''; T1 > A' + 2A''; T2 > 2A' + A''"],
    [
      d4h,
      "D2h",
      "C2'",
      "A1g > Ag; A2g > B1g; B1g > Ag; B2g > B1g; Eg > B2g + B3g; A1u > Au; A2u > B1u; B1u > Au; B2u > B1u; Eu > B2u + B3u",
    ],
    [
      d4h,
      "D2h",
      "C2''",
      "A1g > Ag; A2g > B1g; B1g > B1g; B2g > Ag; Eg > B2g + B3g; A1u > Au; A2u > B1u; B1u > B1u; B2u > Au; Eu > B2u + B3u",
    ],
    [
      d4h,
      "C4v",
      "C4",
      "A1g > A1; A2g > A2; B1g > B1; B2g > B2; Eg > E; A1u > A2; A2u > A1; B1u > B2; B2u > B1; Eu > E",
    ],
    [
      d6h,
      "D3h",
      "C2'",
      "A1g > A1'; A2g > A2'; B1g > A1''; B2g > A2''; E1g > E''; E2g > E'; A1u > A1''; A2u > A2''; B1u > A1'; B2u > A2'; E1u > E'; E2u > E''",
    ],
    [
      d6h,
      "D3d",
      "C2''",
      "A1g > A1g; A2g > A2g; B1g > A2g; B2g > A1g; E1g > Eg; E2g > Eg; A1u > A1u; A2u > A2u; B1u > A2u; B2u > A1u; E1u > Eu; E2u > Eu",
    ],
  ])("split the species as published", (group, name, kept, expected) => {
    const list = lists.get(group)!.filter((c) => kept !== "C2'" || !c.kept.includes("C2''"));
    expect(rows(group, list, name, kept)).toBe(expected);
  });

  it("name the elements and the directions that are kept", () => {
    const list = correlations(pointGroup(crystalMatrices("4/mmm"))).filter((c) => c.subgroup.schoenflies === "D2h");
    expect(list.map((c) => c.kept)).toEqual([
      "E, C2, 2C2', i, sigma_h, 2sigma_v",
      "E, C2, 2C2'', i, sigma_h, 2sigma_d",
    ]);
    expect(list.map((c) => c.subgroup.axes.text.split(";")[0])).toEqual([
      "x along [100], y along [010], z along [001]",
      "x along [110], y along [-110], z along [001]",
    ]);
    const fourfold = correlations(pointGroup(crystalMatrices("m-3m"))).find((c) => c.subgroup.schoenflies === "C4")!;
    expect(fourfold.directions).toEqual(["C4 [001]", "C2 [001]"]);
    expect(fourfold.conjugates).toBe(3);
  });
});

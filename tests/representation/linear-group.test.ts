import { describe, expect, it } from "vitest";
import {
  crystalMatrices,
  type LinearSpecies,
  linearCharacter,
  linearGroupTable,
  linearProduct,
  linearSpecies,
  linearTable,
  molecularGroup,
  parseLinearSpecies,
  pointGroup,
  subduceLinear,
} from "../../lib/representation/index.ts";

function splitting(label: string, name: string, axis: [number, number, number] = [0, 0, 1]): string {
  const group = /^[A-Z]/.test(name) ? molecularGroup(name) : pointGroup(crystalMatrices(name));
  const species = parseLinearSpecies(/[gu]/.test(label.replace("Sigma", "")) ? "Dinfh" : "Cinfv", label);
  const row = subduceLinear(species, group, axis);
  return row.flatMap((m, r) => (m ? [`${m > 1 ? m : ""}${group.irreps[r]!.label}`] : [])).join(" + ");
}

describe("species of linear molecules", () => {
  it.each(["Sigma+g", "Sigma_g+", "Sigmag+", "Σg+", "Σ+g"])("%s is Sigmag+", (text) => {
    expect(parseLinearSpecies("Dinfh", text).label).toBe("Sigmag+");
  });

  it("every label of the table is read back", () => {
    for (const name of ["Cinfv", "Dinfh"] as const) {
      for (const species of linearTable(name, 7)) expect(parseLinearSpecies(name, species.label)).toEqual(species);
    }
  });

  it.each(["Sigma", "Sigmag", "Pi+g", "Pi", "Xi", "Sigma++g", "Lambda"])("%s is no species of Dinfh", (text) => {
    expect(() => parseLinearSpecies("Dinfh", text)).toThrow(RangeError);
  });

  it("in Cinfv there is no parity and nothing reverses the axis", () => {
    expect(() => linearSpecies("Cinfv", 1, 1)).toThrow(RangeError);
    expect(() => linearCharacter(linearSpecies("Cinfv", 1), [-1, 0, 0, 0, -1, 0, 0, 0, -1], true)).toThrow(RangeError);
  });
});

describe("tables and products", () => {
  it("hold the functions of Cinfv and Dinfh as published (Cotton, 1990, appendix IIA; from memory)", () => {
    const print = (name: "Cinfv" | "Dinfh") =>
      linearGroupTable(name, 2).map(({ label, functions: f }) => {
        return [label, ...f.vectors, ...f.rotations, ...f.quadratics].join(" ");
      });
    expect(print("Cinfv")).toEqual([
      "Sigma+ z x2+y2 z2",
      "Sigma- Rz",
      "Pi (x, y) (Ry, -Rx) (xz, yz)",
      "Delta (x2-y2, 2xy)",
    ]);
    expect(print("Dinfh")).toEqual([
      "Sigmag+ x2+y2 z2",
      "Sigmag- Rz",
      "Pig (Ry, -Rx) (xz, yz)",
      "Deltag (x2-y2, 2xy)",
      "Sigmau+ z",
      "Sigmau-",
      "Piu (x, y)",
      "Deltau",
    ]);
  });

  it.each([
    ["Piu", "Piu", "Sigmag+ Sigmag- Deltag"],
    ["Pig", "Deltau", "Piu Phiu"],
    ["Sigmau-", "Sigmag-", "Sigmau+"],
    ["Sigmag-", "Piu", "Piu"],
  ])("%s times %s is %s", (a, b, expected) => {
    const product = linearProduct(parseLinearSpecies("Dinfh", a), parseLinearSpecies("Dinfh", b));
    expect(product.map((s) => s.label).join(" ")).toBe(expected);
  });

  it("products have in D60h the characters of their factors multiplied", () => {
    const group = molecularGroup("D60h");
    const list = linearTable("Dinfh", 6);
    const flips = group.elements.map((M) => M[8] < 0);
    const values = (s: LinearSpecies) => group.elements.map((M, g) => linearCharacter(s, M, flips[g]!));
    for (const a of list.slice(0, 6)) {
      for (const b of list.slice(4)) {
        const parts = linearProduct(a, b).map(values);
        values(a).forEach((x, g) => {
          const sum = parts.reduce((t, part) => t + part[g]!, 0);
          expect(Math.abs(sum - x * values(b)[g]!)).toBeLessThan(1e-9);
        });
      }
    }
  });
});

describe("splitting in finite groups", () => {
  // Published correlations: E. Bright Wilson, J. C. Decius and P. C. Cross, Molecular Vibrations (1955), appendix X
  // (from memory).
  it.each([
    ["Sigma+", "C2v", "A1"],
    ["Sigma-", "C2v", "A2"],
    ["Pi", "C2v", "B1 + B2"],
    ["Delta", "C2v", "A1 + A2"],
    ["Pi", "C3v", "E"],
    ["Phi", "C3v", "A1 + A2"],
    ["Delta", "C4v", "B1 + B2"],
    ["Pi", "C6v", "E1"],
    ["Delta", "C6v", "E2"],
    ["Phi", "C6v", "B1 + B2"],
    ["Sigmag+", "D2h", "Ag"],
    ["Sigmag-", "D2h", "B1g"],
    ["Piu", "D2h", "B2u + B3u"],
    ["Pig", "D2h", "B2g + B3g"],
    ["Deltag", "D2h", "Ag + B1g"],
    ["Sigmau+", "D3d", "A2u"],
    ["Piu", "D3d", "Eu"],
    ["Deltau", "D4h", "B1u + B2u"],
    ["Sigmau+", "D6h", "A2u"],
    ["Phig", "D6h", "B1g + B2g"],
    ["Sigmau+", "D3h", "A2''"],
    ["Piu", "D3h", "E'"],
    ["Pig", "D3h", "E''"],
    ["Lambda5u", "D8h", "E3u"],
  ])("%s becomes in %s %s", (label, name, expected) => expect(splitting(label, name)).toBe(expected));

  it("holds in any setting of a crystal: along the threefold axis, or along a of 2/m with b unique", () => {
    expect(splitting("Piu", "-3m1")).toBe("Eu");
    expect(splitting("Sigmau+", "2/m", [0, 1, 0])).toBe("Au");
    expect(splitting("Piu", "2/m", [1, 0, 1])).toBe("Au + Bu");
    expect(splitting("Sigmag-", "2/m", [1, 0, 1])).toBe("Bg");
  });

  it("an operation that moves the axis is named", () => {
    expect(() => splitting("Piu", "m-3m")).toThrow("moves the axis 0 0 1");
  });
});

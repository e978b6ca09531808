import { describe, expect, it } from "vitest";
import { readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import { crystalFromBlock, type HydrogenBond, neighboursAnswer } from "../../lib/structure/index.ts";

/** Hydrogen bonds of a structure in a cube of 12 angstrom: rows are label, element and Cartesian coordinates in angstrom. */
function bondsOf(rows: readonly string[], { group = "P 1", formula = "", weak = false } = {}): readonly HydrogenBond[] {
  const cell = ["length_a", "length_b", "length_c"].map((k) => `_cell_${k} 12`);
  const angles = ["alpha", "beta", "gamma"].map((k) => `_cell_angle_${k} 90`);
  const atoms = rows.map((row) => {
    const [label, element, ...xyz] = row.split(" ");
    return [label, element, ...xyz.map((e) => (Number(e) / 12).toFixed(8))].join(" ");
  });
  const loop = [
    "loop_",
    "_atom_site_label",
    "_atom_site_type_symbol",
    ...["x", "y", "z"].map((c) => `_atom_site_fract_${c}`),
  ];
  const sum = formula ? [`_chemical_formula_sum '${formula}'`] : [];
  const name = `_symmetry_space_group_name_H-M '${group}'`;
  const block = requireClean(readCif(["data_x", ...cell, ...angles, name, ...sum, ...loop, ...atoms].join("\n")))
    .blocks[0]!;
  return neighboursAnswer(crystalFromBlock(block), { block, weak }).hydrogenBonds;
}

const named = (bonds: readonly HydrogenBond[]) =>
  bonds.map((h) => [h.donor, h.hydrogen, h.acceptor].map((a) => a?.label ?? "-").join(" "));

describe("hydrogen bonds", () => {
  const water = ["O1 O 5 5 5", "H1 H 5.96 5 5", "H2 H 4.76 5.93 5"];

  it("have distances and angle, the donor as listed and the code of the acceptor", () => {
    const [bond, ...others] = bondsOf([...water, "O2 O 7.8 5 5"]);
    expect(others).toEqual([]);
    expect(bond).toMatchObject({
      donor: { label: "O1", code: "1_555" },
      hydrogen: { label: "H1", code: "1_555" },
      acceptor: { label: "O2", code: "1_555" },
      count: 1,
    });
    expect(bond!.donorHydrogen!.value).toBeCloseTo(0.96, 6);
    expect(bond!.hydrogenAcceptor!.value).toBeCloseTo(1.84, 6);
    expect(bond!.donorAcceptor.value).toBeCloseTo(2.8, 6);
    expect(bond!.angle!.value).toBeCloseTo(180, 6);
  });

  it("reach an image of the acceptor, and are told once for each class", () => {
    const [bond, ...others] = bondsOf([...water, "O2 O -4.2 5 5"]);
    expect([bond!.acceptor, others]).toEqual([{ label: "O2", code: "1_655" }, []]);
    const plane = bondsOf(["O1 O 5 0 5", "H1 H 5.6 0.75 5", "O2 O 6.8 2.2 5"], { group: "P 1 m 1" });
    expect([named(plane), plane.map((h) => h.count)]).toEqual([["O1 H1 O2"], [2]]);
  });

  it("of hydrogen on a mirror plane reach both images of an acceptor, and are one class", () => {
    const bonds = bondsOf(["O1 O 5 0 5", "H1 H 5.96 0 5", "O2 O 7.5 1.4 5"], { group: "P 1 m 1" });
    expect([named(bonds), bonds.map((h) => h.count)]).toEqual([["O1 H1 O2"], [2]]);
  });

  it("end beyond the sum of the van der Waals radii and below 110 degrees", () => {
    expect(bondsOf([...water, "O2 O 8.75 5 5"])).toEqual([]); // H...O 2.79
    expect(bondsOf([...water, "O2 O 6 2.8 5"])).toEqual([]); // 91 degrees
    expect(named(bondsOf([...water, "O2 O 8.5 5 5"]))).toEqual(["O1 H1 O2"]); // 2.54
  });

  it("have no acceptor that is the positive end of an anion, nor one without a lone pair", () => {
    const sulfate = ["S1 S 8.2 5 5", "O3 O 8.7 6.38 5", "O4 O 8.7 4.3 6.2", "O5 O 8.7 4.3 3.8"];
    expect(named(bondsOf([...water, ...sulfate])).filter((h) => h.endsWith("S1"))).toEqual([]);
    expect(named(bondsOf([...water, "S1 S 8.2 5 5"]))).toEqual(["O1 H1 S1"]);
    const ammonium = ["N1 N 8 5 5", "H3 H 8.6 5.6 5.6", "H4 H 8.6 4.4 4.4", "H5 H 7.4 5.6 4.4", "H6 H 7.4 4.4 5.6"];
    expect(named(bondsOf([...water, ...ammonium])).filter((h) => h.endsWith("N1"))).toEqual([]);
  });

  it("of carbon are found if asked for", () => {
    const chloroform = ["C1 C 5 5 5", "H1 H 6.08 5 5", "Cl1 Cl 4.4 6.66 5", "O1 O 8.2 5 5"];
    expect(bondsOf(chloroform)).toEqual([]);
    expect(named(bondsOf(chloroform, { weak: true }))).toEqual(["C1 H1 O1"]);
  });

  it("of hydrogen centred between two atoms go from the nearer to the other", () => {
    const [bond] = bondsOf(["O1 O 5 5 5", "H1 H 6.2 5 5", "O2 O 7.42 5 5"]);
    expect([bond!.donor.label, bond!.acceptor.label]).toEqual(["O1", "O2"]);
  });
});

describe("hydrogen that the file does not place", () => {
  const contact = ["O1 O 5 5 5", "O2 O 7.8 5 5", "C1 C 8.4 6.05 5"];

  it("is looked for between atoms that lack valence and acceptors, and marked", () => {
    const [bond] = bondsOf(contact, { formula: "C H2 O2" });
    expect(bond).toMatchObject({ donor: { label: "O1" }, hydrogen: null, acceptor: { label: "O2" }, angle: null });
    expect(bond!.donorAcceptor.value).toBeCloseTo(2.8, 6);
  });

  it("is not looked for where the formula has none, or all of it is placed", () => {
    expect(bondsOf(contact, { formula: "C O2" })).toEqual([]);
    expect(bondsOf(contact)).toEqual([]);
    const placed = [...contact, "H1 H 4.5 5.8 5", "H2 H 4.5 4.2 5"];
    expect(bondsOf(placed, { formula: "C H2 O2" })).toEqual([]);
  });

  it("is not looked for along the edges of a polyhedron", () => {
    const octahedron = [
      "Mg1 Mg 6 6 6",
      ...["8.1 6 6", "3.9 6 6", "6 8.1 6", "6 3.9 6", "6 6 8.1", "6 6 3.9"].map((x, i) => `O${i + 1} O ${x}`),
    ];
    expect(bondsOf(octahedron, { formula: "H12 Mg O6" })).toEqual([]);
  });
});

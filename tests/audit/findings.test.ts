import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { allCriteria, criterionOf, vetAnswer } from "../../lib/audit/index.ts";
import type { CifBlock } from "../../lib/cif/index.ts";
import { cell, deposition, fixture, loop, small, stating } from "./cases.ts";

const P1 = ["x,y,z"];
const CENTRE = ["x,y,z", "-x,-y,-z"];
const P222 = ["x,y,z", "-x,-y,z", "-x,y,-z", "x,-y,-z"];
const CUBE = cell("5.64");
/** Two atoms in no order; enough where only words are judged. */
const PAIR = ["Na1 Na 0.0312 0.0415 0.0279", "Cl1 Cl 0.5143 0.5237 0.5391"];
const plain = (items: string, operations = P1) => small(items, operations, PAIR);

/** All eight atoms of rock salt, the first moved along x. */
function rockSalt(a: string, shift = 0): CifBlock {
  const places = ["0 0 0", "0 .5 .5", ".5 0 .5", ".5 .5 0", ".5 0 0", "0 .5 0", "0 0 .5", ".5 .5 .5"];
  const atoms = places.map(
    (p, i) => `${i < 4 ? "Na" : "Cl"}${i + 1} ${i < 4 ? "Na" : "Cl"} ${i === 0 ? `${shift} 0 0` : p}`,
  );
  return small(cell(a), P1, atoms);
}

/** Quartz with f'' at Mo K alpha of International Tables C (2006), table 4.2.6.8 (from memory). */
function absorbing(mu: string): CifBlock {
  const types = loop("_atom_type", "symbol scat_dispersion_imag", "Si 0.0704", "O 0.0060");
  return deposition("alpha-quartz", (d) => Object.assign(d.items, { _exptl_absorpt_coefficient_mu: mu }), `\n${types}`);
}

function hexagonal(x: string, y: string): CifBlock {
  const atoms = [`Pb1 Pb ${x} ${y} 0.1`, "O1 O 0.2 0.1 0.4"];
  return small(cell("9", "9", "7", "90", "90", "120"), ["x,y,z", "-y,x-y,z", "-x+y,-x,z"], atoms);
}

function lead(x: string): CifBlock {
  return small(cell("6", "7", "8"), CENTRE, [`Pb1 Pb ${x} 0 0`, "O1 O 0.3 0.1 0.2"]);
}

function disorder(first: string, second: string, other: string): CifBlock {
  const atoms = [`C1 C .1 .1 .1 ${first} A 1`, `C2 C .1 .1 .25 ${second} A 1`, `C3 C .4 .1 .1 ${other} A 2`];
  return small(cell("9"), P1, atoms, "occupancy disorder_assembly disorder_group");
}

/** Four atoms whose torsion angle is a left-handed quarter turn, listed from both ends. */
function chain(first: string, second: string): CifBlock {
  const atoms = ["C1 C 0.1500 0 0", "C2 C 0 0 0", "C3 C 0 0.1500 0", "C4 C 0 0.1500 0.1500"];
  const labels = [1, 2, 3, 4].map((i) => `atom_site_label_${i}`).join(" ");
  const torsions = loop(
    "_geom_torsion",
    `${labels} site_symmetry_1 angle`,
    `C1 C2 C3 C4 . ${first}`,
    `C4 C3 C2 C1 . ${second}`,
  );
  return small(cell("10"), P1, atoms, "", torsions.replace("_geom_torsion_angle", "_geom_torsion"));
}

/** Orthorhombic, with equivalent reflections that agree in 2/m only, if `sign` counts. */
function reflections(sign: number): CifBlock {
  const indices = [-4, -3, -2, -1, 0, 1, 2, 3, 4];
  const rows = indices
    .flatMap((h) => indices.flatMap((k) => indices.slice(4).map((l) => [h, k, l] as const)))
    .map(([h, k, l]) => {
      const value = 100 + 90 * Math.sin(7 * h * h + 13 * k * k + 5 * l * l + sign * Math.sign(h * k));
      return `${h} ${k} ${l} ${value.toFixed(1)} ${(2 + value / 50).toFixed(1)}`;
    });
  const list = loop("_refln", "index_h index_k index_l F_squared_meas F_squared_sigma", ...rows);
  return small(cell("5.1", "6.2", "7.3"), P222, PAIR, "", list);
}

function waterPair(distance: string): CifBlock {
  const atoms = ["O1 O 0 0 0", "H1 H 0.0960 0 0", "O2 O 0.2800 0 0"];
  const columns =
    "atom_site_label_D atom_site_label_H atom_site_label_A site_symmetry_A distance_DH distance_HA distance_DA angle_DHA";
  const row = `O1 H1 O2 . 0.96 1.84 ${distance} 180`;
  return small(cell("10"), P1, atoms, "", loop("_geom_hbond", columns, row));
}

/** Two oxygen atoms along an edge of 10 angstrom. */
function oxygenPair(x: string): CifBlock {
  return small(cell("10"), P1, ["O1 O 0 0 0", `O2 O ${x} 0 0`, "Na1 Na 0.06 0.2 0"]);
}

/** The whole cell of a structure with a twofold axis along z, one of its atoms at x. */
function listedCell(x: string): CifBlock {
  const atoms = ["Pb1 Pb .1 .2 .3", "Pb2 Pb .9 .8 .3", `O1 O ${x} .4 .8`, "O2 O .8 .6 .8"];
  return small(cell("6", "7", "8"), ["x,y,z", "-x,-y,z"], atoms);
}

const refined = { _refine_ls_R_factor_gt: "0.02" };
const flack = (name: string, value: string) => stating(name, { ...refined, _refine_ls_abs_structure_Flack: value });

/** Id, what was done, the faulty block, and a sound twin. */
const CASES: readonly (readonly [string, string, CifBlock, CifBlock])[] = [
  ["cell-missing", "one length only", plain("_cell_length_a 5"), plain(CUBE)],
  ["cell-impossible", "three angles of 121 degrees", plain(cell("5", "5", "5", "121", "121", "121")), plain(CUBE)],
  ["symmetry-missing", "no word of the group", plain(CUBE, []), plain(CUBE)],
  ["atoms-missing", "no list", fixtureWithoutAtoms(), plain(CUBE)],
  [
    "number-unreadable",
    "a volume in words",
    plain(`${CUBE}\n_cell_volume large`),
    plain(`${CUBE}\n_cell_volume 179.41`),
  ],
  ["operation-unreadable", "a letter that is none", plain(CUBE, ["x,y,z", "x,y,q"]), plain(CUBE, CENTRE)],
  ["operation-repeated", "one line twice", plain(CUBE, [...CENTRE, "-x,-y,-z"]), plain(CUBE, CENTRE)],
  ["identity-missing", "the inversion alone", plain(CUBE, ["-x,-y,-z"]), plain(CUBE, CENTRE)],
  [
    "operations-missing",
    "a name alone",
    plain(`${CUBE}\n_space_group_name_H-M_alt 'P -1'`, []),
    plain(`${CUBE}\n_space_group_name_H-M_alt 'P -1'`, CENTRE),
  ],
  [
    "symmetry-unreadable",
    "a Hall symbol that is none",
    plain(`${CUBE}\n_space_group_name_Hall 'Q 9'`, CENTRE),
    plain(`${CUBE}\n_space_group_name_Hall '-P 1'`, CENTRE),
  ],
  ["formula-missing", "no formula", plain(CUBE), fixture("calcite")],
  ["formula-unreadable", "brackets", stating("calcite", { _chemical_formula_sum: "Ca(CO3)" }), fixture("calcite")],
  [
    "formula-of-whole-cell",
    "six times",
    stating("calcite", { _chemical_formula_sum: "C6 Ca6 O18" }),
    fixture("calcite"),
  ],
  [
    "formula-beyond-sites",
    "solvent taken out of the data",
    stating("urea", { _chemical_formula_sum: "C2 H4 N2 O", _platon_squeeze_void_nr: "1" }),
    stating("urea", { _platon_squeeze_void_nr: "1" }),
  ],
  ["hydrogen-sites-missing", "rows left out", without("urea", "H"), deposition("urea")],
  [
    "measured-density",
    "half of what the cell weighs",
    stating("barite", { _exptl_crystal_density_meas: "2.20" }),
    stating("barite", { _exptl_crystal_density_meas: "4.48" }),
  ],
  ["absorption-coefficient", "in cm^-1", absorbing("6.0"), absorbing("0.80")],
  [
    "multiplicity-is-order",
    "orders in the column of multiplicities",
    deposition("barite", (d) => {
      for (const a of d.atoms) a.multiplicity = a.order;
    }),
    deposition("barite"),
  ],
  ["special-position-rounded", "0.333 for a third", hexagonal("0.333", "0.667"), hexagonal("0.33333", "0.66667")],
  ["special-position-missed", "0.0030 for 0", lead("0.0030"), lead("0")],
  [
    "occupancy-zero",
    "an atom that is not there",
    small(CUBE, P1, [...PAIR.map((p) => `${p} 1`), "K1 K .2 .7 .3 0"], "occupancy"),
    plain(CUBE),
  ],
  [
    "disorder-group-occupancy",
    "0.5 and 0.8 in one group",
    disorder("0.5", "0.8", "0.2"),
    disorder("0.5", "0.5", "0.5"),
  ],
  ["disorder-sum", "two groups of 0.8", disorder("0.8", "0.8", "0.8"), disorder("0.5", "0.5", "0.5")],
  [
    "displacement-anisotropy",
    "twenty to one",
    deposition("albite", (d) => {
      d.tensors[0]!.u = ["0.040(1)", "0.002(1)", "0.010(1)", "0", "0", "0"];
    }),
    deposition("albite"),
  ],
  [
    "displacement-large",
    "0.6 square angstrom",
    small(CUBE, P1, ["Na1 Na .1 .2 .3 0.6", "Cl1 Cl .6 .7 .8 0.02"], "U_iso_or_equiv"),
    small(CUBE, P1, ["Na1 Na .1 .2 .3 0.02", "Cl1 Cl .6 .7 .8 0.02"], "U_iso_or_equiv"),
  ],
  [
    "listed-distance-su",
    "twenty times too large",
    deposition("albite", (d) => {
      for (const b of d.bonds) b.distance = b.distance.replace("(", "(3");
    }),
    deposition("albite"),
  ],
  ["listed-torsion", "one angle of two", chain("-90.0", "-60.0"), chain("-90.0", "-90.0")],
  ["listed-torsions-inverted", "both of the mirror image", chain("90.0", "90.0"), chain("-90.0", "-90.0")],
  ["listed-hydrogen-bond", "too long", waterPair("2.95"), waterPair("2.80")],
  ["atoms-too-close", "two oxygen atoms 0.90 apart", oxygenPair("0.0900"), oxygenPair("0.1200")],
  ["atoms-too-close", "half an angstrom", small(CUBE, P1, ["Na1 Na 0 0 0", "Cl1 Cl 0.1 0 0"]), plain(CUBE)],
  ["lone-atom", "17 Å from anything", small(cell("20"), P1, ["Na1 Na 0 0 0", "Cl1 Cl .5 .5 .5"]), rockSalt("5.64")],
  [
    "hydrogen-unbonded",
    "in a void",
    small(cell("8"), P1, ["O1 O 0 0 0", "H1 H 0.12 0 0", "H2 H 0.5 0.5 0.5"]),
    small(cell("8"), P1, ["O1 O 0 0 0", "H1 H 0.12 0 0", "H2 H 0 0.12 0"]),
  ],
  ["element-unknown", "no symbol", small(CUBE, P1, ["9 ? 0 0 0", PAIR[1]!]), plain(CUBE)],
  ["label-element", "Na1 of the type Cl", small(CUBE, P1, ["Na1 Cl 0 0 0", "Na2 Na .5 .5 .5"]), plain(CUBE)],
  ["su-on-fixed-angle", "90.00(5)", plain(cell("5", "6", "7", "90.00(5)"), P222), plain(cell("5", "6", "7"), P222)],
  [
    "su-missing",
    "one coordinate of many",
    deposition("albite", (d) => {
      d.atoms[2]!.x = d.atoms[2]!.x.replace(/\(.*/, "");
    }),
    deposition("albite"),
  ],
  ["symmetry-nearly-higher", "one atom of rock salt off by 0.04 Å", rockSalt("5.64", 0.007), fixture("halite")],
  ["symmetry-broken", "an atom of the listed cell moved", listedCell("0.31"), listedCell("0.2")],
  ["bond-valence-sum", "a cell a fifth too long", rockSalt("6.4"), rockSalt("5.64")],
  [
    "hydrogen-expected",
    "brucite without hydrogen",
    deposition("brucite", (d) => {
      d.atoms = d.atoms.filter((a) => a.type !== "H");
      d.items["_chemical_formula_sum"] = "Mg O2";
    }),
    deposition("brucite"),
  ],
  [
    "charge-balance",
    "Na2+ beside Cl-",
    small(CUBE, P1, ["Na1 Na2+ 0 0 0", "Cl1 Cl1- .5 .5 .5"]),
    small(CUBE, P1, ["Na1 Na1+ 0 0 0", "Cl1 Cl1- .5 .5 .5"]),
  ],
  ["absolute-structure-centric", "with inversion", flack("calcite", "0.02(3)"), flack("calcite", "?")],
  ["absolute-structure-inverted", "0.97(4)", flack("alpha-quartz", "0.97(4)"), flack("alpha-quartz", "0.03(4)")],
  ["absolute-structure-unknown", "nothing said", flack("alpha-quartz", "?"), flack("alpha-quartz", "0.03(4)")],
  [
    "absolute-configuration-achiral",
    "ad in a group with inversion",
    stating("calcite", { _chemical_absolute_configuration: "ad" }),
    stating("alpha-quartz", { _chemical_absolute_configuration: "ad" }),
  ],
  ["sohncke-group", "quartz", fixture("alpha-quartz"), fixture("calcite")],
  [
    "index-limits-low",
    "2 theta for theta",
    stating("calcite", { _diffrn_reflns_theta_max: "44" }),
    deposition("calcite"),
  ],
  ["laue-class-disagrees", "opposite signs of hk differ", reflections(1), reflections(0)],
  [
    "completeness",
    "half of what is said",
    stating("calcite", { _diffrn_measured_fraction_theta_max: "0.500" }),
    deposition("calcite"),
  ],
  [
    "fraction-range",
    "in per cent",
    stating("calcite", { _diffrn_measured_fraction_theta_max: "98.5" }),
    deposition("calcite"),
  ],
];

function fixtureWithoutAtoms(): CifBlock {
  return small(CUBE, P1, ["Na1 Na ? ? ?"]);
}

function without(name: string, type: string): CifBlock {
  return deposition(name, (d) => {
    const gone = new Set(d.atoms.flatMap((a) => (a.type === type ? [a.label] : [])));
    d.atoms = d.atoms.filter((a) => !gone.has(a.label));
    d.tensors = d.tensors.filter((t) => !gone.has(t.label));
    d.bonds = d.bonds.filter((b) => !gone.has(b.a) && !gone.has(b.b));
    d.angles = d.angles.filter((a) => [a.a, a.b, a.c].every((label) => !gone.has(label)));
  });
}

const found = (block: CifBlock, id: string) => vetAnswer(block).findings.find((f) => f.id === id);

describe("a finding", () => {
  it.each(CASES)("%s is made: %s; and not in the sound twin", (id, _what, faulty, sound) => {
    expect(found(faulty, id)).toMatchObject({ id, severity: criterionOf(id)!.severity });
    expect(found(sound, id)).toBeUndefined();
  });

  it("of every id is shown, here or in the table of the mutation suite", () => {
    const table = readFileSync(new URL("../golden/mutation.txt", import.meta.url), "utf8");
    const ofText = ["cif-syntax", "cif-characters"]; // syntax.test.ts
    const shown = new Set([
      ...ofText,
      ...CASES.map(([id]) => id),
      ...(table.match(/[a-z]+(?:-[a-z]+)*(?= \d)/g) ?? []),
    ]);
    expect(allCriteria().flatMap(({ id }) => (shown.has(id) ? [] : [id]))).toEqual([]);
  });
});

describe("the criteria", () => {
  it("have ids of their own, in words, each with a source and advice", () => {
    const ids = allCriteria().map((c) => c.id);
    expect(new Set(ids).size).toBe(ids.length);
    for (const { id, criterion, source, advice } of allCriteria()) {
      expect(id).toMatch(/^[a-z]+(?:-[a-z]+)*$/);
      for (const text of [criterion, source, advice]) expect(text.length, id).toBeGreaterThan(8);
    }
  });
});

import { readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { ratMat3, ratVec3 } from "../../lib/algebra/index.ts";
import { type CifBlock, readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import {
  apply3,
  type Crystal,
  crystalFromBlock,
  type NeighbourChoice,
  type NeighboursAnswer,
  neighboursAnswer,
  type SiteNeighbours,
  type Vec3,
} from "../../lib/structure/index.ts";
import { parseTriplet } from "../../lib/symmetry/index.ts";
import { crystalOfText, fixture, inSetting, unimodular } from "../support/crystals.ts";
import { problemOf } from "../support/problem-of.ts";
import { disguised, randomNumbers, randomStructure } from "../support/random-structures.ts";

const blockOf = (text: string): CifBlock => requireClean(readCif(text)).blocks[0]!;
const fixtureText = (name: string) => readFileSync(new URL(`../../fixtures/${name}.cif`, import.meta.url), "utf8");

function answerOf(name: string, options = {}): NeighboursAnswer {
  const block = blockOf(fixtureText(name));
  return neighboursAnswer(crystalFromBlock(block), { block, ...options });
}

const siteOf = (answer: NeighboursAnswer, label: string): SiteNeighbours => {
  const found = answer.sites.find((s) => s.label === label);
  if (!found) throw new Error(`no site ${label}`);
  return found;
};

/** Image of a point by an operation as written, whole cells included. */
function image(operation: string, x: Vec3): Vec3 {
  return parseTriplet(operation, "xyz").map(({ coefficients, constant }) =>
    coefficients.reduce((s, c, i) => s + (c.n / c.d) * x[i]!, constant.n / constant.d),
  ) as unknown as Vec3;
}

const CHOICES: readonly NeighbourChoice[] = [
  { kind: "shell" },
  { kind: "bonds" },
  { kind: "within", distance: 3.3 },
  { kind: "contacts" },
];
const FIXTURES = ["calcite", "gypsum", "alpha-quartz", "spinel", "urea", "potassium-alum", "cinnabar", "albite"];
const anyFixture = fc.constantFrom(...FIXTURES);
const anyChoice = fc.constantFrom(...CHOICES);

/** What does not hang on setting, origin or the choice of listed atoms: of each site all it is said to have. */
function invariants(answer: NeighboursAnswer) {
  return answer.sites.map((s) => ({
    label: s.label,
    numbers: s.numbers,
    neighbours: s.neighbours.map((n) => `${n.label} ${n.distance.toFixed(5)} ${n.solidAngle?.toFixed(5)}`).sort(),
    shape: s.shapes[0] && s.shapes[0].measure < 15 ? s.shapes[0].name : null,
    valence: s.valence?.value.toFixed(5),
  }));
}

function rounded(list: ReturnType<typeof invariants>) {
  return list.map((s) => ({
    ...s,
    numbers: Object.values(s.numbers).map((x) => (x === null ? null : Number(x.toFixed(4)))),
  }));
}

describe("lists of neighbours", () => {
  test("say the distance from the listed point to the image that operation and code name", () => {
    for (const name of FIXTURES) {
      const block = blockOf(fixtureText(name));
      const crystal = crystalFromBlock(block);
      const answer = neighboursAnswer(crystal, { block, choice: { kind: "within", distance: 3.2 } });
      const numbers = new Map(answer.operations.map((o) => [o.number, o.xyz]));
      const points = new Map(crystal.sites.map((s) => [s.label, s.symmetry.point]));
      for (const site of answer.sites) {
        for (const n of site.neighbours) {
          const there = image(n.operation, points.get(n.label)!);
          const [a, b] = [site.position, there].map((x) => apply3(crystal.metric.toCartesian, x)) as unknown as [
            Vec3,
            Vec3,
          ];
          expect(Math.hypot(b[0] - a[0], b[1] - a[1], b[2] - a[2])).toBeCloseTo(n.distance, 6);
          const [, number, ...digits] = /^(\d+)_(\d)(\d)(\d)$/.exec(n.code!)!;
          const coded = image(numbers.get(number!)!, points.get(n.label)!).map((e, i) => e + Number(digits[i]) - 5);
          for (const i of [0, 1, 2]) expect(coded[i]).toBeCloseTo(there[i]!, 9);
        }
      }
    }
  });

  test("are mutual: what one atom has, others have back as often", () => {
    fc.assert(
      fc.property(anyFixture, anyChoice, (name, choice) => {
        const answer = answerOf(name, { choice });
        const count = (from: string, to: string, distance: number) => {
          const site = siteOf(answer, from);
          return (
            site.multiplicity *
            site.neighbours.filter((n) => n.label === to && Math.abs(n.distance - distance) < 1e-6).length
          );
        };
        for (const site of answer.sites) {
          for (const n of site.neighbours) {
            expect(count(site.label, n.label, n.distance)).toBe(count(n.label, site.label, n.distance));
          }
        }
      }),
      { numRuns: 24 },
    );
  });

  test("are the same about any origin and along any axes", () => {
    fc.assert(
      fc.property(
        anyFixture,
        anyChoice,
        unimodular,
        fc.tuple(fc.nat(11), fc.nat(11), fc.nat(11)),
        (name, choice, P, p) => {
          const crystal = fixture(name);
          const moved = inSetting(crystal, { P: ratMat3(P), p: ratVec3(p, 12) });
          if (!moved) return;
          const [a, b] = [crystal, moved].map((c) => rounded(invariants(neighboursAnswer(c, { choice }))));
          expect(b).toEqual(a);
        },
      ),
      { numRuns: 24 },
    );
  });

  test("are the same for a crystal without its symmetry, in another cell", () => {
    fc.assert(
      fc.property(fc.constantFrom(4, 14, 33, 62, 82, 113, 148, 167, 186, 198, 225), fc.nat(1000), (number, seed) => {
        const random = randomNumbers(seed);
        const crystal = randomStructure(number, random);
        const plain = disguised(crystal, { multiple: [1, 1, 1], noise: 0, steps: 3 }, random);
        const kinds = (c: Crystal) => {
          const sets = neighboursAnswer(c).sites.map((s) => {
            const list = s.neighbours
              .map((n) => `${n.element} ${n.distance.toFixed(4)}`)
              .sort()
              .join();
            return `${s.element}: ${list}; ${s.numbers.effective?.toFixed(3)} ${s.numbers.solidAngle?.toFixed(3)}`;
          });
          return [...new Set(sets)].sort();
        };
        expect(kinds(plain)).toEqual(kinds(crystal));
      }),
      { numRuns: 12 },
    );
  });

  test("hold whole classes under the site symmetry, at one distance", () => {
    fc.assert(
      fc.property(anyFixture, anyChoice, (name, choice) => {
        for (const { order, neighbours, angles } of answerOf(name, { choice, angles: true }).sites) {
          for (const orbit of new Set(neighbours.map((n) => n.orbit))) {
            const members = neighbours.filter((n) => n.orbit === orbit);
            expect(order % members.length).toBe(0);
            expect(new Set(members.map((n) => `${n.label} ${n.distance.toFixed(6)}`)).size).toBe(1);
          }
          const n = neighbours.length;
          expect(2 * angles.reduce((s, a) => s + a.count, 0)).toBe(n < 2 ? 0 : n * (n - 1));
        }
      }),
      { numRuns: 24 },
    );
  });

  it("take the nearest atoms, and those as near as the last", () => {
    const { sites } = answerOf("halite", { choice: { kind: "nearest", count: 4 } });
    expect(sites.map((s) => s.coordination)).toEqual([6, 6]);
    expect(siteOf(answerOf("albite", { choice: { kind: "nearest", count: 7 } }), "Na").coordination).toBe(7);
  });

  it("are limited to centres and neighbours asked for", () => {
    const { sites } = answerOf("gypsum", { sites: ["Ca"], neighbours: ["OW", "S"] });
    expect(sites.map((s) => s.label)).toEqual(["Ca"]);
    expect([...new Set(sites[0]!.neighbours.map((n) => n.label))]).toEqual(["OW"]);
    expect(problemOf(() => answerOf("gypsum", { sites: ["Mg"] })).message).toContain('"Mg" is neither');
    expect(problemOf(() => answerOf("gypsum", { choice: { kind: "within", distance: -1 } })).code).toBe(
      "neighbour-choice-impossible",
    );
    expect(problemOf(() => answerOf("gypsum", { choice: { kind: "nearest", count: 1.5 } })).code).toBe(
      "neighbour-choice-impossible",
    );
  });
});

describe("first shells", () => {
  const metal = (group: string, a: number, rows: readonly string[]) => {
    const cell = ["length_a", "length_b", "length_c"].map((k) => `_cell_${k} ${a}`);
    const angles = ["alpha", "beta", "gamma"].map((k) => `_cell_angle_${k} 90`);
    const loop = ["loop_", "_atom_site_label", ...["x", "y", "z"].map((c) => `_atom_site_fract_${c}`)];
    const name = `_symmetry_space_group_name_H-M '${group}'`;
    return neighboursAnswer(crystalOfText(["data_x", ...cell, ...angles, name, ...loop, ...rows].join("\n"))).sites;
  };

  it("of metals end at the widest gap, whatever is bonded to what", () => {
    expect(metal("F m -3 m", 3.615, ["Cu1 0 0 0"])[0]!.coordination).toBe(12);
    const [iron] = metal("I m -3 m", 2.866, ["Fe1 0 0 0"]);
    expect([iron!.coordination, iron!.gap!.count]).toEqual([14, 14]);
    expect(iron!.gap!.last).toBeCloseTo(2.866, 6);
    expect(iron!.gap!.next!.distance).toBeCloseTo(2.866 * Math.SQRT2, 6);
  });

  it("of metals leave out hydrogen of their ligands, even where it is nearer", () => {
    const { neighbours, next } = siteOf(answerOf("jarosite"), "K");
    expect([neighbours.length, new Set(neighbours.map((n) => n.element))]).toEqual([12, new Set(["O"])]);
    expect(next!.label).toBe("H");
    expect(next!.distance).toBeLessThan(neighbours[0]!.distance);
  });

  it("of metals in oxides hold no metals, however small the cell", () => {
    expect(siteOf(answerOf("strontium-titanate"), "Sr").neighbours.map((n) => n.element)).toEqual(Array(12).fill("O"));
    const cubic = metal("P m -3 m", 4.0984, ["Pb1 0.5 0.5 0.5", "Zr1 0 0 0", "O1 0.5 0 0"]);
    expect(cubic.map((s) => s.formula)).toEqual(["PbO12", "ZrO6", "OZr2Pb4"]);
  });

  it("of metals leave out what stands behind a ligand", () => {
    const { neighbours, next } = siteOf(answerOf("calcite"), "Ca1");
    expect(new Set(neighbours.map((n) => n.element))).toEqual(new Set(["O"]));
    expect([next!.label, next!.distance < 3.3]).toEqual(["C1", true]);
  });
});

describe("bond valence sums", () => {
  it("count hydrogen apart, and are for the state that fits best", () => {
    const answer = answerOf("gypsum");
    expect(siteOf(answer, "OW").valence).toMatchObject({ hydrogens: 2, charge: null });
    expect(siteOf(answer, "S").valence).toMatchObject({ charge: 6, stated: false, hydrogens: 0 });
    const { neighbours, valence } = siteOf(answer, "Ca");
    expect(neighbours.reduce((s, n) => s + n.valence!, 0)).toBeCloseTo(valence!.value, 9);
  });

  it("take the state that the file states", () => {
    const text = fixtureText("calcite").replace(
      /^loop_$/m,
      "loop_\n_atom_type_symbol\n_atom_type_oxidation_number\nCa 2\nC 4\nO -2\n\nloop_",
    );
    const block = blockOf(text);
    const answer = neighboursAnswer(crystalFromBlock(block), { block });
    expect(siteOf(answer, "Ca1").valence).toMatchObject({ charge: 2, stated: true });
  });

  it("are null where a neighbour has no parameters with the site", () => {
    const answer = answerOf("urea");
    expect(["C", "N"].map((label) => siteOf(answer, label).valence)).toEqual([null, null]);
    expect(siteOf(answer, "C").neighbours.map((n) => n.valence === null)).toContain(true);
  });
});

/** A structure in P 1 with disorder, one row per atom: label, element, x, y, z, occupancy, assembly, group. */
function disordered(rows: readonly string[]): Crystal {
  const names = [
    "label",
    "type_symbol",
    "fract_x",
    "fract_y",
    "fract_z",
    "occupancy",
    "disorder_assembly",
    "disorder_group",
  ];
  const cell = ["length_a", "length_b", "length_c"].map((k) => `_cell_${k} 10`);
  const angles = ["alpha", "beta", "gamma"].map((k) => `_cell_angle_${k} 90`);
  const loop = ["loop_", ...names.map((n) => `_atom_site_${n}`), ...rows];
  return crystalOfText(["data_x", ...cell, ...angles, "_symmetry_space_group_name_H-M 'P 1'", ...loop].join("\n"));
}

describe("disorder", () => {
  const crystal = disordered([
    "C1 C 0.50 0.50 0.50 1 . .",
    "O1A O 0.64 0.50 0.50 0.6 A 1",
    "O1B O 0.58 0.62 0.50 0.4 A 2",
    "O2 O 0.40 0.60 0.50 1 . .",
    "O3 O 0.40 0.40 0.50 1 . .",
  ]);

  it("keeps alternatives apart, and tells that they are", () => {
    const answer = neighboursAnswer(crystal);
    const c = siteOf(answer, "C1");
    expect(c.neighbours.map((n) => n.label).sort()).toEqual(["O1A", "O1B", "O2", "O3"]);
    expect([c.occupied, c.alternatives, c.shapes]).toEqual([3, true, []]);
    expect(siteOf(answer, "O1A").neighbours.map((n) => n.label)).toEqual(["C1"]);
    const near = neighboursAnswer(crystal, { choice: { kind: "within", distance: 2 } });
    expect(siteOf(near, "O1A").neighbours.map((n) => n.label)).toEqual(["C1"]);
  });

  it("has no angle between alternatives", () => {
    const { neighbours, angles } = siteOf(neighboursAnswer(crystal, { angles: true }), "C1");
    const pairs = angles.map((a) =>
      a.ends
        .map((i) => neighbours[i]!.label)
        .sort()
        .join(),
    );
    expect(pairs).toHaveLength(5);
    expect(pairs).not.toContain("O1A,O1B");
  });

  it("lets atoms of one disorder group meet as if they were always there", () => {
    const nitro = disordered([
      "N1 N 0.5 0.5 0.5 0.5 A 1",
      "O1 O 0.622 0.5 0.5 0.5 A 1",
      "Li1 Li 0.70 0.67 0.5 0.8 . .",
    ]);
    const answer = neighboursAnswer(nitro);
    const [o, n] = [siteOf(answer, "O1"), siteOf(answer, "N1")];
    expect([n.occupied, n.valence!.value.toFixed(2)]).toEqual([1, Math.exp((1.361 - 1.22) / 0.37).toFixed(2)]);
    expect(o.occupied).toBeCloseTo(1.8, 9); // lithium is there four times in five
  });

  it("counts atoms that share a position once, as all of them", () => {
    const shared = disordered(["Mg1 Mg 0.5 0.5 0.5 0.7 . .", "Fe1 Fe 0.5 0.5 0.5 0.3 . .", "O1 O 0.71 0.5 0.5 1 . ."]);
    const answer = neighboursAnswer(shared);
    const [n, ...others] = siteOf(answer, "O1").neighbours;
    expect([n!.label, n!.alsoThere, n!.occupancy, others]).toEqual(["Mg1", ["Fe1"], 1, []]);
    expect(siteOf(answer, "Fe1")).toMatchObject({ alsoHere: ["Mg1"], coordination: 1 });
    expect(siteOf(answer, "Fe1").neighbours[0]!.distance).toBe(siteOf(answer, "Mg1").neighbours[0]!.distance);
  });
});

describe("torsion angles", () => {
  const box = ["length_a", "length_b", "length_c"].map((k) => `_cell_${k} 10`).join("\n");
  const torsionsOf = (group: string, rows: readonly string[]) => {
    const head = `data_x\n${box}\n_cell_angle_alpha 90\n_cell_angle_beta 90\n_cell_angle_gamma 90\n_symmetry_space_group_name_H-M '${group}'`;
    const loop =
      "loop_\n_atom_site_label\n_atom_site_type_symbol\n_atom_site_fract_x\n_atom_site_fract_y\n_atom_site_fract_z";
    return neighboursAnswer(crystalOfText([head, loop, ...rows].join("\n")), { torsions: true }).torsions;
  };
  const peroxide = ["O1 O 0.5 0.5 0.5", "H1 H 0.5 0.59 0.5", "O2 O 0.645 0.5 0.5"];

  it("are positive where the far bond is turned clockwise, and stand once for both senses of the chain", () => {
    const right = torsionsOf("P 1", [...peroxide, "H2 H 0.645 0.5 0.59"]);
    expect(right.map((t) => [t.atoms.map((a) => a.label).join(), Math.round(t.angle)])).toEqual([["H1,O1,O2,H2", 90]]);
    expect(torsionsOf("P 1", [...peroxide, "H2 H 0.645 0.5 0.41"]).map((t) => Math.round(t.angle))).toEqual([-90]);
    expect(torsionsOf("P 1", [...peroxide, "H2 H 0.645 0.41 0.5"]).map((t) => Math.round(t.angle))).toEqual([180]);
  });

  it("stand once for images under the space group", () => {
    const half = ["O1 O 0.0725 0 0", "H1 H 0.0725 0.09 0.02"];
    const [torsion, ...others] = torsionsOf("P 1 2 1", half);
    expect([torsion!.atoms.map((a) => a.code), others]).toEqual([["1_555", "1_555", "2_555", "2_555"], []]);
  });
});

describe("symmetry codes", () => {
  const head =
    "data_x\n_cell_length_a 6\n_cell_length_b 7\n_cell_length_c 8\n_cell_angle_alpha 90\n_cell_angle_beta 100\n_cell_angle_gamma 90";
  const atoms =
    "loop_\n_atom_site_label\n_atom_site_fract_x\n_atom_site_fract_y\n_atom_site_fract_z\nCa1 0.1 0.2 0.3\nO1 0.45 0.21 0.32\n";
  const listed = (ids: readonly string[], operations: readonly string[]) =>
    `${head}\nloop_\n_space_group_symop_id\n_space_group_symop_operation_xyz\n${operations.map((o, i) => `${ids[i]} '${o}'`).join("\n")}\n${atoms}`;
  const OPERATIONS = ["x,y,z", "-x,y-1/2,-z-1/2", "-x,-y,-z", "x,-y-1/2,z-1/2"];

  it("mean the file's own list, with its numbers and translations", () => {
    const block = blockOf(listed(["1", "4", "3", "2"], OPERATIONS));
    const crystal = crystalFromBlock(block);
    const answer = neighboursAnswer(crystal, { block, choice: { kind: "within", distance: 4.5 } });
    expect(answer.numbering).toBe("file");
    expect(answer.operations).toContainEqual({ number: "4", xyz: "-x,y-1/2,-z-1/2" });
    expect(answer.operations).toContainEqual({ number: "2", xyz: "x,-y-1/2,z-1/2" });
    const screw = siteOf(answer, "Ca1").neighbours.filter((n) => n.code?.startsWith("4_"));
    expect(screw.length).toBeGreaterThan(0);
    for (const { code, operation } of screw) {
      const cells = code!
        .slice(2)
        .split("")
        .map((d) => Number(d) - 5);
      const t = parseTriplet(operation, "xyz").map((e) => e.constant.n / e.constant.d);
      expect(t).toEqual([cells[0], cells[1]! - 0.5, cells[2]! - 0.5]);
    }
  });

  it("count the operations given in the answer where the file lists none", () => {
    const block = blockOf(`${head}\n_symmetry_space_group_name_H-M 'P 1 21/c 1'\n${atoms}`);
    const answer = neighboursAnswer(crystalFromBlock(block), { block });
    expect([answer.numbering, answer.operations.map((o) => o.number)]).toEqual(["here", ["1", "2", "3", "4"]]);
  });

  it("are null where a digit does not hold the cells", () => {
    const block = blockOf(listed(["1", "2", "3", "4"], OPERATIONS).replace("0.45 0.21", "5.45 0.21"));
    const { neighbours } = siteOf(neighboursAnswer(crystalFromBlock(block), { block }), "Ca1");
    expect(neighbours.map((n) => n.code)).toContain("1_055");
    const far = blockOf(listed(["1", "2", "3", "4"], OPERATIONS).replace("0.45 0.21", "7.45 0.21"));
    const list = siteOf(neighboursAnswer(crystalFromBlock(far), { block: far }), "Ca1").neighbours;
    expect(list.map((n) => [n.code, n.operation])).toContainEqual([null, "x-7,y,z"]);
  });
});

describe("uncertainties", () => {
  const text = (y: string) =>
    `data_x\n_cell_length_a 4.0(1)\n_cell_length_b 5.0(1)\n_cell_length_c 6.0(1)\n_cell_angle_alpha 90\n_cell_angle_beta 90\n_cell_angle_gamma 90\n_symmetry_space_group_name_H-M 'P 2 2 2'\nloop_\n_atom_site_label\n_atom_site_fract_x\n_atom_site_fract_y\n_atom_site_fract_z\nCa1 0 0 0\nO1 0 ${y} 0`;
  const su = (y: string, withBlock = true) => {
    const block = blockOf(text(y));
    const answer = neighboursAnswer(crystalFromBlock(block), {
      choice: { kind: "nearest", count: 2 },
      ...(withBlock ? { block } : {}),
    });
    return siteOf(answer, "Ca1").neighbours[0]!.su;
  };

  it("come from cell and coordinates together, or from one of them", () => {
    expect(su("0.40(2)")).toBeCloseTo(Math.hypot(5 * 0.02, 0.4 * 0.1), 9);
    expect(su("0.40(2)", false)).toBeCloseTo(5 * 0.02, 9);
  });

  it("are unknown for an atom that is free to move and has none", () => expect(su("0.40")).toBeNull());

  it("may stand in columns of their own", () => {
    const apart = text("0.40")
      .replace("_atom_site_fract_z", "_atom_site_fract_z\n_atom_site_fract_y_su")
      .replace("Ca1 0 0 0", "Ca1 0 0 0 .")
      .replace("O1 0 0.40 0", "O1 0 0.40 0 0.02")
      .replace("_cell_length_b 5.0(1)", "_cell_length_b 5.0\n_cell_length_b_su 0.1");
    const block = blockOf(apart);
    const { sites } = neighboursAnswer(crystalFromBlock(block), { block, choice: { kind: "nearest", count: 2 } });
    expect(sites[0]!.neighbours[0]!.su).toBeCloseTo(Math.hypot(5 * 0.02, 0.4 * 0.1), 9);
  });

  it("are those of the cell between atoms that symmetry fixes, and unknown without it", () => {
    expect(su("0.5")).toBeCloseTo(0.05, 9);
    expect(su("0.5", false)).toBeNull();
  });

  it("are 0 for angles that symmetry fixes", () => {
    const { angles } = siteOf(answerOf("halite", { angles: true }), "Na");
    expect(angles.map((a) => `${Math.round(a.angle)} ${a.su} ${a.count}`).sort()).toEqual(["180 0 3", "90 0 12"]);
  });

  it("leave out one atom held to fix the origin of a polar axis", () => {
    const cif = (z: string) =>
      `data_x\n_cell_length_a 4.0\n_cell_length_b 4.0\n_cell_length_c 4.2(1)\n_cell_angle_alpha 90\n_cell_angle_beta 90\n_cell_angle_gamma 90\n_symmetry_space_group_name_H-M 'P 4 m m'\nloop_\n_atom_site_label\n_atom_site_fract_x\n_atom_site_fract_y\n_atom_site_fract_z\nPb1 0 0 ${z}\nO1 0.5 0.5 0.11(1)`;
    const found = (z: string) => {
      const block = blockOf(cif(z));
      return siteOf(neighboursAnswer(crystalFromBlock(block), { block }), "Pb1").neighbours[0]!.su;
    };
    expect(found("0")).toBeGreaterThan(0);
    expect(found("0.02(1)")).toBeGreaterThan(found("0")!);
  });
});

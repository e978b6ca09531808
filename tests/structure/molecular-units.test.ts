import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type IntVec3, ratMat3, ratVec3 } from "../../lib/algebra/index.ts";
import {
  bondsOf,
  type Crystal,
  crystalOf,
  lengthOf,
  metricOf,
  molecularUnits,
  orderedModel,
  parseBondPatterns,
  type UnitAnalysis,
  type Vec3,
} from "../../lib/structure/index.ts";
import { compose, operationKey, parseOperation, spaceGroup, transformPoint } from "../../lib/symmetry/index.ts";
import { atom, fixture, inSetting, unimodular } from "../support/crystals.ts";

/** Everything that must not depend on setting, origin or the order of atoms. */
function essence(analysis: UnitAnalysis) {
  return {
    units: analysis.units
      .map((u) => {
        const bonds = u.bonds.map(([i, j]) => {
          const [p, q] = [u.atoms[i]!.cartesian, u.atoms[j]!.cartesian];
          return Math.hypot(p[0] - q[0], p[1] - q[1], p[2] - q[2]).toFixed(4);
        });
        return `${u.formula} ${[...u.labels].sort().join()} ${u.count} ${u.site.operations.length} ${bonds.sort().join()}`;
      })
      .sort(),
    extended: analysis.extended.map((e) => `${e.kind} ${e.formula} ${e.count} ${[...e.labels].sort().join()}`).sort(),
    lone: analysis.loneAtoms.map((a) => `${a.label} ${a.count}`).sort(),
  };
}

function partsOf({ name, metric, group, tolerance }: Crystal) {
  return { name, metric, group, tolerance };
}

function shuffled(crystal: Crystal, order: readonly number[]): Crystal {
  const rank = (i: number) => order[i % order.length]! * 100 + i;
  const sites = crystal.sites.map((s, i) => ({ s, r: rank(i) })).sort((a, b) => a.r - b.r);
  return crystalOf({ ...partsOf(crystal), sites: sites.map(({ s }) => s) });
}

/** Sites listed as another of their images, over some whole cells. */
function elsewhere(crystal: Crystal, picks: readonly number[], cells: readonly IntVec3[]): Crystal {
  const sites = crystal.sites.map((s, i) => {
    const g = crystal.group.operations[picks[i % picks.length]! % crystal.group.operations.length]!;
    const t = cells[i % cells.length]!;
    const x = transformPoint(g, s.symmetry.point);
    return { ...s, position: [x[0] + t[0], x[1] + t[1], x[2] + t[2]] as Vec3 };
  });
  return crystalOf({ ...partsOf(crystal), sites });
}

const FIXTURES = [
  "calcite",
  "gypsum",
  "alpha-quartz",
  "scheelite",
  "orpiment",
  "epsomite",
  "naphthalene",
  "chalcanthite",
];
const cells = fc.tuple(
  fc.integer({ min: -2, max: 2 }),
  fc.integer({ min: -2, max: 2 }),
  fc.integer({ min: -2, max: 2 }),
);
const originShift = fc.tuple(fc.nat(23), fc.nat(23), fc.nat(23)).map((n) => ratVec3(n, 24));

describe("molecularUnits", () => {
  test.each(FIXTURES)("finds the same in %s whatever the setting, the origin and the list of atoms", (name) => {
    const crystal = fixture(name);
    const expected = essence(molecularUnits(crystal));
    fc.assert(
      fc.property(
        unimodular,
        originShift,
        fc.array(fc.nat(9), { minLength: 3, maxLength: 7 }),
        fc.array(fc.nat(200), { minLength: 5, maxLength: 5 }),
        fc.array(cells, { minLength: 3, maxLength: 3 }),
        (P, p, order, picks, shifts) => {
          const other = inSetting(crystal, { P: ratMat3(P), p });
          if (other === null) throw new Error("not integer");
          expect(essence(molecularUnits(shuffled(elsewhere(other, picks, shifts), order)))).toEqual(expected);
        },
      ),
      { numRuns: 8 },
    );
  });

  test("counts units in the primitive cell, however large the cell given is", () => {
    const crystal = fixture("gypsum");
    const p = ratVec3([0, 0, 0]);
    const larger = [ratMat3([2, 0, 0, 0, 1, 0, 0, 0, 1]), ratMat3([1, 0, 0, 0, 3, 0, 0, 0, 2])].map(
      (P) => inSetting(crystal, { P, p })!,
    );
    expect(larger.map((c) => c.group.centrings.length)).toEqual([4, 12]);
    for (const c of larger) expect(essence(molecularUnits(c))).toEqual(essence(molecularUnits(crystal)));
  });

  test("gives sites that are groups of exact operations and permute the atoms as they say", () => {
    for (const name of [...FIXTURES, "calomel", "zircon", "fullerene-pa-3"]) {
      const crystal = fixture(name);
      for (const unit of molecularUnits(crystal).units) {
        const { operations, permutations } = unit.site;
        const keys = new Set(operations.map(operationKey));
        expect(crystal.group.operations.length % operations.length).toBe(0);
        for (const a of operations)
          for (const b of operations) expect(keys.has(operationKey(compose(a, b)))).toBe(true);
        operations.forEach((g, s) => {
          unit.atoms.forEach((x, k) => {
            const image = transformPoint(g, x.fractional);
            const target = unit.atoms[permutations[s]![k]!]!;
            expect(target.site).toBe(x.site);
            const d = image.map((e, i) => e - target.fractional[i]!) as unknown as Vec3;
            expect(lengthOf(crystal.metric, d)).toBeLessThan(1e-9);
          });
        });
        const atoms = unit.count * unit.atoms.length;
        expect(Number.isInteger(unit.count) && atoms > 0).toBe(true);
      }
    }
  });

  test("leaves no atom out and counts none twice", () => {
    for (const name of FIXTURES) {
      const crystal = fixture(name);
      const { units, extended, loneAtoms } = molecularUnits(crystal);
      const inCell = crystal.sites.reduce((n, s) => n + s.images.length, 0) / crystal.group.centrings.length;
      const size = (formula: string) =>
        [...formula.matchAll(/[A-Z][a-z]?(\d*)/g)].reduce((n, m) => n + Number(m[1] || "1"), 0);
      const total =
        units.reduce((n, u) => n + u.count * u.atoms.length, 0) +
        extended.reduce((n, e) => n + e.count * size(e.formula), 0) +
        loneAtoms.reduce((n, a) => n + a.count, 0);
      expect(total).toBe(inCell);
    }
  });

  test.each([
    ["calcite", ["CO3 x 2"], [], ["Ca1"]],
    ["gypsum", ["SO4 x 2", "H2O x 4"], [], ["Ca"]],
    ["alpha-quartz", [], ["framework SiO2 x 3"], []],
    ["orpiment", [], ["layer As2S3 x 4"], []],
    ["sodalite", [], ["framework AlSiO4 x 6"], ["Na", "Cl"]],
    ["zircon", ["SiO4 x 2"], [], ["Zr"]],
    ["almandine", ["SiO4 x 12"], [], ["Fe", "Al"]],
    ["corundum", [], [], ["Al", "O"]],
    ["hematite", [], [], ["Fe", "O"]],
    ["lithium-niobate", [], [], ["Nb", "Li", "O"]],
    ["crocoite", ["CrO4 x 4"], [], ["Pb"]],
    ["brucite", ["OH x 2"], [], ["Mg"]],
    ["pyrite", ["S2 x 4"], [], ["Fe"]],
    ["calomel", ["Hg2Cl2 x 1"], [], []],
    ["potassium-hexachloroplatinate", ["PtCl6 x 1"], [], ["K"]],
    ["potassium-alum", ["H2O x 24", "H2O x 24", "SO4 x 8"], [], ["K", "Al"]],
    ["epsomite", [...new Array(7).fill("H2O x 4"), "SO4 x 4"], [], ["Mg"]],
    ["chalcanthite", [...new Array(5).fill("H2O x 2"), "SO4 x 2"], [], ["Cu1", "Cu2"]],
    ["potassium-dihydrogen-phosphate", ["H2PO4 x 2"], [], ["K"]],
    ["ammonium-chloride", ["NH4 x 1"], [], ["Cl"]],
    ["vivianite", ["H2O x 4", "H2O x 4", "PO4 x 2"], [], ["Fe1", "Fe2"]],
    ["urea", ["CH4N2O x 2"], [], []],
    ["fullerene-fm-3", ["C60 x 1"], [], []],
  ])("takes %s apart as chemists do", (name, units, extended, lone) => {
    const found = molecularUnits(fixture(name));
    expect(found.units.map((u) => `${u.formula} x ${u.count}`).sort()).toEqual([...units].sort());
    expect(found.extended.map((e) => `${e.kind} ${e.formula} x ${e.count}`)).toEqual(extended);
    expect(found.loneAtoms.map((a) => a.label)).toEqual(lone);
  });

  test("names the directions of chains and layers", () => {
    const [layer] = molecularUnits(fixture("orpiment")).extended;
    expect(layer!.direction).toEqual([0, 1, 0]);
    const [graphite] = molecularUnits(fixture("graphite-2h")).extended;
    expect(graphite!.direction).toEqual([0, 0, 1]);
  });

  test("gathers a molecule that the cell edges cut", () => {
    for (const unit of molecularUnits(fixture("naphthalene")).units) {
      for (const [i, j] of unit.bonds) {
        const [p, q] = [unit.atoms[i]!.cartesian, unit.atoms[j]!.cartesian];
        expect(Math.hypot(p[0] - q[0], p[1] - q[1], p[2] - q[2])).toBeLessThan(1.6);
      }
    }
  });
});

describe("the choice of bonds", () => {
  const wolframates = fixture("scheelite");

  test("is printed: pairs bonded, contacts left out", () => {
    const { choice } = molecularUnits(wolframates);
    expect(choice.tolerance).toBe(0.3);
    expect(choice.bonded).toEqual([expect.objectContaining({ elements: ["W", "O"], rule: "oxo-anion", count: 16 })]);
    expect(choice.leftOut.map((p) => p.elements)).toEqual([["Ca", "O"]]);
    expect(choice.leftOut[0]!.shortest).toBeGreaterThan(2.4);
  });

  test("can be overruled by patterns", () => {
    const none = molecularUnits(wolframates, { noBond: parseBondPatterns("W-O") });
    expect(none.units).toEqual([]);
    expect(none.loneAtoms.map((a) => a.label)).toEqual(["Ca", "W", "O"]);
    const all = molecularUnits(wolframates, { bond: parseBondPatterns("Ca-O<2.6") });
    expect(all.extended.map((e) => e.kind)).toEqual(["framework"]);
    const short = molecularUnits(wolframates, { bond: parseBondPatterns("W-O<1.95") });
    expect(short.units.map((u) => u.formula)).toEqual(["WO4"]);
    expect(molecularUnits(wolframates, { bond: parseBondPatterns("W-O<1.5") }).units).toHaveLength(1);
  });

  test("leaves water alone, says which bonds it cut, and joins it to a metal when asked", () => {
    const epsomite = fixture("epsomite");
    const { choice } = molecularUnits(epsomite);
    expect(choice.leftOut).toEqual([expect.objectContaining({ elements: ["Mg", "O"], why: "water", count: 24 })]);
    const asked = molecularUnits(epsomite, { bond: parseBondPatterns("Mg-O<2.07") });
    expect(asked.units.map((u) => u.formula).sort()).toEqual(["H2O", "Mg(H2O)6", "SO4"]);
    expect(asked.choice.leftOut).toEqual([]);
  });

  test("tells ions from bonds that the caller cut, and below what length a bond begins", () => {
    const { choice } = molecularUnits(wolframates, { noBond: parseBondPatterns("W-O") });
    expect(choice.leftOut.map((p) => [p.elements.join("-"), p.why])).toEqual([
      ["Ca-O", "ions"],
      ["W-O", "asked"],
    ]);
    const [sulfide] = molecularUnits(fixture("molybdenite-2h")).choice.leftOut;
    expect(sulfide).toMatchObject({ elements: ["Mo", "S"], why: "ions", bondedBelow: 2.25 });
  });

  test("can be overruled by naming the members of a unit", () => {
    const found = molecularUnits(fixture("rutile"), { units: [["Ti", "O"]] });
    expect(found.extended.map((e) => `${e.kind} ${e.formula}`)).toEqual(["framework TiO2"]);
    const apart = molecularUnits(fixture("gypsum"), { units: [["OW", "H1"]] });
    expect(apart.units.map((u) => u.formula).sort()).toEqual(["OH", "SO4"]);
    expect(apart.loneAtoms.map((a) => a.label)).toContain("H2");
  });

  test("refuses names that the structure does not have", () => {
    const wrong = () => molecularUnits(wolframates, { bond: parseBondPatterns("Mo-O") });
    expect(wrong).toThrow(
      expect.objectContaining({ code: "bond-name-unknown", message: expect.stringContaining('"Mo"') }),
    );
  });

  test("shows distances that only just decide", () => {
    const metric = metricOf({ a: 20, b: 20, c: 20, alpha: 90, beta: 90, gamma: 90 });
    const at = (x: number): Vec3 => [x / 20, 0, 0];
    const sites = [atom("I1", "I", at(0)), atom("I2", "I", at(3.05)), atom("I3", "I", at(6.19))];
    const crystal = crystalOf({ name: "iodine", metric, group: spaceGroup([]), sites });
    const { choice, units } = molecularUnits(crystal);
    expect(units.map((u) => u.labels.join())).toEqual(["I1,I2"]);
    expect(choice.nearLimit.map((n) => `${n.labels.join("-")} ${n.bonded}`)).toEqual(["I1-I2 true", "I2-I3 false"]);
  });
});

describe("hydrogen", () => {
  const metric = metricOf({ a: 20, b: 20, c: 20, alpha: 90, beta: 90, gamma: 90 });
  const line = (...atoms: [string, string, number][]) => {
    const sites = atoms.map(([label, element, x]) => atom(label, element, [x / 20, 0, 0]));
    return molecularUnits(crystalOf({ name: "line", metric, group: spaceGroup([]), sites }));
  };

  test("is bonded once, to the nearer side of a hydrogen bond", () => {
    const { units, loneAtoms } = line(["O1", "O", 0], ["H", "H", 1.05], ["O2", "O", 2.5]);
    expect(units.map((u) => u.labels.join())).toEqual(["O1,H"]);
    expect(loneAtoms.map((a) => a.label)).toEqual(["O2"]);
  });

  test("is left alone where it is centred, except between halogens", () => {
    const { loneAtoms, notes } = line(["O1", "O", 0], ["H", "H", 1.2], ["O2", "O", 2.42]);
    expect(loneAtoms.map((a) => a.label)).toEqual(["O1", "H", "O2"]);
    expect(notes.join()).toContain("centred between two atoms");
    expect(line(["F1", "F", 0], ["H", "H", 1.14], ["F2", "F", 2.28]).units.map((u) => u.formula)).toEqual(["HF2"]);
  });

  test("bonds to hydrogen only in H2, and deuterium is hydrogen", () => {
    expect(line(["H1", "H", 0], ["H2", "H", 0.75]).units.map((u) => u.formula)).toEqual(["H2"]);
    expect(line(["O", "O", 0], ["D", "D", 0.97], ["H", "H", 1.75]).units.map((u) => u.formula)).toEqual(["OD"]);
  });

  test("bridges boron", () => {
    expect(line(["B1", "B", 0], ["H", "H", 1.3], ["B2", "B", 2.6]).units.map((u) => u.formula)).toEqual(["B2H"]);
  });
});

describe("disorder", () => {
  const metric = metricOf({ a: 9, b: 10, c: 11, alpha: 90, beta: 90, gamma: 90 });
  const group = spaceGroup([]);

  test("takes the group of largest occupancy of each assembly, the lower number in a tie, and says so", () => {
    const part = (label: string, x: number, assembly: string, disorderGroup: string, occupancy: number) => ({
      ...atom(label, "O", [x / 9, 0.1, 0.1], occupancy),
      assembly,
      disorderGroup,
    });
    const sites = [
      atom("N", "N", [0.1, 0.1, 0.1]),
      part("O1", 2.1, "A", "1", 0.4),
      part("O2", 2.2, "A", "2", 0.6),
      part("O3", 6.1, "B", "2", 0.5),
      part("O4", 6.4, "B", "1", 0.5),
    ];
    const list = bondsOf(crystalOf({ name: "d", metric, group, sites }));
    expect(list.atoms.map((a) => sites[a.site]!.label)).toEqual(["N", "O2", "O4"]);
    expect(list.notes).toEqual([
      "disorder assembly A: group 2 (occupancy 0.6) taken: O1 left out",
      "disorder assembly B: group 1 (occupancy 0.5) taken: O3 left out",
    ]);
  });

  test("takes one of two half hydrogen atoms on a hydrogen bond", () => {
    const at = (x: number): Vec3 => [x / 9, 0, 0];
    const sites = [
      atom("O1", "O", at(0)),
      atom("HA", "H", at(1), 0.5),
      atom("HB", "H", at(1.7), 0.5),
      atom("O2", "O", at(2.7)),
    ];
    const { units, notes } = molecularUnits(crystalOf({ name: "h", metric, group, sites }));
    expect(units.map((u) => u.labels.join())).toEqual(["O1,HA"]);
    expect(notes.join()).toContain("HB left out");
  });

  test("takes the majority at a shared position", () => {
    const sites = [atom("S", "S", [0.5, 0.5, 0.5], 0.3), atom("Se", "Se", [0.5, 0.5, 0.5], 0.7)];
    const list = bondsOf(crystalOf({ name: "m", metric, group, sites }));
    expect(list.atoms.map((a) => sites[a.site]!.label)).toEqual(["Se"]);
  });
});

describe("a molecule disordered about a centre", () => {
  const metric = metricOf({ a: 10, b: 10, c: 10, alpha: 90, beta: 90, gamma: 90 });
  const part = (label: string, element: string, x: number, y: number) => ({
    ...atom(label, element, [x / 10, y / 10 + 1, 0], 0.5),
    disorderGroup: "-1",
  });
  const sites = [part("C1", "C", 0.7, 0.2), part("C2", "C", -0.7, 0.2), part("N", "N", -1.86, 0.2)];
  const crystal = crystalOf({ name: "about a centre", metric, group: spaceGroup([parseOperation("-x,-y,-z")]), sites });

  test("is not bonded to its own other image", () => {
    const { units } = molecularUnits(crystal);
    expect(units.map((u) => `${u.atoms.length} ${u.count}`)).toEqual(["3 2"]);
  });

  test("is ordered by giving up the centre", () => {
    const model = orderedModel(crystal)!;
    expect(model.index).toBe(2);
    expect(model.crystal.sites.map((s) => `${s.label} ${s.occupancy}`)).toEqual(["C1 1", "C2 1", "N 1"]);
    expect(molecularUnits(model.crystal).units.map((u) => `${u.atoms.length} ${u.count}`)).toEqual(["3 1"]);
  });
});

describe("orderedModel", () => {
  test.each([
    ["ammonium-chloride", 2, "P-43m", "NH4 x 1", 24],
    ["potassium-dihydrogen-phosphate", 2, "Fdd2", "H2PO4 x 2", 2],
  ])("orders the hydrogen of %s in a subgroup of index %i", (name, index, symbol, unit, site) => {
    const crystal = fixture(name);
    const model = orderedModel(crystal)!;
    expect(model.index).toBe(index);
    expect(model.crystal.identified.summary.hermannMauguin.replaceAll(" ", "")).toBe(symbol);
    const { units, notes } = molecularUnits(model.crystal);
    expect(units.map((u) => `${u.formula} x ${u.count}`)).toEqual([unit]);
    expect(units[0]!.site.operations).toHaveLength(site);
    expect(units[0]!.atoms.every((a) => a.occupancy === 1)).toBe(true);
    expect(notes).toEqual([]);
    expect(model.crystal.notes.at(-1)).toContain("of H was taken");
    const content = (c: Crystal) => c.sites.reduce((n, s) => n + s.occupancy * s.images.length, 0);
    expect(content(model.crystal)).toBeCloseTo(content(crystal), 9);
  });

  test("has nothing to do in an ordered crystal", () => {
    expect(orderedModel(fixture("gypsum"))).toBeNull();
  });
});

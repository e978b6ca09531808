import { describe, expect, it } from "vitest";
import { findLoop, readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import { extendedXyz, mmcifText, pdbText, positionsCsv, structureCif, xyzText } from "../../lib/report/index.ts";
import {
  type AtomModel,
  atomModel,
  type Crystal,
  cellContents,
  composedCrystal,
  coordinateList,
  type ExpandedAtom,
  type ListedStructure,
  listedStructure,
  modelPositions,
  PeriodicPoints,
  parseSiteTable,
  searchSymmetry,
  sitesAnswer,
} from "../../lib/structure/index.ts";
import { identify, settingsOf } from "../../lib/symmetry/index.ts";
import {
  readCsv,
  readExtendedXyz,
  readPdb,
  readPositions,
  readStructure,
  readXyz,
} from "../support/coordinate-readers.ts";
import { atom, fixture } from "../support/crystals.ts";
import { problemOf } from "../support/problem-of.ts";
import { randomNumbers, randomStructure } from "../support/random-structures.ts";
import { tableOf } from "../support/site-tables.ts";

const heading = { comment: "a wall of the old harbour", ending: "" };
const cif = (structure: ListedStructure, version: "1.1" | "2.0" = "1.1") => structureCif(structure, version, heading);

/** Every format that lists all atoms, read back as a structure without symmetry. */
const READ_BACK: Readonly<Record<string, (model: AtomModel) => Crystal>> = {
  "CIF 1.1": (model) => readStructure(cif(listedStructure(model))),
  "CIF 2.0": (model) => readStructure(cif(listedStructure(model), "2.0")),
  XYZ: (model) => readXyz(xyzText(coordinateList(model)), model.metric),
  "extended XYZ": (model) => readExtendedXyz(extendedXyz(coordinateList(model))),
  JSON: (model) => readPositions(JSON.stringify(modelPositions(model))),
  CSV: (model) => readCsv(positionsCsv(modelPositions(model)), model.metric),
  PDB: (model) => readPdb(pdbText(coordinateList(model))),
  mmCIF: (model) => readStructure(mmcifText(coordinateList(model))),
};

function expectSameAtoms(read: Crystal, model: AtomModel, within: number) {
  const atoms = read.sites.flatMap((s) => s.images.map((i) => ({ element: s.element, x: i.position })));
  expect(atoms.length).toBe(model.atoms.length);
  const points = new PeriodicPoints(model.metric, within);
  for (const a of atoms) points.add(a.x);
  for (const a of model.atoms) {
    const near = points.near(a.position).map((k) => atoms[k]!);
    expect(near.map((n) => n.element)).toContain(model.crystal.sites[a.site]!.element);
  }
}

/** Composed from its sites, by letters and free parameters, in the reference setting. */
function composed(number: number): Crystal {
  const random = randomStructure(number, randomNumbers(number + 3000));
  const { choice } = settingsOf(number)[0]!;
  const group = `${number}${choice ? `:${choice}` : ""}`;
  const crystal = composedCrystal(parseSiteTable(tableOf(random, "parameters", group)));
  expect(crystal.identified.summary.settingName).toBe("reference");
  expect(sitesAnswer(crystal).sites.map((s) => s.referencePosition)).toEqual(
    sitesAnswer(random).sites.map((s) => s.referencePosition),
  );
  return crystal;
}

describe("a structure composed, expanded, written and read back", () => {
  it.each(Array.from({ length: 230 }, (_, i) => i + 1))("is the same, with the same type, type %i", (number) => {
    const crystal = composed(number);
    const kept = atomModel(crystal);
    for (const version of ["1.1", "2.0"] as const) {
      const read = readStructure(cif(listedStructure(kept), version));
      expect(read.identified.number).toBe(number);
      expect(read.disagreements).toEqual([]);
      expect(read.identified.summary.operations).toEqual(crystal.identified.summary.operations);
      expect(sitesAnswer(read).sites.map((s) => s.wyckoff)).toEqual(sitesAnswer(crystal).sites.map((s) => s.wyckoff));
      expectSameAtoms(read, kept, 1e-4);
    }
    const plain = atomModel(crystal, { symmetry: "none", cell: { kind: "primitive" } });
    for (const [format, readBack] of Object.entries(READ_BACK)) {
      const read = readBack(plain);
      expectSameAtoms(read, plain, format === "PDB" ? 4e-3 : 1e-4);
      const found = searchSymmetry(read, { tolerance: 0.02 });
      expect([format, identify(found.exact.operations).number]).toEqual([format, number]);
    }
  });

  it("keeps its symmetry in another cell", () => {
    for (const name of ["calcite", "rutile", "spinel", "urea", "gypsum-c2c", "alpha-quartz"]) {
      const crystal = fixture(name);
      for (const cell of [{ kind: "primitive" }, { kind: "reference" }] as const) {
        const model = atomModel(crystal, { cell });
        const read = readStructure(cif(listedStructure(model)));
        expect(read.identified.number).toBe(crystal.identified.number);
        expect(read.disagreements).toEqual([]);
        expectSameAtoms(read, model, 1e-3);
      }
    }
  });

  it("keeps displacement parameters, s.u., occupancy and disorder", () => {
    const crystal = fixture("potassium-dihydrogen-phosphate");
    const sites = crystal.sites.map((s, i) => ({
      ...s,
      su: [0.0002, 0.00012, null] as const,
      assembly: i === 0 ? "A" : null,
      disorderGroup: i === 0 ? "1" : null,
      displacement:
        i === 0
          ? ({ kind: "isotropic", iso: 0.0123, su: 0.0004 } as const)
          : ({
              kind: "anisotropic",
              u: [0.01, 0.02, 0.03, 0.001, 0, -0.002],
              su: [0.001, 0.001, 0.002, null, null, 0.0011],
            } as const),
    }));
    const read = readStructure(cif(listedStructure(atomModel({ ...crystal, sites }))));
    read.sites.forEach((s, i) => {
      expect([s.label, s.occupancy, s.assembly, s.disorderGroup]).toEqual([
        crystal.sites[i]!.label,
        crystal.sites[i]!.occupancy,
        sites[i]!.assembly,
        sites[i]!.disorderGroup,
      ]);
      expect(s.su[0]).toBeCloseTo(0.0002, 12);
      expect(s.su[1]).toBeCloseTo(0.00012, 12);
      const [d, e] = [s.displacement!, sites[i]!.displacement];
      if (d.kind === "isotropic" && e.kind === "isotropic") expect([d.iso, d.su]).toEqual([e.iso, e.su]);
      else if (d.kind === "anisotropic" && e.kind === "anisotropic") {
        expect(d.u).toEqual(e.u);
        expect(d.su[2]).toBeCloseTo(0.002, 12);
        expect(d.su[3]).toBeNull();
      } else throw new Error("another kind of displacement");
    });
  });
});

describe("coordinate records", () => {
  const model = atomModel(fixture("calcite"), { symmetry: "none" });

  it("of the PDB stand in the columns of the guide", () => {
    const lines = pdbText(coordinateList(model)).split("\n");
    expect(lines[0]).toMatch(/^CRYST1 {4}4\.990 {4}4\.990 {3}17\.061 {2}90\.00 {2}90\.00 120\.00 P 1 {11}1 {10}$/);
    expect(lines[4]).toMatch(
      /^HETATM {4}1 {1}CA1 {2}UNL A {3}1 {7}0\.000 {3}0\.000 {3}0\.000 {2}1\.00 {2}\d\.\d\d {10}CA/,
    );
    expect(lines.at(-2)!.trimEnd()).toBe("END");
  });

  it("of the PDB refuse more atoms than five digits number", () => {
    const large = atomModel(fixture("halite"), {
      symmetry: "none",
      cell: {
        kind: "axes",
        transformation: { P: { n: [24, 0, 0, 0, 24, 0, 0, 0, 24], d: 1 }, p: { n: [0, 0, 0], d: 1 } },
      },
    });
    expect(large.atoms.length).toBe(110_592);
    expect(problemOf(() => pdbText(coordinateList(large))).code).toBe("format-too-small");
  });

  it("name atoms by element where labels do not fit", () => {
    const crystal = fixture("rutile");
    const sites = crystal.sites.map((s) => ({ ...s, label: `${s.label}(long)` }));
    const text = pdbText(coordinateList(atomModel({ ...crystal, sites }, { symmetry: "none" })));
    expect(text).toContain(" TI1  UNL");
    expect(text).toContain(" O1  UNL");
  });

  it("of mmCIF have the items that the dictionary asks for", () => {
    const block = requireClean(readCif(mmcifText(coordinateList(model)))).blocks[0]!;
    const loop = findLoop(block, "_atom_site.Cartn_x")!;
    expect(loop.rowCount).toBe(30);
    for (const name of ["id", "type_symbol", "label_atom_id", "label_alt_id", "label_comp_id", "label_asym_id"]) {
      expect(findLoop(block, `_atom_site.${name}`)).toBe(loop);
    }
  });

  it("of a range claim no cell", () => {
    const range = atomModel(fixture("halite"), {
      range: [
        [0, 1],
        [0, 1],
        [0, 1],
      ],
    });
    const text = extendedXyz(coordinateList(range));
    expect(text.startsWith("27\nProperties=")).toBe(true);
    expect(text).toContain('pbc="F F F"');
    expect(pdbText(coordinateList(range))).toMatch(/^CRYST1 {4}1\.000 {4}1\.000 {4}1\.000 {2}90\.00/);
  });
});

describe("units and asymmetric units", () => {
  it("whole molecules hold together, centroids in the cell", () => {
    for (const [name, size] of [
      ["benzene", 12],
      ["urea", 8],
      ["naphthalene", 18],
    ] as const) {
      const crystal = fixture(name);
      const whole = atomModel(crystal, { wholeUnits: true });
      expect(whole.atoms.length).toBe(atomModel(crystal).atoms.length);
      for (let k = 0; k < whole.atoms.length; k += size) {
        const unit = whole.atoms.slice(k, k + size);
        for (const i of [0, 1, 2]) {
          const mean = unit.reduce((s, a) => s + a.position[i]!, 0) / size;
          expect(mean).toBeGreaterThan(-1e-6);
          expect(mean).toBeLessThan(1);
        }
        for (const a of unit) expect(nearestOf(crystal, a, unit)).toBeLessThan(1.6);
      }
    }
  });

  it("a connected unit has one atom of each site, each bonded to another", () => {
    const crystal = fixture("naphthalene");
    const { atoms } = atomModel(crystal, { content: "connected" });
    expect(atoms.map((a) => a.site)).toEqual(crystal.sites.map((_, i) => i));
    for (const a of atoms) {
      expect(nearestOf(crystal, a, atoms)).toBeLessThan(1.6);
    }
    const read = readStructure(cif(listedStructure(atomModel(crystal, { content: "connected" }))));
    expectSameAtoms(read, atomModel(crystal), 1e-3);
    expect([...cellContents(read.sites)]).toEqual([...cellContents(crystal.sites)]);
  });
});

/** Distance as the atoms stand, without images. */
function nearestOf(crystal: Crystal, a: ExpandedAtom, list: readonly ExpandedAtom[]): number {
  const others = list.filter((b) => b !== a);
  return Math.min(
    ...others.map((b) =>
      lengthOf(
        crystal,
        b.position.map((e, i) => e - a.position[i]!),
      ),
    ),
  );
}

function lengthOf({ metric: { g } }: Crystal, v: readonly number[]): number {
  let sum = 0;
  for (let i = 0; i < 3; i++) for (let j = 0; j < 3; j++) sum += v[i]! * g[3 * i + j]! * v[j]!;
  return Math.sqrt(sum);
}

describe("labels", () => {
  it("of atoms listed without symmetry are never the same", () => {
    const crystal = fixture("rutile");
    const sites = [...crystal.sites, { ...crystal.sites[1]!, ...atom("O_2", "O", [0.1, 0.2, 0.3]) }];
    const { sites: listed } = listedStructure(atomModel({ ...crystal, sites }, { symmetry: "none" }));
    expect(new Set(listed.map((s) => s.label)).size).toBe(listed.length);
  });
});

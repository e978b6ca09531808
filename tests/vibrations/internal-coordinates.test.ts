import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { type MolecularSymmetry, molecularSymmetry, molecularUnits } from "../../lib/structure/index.ts";
import { type SpeciesCounts, splitAnswer } from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";
import { contentOf, molecule } from "../support/molecules.ts";

const ring = (element: string, radius: number, count: number, height = 0, turn = 0) =>
  Array.from({ length: count }, (_, k) => {
    const angle = (2 * Math.PI * k) / count + turn;
    return `${element} ${radius * Math.cos(angle)} ${radius * Math.sin(angle)} ${height}`;
  });

const tetrahedron = ["S 0 0 0", "O 0.85 0.85 0.85", "O 0.85 -0.85 -0.85", "O -0.85 0.85 -0.85", "O -0.85 -0.85 0.85"];
const axes = ["F 1.6 0 0", "F -1.6 0 0", "F 0 1.6 0", "F 0 -1.6 0"];
const octahedron = ["S 0 0 0", ...axes, "F 0 0 1.6", "F 0 0 -1.6"];
const bipyramid = ["P 0 0 0", ...ring("F", 1.53, 3), "F 0 0 1.58", "F 0 0 -1.58"];
const benzene = [...ring("C", 1.39, 6), ...ring("H", 2.47, 6)];
const water = ["O 0 0 0", "H 0.757 0 0.587", "H -0.757 0 0.587"];
const ammonia = ["N 0 0 0.38", ...ring("H", 0.94, 3)];
const ethylene = [
  "C 0 0 0.667",
  "C 0 0 -0.667",
  ..."+ -".split(" ").flatMap((s) => [`H ${s}0.922 0 1.237`, `H ${s}0.922 0 -1.237`]),
];
const crown = [...ring("S", 2.34, 4, 0.5), ...ring("S", 2.34, 4, -0.5, Math.PI / 4)];

/**
 * From memory: E. B. Wilson, J. C. Decius and P. C. Cross, Molecular Vibrations (1955), G. Herzberg, Infrared and Raman
 * Spectra of Polyatomic Molecules (1945), F. A. Cotton, Chemical Applications of Group Theory.
 */
const TEXTBOOK: readonly (readonly [string, readonly string[], number, string, string, string, string])[] = [
  // name, atoms, bond limit, group, stretches, out-of-plane, bends
  ["XY4", tetrahedron, 1.6, "Td", "A1 + T2", "", "E + T2"],
  ["planar XY3", ["C 0 0 0", ...ring("O", 1.29, 3)], 1.5, "D3h", "A1' + E'", "A2''", "E'"],
  ["XY6", octahedron, 1.8, "Oh", "A1g + Eg + T1u", "", "T2g + T1u + T2u"],
  ["square XY4", ["Pt 0 0 0", ...axes], 1.8, "D4h", "A1g + B1g + Eu", "A2u + B2u", "B2g + Eu"],
  ["trigonal bipyramid", bipyramid, 1.8, "D3h", "2A1' + E' + A2''", "", "2E' + A2'' + E''"],
  ["water", water, 1.2, "C2v", "A1 + B2", "", "A1"],
  ["ammonia", ammonia, 1.2, "C3v", "A1 + E", "", "A1 + E"],
];

describe("internal coordinates of molecules as in textbooks (from memory)", () => {
  it.each(TEXTBOOK)("%s", (_, atoms, limit, group, stretch, outOfPlane, bend) => {
    const { schoenflies, kinds } = contentOf(molecule(atoms, limit));
    expect(schoenflies).toBe(group);
    expect(kinds.map((k) => k.independent)).toEqual([stretch, outOfPlane, bend]);
  });

  it.each([
    ["XY4: six angles, of which five can change alone", tetrahedron, 1.6, "A1"],
    ["planar XY3: three angles that add up to 360 degrees", ["C 0 0 0", ...ring("O", 1.29, 3)], 1.5, "A1'"],
    ["XY6: twelve angles for nine bends", octahedron, 1.8, "A1g + Eg"],
    ["XY3 pyramid: none", ammonia, 1.2, ""],
  ])("redundant angles of %s", (_, atoms, limit, redundant) => {
    expect(contentOf(molecule(atoms, limit)).kinds[2]!.redundant).toBe(redundant);
  });

  it("benzene has C-H and C-C stretches of four species each, and a puckering that only torsions describe", () => {
    const { schoenflies, kinds, sets } = contentOf(molecule(benzene, 1.6));
    expect(schoenflies).toBe("D6h");
    const stretches = Object.fromEntries(sets.filter((s) => s.kind === "stretch").map((s) => [s.name, s.species]));
    // B1u holds the C-H stretch and the ring deformation, B2u the alternating C-C stretch (C2' through atoms)
    expect(stretches).toEqual({ "C-C": "A1g + E2g + B2u + E1u", "C-H": "A1g + E2g + B1u + E1u" });
    expect(kinds[1]!.independent).toBe("B2g + E1g + A2u + E2u");
    expect(kinds.map((k) => k.modes)).toEqual([12, 6, 9]); // 3 torsions left of 30: B2g + E2u
  });

  it("ethylene twists about its double bond", () => {
    const { schoenflies, kinds } = contentOf(molecule(ethylene, 1.5));
    expect(schoenflies).toBe("D2h");
    expect(kinds.map((k) => k.modes)).toEqual([5, 2, 4]); // one torsion of 12 left
  });

  it("a crown of eight sulfur atoms has eight stretches, eight bends and two torsions", () => {
    const { schoenflies, kinds } = contentOf(molecule(crown, 2.2));
    expect(schoenflies).toBe("D4d");
    expect(kinds.map((k) => k.independent)).toEqual(["A1 + B1 + E1 + E2 + E3", "", "A1 + B2 + E1 + E2 + E3"]);
  });

  it("an almost planar centre moves out of its plane, whatever its height", () => {
    for (const height of [0, 0.02, 0.09]) {
      const atoms = [`C 0 0 ${height}`, "O 1.29 0 0", "O -0.645 1.117 0", "F -0.675 -1.169 0"];
      expect(contentOf(molecule(atoms, 1.6), "C1").kinds.map((k) => k.modes)).toEqual([3, 1, 2]);
    }
  });
});

test("a ring that is not quite planar keeps its stretches, bends and torsions apart", () => {
  const shift = fc.integer({ min: -30, max: 30 }).map((n) => n / 1000); // angstrom
  fc.assert(
    fc.property(fc.array(shift, { minLength: 36, maxLength: 36 }), (shifts) => {
      const moved = benzene.map((text, k) => {
        const [element, ...numbers] = text.split(" ");
        return [element, ...numbers.map((x, i) => Number(x) + shifts[3 * k + i]!)].join(" ");
      });
      for (const group of [undefined, "C1"]) {
        expect(contentOf(molecule(moved, 1.7), group).kinds.map((k) => k.modes)).toEqual([12, 6, 9]);
      }
    }),
    { numRuns: 40 },
  );
});

describe("the content of a unit", () => {
  const NAMES = ["calcite", "gypsum", "benzene", "urea", "alpha-sulfur", "carbon-dioxide", "realgar", "chalcanthite"];

  it.each(NAMES)("in %s accounts for every internal mode once", (name) => {
    for (const unit of splitAnswer(fixture(name)).units) {
      const sum: Record<string, number> = {};
      for (const m of unit.internal)
        for (const [label, n] of Object.entries(m.factorGroup)) sum[label] = (sum[label] ?? 0) + n * m.count;
      expect(added(unit.kinds.map((k) => k.factorGroup))).toEqual(sum);
      for (const c of Object.values(unit.content))
        for (const n of Object.values(c)) expect(n).toBeGreaterThanOrEqual(0);
    }
  });

  it.each(NAMES)("in %s has as many modes of each kind in every group of the unit", (name) => {
    for (const unit of molecularUnits(fixture(name)).units) {
      const symmetry: MolecularSymmetry = molecularSymmetry(unit);
      if (symmetry.kind === "linear") continue;
      const alone = {
        ...unit,
        site: {
          operations: unit.site.operations.slice(0, 1),
          matrices: unit.site.matrices.slice(0, 1),
          permutations: unit.site.permutations.slice(0, 1),
        },
      };
      const places = unit.atoms.map((a, k) => ({ ...a, cartesian: symmetry.idealised[k]! }));
      const modes = (lowerTo?: string) => contentOf({ ...alone, atoms: places }, lowerTo).kinds.map((k) => k.modes);
      expect(modes("C1")).toEqual(modes());
    }
  });

  it("names bends, stretches and librations of water", () => {
    const water = splitAnswer(fixture("gypsum")).units.find((u) => u.formula === "H2O")!;
    expect(water.content).toEqual({
      A1: { stretch: 1, outOfPlane: 0, bend: 1, torsion: 0 },
      B2: { stretch: 1, outOfPlane: 0, bend: 0, torsion: 0 },
    });
    // molecule in the plane of y and z: it rocks about x, wags about y, twists about z
    expect(water.librationsBySpecies.map((l) => [l.name, l.species])).toEqual([
      ["twist", "A2"],
      ["wag", "B1"],
      ["rock", "B2"],
    ]);
  });

  it("of a linear unit: stretches along the axis, bends across", () => {
    const [unit] = splitAnswer(fixture("carbon-dioxide")).units;
    expect(unit!.kinds.map((k) => [k.kind, k.free])).toEqual([
      ["stretch", { "Sigmag+": 1, "Sigmau+": 1 }],
      ["bend", { Piu: 1 }],
    ]);
    expect(unit!.coordinates.map((c) => [c.name, c.count])).toEqual([
      ["C-O", 2],
      ["O-C-O", 2],
    ]);
    expect(unit!.librationsBySpecies.map((l) => l.species)).toEqual(["Pig"]);
  });
});

test("the number of stretches and bends does not depend on how a molecule lies in space", () => {
  const angle = fc.double({ min: 0, max: 6.28, noNaN: true });
  fc.assert(
    fc.property(angle, angle, fc.constantFrom(...TEXTBOOK), (p, q, [, atoms, limit, , ...expected]) => {
      const turned = atoms.map((text) => {
        const [element, ...numbers] = text.split(" ");
        const [x, y, z] = numbers.map(Number) as [number, number, number];
        const [a, b] = [x * Math.cos(p) - y * Math.sin(p), x * Math.sin(p) + y * Math.cos(p)];
        return `${element} ${a} ${b * Math.cos(q) - z * Math.sin(q)} ${b * Math.sin(q) + z * Math.cos(q)}`;
      });
      const [stretch, outOfPlane, bend] = contentOf(molecule(turned, limit)).kinds.map((k) => k.independent);
      // B1 and B2 of water and the like may change places with the frame
      const open = (s: string | undefined) => s?.replace(/\bB[123]/g, "B");
      expect([stretch, outOfPlane, bend].map(open)).toEqual(expected.map(open));
    }),
    { numRuns: 60 },
  );
});

function added(list: readonly SpeciesCounts[]): SpeciesCounts {
  const sum: Record<string, number> = {};
  for (const counts of list) for (const [label, n] of Object.entries(counts)) sum[label] = (sum[label] ?? 0) + n;
  return sum;
}

import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { apply3, type Crystal, crystalOf, parseShellPattern, type Vec3 } from "../../lib/structure/index.ts";
import {
  factorGroupModes,
  type PolyhedraAnswer,
  polyhedraAnswer,
  type SpeciesCounts,
} from "../../lib/vibrations/index.ts";
import { fixture, inSetting } from "../support/crystals.ts";
import { problemOf } from "../support/problem-of.ts";

const answers = (name: string, ...centres: string[]) => polyhedraAnswer(fixture(name), centres.map(parseShellPattern));

/** Stretches and bends that the ideal polyhedron has, and the optic modes that hold them in the crystal. */
function content(answer: PolyhedraAnswer) {
  const sum = (counts: SpeciesCounts) =>
    Object.entries(counts)
      .map(([label, n]) => (n > 1 ? n : "") + label)
      .join(" + ");
  const [first] = answer.polyhedra;
  return {
    shape: `${first!.formula} ${first!.pointGroup} ${first!.count}`,
    free: first!.kinds.map((k) => sum(k.free)),
    site: first!.kinds.map((k) => sum(k.site)),
    crystal: answer.kinds.map((k) => sum(k.independent)),
    rest: sum(answer.rest),
  };
}

describe("coordination polyhedra in crystals", () => {
  it("of rutile: octahedra that share edges; A1g and B2g stretch, A2g and B1g bend", () => {
    // of the 11 optic bands A1g and B2g are stretches and B1g a rotation of the oxygen square about c:
    // J. G. Traylor, H. G. Smith, R. M. Nicklow, M. K. Wilkinson, Phys. Rev. B 3 (1971) 3457, from memory
    const { shape, free, site, crystal, rest } = content(answers("rutile", "Ti"));
    expect(shape).toBe("TiO6 Oh 2");
    expect(free).toEqual(["A1g + Eg + T1u", "T2g + T1u + T2u"]);
    expect(site[0]).toBe("2Ag + B3g + B1u + B2u + B3u");
    expect(crystal).toEqual(["A1g + B2g + Eg + A2u + B1u + 2Eu", "A2g + B1g + B1u + Eu"]);
    expect(rest).toBe("");
  });

  it("of quartz: 12 bonds of three tetrahedra make 12 stretches, none redundant", () => {
    // sites of symmetry 2 on the twofold axes of 32: 2A + 2B become 2A1 + 2A2 + 4E (on paper)
    const { shape, site, crystal } = content(answers("alpha-quartz", "Si"));
    expect(shape).toBe("SiO4 Td 3");
    expect(site).toEqual(["2A + 2B", "3A + 2B"]);
    expect(crystal).toEqual(["2A1 + 2A2 + 4E", "2A1 + 2A2 + 4E"]);
  });

  it("of perovskite SrTiO3: at k = 0 the octahedron breathes in no optic mode", () => {
    // opposite bonds share their oxygen with the next cell: of A1g + Eg + T1u only T1u is left; 3T1u + T2u are optic
    const { shape, crystal, rest } = content(answers("strontium-titanate", "Ti"));
    expect(shape).toBe("TiO6 Oh 1");
    expect(crystal).toEqual(["T1u", "T1u + T2u"]);
    expect(rest).toBe("T1u"); // Sr against the framework
    expect(content(answers("strontium-titanate", "Sr")).shape).toBe("SrO12 Oh 1");
  });

  it("of spinel: both kinds at once, the first asked for first", () => {
    const answer = answers("spinel", "Mg", "Al");
    expect(answer.polyhedra.map((p) => [p.formula, p.pointGroup, p.schoenflies])).toEqual([
      ["MgO4", "Td", "Td"],
      ["AlO6", "Oh", "D3d"],
    ]);
    // A1 + T2 at the two centres of 43m in m3m: A1g + A2u and T2g + T1u (on paper)
    expect(answer.coordinates[0]!.species).toEqual({ A1g: 1, A2u: 1, T2g: 1, T1u: 1 });
  });

  it.each([
    ["fluorite", "Ca", "CaF8", "Oh"],
    ["halite", "Na", "NaCl6", "Oh"],
    ["wurtzite", "Zn", "ZnS4", "Td"],
    ["diamond", "C", "CC4", "Td"],
    ["molybdenite-2h", "Mo", "MoS6", "D3h"],
    ["cinnabar", "Hg", "HgS2", "Dinfh"],
    ["tenorite", "Cu", "CuO4", "D4h"],
    ["chalcanthite", "Cu1", "CuO6", "D4h"],
    ["calcite", "Ca", "CaO6", "Oh"],
    ["calcite", "C", "CO3", "D3h"],
    ["aragonite", "Ca", "CaO9", "Cs"],
    ["zircon", "Zr", "ZrO8", "D2d"],
    ["corundum", "Al", "AlO6", "Oh"],
    ["pyrite", "Fe", "FeS6", "Oh"],
    ["pyrite", "S", "SFe3S", "C3v"],
    ["gypsum", "Ca", "CaO8", "D2d"],
  ])("%s: the first shell of %s is %s, ideally %s", (name, centre, formula, group) => {
    const [p] = answers(name, centre).polyhedra;
    expect([p!.formula, p!.pointGroup]).toEqual([formula, group]);
  });

  it("a distance after the centre widens or narrows the shell", () => {
    expect(answers("cinnabar", "Hg<3.2").polyhedra[0]!.formula).toBe("HgS4");
    expect(answers("barium-titanate", "Ti<1.9").polyhedra[0]!.formula).toBe("TiO");
  });

  it("tells names that mean nothing, and empty shells", () => {
    expect(problemOf(() => answers("rutile", "Zr")).code).toBe("polyhedron-name-unknown");
    expect(problemOf(() => answers("rutile", "Ti<1")).code).toBe("polyhedron-empty");
  });
});

/** Rank by elimination with row and column choice: slow, plain. */
function rankOf(matrix: number[][]): number {
  let rank = 0;
  const rows = matrix.map((r) => [...r]);
  for (;;) {
    let best = { i: -1, j: -1, size: 1e-6 };
    for (let i = rank; i < rows.length; i++)
      rows[i]!.forEach((e, j) => {
        if (Math.abs(e) > best.size) best = { i, j, size: Math.abs(e) };
      });
    if (best.i < 0) return rank;
    [rows[rank], rows[best.i]] = [rows[best.i]!, rows[rank]!];
    const pivot = rows[rank]!;
    for (let i = rank + 1; i < rows.length; i++) {
      const f = rows[i]![best.j]! / pivot[best.j]!;
      rows[i] = rows[i]!.map((e, j) => (j === best.j ? 0 : e - f * pivot[j]!));
    }
    rank++;
  }
}

/** Stretches of all bonds of a primitive cell, found by trying every translation: independent of the code under test. */
function stretchRows(crystal: Crystal, centre: string, ligand: string, longest: number): number[][] {
  const atoms = crystal.sites.flatMap((s) => s.images.map((i) => ({ element: s.element, position: i.position })));
  const rows: number[][] = [];
  const range = [-2, -1, 0, 1, 2];
  atoms.forEach((a, i) => {
    atoms.forEach((b, j) => {
      if (a.element !== centre || b.element !== ligand) return;
      for (const u of range)
        for (const v of range)
          for (const w of range) {
            const d = [u, v, w].map((t, k) => b.position[k]! + t - a.position[k]!) as unknown as Vec3;
            const e = apply3(crystal.metric.toCartesian, d);
            const length = Math.hypot(...e);
            if (length > longest + 1e-6) continue;
            const row = new Array<number>(3 * atoms.length).fill(0);
            e.forEach((x, k) => {
              row[3 * i + k]! -= x / length;
              row[3 * j + k]! += x / length;
            });
            rows.push(row);
          }
    });
  });
  return rows;
}

describe("independent stretches at k = 0", () => {
  it.each([
    ["rutile", "Ti", "O"],
    ["alpha-quartz", "Si", "O"],
    ["strontium-titanate", "Ti", "O"],
    ["strontium-titanate", "Sr", "O"],
    ["barium-titanate", "Ti", "O"],
    ["wurtzite", "Zn", "S"],
    ["aragonite", "Ca", "O"],
    ["niter", "K", "O"],
    ["forsterite-pnma", "Si", "O"],
    ["litharge", "Pb", "O"],
  ])("of %s (%s-%s) are as many as the rank of all bonds", (name, centre, ligand) => {
    const crystal = fixture(name);
    const answer = answers(name, centre);
    const { group } = factorGroupModes(crystal);
    const dimension = (label: string) =>
      group.irreps.find((r) => r.label === label)?.dimension ?? (/^E/.test(label) ? 2 : /^T/.test(label) ? 3 : 1);
    const modes = Object.entries(answer.kinds[0]!.independent).reduce((n, [label, k]) => n + k * dimension(label), 0);
    const longest = Math.max(...answer.polyhedra.map((p) => p.longest));
    expect(modes).toBe(rankOf(stretchRows(crystal, centre, ligand, longest)));
  });
});

const CASES: readonly (readonly [string, readonly string[]])[] = [
  ["rutile", ["Ti"]],
  ["calcite", ["Ca", "C"]],
  ["spinel", ["Mg", "Al"]],
  ["corundum", ["Al"]],
  ["gypsum", ["Ca", "S"]],
  ["wurtzite", ["Zn"]],
];

test("the content does not depend on the origin or on the order of the sites", () => {
  const shift = fc.tuple(
    ...([0, 1, 2].map(() => fc.integer({ min: 0, max: 23 })) as [
      fc.Arbitrary<number>,
      fc.Arbitrary<number>,
      fc.Arbitrary<number>,
    ]),
  );
  fc.assert(
    fc.property(fc.constantFrom(...CASES), shift, fc.boolean(), ([name, centres], p, reversed) => {
      const original = fixture(name);
      const moved = inSetting(original, { P: { n: [1, 0, 0, 0, 1, 0, 0, 0, 1], d: 1 }, p: { n: p, d: 24 } })!;
      const { group, metric } = moved;
      const sites = reversed ? [...moved.sites].reverse() : moved.sites;
      const patterns = centres.map(parseShellPattern);
      const there = polyhedraAnswer(crystalOf({ name, group, metric, sites }), patterns);
      const here = polyhedraAnswer(original, patterns);
      expect(there.kinds).toEqual(here.kinds);
      expect(there.rest).toEqual(here.rest);
      expect(there.polyhedra.map((q) => [q.formula, q.kinds])).toEqual(here.polyhedra.map((q) => [q.formula, q.kinds]));
    }),
    { numRuns: 12 },
  );
});

test("acoustic modes, stretches, bends and the rest are all modes", () => {
  for (const [name, centres] of CASES) {
    const answer = answers(name, ...centres);
    const crystal = fixture(name);
    const { frames } = crystal.identified;
    for (const s of factorGroupModes(crystal, frames.own ?? frames.reference).species) {
      const held = answer.kinds.reduce((n, k) => n + (k.independent[s.label] ?? 0), 0);
      expect(held + (answer.rest[s.label] ?? 0) + s.acoustic).toBe(s.total);
      expect(answer.rest[s.label] ?? 0).toBeGreaterThanOrEqual(0);
    }
  }
});

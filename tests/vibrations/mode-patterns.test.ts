import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { ratMat3, ratVec3 } from "../../lib/algebra/index.ts";
import { irrepMatrices } from "../../lib/representation/index.ts";
import { apply3, type Crystal, crystalOf, inverse3, multiply3, type Vec3 } from "../../lib/structure/index.ts";
import { type Operation, transformPoint } from "../../lib/symmetry/index.ts";
import {
  factorGroupModes,
  type ModePattern,
  type ModePatterns,
  modePatterns,
  opticPatterns,
  patternsAnswer,
} from "../../lib/vibrations/index.ts";
import { atom, fixture, inSetting } from "../support/crystals.ts";
import { problemOf } from "../support/problem-of.ts";
import { randomNumbers, randomStructure } from "../support/random-structures.ts";

/** A random structure of any space-group type, atoms on special positions among them. */
const structure = fc
  .record({ type: fc.integer({ min: 1, max: 230 }), seed: fc.integer({ min: 0, max: 1e6 }) })
  .map(({ type, seed }) => randomStructure(type, randomNumbers(seed)));

/** Displacements of all atoms, one vector per partner. */
function spread({ atoms }: ModePatterns, pattern: ModePattern): Float64Array[] {
  return pattern.partners.map((partner) => {
    const whole = new Float64Array(3 * atoms.length);
    pattern.atoms.forEach((a, k) => {
      for (let c = 0; c < 3; c++) whole[3 * a + c] = partner[3 * k + c]!;
    });
    return whole;
  });
}

function product(u: Float64Array, v: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < u.length; i++) sum += u[i]! * v[i]!;
  return sum;
}

/** Finds the atom at a point, modulo the lattice and its centrings; -1 where there is none. */
function atomFinder({ group }: Crystal, { atoms }: ModePatterns): (point: Vec3) => number {
  const all = atoms.flatMap((a, index) =>
    group.centrings.map(({ n, d }) => ({ index, x: a.position.map((e, i) => e + n[i]! / d) })),
  );
  const near = (x: number, y: number) => Math.abs(x - y - Math.round(x - y)) < 1e-6;
  return ([u, v, w]) => all.find(({ x }) => near(x[0]!, u) && near(x[1]!, v) && near(x[2]!, w))?.index ?? -1;
}

/** Displacements carried along by an operation, from positions and the metric alone. */
function carry(all: ModePatterns, atomAt: (point: Vec3) => number, a: Operation): (u: Float64Array) => Float64Array {
  const { toCartesian } = all.frame;
  const R = multiply3(toCartesian, multiply3(a.W, inverse3(toCartesian)));
  const images = all.atoms.map((atom) => atomAt(transformPoint(a, atom.position)));
  expect(images).not.toContain(-1);
  return (u) => {
    const v = new Float64Array(u.length);
    for (const [k, image] of images.entries()) v.set(apply3(R, [u[3 * k]!, u[3 * k + 1]!, u[3 * k + 2]!]), 3 * image);
    return v;
  };
}

/** Largest deviation from orthonormality and from (image of partner i) = sum of D_ji times partner j. */
function deviation(crystal: Crystal, all: ModePatterns, patterns: readonly ModePattern[]): number {
  const vectors = patterns.map((p) => spread(all, p));
  const flat = vectors.flat();
  let worst = 0;
  flat.forEach((u, i) => {
    for (let j = 0; j <= i; j++) worst = Math.max(worst, Math.abs(product(u, flat[j]!) - (i === j ? 1 : 0)));
  });
  const D = all.group.irreps.map((_, irrep) => irrepMatrices(all.group, irrep));
  const atomAt = atomFinder(crystal, all);
  crystal.group.representatives.forEach((a, g) => {
    const carried = carry(all, atomAt, a);
    patterns.forEach((p, r) => {
      vectors[r]!.forEach((u, i) => {
        const image = carried(u);
        vectors[r]!.forEach((v, j) => {
          const factor = D[p.irrep]![g]![j]![i]!;
          for (let k = 0; k < image.length; k++) image[k] = image[k]! - factor * v[k]!;
        });
        worst = Math.max(worst, Math.sqrt(product(image, image)));
      });
    });
  });
  return worst;
}

describe("mode patterns", () => {
  test("of random crystals of all types are orthonormal, complete, and transform by the matrices of their species", () => {
    fc.assert(
      fc.property(structure, (crystal) => {
        const all = modePatterns(crystal);
        expect(deviation(crystal, all, all.patterns)).toBeLessThan(1e-9);
        const modes = factorGroupModes(crystal, all.frame.labels);
        const count = (irrep: number) => all.patterns.filter((p) => p.irrep === irrep).length;
        expect(all.group.irreps.map((_, i) => count(i))).toEqual(modes.species.map((s) => s.total));
        modes.sites.forEach((site, s) => {
          const reached = all.group.irreps.map(
            (_, i) => all.patterns.filter((p) => p.irrep === i && p.sites[0] === s).length,
          );
          expect(reached).toEqual(site.contributions);
        });
      }),
      { numRuns: 30 },
    );
  });

  test("hold the rigid translations, which can be taken out", () => {
    fc.assert(
      fc.property(structure, (crystal) => {
        const all = modePatterns(crystal);
        const n = all.atoms.length;
        const found = all.acoustic.flatMap(({ directions, terms }) =>
          directions.map((direction, q) => {
            const sum = new Float64Array(3 * n);
            for (const t of terms) {
              const vectors = spread(all, all.patterns[t.pattern]!);
              const turned = t.turned === 0 ? null : q === 0 ? vectors[1]! : vectors[0]!.map((e) => -e);
              for (let k = 0; k < 3 * n; k++) sum[k]! += t.factor * vectors[q]![k]! + t.turned * (turned?.[k] ?? 0);
            }
            const errors = sum.map((e, k) => Math.abs(e - direction[k % 3]! / Math.sqrt(n)));
            expect(Math.max(...errors)).toBeLessThan(1e-9);
            return direction;
          }),
        );
        expect(found).toHaveLength(3);
        const optic = opticPatterns(all);
        expect(deviation(crystal, all, optic)).toBeLessThan(1e-9);
        for (const u of optic.flatMap((p) => spread(all, p))) {
          for (let c = 0; c < 3; c++) expect(u.reduce((s, e, k) => (k % 3 === c ? s + e : s), 0)).toBeCloseTo(0, 9);
        }
        const { species } = factorGroupModes(crystal, all.frame.labels);
        const count = (irrep: number) => optic.filter((p) => p.irrep === irrep).length;
        expect(species.map((_, i) => count(i))).toEqual(species.map((s) => s.optic));
      }),
      { numRuns: 30 },
    );
  });

  /** Projection onto the displacements of one partner of a species (of all partners of a pair of complex species). */
  function projection(all: ModePatterns, irrep: number, partner: number): (u: Float64Array) => Float64Array {
    const paired = all.group.irreps[irrep]!.norm === 2;
    const basis = all.patterns
      .filter((p) => p.irrep === irrep)
      .flatMap((p) => spread(all, p).filter((_, q) => paired || q === partner));
    return (u) => {
      const sum = new Float64Array(u.length);
      for (const v of basis) {
        const factor = product(v, u);
        for (let k = 0; k < u.length; k++) sum[k]! += factor * v[k]!;
      }
      return sum;
    };
  }

  test("span the same spaces whatever the order of the atoms, the atom listed, and the origin", () => {
    const shift = fc.tuple(fc.nat(23), fc.nat(23), fc.nat(23));
    fc.assert(
      fc.property(structure, fc.infiniteStream(fc.nat(1e6)), shift, (crystal, numbers, p) => {
        const draw = (n: number) => numbers.next().value! % n;
        const listed = crystal.sites.map((s) => ({ ...s, position: s.images[draw(s.images.length)]!.position }));
        const order = listed.map((s) => ({ s, key: draw(1e6) })).sort((a, b) => a.key - b.key);
        const { metric, group } = crystal;
        const shuffled = crystalOf({ name: "", metric, group, sites: order.map((o) => o.s), tolerance: 0.01 });
        const moved = inSetting(shuffled, { P: ratMat3([1, 0, 0, 0, 1, 0, 0, 0, 1]), p: ratVec3(p, 24) })!;
        const [before, after] = [modePatterns(crystal), modePatterns(moved)];
        const atomAt = atomFinder(crystal, before);
        const there = after.atoms.map((a) => {
          const point = a.position.map((x, i) => x + p[i]! / 24) as unknown as Vec3;
          return atomAt(point);
        });
        expect(new Set(there).size).toBe(before.atoms.length);
        const probe = Float64Array.from({ length: 3 * there.length }, () => draw(100) - 50);
        const probeThere = new Float64Array(probe.length);
        for (const [i, k] of there.entries()) probeThere.set(probe.subarray(3 * k, 3 * k + 3), 3 * i);
        before.group.irreps.forEach((r, irrep) => {
          for (let partner = 0; partner < (r.norm === 2 ? 1 : r.dimension); partner++) {
            const expected = projection(before, irrep, partner)(probe);
            const found = projection(after, irrep, partner)(probeThere);
            there.forEach((k, i) => {
              for (let c = 0; c < 3; c++) expect(found[3 * i + c]!).toBeCloseTo(expected[3 * k + c]!, 6);
            });
          }
        });
      }),
      { numRuns: 30 },
    );
  });
});

describe("the answer on mode patterns", () => {
  test("has closed forms wherever the axes are at right angles or at 120 degrees", () => {
    fc.assert(
      fc.property(structure, fc.boolean(), (crystal, optic) => {
        const answer = patternsAnswer(crystal, { optic });
        for (const p of answer.patterns) {
          expect(p.exact).not.toBeNull();
          const scale = Math.sqrt(p.exact!.norm);
          const errors = p.partners.flatMap((partner, q) =>
            partner.flatMap((u, k) => u.map((e, c) => Math.abs(rootOf(p.exact!.coefficients[q]![k]![c]!) / scale - e))),
          );
          expect(Math.max(...errors)).toBeLessThan(1e-12);
        }
      }),
      { numRuns: 30 },
    );
  });

  it("keeps to the site and the species asked for, also written otherwise", () => {
    const answer = patternsAnswer(fixture("calcite"), { site: "C1", species: "a_2g" });
    expect(answer.patterns.map((p) => [p.irrep, p.sites])).toEqual([["A2g", ["C1"]]]);
    expect(patternsAnswer(fixture("spinel"), { species: "F2g" }).patterns.every((p) => p.irrep === "T2g")).toBe(true);
  });

  it("tells which sites and species there are", () => {
    expect(problemOf(() => patternsAnswer(fixture("halite"), { site: "K" })).hint).toBe("The sites are Na, Cl.");
    expect(problemOf(() => patternsAnswer(fixture("rutile"), { species: "T2g" })).hint).toMatch(/A1g, A2g, B1g/);
  });

  it("lets atoms that share a position move as one", () => {
    const halite = fixture("halite");
    const sites = [...halite.sites, atom("K", "K", halite.sites[0]!.position, 0.1)];
    const mixed = crystalOf({ name: "", metric: halite.metric, group: halite.group, sites });
    const answer = patternsAnswer(mixed, { site: "K" });
    expect(answer.patterns.map((p) => p.sites)).toEqual([["Na+K"]]);
  });
});

/** Value of `2sqrt3`, `-1`, `0`. */
function rootOf(text: string): number {
  const [, sign, factor, root] = /^(-?)(\d*)(?:sqrt(\d+))?$/.exec(text)!;
  return (sign ? -1 : 1) * Number(factor || 1) * Math.sqrt(Number(root ?? 1));
}

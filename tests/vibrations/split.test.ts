import fc from "fast-check";
import { beforeAll, describe, expect, test } from "vitest";
import { multiplyRatMat, type RatMat3, ratMat3, ratVec3 } from "../../lib/algebra/index.ts";
import { type AxisFrame, decompose } from "../../lib/representation/index.ts";
import { type Crystal, crystalOf, inverse3, molecularSymmetry, molecularUnits } from "../../lib/structure/index.ts";
import {
  correlateUnit,
  factorGroupModes,
  type InternalMode,
  type SpeciesCounts,
  type SplitAnswer,
  splitAnswer,
  type UnitAnswer,
} from "../../lib/vibrations/index.ts";
import { unitCharacters } from "../oracle/unit-characters.ts";
import { inSetting, unimodular } from "../support/crystals.ts";
import { type MolecularCrystal, molecularCrystal } from "../support/molecular-crystals.ts";

interface Case extends MolecularCrystal {
  readonly seed: number;
  readonly answer: SplitAnswer;
}

/** Molecules of eighteen shapes and metal atoms on positions of some fifty space-group types, with their answers. */
const cases: Case[] = [];
beforeAll(() => {
  for (const seed of fc.sample(fc.integer({ min: 0, max: 1e6 }), 200)) {
    const made = molecularCrystal(seed);
    cases.push({ seed, ...made, answer: splitAnswer(made.crystal) });
  }
});

/** Runs a check on every crystal; a failure names the seed of its crystal. */
function onEveryCrystal(check: (c: Case) => void): void {
  expect(cases).toHaveLength(200);
  for (const c of cases) {
    try {
      check(c);
    } catch (e) {
      if (e instanceof Error) e.message = `crystal ${c.seed}: ${e.message}`;
      throw e;
    }
  }
}

const twentyFourths = fc.integer({ min: 0, max: 23 });
const shift = fc.tuple(twentyFourths, twentyFourths, twentyFourths);

/** The unit that a label of the support belongs to: `O1c` is an atom of unit 1. */
const unitNumber = (labels: readonly string[]): number => Number(/\d+/.exec(labels[0]!)![0]);

function added(list: readonly SpeciesCounts[]): SpeciesCounts {
  const sum: Record<string, number> = {};
  for (const counts of list) for (const [label, n] of Object.entries(counts)) sum[label] = (sum[label] ?? 0) + n;
  return sum;
}

function parseSum(text: string): SpeciesCounts {
  return Object.fromEntries(text.split(" + ").map((t) => [t.replace(/^\d/, ""), Number(/^\d/.exec(t)?.[0] ?? 1)]));
}

const times = (n: number, counts: SpeciesCounts): SpeciesCounts =>
  Object.fromEntries(Object.entries(counts).map(([label, k]) => [label, n * k]));

/** Numbers of modes, from numbers of species. */
function modesOf(counts: SpeciesCounts, dimensions: ReadonlyMap<string, number>): number {
  return Object.entries(counts).reduce((sum, [label, n]) => sum + n * dimensions.get(label)!, 0);
}

function dimensionsIn(crystal: Crystal): Map<string, number> {
  return new Map(factorGroupModes(crystal).species.map((s) => [s.label, s.dimension]));
}

const freeDimension = (label: string): number => ({ E: 2, P: 2, T: 3 })[label[0]!] ?? 1;

describe("the motions of molecules in random crystals", () => {
  test("are those of the free molecule: its group, 3n - 6 or 3n - 5 internal modes, species as in textbooks", () => {
    onEveryCrystal(({ crystal, placed, answer }) => {
      const { units, loneAtoms, extended } = answer;
      expect(extended).toEqual([]);
      expect(units.length + loneAtoms.length).toBe(placed.length);
      for (const unit of units) {
        const { shape, siteOrder } = placed[unitNumber(unit.labels)]!;
        const n = shape!.atoms.length;
        expect(unit.pointGroup).toBe(shape!.group);
        expect(unit.count * siteOrder).toBe(crystal.group.representatives.length);
        const internal = added(unit.internal.map((m) => ({ [m.species]: m.count })));
        expect(internal).toEqual(parseSum(shape!.internal));
        const modes = Object.entries(internal).reduce((s, [label, k]) => s + k * freeDimension(label), 0);
        expect(modes).toBe(3 * n - (shape!.linear ? 5 : 6));
      }
    });
  });

  test("add up: no mode is lost between molecule, site and factor group, and all together are 3N", () => {
    onEveryCrystal(({ crystal, placed, answer }) => {
      const { units, loneAtoms, sums } = answer;
      const dimensions = dimensionsIn(crystal);
      const inFactorGroup = (counts: SpeciesCounts) => modesOf(counts, dimensions);
      for (const unit of units) {
        for (const m of unit.internal) {
          expect(inFactorGroup(m.factorGroup)).toBe(unit.count * freeDimension(m.species));
          expect(m.factorGroup).toEqual(throughSite(unit, m.site));
          expect(m.factorGroupLevels).toBeGreaterThanOrEqual(m.siteLevels);
          if (unit.count === 1) expect(m.factorGroupLevels).toBe(m.siteLevels);
        }
        const { shape } = placed[unitNumber(unit.labels)]!;
        expect(inFactorGroup(unit.translations.factorGroup)).toBe(3 * unit.count);
        expect(inFactorGroup(unit.librations.factorGroup)).toBe((shape!.linear ? 2 : 3) * unit.count);
      }
      const internal = units.flatMap((u) => u.internal.map((m) => times(m.count, m.factorGroup)));
      expect(sums.internal).toEqual(added(internal));
      expect(sums.librations).toEqual(added(units.map((u) => u.librations.factorGroup)));
      const lone = loneAtoms.map((a) => a.factorGroup);
      expect(sums.translations).toEqual(added([...units.map((u) => u.translations.factorGroup), ...lone]));
      const total = added([sums.internal, sums.librations, sums.translations]);
      const atoms = crystal.sites.reduce((s, site) => s + site.images.length, 0) / crystal.group.centrings.length;
      expect(inFactorGroup(total)).toBe(3 * atoms);
      const oneByOne = factorGroupModes(crystal).species.filter((s) => s.total > 0);
      expect(total).toEqual(Object.fromEntries(oneByOne.map((s) => [s.label, s.total])));
    });
  });

  test("have the characters that counting molecules, axes and atoms by hand gives", () => {
    onEveryCrystal((made) => {
      const { sums } = made.answer;
      const { group } = factorGroupModes(made.crystal);
      const counts = (characters: readonly number[]) =>
        Object.fromEntries(
          decompose(group, characters).flatMap((n, i) => (n > 0 ? [[group.irreps[i]!.label, n]] : [])),
        );
      const { translations, librations, all } = unitCharacters(made);
      expect(sums.translations).toEqual(counts(translations));
      expect(sums.librations).toEqual(counts(librations));
      expect(sums.internal).toEqual(counts(all.map((c, g) => c - translations[g]! - librations[g]!)));
    });
  });

  test("that the free molecule shows stay visible, with a band for every level of the site", () => {
    onEveryCrystal(({ answer }) => {
      const { units, activity } = answer;
      const bands = (m: InternalMode, kind: "infrared" | "raman") =>
        activity.reduce((s, a) => s + (a[kind] ? (m.factorGroup[a.label] ?? 0) : 0), 0);
      for (const unit of units) {
        for (const m of unit.internal) {
          expect([m.infrared, m.raman]).toEqual([bands(m, "infrared"), bands(m, "raman")]);
          // the vector (or tensor) of the molecule holds that of the site, and that of the factor group restricts to it
          if (m.free.infrared) expect(m.infrared).toBeGreaterThanOrEqual(m.siteLevels);
          if (m.free.raman) expect(m.raman).toBeGreaterThanOrEqual(m.siteLevels);
          if (unit.siteSymmetry === "-1") expect([m.infrared === 0, m.raman === 0]).toContain(true);
          // a molecule on no symmetry element has bands of both kinds from every mode
          if (unit.siteSymmetry === "1") expect(Math.min(m.infrared, m.raman)).toBeGreaterThan(0);
        }
      }
    });
  });
});

describe("the result does not depend on", () => {
  test("the origin and the order of the atoms", () => {
    const moves = fc.sample(fc.tuple(shift, fc.infiniteStream(fc.nat())), 200);
    onEveryCrystal(({ crystal, answer }) => {
      const [p, keys] = moves.pop()!;
      const result = summary(answer);
      const P = ratMat3([1, 0, 0, 0, 1, 0, 0, 0, 1]);
      expect(summary(splitAnswer(inSetting(crystal, { P, p: ratVec3(p, 24) })!))).toEqual(result);
      const shuffled = crystal.sites
        .map((site) => ({ site, key: keys.next().value! }))
        .sort((a, b) => a.key - b.key)
        .map((s) => s.site);
      expect(summary(splitAnswer(crystalOf({ ...partsOf(crystal), sites: shuffled })))).toEqual(result);
    });
  });

  test("the setting, with the axes of the labels carried along", () => {
    const settings = fc.sample(fc.tuple(unimodular, shift, fc.boolean()), 200);
    onEveryCrystal(({ crystal }) => {
      const [U, p, primitive] = settings.pop()!;
      const P: RatMat3 = primitive ? multiplyRatMat(crystal.group.primitive, ratMat3(U)) : ratMat3(U);
      const moved = inSetting(crystal, { P, p: ratVec3(p, 24) })!;
      const own: AxisFrame = { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] };
      expect(correlated(moved, carriedFrame(P))).toEqual(correlated(crystal, own));
    });
  });
});

/** Species of the factor group of some species of the site, by the table that the answer gives. */
function throughSite(unit: UnitAnswer, site: SpeciesCounts): SpeciesCounts {
  return added(unit.siteToFactorGroup.flatMap((s) => (site[s.site] ? [times(site[s.site]!, s.factorGroup)] : [])));
}

/** All of an answer that has no origin and no order; what names a site group may turn with the molecule chosen. */
function summary({ units, loneAtoms, sums, factorGroup }: SplitAnswer) {
  return {
    sums,
    factorGroup,
    lone: byLabels(loneAtoms.map((a) => ({ ...a, labels: [a.label] }))),
    units: byLabels(
      units.map((u) => ({
        ...{ formula: u.formula, labels: [...u.labels].sort(), count: u.count, pointGroup: u.pointGroup },
        internal: u.internal.map(({ site, ...rest }) => ({ ...rest, levels: Object.values(site).sort() })),
        translations: u.translations.factorGroup,
        librations: u.librations.factorGroup,
        free: [u.translations.free, u.librations.free],
      })),
    ),
  };
}

function byLabels<T extends { readonly labels: readonly string[] }>(list: readonly T[]): T[] {
  return [...list].sort((a, b) => (a.labels.join() < b.labels.join() ? -1 : 1));
}

function partsOf({ name, metric, group, tolerance }: Crystal) {
  return { name, metric, group, tolerance };
}

/** The correlation of every unit, with labels that refer to given axes. */
function correlated(crystal: Crystal, frame: AxisFrame) {
  const { group, species } = factorGroupModes(crystal, frame);
  const units = molecularUnits(crystal).units.map((unit) => {
    const symmetry = molecularSymmetry(unit);
    const { species: free, translations, librations, total } = correlateUnit(unit, symmetry, group, frame);
    const internal = free.map(({ site, ...rest }) => ({ ...rest, levels: site.filter((n) => n > 0).sort() }));
    const { schoenflies } = symmetry;
    const rigid = [translations.factorGroup, librations.factorGroup];
    return { labels: [...unit.labels].sort(), schoenflies, internal, rigid, total, count: unit.count };
  });
  return { species, units: byLabels(units) };
}

/** The axes of the old cell in the new basis: columns of the inverse of P, cleared of denominators. */
function carriedFrame({ n, d }: RatMat3): AxisFrame {
  const inverse = inverse3(n.map((e) => e / d) as unknown as Parameters<typeof inverse3>[0]);
  const column = (j: number) => [0, 3, 6].map((i) => Math.round(12 * inverse[i + j]!) / 12 + 0);
  return { x: column(0), y: column(1), z: column(2) } as unknown as AxisFrame;
}

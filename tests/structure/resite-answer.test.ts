import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { inverseRatMat } from "../../lib/algebra/index.ts";
import {
  apply3,
  type Crystal,
  compareStructures,
  resited,
  resitedOnto,
  standardisedCrystal,
  type Vec3,
} from "../../lib/structure/index.ts";
import { mirroredCrystal } from "../../lib/structure/mirrored-crystal.ts";
import {
  formatTransformation,
  operationKey,
  parseTransformation,
  reverse,
  settingOperations,
  settingsOf,
} from "../../lib/symmetry/index.ts";
import { crystalOfText, fixture } from "../support/crystals.ts";
import { randomNumbers, randomStructure } from "../support/random-structures.ts";
import { retold } from "../support/retold.ts";

const points = (crystal: Crystal): Vec3[] => crystal.sites.map((s) => s.symmetry.point);

/** Largest difference between points. */
const farthest = (a: readonly Vec3[], b: readonly Vec3[]): number =>
  Math.max(...a.flatMap((x, i) => x.map((e, k) => Math.abs(e - b[i]![k]!))));

/** The same of points that may lie whole cells apart. */
const farthestModuloCells = (a: readonly Vec3[], b: readonly Vec3[]): number =>
  Math.max(...a.flatMap((x, i) => x.map((e, k) => Math.abs(e - b[i]![k]! - Math.round(e - b[i]![k]!)))));

/** x' = P^-1 (x - p). */
function carried(points: readonly Vec3[], P: string, p: string): Vec3[] {
  const t = parseTransformation(`${P};${p}`);
  const back = inverseRatMat(t.P);
  return points.map((x) => {
    const moved = x.map((e, i) => e - t.p.n[i]! / t.p.d) as unknown as Vec3;
    return apply3(back.n, moved).map((e) => e / back.d) as unknown as Vec3;
  });
}

describe("a structure in another setting", () => {
  it("has its listed atoms where the transformation says, and comes back", { timeout: 120_000 }, () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 230 }), fc.nat({ max: 1e6 }), (number, seed) => {
        const crystal = randomStructure(number, randomNumbers(seed));
        const settings = settingsOf(number);
        const setting = settings[seed % settings.length]!;
        const there = resited(crystal, { kind: "setting", text: setting.name || "reference" });
        expect(there.answer.spaceGroup.number).toBe(number);
        const expected = settingOperations(setting).map(operationKey).sort();
        expect(there.crystal.group.operations.map(operationKey).sort()).toEqual(expected);
        const expectedPoints = carried(points(crystal), there.answer.P, there.answer.p);
        expect(farthestModuloCells(points(there.crystal), expectedPoints)).toBeLessThan(1e-9);
        const way = parseTransformation(`${there.answer.P};${there.answer.p}`);
        const back = resited(there.crystal, { kind: "setting", text: formatTransformation(reverse(way)) });
        const expectedBack = carried(points(there.crystal), back.answer.P, back.answer.p);
        expect(farthestModuloCells(points(back.crystal), expectedBack)).toBeLessThan(1e-9);
        // whole cells of a primitive setting are centring translations of a centred one
        points(back.crystal).forEach((x, k) => {
          const apart = crystal.group.centrings.map(({ n, d }) => {
            const centred = x.map((e, i) => e + n[i]! / d) as unknown as Vec3;
            return farthestModuloCells([centred], [points(crystal)[k]!]);
          });
          expect(Math.min(...apart)).toBeLessThan(1e-9);
        });
        expect(
          farthest(
            [Object.values(back.crystal.metric.g) as unknown as Vec3],
            [Object.values(crystal.metric.g) as unknown as Vec3],
          ),
        ).toBeLessThan(1e-9);
      }),
      { numRuns: 60 },
    );
  });

  it("is named by symbol, by Hall symbol, or by its axes, and means the same", () => {
    const forsterite = fixture("forsterite-pnma");
    const asked = [
      { kind: "setting", text: "P b n m" },
      { kind: "setting", text: "cab" },
      { kind: "setting", text: "c,a,b" },
    ] as const;
    const told = asked.map((request) => resited(forsterite, request).answer);
    expect(new Set(told.map((a) => JSON.stringify([a.spaceGroup.hermannMauguin, a.P, a.p, a.cell]))).size).toBe(1);
    const hall = resited(forsterite, { kind: "hall", text: "-P 2c 2ab" }).answer;
    expect([hall.spaceGroup.hermannMauguin, hall.spaceGroup.hall]).toEqual(["P b n m", "-P 2c 2ab"]);
  });

  it("takes the shortest axes of the reference setting where it came in no conventional one", () => {
    const skew = resited(fixture("gypsum-c2c"), { kind: "setting", text: "1/2a+1/2b,b,3a+c" }).crystal;
    const { answer } = resited(skew, { kind: "reference" });
    expect(answer.spaceGroup.settingName).toBe("reference");
    expect(Math.max(...answer.cell.slice(0, 3))).toBeLessThan(15.3);
  });

  it("chooses between origins and between hexagonal and rhombohedral axes", () => {
    const first = resited(fixture("scheelite"), { kind: "setting", text: ":1" }).answer;
    expect(first.spaceGroup.settingName).toBe(":1");
    const R = resited(fixture("calcite"), { kind: "setting", text: "R -3 c :R" }).answer;
    expect([R.cell[0], R.cell[3]]).toEqual([R.cell[1], R.cell[4]]);
    expect(R.sites.map((s) => `${s.multiplicity}${s.wyckoff}`)).toEqual(["2b", "2a", "6e"]);
  });

  it("refuses a setting of another type", () => {
    expect(() => resited(fixture("gypsum"), { kind: "setting", text: "P n m a" })).toThrow(
      '"P n m a" is a setting of No. 62, but the structure has No. 15',
    );
    expect(() => resited(fixture("gypsum"), { kind: "setting", text: "nonsense" })).toThrow("has no setting");
    expect(() => resited(fixture("gypsum"), { kind: "hall", text: "-P 2ac 2n" })).toThrow("No. 62");
  });

  it("tells where s.u. are combined, and which rows an orbit that falls apart came from", () => {
    const calcite = fixture("calcite");
    const R = resited(calcite, { kind: "setting", text: ":R" });
    const hasSu = calcite.sites.some((s) => s.su.some((e) => e !== null));
    expect(R.notes.some((n) => n.startsWith("s.u. of coordinates"))).toBe(hasSu);
    const skew = resited(fixture("halite"), { kind: "setting", text: "a,b,2c" });
    expect(skew.notes.join("\n")).toMatch(/^the new cell holds 16 of the 48 rotation parts/m);
    expect(new Set(skew.answer.sites.map((s) => s.from))).toEqual(new Set(fixture("halite").sites.map((s) => s.label)));
  });

  it("carries uncertainties and displacement parameters with the axes", () => {
    const crystal = crystalOfText(`data_x
_cell_length_a 4
_cell_length_b 5
_cell_length_c 6
_cell_angle_alpha 90
_cell_angle_beta 90
_cell_angle_gamma 90
_space_group_name_H-M_alt 'P m m m'
loop_
_atom_site_label
_atom_site_fract_x
_atom_site_fract_y
_atom_site_fract_z
O1 0.1(2) 0.2(3) 0.3(4)
loop_
_atom_site_aniso_label
_atom_site_aniso_U_11
_atom_site_aniso_U_22
_atom_site_aniso_U_33
_atom_site_aniso_U_12
_atom_site_aniso_U_13
_atom_site_aniso_U_23
O1 0.01 0.02 0.03 0.001 0.002 0.003
`);
    const [site] = resited(crystal, { kind: "setting", text: "b,c,a" }).answer.sites;
    expect(site!.su.map((e) => e!.toFixed(9))).toEqual(["0.300000000", "0.400000000", "0.200000000"]);
    if (site!.displacement?.kind !== "anisotropic") throw new Error("no tensor");
    expect(site!.displacement.u.map((e) => Number(e.toFixed(9)))).toEqual([0.02, 0.03, 0.01, 0.003, 0.001, 0.002]);
  });
});

describe("a standardised structure", () => {
  it("is the structure given, in every type", { timeout: 120_000 }, () => {
    for (let number = 1; number <= 230; number += 3) {
      const random = randomNumbers(number * 11);
      const crystal = retold(randomStructure(number, random), random);
      const { crystal: standard, answer } = resited(crystal, { kind: "standardised" });
      const { answer: same } = compareStructures(crystal, standard);
      expect([number, same.verdict, same.hand, standard.identified.number]).toEqual([number, "same", "same", number]);
      expect(same.displacement!.largest).toBeLessThan(2e-4); // a free origin may be told as a fraction
      expect(answer.spaceGroup.settingName).toBe("reference");
      for (const x of points(standard)) for (const e of x) expect(e >= 0 && e < 1).toBe(true);
      const gamma = points(standard).reduce((s, x) => s + Math.hypot(...x), 0);
      expect(answer.standardisation!.gamma).toBeCloseTo(gamma, 9);
    }
  });

  it("lies where the transformation says, free origins included", () => {
    for (const number of [1, 4, 9, 33, 75, 146, 161, 186, 19, 152]) {
      const random = randomNumbers(number * 5);
      const crystal = randomStructure(number, random);
      const { answer, crystal: standard } = resited(crystal, { kind: "standardised" });
      const { P } = parseTransformation(`${answer.P};0,0,0`);
      const orbit = (k: number) => crystal.sites.find((s) => s.label === answer.sites[k]!.from)!.images;
      points(standard).forEach((x, k) => {
        const at = apply3(P.n, x).map((e, i) => e / P.d + answer.origin[i]!);
        const off = orbit(k).map(({ position }) =>
          Math.hypot(...position.map((e, i) => e - at[i]! - Math.round(e - at[i]!))),
        );
        expect([number, Math.min(...off) < 1e-8]).toEqual([number, true]);
      });
    }
  });

  it("has the smallest parameter of all descriptions it is compared with", () => {
    const random = randomNumbers(99);
    for (const number of [19, 62, 63, 123, 141, 186, 216, 227]) {
      const crystal = randomStructure(number, random);
      const { description } = standardisedCrystal(crystal);
      const asGiven = points(crystal).reduce((s, x) => s + Math.hypot(...x.map((e) => e - Math.floor(e))), 0);
      expect(description.gamma).toBeLessThanOrEqual(asGiven + 1e-9);
    }
  });

  it("is summed up by its Pearson symbol and Wyckoff sequence", () => {
    const summed = (name: string) => {
      const { standardisation } = resited(fixture(name), { kind: "standardised" }).answer;
      return `${standardisation!.pearsonSymbol} ${standardisation!.wyckoffSequence}`;
    };
    expect(summed("forsterite-pbnm")).toBe("oP28 d c4 a");
    expect(summed("corundum")).toBe("hR30 e c");
    expect(summed("rutile")).toBe("tP6 f a");
    expect(summed("halite")).toBe("cF8 b a");
  });

  it("keeps its hand unless that is left open", () => {
    const quartz = fixture("alpha-quartz");
    expect(resited(quartz, { kind: "standardised" }).answer.spaceGroup.number).toBe(154);
    const either = resited(quartz, { kind: "standardised", eitherHand: true }).answer;
    expect([either.spaceGroup.number, either.standardisation!.mirrored]).toEqual([152, true]);
    expect(parseTransformation(`${either.P};0,0,0`).P.n.filter((e) => e < 0).length).toBeGreaterThan(0);
  });

  it("of either hand is one for a chiral structure and its mirror image", () => {
    for (const number of [1, 4, 19, 76, 78, 152, 198]) {
      const random = randomNumbers(number * 3);
      const crystal = randomStructure(number, random);
      const mirror = mirroredCrystal(crystal);
      const told = [crystal, mirror].map((c) => {
        const { answer } = resited(c, { kind: "standardised", eitherHand: true });
        return [answer.spaceGroup.number, answer.standardisation!.gamma.toFixed(6)];
      });
      expect(told[0]).toEqual(told[1]);
    }
  });
});

describe("a structure on the axes of another file", () => {
  it("has the cell, the operations and nearly the coordinates of that file", () => {
    const [first, second] = [fixture("gypsum-c2c"), fixture("gypsum-i2a")];
    const { crystal, answer } = resitedOnto(first, second);
    expect(crystal.group.operations.map(operationKey).sort()).toEqual(second.group.operations.map(operationKey).sort());
    expect(
      farthest(
        [Object.values(crystal.metric.cell) as unknown as Vec3],
        [Object.values(second.metric.cell) as unknown as Vec3],
      ),
    ).toBeLessThan(1e-2);
    expect(answer.comparison!.verdict).toBe("same");
  });

  it("stays as it is where the two are not the same", () => {
    const { answer } = resitedOnto(fixture("aragonite"), fixture("calcite"));
    expect([answer.P, answer.p, answer.comparison!.verdict]).toEqual(["a,b,c", "0,0,0", "different"]);
  });
});

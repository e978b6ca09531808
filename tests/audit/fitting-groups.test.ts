import { describe, expect, it } from "vitest";
import { applyRow, type IntVec3, multiply } from "../../lib/algebra/index.ts";
import { familiesIn, metricIn } from "../../lib/audit/candidate-cell.ts";
import { fittingGroups } from "../../lib/audit/fitting-groups.ts";
import type { Reflection } from "../../lib/audit/index.ts";
import { familiesOf } from "../../lib/audit/merge-reflections.ts";
import { LATTICE_TOLERANCE, metricOf as metricOfCell } from "../../lib/structure/index.ts";
import {
  extinctionSymbol,
  groupProperties,
  isSystematicallyAbsent,
  settingOperations,
  settingsOf,
  spaceGroup,
} from "../../lib/symmetry/index.ts";
import { type Measurement, measure, randomMetric, seeded } from "../support/synthetic-reflections.ts";
import { randomUnimodular } from "../symmetry/random-setting.ts";

function synthetic(number: number, settingName: string | null = null, options: Measurement = {}) {
  const settings = settingsOf(number);
  const setting = settingName === null ? settings[0]! : settings.find((s) => s.name === settingName)!;
  const group = spaceGroup(settingOperations(setting));
  const random = seeded(number * 7919 + 11);
  for (let i = 0; i < 10; i++) random();
  const metric = randomMetric(group, random);
  const atoms = Math.max(2, Math.round(60 / group.operations.length));
  const reflections = measure(group, metric, random, { atoms, unique: 800, ...options });
  return { setting, group, metric, reflections, random };
}

const fit = (reflections: readonly Reflection[], metric: Parameters<typeof fittingGroups>[1]) =>
  fittingGroups(familiesOf(reflections), metric, LATTICE_TOLERANCE);

/** One or more of every Laue class and lattice, with many sorts of glide planes and screw axes. */
const NUMBERS = [
  2, 4, 9, 14, 15, 19, 20, 24, 33, 41, 43, 54, 61, 62, 64, 68, 70, 73, 80, 86, 88, 92, 106, 114, 122, 130, 136, 141,
  144, 148, 152, 158, 161, 163, 169, 176, 180, 188, 193, 198, 203, 205, 206, 212, 216, 220, 222, 227, 230,
];

describe("the groups that fit", () => {
  it.each(NUMBERS)("have the Laue class and the extinction symbol of No. %i first", (number) => {
    const { setting, group, metric, reflections } = synthetic(number);
    const { laue, groups, cell } = fit(reflections, metric);
    expect(laue.chosen.laueClass).toBe(groupProperties(number).laueClass);
    expect(groups[0]!.extinctionSymbol).toBe(extinctionSymbol(setting, group));
    expect(cell.P.n.join()).toBe("1,0,0,0,1,0,0,0,1");
    const same = groups.filter((g) => g.extinctionSymbol === groups[0]!.extinctionSymbol);
    expect(same.map((g) => g.setting.number)).toContain(number);
  });

  it.each([
    [14, "b2", "P 1 21/n 1"],
    [14, "b3", "P 1 21/a 1"],
    [15, "b3", "I 1 a 1"],
    [62, "cab", "P b n -"],
    [62, "-cba", "P c - n"],
    [64, "bca", "B b (ac) -"],
    [205, "ba-c", "P b - -"],
    [167, ":H-reverse", "R(rev) - c"],
  ])("are named in the setting in use: No. %i, setting %s, %s", (number, name, symbol) => {
    const { metric, reflections } = synthetic(number, name);
    expect(fit(reflections, metric).groups[0]!.extinctionSymbol).toBe(symbol);
  });

  it.each([5, 15, 43, 62, 88, 141, 161, 167, 194, 206, 227])(
    "are found from a skew primitive cell of No. %i",
    (number) => {
      const { group, metric, reflections, random } = synthetic(number);
      const primitive = familiesIn(familiesOf(reflections), group.primitive);
      const skew = randomUnimodular(random, 3);
      const families = familiesIn(primitive, skew);
      const { laue, groups } = fittingGroups(
        families,
        metricIn(metricIn(metric, group.primitive), skew),
        LATTICE_TOLERANCE,
      );
      expect(laue.chosen.laueClass).toBe(groupProperties(number).laueClass);
      const best = groups.filter((g) => g.extinctionSymbol === groups[0]!.extinctionSymbol);
      expect(best.map((g) => g.setting.number)).toContain(number);
    },
  );

  it("see through a cell that is a multiple of the true one", () => {
    const { metric, reflections } = synthetic(14);
    const doubled = reflections.map((r): Reflection => ({ ...r, h: [2 * r.h[0], r.h[1], r.h[2]] }));
    const { a, b, c, alpha, beta, gamma } = metric.cell;
    const found = fit(doubled, metricOfCell({ a: 2 * a, b, c, alpha, beta, gamma }));
    expect(found.centring.centrings).toHaveLength(2);
    expect(found.groups[0]!.setting.number).toBe(14);
  });

  it("take absences that a list leaves out for absences", () => {
    const { group, metric, reflections } = synthetic(62);
    const listed = reflections.filter((r) => !isSystematicallyAbsent(group.operations, r.h));
    expect(fit(listed, metric).groups[0]!.extinctionSymbol).toBe("P n - a");
  });

  it("are refused where equivalents differ: a monoclinic crystal with a cell of three right angles", () => {
    const { group, reflections } = synthetic(14);
    const metric = metricOfCell({ a: 8, b: 11, c: 13, alpha: 90, beta: 90, gamma: 90 });
    const { laue, groups } = fit(reflections, metric);
    expect(laue.groups.map((g) => g.laueClass)).toEqual(["mmm", "2/m", "2/m", "2/m", "-1"]);
    expect(laue.chosen.laueClass).toBe("2/m");
    expect(laue.chosen.rotations[1]!.join()).toBe("-1,0,0,0,1,0,0,0,-1");
    expect(laue.groups[0]!.rWorst).toBeGreaterThan(0.35);
    expect(groups[0]!.setting.number).toBe(14);
    expect(group.operations).toHaveLength(4);
  });

  it("find the unique axis wherever it is", () => {
    const { reflections } = synthetic(14);
    const turn = multiply([0, 0, 1, 1, 0, 0, 0, 1, 0], [1, 0, 0, 0, 1, 0, 0, 0, 1]);
    const turned = reflections.map((r): Reflection => ({ ...r, h: applyRow(r.h, turn) as IntVec3 }));
    const metric = metricOfCell({ a: 11, b: 13, c: 8, alpha: 90, beta: 90, gamma: 90 });
    const { laue, groups } = fit(turned, metric);
    expect(laue.chosen.laueClass).toBe("2/m");
    expect(groups[0]!.setting.number).toBe(14);
    expect(groups[0]!.extinctionSymbol).toBe("P 21/b 1 1");
  });
});

describe("intensity statistics", () => {
  it.each([
    [1, "acentric"],
    [2, "centric"],
    [19, "acentric"],
    [61, "centric"],
  ] as const)("tell No. %i to be %s", (number, verdict) => {
    const order = synthetic(number).group.operations.length;
    const { metric, reflections } = synthetic(number, null, { unique: 3000, atoms: Math.round(160 / order) });
    const { statistics } = fit(reflections, metric);
    expect(statistics.verdict).toBe(verdict);
    expect(statistics.meanDeviation!).toBeCloseTo(verdict === "centric" ? 0.968 : 0.736, 1);
  });

  it.each([
    [3, 6],
    [16, 25],
    [75, 81],
    [89, 99],
    [177, 183],
  ])("in zones and rows tell No. %i from No. %i, which have the same absences", (first, second) => {
    for (const [own, other] of [
      [first, second],
      [second, first],
    ] as const) {
      const { metric, reflections } = synthetic(own, null, { unique: 2500 });
      const { groups } = fit(reflections, metric);
      const rank = (n: number) => groups.findIndex((g) => g.setting.number === n);
      expect(rank(own)).toBeLessThan(rank(other));
    }
  });
});

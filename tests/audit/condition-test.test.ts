import { describe, expect, it } from "vitest";
import { indexedBy } from "../../lib/audit/choose-indexing.ts";
import type { Reflection, ReflectionList } from "../../lib/audit/index.ts";
import {
  isSystematicallyAbsent,
  type SpaceGroup,
  settingOperations,
  settingsOf,
  spaceGroup,
} from "../../lib/symmetry/index.ts";
import {
  laueMatrices,
  measure,
  normal,
  randomMetric,
  seeded,
  uniqueIndices,
} from "../support/synthetic-reflections.ts";

const groupOf = (number: number): SpaceGroup => spaceGroup(settingOperations(settingsOf(number)[0]!));

function asList(reflections: readonly Reflection[]): ReflectionList {
  return { kind: "text", reflections, quantity: "F^2", quantityFrom: "given", source: "test", notes: [] };
}

const NUMBERS = Array.from({ length: 230 }, (_, i) => i + 1);

/** Wilson intensities that know nothing of absences, with errors of 3 % and 0.02 of the mean. */
function withoutAbsences(group: SpaceGroup, seed: number) {
  const random = seeded(seed);
  const metric = randomMetric(group, random);
  const reflections = uniqueIndices(metric, laueMatrices(group), 800).map((h): Reflection => {
    const exact = -Math.log(1 - random());
    const sigma = Math.hypot(0.03 * exact, 0.02);
    return { h, value: exact + sigma * normal(random), sigma };
  });
  return { metric, reflections };
}

describe("a group's own conditions", () => {
  it.each(NUMBERS)("are met by a structure of No. %i", (number) => {
    const group = groupOf(number);
    const random = seeded(number * 31 + 5);
    const metric = randomMetric(group, random);
    const atoms = Math.max(2, Math.round(40 / group.operations.length));
    const list = asList(measure(group, metric, random, { atoms, unique: 500 }));
    const { conditions } = indexedBy(list, null, metric, group);
    for (const c of conditions) {
      const name = `${c.reflections}: ${c.condition}, ${c.forbidden} forbidden, ${c.evidence}`;
      if (c.forbidden >= 6) expect(c.verdict, name).toBe("met");
      else expect(["met", "undecided", "not listed", "not measured"], name).toContain(c.verdict);
    }
  });

  it.each(NUMBERS)("of No. %i are violated by intensities without absences", (number) => {
    const group = groupOf(number);
    const { metric, reflections } = withoutAbsences(group, number * 17 + 3);
    const { conditions } = indexedBy(asList(reflections), null, metric, group);
    for (const c of conditions) {
      const name = `${c.reflections}: ${c.condition}, ${c.forbidden} forbidden, ${c.evidence}`;
      if (c.forbidden >= 6) expect(c.verdict, name).toBe("violated");
      else expect(c.verdict, name).not.toBe("met");
    }
  });
});

describe("raised reflections", () => {
  const group = groupOf(14); // P 21/c
  const random = seeded(77);
  const metric = randomMetric(group, random);
  const clean = measure(group, metric, random, { atoms: 20, unique: 1500 });
  const mean = clean.reduce((s, r) => s + r.value, 0) / clean.length;
  const isAbsent = (r: Reflection) => isSystematicallyAbsent(group.operations, r.h);

  /** A share of the forbidden reflections raised to some strength, all equivalents alike. */
  const raised = (share: number, strength: number): Reflection[] =>
    clean.map((r) => {
      const [h, k, l] = r.h.map(Math.abs) as [number, number, number];
      const chosen = isAbsent(r) && ((h * 31 + k * 17 + l * 7) % 100) / 100 < share;
      return chosen ? { ...r, value: r.value + strength * mean } : r;
    });
  const verdicts = (list: readonly Reflection[]) =>
    indexedBy(asList(list), null, metric, group).conditions.map((c) => `${c.reflections} ${c.verdict}`);

  it("leave a group standing where they are few, however strong", () => {
    expect(verdicts(clean)).toEqual(["h0l met", "0k0 met"]);
    expect(verdicts(raised(0.08, 0.5))).toEqual(["h0l met", "0k0 met"]);
  });

  it("contradict it where they are many", () => {
    expect(verdicts(raised(0.6, 0.5))[0]).toBe("h0l violated");
    expect(verdicts(raised(0.4, 2))[0]).toBe("h0l violated");
  });

  it("that all carry some thousandths of the mean are told of, but decide nothing", () => {
    const { conditions } = indexedBy(asList(raised(1, 0.004)), null, metric, group);
    expect(conditions[0]).toMatchObject({ reflections: "h0l", verdict: "met" });
    const stronger = indexedBy(asList(raised(1, 0.015)), null, metric, group).conditions[0]!;
    expect(stronger.systematicallyWeak).toBe(true);
  });

  it("of a screw axis: one strong reflection of few is no contradiction", () => {
    const row = clean.filter((r) => r.h[0] === 0 && r.h[2] === 0);
    const others = clean.filter((r) => r.h[0] !== 0 || r.h[2] !== 0);
    const spoilt = row.map((r) => (Math.abs(r.h[1]) === 3 ? { ...r, value: mean, sigma: 0.03 * mean } : r));
    expect(verdicts([...others, ...spoilt])[1]).not.toBe("0k0 violated");
  });
});

import { describe, expect, it } from "vitest";
import { parseBondPatterns } from "../../lib/structure/index.ts";
import { type SpeciesCounts, type SplitAnswer, splitAnswer, type UnitAnswer } from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";
import {
  PUBLISHED_INTERNAL_MODES,
  type PublishedCorrelation,
  type PublishedInternalModes,
} from "./published-internal-modes.data.ts";
import { parseSum } from "./published-species.data.ts";
import { axesLeftOpen, type Counts, relabelled, restricted } from "./species-sums.ts";

const answers = new Map<string, SplitAnswer>();

/** Bonds that a work leaves out: it treats PO4 apart from the protons that hop between two of them. */
const CUT: Readonly<Record<string, string>> = { "potassium-dihydrogen-phosphate": "O-H" };

function answerFor(name: string): SplitAnswer {
  const cut = CUT[name];
  const noBond = cut ? parseBondPatterns(cut) : [];
  const known = answers.get(name) ?? splitAnswer(fixture(name), { bonds: { noBond } });
  answers.set(name, known);
  return known;
}

/** Composition as sorted symbols with counts, so that `H2O` and `OH2` are one. */
function composition(formula: string): string {
  const counts = new Map<string, number>();
  for (const [, e = "", n] of formula.matchAll(/([A-Z][a-z]?)(\d*)/g))
    counts.set(e, (counts.get(e) ?? 0) + Number(n || 1));
  return [...counts]
    .map(([e, n]) => `${e}${n}`)
    .sort()
    .join(" ");
}

function unitOf(p: PublishedInternalModes): UnitAnswer {
  const fitting = answerFor(p.fixture).units.filter(
    (u) => composition(u.formula) === composition(p.unit) && u.count === p.unitsInPrimitiveCell,
  );
  expect(fitting.map((u) => u.formula)).not.toEqual([]);
  return fitting.find((u) => u.schoenflies === p.siteGroup) ?? fitting[0]!;
}

function expectCrystal(computed: SpeciesCounts, printed: string, p: PublishedInternalModes): void {
  const active = answerFor(p.fixture).activity;
  const keep = (label: string) => {
    const a = active.find((s) => s.label === label);
    return !p.activeOnly || (a !== undefined && (a.infrared || a.raman));
  };
  const expected = relabelled(parseSum(printed), p.relabel);
  const found: Counts = restricted(computed, keep);
  if (p.compare === "labels") expect(found).toEqual(expected);
  else expect(axesLeftOpen(found)).toEqual(axesLeftOpen(expected));
}

function expectSite(computed: SpeciesCounts, correlation: PublishedCorrelation, p: PublishedInternalModes): void {
  const expected = parseSum(correlation.site);
  if (p.compare === "labels" && p.relabel === undefined) expect(computed).toEqual(expected);
  else expect(axesLeftOpen(computed)).toEqual(axesLeftOpen(expected)); // site axes turn with those of the crystal
}

describe("internal modes of molecules and ions in crystals as published (from memory, sources in the data)", () => {
  it("covers at least 40 units", () => expect(PUBLISHED_INTERNAL_MODES.length).toBeGreaterThanOrEqual(40));

  it.each(PUBLISHED_INTERNAL_MODES.map((p) => [p.unit, p.fixture, p.source, p] as const))(
    "%s in %s: %s",
    (_unit, _fixture, _source, p) => {
      const unit = unitOf(p);
      expect(unit.pointGroup).toBe(p.freeGroup);
      expect(unit.schoenflies).toBe(p.siteGroup);
      expect(answerFor(p.fixture).factorGroup.schoenflies).toBe(p.factorGroup);
      for (const correlation of p.internal) {
        const modes = unit.internal.filter((m) =>
          correlation.modes.length > 0 && m.name !== null
            ? correlation.modes.includes(m.name)
            : m.species === correlation.free,
        );
        expect(modes.length).toBeGreaterThan(0);
        for (const mode of modes) {
          expect(mode.species).toBe(correlation.free);
          expectSite(mode.site, correlation, p);
          expectCrystal(mode.factorGroup, correlation.crystal, p);
        }
      }
      for (const kind of ["librations", "translations"] as const) {
        const printed = p[kind];
        if (!printed) continue;
        expectSite(unit[kind].site, printed, p);
        expectCrystal(unit[kind].factorGroup, printed.crystal, p);
      }
    },
  );
});

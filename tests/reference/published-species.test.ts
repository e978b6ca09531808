import { describe, expect, it } from "vitest";
import { type ModesAnswer, modesAnswer } from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";
import { PUBLISHED_SPECIES, type PublishedSpecies, parseSum } from "./published-species.data.ts";
import { axesLeftOpen, type Counts, relabelled, restricted } from "./species-sums.ts";

/** Sums of our answer that papers print. */
function ours(answer: ModesAnswer): Record<"total" | "acoustic" | "optic" | "infrared" | "raman", Counts> {
  const sum = (number: (s: ModesAnswer["irreps"][number]) => number) =>
    restricted(Object.fromEntries(answer.irreps.map((s) => [s.label, number(s)])), () => true);
  return {
    total: sum((s) => s.total),
    acoustic: sum((s) => s.acoustic),
    optic: sum((s) => s.optic),
    infrared: sum((s) => (s.infrared ? s.optic : 0)),
    raman: sum((s) => (s.raman ? s.optic : 0)),
  };
}

function expectSum(computed: Counts, printed: string, p: PublishedSpecies): void {
  const expected = relabelled(parseSum(printed), p.relabel);
  if (p.compare === "labels") expect(computed).toEqual(expected);
  else expect(axesLeftOpen(computed)).toEqual(axesLeftOpen(expected));
}

describe("species of the modes at k = 0 as published (from memory, sources in the data)", () => {
  it("covers at least 25 crystals", () => expect(PUBLISHED_SPECIES.length).toBeGreaterThanOrEqual(25));

  it.each(PUBLISHED_SPECIES.map((p) => [p.fixture, p.source, p] as const))("of %s: %s", (_name, _source, p) => {
    const answer = modesAnswer(fixture(p.fixture));
    const computed = ours(answer);
    for (const kind of ["total", "acoustic", "optic", "infrared", "raman"] as const) {
      const printed = p[kind];
      if (printed !== undefined) expectSum(computed[kind], printed, p);
    }
    expect(answer.totals.infraredBands).toBe(p.infraredBands);
    expect(answer.totals.ramanBands).toBe(p.ramanBands);
  });
});

import { describe, expect, it } from "vitest";
import { symmetrisedCif } from "../../lib/report/index.ts";
import { cellContents, symmetriseAnswer } from "../../lib/structure/index.ts";
import { crystalOfText, fixture } from "../support/crystals.ts";
import { disguised, randomNumbers, randomStructure } from "../support/random-structures.ts";

describe("the symmetrised structure as a CIF", () => {
  it.each([1, 4, 15, 33, 70, 88, 144, 161, 192, 203, 227])("reads back as it was, type %i", (number) => {
    const random = randomNumbers(number + 50);
    const original = randomStructure(number, random);
    const given = disguised(original, { multiple: [1, 2, 1], noise: 0.01, steps: 2 }, random);
    const answer = symmetriseAnswer(given);
    const crystal = crystalOfText(symmetrisedCif(answer, given.name), 0.001);
    expect(crystal.identified.number).toBe(number);
    expect(crystal.identified.summary.operations).toEqual(answer.found.operations);
    expect(crystal.disagreements).toEqual([]);
    expect(crystal.sites.map((s) => s.images.length)).toEqual(answer.sites.map((s) => s.multiplicity));
    crystal.sites.forEach((s, i) => {
      s.position.forEach((e, k) => {
        expect(e).toBeCloseTo(answer.sites[i]!.position[k]!, 5);
      });
    });
    // the same atoms per volume
    const [x, y] = [crystal, original].map((c) => [...cellContents(c.sites)].map(([e, n]) => [e, n / c.metric.volume]));
    for (const [element, density] of x!) {
      expect(density).toBeCloseTo(Number(y!.find(([e]) => e === element)![1]), 5);
    }
  });

  it("has a name of printable characters that fits CIF 1.1", () => {
    const text = symmetrisedCif(symmetriseAnswer(fixture("halite")), `wall no. 7 ${"é".repeat(90)}`);
    const name = /^data_(\S+)$/m.exec(text)![1]!;
    expect(name).toMatch(/^wall_no\._7_+symmetrised$/);
    expect(name.length).toBeLessThanOrEqual(75);
  });
});

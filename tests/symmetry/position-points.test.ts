import { describe, expect, it } from "vitest";
import {
  freeLetters,
  groupAnswer,
  identifyGroup,
  pointOfForm,
  pointsOfPosition,
  positionsInCell,
  settingOperations,
  settingsOf,
  siteOperations,
  spaceGroup,
} from "../../lib/symmetry/index.ts";

const types = Array.from({ length: 230 }, (_, i) => i + 1);
const VALUES = [0.137, 0.211, 0.389] as const;

/** Each whole to the rounding of doubles. */
function isOn({ F, c }: ReturnType<typeof pointsOfPosition>[number], x: readonly number[]): boolean {
  return F.every((f, i) => {
    const off = f[0] * x[0]! + f[1] * x[1]! + f[2] * x[2]! - c[i]!;
    return Math.abs(off - Math.round(off)) < 1e-9;
  });
}

describe("positions in the cell in use", () => {
  it.each(types)("are those that the group lists, type %i", (number) => {
    const settings = settingsOf(number);
    const identified = identifyGroup(spaceGroup(settingOperations(settings[number % settings.length]!)));
    const listed = groupAnswer(identified).spaceGroup.wyckoff;
    const positions = positionsInCell(identified);
    expect(positions.map((p) => [p.letter, p.multiplicity, p.triplet])).toEqual(
      listed.map((w) => [w.letter, w.multiplicity, w.coordinates[0]]),
    );
    const sizes = positions.map((p) => identified.group.operations.length / p.order);
    expect(positions.map((p) => p.multiplicity)).toEqual(sizes);
  });

  it.each([62, 167, 194, 227])("hold each image of a point once, type %i", (number) => {
    const identified = identifyGroup(spaceGroup(settingOperations(settingsOf(number)[0]!)));
    for (const position of positionsInCell(identified)) {
      const x = pointOfForm(position.form, VALUES);
      const sets = pointsOfPosition(identified, position);
      const free = freeLetters(position.form).length;
      expect(sets.every((s) => s.F.length === 3 - free)).toBe(true);
      expect(sets.some((s) => isOn(s, x))).toBe(true);
      if (free === 0) expect(sets.length).toBe(position.multiplicity);
      expect(isOn(sets[0]!, [x[0] + 0.01, x[1] + 0.003, x[2] - 0.02])).toBe(free === 3);
    }
  });

  it("are fixed by as many operations as they say, exactly", () => {
    const { group } = identifyGroup(spaceGroup(settingOperations(settingsOf(194)[0]!)));
    expect(siteOperations(group, { n: [4, 8, 3], d: 12 }).length).toBe(12); // 2c, -6m2
    expect(siteOperations(group, { n: [333, 667, 250], d: 1000 }).length).toBe(4); // x,-x,1/4
    expect(siteOperations(group, { n: [1, 3, 1], d: 7 }).length).toBe(1);
  });
});

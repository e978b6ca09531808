import { describe, expect, it } from "vitest";
import { type IntVec3, rowTimes } from "../../lib/algebra/index.ts";
import { formFromSetting } from "../../lib/symmetry/affine-form.ts";
import { operationsFromHall } from "../../lib/symmetry/hall-symbol.ts";
import { identify } from "../../lib/symmetry/identification.ts";
import { referenceGroup } from "../../lib/symmetry/reference-group.ts";
import {
  independentConditions,
  isSystematicallyAbsent,
  meetsConditions,
  reflectionConditions,
} from "../../lib/symmetry/reflection-conditions.ts";
import { spaceGroup } from "../../lib/symmetry/space-group.ts";
import { specialConditions } from "../../lib/symmetry/special-reflection-conditions.ts";
import { wyckoffPositions } from "../../lib/symmetry/wyckoff-positions.ts";
import { inSetting, randomUnimodular, seeded } from "./random-setting.ts";

const REFLECTIONS: IntVec3[] = [];
for (let h = -4; h <= 4; h++) for (let k = -4; k <= 4; k++) for (let l = -4; l <= 4; l++) REFLECTIONS.push([h, k, l]);

function printed(hall: string): string[] {
  const group = spaceGroup(operationsFromHall(hall).operations);
  return independentConditions(reflectionConditions(group)).map((c) => `${c.reflections}: ${c.condition}`);
}

describe("reflectionConditions", () => {
  it.each([
    ["-P 2c 2ab", ["0kl: k=2n", "h0l: h+l=2n"]], // P b n m
    ["-P 2yn", ["h0l: h+l=2n", "0k0: k=2n"]], // P 1 21/n 1
    ["-I 2ya", ["hkl: h+k+l=2n", "h0l: h,l=2n"]], // I 1 2/a 1
    ["-P 3* 2n", ["hhl: l=2n"]], // R -3 c on rhombohedral axes
    ["-R 3", ["hkil: -h+k+l=3n"]],
  ])("are written for the axes in use: %s", (hall, conditions) => expect(printed(hall)).toEqual(conditions));

  it("name the element behind each absence", () => {
    const conditions = reflectionConditions(referenceGroup(62));
    expect(conditions.map((c) => [c.reflections, c.cause, c.implied])).toEqual([
      ["0kl", "glide plane n: -x+1/2,y+1/2,z+1/2", false],
      ["hk0", "glide plane a: x+1/2,y,-z+1/2", false],
      ["h00", "glide plane a: x+1/2,y,-z+1/2", true],
      ["0k0", "glide plane n: -x+1/2,y+1/2,z+1/2", true],
      ["00l", "glide plane n: -x+1/2,y+1/2,z+1/2", true],
    ]);
    const [screw] = reflectionConditions(referenceGroup(169));
    expect(screw!.cause).toBe("screw axis 61: x-y,x,z+1/6");
    const [centring] = reflectionConditions(referenceGroup(5));
    expect(centring!.cause).toBe("centring 1/2,1/2,0");
  });

  it("say in a skew or primitive cell what they say in the reference setting", () => {
    const random = seeded(5);
    for (const number of [5, 9, 15, 24, 43, 62, 70, 88, 122, 141, 161, 167, 180, 194, 206, 220, 227]) {
      const reference = referenceGroup(number);
      for (const start of [reference.primitive, randomUnimodular(random)]) {
        const own = spaceGroup(inSetting(reference, { P: start, p: { n: [1, 2, 3], d: 12 } })!);
        const { transformation } = identify(own.operations);
        const conditions = independentConditions(reflectionConditions(own));
        for (const h of REFLECTIONS) {
          const there = rowTimes(h, transformation.P);
          const absent = there.d !== 1 || isSystematicallyAbsent(reference.operations, there.n);
          expect(meetsConditions(conditions, own, h)).toBe(!absent);
        }
      }
    }
  });
});

describe("specialConditions", () => {
  it("say in a skew or primitive cell what they say in the reference setting", () => {
    const random = seeded(6);
    for (const number of [15, 43, 62, 88, 141, 167, 194, 220, 227]) {
      const reference = referenceGroup(number);
      for (const start of [reference.primitive, randomUnimodular(random, 2)]) {
        const own = spaceGroup(inSetting(reference, { P: start, p: { n: [1, 2, 3], d: 12 } })!);
        const { transformation } = identify(own.operations);
        const general = independentConditions(reflectionConditions(own));
        for (const { form } of wyckoffPositions(number).slice(0, 4)) {
          const special = specialConditions(own, formFromSetting(form, transformation));
          const expected = specialConditions(reference, form);
          const wrong = REFLECTIONS.filter((h) => {
            if (!meetsConditions(general, own, h)) return false;
            const there = rowTimes(h, transformation.P).n;
            return meetsConditions(special, own, h) !== meetsConditions(expected, reference, there);
          });
          expect(wrong, `${number}`).toEqual([]);
        }
      }
    }
  });
});

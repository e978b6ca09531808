import { describe, expect, it } from "vitest";
import type { IntVec3 } from "../../lib/algebra/index.ts";
import { parseForm } from "../../lib/symmetry/affine-form.ts";
import { referenceGroup } from "../../lib/symmetry/reference-group.ts";
import {
  independentConditions,
  meetsConditions,
  reflectionConditions,
} from "../../lib/symmetry/reflection-conditions.ts";
import type { SpaceGroup } from "../../lib/symmetry/space-group.ts";
import { specialConditions } from "../../lib/symmetry/special-reflection-conditions.ts";
import { wyckoffPositions } from "../../lib/symmetry/wyckoff-positions.ts";

const RANGE = 8;
const ALL = Array.from({ length: 230 }, (_, i) => i + 1);

/** One of each set of reflections that the point group and inversion make equivalent: the largest key. */
function independentReflections(group: SpaceGroup): IntVec3[] {
  const found: IntVec3[] = [];
  const rank = (h: IntVec3) => (h[0] * 64 + h[1]) * 64 + h[2];
  for (let h = 0; h <= RANGE; h++)
    for (let k = -RANGE; k <= RANGE; k++)
      for (let l = -RANGE; l <= RANGE; l++) {
        const own = rank([h, k, l]);
        const largest = group.representatives.every(({ W }) => {
          const image: IntVec3 = [
            h * W[0] + k * W[3] + l * W[6],
            h * W[1] + k * W[4] + l * W[7],
            h * W[2] + k * W[5] + l * W[8],
          ];
          return Math.abs(rank(image)) <= own;
        });
        if (largest) found.push([h, k, l]);
      }
  return found;
}

/**
 * Integer coordinates of exp(2 pi i k / 24) in the basis 1, z, ..., z^7 with z^8 = z^4 - 1 (the 24th cyclotomic
 * polynomial), so that sums of roots vanish exactly when they vanish here.
 */
const ROOTS: number[][] = [[1, 0, 0, 0, 0, 0, 0, 0]];
for (let k = 1; k < 24; k++) {
  const [a, b, c, d, e, f, g, top] = ROOTS[k - 1] as [number, number, number, number, number, number, number, number];
  ROOTS.push([-top, a, b, c, d + top, e, f, g]);
}

/** Points as flat integers: nine of M, then three of t over 24. */
type FlatPoints = readonly (readonly number[])[];

/** Whether the sum of exp(2 pi i h . x) over the points vanishes for all values of the free letters. */
function vanishes(points: FlatPoints, [h, k, l]: IntVec3): boolean {
  const sums = new Map<number, number[]>();
  for (const p of points) {
    let frequency = 0;
    for (let j = 0; j < 3; j++) frequency = frequency * 1024 + h * p[j]! + k * p[3 + j]! + l * p[6 + j]!;
    const phase = (h * p[9]! + k * p[10]! + l * p[11]!) % 24;
    const root = ROOTS[phase < 0 ? phase + 24 : phase]!;
    const sum = sums.get(frequency);
    if (!sum) sums.set(frequency, [...root]);
    else for (let i = 0; i < 8; i++) sum[i]! += root[i]!;
  }
  for (const sum of sums.values()) if (sum.some((e) => e !== 0)) return false;
  return true;
}

function withCentrings(group: SpaceGroup, coordinates: readonly string[]): FlatPoints {
  return coordinates.map(parseForm).flatMap(({ M, t }) =>
    group.centrings.map((c) => {
      const shift = [0, 1, 2].map((i) => t.n[i]! * (24 / t.d) + c.n[i]! * (24 / c.d));
      return [...M.n, ...shift];
    }),
  );
}

describe("reflection conditions against structure factors summed over every orbit", () => {
  it("allow exactly the reflections with |h|, |k|, |l| up to 8 that do not vanish identically", () => {
    let compared = 0;
    for (const number of ALL) {
      const group = referenceGroup(number);
      const general = independentConditions(reflectionConditions(group));
      const reflections = independentReflections(group);
      for (const p of wyckoffPositions(number)) {
        const conditions = [...general, ...specialConditions(group, p.form)];
        const points = withCentrings(group, p.coordinates);
        for (const h of reflections) {
          const allowed = meetsConditions(conditions, group, h);
          if (allowed === vanishes(points, h)) expect(`${number}${p.letter} ${h.join(" ")}`).toBe("as summed");
          compared++;
        }
      }
    }
    expect(compared).toBeGreaterThan(500_000);
  }, 180_000);
});

import { describe, expect, it } from "vitest";
import { lengthOf, type Metric, metricOf, type Vec3 } from "../../lib/structure/index.ts";
import { nearestOnPosition } from "../../lib/structure/nearest-on-position.ts";
import {
  freeLetters,
  identifyGroup,
  namedGroup,
  pointOfForm,
  pointsOfPosition,
  positionsInCell,
} from "../../lib/symmetry/index.ts";
import { randomNumbers } from "../support/random-structures.ts";

const CASES = [
  ["R -3 c", { a: 4.99, b: 4.99, c: 17.06, alpha: 90, beta: 90, gamma: 120 }],
  ["P n m a", { a: 8.9, b: 5.5, c: 7.2, alpha: 90, beta: 90, gamma: 90 }],
  ["P 21/c", { a: 5, b: 9, c: 7, alpha: 90, beta: 118, gamma: 90 }],
  ["I 41/a m d", { a: 6.6, b: 6.6, c: 6, alpha: 90, beta: 90, gamma: 90 }],
  ["P -1", { a: 5, b: 7, c: 6, alpha: 60, beta: 70, gamma: 35 }],
] as const;

/** Distance modulo the lattice over all cells about the nearest by rounding, as skew cells need. */
function trulyNearest(metric: Metric, x: Vec3, y: Vec3): number {
  const d = y.map((e, i) => e - x[i]! - Math.round(e - x[i]!));
  let least = Number.POSITIVE_INFINITY;
  for (let k = 0; k < 27; k++) {
    const shift = [(k % 3) - 1, (Math.floor(k / 3) % 3) - 1, Math.floor(k / 9) - 1];
    least = Math.min(least, lengthOf(metric, d.map((e, i) => e + shift[i]!) as unknown as Vec3));
  }
  return least;
}

describe("the nearest point of a position", () => {
  it.each(CASES)("is no farther than any other point tried, %s", (name, cell) => {
    const identified = identifyGroup(namedGroup(name).settings[0].group);
    const metric = metricOf(cell);
    const random = randomNumbers(17);
    for (const position of positionsInCell(identified)) {
      const points = pointsOfPosition(identified, position);
      for (let k = 0; k < 5; k++) {
        const x: Vec3 = [3 * random() - 1, 3 * random() - 1, 3 * random() - 1];
        const { point, distance } = nearestOnPosition(points, metric, x);
        expect(distance).toBeCloseTo(lengthOf(metric, [point[0] - x[0], point[1] - x[1], point[2] - x[2]]), 9);
        // on the position: it is nearest to itself
        expect(nearestOnPosition(points, metric, point).distance).toBeLessThan(1e-9);
        if (freeLetters(position.form).length === 3) expect(distance).toBe(0);
        for (let tries = 0; tries < 40; tries++) {
          const free: Vec3 = [random(), random(), random()];
          for (const a of identified.group.operations) {
            const y = image(a, pointOfForm(position.form, free));
            expect(trulyNearest(metric, x, y)).toBeGreaterThan(distance - 1e-9);
          }
        }
      }
    }
  });

  it("comes as near as one likes to points of the position that are moved a little", () => {
    const identified = identifyGroup(namedGroup("R -3 c").settings[0].group);
    const metric = metricOf(CASES[0][1]);
    const random = randomNumbers(5);
    for (const position of positionsInCell(identified)) {
      const points = pointsOfPosition(identified, position);
      for (const a of identified.group.operations) {
        const y = image(a, pointOfForm(position.form, [random(), random(), random()]));
        const { distance } = nearestOnPosition(points, metric, [y[0] + 2.001, y[1] - 1, y[2]]);
        expect(distance).toBeLessThanOrEqual(0.001 * 4.99 + 1e-9);
      }
    }
  });
});

function image(a: { W: readonly number[]; w: { n: readonly number[]; d: number } }, x: Vec3): Vec3 {
  return [0, 1, 2].map(
    (i) => a.W[3 * i]! * x[0] + a.W[3 * i + 1]! * x[1] + a.W[3 * i + 2]! * x[2] + a.w.n[i]! / a.w.d,
  ) as unknown as Vec3;
}

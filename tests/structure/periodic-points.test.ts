import fc from "fast-check";
import { expect, test } from "vitest";
import { apply3, metricOf, nearestDistance, PeriodicPoints, type Vec3 } from "../../lib/structure/index.ts";

/** Slow twin: shortest of all 125 images around. */
function bruteDistance(metric: ReturnType<typeof metricOf>, x: Vec3, y: Vec3): number {
  let best = Number.POSITIVE_INFINITY;
  for (let i = -2; i <= 2; i++) {
    for (let j = -2; j <= 2; j++) {
      for (let k = -2; k <= 2; k++) {
        const d: Vec3 = [x[0] - y[0] + i, x[1] - y[1] + j, x[2] - y[2] + k];
        best = Math.min(best, Math.hypot(...apply3(metric.toCartesian, d)));
      }
    }
  }
  return best;
}

test("finds the same neighbours as looking at every pair, across cell edges too", () => {
  const coordinate = fc.double({ min: 0, max: 1, maxExcluded: true, noNaN: true });
  const angle = fc.double({ min: 75, max: 105, noNaN: true });
  fc.assert(
    fc.property(
      fc.array(fc.tuple(coordinate, coordinate, coordinate), { minLength: 1, maxLength: 30 }),
      fc.tuple(angle, angle, angle),
      fc.double({ min: 0.05, max: 1.5, noNaN: true }),
      (points, [alpha, beta, gamma], reach) => {
        const metric = metricOf({ a: 4, b: 6, c: 9, alpha, beta, gamma });
        const search = new PeriodicPoints(metric, reach);
        for (const p of points) search.add(p);
        const probe = points[0]!;
        const expected = points.flatMap((p, i) => (bruteDistance(metric, probe, p) <= reach ? [i] : []));
        expect([...search.near(probe)].sort((a, b) => a - b)).toEqual(expected);
      },
    ),
  );
});

test("nearestDistance takes the short way round the cell", () => {
  const metric = metricOf({ a: 10, b: 10, c: 10, alpha: 90, beta: 90, gamma: 90 });
  expect(nearestDistance(metric, [0.99, 0, 0], [0.01, 0, 0])).toBeCloseTo(0.2, 12);
});

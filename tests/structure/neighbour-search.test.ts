import fc from "fast-check";
import { expect, test } from "vitest";
import { apply3, contactsWithin, type Metric, metricOf, type Vec3 } from "../../lib/structure/index.ts";

const coordinate = fc.double({ min: -1.5, max: 2.5, noNaN: true });
const angle = fc.double({ min: 65, max: 115, noNaN: true });

/** Slow twin: every pair over every translation that could matter. */
function everyPair(metric: Metric, points: readonly Vec3[], reach: number): string[] {
  const most = 9;
  const out: string[] = [];
  points.forEach((x, i) => {
    for (let j = i; j < points.length; j++) {
      for (let a = -most; a <= most; a++) {
        for (let b = -most; b <= most; b++) {
          for (let c = -most; c <= most; c++) {
            const forward = a > 0 || (a === 0 && (b > 0 || (b === 0 && c > 0)));
            if (i === j && !forward) continue;
            const y = points[j]!;
            const d = Math.hypot(...apply3(metric.toCartesian, [y[0] + a - x[0], y[1] + b - x[1], y[2] + c - x[2]]));
            if (d <= reach) out.push(`${i} ${j} ${a},${b},${c} ${d.toFixed(6)}`);
          }
        }
      }
    }
  });
  return out.sort();
}

/** An atom and its own image may be found by either of two opposite shifts. */
function written(c: { first: number; second: number; shift: readonly number[]; distance: number }): string {
  return `${c.first} ${c.second} ${c.shift.join()} ${c.distance.toFixed(6)}`;
}

test("finds the pairs that looking at everything finds, in cells smaller and larger than the reach", () => {
  fc.assert(
    fc.property(
      fc.array(fc.tuple(coordinate, coordinate, coordinate), { minLength: 1, maxLength: 6 }),
      fc.tuple(angle, angle, angle),
      fc.constantFrom([2.5, 2.5, 2.5], [1.9, 7, 3], [4, 6, 9]),
      fc.double({ min: 0.5, max: 3.4, noNaN: true }),
      (points, [alpha, beta, gamma], [a, b, c], reach) => {
        const metric = metricOf({ a: a!, b: b!, c: c!, alpha, beta, gamma });
        expect(contactsWithin(metric, points, reach).contacts.map(written).sort()).toEqual(
          everyPair(metric, points, reach),
        );
      },
    ),
    { numRuns: 40 },
  );
});

test("counts an atom of a simple cubic cell as its own neighbour three times, once per pair", () => {
  const metric = metricOf({ a: 2, b: 2, c: 2, alpha: 90, beta: 90, gamma: 90 });
  const { contacts } = contactsWithin(metric, [[0.1, 0.2, 0.3]], 2.1);
  expect(contacts.map((c) => c.shift.join())).toEqual(["0,0,1", "0,1,0", "1,0,0"]);
});

test("obeys a limit of its own for each pair", () => {
  const metric = metricOf({ a: 10, b: 10, c: 10, alpha: 90, beta: 90, gamma: 90 });
  const points: Vec3[] = [
    [0, 0, 0],
    [0.1, 0, 0],
    [0.2, 0, 0],
  ];
  const { contacts } = contactsWithin(metric, points, 2.5, (i, j) => (i === 0 && j === 1 ? 0.5 : 2.5));
  expect(contacts.map((c) => [c.first, c.second])).toEqual([
    [0, 2],
    [1, 2],
  ]);
});

test("takes twice the comparisons for twice the atoms", () => {
  const counts = [6, 12, 24].map((n) => {
    // n x 8 x 8 copies of a body-centred cell, a little shaken
    const metric = metricOf({ a: 3 * n, b: 24, c: 24, alpha: 90, beta: 90, gamma: 90 });
    const points: Vec3[] = [];
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < 8; j++) {
        for (let k = 0; k < 8; k++) {
          const s = 0.01 * ((i * 7 + j * 5 + k * 3) % 11);
          points.push([(i + s) / n, (j + s) / 8, k / 8], [(i + 0.5) / n, (j + 0.5) / 8, (k + 0.5) / 8]);
        }
      }
    }
    return contactsWithin(metric, points, 2.9).compared;
  });
  expect(counts[1]! / counts[0]!).toBeCloseTo(2, 1);
  expect(counts[2]! / counts[1]!).toBeCloseTo(2, 1);
});

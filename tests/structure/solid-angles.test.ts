import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { effectiveCoordination } from "../../lib/structure/effective-coordination.ts";
import type { Vec3 } from "../../lib/structure/index.ts";
import { atomDomain } from "../../lib/structure/solid-angles.ts";
import { randomNumbers } from "../support/random-structures.ts";

const byLength = (a: Vec3, b: Vec3) => Math.hypot(...a) - Math.hypot(...b);

/** Atoms of a cubic lattice around one at the origin. */
function around(cell: readonly Vec3[]): Vec3[] {
  const steps = [-2, -1, 0, 1, 2];
  return steps
    .flatMap((i) => steps.flatMap((j) => steps.flatMap((k) => cell.map((x): Vec3 => [x[0] + i, x[1] + j, x[2] + k]))))
    .filter((x) => Math.hypot(...x) > 1e-6)
    .sort(byLength);
}

const NONE: Vec3 = [0, 0, 0];
const FACES: Vec3[] = [NONE, [0, 0.5, 0.5], [0.5, 0, 0.5], [0.5, 0.5, 0]];
const quarter = ([a, b, c]: Vec3): Vec3 => [a + 0.25, b + 0.25, c + 0.25];

describe("the domain of an atom", () => {
  it.each([
    ["a primitive cubic lattice", [NONE], 6, 6],
    ["a face-centred one", FACES, 12, 12],
    ["a body-centred one", [NONE, [0.5, 0.5, 0.5] as Vec3], 14, 10.1606],
    ["diamond", [...FACES, ...FACES.map(quarter)], 16, 4.5381],
  ])("in %s has faces and a weighted number", (_, cell, faces, number) => {
    const { shares } = atomDomain(around(cell));
    expect(shares.filter((s) => s > 1e-9)).toHaveLength(faces);
    const sum = shares.reduce((s, x) => s + x, 0);
    expect(sum).toBeCloseTo(1, 10);
    expect(sum / Math.max(...shares)).toBeCloseTo(number, 3);
  });

  test("shows each neighbour as often as rays from the atom reach its plane first", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 1e6 }), (seed) => {
        const random = randomNumbers(seed);
        const places = Array.from({ length: 30 }, (): Vec3 => [1, 2, 3].map(() => 6 * random() - 3) as unknown as Vec3)
          .filter((p) => Math.hypot(...p) > 0.8)
          .sort(byLength);
        const { shares, radius } = atomDomain(places);
        const hits = places.map(() => 0);
        const rays = 4000;
        for (let k = 0; k < rays; k++) {
          const z = (2 * k + 1) / rays - 1;
          const phi = k * Math.PI * (3 - Math.sqrt(5)); // a spiral over the sphere
          const r = Math.sqrt(1 - z * z);
          const ray: Vec3 = [r * Math.cos(phi), r * Math.sin(phi), z];
          const reaches = places.map((p) => {
            const along = p[0] * ray[0] + p[1] * ray[1] + p[2] * ray[2];
            return along > 0 ? (p[0] ** 2 + p[1] ** 2 + p[2] ** 2) / (2 * along) : Infinity;
          });
          const first = reaches.indexOf(Math.min(...reaches));
          if (reaches[first]! <= radius + 1e-6) hits[first]!++;
        }
        for (const [i, share] of shares.entries()) expect(Math.abs(share - hits[i]! / rays)).toBeLessThan(0.012);
      }),
      { numRuns: 20 },
    );
  });

  it("is told open by its radius where neighbours do not close it", () => {
    expect(atomDomain([[0, 0, 2]]).radius).toBeGreaterThan(100);
  });
});

describe("effective coordination", () => {
  it("counts equal neighbours, and hardly those half as far again", () => {
    expect(effectiveCoordination([2, 2, 2, 2])!.number).toBeCloseTo(4, 12);
    expect(effectiveCoordination([2, 2, 2, 2, 3, 3])!.number).toBeLessThan(4.01);
    expect(effectiveCoordination([])).toBeNull();
  });

  test("has a mean that is that of its own weights, and does not change with the unit", () => {
    const lengths = fc.array(fc.double({ min: 1, max: 2.5, noNaN: true }), { minLength: 1, maxLength: 12 });
    fc.assert(
      fc.property(lengths, fc.double({ min: 0.1, max: 10, noNaN: true }), (list, unit) => {
        const { number, mean, weights } = effectiveCoordination(list)!;
        expect(list.reduce((s, l, i) => s + l * weights[i]!, 0) / number).toBeCloseTo(mean, 8);
        for (const [i, l] of list.entries()) expect(weights[i]).toBeCloseTo(Math.exp(1 - (l / mean) ** 6), 8);
        expect(effectiveCoordination(list.map((l) => l * unit))!.number).toBeCloseTo(number, 8);
      }),
    );
  });
});

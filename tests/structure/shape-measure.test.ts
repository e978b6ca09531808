import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { leastAssignment } from "../../lib/structure/assignment.ts";
import { hullVolume } from "../../lib/structure/hull-volume.ts";
import { type IdealShape, idealShapes } from "../../lib/structure/ideal-shapes.ts";
import { apply3, type Mat3, shapeMeasures, type Vec3 } from "../../lib/structure/index.ts";
import { polyhedronDistortion } from "../../lib/structure/polyhedron-distortion.ts";
import { nearestRotation } from "../../lib/structure/rotation-fit.ts";
import { centred, largestOverlap, overlapMatrix } from "../../lib/structure/shape-fit.ts";
import { measureOf, rotationsOf } from "../../lib/structure/shape-measure.ts";

const NUMBERS = [2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12];
const SHAPES: readonly IdealShape[] = NUMBERS.flatMap((n) => idealShapes(n));
const named = (name: string) => SHAPES.find((s) => s.name === name)!;

const small = fc.double({ min: -1, max: 1, noNaN: true });
const vector = fc.tuple(small, small, small);
const matrix = fc.array(small, { minLength: 9, maxLength: 9 }).map((m) => m as unknown as Mat3);
const rotation = matrix.map(nearestRotation);
const shape = fc.constantFrom(...SHAPES);

/** An ideal shape with its corners moved, turned, enlarged and in another order. */
const distorted = fc
  .tuple(shape, fc.array(vector, { minLength: 12, maxLength: 12 }), fc.double({ min: 0, max: 0.3, noNaN: true }))
  .map(([s, kicks, size]) => ({
    shape: s,
    corners: s.corners.map((c, i) => c.map((e, k) => e + size * kicks[i]![k]!) as unknown as Vec3),
  }));

const sorted = (list: ReturnType<typeof shapeMeasures>) =>
  list.map((s) => [s.name, Number(s.measure.toFixed(4))] as const).sort(([a], [b]) => (a < b ? -1 : 1));

describe("ideal shapes", () => {
  it.each(SHAPES.map((s) => [s.name, s] as const))("%s has different corners at distance 1", (_, { corners }) => {
    for (const c of corners) expect(Math.hypot(...c)).toBeCloseTo(1, 12);
    for (const [i, a] of corners.entries()) {
      for (const b of corners.slice(0, i))
        expect(Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2])).toBeGreaterThan(0.3);
    }
  });

  it.each([
    ["tetrahedron", 12],
    ["octahedron", 24],
    ["cube", 24],
    ["icosahedron", 60],
    ["cuboctahedron", 24],
    ["anticuboctahedron", 6],
    ["truncated tetrahedron", 12],
    ["trigonal prism", 6],
    ["square antiprism", 8],
    ["triangular dodecahedron", 4],
    ["capped octahedron", 3],
    ["tricapped trigonal prism", 6],
    ["pentagonal bipyramid", 10],
  ])("%s has %i rotations", (name, order) => expect(rotationsOf(named(name))).toHaveLength(order));

  it.each([
    ["tetrahedron", 6],
    ["octahedron", 12],
    ["cube", 12],
    ["icosahedron", 30],
    ["cuboctahedron", 24],
    ["anticuboctahedron", 24],
    ["trigonal prism", 9],
    ["square antiprism", 16],
    ["triangular dodecahedron", 16 - 2],
    ["capped octahedron", 12],
    ["truncated tetrahedron", 18],
  ])("%s has %i shortest edges of equal length", (name, count) => {
    const { corners } = named(name);
    const edges = corners.flatMap((a, i) =>
      corners.slice(0, i).map((b) => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2])),
    );
    const least = Math.min(...edges);
    expect(edges.filter((e) => e < least + 1e-6)).toHaveLength(count);
  });

  it("stand apart from each other", () => {
    for (const s of SHAPES) {
      for (const other of idealShapes(s.corners.length)) {
        if (other !== s)
          expect([s.name, other.name, measureOf(s.corners, other).measure > 0.5]).toEqual([s.name, other.name, true]);
      }
    }
  });
});

describe("shape measures", () => {
  it.each(SHAPES.map((s) => [s.name, s] as const))("are 0 for %s itself", (name, { corners }) => {
    expect(shapeMeasures(corners)[0]).toMatchObject({ name, measure: 0 });
  });

  test("do not change with size, orientation, order and handedness of the neighbours", () => {
    fc.assert(
      fc.property(
        distorted,
        rotation,
        fc.double({ min: 0.5, max: 3, noNaN: true }),
        fc.boolean(),
        (d, R, size, mirror) => {
          const k = mirror ? -size : size;
          const moved = d.corners.map((c) => apply3(R, c).map((e) => e * k) as unknown as Vec3).reverse();
          const [a, b] = [sorted(shapeMeasures(d.corners)), sorted(shapeMeasures(moved))];
          for (const [i, [name, measure]] of a.entries()) {
            expect(b[i]![0]).toBe(name);
            // the search by turns may miss the best assignment to a shape that is far off anyway
            if (d.corners.length <= 6 || measure < 15) expect(b[i]![1]).toBeCloseTo(measure, 2);
          }
        },
      ),
      { numRuns: 60 },
    );
  });

  test("are never larger than for any one assignment and rotation, and never negative", () => {
    fc.assert(
      fc.property(distorted, rotation, (d, R) => {
        const [q, p] = [centred(d.corners), centred(d.shape.corners)];
        const turned = p.points.map((b) => apply3(R, b));
        const overlap = q.points.reduce(
          (s, a, i) => s + a[0] * turned[i]![0] + a[1] * turned[i]![1] + a[2] * turned[i]![2],
          0,
        );
        const plain = overlap > 0 ? 100 * (1 - overlap ** 2 / (q.squares * p.squares)) : 100;
        const { measure } = measureOf(d.corners, d.shape);
        expect(measure).toBeGreaterThanOrEqual(0);
        expect(measure).toBeLessThanOrEqual(plain + 1e-6);
      }),
    );
  });

  test("by turns agree with trying every assignment, up to 7 corners, where the shape is near", () => {
    const few = SHAPES.filter((s) => s.corners.length >= 4 && s.corners.length <= 7);
    fc.assert(
      fc.property(distorted, fc.nat(), (d, pick) => {
        const n = d.corners.length;
        const candidates = few.filter((s) => s.corners.length === n);
        if (candidates.length === 0) return;
        const target = pick % 2 === 0 ? d.shape : candidates[pick % candidates.length]!;
        const every = measureOf(d.corners, target, "exhaustive").measure;
        const turns = measureOf(d.corners, target, "turns").measure;
        expect(turns).toBeGreaterThanOrEqual(every - 2e-6);
        if (every < 20) expect(turns).toBeCloseTo(every, 4);
      }),
      { numRuns: 150 },
    );
  });
});

test("the largest overlap is that of the nearest rotation", () => {
  fc.assert(
    fc.property(matrix, (m) => {
      const R = nearestRotation(m);
      const trace = R.reduce((s, e, i) => s + e * m[i]!, 0);
      const bound = 2 * Math.hypot(...m) + 1e-9;
      expect(largestOverlap(m, bound)).toBeCloseTo(trace, 4);
    }),
  );
});

test("centred points have their mean at the origin, and overlap with themselves by their squares", () => {
  fc.assert(
    fc.property(distorted, ({ corners }) => {
      const q = centred(corners);
      for (const i of [0, 1, 2]) expect(q.points.reduce((s, p) => s + p[i]!, 0)).toBeCloseTo(0, 10);
      const m = overlapMatrix(
        q,
        q,
        corners.map((_, i) => i),
      );
      expect(m[0] + m[4] + m[8]).toBeCloseTo(q.squares, 10);
    }),
  );
});

test("the least assignment is that of trying all", () => {
  const all = (n: number): number[][] =>
    n === 0
      ? [[]]
      : all(n - 1).flatMap((p) => Array.from({ length: n }, (_, k) => [...p.slice(0, k), n - 1, ...p.slice(k)]));
  fc.assert(
    fc.property(fc.integer({ min: 1, max: 6 }), fc.array(small, { minLength: 36, maxLength: 36 }), (n, numbers) => {
      const cost = Array.from({ length: n }, (_, i) => numbers.slice(6 * i, 6 * i + n));
      const sum = (order: readonly number[]) => order.reduce((s, j, i) => s + cost[i]![j]!, 0);
      const found = leastAssignment(cost);
      expect([...found].sort((a, b) => a - b)).toEqual(Array.from({ length: n }, (_, i) => i));
      expect(sum(found)).toBeCloseTo(Math.min(...all(n).map(sum)), 10);
    }),
  );
});

describe("distortion", () => {
  const of = (corners: readonly Vec3[]) => polyhedronDistortion(corners, shapeMeasures(corners))!;

  it("vanishes for regular tetrahedra and octahedra", () => {
    for (const name of ["tetrahedron", "octahedron"]) {
      const d = of(named(name).corners.map((c) => c.map((e) => 2 * e) as unknown as Vec3));
      expect(d).toMatchObject({ lengthDistortion: 0, angleVariance: 0 });
      expect(d.quadraticElongation).toBeCloseTo(1, 12);
    }
  });

  it("gives the indices of four and five neighbours at their ends", () => {
    expect(of(named("tetrahedron").corners).tau4).toBeCloseTo(1, 10);
    expect(of(named("square plane").corners).tau4).toBe(0);
    expect(of(named("trigonal bipyramid").corners).tau5).toBeCloseTo(1, 10);
    expect(of(named("octahedron without a corner").corners).tau5).toBe(0);
  });

  it("is that of a stretched octahedron by its formulae", () => {
    // axes 2.4, 2, 2: volume 4/3 abc, mean square of the lengths over that of a regular one of the same volume
    const corners: Vec3[] = [
      [2.4, 0, 0],
      [-2.4, 0, 0],
      [0, 2, 0],
      [0, -2, 0],
      [0, 0, 2],
      [0, 0, -2],
    ];
    const d = of(corners);
    expect(d.volume).toBeCloseTo((4 / 3) * 2.4 * 4, 10);
    expect(d.quadraticElongation).toBeCloseTo((2 * 2.4 ** 2 + 4 * 4) / 6 / (2.4 * 4) ** (2 / 3), 10);
    expect(d.angleVariance).toBe(0);
    expect(d.lengthDistortion).toBeCloseTo((2 * (2.4 - 12.8 / 6) + 4 * (12.8 / 6 - 2)) / 12.8, 10);
  });

  test("volumes grow with the cube of the size, whatever the orientation", () => {
    fc.assert(
      fc.property(distorted, rotation, ({ corners }, R) => {
        if (corners.length < 4) return;
        const turned = corners.map((c) => apply3(R, c).map((e) => 2 * e) as unknown as Vec3);
        expect(hullVolume(turned)).toBeCloseTo(8 * hullVolume(corners), 6);
      }),
    );
    const cube: Vec3[] = [0, 1, 2, 3, 4, 5, 6, 7].map((k) => [k & 1, (k >> 1) & 1, k >> 2]);
    expect(hullVolume(cube)).toBeCloseTo(1, 12);
  });
});

import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { lengthOf, metricOf, multiplicityOf, orbitOf, siteSymmetry, type Vec3 } from "../../lib/structure/index.ts";
import { compose, operationKey, parseOperation, spaceGroup, transformPoint } from "../../lib/symmetry/index.ts";

const rutile = spaceGroup(["-y+1/2,x+1/2,z+1/2", "x+1/2,-y+1/2,-z+1/2", "-x,-y,-z"].map(parseOperation));
const rutileCell = metricOf({ a: 4.594, b: 4.594, c: 2.959, alpha: 90, beta: 90, gamma: 90 });
const calcite = spaceGroup(["-y,x-y,z", "y,x,-z+1/2", "-x,-y,-z", "x+2/3,y+1/3,z+1/3"].map(parseOperation));
const calciteCell = metricOf({ a: 4.99, b: 4.99, c: 17.061, alpha: 90, beta: 90, gamma: 120 });

describe("siteSymmetry", () => {
  test("finds mmm at the origin of rutile and mm2 at x,x,0", () => {
    expect(siteSymmetry(rutile.operations, rutileCell, [0, 0, 0], 0.05).operations).toHaveLength(8);
    const oxygen = siteSymmetry(rutile.operations, rutileCell, [0.3053, 0.3053, 0], 0.05);
    expect(oxygen.operations).toHaveLength(4);
    expect(oxygen.shift).toBe(0);
    expect(multiplicityOf(rutile, oxygen)).toBe(4);
  });

  test("snaps a rounded third exactly and says how far it moved", () => {
    const site = siteSymmetry(calcite.operations, calciteCell, [0.3333, 0.6667, 0.16667], 0.05);
    expect(site.operations).toHaveLength(6);
    expect(site.point).toEqual([1 / 3, 2 / 3, 1 / 6]);
    expect(site.shift).toBeGreaterThan(1e-5);
    expect(site.shift).toBeLessThan(1e-3);
  });

  test("leaves a point off the special position when the tolerance is smaller than the distance", () => {
    const near: Vec3 = [0.005, 0, 0]; // 0.023 angstrom from the centre, its inverse 0.046 away
    expect(siteSymmetry(rutile.operations, rutileCell, near, 0.05).operations).toHaveLength(8);
    // only the mirror z = 0 passes through it exactly
    expect(siteSymmetry(rutile.operations, rutileCell, near, 0.02).operations).toHaveLength(2);
    expect(siteSymmetry(rutile.operations, rutileCell, near, 0.02).point).toEqual(near);
  });

  test("always gives a group whose operations fix the snapped point exactly", () => {
    const coordinate = fc.double({ min: -1, max: 2, noNaN: true });
    fc.assert(
      fc.property(
        fc.constantFrom([rutile, rutileCell] as const, [calcite, calciteCell] as const),
        fc.tuple(coordinate, coordinate, coordinate),
        fc.double({ min: 0, max: 1, noNaN: true }),
        ([group, metric], x, tolerance) => {
          const site = siteSymmetry(group.operations, metric, x, tolerance);
          const keys = new Set(site.operations.map(operationKey));
          for (const a of site.operations) {
            for (const b of site.operations) expect(keys.has(operationKey(compose(a, b)))).toBe(true);
            const y = transformPoint(a, site.point);
            expect(lengthOf(metric, [y[0] - site.point[0], y[1] - site.point[1], y[2] - site.point[2]])).toBeLessThan(
              1e-9,
            );
          }
          expect(site.shift).toBeLessThanOrEqual(tolerance);
          expect(group.operations.length % site.operations.length).toBe(0);
        },
      ),
    );
  });
});

describe("orbitOf", () => {
  test("gives each image of rutile's oxygen once, with the operation that makes it", () => {
    const site = siteSymmetry(rutile.operations, rutileCell, [0.3053, 0.3053, 0], 0.05);
    const images = orbitOf(rutile, site);
    expect(images).toHaveLength(4);
    for (const image of images) {
      const y = transformPoint(rutile.operations[image.operation]!, site.point);
      image.position.forEach((e, i) => {
        const d = e - y[i]!;
        expect(Math.abs(d - Math.round(d))).toBeLessThan(1e-12);
        expect(e >= 0 && e < 1).toBe(true);
      });
    }
    expect(new Set(images.map((i) => i.position.map((e) => e.toFixed(6)).join())).size).toBe(4);
  });
});

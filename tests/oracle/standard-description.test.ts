import { describe, expect, it } from "vitest";
import { determinant, type IntMat3, inverseUnimodular } from "../../lib/algebra/index.ts";
import { apply3, type Crystal, standardisedCrystal, type Vec3 } from "../../lib/structure/index.ts";
import { axisChanges } from "../../lib/symmetry/axis-changes.ts";
import { groupProperties, parseTriplet, wyckoffPositions } from "../../lib/symmetry/index.ts";
import { randomNumbers, randomStructure } from "../support/random-structures.ts";

/** Origins are tried on a grid of this many points along each axis. */
const GRID = 12;

/** Rotations that keep the shape of any cell of the family. */
function rotations(number: number): IntMat3[] {
  const { crystalFamily } = groupProperties(number);
  const all = axisChanges(crystalFamily).filter((N) => determinant(N) === 1);
  if (crystalFamily !== "orthorhombic" && crystalFamily !== "monoclinic") return all;
  return all.filter(
    (N) => [1, 2, 3, 5, 6, 7].every((i) => N[i] === 0) && (crystalFamily !== "monoclinic" || N[0] === N[8]),
  );
}

const near = (x: number) => Math.abs(x - Math.round(x)) < 1e-6;
const wrapped = (x: number) => (near(x) ? 0 : x - Math.floor(x));

/** Whether W x + w is, modulo 1, the same list of operations after the change. */
function keeps({ group }: Crystal, N: IntMat3, p: Vec3): boolean {
  const back = inverseUnimodular(N);
  return group.operations.every(({ W, w }) => {
    // W' = N^-1 W N, w' = N^-1 (W p + w - p)
    const columns = [0, 1, 2].map((j) => apply3(back, apply3(W, [N[j]!, N[3 + j]!, N[6 + j]!])));
    const moved = apply3(W, p).map((e, i) => e + w.n[i]! / w.d - p[i]!) as unknown as Vec3;
    const shift = apply3(back, moved);
    return group.operations.some(
      (b) =>
        columns.every((c, j) => c.every((e, i) => e === b.W[3 * i + j])) &&
        shift.every((e, i) => near(e - b.w.n[i]! / b.w.d)),
    );
  });
}

/** Smallest length of an image that has the form of the first triplet of a position with as many points. */
function shortest(number: number, images: readonly Vec3[]): number {
  const forms = wyckoffPositions(number)
    .filter((p) => p.multiplicity === images.length)
    .map((p) => parseTriplet(p.coordinates[0]!, "xyz"));
  const fits = (x: Vec3) =>
    forms.some((form) =>
      form.every((e, i) =>
        near(e.coefficients.reduce((s, c, j) => s + (c.n / c.d) * x[j]!, e.constant.n / e.constant.d) - x[i]!),
      ),
    );
  return Math.min(...images.filter(fits).map((x) => Math.hypot(...x)));
}

function bruteGamma(crystal: Crystal, number: number): number {
  let best = Number.POSITIVE_INFINITY;
  for (const N of rotations(number)) {
    const back = inverseUnimodular(N);
    for (let k = 0; k < GRID ** 3; k++) {
      const p: Vec3 = [(k % GRID) / GRID, (Math.floor(k / GRID) % GRID) / GRID, Math.floor(k / GRID ** 2) / GRID];
      if (!keeps(crystal, N, p)) continue;
      const gamma = crystal.sites.reduce((sum, { images }) => {
        const moved = images.map(({ position: x }) =>
          apply3(back, [x[0] - p[0], x[1] - p[1], x[2] - p[2]]).map(wrapped),
        );
        return sum + shortest(number, moved as unknown as Vec3[]);
      }, 0);
      best = Math.min(best, gamma);
    }
  }
  return best;
}

describe("the standard description", () => {
  // groups without free origins
  it.each([
    2, 10, 14, 15, 19, 47, 57, 61, 62, 72, 123, 136, 140, 147, 148, 150, 155, 162, 167, 176, 194, 195, 200, 205, 215,
    221,
  ])("has the smallest parameter of all origins and orientations on a grid: type %i", { timeout: 60_000 }, (number) => {
    const given = randomStructure(number, randomNumbers(number * 3));
    const { crystal, description } = standardisedCrystal(given); // its axes are those of the standard cell
    expect(bruteGamma(crystal, number)).toBeCloseTo(description.gamma, 6);
  });
});

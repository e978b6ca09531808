import type { IntMat3 } from "../../lib/algebra/index.ts";
import { apply3, type Mat3, type Metric, multiply3, type Vec3 } from "../../lib/structure/index.ts";

/** Atoms of a whole cell. */
export interface ListedAtoms {
  readonly metric: Metric;
  readonly points: readonly Vec3[];
  readonly elements: readonly string[];
}

/**
 * Slow twin of the symmetry search: every rotation part with entries -1, 0, 1 that keeps the metric, every translation
 * that carries the first atom to one of its kind, and for each of these every atom against every other. Returns the
 * number of operations modulo the cell. Translations are not refined, so noise counts against the tolerance.
 */
export function countOperations(atoms: ListedAtoms, tolerance: number): number {
  const { points, elements } = atoms;
  let count = 0;
  for (const W of keptRotations(atoms.metric)) {
    const image = apply3(W, points[0]!);
    points.forEach((x, j) => {
      if (elements[j] !== elements[0]) return;
      const w: Vec3 = [x[0] - image[0], x[1] - image[1], x[2] - image[2]];
      if (carries(atoms, W, w, tolerance)) count++;
    });
  }
  return count;
}

function carries({ metric, points, elements }: ListedAtoms, W: IntMat3, w: Vec3, tolerance: number): boolean {
  for (let k = 0; k < points.length; k++) {
    const y = apply3(W, points[k]!);
    let found = false;
    for (let j = 0; j < points.length && !found; j++) {
      if (elements[j] !== elements[k]) continue;
      const d = [0, 1, 2].map((i) => y[i]! + w[i]! - points[j]![i]!);
      found =
        Math.hypot(...apply3(metric.toCartesian, d.map((e) => e - Math.round(e)) as unknown as Vec3)) <= tolerance;
    }
    if (!found) return false;
  }
  return true;
}

function keptRotations({ g }: Metric): IntMat3[] {
  const kept: IntMat3[] = [];
  for (let code = 0; code < 3 ** 9; code++) {
    const W = Array.from({ length: 9 }, (_, i) => (Math.floor(code / 3 ** i) % 3) - 1) as unknown as IntMat3;
    const transposed = [0, 3, 6, 1, 4, 7, 2, 5, 8].map((k) => W[k]!) as unknown as Mat3;
    const image = multiply3(transposed, multiply3(g, W));
    if (image.every((e, i) => Math.abs(e - g[i]!) < 1e-4 * Math.abs(g[0]))) kept.push(W);
  }
  return kept;
}

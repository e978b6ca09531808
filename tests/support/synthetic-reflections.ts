import { applyRow, type IntMat3, type IntVec3, mod, negate, transpose } from "../../lib/algebra/index.ts";
import type { Reflection } from "../../lib/audit/index.ts";
import { cellOfMetric, type Mat3, type Metric, metricOf, multiply3 } from "../../lib/structure/index.ts";
import type { SpaceGroup } from "../../lib/symmetry/index.ts";

/** Numbers in [0, 1) from a seed (xorshift), the same on every machine. */
export function seeded(seed: number): () => number {
  let s = seed | 0 || 1;
  return () => {
    s ^= s << 13;
    s ^= s >>> 17;
    s ^= s << 5;
    return (s >>> 0) / 2 ** 32;
  };
}

/** A cell without any symmetry but what the rotations of the group force on it; about `volume` cubic angstrom. */
export function randomMetric(group: SpaceGroup, random: () => number, volume = 1000): Metric {
  const edge = () => 7 + 6 * random();
  const angle = () => 80 + 25 * random();
  const { g } = metricOf({ a: edge(), b: edge(), c: edge(), alpha: angle(), beta: angle(), gamma: angle() });
  const sum = new Array<number>(9).fill(0);
  for (const { W } of group.representatives) {
    const image = multiply3(transpose(W), multiply3(g, W));
    for (let i = 0; i < 9; i++) sum[i]! += image[i]! / group.representatives.length;
  }
  const rough = metricOf(cellOfMetric(sum as unknown as Mat3));
  const scale = (volume / rough.volume) ** (2 / 3);
  return metricOf(cellOfMetric(sum.map((e) => e * scale) as unknown as Mat3));
}

export interface Measurement {
  /** Reflections that no symmetry relates, about. */
  readonly unique?: number;
  /** Independent atoms in general positions. */
  readonly atoms?: number;
  /** Relative error, and error in units of the mean intensity. */
  readonly relativeError?: number;
  readonly background?: number;
  /** Equivalents measured of each reflection, itself included. */
  readonly copies?: number;
}

interface Atom {
  readonly position: readonly [number, number, number];
  readonly charge: number;
}

/**
 * Intensities of a structure of random light atoms, with normal errors, of equivalents chosen at random in the Laue
 * class. Point atoms that thermal motion blurs: f = Z exp(-B / 4d^2), B = 2 square angstrom.
 */
export function measure(
  group: SpaceGroup,
  metric: Metric,
  random: () => number,
  options: Measurement = {},
): Reflection[] {
  const { unique = 1000, atoms = 8, relativeError = 0.03, background = 0.01, copies = 2 } = options;
  const structure = Array.from(
    { length: atoms },
    (): Atom => ({ position: [random(), random(), random()], charge: 6 + Math.floor(11 * random()) }),
  );
  const laue = laueMatrices(group);
  const hs = uniqueIndices(metric, laue, unique);
  const exact = hs.map((h) => intensity(h, group, structure, inverseSquare(metric, h)));
  const mean = exact.reduce((s, v) => s + v, 0) / exact.length;
  return hs.flatMap((h, i) =>
    Array.from({ length: copies }, (_, copy): Reflection => {
      const W = copy === 0 ? laue[0]! : laue[Math.floor(random() * laue.length)]!;
      const sigma = Math.hypot(relativeError * exact[i]!, background * mean);
      return { h: applyRow(h, W), value: exact[i]! + sigma * normal(random), sigma };
    }),
  );
}

/** Rotation parts of the Laue class, the identity first. */
export function laueMatrices(group: SpaceGroup): IntMat3[] {
  const all = new Map<string, IntMat3>();
  for (const { W } of group.representatives) for (const M of [W, negate(W)]) all.set(M.join(), M);
  return [...all.values()];
}

function inverseSquare({ toFractional: m }: Metric, [h, k, l]: IntVec3): number {
  return [0, 1, 2].reduce((s, j) => s + (h * m[j]! + k * m[3 + j]! + l * m[6 + j]!) ** 2, 0);
}

/** One of each set of equivalents, forbidden ones included, about so many, up to a common resolution. */
export function uniqueIndices(metric: Metric, laue: readonly IntMat3[], count: number): IntVec3[] {
  const radius = ((3 * count * laue.length) / (4 * Math.PI * metric.volume)) ** (1 / 3);
  const { a, b, c } = metric.cell;
  const [H, K, L] = [a, b, c].map((e) => Math.ceil(e * radius * 1.2)) as [number, number, number];
  const found: IntVec3[] = [];
  for (let h = -H; h <= H; h++) {
    for (let k = -K; k <= K; k++) {
      for (let l = 0; l <= L; l++) {
        const index: IntVec3 = [h, k, l];
        if (h === 0 && k === 0 && l === 0) continue;
        if (inverseSquare(metric, index) > radius * radius) continue;
        if (laue.every((W) => !precedes(index, applyRow(index, W)))) found.push(index);
      }
    }
  }
  return found;
}

function precedes(a: IntVec3, b: IntVec3): boolean {
  const difference = a[2] - b[2] || a[1] - b[1] || a[0] - b[0];
  return difference < 0;
}

function intensity(h: IntVec3, group: SpaceGroup, atoms: readonly Atom[], x: number): number {
  let [re, im] = [0, 0];
  for (const { W, w } of group.operations) {
    const image = applyRow(h, W);
    const shift = mod(h[0] * w.n[0] + h[1] * w.n[1] + h[2] * w.n[2], w.d) / w.d;
    for (const { position, charge } of atoms) {
      const phase = 2 * Math.PI * (image[0] * position[0] + image[1] * position[1] + image[2] * position[2] + shift);
      const f = charge * Math.exp((-2 * x) / 4);
      re += f * Math.cos(phase);
      im += f * Math.sin(phase);
    }
  }
  return re * re + im * im;
}

/** A standard normal number (Box and Muller). */
export function normal(random: () => number): number {
  return Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
}

import type { IntMat3 } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";

/** Unit cell: lengths in angstrom, angles in degrees. */
export interface Cell {
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly alpha: number;
  readonly beta: number;
  readonly gamma: number;
}

/** Three floating-point numbers: fractional or Cartesian (angstrom), as the function says. */
export type Vec3 = readonly [number, number, number];
/** Row-major floating-point matrix. */
export type Mat3 = readonly [number, number, number, number, number, number, number, number, number];

/** Strain of a cell under an operation above which the two are said to disagree; s.u. of cells lie well below. */
export const METRIC_TOLERANCE = 5e-3;

/** A cell with what is computed from it once. */
export interface Metric {
  readonly cell: Cell;
  /** Metric tensor G, square angstrom: |x|^2 = x^T G x for fractional x. */
  readonly g: Mat3;
  /** Cubic angstrom. */
  readonly volume: number;
  /**
   * Fractional to Cartesian, angstrom, columns a, b, c: x along a, y in the plane of a and b, z along c*
   * (the usual `_atom_sites.Cartn_transform_axes` of the IUCr core dictionary).
   */
  readonly toCartesian: Mat3;
  readonly toFractional: Mat3;
}

const DEGREE = Math.PI / 180;

/**
 * @throws InputProblem `cell-impossible` where lengths are not positive or the angles span no volume
 */
export function metricOf(cell: Cell): Metric {
  const { a, b, c } = cell;
  const [ca, cb, cg] = [cell.alpha, cell.beta, cell.gamma].map(cosine) as [number, number, number];
  const q = 1 - ca * ca - cb * cb - cg * cg + 2 * ca * cb * cg;
  const lengths = [a, b, c];
  if (lengths.some((l) => !(Number.isFinite(l) && l > 0)) || !(q > 1e-9)) {
    throw new InputProblem(
      "cell-impossible",
      `the cell a=${a} b=${b} c=${c} alpha=${cell.alpha} beta=${cell.beta} gamma=${cell.gamma} encloses no volume`,
      null,
      "give three positive lengths, and angles each below the sum of the other two",
    );
  }
  const sg = Math.sqrt(1 - cg * cg);
  const volume = a * b * c * Math.sqrt(q);
  const toCartesian: Mat3 = [a, b * cg, c * cb, 0, b * sg, (c * (ca - cb * cg)) / sg, 0, 0, volume / (a * b * sg)];
  const g: Mat3 = [a * a, a * b * cg, a * c * cb, a * b * cg, b * b, b * c * ca, a * c * cb, b * c * ca, c * c];
  return { cell, g, volume, toCartesian, toFractional: inverse3(toCartesian) };
}

function cosine(degrees: number): number {
  // 90 and 60 or 120 degrees are meant exactly; the library's cosine misses by 6e-17.
  if (degrees === 90) return 0;
  if (degrees === 120) return -0.5;
  if (degrees === 60) return 0.5;
  return Math.cos(degrees * DEGREE);
}

/** m v. */
export function apply3(m: Mat3 | IntMat3, v: Vec3): [number, number, number] {
  return [
    m[0] * v[0] + m[1] * v[1] + m[2] * v[2],
    m[3] * v[0] + m[4] * v[1] + m[5] * v[2],
    m[6] * v[0] + m[7] * v[1] + m[8] * v[2],
  ];
}

/** a b. */
export function multiply3(a: Mat3 | IntMat3, b: Mat3 | IntMat3): Mat3 {
  const out: number[] = [];
  for (let i = 0; i < 9; i += 3) {
    for (let j = 0; j < 3; j++) out.push(a[i]! * b[j]! + a[i + 1]! * b[3 + j]! + a[i + 2]! * b[6 + j]!);
  }
  return out as unknown as Mat3;
}

/** @throws RangeError if the matrix is singular */
export function inverse3(m: Mat3): Mat3 {
  const [a, b, c, d, e, f, g, h, i] = m;
  const det = a * (e * i - f * h) - b * (d * i - f * g) + c * (d * h - e * g);
  if (!(Math.abs(det) > 0)) throw new RangeError(`singular matrix: ${m.join(" ")}`);
  return [
    (e * i - f * h) / det,
    (c * h - b * i) / det,
    (b * f - c * e) / det,
    (f * g - d * i) / det,
    (a * i - c * g) / det,
    (c * d - a * f) / det,
    (d * h - e * g) / det,
    (b * g - a * h) / det,
    (a * e - b * d) / det,
  ];
}

/** Length in angstrom of a fractional vector. */
export function lengthOf(metric: Metric, v: Vec3): number {
  const g = metric.g;
  const [x, y, z] = v;
  const square = g[0] * x * x + g[4] * y * y + g[8] * z * z + 2 * (g[1] * x * y + g[2] * x * z + g[5] * y * z);
  return Math.sqrt(Math.max(0, square));
}

/** Lengths of the reciprocal axes a*, b*, c*, 1 / angstrom: one over the spacings of the lattice planes x, y, z = 1. */
export function reciprocalLengths({ toFractional: r }: Metric): Vec3 {
  return [Math.hypot(r[0], r[1], r[2]), Math.hypot(r[3], r[4], r[5]), Math.hypot(r[6], r[7], r[8])];
}

/**
 * How far two points within a distance (angstrom) of each other may differ in each coordinate: the distance over the
 * spacings of the lattice planes x, y, z = 1. A last bit is added, so that rounding excludes no point.
 */
export function planeReach(metric: Metric, distance: number): Vec3 {
  const [a, b, c] = reciprocalLengths(metric);
  return [a * distance + ROUNDING, b * distance + ROUNDING, c * distance + ROUNDING];
}

/** Larger than what sums of a few products of coordinates lose in the last bit. */
const ROUNDING = 1e-12;

/** Cell of the axes with metric tensor g. */
export function cellOfMetric(g: Mat3): Cell {
  const [a, b, c] = [Math.sqrt(g[0]), Math.sqrt(g[4]), Math.sqrt(g[8])] as const;
  const angle = (cosine: number) => Math.acos(Math.max(-1, Math.min(1, cosine))) / DEGREE;
  return { a, b, c, alpha: angle(g[5] / (b * c)), beta: angle(g[2] / (a * c)), gamma: angle(g[1] / (a * b)) };
}

/**
 * Largest strain by which a rotation part W of an operation fails to keep the metric: max |W^T G W - G|_ij over
 * sqrt(G_ii G_jj). 0 for a cell of the right shape; dimensionless.
 */
export function metricMisfit(metric: Metric, W: IntMat3): number {
  const g = metric.g;
  const transposed: Mat3 = [W[0], W[3], W[6], W[1], W[4], W[7], W[2], W[5], W[8]];
  const image = multiply3(transposed, multiply3(g, W));
  let worst = 0;
  for (let i = 0; i < 3; i++) {
    for (let j = 0; j < 3; j++) {
      const scale = Math.sqrt(g[4 * i]! * g[4 * j]!);
      worst = Math.max(worst, Math.abs(image[3 * i + j]! - g[3 * i + j]!) / scale);
    }
  }
  return worst;
}

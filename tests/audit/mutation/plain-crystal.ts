/**
 * Crystallography by brute force and floating point, for making up depositions: slow, obvious, and without a line of
 * lib/, so that what it writes is no echo of what is tested.
 */

export type Triple = [number, number, number];
/** Row-major. */
export type Nine = number[];

export interface PlainOperation {
  readonly W: Nine;
  readonly t: Triple;
}

/** Reads `-x+1/2,y,z-1/4`. */
export function plainOperation(text: string): PlainOperation {
  const W: Nine = [];
  const t: Triple = [0, 0, 0];
  text.split(",").forEach((part, i) => {
    const row = [0, 0, 0];
    for (const [, sign, number, letter] of part.matchAll(/([+-]?)(\d+\/\d+|\d+(?:\.\d+)?)?([xyz]?)/g)) {
      if (!number && !letter) continue;
      const factor = (sign === "-" ? -1 : 1) * fraction(number ?? "1");
      if (letter) row["xyz".indexOf(letter)]! += factor;
      else t[i as 0 | 1 | 2] += factor;
    }
    W.push(...row);
  });
  return { W, t };
}

function fraction(text: string): number {
  const [n, d] = text.split("/").map(Number);
  return n! / (d ?? 1);
}

export function applyTo({ W, t }: PlainOperation, x: Triple): Triple {
  const row = (i: 0 | 1 | 2) => W[3 * i]! * x[0] + W[3 * i + 1]! * x[1] + W[3 * i + 2]! * x[2] + t[i];
  return [row(0), row(1), row(2)];
}

export interface PlainCell {
  readonly edges: Triple;
  /** Columns a, b, c; angstrom. */
  readonly A: Nine;
  readonly inverse: Nine;
  readonly volume: number;
}

export function plainCell(a: number, b: number, c: number, alpha: number, beta: number, gamma: number): PlainCell {
  const [ca, cb, cg] = [alpha, beta, gamma].map((e) => Math.cos((e * Math.PI) / 180)) as Triple;
  const sg = Math.sin((gamma * Math.PI) / 180);
  const y = (ca - cb * cg) / sg;
  const z = Math.sqrt(1 - cb * cb - y * y);
  const A = [a, b * cg, c * cb, 0, b * sg, c * y, 0, 0, c * z];
  return { edges: [a, b, c], A, inverse: inverseOf(A), volume: a * b * sg * c * z };
}

export function times(p: Nine, q: Nine): Nine {
  return [0, 1, 2].flatMap((i) =>
    [0, 1, 2].map((j) => [0, 1, 2].reduce((s, k) => s + p[3 * i + k]! * q[3 * k + j]!, 0)),
  );
}

export function transposed(m: Nine): Nine {
  return [0, 1, 2].flatMap((i) => [0, 1, 2].map((j) => m[3 * j + i]!));
}

export function inverseOf(m: Nine): Nine {
  const minor = (i: number, j: number) => {
    const [r, s] = [0, 1, 2].filter((k) => k !== i) as [number, number];
    const [u, v] = [0, 1, 2].filter((k) => k !== j) as [number, number];
    return m[3 * r + u]! * m[3 * s + v]! - m[3 * r + v]! * m[3 * s + u]!;
  };
  const det = m[0]! * minor(0, 0) - m[1]! * minor(0, 1) + m[2]! * minor(0, 2);
  return [0, 1, 2].flatMap((i) => [0, 1, 2].map((j) => ((i + j) % 2 ? -1 : 1) * (minor(j, i) / det)));
}

export function cartesian({ A }: PlainCell, x: Triple): Triple {
  return applyTo({ W: A, t: [0, 0, 0] }, x);
}

export function minus(a: Triple, b: Triple): Triple {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
}

export function distanceOf(cell: PlainCell, a: Triple, b: Triple): number {
  return Math.hypot(...cartesian(cell, minus(a, b)));
}

/** Angle at b, degrees. */
export function angleOf(cell: PlainCell, a: Triple, b: Triple, c: Triple): number {
  const [u, v] = [cartesian(cell, minus(a, b)), cartesian(cell, minus(c, b))];
  const cosine = (u[0] * v[0] + u[1] * v[1] + u[2] * v[2]) / (Math.hypot(...u) * Math.hypot(...v));
  return (Math.acos(Math.max(-1, Math.min(1, cosine))) * 180) / Math.PI;
}

/** Fixed points nearer than this belong to the site; angstrom. */
const ON_SITE = 0.02;

/** Operations that bring a point back to itself, modulo whole cells. */
export function siteOperations(cell: PlainCell, operations: readonly PlainOperation[], x: Triple): PlainOperation[] {
  return operations.filter((a) => {
    const d = minus(applyTo(a, x), x).map((e) => e - Math.round(e)) as Triple;
    return Math.hypot(...cartesian(cell, d)) < ON_SITE;
  });
}

/** The images of a point in the cell, each once. */
export function imagesOf(cell: PlainCell, operations: readonly PlainOperation[], x: Triple): Triple[] {
  const found: Triple[] = [];
  for (const a of operations) {
    const y = applyTo(a, x).map((e) => e - Math.floor(e + 1e-9)) as Triple;
    const near = (z: Triple) =>
      Math.hypot(...cartesian(cell, minus(y, z).map((e) => e - Math.round(e)) as Triple)) < ON_SITE;
    if (!found.some(near)) found.push(y);
  }
  return found;
}

/** Indices of a reflection as rows: h W. */
export function rowTimes(h: Triple, W: Nine): Triple {
  const at = (j: number) => h[0] * W[j]! + h[1] * W[3 + j]! + h[2] * W[6 + j]! + 0;
  return [at(0), at(1), at(2)];
}

/** Random numbers in [0, 1) that are the same in every run. */
export function seeded(text: string): () => number {
  let state = 2166136261;
  for (const c of text) state = Math.imul(state ^ c.charCodeAt(0), 16777619);
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

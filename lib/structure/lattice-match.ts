import { determinant, type IntMat3, type IntVec3 } from "../algebra/index.ts";
import { apply3, inverse3, type Mat3, multiply3, type Vec3 } from "./cell.ts";
import { changeAxes, gramOf, type LatticeAxes, volumeOfAxes } from "./lattice-axes.ts";
import { dot3, length3 } from "./rotation-fit.ts";
import { symmetricEigen } from "./symmetric-eigen.ts";

/** How one cell is strained against another, after the best rotation. Dimensionless. */
export interface LatticeStrain {
  /** Relative elongations along the three principal directions, the largest first. */
  readonly principal: readonly [number, number, number];
  /** The largest of them, sign apart. */
  readonly largest: number;
  /** Volume over volume. */
  readonly volumeRatio: number;
}

/** Axes of one lattice that lie like those of another. */
export interface LatticeMatch {
  /** Integer; the axes of the first lattice times this are, up to strain and rotation, those of the second. */
  readonly M: IntMat3;
  readonly strain: LatticeStrain;
}

/**
 * Every way to lay a reduced cell onto a lattice: M with axes(from) M like axes(to). Of determinant k or -k, where the
 * cell is that of a sublattice of index k; negative ones turn the axes into left-handed ones.
 * @param limit largest principal strain, dimensionless
 */
export function latticeMatches(from: LatticeAxes, to: LatticeAxes, limit: number): LatticeMatch[] {
  const columns = [0, 1, 2].map((j): Vec3 => [to[j]!, to[3 + j]!, to[6 + j]!]);
  const lengths = columns.map(length3);
  const candidates = vectorsWithin(from, Math.max(...lengths) * (1 + limit));
  const near = lengths.map((l) => candidates.filter((v) => Math.abs(v.length / l - 1) <= limit + ROUNDING));
  const index = Math.round(Math.abs(volumeOfAxes(to) / volumeOfAxes(from)));
  const fits = (u: NetVector, v: NetVector, i: number, j: number) =>
    // a strain e changes the cosine of an angle by up to 2 e
    Math.abs(dot3(u.at, v.at) / (u.length * v.length) - dot3(columns[i]!, columns[j]!) / (lengths[i]! * lengths[j]!)) <=
    2 * limit + ROUNDING;
  const found: LatticeMatch[] = [];
  for (const u of near[0]!) {
    for (const v of near[1]!) {
      if (!fits(u, v, 0, 1)) continue;
      for (const w of near[2]!) {
        if (!fits(u, w, 0, 2) || !fits(v, w, 1, 2)) continue;
        const M = [0, 1, 2].flatMap((i) => [u.n[i]!, v.n[i]!, w.n[i]!]) as unknown as IntMat3;
        if (Math.abs(determinant(M)) !== index) continue;
        const strain = strainBetween(changeAxes(from, M), to);
        if (strain.largest <= limit + ROUNDING) found.push({ M, strain });
      }
    }
  }
  return found.sort((a, b) => a.strain.largest - b.strain.largest);
}

/** So that a limit of 0 lets the lattice itself pass; dimensionless. */
const ROUNDING = 1e-9;

interface NetVector {
  readonly n: IntVec3;
  readonly at: Vec3;
  /** Angstrom. */
  readonly length: number;
}

/** Lattice vectors up to a length, 0 left out. */
function vectorsWithin(axes: LatticeAxes, most: number): NetVector[] {
  const inverse = inverse3(axes);
  const [a, b, c] = [0, 3, 6].map((i) => Math.floor(most * Math.hypot(...inverse.slice(i, i + 3)) + ROUNDING)) as [
    number,
    number,
    number,
  ];
  const found: NetVector[] = [];
  for (let i = -a; i <= a; i++) {
    for (let j = -b; j <= b; j++) {
      for (let k = -c; k <= c; k++) {
        const at = apply3(axes, [i, j, k]);
        const length = length3(at);
        if (length > 0 && length <= most) found.push({ n: [i, j, k], at, length });
      }
    }
  }
  return found;
}

/** The strain that leads from one cell to another. */
export function strainBetween(from: LatticeAxes, to: LatticeAxes): LatticeStrain {
  const back = inverse3(from);
  const transposed = [0, 3, 6, 1, 4, 7, 2, 5, 8].map((k) => back[k]!) as unknown as Mat3;
  const g = multiply3(transposed, multiply3(gramOf(to), back)); // squares of the elongations, in Cartesian axes of `from`
  const { values } = symmetricEigen([g.slice(0, 3), g.slice(3, 6), g.slice(6, 9)]);
  const principal = values.map((e) => Math.sqrt(Math.max(0, e)) - 1) as [number, number, number];
  return {
    principal,
    largest: Math.max(...principal.map(Math.abs)),
    volumeRatio: Math.abs(volumeOfAxes(to) / volumeOfAxes(from)),
  };
}

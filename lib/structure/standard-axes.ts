import { determinant, IDENTITY, type IntMat3, multiply, transpose } from "../algebra/index.ts";
import { type CrystalFamily, groupProperties, normalisingShift, type SpaceGroup } from "../symmetry/index.ts";
import { apply3, type Mat3, type Metric, multiply3 } from "./cell.ts";
import { invariantMetric } from "./invariant-metric.ts";
import { smallMatrices } from "./lattice-symmetry.ts";
import { niggliReduction } from "./niggli-reduction.ts";

/** Terms of the metric tensor that differ by less than this share of the largest are equal: rounding; dimensionless. */
const TIE = 1e-6;

/**
 * The changes of axes of a reference setting that lead to its standard cell and leave the group as it is, right-handed,
 * one for each class that the point group itself makes equivalent. Several, where they lead to cells of one shape.
 *
 * The cell is settled by these rules: triclinic, the Niggli cell; monoclinic (axis b, cell choice 1, so that the symbol
 * is that of the reference setting), a and c such that a^2 + c^2 is smallest, beta not acute, then a not above c;
 * orthorhombic, of the orders of axes that leave the symbol as it is the one with a, then b, smallest (so a, b, c ascend
 * where all orders are allowed); otherwise symmetry leaves no choice of shape. Which cells E. Parthe and L. M. Gelato,
 * Acta Cryst. A40 (1984) 169, call standard is taken from memory; the measure a^2 + c^2 and the order in which axes are
 * compared are ours.
 * @param metric of the cell of the reference setting
 */
export function standardAxes(metric: Metric, group: SpaceGroup, number: number): IntMat3[] {
  const { crystalFamily } = groupProperties(number);
  const exact = invariantMetric(metric, group);
  const fits = (P: IntMat3) => normalisingShift(number, P) !== null;
  if (crystalFamily !== "monoclinic" && crystalFamily !== "orthorhombic") {
    const start = crystalFamily === "triclinic" ? niggliReduction(exact.toCartesian) : IDENTITY;
    const alike = automorphisms(gramIn(exact.g, start)).map((W) => multiply(start, W));
    return onePerClass(alike.filter(fits), group);
  }
  const changes = crystalFamily === "monoclinic" ? planeChanges(exact.g) : smallMatrices().filter(isMonomial);
  const ranked = changes
    .map((P) => ({ P, rank: rankOf(gramIn(exact.g, P), crystalFamily) }))
    .sort((a, b) => compareRanks(a.rank, b.rank));
  const best = ranked.find(({ P }) => fits(P))!; // the identity fits
  const alike = ranked.filter(({ P, rank }) => compareRanks(rank, best.rank) === 0 && fits(P));
  return onePerClass(
    alike.map(({ P }) => P),
    group,
  );
}

function gramIn(g: Mat3, P: IntMat3): Mat3 {
  return multiply3(transpose(P), multiply3(g, P));
}

/** Rotations that keep a metric tensor, the identity first. */
function automorphisms(g: Mat3): IntMat3[] {
  const limit = TIE * Math.max(g[0], g[4], g[8]);
  const kept = smallMatrices().filter((W) => gramIn(g, W).every((e, i) => Math.abs(e - g[i]!) <= limit));
  return [IDENTITY, ...kept.filter((W) => W.some((e, i) => e !== IDENTITY[i]))];
}

/** Exactly one entry in each row and column. */
function isMonomial(W: IntMat3): boolean {
  return [0, 1, 2].every((i) => [0, 1, 2].filter((j) => W[3 * i + j] !== 0).length === 1);
}

function rankOf(g: Mat3, family: CrystalFamily): number[] {
  const scale = Math.max(g[0], g[4], g[8]);
  const terms = family === "monoclinic" ? [g[0] + g[8], g[2] > TIE * scale ? 1 : 0, g[0]] : [g[0], g[4]];
  return [...terms, scale];
}

/** Negative where x comes first, 0 where they tie; the last term is the scale. */
function compareRanks(x: readonly number[], y: readonly number[]): number {
  const tie = TIE * Math.max(x.at(-1)!, y.at(-1)!);
  for (let i = 0; i < x.length - 1; i++) if (Math.abs(x[i]! - y[i]!) > tie) return x[i]! - y[i]!;
  return 0;
}

/** Entries of the axes a' and c' in a reduced basis of the plane net that reach every class modulo twice the net. */
const REACH = [-2, -1, 0, 1, 2] as const;

/** Changes of a and c, each with the sense of b that makes it right-handed, from a reduced basis of their net. */
function planeChanges(g: Mat3): IntMat3[] {
  const reduced = reducedNet(g);
  const found: IntMat3[] = [];
  for (const p of REACH) {
    for (const q of REACH) {
      for (const r of REACH) {
        for (const s of REACH) {
          const det = p * s - q * r;
          if (Math.abs(det) === 1) found.push(multiply(reduced, [p, 0, q, 0, det, 0, r, 0, s]));
        }
      }
    }
  }
  return found;
}

/** Lagrange's reduction of a and c. */
function reducedNet(g: Mat3): IntMat3 {
  let u: readonly [number, number] = [1, 0];
  let v: readonly [number, number] = [0, 1];
  const dot = (x: readonly [number, number], y: readonly [number, number]) =>
    x[0] * y[0] * g[0] + (x[0] * y[1] + x[1] * y[0]) * g[2] + x[1] * y[1] * g[8];
  for (;;) {
    if (dot(v, v) < dot(u, u)) [u, v] = [v, u];
    const k = Math.round(dot(u, v) / dot(u, u));
    const next = [v[0] - k * u[0], v[1] - k * u[1]] as const;
    if (k === 0 || dot(next, next) >= dot(v, v) * (1 - TIE)) break;
    v = next;
  }
  const sense = u[0] * v[1] - u[1] * v[0];
  return [u[0], 0, v[0], 0, sense, 0, u[1], 0, v[1]];
}

/** Of changes of axes that a rotation of the group makes one, that with the fewest negative entries and the least change. */
function onePerClass(changes: readonly IntMat3[], group: SpaceGroup): IntMat3[] {
  const rotations = group.representatives.map((a) => a.W).filter((W) => determinant(W) === 1);
  const seen = new Set<string>();
  const nearness = (P: IntMat3) => [
    P.filter((e) => e < 0).length,
    P.reduce<number>((s, e, i) => s + Math.abs(e - IDENTITY[i]!), 0),
  ];
  const ordered = changes
    .map((P) => ({ P, near: nearness(P) }))
    .sort((x, y) => x.near[0]! - y.near[0]! || x.near[1]! - y.near[1]!);
  return ordered
    .map(({ P }) => P)
    .filter((P) => {
      if (seen.has(P.join())) return false;
      for (const W of rotations) seen.add(multiply(W, P).join());
      return true;
    });
}

/** Coordinates, 0 to 2, along which a group of a reference setting leaves the origin free: those that it keeps. */
export function freeCoordinates(group: SpaceGroup): number[] {
  return [0, 1, 2].filter((i) => {
    const e = [0, 0, 0];
    e[i] = 1;
    const axis = e as unknown as readonly [number, number, number];
    return group.representatives.every((a) => apply3(a.W, axis).every((x, j) => x === e[j]));
  });
}

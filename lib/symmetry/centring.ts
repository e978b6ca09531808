import {
  equal,
  hermiteRows,
  IDENTITY,
  type IntMat3,
  lcm,
  type RatMat3,
  type RatVec3,
  ratMat3,
  transpose,
} from "../algebra/index.ts";
import type { Operation } from "./operation.ts";

/** Translation parts in [0, 1) of the pure translations among operations reduced modulo the lattice; 0 is one. */
export function centringsOf(operations: readonly Operation[]): RatVec3[] {
  return operations.filter((a) => equal(a.W, IDENTITY)).map((a) => a.w);
}

/**
 * A primitive basis of the lattice Z^3 with the centrings added: columns of P, (a', b', c') = (a, b, c) P, in Hermite
 * form, so lower triangular as rows; determinant 1 / number of centrings, positive.
 */
export function primitiveBasis(centrings: readonly RatVec3[]): RatMat3 {
  const d = centrings.reduce((m, v) => lcm(m, v.d), 1);
  const rows = [[d, 0, 0], [0, d, 0], [0, 0, d], ...centrings.map((v) => v.n.map((e) => e * (d / v.d)))];
  return ratMat3(transpose(hermiteRows(rows).flat() as unknown as IntMat3), d);
}

const LETTERS: readonly (readonly [string, string])[] = [
  ["P", ""],
  ["A", "0,1/2,1/2"],
  ["B", "1/2,0,1/2"],
  ["C", "1/2,1/2,0"],
  ["I", "1/2,1/2,1/2"],
  ["F", "0,1/2,1/2 1/2,0,1/2 1/2,1/2,0"],
  ["R", "1/3,2/3,2/3 2/3,1/3,1/3"],
  ["R", "1/3,2/3,1/3 2/3,1/3,2/3"],
  ["H", "1/3,2/3,0 2/3,1/3,0"],
];

/** Letter of the centring type (R for obverse and reverse alike), or null where the cell has another centring. */
export function centringLetter(centrings: readonly RatVec3[]): string | null {
  const text = centrings
    .map((v) => v.n.map((n) => (n === 0 ? "0" : reducedFraction(n, v.d))).join(","))
    .filter((t) => t !== "0,0,0")
    .sort()
    .join(" ");
  return LETTERS.find(([, translations]) => translations === text)?.[0] ?? null;
}

function reducedFraction(n: number, d: number): string {
  for (let k = 2; k <= d; k++) while (n % k === 0 && d % k === 0) [n, d] = [n / k, d / k];
  return `${n}/${d}`;
}

import type { IntMat3 } from "../algebra/index.ts";
import { TENSOR_PAIRS } from "../symmetry/index.ts";
import type { AtomSite } from "./atom-site.ts";
import { type Mat3, type Metric, multiply3, reciprocalLengths, type Vec3 } from "./cell.ts";
import type { DisplacementTensor } from "./displacement.ts";

/**
 * A displacement tensor on other axes. U_ij a*_i a*_j transforms as products of coordinates do.
 * S.u. are those of independent components.
 * @param M carries coordinate differences of the old cell to the new one
 */
export function carriedDisplacement(
  tensor: DisplacementTensor | null,
  M: Mat3,
  from: Metric,
  to: Metric,
): DisplacementTensor | null {
  if (tensor === null || tensor.kind === "isotropic") return tensor;
  const [p, q] = [reciprocalLengths(from), reciprocalLengths(to)];
  // U'_ij = sum over k, l of t_ik t_jl U_kl
  const t = M.map((e, k) => (e * p[k % 3]!) / q[Math.floor(k / 3)]!);
  const rows = TENSOR_PAIRS.map(([i, j]) =>
    TENSOR_PAIRS.map(([k, l]) => {
      const direct = t[3 * i + k]! * t[3 * j + l]!;
      return k === l ? direct : direct + t[3 * i + l]! * t[3 * j + k]!;
    }),
  );
  const u = rows.map((row) => row.reduce((s, e, k) => s + e * tensor.u[k]!, 0));
  return { kind: "anisotropic", u: u as unknown as typeof tensor.u, su: rows.map((row) => combined(row, tensor.su)) };
}

/** S.u. of a sum of independent terms; null where none of them has one. */
function combined(factors: readonly number[], su: readonly (number | null)[]): number | null {
  const terms = factors.flatMap((f, k) => (su[k] === null || su[k] === undefined || f === 0 ? [] : [f * su[k]!]));
  return terms.length === 0 ? null : Math.hypot(...terms);
}

/** How an atom of one cell is carried into another: x' = M W x + shift; W a rotation part of the old cell. */
export interface Carriage {
  readonly W: IntMat3;
  readonly M: Mat3;
  readonly from: Metric;
  readonly to: Metric;
}

/** A listed atom carried by an operation and a change of cell, with s.u. and displacement; `position` is given. */
export function carriedAtom(site: AtomSite, position: Vec3, { W, M, from, to }: Carriage): AtomSite {
  const whole = multiply3(M, W);
  const { label, typeSymbol, element, charge, occupancy, assembly, disorderGroup, span } = site;
  const su = [0, 3, 6].map((i) => combined(whole.slice(i, i + 3), site.su)) as unknown as AtomSite["su"];
  const displacement = carriedDisplacement(site.displacement, whole, from, to);
  return { label, typeSymbol, element, charge, position, su, occupancy, assembly, disorderGroup, displacement, span };
}

import { type Matrix3, snap } from "./cartesian.ts";
import { formatSum, tidy } from "./closed-form.ts";
import { irrepMatrices, type Rows } from "./irrep-matrices.ts";
import type { MolecularGroup } from "./molecular-group.ts";
import type { PointGroup } from "./point-group.ts";
import { reducedRows } from "./reduced-rows.ts";
import { type TensorKind, type TensorSpace, tensorMatrix, tensorSpace } from "./tensor-space.ts";

/** The tensor of one partner of a species, linear in free coefficients. */
export interface PartnerTensor {
  /** coefficients[component][letter]; exact where it is zero. */
  readonly coefficients: readonly (readonly number[])[];
  /** The same per component: `c`, `-c`, `sqrt3 b`, `.` for zero. */
  readonly entries: readonly string[];
}

/** The tensors that transform like the partners of one species. */
export interface TensorForm {
  /** Index of the species. */
  readonly irrep: number;
  readonly label: string;
  /** Free coefficients, named onwards through the species; one per repeat (two for a pair of complex species). */
  readonly letters: readonly string[];
  readonly partners: readonly PartnerTensor[];
}

/** All tensor forms of a group. */
export interface TensorForms {
  readonly kind: TensorKind;
  /** Names of the independent components, in reading order. */
  readonly components: readonly string[];
  /** Species that hold no such tensor are left out. */
  readonly forms: readonly TensorForm[];
}

/**
 * Forms of the tensors of every species of a group, as R. Loudon, Adv. Phys. 13 (1964) 423 tabulates them for Raman
 * scattering: partner i of a species is a tensor whose image under g is the sum over j of D(g)_ji times partner j.
 * Every letter stands alone at the first place where it occurs, by partners and then components in reading order.
 * @param matrices orthogonal matrices of the elements in the Cartesian frame wanted, in the order of the elements
 */
export function tensorForms(
  group: PointGroup | MolecularGroup,
  matrices: readonly Matrix3[],
  kind: TensorKind,
): TensorForms {
  const space = tensorSpace(kind);
  const actions = matrices.map((M) => tensorMatrix(space, M));
  const forms: TensorForm[] = [];
  const cubic = group.irreps.some((r) => r.dimension > 2);
  let used = 0;
  group.irreps.forEach(({ label, dimension, norm }, irrep) => {
    if (!occurs(group, irrep, actions)) return;
    const maps = intertwiners(actions, irrepMatrices(group, irrep), dimension, space);
    const basis = printable(maps, cubic && norm === 2, space.components.length);
    const letters = basis.map((_, k) => letter(used + k));
    used += basis.length;
    forms.push({ irrep, label, letters, partners: partnerTensors(basis, dimension, letters, space) });
  });
  return { kind, components: space.components, forms };
}

/** Whether the tensors hold the species, by characters. */
function occurs(group: PointGroup | MolecularGroup, irrep: number, actions: readonly Rows[]): boolean {
  const { characters } = group.irreps[irrep]!;
  const sum = actions.reduce((total, action, g) => {
    return total + characters[group.classOf[g]!]! * action.reduce((t, row, i) => t + row[i]!, 0);
  }, 0);
  return sum > group.order / 2;
}

/**
 * Maps T from partners to tensors with T D(g) = R(g) T, each flat, partner by partner, spanning all of them: the mean
 * of R(g) E D(g)^-1 over the group for every unit map E.
 */
function intertwiners(actions: readonly Rows[], D: readonly Rows[], d: number, space: TensorSpace): number[][] {
  const n = space.components.length;
  const rows: number[][] = [];
  for (let j = 0; j < d; j++) {
    for (let i = 0; i < n; i++) {
      const mean = new Array<number>(n * d).fill(0);
      actions.forEach((action, g) => {
        for (let q = 0; q < d; q++) {
          const weight = D[g]![q]![j]! / actions.length;
          if (weight !== 0) for (let c = 0; c < n; c++) mean[q * n + c]! += weight * action[c]![i]!;
        }
      });
      rows.push(mean.map(snap));
    }
  }
  return rows;
}

/**
 * The maps in the form to print. Reduced row echelon form, but for E of T and Th, where the last component of each
 * partner (zz) is the free one and is set to -2, so that one coefficient stands for 2z2-x2-y2 and its partner.
 */
function printable(rows: readonly (readonly number[])[], pairOfCubic: boolean, n: number): number[][] {
  if (!pairOfCubic) return reducedRows(rows).map((row) => row.map(tidy));
  const order = Array.from({ length: 2 * n }, (_, k) => (k % 2) * n + n - 1 - Math.floor(k / 2));
  const reduced = reducedRows(rows.map((row) => order.map((k) => row[k]!)));
  return reduced.map((row) => {
    const back = new Array<number>(2 * n).fill(0);
    row.forEach((e, k) => {
      back[order[k]!] = tidy(-2 * e);
    });
    return back;
  });
}

function partnerTensors(
  basis: readonly (readonly number[])[],
  dimension: number,
  letters: readonly string[],
  space: TensorSpace,
): PartnerTensor[] {
  const n = space.components.length;
  return Array.from({ length: dimension }, (_, q) => {
    const coefficients = space.components.map((_c, c) => basis.map((row) => row[q * n + c]!));
    return { coefficients, entries: coefficients.map((row) => formatSum(row, letters)) };
  });
}

/** a, b ... z, a1, b1 ... */
function letter(k: number): string {
  const round = Math.floor(k / 26);
  return String.fromCharCode(97 + (k % 26)) + (round > 0 ? round : "");
}

/** A tensor of rank 2 written out as three rows of three entries. @param entries of the kind `symmetric2` */
export function matrixEntries(entries: readonly string[]): string[][] {
  const [xx = "", xy = "", xz = "", yy = "", yz = "", zz = ""] = entries;
  return [
    [xx, xy, xz],
    [xy, yy, yz],
    [xz, yz, zz],
  ];
}

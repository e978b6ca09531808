import type { IntMat3 } from "../algebra/index.ts";
import { type CifLoop, findLoop } from "../cif/index.ts";
import {
  type AtomSite,
  type CrystalSite,
  EIGHT_PI_SQUARED,
  type Mat3,
  type Metric,
  multiply3,
  reciprocalLengths,
  symmetricEigen,
} from "../structure/index.ts";
import { TENSOR_COMPONENTS, TENSOR_PAIRS } from "../symmetry/index.ts";
import { type AuditInput, parameterRounding, rowNumber, rowText, type StatedNumber } from "./audit-input.ts";

/** Six numbers: 11 22 33 12 13 23. */
export type Six = readonly number[];

/** A row of the list of anisotropic displacement parameters, square angstrom. */
export interface TensorRow {
  readonly atom: AtomSite;
  /** Null where the atom was folded into another row. */
  readonly site: CrystalSite | null;
  readonly stated: readonly StatedNumber[];
  readonly u: Six;
  /** Standard uncertainties, 0 where none is given. */
  readonly su: Six;
  /** Half a unit of the last digit. */
  readonly rounding: Six;
}

/** Displacement tensors of the file that belong to an atom of its list. */
export function tensorRows(input: AuditInput): TensorRow[] {
  const loop = findLoop(input.block, "_atom_site_aniso.label");
  if (!loop) return [];
  const atoms = new Map(input.atoms.map((a) => [a.label, a]));
  const sites = new Map(input.crystal?.sites.map((s) => [s.label, s]));
  const rows: TensorRow[] = [];
  for (let row = 0; row < loop.rowCount; row++) {
    const label = rowText(loop, row, "_atom_site_aniso.label")?.text;
    const atom = label === undefined ? undefined : atoms.get(label);
    const read = readTensor(loop, row, "U", 1) ?? readTensor(loop, row, "B", EIGHT_PI_SQUARED);
    if (atom && read) rows.push({ atom, site: sites.get(atom.label) ?? null, ...read });
  }
  return rows;
}

function readTensor(loop: CifLoop, row: number, letter: string, divisor: number) {
  const stated = TENSOR_COMPONENTS.map((c) => rowNumber(loop, row, `_atom_site_aniso.${letter}_${c}`));
  if (stated.some((n) => n === null)) return null;
  const all = stated as StatedNumber[];
  return {
    stated: all,
    u: all.map((n) => n.value / divisor),
    su: all.map((n) => (n.su ?? 0) / divisor),
    rounding: all.map((n) => parameterRounding(n) / divisor),
  };
}

/** U_ij as a tensor on the axes of the cell: mean squares of fractional displacements. */
function contravariant(metric: Metric, u: Six): Mat3 {
  const r = reciprocalLengths(metric);
  const m = new Array<number>(9).fill(0);
  TENSOR_PAIRS.forEach(([i, j], k) => {
    m[3 * i + j] = u[k]! * r[i] * r[j];
    m[3 * j + i] = m[3 * i + j]!;
  });
  return m as unknown as Mat3;
}

function covered(metric: Metric, m: Mat3): Six {
  const r = reciprocalLengths(metric);
  return TENSOR_PAIRS.map(([i, j]) => m[3 * i + j]! / (r[i] * r[j]));
}

function transposed(m: Mat3 | IntMat3): Mat3 {
  return [m[0], m[3], m[6], m[1], m[4], m[7], m[2], m[5], m[8]];
}

/** The tensor after a rotation of the crystal, W V W^T. */
export function rotatedTensor(metric: Metric, u: Six, W: IntMat3): Six {
  return covered(metric, multiply3(multiply3(W, contravariant(metric, u)), transposed(W)));
}

/** The tensor in the Cartesian frame of the metric, square angstrom. */
export function cartesianTensor(metric: Metric, u: Six): Mat3 {
  const A = metric.toCartesian;
  return multiply3(multiply3(A, contravariant(metric, u)), transposed(A));
}

/** Mean squares along the principal axes, largest first; square angstrom. */
export function principalSquares(metric: Metric, u: Six): readonly number[] {
  const m = cartesianTensor(metric, u);
  return symmetricEigen([m.slice(0, 3), m.slice(3, 6), m.slice(6, 9)]).values;
}

/** A third of the trace. */
export function equivalentSquare(metric: Metric, u: Six): number {
  const m = cartesianTensor(metric, u);
  return (m[0] + m[4] + m[8]) / 3;
}

/** Matrix of a linear function of the six components: its values on the six unit tensors, column by column. */
export function columnsOf(of: (u: Six) => Six): Six[] {
  return TENSOR_COMPONENTS.map((_, k) => of(TENSOR_COMPONENTS.map((_c, i) => (i === k ? 1 : 0))));
}

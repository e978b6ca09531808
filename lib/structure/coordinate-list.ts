import type { AtomModel } from "./atom-model.ts";
import { type Metric, reciprocalLengths, type Vec3 } from "./cell.ts";
import type { DisplacementTensor } from "./displacement.ts";
import { type CellNumbers, cellNumbers } from "./reduce-answer.ts";
import { symmetryCode } from "./symmetry-code.ts";

/** An atom with its place, ready to be written. */
export interface CoordinateAtom {
  readonly label: string;
  readonly element: string | null;
  readonly charge: number | null;
  readonly occupancy: number;
  /** Group of the disorder it belongs to, null for none. */
  readonly disorderGroup: string | null;
  readonly fractional: Vec3;
  /** angstrom */
  readonly cartesian: Vec3;
  /** Equivalent isotropic U, square angstrom; null where not known. */
  readonly displacement: number | null;
  /** Index of the site in the list it comes from. */
  readonly site: number;
  /** How many atoms of this site came before. */
  readonly copy: number;
  /** Index of the operation that makes it. */
  readonly operation: number;
  readonly code: string | null;
}

/** Atoms in a cell without symmetry, as files of coordinates hold them. Plain data. */
export interface CoordinateList {
  readonly name: string;
  /** The atoms repeat with this cell; null where they do not. */
  readonly cell: CellNumbers | null;
  /** Axes of that cell, angstrom: x along a, y in the plane of a and b, z along c*. */
  readonly axes: readonly [Vec3, Vec3, Vec3];
  /** Rows of the matrix from Cartesian to fractional coordinates. */
  readonly toFractional: readonly [Vec3, Vec3, Vec3];
  readonly atoms: readonly CoordinateAtom[];
}

/**
 * The atoms of a model as a list of coordinates; whole cells repeat, other lists do not.
 * @example
 * ```ts
 * const halite = composedCrystal(parseSiteTable("group 225\ncell a=5.64\nNa 4a\nCl 4b"));
 * const { cell, atoms } = coordinateList(atomModel(halite, { symmetry: "none" }));
 * cell; // [5.64, 5.64, 5.64, 90, 90, 90]
 * atoms[1]!.cartesian; // [0, 2.82, 2.82]
 * ```
 */
export function coordinateList(model: AtomModel): CoordinateList {
  const { crystal, metric, atoms, name, content } = model;
  const m = metric.toCartesian;
  const r = metric.toFractional;
  const isotropic = crystal.sites.map((site) => equivalentDisplacement(site.displacement, crystal.metric));
  const copies = new Int32Array(crystal.sites.length);
  return {
    name,
    cell: content === "cell" ? cellNumbers(metric.cell) : null,
    axes: [
      [m[0], m[3], m[6]],
      [m[1], m[4], m[7]],
      [m[2], m[5], m[8]],
    ],
    toFractional: [
      [r[0], r[1], r[2]],
      [r[3], r[4], r[5]],
      [r[6], r[7], r[8]],
    ],
    atoms: atoms.map(({ site, operation, cells, position: [x, y, z] }) => {
      const { label, element, charge, occupancy, disorderGroup } = crystal.sites[site]!;
      return {
        label,
        element,
        charge,
        occupancy,
        disorderGroup,
        fractional: [x, y, z],
        cartesian: [m[0] * x + m[1] * y + m[2] * z, m[4] * y + m[5] * z, m[8] * z],
        displacement: isotropic[site]!,
        site,
        copy: copies[site]!++,
        operation,
        code: symmetryCode(operation, cells),
      };
    }),
  };
}

/** A third of the trace of the tensor on Cartesian axes. Source: R. X. Fischer and E. Tillmanns, Acta Cryst. C44 (1988) 775. */
export function equivalentDisplacement(tensor: DisplacementTensor | null, metric: Metric): number | null {
  if (tensor === null) return null;
  if (tensor.kind === "isotropic") return tensor.iso;
  const { g } = metric;
  const [p, q, s] = reciprocalLengths(metric);
  const [u11, u22, u33, u12, u13, u23] = tensor.u;
  const diagonal = u11 * p * p * g[0] + u22 * q * q * g[4] + u33 * s * s * g[8];
  return (diagonal + 2 * (u12 * p * q * g[1] + u13 * p * s * g[2] + u23 * q * s * g[5])) / 3;
}

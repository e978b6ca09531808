import { InputProblem } from "../problem.ts";
import { type MolecularGroup, molecularGroup, orthogonalGroup } from "../representation/index.ts";
import type { Body } from "./approximate-operations.ts";
import { isHydrogen } from "./bond-class.ts";
import type { Mat3, Vec3 } from "./cell.ts";
import { type Deviation, deviationOf, symmetrised } from "./deviation.ts";
import { type GroupOfBody, GroupSearch } from "./group-search.ts";
import { fitLine } from "./linear-symmetry.ts";
import { fitToStandard } from "./molecular-frame.ts";
import type { MolecularUnit } from "./molecular-unit.ts";
import { cross3, length3, minus3, unit3 } from "./rotation-fit.ts";

/**
 * No atom of a molecule may lie farther than this from its place in the idealised one; angstrom. Several s.u. of a
 * routine structure analysis, hydrogen included, and less than any chemical difference between bonds.
 */
export const SHAPE_TOLERANCE = 0.1;

/**
 * The same for an ion or molecule of one central atom and like ligands (SO4, SiO4, NH4), whose free form is known and
 * whose distortion in a crystal is what one looks for; angstrom.
 */
export const STAR_TOLERANCE = 0.25;

/** STAR_TOLERANCE is cut to this share of the mean bond, so that pyramids with hydrogen stay pyramids. */
const STAR_SHARE = 0.2;

export interface MolecularSymmetryOptions {
  /** Largest distance of an atom from its idealised place, angstrom; by default `shapeTolerance`. */
  readonly tolerance?: number;
  /** Schoenflies symbol of a subgroup to be taken instead of the group found; it must hold the site group. */
  readonly lowerTo?: string;
}

interface Idealised {
  readonly schoenflies: string;
  readonly deviation: Deviation;
  /** The tolerance that was used, angstrom. */
  readonly tolerance: number;
  /** Rotation from the Cartesian frame of the cell to that of the molecule: rows are x, y, z of the molecule. */
  readonly frame: Mat3;
  /** Idealised places of the atoms in the Cartesian frame of the cell, angstrom. */
  readonly idealised: readonly Vec3[];
}

/** A molecule of finite point group. */
export interface FiniteSymmetry extends Idealised {
  readonly kind: "finite";
  /** In standard orientation: matrix i is frame x matrices[i] x frame^T. */
  readonly group: MolecularGroup;
  /** Elements of `group`, in its order, in the Cartesian frame of the cell; they fix the centroid. */
  readonly matrices: readonly Mat3[];
  /** Per element: atom k is carried onto atom permutations[.][k]. */
  readonly permutations: readonly (readonly number[])[];
  /** Per operation of the site of the unit: index of the element that it is, exactly. */
  readonly siteElements: readonly number[];
}

/** A linear molecule. Its group is infinite; the axis stands for it. */
export interface LinearSymmetry extends Idealised {
  readonly kind: "linear";
  readonly schoenflies: "Cinfv" | "Dinfh";
  /** Unit vector in the Cartesian frame of the cell. */
  readonly axis: Vec3;
  /** Per operation of the site of the unit: whether it reverses the axis. */
  readonly siteReverses: readonly boolean[];
}

export type MolecularSymmetry = FiniteSymmetry | LinearSymmetry;

/** What is needed of a unit. */
export type ShapedUnit = Pick<MolecularUnit, "atoms" | "bonds" | "site" | "centroid">;

/**
 * The largest point group that a unit has within a tolerance and that holds its site group exactly, with matrices fitted
 * to the unit: those of the site are among them to rounding. Different elements are never carried onto each other, nor
 * isotopes of hydrogen where each has places of its own: HDO vibrates otherwise than H2O. Isotopes that share partly
 * occupied places are one element.
 * @throws InputProblem `symmetry-not-below` if `lowerTo` names no subgroup that holds the site group
 * @throws RangeError for a unit of one atom
 */
export function molecularSymmetry(unit: ShapedUnit, options: MolecularSymmetryOptions = {}): MolecularSymmetry {
  if (unit.atoms.length < 2) throw new RangeError("a single atom has no molecular point group");
  const tolerance = options.tolerance ?? shapeTolerance(unit);
  const centre = unit.centroid.cartesian;
  const body: Body = {
    points: unit.atoms.map((a) => minus3(a.cartesian, centre)),
    kinds: unit.atoms.map(kindOf),
  };
  return linear(unit, body, tolerance, options.lowerTo) ?? finite(unit, body, tolerance, options.lowerTo);
}

/** Occupancies count as full from here; files round them. */
const FULL = 0.995;

function kindOf({ element, occupancy }: ShapedUnit["atoms"][number]): string {
  return isHydrogen(element) && occupancy < FULL ? "H" : element;
}

/** The tolerance used by default, angstrom: STAR_TOLERANCE (or a fifth of the bond) for XY_n, else SHAPE_TOLERANCE. */
export function shapeTolerance({ atoms, bonds }: Pick<ShapedUnit, "atoms" | "bonds">): number {
  const degree = atoms.map((_, i) => bonds.filter((b) => b.includes(i)).length);
  const centre = degree.findIndex((d) => d === atoms.length - 1);
  const ligands = atoms.filter((_, i) => i !== centre);
  const isStar = centre >= 0 && atoms.length > 2 && bonds.length === ligands.length;
  if (!isStar || ligands.some((a) => a.element !== ligands[0]!.element)) return SHAPE_TOLERANCE;
  const lengths = ligands.map((a) => length3(minus3(a.cartesian, atoms[centre]!.cartesian)));
  const mean = lengths.reduce((s, l) => s + l, 0) / lengths.length;
  return Math.max(SHAPE_TOLERANCE, Math.min(STAR_TOLERANCE, STAR_SHARE * mean));
}

function linear(unit: ShapedUnit, body: Body, tolerance: number, lowerTo?: string): LinearSymmetry | null {
  const highest = lowerTo === "Cinfv" ? "Cinfv" : "Dinfh";
  const line = fitLine(body, unit.site.matrices, tolerance, highest);
  if (!line) return null;
  if (lowerTo && lowerTo !== line.schoenflies) {
    const possible = line.schoenflies === "Dinfh" && !line.reverses.includes(true) ? ["Cinfv"] : [];
    throw notBelow(lowerTo, line.schoenflies, possible);
  }
  const { axis, idealised, reverses, schoenflies } = line;
  const x = unit3(cross3(Math.abs(axis[1]) < 0.9 ? [0, 1, 0] : [0, 0, 1], axis));
  return {
    kind: "linear",
    schoenflies,
    axis,
    siteReverses: reverses,
    frame: [...x, ...cross3(axis, x), ...axis] as unknown as Mat3,
    ...idealisation(unit, body, idealised, tolerance),
  };
}

function idealisation(unit: ShapedUnit, body: Body, places: readonly Vec3[], tolerance: number) {
  const [cx, cy, cz] = unit.centroid.cartesian;
  return {
    deviation: deviationOf(body.points, places),
    tolerance,
    idealised: places.map((p): Vec3 => [p[0] + cx, p[1] + cy, p[2] + cz]),
  };
}

function finite(unit: ShapedUnit, body: Body, tolerance: number, lowerTo?: string): FiniteSymmetry {
  const search = new GroupSearch(body, unit.site, tolerance);
  const found = search.largest();
  const chosen = lowerTo ? lowered(search, found, lowerTo) : found;
  const { points } = body;
  const places = symmetrised(points, chosen.matrices, chosen.permutations);
  const site = search.siteIn(chosen);
  const skeleton = { points, places, bonds: unit.bonds };
  const { group, frame, matrices, order } = fitToStandard(chosen.matrices, chosen.permutations, skeleton, site);
  const permutations = order.map((g) => chosen.permutations[g]!);
  return {
    kind: "finite",
    schoenflies: group.schoenflies,
    group,
    matrices,
    permutations,
    siteElements: site.elements.map((s) => order.indexOf(s)),
    frame,
    ...idealisation(unit, body, symmetrised(points, matrices, permutations), tolerance),
  };
}

/** The subgroup of a name that fits best. @throws InputProblem `symmetry-not-below`, `point-group-unknown` */
function lowered(search: GroupSearch, found: GroupOfBody, name: string): GroupOfBody {
  const wanted = usualName(name);
  const named = search.within(found).map((group) => ({ group, name: orthogonalGroup(group.matrices).schoenflies }));
  const fitting = named.filter((n) => n.name === wanted).map((n) => n.group);
  if (fitting.length === 0) throw notBelow(name, named[0]!.name, [...new Set(named.map((n) => n.name))]);
  return fitting.reduce((a, b) => (b.deviation.measure < a.deviation.measure - SAME_MEASURE ? b : a));
}

/** Measures of equivalent subgroups differ by rounding only. */
const SAME_MEASURE = 1e-9;

function usualName(name: string): string {
  try {
    return molecularGroup(name).schoenflies;
  } catch (e) {
    if (!(e instanceof RangeError)) throw e;
    throw new InputProblem("point-group-unknown", e.message, null, "write it like C3v, D2d or Td");
  }
}

function notBelow(name: string, found: string, possible: readonly string[]): InputProblem {
  const others = possible.filter((p) => p !== found);
  return new InputProblem(
    "symmetry-not-below",
    `${name} is no subgroup of ${found}, the group of the unit, that holds its site group`,
    null,
    others.length > 0 ? `possible are ${others.join(", ")}` : "it cannot be lowered",
  );
}

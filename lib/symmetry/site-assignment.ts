import { add, type IntMat3, type IntVec3, lcm, type RatVec3, ratVec3 } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import { type AffineForm, formatForm, formThrough } from "./affine-form.ts";
import { arithmeticClassOf } from "./arithmetic-class.ts";
import { crystalFamily } from "./geometric-class.ts";
import { ownFrame } from "./label-frame.ts";
import type { Operation } from "./operation.ts";
import { orientedSymbol } from "./oriented-site-symmetry.ts";
import { positionAt } from "./position-lookup.ts";
import type { SpaceGroup } from "./space-group.ts";
import { scalesAlike, type TensorConstraint, tensorConstraint } from "./tensor-constraint.ts";
import { IDENTITY_TRANSFORMATION, reverse, type Transformation, transformOperation } from "./transformation.ts";
import { directionSets, type WyckoffPosition } from "./wyckoff-positions.ts";

/** A site of a crystal in its place among the Wyckoff positions of its space-group type. */
export interface SiteAssignment {
  readonly letter: string;
  /** Points in the cell in use. */
  readonly multiplicity: number;
  /** Points in the conventional cell of the reference setting, as in `4c`. */
  readonly referenceMultiplicity: number;
  /** Oriented symbol along the axes in use where they are symmetry directions, else that of the reference setting. */
  readonly siteSymmetry: string;
  readonly referenceSiteSymmetry: string;
  /** Order of the site-symmetry group. */
  readonly order: number;
  /** Fixed points of the site group in the cell in use: `x,1/4,z`. */
  readonly constraint: string;
  readonly form: AffineForm;
  /** The same points in the reference setting, which need not be the first triplet of the position. */
  readonly referenceConstraint: string;
  /** The position itself, with its printed triplets. */
  readonly position: WyckoffPosition;
  /** What the site group allows of a tensor on the axes in use. */
  readonly tensor: TensorConstraint;
  /** `U` where the constraint holds for U_ij as it stands, `beta` where only for beta_ij (skew cells). */
  readonly tensorHoldsFor: "U" | "beta";
}

/** Position and site symmetry without the constraints, which cost more. */
export type SiteName = Pick<
  SiteAssignment,
  "letter" | "multiplicity" | "referenceMultiplicity" | "siteSymmetry" | "order"
>;

/** What assigning sites asks of a group: itself, its type, the way to the reference setting. */
export interface AssignmentGroup {
  readonly group: SpaceGroup;
  readonly number: number;
  readonly toReference: Transformation;
}

/**
 * Wyckoff position of a site from its site-symmetry group. Positions with site groups of one kind are told apart by the
 * fixed points themselves: two site groups are conjugate exactly when an operation of the space group carries the fixed
 * points of one onto those of the other.
 * @param site all operations that fix the site, translations not reduced: each fixes the point as it stands
 * @throws InputProblem `site-group-unknown` if their fixed points are those of no position with a site group of that
 * order, so that the operations are not the whole site group of a point
 */
export function assignWyckoff(context: AssignmentGroup, site: readonly Operation[]): SiteAssignment {
  if (site.length > 1) return assign(context, site);
  // most sites of molecular crystals; all alike
  const known = general.get(context);
  if (known) return known;
  const fresh = assign(context, site);
  general.set(context, fresh);
  return fresh;
}

const general = new WeakMap<AssignmentGroup, SiteAssignment>();

/** The name of a site only, as `assignWyckoff` finds it. @throws InputProblem `site-group-unknown` */
export function nameSite(context: AssignmentGroup, site: readonly Operation[]): SiteName {
  return named(context, site, find(context, fixedPoints(carried(site, context)), site.length));
}

function named(context: AssignmentGroup, site: readonly Operation[], position: WyckoffPosition): SiteName {
  const rotations = site.map((a) => a.W);
  return {
    letter: position.letter,
    multiplicity: context.group.operations.length / site.length,
    referenceMultiplicity: position.multiplicity,
    siteSymmetry: ownSymbol(context, rotations) ?? position.siteSymmetry,
    order: site.length,
  };
}

function assign(context: AssignmentGroup, site: readonly Operation[]): SiteAssignment {
  const inReference = fixedPoints(carried(site, context));
  const position = find(context, inReference, site.length);
  const own = fixedPoints(site);
  const rotations = site.map((a) => a.W);
  const form = formThrough(own.point, own.directions);
  return {
    ...named(context, site, position),
    referenceSiteSymmetry: position.siteSymmetry,
    constraint: formatForm(form),
    form,
    referenceConstraint: formatForm(formThrough(inReference.point, inReference.directions)),
    position,
    tensor: tensorConstraint(rotations),
    tensorHoldsFor: holdsForU(rotations, context.group) ? "U" : "beta",
  };
}

function holdsForU(rotations: readonly IntMat3[], group: SpaceGroup): boolean {
  return scalesAlike(
    rotations,
    group.representatives.map((a) => a.W),
  );
}

/** The operations in the reference setting, still fixing the point as it stands there. */
function carried(site: readonly Operation[], { number, toReference }: AssignmentGroup): readonly Operation[] {
  if (toReference === IDENTITY_TRANSFORMATION) return site;
  const back = reverse(toReference);
  return site.map((a) => {
    const moved = transformOperation(a, toReference, back);
    if (!moved) throw unknown(number, site.length);
    return moved;
  });
}

interface FixedPoints {
  readonly point: RatVec3;
  readonly directions: readonly IntVec3[];
}

/** The mean of the operations of a finite group carries every point onto the points that all of them fix. */
function fixedPoints(site: readonly Operation[]): FixedPoints {
  const sum = site.map((a) => a.W).reduce(add);
  const d = site.reduce((m, a) => lcm(m, a.w.d), 1);
  const at = (i: number) => site.reduce((s, a) => s + a.w.n[i]! * (d / a.w.d), 0);
  return { point: ratVec3([at(0), at(1), at(2)], d * site.length), directions: columns(sum) };
}

function columns(m: IntMat3): IntVec3[] {
  return [0, 1, 2].map((j) => [m[j]!, m[3 + j]!, m[6 + j]!]);
}

/** The symbol along the axes in use, if they are symmetry directions with the principal axis along c. */
function ownSymbol({ group, number, toReference }: AssignmentGroup, rotations: readonly IntMat3[]): string | null {
  const frame = ownFrame(group, crystalFamily(arithmeticClassOf(number).geometric), toReference);
  return frame && frame.z[2] !== 0 ? orientedSymbol(rotations, directionSets(number)) : null;
}

function find({ number }: AssignmentGroup, points: FixedPoints, order: number): WyckoffPosition {
  const position = positionAt(number, points.point, points.directions, order);
  if (position?.order !== order) throw unknown(number, order);
  return position;
}

function unknown(number: number, order: number): InputProblem {
  return new InputProblem(
    "site-group-unknown",
    `${order} operations are not the whole site-symmetry group of a point in space-group type ${number}`,
    null,
    "give every operation that fixes the point, with the lattice translations that bring it back",
  );
}

import { multiplyRatMat, ratMat3 } from "../algebra/index.ts";
import {
  chain,
  formatBasis,
  formatVector,
  type RequestedSetting,
  requestedHall,
  requestedSetting,
  type SpaceGroupSummary,
  type Transformation,
} from "../symmetry/index.ts";
import type { Vec3 } from "./cell.ts";
import { changeOfCell } from "./change-of-cell.ts";
import type { ComparisonAnswer } from "./comparison-answer.ts";
import type { Crystal } from "./crystal.ts";
import type { DisplacementTensor } from "./displacement.ts";
import { axesOf } from "./lattice-axes.ts";
import { niggliReduction } from "./niggli-reduction.ts";
import { inCell, preferredReference } from "./preferred-reference.ts";
import { type CellNumbers, cellNumbers } from "./reduce-answer.ts";
import { type SiteAnswer, sitesAnswer } from "./sites-answer.ts";
import { type StandardisationAnswer, standardisationAnswer } from "./standardisation-answer.ts";
import { standardisedCrystal } from "./standardised-crystal.ts";
import { UNITS_IN_CELL, unitsInCell } from "./units-in-cell.ts";

/** The setting wanted: that of International Tables, one by name or change of axes, by Hall symbol, the standard one. */
export type ResiteRequest =
  | { readonly kind: "reference" }
  | { readonly kind: "setting" | "hall"; readonly text: string }
  | { readonly kind: "standardised"; readonly eitherHand?: boolean };

/** A site in the new setting. */
export interface ResitedSite
  extends Pick<
    SiteAnswer,
    "label" | "element" | "occupancy" | "multiplicity" | "wyckoff" | "siteSymmetry" | "constraint"
  > {
  /** Its label in the file. */
  readonly from: string;
  /** On the special position; fractional. */
  readonly position: Vec3;
  /** Standard uncertainties, null where the file gives none; those of sums as of independent terms. */
  readonly su: readonly (number | null)[];
  /** Square angstrom; on the new axes. */
  readonly displacement: DisplacementTensor | null;
}

export interface ResiteAnswer {
  /** In the cell of the file. */
  readonly given: SpaceGroupSummary;
  readonly spaceGroup: SpaceGroupSummary;
  /** (a', b', c') = (a, b, c) P, from the cell of the file. */
  readonly P: string;
  /** x = P x' + p; components along which the origin is free as decimals. */
  readonly p: string;
  /** The same as numbers. */
  readonly origin: Vec3;
  readonly cell: CellNumbers;
  /** Cubic angstrom. */
  readonly volume: number;
  readonly sites: readonly ResitedSite[];
  readonly standardisation?: StandardisationAnswer;
  /** Where another file was compared; the structure is then written on the axes of that file if they agree. */
  readonly comparison?: ComparisonAnswer;
}

/** An answer with the crystal it tells of. */
export interface Resited {
  readonly crystal: Crystal;
  readonly answer: ResiteAnswer;
  readonly notes: readonly string[];
}

/**
 * A crystal in another setting, its units in the new cell (`unitsInCell`). S.u. and displacement parameters go with the atoms; those of the cell are not known here.
 * @throws InputProblem `setting-unknown`, `hall-unreadable`, and as `changeOfCell`
 * @example
 * ```ts
 * const calcite = crystalFromBlock(requireClean(readCif(text)).blocks[0]!);
 * const { answer, crystal } = resited(calcite, { kind: "setting", text: ":R" });
 * answer.P; // "2/3a+1/3b+1/3c,-1/3a+1/3b+1/3c,-1/3a-2/3b+1/3c"
 * answer.sites.map((s) => `${s.label} ${s.multiplicity}${s.wyckoff}`); // ["Ca1 2b", "C1 2a", "O1 6e"]
 * resited(crystal, { kind: "reference" }).answer.P; // "a-b,b-c,a+b+c"
 * ```
 */
export function resited(crystal: Crystal, request: ResiteRequest): Resited {
  if (request.kind === "standardised") return standardised(crystal, request.eitherHand === true);
  const { transformation, note } = wanted(crystal, request);
  const { crystal: carried, rotations } = changeOfCell(crystal, transformation);
  const changed = unitsInCell(carried);
  const notes = note === null ? [UNITS_IN_CELL] : [note, UNITS_IN_CELL];
  if (rotations.after < rotations.before) {
    notes.push(
      `the new cell holds ${rotations.after} of the ${rotations.before} rotation parts of the space group; the others do not keep its shape`,
    );
  }
  const labels = labelsOf(crystal, changed);
  notes.push(...uncertaintyNotes(crystal, transformation));
  return { crystal: changed, answer: resiteAnswer(crystal, changed, transformation, [0, 0, 0], labels), notes };
}

/** For each site of a changed cell the label in the file; parts of an orbit that fell apart have one with a number added. */
export function labelsOf(given: Crystal, changed: Crystal): string[] {
  const own = new Set(given.sites.map((s) => s.label));
  return changed.sites.map(({ label }) => (own.has(label) ? label : label.replace(/_\d+$/, "")));
}

/** Told where the new axes are sums of old ones, so that s.u. of several coordinates enter one. */
export function uncertaintyNotes({ sites }: Crystal, { P }: Transformation): string[] {
  const mixes = [0, 1, 2].some((j) => [0, 3, 6].filter((i) => P.n[i + j] !== 0).length > 1);
  if (!mixes || !sites.some((s) => s.su.some((e) => e !== null))) return [];
  return ["s.u. of coordinates that the change of axes mixes are combined as those of independent numbers"];
}

function wanted(crystal: Crystal, request: Exclude<ResiteRequest, { kind: "standardised" }>): RequestedSetting {
  const given = { number: crystal.identified.number, toReference: toReference(crystal) };
  switch (request.kind) {
    case "reference":
      return { transformation: given.toReference, note: null };
    case "setting":
      return requestedSetting(given, request.text);
    default:
      return requestedHall(given, request.text);
  }
}

/** From a conventional setting as that is defined; from any other cell to the shortest axes. */
function toReference({ identified, group, metric }: Crystal): Transformation {
  if (identified.summary.settingName !== "unconventional") return identified.toReference;
  const P = multiplyRatMat(group.primitive, ratMat3(niggliReduction(axesOf(metric, group.primitive))));
  const primitive: Transformation = { P, p: { n: [0, 0, 0], d: 1 } };
  return chain(primitive, preferredReference(axesOf(metric, P), inCell(group.operations, primitive)).transformation);
}

function standardised(crystal: Crystal, eitherHand: boolean): Resited {
  const result = standardisedCrystal(crystal, { eitherHand });
  const answer = resiteAnswer(crystal, result.crystal, result.transformation, result.shift, result.origins);
  const standardisation = standardisationAnswer(result, eitherHand);
  const notes = uncertaintyNotes(crystal, result.transformation);
  return { crystal: result.crystal, answer: { ...answer, standardisation }, notes };
}

/** A crystal as it is told of in its new setting; `labels` are those of the file, site by site. */
export function resiteAnswer(
  given: Crystal,
  crystal: Crystal,
  { P, p }: Transformation,
  shift: Vec3,
  labels: readonly string[],
): ResiteAnswer {
  const exact = formatVector(p).split(",");
  const origin = p.n.map((e, i) => e / p.d + shift[i]!) as unknown as Vec3;
  return {
    given: given.identified.summary,
    spaceGroup: crystal.identified.summary,
    P: formatBasis(P),
    p: exact.map((text, i) => (shift[i] === 0 ? text : decimal(origin[i]!))).join(","),
    origin,
    cell: cellNumbers(crystal.metric.cell),
    volume: crystal.metric.volume,
    sites: sitesOf(crystal, labels),
  };
}

/** Digits of an origin that no symmetry fixes: 1e-10 of an axis. */
const DIGITS = 10;

function decimal(x: number): string {
  return String(Number(x.toFixed(DIGITS)) + 0);
}

function sitesOf(crystal: Crystal, labels: readonly string[]): ResitedSite[] {
  return sitesAnswer(crystal).sites.map((site, i) => {
    const { su, displacement } = crystal.sites[i]!;
    const { label, element, occupancy, multiplicity, wyckoff, siteSymmetry, constraint, snapped } = site;
    return {
      label,
      from: labels[i]!,
      element,
      occupancy,
      multiplicity,
      wyckoff,
      siteSymmetry,
      constraint,
      position: snapped,
      su,
      displacement,
    };
  });
}

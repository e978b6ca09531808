import {
  assignWyckoff,
  exactOrbit,
  formatOperation,
  formatPoint,
  formatVector,
  type IdentifiedGroup,
  pointVector,
  unroundedPoint,
  type WrittenPoint,
} from "../symmetry/index.ts";
import type { Metric, Vec3 } from "./cell.ts";
import { orbitOf } from "./orbit.ts";
import { exactSiteSymmetry, type SiteSymmetry, siteSymmetry } from "./site-symmetry.ts";
import { type SiteAnswer, type SiteImage, type SitesAnswer, siteAnswer } from "./sites-answer.ts";

/** Points of a group, no file needed. */
export interface PointsQuestion {
  readonly identified: IdentifiedGroup;
  readonly points: readonly WrittenPoint[];
  /** With a cell nearness is judged in angstrom; without one only what coincides exactly is one position. */
  readonly near: { readonly metric: Metric; readonly tolerance: number } | null;
  /** Whether all equivalent positions are wanted. */
  readonly images: boolean;
}

export interface PointsAnswer extends SitesAnswer {
  /** Points that a decimal may have missed: plain sentences. */
  readonly notes: readonly string[];
}

/** Digits of an image that is not exact. */
const DIGITS = 6;

/**
 * Site symmetry, Wyckoff position and constraints of points, in the order given; each is labelled as it was written.
 * @example
 * ```ts
 * const identified = identifyGroup(namedGroup("P n m a").settings[0].group);
 * const points = [parsePoint("0.1,1/4,0.3")];
 * const [site] = pointsAnswer({ identified, points, near: null, images: true }).sites;
 * site!.referencePosition; // "4c"
 * site!.siteSymmetry; // ".m."
 * site!.images!.map((i) => i.coordinates); // ["1/10,1/4,3/10", "2/5,3/4,4/5", "9/10,3/4,7/10", "3/5,1/4,1/5"]
 * ```
 */
export function pointsAnswer(question: PointsQuestion): PointsAnswer {
  const sites = question.points.map((point) => answerAt(point, question));
  return { sites, notes: question.near ? [] : question.points.flatMap((p, i) => missed(p, sites[i]!, question)) };
}

function answerAt(point: WrittenPoint, question: PointsQuestion): SiteAnswer {
  const { identified, near, images } = question;
  const exact = pointVector(point);
  const position = exact.n.map((e) => e / exact.d) as unknown as Vec3;
  const symmetry = near
    ? siteSymmetry(identified.group.operations, near.metric, position, near.tolerance)
    : exactSiteSymmetry(identified.group, exact);
  const answer = siteAnswer({ label: formatPoint(point), element: null, occupancy: 1, position, symmetry }, identified);
  if (!images) return answer;
  return { ...answer, images: near ? imagesOf(question, symmetry) : exactImages(question, point) };
}

function imagesOf({ identified: { group } }: PointsQuestion, symmetry: SiteSymmetry): SiteImage[] {
  return orbitOf(group, symmetry).map(({ position, operation }) => ({
    coordinates: position.map((e) => String(Number(e.toFixed(DIGITS)))).join(","),
    position,
    operation: formatOperation(group.operations[operation]!),
  }));
}

function exactImages({ identified: { group } }: PointsQuestion, point: WrittenPoint): SiteImage[] {
  return exactOrbit(group, pointVector(point)).map(({ point: image, operation }) => ({
    coordinates: formatVector(image),
    position: image.n.map((e) => e / image.d) as unknown as Vec3,
    operation: formatOperation(group.operations[operation]!),
  }));
}

/** A decimal that is taken at its word lies off the special position that its fraction would be on. */
function missed(point: WrittenPoint, found: SiteAnswer, { identified }: PointsQuestion): string[] {
  const fraction = unroundedPoint(point);
  if (!fraction) return [];
  const { operations } = exactSiteSymmetry(identified.group, pointVector(fraction));
  if (operations.length <= found.order) return [];
  const { referenceMultiplicity, letter, siteSymmetry: symbol } = assignWyckoff(identified, operations);
  const position = `${referenceMultiplicity}${letter}, site symmetry ${symbol}`;
  return [
    `${found.label} is taken as written; if its decimals are rounded, ${formatPoint(fraction)} is meant: ${position}`,
  ];
}

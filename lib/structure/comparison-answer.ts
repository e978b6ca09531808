import { formatBasis, type SpaceGroupSummary } from "../symmetry/index.ts";
import type { Vec3 } from "./cell.ts";
import { metricIn } from "./change-of-cell.ts";
import { type ChosenMatch, chosenMatch } from "./chosen-match.ts";
import { type ComparedAtoms, comparedAtoms } from "./compared-atoms.ts";
import { type ComparisonOptions, comparisonLimits, OCCUPANCY_DIFFERENCE } from "./comparison-limits.ts";
import { cellContents } from "./composition.ts";
import type { Crystal } from "./crystal.ts";
import { type ElementMap, elementMaps, scaledCrystal, volumeScale } from "./element-maps.ts";
import { formatFormula, hillOrder } from "./formula-text.ts";
import { type LatticeStrain, strainBetween } from "./lattice-match.ts";
import { type PairedSites, pairedSites, type SiteAlone, type SitePair } from "./paired-sites.ts";
import { type CellNumbers, cellNumbers } from "./reduce-answer.ts";
import { keepsHand, type MatchLimits, type MatchSearch, matchStructures } from "./structure-match.ts";
import { type Mismatch, mismatch } from "./unmatched-structures.ts";

/** One of the two structures, as its file gives it. */
export interface ComparedStructure {
  readonly spaceGroup: Pick<SpaceGroupSummary, "number" | "hermannMauguin">;
  readonly cell: CellNumbers;
  /** Cubic angstrom. */
  readonly volume: number;
  /** Atoms in the cell, occupancies counted. */
  readonly contents: string;
  /** Volume of the cell over that of the smallest cell that its atoms have. */
  readonly multiple: number;
}

/** Why two structures are not the same. */
export type Disagreement = Mismatch["disagreement"] | "occupancy" | "space group";

export interface ComparisonAnswer {
  /** Whether elements may stand for others. */
  readonly asked: "same" | "isotypic";
  /** `incomplete`: all atoms of one have partners, the other has more. */
  readonly verdict: "same" | "isotypic" | "incomplete" | "different";
  /** Null unless they are different. */
  readonly disagreement: Disagreement | null;
  readonly first: ComparedStructure;
  readonly second: ComparedStructure;
  /** From the first to the second: (a, b, c) second = (a, b, c) first times P, x(first) = P x(second) + p; null without a match. */
  readonly transformation: { readonly P: string; readonly p: string; readonly origin: Vec3 } | null;
  /** `other`: the second is like the mirror image of the first, and P is left-handed. */
  readonly hand: "same" | "other" | null;
  /** The cell of the first on the axes of the second. */
  readonly cell: CellNumbers | null;
  /** That leads from there to the cell of the second; of the nearest lattices without a match. */
  readonly strain: LatticeStrain | null;
  readonly displacement: { readonly largest: number; readonly rootMeanSquare: number; readonly atoms: number } | null;
  readonly pairs: readonly SitePair[];
  readonly alone: { readonly first: readonly SiteAlone[]; readonly second: readonly SiteAlone[] };
  readonly largestOccupancyDifference: number;
  /** Elements of the first and what stands for them in the second; null unless asked for. */
  readonly elements: readonly { readonly first: string; readonly second: string }[] | null;
  /** Factor by which the axes of the second were multiplied; 1 unless isotypic structures were asked for. */
  readonly scale: number;
  /** Without a match within the limit: the displacement that the best one beyond it takes, angstrom; null where none was found. */
  readonly nearest: { readonly largest: number; readonly rootMeanSquare: number } | null;
  readonly limits: { readonly displacement: number; readonly strain: number; readonly occupancy: number };
}

/** A comparison with the match it found. */
export interface Comparison {
  readonly answer: ComparisonAnswer;
  readonly match: ChosenMatch | null;
}

/**
 * Whether two files hold the same structure, in whatever cell, setting and origin each is given. Atoms are alike by
 * element; occupancies are compared afterwards.
 * @example
 * ```ts
 * const calcite = crystalFromBlock(requireClean(readCif(text)).blocks[0]!);
 * const { answer } = compareStructures(calcite, symmetrisedCrystal(calcite, searchSymmetry(calcite), "conventional").crystal);
 * [answer.verdict, answer.hand]; // ["same", "same"]
 * answer.displacement!.largest < 1e-6; // true
 * ```
 * @throws InputProblem `tolerance-impossible`, `atoms-missing`
 */
export function compareStructures(first: Crystal, second: Crystal, options: ComparisonOptions = {}): Comparison {
  const isotypic = options.isotypic === true;
  const limits = comparisonLimits(options);
  const a = comparedAtoms(first);
  const b = comparedAtoms(second);
  const scale = isotypic ? volumeScale(a, b) : 1;
  const context: Context = { first, second, a, b, isotypic, scale, limits };
  const scaled = isotypic ? scaledCrystal(second, scale) : second;
  let best: Attempt | null = null;
  for (const names of isotypic ? elementMaps(a, b) : [new Map<string, string>()]) {
    const next = attempt(a, scaled, names, limits);
    if (!best || isBetter(next, best)) best = next;
  }
  if (best?.match) return { answer: matched(context, best, best.match), match: best.match };
  const why = best ? mismatch(a, best.b, best.search, limits) : { disagreement: "composition" as const };
  return { answer: { ...skeleton(context), verdict: "different", ...why }, match: null };
}

interface Attempt {
  readonly names: ElementMap;
  readonly b: ComparedAtoms;
  readonly search: MatchSearch;
  readonly match: ChosenMatch | null;
}

function attempt(a: ComparedAtoms, second: Crystal, names: ElementMap, limits: MatchLimits): Attempt {
  const b = comparedAtoms(second, (kind) => names.get(kind) ?? kind);
  const search = matchStructures(a, b, limits);
  return { names, b, search, match: chosenMatch(a.crystal, b.crystal, search.matches) };
}

function isBetter(x: Attempt, y: Attempt): boolean {
  if (!x.match || !y.match) return x.match !== null;
  return x.match.rootMeanSquare < y.match.rootMeanSquare;
}

interface Context {
  readonly first: Crystal;
  readonly second: Crystal;
  readonly a: ComparedAtoms;
  readonly b: ComparedAtoms;
  readonly isotypic: boolean;
  readonly scale: number;
  readonly limits: MatchLimits;
}

function matched(context: Context, { b, names }: Attempt, match: ChosenMatch): ComparisonAnswer {
  const { first, a, isotypic, limits } = context;
  const reach = Math.min(2 * limits.displacement, 1);
  const paired = pairedSites(a.crystal, b.crystal, match, reach, (kind) => names.get(kind) ?? kind);
  const occupancy = paired.pairs.reduce((m, x) => Math.max(m, Math.abs(x.first.occupancy - x.second.occupancy)), 0);
  const disagreement = disagreementOf(context, paired, occupancy);
  const complete = paired.alone.first.length + paired.alone.second.length === 0;
  const metric = metricIn(first.metric, match.P);
  return {
    ...skeleton(context),
    verdict: disagreement ? "different" : !complete ? "incomplete" : isotypic ? "isotypic" : "same",
    disagreement,
    transformation: { P: formatBasis(match.P), p: match.text, origin: match.p },
    hand: keepsHand(match) ? "same" : "other",
    cell: cellNumbers(metric.cell),
    strain: strainBetween(metric.toCartesian, b.crystal.metric.toCartesian),
    displacement: { largest: paired.largest, rootMeanSquare: paired.rootMeanSquare, atoms: paired.atoms },
    pairs: paired.pairs,
    alone: paired.alone,
    largestOccupancyDifference: occupancy,
    elements: isotypic ? [...names].map(([theirs, ours]) => ({ first: ours, second: theirs })) : null,
  };
}

function disagreementOf(context: Context, { alone, largest }: PairedSites, occupancy: number): Disagreement | null {
  const { first, second, a, b, isotypic, limits } = context;
  const lacking = [
    { list: alone.first, of: a.given.length },
    { list: alone.second, of: b.given.length },
  ].filter(({ list }) => list.length > 0);
  // atoms may be missing from one file, but no more than half of those of the other
  const most = lacking.some(({ list, of }) => 2 * list.reduce((s, x) => s + x.atoms, 0) > of);
  if (lacking.length === 2 || most) return "composition";
  if (largest > limits.displacement) return "positions"; // by more than the mean that the search takes off
  if (isotypic) return first.identified.number === second.identified.number ? null : "space group";
  return occupancy > OCCUPANCY_DIFFERENCE ? "occupancy" : null;
}

function skeleton({ first, second, a, b, isotypic, scale, limits }: Context): Omit<ComparisonAnswer, "verdict"> {
  return {
    asked: isotypic ? "isotypic" : "same",
    disagreement: null,
    first: compared(first, a),
    second: compared(second, b),
    transformation: null,
    hand: null,
    cell: null,
    strain: null,
    displacement: null,
    pairs: [],
    alone: { first: [], second: [] },
    largestOccupancyDifference: 0,
    elements: null,
    scale,
    nearest: null,
    limits: { ...limits, occupancy: OCCUPANCY_DIFFERENCE },
  };
}

function compared({ identified, metric, sites }: Crystal, { given, folded }: ComparedAtoms): ComparedStructure {
  const { number, hermannMauguin } = identified.summary;
  return {
    spaceGroup: { number, hermannMauguin },
    cell: cellNumbers(metric.cell),
    volume: metric.volume,
    contents: formatFormula(hillOrder(cellContents(sites))),
    multiple: given.length / folded.atoms.species.length,
  };
}

import { InputProblem } from "../problem.ts";
import { formatBasis, type SpaceGroupSummary } from "../symmetry/index.ts";
import { type Cell, metricOf, type Vec3 } from "./cell.ts";
import { metricIn } from "./change-of-cell.ts";
import { type ChosenMatch, chosenMatch } from "./chosen-match.ts";
import { type ComparedAtoms, comparedAtoms, countsOf } from "./compared-atoms.ts";
import { cellContents } from "./composition.ts";
import { type Crystal, crystalOf } from "./crystal.ts";
import { formatFormula, hillOrder } from "./formula-text.ts";
import { type LatticeStrain, strainBetween } from "./lattice-match.ts";
import { type PairedSites, pairedSites, type SiteAlone, type SitePair } from "./paired-sites.ts";
import { type CellNumbers, cellNumbers } from "./reduce-answer.ts";
import { keepsHand, type MatchSearch, matchStructures, nearestLattice } from "./structure-match.ts";

/** Two determinations of one structure differ by less in any atom, thermal expansion and all; angstrom. */
export const COMPARISON_DISPLACEMENT = 0.3;
/** And by less in any direction of the lattice; dimensionless. */
export const COMPARISON_STRAIN = 0.03;
/** Isotypic structures differ by more: radii of ions, not errors; angstrom, after scaling to one volume. */
export const ISOTYPIC_DISPLACEMENT = 0.7;
export const ISOTYPIC_STRAIN = 0.1;
/** Occupancies of partners that differ by more make another structure. */
export const OCCUPANCY_DIFFERENCE = 0.1;

export interface ComparisonOptions {
  /** Largest displacement of an atom, angstrom; default COMPARISON_DISPLACEMENT, or ISOTYPIC_DISPLACEMENT. */
  readonly displacement?: number;
  /** Largest principal strain of the lattice, dimensionless. */
  readonly strain?: number;
  /** Elements may stand for others; the second structure is scaled to the volume of the first. */
  readonly isotypic?: boolean;
}

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
export type Disagreement = "composition" | "lattice" | "positions" | "occupancy" | "space group";

export interface ComparisonAnswer {
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
  const limits = {
    displacement: options.displacement ?? (isotypic ? ISOTYPIC_DISPLACEMENT : COMPARISON_DISPLACEMENT),
    strain: options.strain ?? (isotypic ? ISOTYPIC_STRAIN : COMPARISON_STRAIN),
  };
  requireBetween("displacement", limits.displacement, 1, "angstrom");
  requireBetween("strain", limits.strain, 0.2, "(a share of the cell edges)");
  const a = comparedAtoms(first);
  const scale = isotypic ? volumeScale(a, comparedAtoms(second)) : 1;
  const scaled = isotypic ? scaledCrystal(second, scale) : second;
  const attempts = isotypic ? elementMaps(a, comparedAtoms(second)) : [IDENTICAL];
  let best: Attempt | null = null;
  for (const names of attempts) {
    const next = attempt(a, scaled, names, limits);
    if (!best || isBetter(next, best)) best = next;
  }
  if (!best) return noElements(a, comparedAtoms(second), first, second, scale, limits);
  return concluded(first, second, a, best, { isotypic, scale, limits });
}

type Limits = { readonly displacement: number; readonly strain: number };
/** Kinds of the second structure by what they are called in the first. */
type Names = ReadonlyMap<string, string>;
const IDENTICAL: Names = new Map();

function requireBetween(what: string, value: number, most: number, unit: string): void {
  if (value > 0 && value <= most) return;
  throw new InputProblem(
    "tolerance-impossible",
    `a largest ${what} of ${value} cannot tell structures apart`,
    null,
    `give a number above 0, and up to ${most} ${unit}`,
  );
}

interface Attempt {
  readonly names: Names;
  readonly b: ComparedAtoms;
  readonly search: MatchSearch;
  readonly match: ChosenMatch | null;
}

function attempt(a: ComparedAtoms, second: Crystal, names: Names, limits: Limits): Attempt {
  const b = comparedAtoms(second, (kind) => names.get(kind) ?? kind);
  const search = matchStructures(a, b, limits);
  return { names, b, search, match: chosenMatch(a.crystal, b.crystal, search.matches) };
}

function isBetter(x: Attempt, y: Attempt): boolean {
  if (!x.match || !y.match) return x.match !== null;
  return x.match.rootMeanSquare < y.match.rootMeanSquare;
}

function scaledCrystal(crystal: Crystal, scale: number): Crystal {
  const { a, b, c, alpha, beta, gamma } = crystal.metric.cell;
  const cell: Cell = { a: a * scale, b: b * scale, c: c * scale, alpha, beta, gamma };
  const { name, group, identified, tolerance } = crystal;
  const sites = crystal.sites.map(({ images: _, alsoListedAs: __, sharesPositionOf: ___, symmetry, ...site }) => ({
    ...site,
    position: symmetry.point,
  }));
  return crystalOf({ name, metric: metricOf(cell), group, identified, sites, tolerance });
}

/** Scale that gives both the same volume for each atom. */
function volumeScale(a: ComparedAtoms, b: ComparedAtoms): number {
  const perAtom = ({ crystal, given }: ComparedAtoms) => crystal.metric.volume / given.length;
  return (perAtom(a) / perAtom(b)) ** (1 / 3);
}

/** Ways to let elements of the second stand for those of the first, by their shares of the atoms. */
const MOST_MAPS = 720;

function elementMaps(a: ComparedAtoms, b: ComparedAtoms): Names[] {
  const ours = countsOf(a.kinds);
  const theirs = countsOf(b.kinds);
  if (ours.size !== theirs.size) return [];
  let maps: Names[] = [new Map()];
  for (const [kind, count] of theirs) {
    maps = maps
      .flatMap((map) => {
        const used = new Set(map.values());
        return [...ours].flatMap(([own, n]) =>
          n * b.kinds.length === count * a.kinds.length && !used.has(own) ? [new Map([...map, [kind, own]])] : [],
        );
      })
      .slice(0, MOST_MAPS);
  }
  // the same element in both stands for itself where it can
  const same = (map: Names) => [...map].filter(([x, y]) => x === y).length;
  return maps.sort((x, y) => same(y) - same(x));
}

interface Context {
  readonly isotypic: boolean;
  readonly scale: number;
  readonly limits: Limits;
}

function concluded(first: Crystal, second: Crystal, a: ComparedAtoms, found: Attempt, context: Context): Comparison {
  const { match, b, names } = found;
  if (!match) return { answer: { ...unmatched(first, second, a, found, context) }, match: null };
  const reach = Math.min(2 * context.limits.displacement, 1);
  const paired = pairedSites(a.crystal, b.crystal, match, reach, (kind) => names.get(kind) ?? kind);
  const occupancy = paired.pairs.reduce((m, x) => Math.max(m, Math.abs(x.first.occupancy - x.second.occupancy)), 0);
  const disagreement = disagreementOf(first, second, paired, occupancy, context);
  const complete = paired.alone.first.length + paired.alone.second.length === 0;
  const metric = metricIn(first.metric, match.P);
  const agreed = context.isotypic ? "isotypic" : "same";
  return {
    answer: {
      ...skeleton(first, second, a, b, context),
      verdict: disagreement ? "different" : complete ? agreed : "incomplete",
      disagreement,
      transformation: { P: formatBasis(match.P), p: match.text, origin: match.p },
      hand: keepsHand(match) ? "same" : "other",
      cell: cellNumbers(metric.cell),
      strain: strainBetween(metric.toCartesian, b.crystal.metric.toCartesian),
      displacement: { largest: paired.largest, rootMeanSquare: paired.rootMeanSquare, atoms: paired.atoms },
      pairs: paired.pairs,
      alone: paired.alone,
      largestOccupancyDifference: occupancy,
      elements: context.isotypic ? [...names].map(([theirs, ours]) => ({ first: ours, second: theirs })) : null,
    },
    match,
  };
}

function disagreementOf(
  first: Crystal,
  second: Crystal,
  { alone, atoms }: PairedSites,
  occupancy: number,
  { isotypic }: Context,
): Disagreement | null {
  const left = alone.first.reduce((s, x) => s + x.atoms, 0);
  // atoms may be missing from one file, or be more than half of neither
  if ((alone.first.length > 0 && alone.second.length > 0) || left > atoms) return "composition";
  if (isotypic) return first.identified.number === second.identified.number ? null : "space group";
  return occupancy > OCCUPANCY_DIFFERENCE ? "occupancy" : null;
}

function skeleton(first: Crystal, second: Crystal, a: ComparedAtoms, b: ComparedAtoms, { scale, limits }: Context) {
  return {
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

/** Lattices farther apart than this are not told of; dimensionless. */
const FARTHEST_STRAIN = 0.15;
/** Displacements that are tried beyond the limit, angstrom. */
const FARTHER = [2, 4] as const;
const FARTHEST_DISPLACEMENT = 1;

/** Why there is no match. */
function unmatched(
  first: Crystal,
  second: Crystal,
  a: ComparedAtoms,
  found: Attempt,
  context: Context,
): ComparisonAnswer {
  const { b, search } = found;
  const plain = skeleton(first, second, a, b, context);
  const verdict = "different" as const;
  if (!countsAgree(a, b, search.volumeRatio)) return { ...plain, verdict, disagreement: "composition" };
  const lattice = search.lattices[0] ?? nearestLattice(a, b, FARTHEST_STRAIN);
  const strain = lattice?.strain ?? null;
  if (search.lattices.length === 0) return { ...plain, verdict, disagreement: "lattice", strain };
  for (const factor of FARTHER) {
    const displacement = Math.min(factor * context.limits.displacement, FARTHEST_DISPLACEMENT);
    const best = matchStructures(a, b, { ...context.limits, displacement }).matches[0];
    if (!best) continue;
    const { largest, rootMeanSquare } = best;
    return { ...plain, verdict, disagreement: "positions", strain, nearest: { largest, rootMeanSquare } };
  }
  return { ...plain, verdict, disagreement: "positions", strain };
}

/** Whether one structure has, in the same volume, no fewer atoms of any kind than the other, and both share a kind. */
function countsAgree(a: ComparedAtoms, b: ComparedAtoms, volumeRatio: number): boolean {
  const ratio = volumeRatio >= 1 ? Math.round(volumeRatio) : 1 / Math.round(1 / volumeRatio);
  const [ours, theirs] = [countsOf(a.kinds), countsOf(b.kinds)];
  const kinds = [...new Set([...ours.keys(), ...theirs.keys()])];
  const differences = kinds.map((k) => (theirs.get(k) ?? 0) - ratio * (ours.get(k) ?? 0));
  if (!kinds.some((k) => ours.has(k) && theirs.has(k))) return false;
  return differences.every((d) => d >= -1e-6) || differences.every((d) => d <= 1e-6);
}

function noElements(
  a: ComparedAtoms,
  b: ComparedAtoms,
  first: Crystal,
  second: Crystal,
  scale: number,
  limits: Limits,
): Comparison {
  const plain = skeleton(first, second, a, b, { isotypic: true, scale, limits });
  return { answer: { ...plain, verdict: "different", disagreement: "composition" }, match: null };
}

import { equalVectors, modOne } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import {
  formatBasis,
  formatOperation,
  formatVector,
  type Operation,
  operationKey,
  reduce,
  reverse,
  type SpaceGroup,
  type SpaceGroupSummary,
  transformOperation,
} from "../symmetry/index.ts";
import { exactText, measuredText } from "./affine-in-cell.ts";
import { METRIC_TOLERANCE, type Vec3 } from "./cell.ts";
import type { Crystal } from "./crystal.ts";
import { type CellNumbers, cellNumbers } from "./reduce-answer.ts";
import { sitesAnswer } from "./sites-answer.ts";
import { type CellChoice, type SymmetrisedCrystal, symmetrisedCrystal } from "./symmetrised-crystal.ts";
import {
  type AdditionalOperations,
  additionalOperations,
  type HigherGroup,
  higherGroups,
  SEARCH_TOLERANCE,
  type SymmetrySearch,
  searchSymmetry,
} from "./symmetry-search.ts";

/** An operation with the distances between the images it makes and the atoms there, angstrom. */
export interface DisplacingOperation {
  /** In the cell of the answer; a translation that is no fraction there is rounded. */
  readonly xyz: string;
  readonly largest: number;
  readonly mean: number;
}

export interface FoundOperation extends DisplacingOperation {
  /** In the cell of the file, where its coefficients may be fractions. */
  readonly inGivenCell: string;
  /** Whether the file declares it. */
  readonly declared: boolean;
}

export interface SymmetrisedSite {
  readonly label: string;
  readonly element: string | null;
  readonly occupancy: number;
  readonly multiplicity: number;
  readonly wyckoff: string;
  readonly siteSymmetry: string;
  readonly position: Vec3;
  /** Sites of the file that are images of this one, itself included. */
  readonly labels: readonly string[];
  /** Largest distance by which one of their atoms was moved, angstrom. */
  readonly moved: number;
}

export interface SymmetriseAnswer {
  readonly declared: SpaceGroupSummary;
  /** In the cell of the answer. */
  readonly found: SpaceGroupSummary;
  /** How many times as many operations the group found has as the declared one, per volume: 1 if nothing is missed. */
  readonly index: number;
  /** Operations found, modulo the translations of the group found. */
  readonly operations: readonly FoundOperation[];
  /** Translations found that the file does not declare, in its cell: generators. */
  readonly translations: readonly { readonly vector: string; readonly largest: number; readonly mean: number }[];
  /** Declared operations that were not found, because they strain the cell. */
  readonly notKept: readonly string[];
  /** Operations that a larger tolerance would let pass, with what they ask for. */
  readonly additional: readonly (DisplacingOperation & { readonly strain: number })[];
  readonly additionalComplete: boolean;
  /** Groups that a larger tolerance finds, step by step. */
  readonly higher: readonly HigherGroup[];
  /** Angstrom, angstrom, dimensionless. */
  readonly tolerance: { readonly position: number; readonly displacement: number; readonly strain: number };
  /** `given`: that of the file. */
  readonly cellChoice: CellChoice;
  readonly cell: CellNumbers;
  /** From the cell of the file, its origin shifted first: (a', b', c') = (a, b, c) P, x = P x' + p. */
  readonly transformation: { readonly P: string; readonly p: string };
  readonly originShift: Vec3;
  /** Distances by which the atoms of the cell of the file were moved, angstrom. */
  readonly moved: { readonly largest: number; readonly mean: number };
  readonly sites: readonly SymmetrisedSite[];
}

export interface SymmetriseOptions {
  /** Largest distance between an image and its atom, angstrom; default SEARCH_TOLERANCE. */
  readonly tolerance?: number;
  /** Largest strain of the cell under a rotation part, dimensionless; default METRIC_TOLERANCE. */
  readonly strain?: number;
  /** Default `conventional`. */
  readonly cell?: CellChoice;
}

/**
 * The symmetry that the atoms of a crystal have, whatever the file declares, and the structure made exact in it.
 * @throws InputProblem `tolerance-impossible`, `atoms-missing`, `cell-not-kept`
 * @example
 * ```ts
 * const list = "group P 4/m m m\ncell a=3.905 c=3.905\nSr 1a\nTi 1d\nO1 1c\nO2 2e";
 * const { found, index } = symmetriseAnswer(composedCrystal(parseSiteTable(list)));
 * found.hermannMauguin; // "P m -3 m"
 * index; // 3
 * ```
 */
export function symmetriseAnswer(crystal: Crystal, options: SymmetriseOptions = {}): SymmetriseAnswer {
  const { tolerance = SEARCH_TOLERANCE, strain = METRIC_TOLERANCE, cell = "conventional" } = options;
  requireBetween("displacement", tolerance, LARGEST_TOLERANCE, "angstrom");
  requireBetween("strain", strain, LARGEST_STRAIN, "(a share of the cell edges)");
  const search = searchSymmetry(crystal, { tolerance, strain });
  const symmetrised = symmetrisedCrystal(crystal, search, cell);
  const additional = additionalOperations(search);
  const part = declaredPart(crystal.group, symmetrised);
  return {
    declared: crystal.identified.summary,
    found: symmetrised.crystal.identified.summary,
    index: indexOver(crystal, search),
    operations: foundOperations(search, symmetrised, part),
    translations: missedTranslations(crystal.group, search),
    notKept: part.missing.map(formatOperation),
    additional: additionalTexts(additional, search, symmetrised),
    additionalComplete: additional.complete,
    higher: higherGroups(crystal, search, additional, { tolerance, strain }),
    tolerance: { position: crystal.tolerance, displacement: tolerance, strain },
    cellChoice: cell,
    cell: cellNumbers(symmetrised.crystal.metric.cell),
    transformation: {
      P: formatBasis(symmetrised.transformation.P),
      p: formatVector(symmetrised.transformation.p),
    },
    originShift: symmetrised.originShift,
    moved: symmetrised.moved,
    sites: sitesOf(symmetrised),
  };
}

/** Farther off, an image may be nearer to another atom than to its own; angstrom. */
const LARGEST_TOLERANCE = 1;
/** A cell strained by more is another cell; dimensionless. */
const LARGEST_STRAIN = 0.1;

function requireBetween(what: string, value: number, most: number, unit: string): void {
  if (value > 0 && value <= most) return;
  throw new InputProblem(
    "tolerance-impossible",
    `a tolerance of ${value} for the ${what} cannot tell symmetry from its absence`,
    null,
    `give a number above 0, and up to ${most} ${unit}`,
  );
}

/** Operations of the group found per cell of the file, over those declared. */
function indexOver({ group: declared }: Crystal, { given, folded, group }: SymmetrySearch): number {
  return (group.members.length * given.length) / folded.atoms.species.length / declared.operations.length;
}

/** What became of the declared operations. */
interface DeclaredPart {
  /** Rotation parts, in the cell of the answer, of those found. */
  readonly rotations: ReadonlySet<string>;
  readonly missing: readonly Operation[];
}

function declaredPart(declared: SpaceGroup, { crystal, transformation }: SymmetrisedCrystal): DeclaredPart {
  const found = new Set(crystal.group.operations.map(operationKey));
  const rotations = new Set<string>();
  const back = reverse(transformation);
  const missing = declared.operations.filter((a) => {
    const moved = transformOperation(a, transformation, back);
    if (!moved || !found.has(operationKey(reduce(moved)))) return true;
    rotations.add(moved.W.join());
    return false;
  });
  return { rotations, missing };
}

function foundOperations(search: SymmetrySearch, symmetrised: SymmetrisedCrystal, part: DeclaredPart) {
  const { transformation, operations } = symmetrised;
  return operations.map((a, i): FoundOperation => {
    const { largest, mean } = search.group.members[i]!;
    const inGivenCell = exactText(a, transformation);
    return { xyz: formatOperation(a), inGivenCell, declared: part.rotations.has(a.W.join()), largest, mean };
  });
}

function missedTranslations(declared: SpaceGroup, { translations }: SymmetrySearch) {
  return translations
    .filter((t) => !declared.centrings.some((c) => equalVectors(c, modOne(t.vector))))
    .map(({ vector, largest, mean }) => ({ vector: formatVector(modOne(vector)), largest, mean }));
}

function additionalTexts(
  { operations }: AdditionalOperations,
  { exact }: SymmetrySearch,
  { fromFolded }: SymmetrisedCrystal,
) {
  const { n, d } = fromFolded.p;
  const origin = exact.origin.map((e, i) => e + n[i]! / d) as unknown as Vec3;
  return operations.map(({ W, w, largest, mean, strain }) => ({
    xyz: measuredText({ W, w }, fromFolded.P, origin),
    largest,
    mean,
    strain,
  }));
}

function sitesOf({ crystal, origins }: SymmetrisedCrystal): SymmetrisedSite[] {
  const answers = sitesAnswer(crystal).sites;
  const byLabel = new Map(origins.map((o) => [o.labels[0]!, o]));
  return answers.map(({ label, element, occupancy, multiplicity, wyckoff, siteSymmetry, snapped }) => {
    const { labels, moved } = byLabel.get(label)!;
    return { label, element, occupancy, multiplicity, wyckoff, siteSymmetry, position: snapped, labels, moved };
  });
}

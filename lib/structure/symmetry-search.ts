import type { IntMat3 } from "../algebra/index.ts";
import { identify, spaceGroupType } from "../symmetry/index.ts";
import { type AtomMapping, AtomMatcher } from "./atom-mapping.ts";
import { type AtomSet, type FoldedAtoms, type GivenAtom, pointOf, rarestCount, wholeCell } from "./atom-set.ts";
import { apply3, METRIC_TOLERANCE, type Vec3 } from "./cell.ts";
import type { Crystal } from "./crystal.ts";
import { type FoundTranslation, foldTranslations } from "./folded-translations.ts";
import { type LatticeRotation, latticeRotations } from "./lattice-rotations.ts";
import {
  type ExactGroup,
  exactGroup,
  extendGroup,
  type MappingGroup,
  mappingKey,
  trivialGroup,
} from "./mapping-group.ts";

/** Images this near to an atom are that atom, unless the user says otherwise: three s.u. of a poor light atom; angstrom. */
export const SEARCH_TOLERANCE = 0.1;

/** Operations beyond the tolerance are told of up to this displacement; angstrom. */
export const FARTHEST_DISPLACEMENT = 0.5;
/** And up to this strain of the cell; dimensionless. */
const FARTHEST_STRAIN = 0.03;
/** Atoms looked up beyond the tolerance before that search is given up: a few seconds. */
const MOST_SEARCHES = 5e6;
/** Operations beyond the tolerance that are told of. */
const MOST_ADDITIONAL = 96;

export interface SearchOptions {
  /** Largest distance between an image and its atom, angstrom. */
  readonly tolerance?: number;
  /** Largest strain of the cell under a rotation part, dimensionless. */
  readonly strain?: number;
}

/** What was found about a set of atoms. */
export interface SymmetrySearch {
  readonly given: readonly GivenAtom[];
  readonly folded: FoldedAtoms;
  /** Translations that made the cell smaller. */
  readonly translations: readonly FoundTranslation[];
  /** Operations modulo the lattice of the folded atoms, with their displacements. */
  readonly group: MappingGroup;
  readonly exact: ExactGroup;
}

/**
 * Every operation that carries the atoms of a crystal onto themselves within the tolerance, the declared ones or not:
 * first translations, then rotations of the lattice of the smaller cell, each with the translations that carry the first
 * atom of the rarest species to one of its equals. Where the operations within the tolerance form no group, those that
 * displace most are left out.
 * @throws InputProblem `atoms-missing`
 */
export function searchSymmetry(crystal: Crystal, options: SearchOptions = {}): SymmetrySearch {
  const { tolerance = SEARCH_TOLERANCE, strain = METRIC_TOLERANCE } = options;
  const { given, folded: start } = wholeCell(crystal);
  const { folded, translations } = foldTranslations(start, tolerance);
  const { atoms } = folded;
  const rotations = latticeRotations(atoms.axes, strain);
  const matcher = new AtomMatcher(atoms, tolerance);
  const candidates = rotations
    .flatMap(({ W }) => startingTranslations(atoms, W).flatMap((w) => matcher.match(W, w) ?? []))
    .sort((a, b) => a.largest - b.largest);
  let group = trivialGroup(atoms);
  for (const candidate of candidates) {
    if (group.members.some((m) => mappingKey(m) === mappingKey(candidate))) continue;
    group = extendGroup(atoms, group, candidate, tolerance) ?? group;
  }
  return { given, folded, translations, group, exact: exactGroup(group) };
}

/** The translations with which a rotation part carries atom 0 to each atom of its species. */
function startingTranslations(atoms: AtomSet, W: IntMat3): Vec3[] {
  const image = apply3(W, pointOf(atoms, 0));
  return Array.from({ length: rarestCount(atoms) }, (_, j) => {
    const x = pointOf(atoms, j);
    return [x[0] - image[0], x[1] - image[1], x[2] - image[2]];
  });
}

/** An operation beyond the tolerance; translation measured, in the axes of the folded atoms. */
export interface AdditionalOperation extends Pick<AtomMapping, "W" | "w" | "largest" | "mean"> {
  /** Strain of the cell under its rotation part, dimensionless. */
  readonly strain: number;
}

export interface AdditionalOperations {
  /** The least displacing ones first. */
  readonly operations: readonly AdditionalOperation[];
  /** False where the search was given up or the list cut. */
  readonly complete: boolean;
}

/** Operations of the lattice that a larger tolerance would let pass, the group found apart. */
export function additionalOperations({ folded, group }: SymmetrySearch): AdditionalOperations {
  const { atoms } = folded;
  const matcher = new AtomMatcher(atoms, FARTHEST_DISPLACEMENT);
  const known = new Set(group.members.map(mappingKey));
  const found: AdditionalOperation[] = [];
  let complete = true;
  const tryAll = ({ W, strain }: LatticeRotation) => {
    for (const start of startingTranslations(atoms, W)) {
      if (matcher.searches > MOST_SEARCHES) {
        complete = false;
        return;
      }
      const mapping = matcher.match(W, start);
      if (!mapping || known.has(mappingKey(mapping))) continue;
      found.push({ W, w: mapping.w, largest: mapping.largest, mean: mapping.mean, strain });
    }
  };
  for (const rotation of latticeRotations(atoms.axes, FARTHEST_STRAIN)) tryAll(rotation);
  found.sort((a, b) => a.largest - b.largest || a.strain - b.strain);
  return {
    operations: found.slice(0, MOST_ADDITIONAL),
    complete: complete && found.length <= MOST_ADDITIONAL,
  };
}

/** A higher group, and what it takes to find it. */
export interface HigherGroup {
  /** Displacement of its worst operation, angstrom. */
  readonly tolerance: number;
  /** Strain of the cell under its worst rotation part, dimensionless. */
  readonly strain: number;
  readonly number: number;
  readonly hermannMauguin: string;
  /** How many times as many operations it has, smaller cell included. */
  readonly index: number;
}

/** Searches that are made at most, without and with strain; each costs as much as the first. */
const MOST_STEPS = 4;

/**
 * The groups that a larger tolerance would find, step by step: those that strain the cell no more than the group found
 * first, then those that do.
 * @param limits of the search that found nothing higher
 */
export function higherGroups(
  crystal: Crystal,
  found: SymmetrySearch,
  { operations }: AdditionalOperations,
  limits: Required<SearchOptions>,
): HigherGroup[] {
  const first = sizeOf(found);
  const unstrained = levelsOf(
    operations.filter((a) => a.strain <= limits.strain),
    limits,
  );
  const strained = operations.some((a) => a.strain > limits.strain) ? levelsOf(operations, limits) : [];
  return [unstrained, strained].flatMap((levels) => {
    let size = first;
    return levels.slice(0, MOST_STEPS).flatMap((level): HigherGroup[] => {
      const next = searchSymmetry(crystal, level);
      if (sizeOf(next) <= size) return [];
      size = sizeOf(next);
      const { number } = identify(next.exact.operations);
      return [{ ...level, number, hermannMauguin: spaceGroupType(number).hermannMauguin, index: size / first }];
    });
  });
}

/** Operations per atom given: grows with the point group and with the translations. */
function sizeOf({ given, folded, group }: SymmetrySearch): number {
  return (group.members.length * given.length) / folded.atoms.species.length;
}

/** Displacements nearer to each other than this are one step; angstrom. */
const SAME_LEVEL = 0.005;

/** Distinct levels of displacement, from that of the search upwards, each with the largest strain met up to it. */
function levelsOf(operations: readonly AdditionalOperation[], least: Required<SearchOptions>) {
  const levels: Required<SearchOptions>[] = [];
  let { strain } = least;
  for (const { largest, strain: own } of operations) {
    strain = Math.max(strain, own);
    const last = levels.at(-1);
    const level = { tolerance: Math.max(least.tolerance, largest + SAME_LEVEL), strain };
    if (last && largest <= last.tolerance) levels[levels.length - 1] = level;
    else levels.push(level);
  }
  return levels;
}

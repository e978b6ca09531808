import { determinant, type IntMat3, inverseRatMat, multiplyRatMat, type RatMat3, ratMat3 } from "../algebra/index.ts";
import { AtomPairer, type AtomPairing } from "./atom-pairing.ts";
import { type AtomSet, floatMatrix, placeWrapped, pointOf } from "./atom-set.ts";
import { apply3, type Vec3 } from "./cell.ts";
import { translationsBetween } from "./cell-lattice.ts";
import { type ComparedAtoms, countsOf } from "./compared-atoms.ts";
import { volumeOfAxes } from "./lattice-axes.ts";
import { type LatticeMatch, latticeMatches } from "./lattice-match.ts";

/** A way to lay one structure onto another: x(first) = P x(second) + p. */
export interface StructureMatch {
  /** (a, b, c) of the second = (a, b, c) of the first times P, up to strain; determinant negative for the other hand. */
  readonly P: RatMat3;
  /** Measured; fractional in the cell of the first. */
  readonly p: Vec3;
  readonly largest: number;
  readonly rootMeanSquare: number;
}

/** What came of the search, the matches with the least displacement first. */
export interface MatchSearch {
  /** Volume of the primitive cell of the second over that of the first. */
  readonly volumeRatio: number;
  /** Lattices that agree within the limit, of either hand; null where none do, with the strain of the nearest. */
  readonly lattices: readonly LatticeMatch[];
  readonly matches: readonly StructureMatch[];
}

export interface MatchLimits {
  /** Angstrom. */
  readonly displacement: number;
  /** Dimensionless. */
  readonly strain: number;
}

/** Cells of sublattices up to this index are compared. */
const LARGEST_INDEX = 200;
/** Up to this index, how far the nearest lattice is apart is worth its search. */
const LARGEST_NEAR_INDEX = 16;

/**
 * Ways to lay the atoms of two structures onto each other, of either hand: primitive cells first (or a sublattice of one
 * of them), then the shift that carries an atom of the rarest kind onto each of its equals. Every atom of the structure
 * that has fewer needs a partner.
 */
export function matchStructures(first: ComparedAtoms, second: ComparedAtoms, limits: MatchLimits): MatchSearch {
  const [a, b] = [first.folded.atoms, second.folded.atoms];
  const volumeRatio = Math.abs(volumeOfAxes(b.axes) / volumeOfAxes(a.axes));
  if (volumeRatio < 1) {
    const { lattices, matches } = searchFrom(second, first, limits, 1 / volumeRatio);
    return { volumeRatio, lattices, matches: matches.map(inverted) };
  }
  return { volumeRatio, ...searchFrom(first, second, limits, volumeRatio) };
}

/** x2 = P^-1 (x1 - p). */
function inverted({ P, p, largest, rootMeanSquare }: StructureMatch): StructureMatch {
  const back = inverseRatMat(P);
  const moved = apply3(floatMatrix(back), p).map((e) => -e + 0) as unknown as Vec3;
  return { P: back, p: moved, largest, rootMeanSquare };
}

/** The lattice of `large` is that of `small` or a sublattice of it. */
function searchFrom(
  small: ComparedAtoms,
  large: ComparedAtoms,
  limits: MatchLimits,
  ratio: number,
): Omit<MatchSearch, "volumeRatio"> {
  const index = Math.round(ratio);
  if (index > LARGEST_INDEX || Math.abs(ratio / index - 1) > 4 * limits.strain) return { lattices: [], matches: [] };
  const lattices = latticeMatches(small.folded.atoms.axes, large.folded.atoms.axes, limits.strain);
  const species = new SpeciesNumbers();
  const largeKinds = large.kinds.map((k) => species.of(k));
  const largeSet: AtomSet = { ...large.folded.atoms, species: Int32Array.from(largeKinds) };
  const fewer = small.kinds.length * index <= large.kinds.length;
  const pairer = fewer ? new AtomPairer(largeSet, limits.displacement) : null;
  const matches = lattices.flatMap(({ M }): StructureMatch[] => {
    const expanded = inSublattice(small, large, M, species);
    const query = fewer ? expanded : largeSet;
    const pairings = (pairer ?? new AtomPairer(expanded, limits.displacement)).pairings(query, rarest(query));
    return pairings.map((pairing) => asMatch(small, large, M, pairing, fewer));
  });
  return { lattices, matches: matches.sort((x, y) => x.rootMeanSquare - y.rootMeanSquare) };
}

class SpeciesNumbers {
  private readonly known = new Map<string, number>();

  of(kind: string): number {
    const found = this.known.get(kind) ?? this.known.size;
    this.known.set(kind, found);
    return found;
  }
}

/** An atom of the species with the fewest. */
function rarest({ species }: AtomSet): number {
  const counts = countsOf([...species].map(String));
  let best = 0;
  species.forEach((s, k) => {
    if (counts.get(String(s))! < counts.get(String(species[best]!))!) best = k;
  });
  return best;
}

/** All atoms of the small structure in the cell (axes) M, on the axes of the large one so that distances are its own. */
function inSublattice(small: ComparedAtoms, large: ComparedAtoms, M: IntMat3, species: SpeciesNumbers): AtomSet {
  const { atoms } = small.folded;
  const back = floatMatrix(inverseRatMat(ratMat3(M)));
  const { n } = translationsBetween({ n: [1, 0, 0, 0, 1, 0, 0, 0, 1], d: 1 }, M);
  const x = new Float64Array(atoms.x.length * n.length);
  const kinds = new Int32Array(atoms.species.length * n.length);
  for (let k = 0; k < atoms.species.length; k++) {
    const at = pointOf(atoms, k);
    n.forEach((t, i) => {
      const index = k * n.length + i;
      placeWrapped(x, index, apply3(back, [at[0] + t[0], at[1] + t[1], at[2] + t[2]]));
      kinds[index] = species.of(small.kinds[k]!);
    });
  }
  return { axes: large.folded.atoms.axes, x, species: kinds };
}

/** From shifts on the common axes to the cells given: x(small) = P x(large) + p. */
function asMatch(
  small: ComparedAtoms,
  large: ComparedAtoms,
  M: IntMat3,
  { shift, largest, rootMeanSquare }: AtomPairing,
  fromSmall: boolean,
): StructureMatch {
  const common = multiplyRatMat(small.folded.basis, ratMat3(M));
  const P = multiplyRatMat(common, inverseRatMat(large.folded.basis));
  // small + shift = large on the common axes, or large + shift = small
  const sign = fromSmall ? -1 : 1;
  const p = apply3(floatMatrix(common), shift).map((e) => sign * e + 0) as unknown as Vec3;
  return { P, p, largest, rootMeanSquare };
}

/** Whether the axes keep their hand. */
export function keepsHand({ P }: Pick<StructureMatch, "P">): boolean {
  return determinant(P.n) > 0;
}

/** The nearest lattice within a reach, for telling how far two of them are apart; null where none is. */
export function nearestLattice(first: ComparedAtoms, second: ComparedAtoms, reach: number): LatticeMatch | null {
  const [a, b] = [first.folded.atoms.axes, second.folded.atoms.axes];
  const ratio = Math.abs(volumeOfAxes(b) / volumeOfAxes(a));
  if (Math.max(ratio, 1 / ratio) > LARGEST_NEAR_INDEX) return null;
  return (ratio < 1 ? latticeMatches(b, a, reach) : latticeMatches(a, b, reach))[0] ?? null;
}

import { type ComparedAtoms, countsOf } from "./compared-atoms.ts";
import type { LatticeStrain } from "./lattice-match.ts";
import { type MatchLimits, type MatchSearch, matchStructures, nearestLattice } from "./structure-match.ts";

/** Why two structures could not be laid on each other. */
export interface Mismatch {
  /** `elements`: the same places, over which the elements are distributed otherwise. */
  readonly disagreement: "composition" | "lattice" | "positions" | "elements";
  /** Of the nearest lattices; null where none is near. */
  readonly strain: LatticeStrain | null;
  /** The best match beyond the limit, angstrom; null where none was found. */
  readonly nearest: { readonly largest: number; readonly rootMeanSquare: number } | null;
}

/** Lattices farther apart than this are not told of; dimensionless. */
const FARTHEST_STRAIN = 0.15;
/** Displacements that are tried beyond the limit, angstrom. */
const FARTHER = [2, 4] as const;
const FARTHEST_DISPLACEMENT = 1;

/** What stands in the way where a search found no match. */
export function mismatch(a: ComparedAtoms, b: ComparedAtoms, search: MatchSearch, limits: MatchLimits): Mismatch {
  if (!countsAgree(a, b, search.volumeRatio)) return { disagreement: "composition", strain: null, nearest: null };
  const strain = (search.lattices[0] ?? nearestLattice(a, b, FARTHEST_STRAIN))?.strain ?? null;
  if (search.lattices.length === 0) return { disagreement: "lattice", strain, nearest: null };
  if (agreeInPlaces(a, b, limits)) return { disagreement: "elements", strain, nearest: null };
  return { disagreement: "positions", strain, nearest: fartherMatch(a, b, limits) };
}

function fartherMatch(a: ComparedAtoms, b: ComparedAtoms, limits: MatchLimits): Mismatch["nearest"] {
  for (const factor of FARTHER) {
    const displacement = Math.min(factor * limits.displacement, FARTHEST_DISPLACEMENT);
    const best = matchStructures(a, b, { ...limits, displacement }).matches[0];
    if (best) return { largest: best.largest, rootMeanSquare: best.rootMeanSquare };
  }
  return null;
}

/** Whether the atoms lie in the same places, their elements left aside. */
function agreeInPlaces(a: ComparedAtoms, b: ComparedAtoms, limits: MatchLimits): boolean {
  const bare = (c: ComparedAtoms): ComparedAtoms => ({ ...c, kinds: c.kinds.map(() => "atom") });
  return matchStructures(bare(a), bare(b), limits).matches.length > 0;
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

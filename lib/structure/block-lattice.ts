import { type RatVec3, ZERO_VECTOR } from "../algebra/index.ts";
import type { CifBlock } from "../cif/index.ts";
import { InputProblem } from "../problem.ts";
import { operationsFromHall } from "../symmetry/index.ts";
import { type Metric, metricOf } from "./cell.ts";
import { readCell } from "./crystal.ts";
import { resolveSymmetry } from "./declared-group.ts";
import { declaredSymmetry } from "./declared-symmetry.ts";

/** A cell with the centrings of its lattice. */
export interface BlockLattice {
  readonly metric: Metric;
  readonly centrings: readonly RatVec3[];
  readonly notes: readonly string[];
}

/**
 * Cell and centrings of a block; its atoms are not looked at. A block that states no symmetry is taken as primitive,
 * with a note.
 * @param centring letter that is used in place of the symmetry of the block
 * @throws InputProblem as `readCell` and `resolveSymmetry` do, or `centring-unknown`
 */
export function latticeFromBlock(block: CifBlock, centring: string | null = null): BlockLattice {
  const metric = metricOf(readCell(block));
  if (centring !== null) return { metric, centrings: centringsByLetter(centring), notes: [] };
  try {
    const { identified, notes } = resolveSymmetry(declaredSymmetry(block), metric, () => null);
    return { metric, centrings: identified.group.centrings, notes };
  } catch (e) {
    if (!(e instanceof InputProblem) || e.code !== "symmetry-missing") throw e;
    const note = "the block states no symmetry, so its cell is taken as primitive";
    return { metric, centrings: [ZERO_VECTOR], notes: [note] };
  }
}

/**
 * Centrings of a lattice by its letter: P, A, B, C, I, F, R (obverse, hexagonal axes) or H.
 * @throws InputProblem `centring-unknown`
 */
export function centringsByLetter(letter: string): readonly RatVec3[] {
  if (/^[PABCIFRH]$/.test(letter)) return operationsFromHall(`${letter} 1`).centrings;
  throw new InputProblem(
    "centring-unknown",
    `"${letter}" is no letter of a lattice`,
    null,
    "give P, A, B, C, I, F, R (hexagonal axes, obverse) or H",
  );
}

import type { Vec3 } from "./cell.ts";
import { cellAtoms, type LatticeAtom } from "./cell-atoms.ts";
import { type Crystal, crystalOf } from "./crystal.ts";
import { gatheredPieces } from "./gathered-pieces.ts";

/** A centroid so little below a face of the cell lies on it; fractional, far above rounding, far below any s.u. */
const ON_FACE = 1e-9;

/** What `unitsInCell` does, for a person. */
export const UNITS_IN_CELL =
  "each molecule or ion is kept whole and moved by whole cell lengths until the centroid of its listed atoms lies in the cell (0 <= x, y, z < 1); so is each other atom by itself";

/**
 * The same crystal with its listed atoms in the cell: those of one molecule or ion are gathered and moved together, by
 * integers, until their centroid has coordinates in [0, 1); atoms that are not bonded, or bonded without end, one by one.
 * Group, special positions, s.u. and displacement parameters stay.
 */
export function unitsInCell(crystal: Crystal): Crystal {
  const atoms = cellAtoms(crystal);
  const placed = crystal.sites.map((s) => s.symmetry.point);
  for (const piece of gatheredPieces(crystal)) {
    const listed = piece.filter(({ atom }) => atoms[atom]!.image === 0);
    if (listed.length === 0) continue;
    const at = listed.map(({ atom, shift }) => plus(atoms[atom]!.position, shift));
    const whole = [0, 1, 2].map((i) => Math.floor(at.reduce((s, x) => s + x[i]!, 0) / at.length + ON_FACE));
    listed.forEach(({ atom }: LatticeAtom, k) => {
      const { site } = atoms[atom]!;
      const point = placed[site]!;
      // integers are added to the point as it stands, so that it keeps its digits
      placed[site] = plus(
        point,
        point.map((e, i) => Math.round(at[k]![i]! - whole[i]! - e)),
      );
    });
  }
  if (placed.every((x, k) => x.every((e, i) => e === crystal.sites[k]!.symmetry.point[i]))) return crystal;
  const { name, metric, group, identified, tolerance } = crystal;
  const sites = crystal.sites.map(
    ({ images: _, alsoListedAs: __, sharesPositionOf: ___, symmetry: ____, ...site }, k) => ({
      ...site,
      position: placed[k]!,
    }),
  );
  return crystalOf({ name, metric, group, identified, sites, tolerance });
}

function plus(x: Vec3, whole: readonly number[]): Vec3 {
  return [x[0] + whole[0]!, x[1] + whole[1]!, x[2] + whole[2]!];
}

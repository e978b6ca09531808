import type { IntVec3 } from "../algebra/index.ts";
import { transformPoint } from "../symmetry/index.ts";
import type { CellAtom } from "./cell-atoms.ts";
import type { Crystal } from "./crystal.ts";

/** Whole cells between an atom of the cell and the image of the listed point by its operation as it stands. */
export function wrapOf(crystal: Crystal, { site, image, position }: CellAtom): IntVec3 {
  const { symmetry, images } = crystal.sites[site]!;
  const at = transformPoint(crystal.group.operations[images[image]!.operation]!, symmetry.point);
  const whole = (i: 0 | 1 | 2) => Math.round(position[i] - at[i]) + 0;
  return [whole(0), whole(1), whole(2)];
}

import { compareStructures, searchSymmetry, standardisedCrystal } from "../../lib/structure/index.ts";
import { disguised, randomNumbers, randomStructure } from "../support/random-structures.ts";
import { type Measurement, ratio } from "./ratio.ts";

/** A structure against the list of all atoms of a larger, disturbed cell; the measure is the search for its symmetry. */
function against(number: number, multiple: readonly [number, number, number], rounds: number): Measurement {
  const random = randomNumbers(number);
  const crystal = randomStructure(number, random);
  const list = disguised(crystal, { multiple, noise: 0.03, steps: 2 }, random);
  const search = () => searchSymmetry(list, { tolerance: 0.15 }).group.members.length;
  const compared = ratio(
    `comparison in type ${number}`,
    "the symmetry search",
    { ours: () => compareStructures(crystal, list).answer.pairs.length, reference: search },
    rounds,
  );
  return { ...compared, detail: `${list.sites.length} atoms in P 1, ${compared.detail}` };
}

/** The standard description of all atoms in P 1, where every atom is tried as the origin. */
function standardised(number: number, multiple: readonly [number, number, number], rounds: number): Measurement {
  const random = randomNumbers(number);
  const list = disguised(randomStructure(number, random), { multiple, noise: 0.03, steps: 2 }, random);
  const measured = ratio(
    "standard description in P 1",
    "the symmetry search",
    {
      ours: () => standardisedCrystal(list).description.gamma,
      reference: () => searchSymmetry(list, { tolerance: 0.15 }).group.members.length,
    },
    rounds,
  );
  return { ...measured, detail: `${list.sites.length} atoms, ${measured.detail}` };
}

/** Beside the search for the symmetry of the same list in the same run. */
export function measure(): readonly Measurement[] {
  return [
    against(62, [3, 2, 3], 5),
    against(2, [4, 4, 4], 5),
    against(225, [1, 1, 1], 5),
    standardised(62, [3, 2, 3], 5),
  ];
}

import {
  type AtomSite,
  type Crystal,
  crystalOf,
  metricOf,
  searchSymmetry,
  type Vec3,
} from "../../lib/structure/index.ts";
import { spaceGroup } from "../../lib/symmetry/index.ts";
import { countOperations } from "../oracle/symmetry-search.ts";
import { disguised, randomNumbers, randomStructure } from "../support/random-structures.ts";
import { fastest, type Measurement, ratio } from "./ratio.ts";

/** The structure of a type so many times, without symmetry, and as bare lists for the slow twin. */
function listed(number: number, multiple: readonly [number, number, number]) {
  const random = randomNumbers(number);
  const crystal = disguised(randomStructure(number, random), { multiple, noise: 0, steps: 0 }, random);
  const points = crystal.sites.map((s) => s.symmetry.point);
  return { crystal, atoms: { metric: crystal.metric, points, elements: crystal.sites.map((s) => s.element!) } };
}

const found = ({ group, given, folded }: ReturnType<typeof searchSymmetry>) =>
  (group.members.length * given.length) / folded.atoms.species.length;

function against(name: string, number: number, multiple: readonly [number, number, number], rounds: number) {
  const { crystal, atoms } = listed(number, multiple);
  const sides = {
    ours: () => found(searchSymmetry(crystal, { tolerance: 0.05 })),
    reference: () => countOperations(atoms, 0.05),
  };
  const { detail = "", ...rest } = ratio(name, "a loop over all pairs", sides, rounds);
  return { ...rest, detail: `${crystal.sites.length} atoms, ${sides.ours()} operations, ${detail}` };
}

/** Points that are no structure, all of one element, at constant density: the hardest case for the first atom. */
function scattered(count: number): Crystal {
  const random = randomNumbers(count);
  const { crystal } = listed(1, [1, 1, 1]);
  const { cell, volume } = crystal.metric;
  const k = ((20 * count) / volume) ** (1 / 3);
  const metric = metricOf({ ...cell, a: cell.a * k, b: cell.b * k, c: cell.c * k });
  const sites = Array.from({ length: count }, (_, i): AtomSite => {
    const position: Vec3 = [random(), random(), random()];
    return { ...crystal.sites[0]!, label: `X${i}`, position };
  });
  return crystalOf({ name: "points", metric, group: spaceGroup([]), sites, tolerance: 1e-4 });
}

/** How many times longer four times as many atoms take, over four: 1 is linear growth. */
function growth(): Measurement {
  const small = scattered(4000);
  const large = scattered(16000);
  const sides = { ours: () => found(searchSymmetry(large)), reference: () => found(searchSymmetry(small)) };
  const time = fastest(sides, 3);
  return {
    name: "growth from 4,000 to 16,000 atoms without symmetry",
    ratio: time.ours / (4 * time.reference),
    reference: "linear growth",
    detail: `${time.ours.toPrecision(3)} ms against ${time.reference.toPrecision(3)} ms`,
  };
}

/** Missed symmetry of cells listed in P 1, beside the brute-force loop over all pairs in the same run. */
export function measure(): Measurement[] {
  return [
    against("P 21/c, a cell of about 1,000 atoms", 14, [4, 5, 3], 3),
    against("F d -3 m, about 1,000 atoms", 227, [2, 2, 2], 2),
    growth(),
  ];
}

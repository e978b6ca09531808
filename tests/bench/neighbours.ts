import { readFileSync } from "node:fs";
import { readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import {
  type Crystal,
  cellAtoms,
  crystalFromBlock,
  crystalOf,
  metricOf,
  neighboursAnswer,
  type Vec3,
} from "../../lib/structure/index.ts";
import { spaceGroup } from "../../lib/symmetry/index.ts";
import { type Measurement, ratio } from "./ratio.ts";

const SMALL = 2;
const LARGE = 5;

/** A supercell of so many cells along each axis, in P 1. */
function supercell(crystal: Crystal, n: number): Crystal {
  const { a, b, c, ...angles } = crystal.metric.cell;
  const steps = Array.from({ length: n }, (_, i) => i);
  const sites = cellAtoms(crystal).flatMap(({ site, image, position: x }) =>
    steps.flatMap((i) =>
      steps.flatMap((j) =>
        steps.map((k) => {
          const position: Vec3 = [(x[0] + i) / n, (x[1] + j) / n, (x[2] + k) / n];
          return { ...crystal.sites[site]!, label: `X${site} ${image} ${i} ${j} ${k}`, position };
        }),
      ),
    ),
  );
  const metric = metricOf({ a: n * a, b: n * b, c: n * c, ...angles });
  return crystalOf({ name: "supercell", metric, group: spaceGroup([]), sites });
}

/** All that is told of every atom of a crystal without symmetry, atom by atom, beside a smaller crystal. */
export function measure(): readonly Measurement[] {
  const text = readFileSync("fixtures/albite.cif", "utf8");
  const albite = crystalFromBlock(requireClean(readCif(text)).blocks[0]!);
  const [small, large] = [SMALL, LARGE].map((n) => supercell(albite, n)) as [Crystal, Crystal];
  const share = large.sites.length / small.sites.length;
  const run = (crystal: Crystal) => () => neighboursAnswer(crystal).sites.length;
  const { ratio: whole, detail } = ratio("", "", { ours: run(large), reference: run(small) }, 3);
  const name = `neighbours of ${large.sites.length} atoms, for each atom`;
  return [{ name, ratio: whole / share, reference: `${small.sites.length} atoms`, detail: detail ?? "" }];
}

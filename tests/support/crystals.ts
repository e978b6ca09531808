import { readFileSync } from "node:fs";
import fc from "fast-check";
import {
  adjugate,
  determinant,
  IDENTITY,
  type IntMat3,
  multiply,
  ratMat3,
  ratVec3,
  scale,
  transpose,
} from "../../lib/algebra/index.ts";
import { readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import {
  type AtomSite,
  apply3,
  type Crystal,
  cellOfMetric,
  crystalFromBlock,
  crystalOf,
  type Mat3,
  metricOf,
  multiply3,
  type Vec3,
} from "../../lib/structure/index.ts";
import {
  type Operation,
  reduce,
  type SpaceGroup,
  spaceGroup,
  type Transformation,
  transformOperation,
} from "../../lib/symmetry/index.ts";

/** The crystal of a fixture's first block. */
export function fixture(name: string): Crystal {
  const text = readFileSync(new URL(`../../fixtures/${name}.cif`, import.meta.url), "utf8");
  return crystalFromBlock(requireClean(readCif(text)).blocks[0]!);
}

/** The crystal of a CIF given as text. */
export function crystalOfText(text: string, tolerance = 0.05): Crystal {
  return crystalFromBlock(requireClean(readCif(text)).blocks[0]!, { tolerance });
}

/** An atom with nothing but a place. */
export function atom(label: string, element: string, position: Vec3, occupancy = 1): AtomSite {
  return {
    label,
    typeSymbol: element,
    element,
    charge: null,
    position,
    su: [null, null, null],
    occupancy,
    assembly: null,
    disorderGroup: null,
    displacement: null,
    span: { start: 0, end: 0 },
  };
}

/** The mean over the group of the metric of a triclinic cell: invariant, and no more symmetric than it must be. */
export function invariantMetric(group: SpaceGroup, seed: readonly [number, number, number]): Mat3 {
  const [p, q, r] = seed;
  const start: Mat3 = [60 + p, 3 + q, -4 + r, 3 + q, 75 + q, 5 + p, -4 + r, 5 + p, 92 + r];
  const sum = new Array<number>(9).fill(0);
  for (const { W } of group.representatives) {
    const image = multiply3(transpose(W), multiply3(start, W));
    for (let i = 0; i < 9; i++) sum[i]! += image[i]! / group.representatives.length;
  }
  return sum as unknown as Mat3;
}

/** The same crystal in another setting. Null where an operation would not be integer there. */
export function inSetting(crystal: Crystal, t: Transformation): Crystal | null {
  const operations: Operation[] = [];
  for (const a of crystal.group.operations) {
    const moved = transformOperation(a, t);
    if (!moved) return null;
    operations.push(reduce(moved));
  }
  const lattice = latticeOf(t);
  const P = t.P.n.map((e) => e / t.P.d) as unknown as Mat3;
  const metric = metricOf(cellOfMetric(multiply3(transposed(P), multiply3(crystal.metric.g, P))));
  const det = determinant(t.P.n);
  const back = scale(adjugate(t.P.n), t.P.d).map((e) => e / det) as unknown as Mat3;
  const sites = crystal.sites.map((site) => {
    const shifted = site.position.map((e, i) => e - t.p.n[i]! / t.p.d) as unknown as Vec3;
    return { ...site, position: apply3(back, shifted) };
  });
  const group = spaceGroup([...operations, ...lattice]);
  return crystalOf({ name: crystal.name, metric, group, sites, tolerance: crystal.tolerance });
}

/** Translations of the old lattice in the new basis: those that a larger cell turns into centrings. */
function latticeOf(t: Transformation): Operation[] {
  const inverse = ratMat3(scale(adjugate(t.P.n), t.P.d), determinant(t.P.n));
  return [0, 1, 2].map((j) => {
    const w = ratVec3([inverse.n[j]!, inverse.n[3 + j]!, inverse.n[6 + j]!], inverse.d);
    return reduce({ W: IDENTITY, w });
  });
}

function transposed(m: Mat3): Mat3 {
  return [m[0], m[3], m[6], m[1], m[4], m[7], m[2], m[5], m[8]];
}

/** Unimodular matrices with small entries and determinant 1, by elementary steps. */
export const unimodular: fc.Arbitrary<IntMat3> = fc
  .array(fc.tuple(fc.integer({ min: 0, max: 2 }), fc.integer({ min: 0, max: 2 }), fc.constantFrom(-1, 1)), {
    minLength: 0,
    maxLength: 5,
  })
  .map((steps) =>
    steps.reduce<IntMat3>(
      (m, [i, j, k]) => {
        if (i === j) return m;
        const e = [1, 0, 0, 0, 1, 0, 0, 0, 1];
        e[3 * i + j] = k;
        return multiply(m, e as unknown as IntMat3);
      },
      [1, 0, 0, 0, 1, 0, 0, 0, 1],
    ),
  );

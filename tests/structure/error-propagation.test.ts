import fc from "fast-check";
import { inverse, Matrix } from "ml-matrix";
import { describe, expect, it, test } from "vitest";
import { multiplyRatMat, ratMat3, ratVec3 } from "../../lib/algebra/index.ts";
import { readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import { cellStrains } from "../../lib/structure/cell-uncertainty.ts";
import { scaledDirections } from "../../lib/structure/free-parameters.ts";
import {
  angle,
  apply3,
  crystalFromBlock,
  distance,
  type Metric,
  metricOf,
  multiply3,
  neighboursAnswer,
  torsion,
  type Vec3,
} from "../../lib/structure/index.ts";
import { angleOf, distanceOf, torsionOf } from "../../lib/structure/measure.ts";
import { conjugate3, difference3 } from "../../lib/structure/rotation-fit.ts";
import { parseTriplet } from "../../lib/symmetry/index.ts";
import { fixture, inSetting, unimodular } from "../support/crystals.ts";
import { randomNumbers } from "../support/random-structures.ts";

const coordinate = fc.double({ min: -3, max: 3, noNaN: true });
const point = fc.tuple(coordinate, coordinate, coordinate);
const apart = (points: readonly Vec3[]) =>
  points.every((p, i) => points.slice(0, i).every((q) => distance([p, q]) > 0.8));

/** Gradient by differences. */
function slopes(measure: (points: readonly Vec3[]) => number, points: readonly Vec3[]): number[] {
  const step = 1e-5;
  return points.flatMap((_, i) =>
    [0, 1, 2].map((k) => {
      const at = (by: number) =>
        points.map((q, j) => (j === i ? (q.map((e, m) => e + (m === k ? by : 0)) as unknown as Vec3) : q));
      return (measure(at(step)) - measure(at(-step))) / (2 * step);
    }),
  );
}

describe("gradients are those of small displacements", () => {
  const agree = (found: readonly Vec3[], expected: readonly number[]) => {
    for (const [i, g] of found.flat().entries()) {
      expect(Math.abs(g - expected[i]!)).toBeLessThan(1e-3 + 1e-4 * Math.abs(expected[i]!));
    }
  };

  test("of distances and angles", () => {
    fc.assert(
      fc.property(point, point, point, (a, b, c) => {
        if (!apart([a, b, c])) return;
        agree(distanceOf(a, b).gradients, slopes(distance, [a, b]));
        const found = angleOf(a, b, c);
        expect(found.value).toBeCloseTo(angle([a, b, c]), 8);
        if (!(found.value > 5 && found.value < 175)) return;
        agree(found.gradients!, slopes(angle, [a, b, c]));
      }),
    );
  });

  test("of torsions, which have none for three atoms in a line", () => {
    fc.assert(
      fc.property(point, point, point, point, (a, b, c, d) => {
        if (!apart([a, b, c, d])) return;
        const bent = [angle([a, b, c]), angle([b, c, d])].every((x) => x > 15 && x < 165);
        const value = torsion([a, b, c, d]);
        if (!(bent && Math.abs(value) < 179)) return;
        agree(torsionOf(a, b, c, d)!.gradients, slopes(torsion, [a, b, c, d]));
      }),
    );
    expect(torsionOf([0, 0, 0], [1, 0, 0], [2, 0, 0], [3, 1, 0])).toBeNull();
    expect(angleOf([1, 0, 0], [0, 0, 0], [-1, 0, 0])).toEqual({ value: 180, gradients: null });
  });
});

describe("tied parameters", () => {
  it("move together by the first uncertainty that is stated", () => {
    expect(scaledDirections([[1, 2, 0]], [null, 0.02, null]).directions).toEqual([[0.01, 0.02, 0]]);
    expect(scaledDirections([[1, 2, 0]], [0.03, 0.02, null]).directions).toEqual([[0.03, 0.06, 0]]);
    expect(
      scaledDirections(
        [
          [1, 2, 0],
          [0, 0, 1],
        ],
        [0.03, null, null],
      ),
    ).toEqual({
      directions: [[0.03, 0.06, 0]],
      unknown: [[0, 0, 1]],
    });
    expect(scaledDirections([[0, 0, 0]], [0.03, null, null])).toEqual({ directions: [], unknown: [] });
  });
});

describe("strains of the cell", () => {
  it.each([
    ["albite", 6],
    ["gypsum", 4],
    ["anhydrite", 3],
    ["rutile", 2],
    ["calcite", 2],
    ["zircon", 2],
    ["halite", 1],
  ])("keep the symmetry of %s, in any cell: %i are free", (name, free) => {
    fc.assert(
      fc.property(unimodular, fc.boolean(), (U, isPrimitive) => {
        const start = fixture(name);
        const P = isPrimitive ? multiplyRatMat(start.group.primitive, ratMat3(U)) : ratMat3(U);
        const { metric, group } = inSetting(start, { P, p: ratVec3([0, 0, 0]) })!;
        const strains = cellStrains(metric, group, [1, 1, 1, 1, 1, 1]);
        expect(strains).toHaveLength(free);
        for (const strain of strains) {
          const size = Math.hypot(...strain);
          expect(size).toBeGreaterThan(1e-4);
          for (const { W } of group.representatives) {
            const R = multiply3(metric.toCartesian, multiply3(W, metric.toFractional));
            const moved = conjugate3(R, strain);
            expect(difference3(moved, strain)).toBeLessThan(1e-7 * size);
          }
        }
      }),
      { numRuns: 15 },
    );
  });
});

/** A structure whose parameters are made by hand from independent ones, each with its uncertainty. */
interface Model {
  readonly name: string;
  readonly group: string;
  readonly parameters: readonly (readonly [value: number, su: number])[];
  readonly cell: (p: readonly number[]) => readonly number[];
  readonly sites: (p: readonly number[]) => readonly (readonly [label: string, element: string, position: Vec3])[];
  /** Of each site the parameters that place it, and the directions in which they move it. */
  readonly freedom: readonly (readonly (readonly [parameter: number, direction: Vec3])[])[];
  /** Independent parameter of each written number, null for one without uncertainty: cell, then sites. */
  readonly written: readonly (number | null)[];
}

const MODELS: readonly Model[] = [
  {
    name: "triclinic",
    group: "P -1",
    parameters: [
      [5.1, 0.004],
      [6.2, 0.005],
      [7.3, 0.003],
      [81, 0.06],
      [97, 0.05],
      [105, 0.07],
      [0.21, 0.0007],
      [0.13, 0.0006],
      [0.32, 0.0004],
      [0.45, 0.0008],
      [0.27, 0.0005],
      [0.18, 0.0006],
    ],
    cell: (p) => p.slice(0, 6),
    sites: (p) => [
      ["Ca1", "Ca", [p[6]!, p[7]!, p[8]!]],
      ["O1", "O", [p[9]!, p[10]!, p[11]!]],
    ],
    freedom: [6, 9].map((k) => [
      [k, [1, 0, 0]],
      [k + 1, [0, 1, 0]],
      [k + 2, [0, 0, 1]],
    ]),
    written: [0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11],
  },
  {
    name: "hexagonal, an atom at x, 2x, z",
    group: "P 63 m c",
    parameters: [
      [6.4, 0.01],
      [5.2, 0.012],
      [0.14, 0.001],
      [0.22, 0.002],
      [0.47, 0.0015],
    ],
    cell: (p) => [p[0]!, p[0]!, p[1]!, 90, 90, 120],
    sites: (p) => [
      ["Zn1", "Zn", [1 / 3, 2 / 3, p[3]!]],
      ["O1", "O", [p[2]!, 2 * p[2]!, p[4]!]],
    ],
    freedom: [
      [[3, [0, 0, 1]]],
      [
        [2, [1, 2, 0]],
        [4, [0, 0, 1]],
      ],
    ],
    written: [0, 0, 1, null, null, null, null, null, 3, 2, 2, 4],
  },
  {
    name: "rhombohedral axes",
    group: "R -3 c :R",
    parameters: [
      [6.3, 0.01],
      [52, 0.08],
      [0.2432, 0.0009],
    ],
    cell: (p) => [p[0]!, p[0]!, p[0]!, p[1]!, p[1]!, p[1]!],
    sites: (p) => [
      ["Ca1", "Ca", [0, 0, 0]],
      ["O1", "O", [p[2]! - 0.5, 1 - p[2]!, 0.25]],
    ],
    freedom: [[], [[2, [1, -1, 0]]]],
    written: [0, 0, 0, 1, 1, 1, null, null, null, 2, 2, null],
  },
  {
    name: "cubic, an atom at x, x, x",
    group: "P a -3",
    parameters: [
      [5.417, 0.004],
      [0.385, 0.0008],
    ],
    cell: (p) => [p[0]!, p[0]!, p[0]!, 90, 90, 90],
    sites: (p) => [
      ["Fe1", "Fe", [0, 0, 0]],
      ["S1", "S", [p[1]!, p[1]!, p[1]!]],
    ],
    freedom: [[], [[1, [1, 1, 1]]]],
    written: [0, 0, 0, null, null, null, null, null, null, 1, 1, 1],
  },
];

function cifOf(model: Model): string {
  const p = model.parameters.map(([value]) => value);
  let next = 0;
  const number = (value: number) => {
    const source = model.written[next++];
    const text = value.toFixed(12);
    return source === null || source === undefined
      ? text
      : `${text}(${Math.round(model.parameters[source]![1] * factor(model, value, source) * 1e12)})`;
  };
  const names = ["length_a", "length_b", "length_c", "angle_alpha", "angle_beta", "angle_gamma"];
  const cell = model.cell(p).map((v, i) => `_cell_${names[i]} ${number(v)}`);
  const sites = model.sites(p).map(([label, element, x]) => `${label} ${element} ${x.map(number).join(" ")}`);
  return [
    "data_model",
    ...cell,
    `_symmetry_space_group_name_H-M '${model.group}'`,
    "loop_",
    "_atom_site_label",
    "_atom_site_type_symbol",
    "_atom_site_fract_x",
    "_atom_site_fract_y",
    "_atom_site_fract_z",
    ...sites,
  ].join("\n");
}

/** Change of a written number by its independent parameter: 2 for the y of x, 2x, z. */
function factor(model: Model, value: number, source: number): number {
  return model.name.startsWith("hexagonal") && source === 2 && value > 0.2 ? 2 : 1;
}

/** Normally distributed numbers: G. E. P. Box, M. E. Muller, Ann. Math. Stat. 29 (1958) 610. */
function normal(random: () => number): number {
  return Math.sqrt(-2 * Math.log(random() + 1e-12)) * Math.cos(2 * Math.PI * random());
}

/** Image of a point by an operation as written, whole cells included. */
function image(operation: string, x: Vec3): Vec3 {
  return parseTriplet(operation, "xyz").map(({ coefficients, constant }) =>
    coefficients.reduce((s, c, i) => s + (c.n / c.d) * x[i]!, constant.n / constant.d),
  ) as unknown as Vec3;
}

const DRAWS = 2000;

/** Parameters of the cell drawn one by one; those of an atom from an error that is equal in all its free directions. */
function drawn(model: Model, metric: Metric, random: () => number): number[][] {
  const draws = Array.from({ length: DRAWS }, () => model.parameters.map(([value, su]) => value + su * normal(random)));
  for (const freedom of model.freedom) {
    if (freedom.length === 0) continue;
    const directions = new Matrix(freedom.map(([, d]) => apply3(metric.toCartesian, d))).transpose();
    const share = inverse(directions.transpose().mmul(directions)).mmul(directions.transpose());
    const errors = draws.map(() => share.mmul(Matrix.columnVector([0, 1, 2].map(() => normal(random)))).to1DArray());
    for (const [i, [k]] of freedom.entries()) {
      const scale = Math.sqrt(errors.reduce((s, e) => s + e[i]! ** 2, 0) / DRAWS);
      const [value, su] = model.parameters[k]!;
      for (const [j, p] of draws.entries()) p[k] = value + (su * errors[j]![i]!) / scale;
    }
  }
  return draws;
}

describe("propagated uncertainties", () => {
  it.each(MODELS.map((m) => [m.name, m] as const))("are the scatter of drawn parameters: %s", (_, model) => {
    const block = requireClean(readCif(cifOf(model))).blocks[0]!;
    const crystal = crystalFromBlock(block);
    const answer = neighboursAnswer(crystal, { block, choice: { kind: "nearest", count: 4 }, angles: true });
    const places = new Map(model.sites(model.parameters.map(([v]) => v)).map(([label], i) => [label, i]));
    const random = randomNumbers(7);
    const draws = drawn(model, crystal.metric, random);
    const settings = draws.map((p) => {
      const [a, b, c, alpha, beta, gamma] = model.cell(p) as [number, number, number, number, number, number];
      return { metric: metricOf({ a, b, c, alpha, beta, gamma }), sites: model.sites(p).map(([, , x]) => x) };
    });
    const scatter = (value: (s: (typeof settings)[number]) => number) => {
      const values = settings.map(value);
      const mean = values.reduce((s, v) => s + v, 0) / DRAWS;
      return Math.sqrt(values.reduce((s, v) => s + (v - mean) ** 2, 0) / DRAWS);
    };
    let compared = 0;
    for (const site of answer.sites) {
      const at = (label: string, operation: string) => (s: (typeof settings)[number]) =>
        apply3(s.metric.toCartesian, image(operation, s.sites[places.get(label)!]!));
      const centre = at(site.label, "x,y,z");
      const ends = site.neighbours.map((n) => at(n.label, n.operation));
      expect(ends.length).toBeGreaterThan(0);
      for (const [i, n] of site.neighbours.entries()) {
        const expected = scatter((s) => distance([centre(s), ends[i]!(s)]));
        expect(n.su! / expected).toBeCloseTo(1, 1);
        compared++;
      }
      for (const a of site.angles) {
        const expected = scatter((s) => angle([ends[a.ends[0]]!(s), centre(s), ends[a.ends[1]]!(s)]));
        if (a.su === 0) expect(expected).toBeLessThan(1e-6);
        else if (a.angle < 175) expect(a.su! / expected).toBeCloseTo(1, 1);
        compared++;
      }
    }
    expect(compared).toBeGreaterThan(8);
  });
});

import { EigenvalueDecomposition, Matrix } from "ml-matrix";
import { readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import { splitText } from "../../lib/report/index.ts";
import { type Crystal, crystalFromBlock } from "../../lib/structure/index.ts";
import { formatOperation } from "../../lib/symmetry/index.ts";
import { splitAnswer } from "../../lib/vibrations/index.ts";
import { crystalWith } from "../support/molecular-crystals.ts";
import { randomNumbers } from "../support/random-structures.ts";
import { type Measurement, ratio } from "./ratio.ts";

const ROUNDS = 3;
const REFERENCE = "one symmetric 600 x 600 eigenvalue problem of ml-matrix";

/** The crystal as a CIF, so that the whole way from text to text is measured. */
function cifOf({ metric, group, sites }: Crystal): string {
  const { a, b, c, alpha, beta, gamma } = metric.cell;
  const cell = Object.entries({ length_a: a, length_b: b, length_c: c, angle_alpha: alpha, angle_beta: beta });
  return [
    "data_bench",
    ...[...cell, ["angle_gamma", gamma] as const].map(([item, value]) => `_cell_${item} ${value.toFixed(5)}`),
    "loop_ _space_group_symop_operation_xyz",
    ...group.operations.map((g) => `'${formatOperation(g)}'`),
    "loop_ _atom_site_label _atom_site_type_symbol _atom_site_fract_x _atom_site_fract_y _atom_site_fract_z",
    ...sites.map((s) => `${s.label} ${s.element} ${s.position.map((x) => x.toFixed(5)).join(" ")}`),
    "",
  ].join("\n");
}

function split(text: string): number {
  const crystal = crystalFromBlock(requireClean(readCif(text)).blocks[0]!);
  return splitText(splitAnswer(crystal)).length;
}

function symmetricMatrix(size: number): Matrix {
  const random = randomNumbers(size);
  const matrix = Matrix.zeros(size, size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j <= i; j++) {
      const value = random() - 0.5;
      matrix.set(i, j, value);
      matrix.set(j, i, value);
    }
  }
  return matrix;
}

/** 200 atoms in the primitive cell: what a mode calculation would need of linear algebra, beside the symmetry alone. */
export function measure(): readonly Measurement[] {
  const matrix = symmetricMatrix(600);
  const reference = () => {
    const { realEigenvalues } = new EigenvalueDecomposition(matrix, { assumeSymmetric: true });
    return realEigenvalues[0]!;
  };
  const cases: readonly (readonly [number, string, readonly string[]])[] = [
    [
      2,
      "P -1, eight molecules of benzene, K",
      [...new Array<string>(8).fill("benzene"), ...new Array<string>(4).fill("K")],
    ],
    [14, "P 21/c, three of benzene and two of allene", ["benzene", "benzene", "benzene", "allene", "allene"]],
    [61, "P b c a, two of benzene, K", ["benzene", "benzene", "K"]],
  ];
  return cases.map(([type, name, kinds]) => {
    const crystal = crystalWith(type, kinds, type);
    const text = cifOf(crystal);
    const atoms = crystal.sites.reduce((n, s) => n + s.images.length, 0);
    const row = ratio(`${name}: CIF to text of split`, REFERENCE, { ours: () => split(text), reference }, ROUNDS);
    return { ...row, detail: `${atoms} atoms, ${row.detail}` };
  });
}

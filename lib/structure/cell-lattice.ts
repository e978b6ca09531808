import {
  apply,
  hermiteRows,
  type IntMat3,
  type IntVec3,
  inverseRatMat,
  multiplyRatMat,
  type RatMat3,
  ratDeterminant,
  transpose,
} from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import type { SpaceGroup } from "../symmetry/index.ts";

/** Translations n / d in the cell in use. */
export interface CellTranslations {
  readonly n: readonly IntVec3[];
  readonly d: number;
}

/** More lattice points than this in one cell are refused: the atoms would not fit in memory. */
const MOST_TRANSLATIONS = 4_000_000;

/**
 * The new axes in terms of a primitive basis of the crystal, an integer matrix.
 * @param P columns: the new axes in the cell in use
 * @throws InputProblem `cell-singular`, `cell-left-handed`, `cell-no-lattice` if an axis is no translation of the crystal
 */
export function axesInPrimitive(group: SpaceGroup, P: RatMat3): IntMat3 {
  const { n: sign } = ratDeterminant(P);
  if (sign === 0) {
    const hint = "give three independent axes";
    throw new InputProblem("cell-singular", "the axes of the new cell lie in one plane", null, hint);
  }
  if (sign < 0) {
    throw new InputProblem(
      "cell-left-handed",
      "the axes of the new cell are left-handed, which would turn the structure into its mirror image",
      null,
      "exchange two axes, or reverse all three",
    );
  }
  const M = multiplyRatMat(inverseRatMat(group.primitive), P);
  if (M.d === 1) return M.n;
  const axis = [0, 1, 2].find((j) => [0, 3, 6].some((i) => M.n[i + j]! % M.d !== 0))!;
  throw new InputProblem(
    "cell-no-lattice",
    `axis ${"abc"[axis]} of the new cell is no translation of the crystal, so the atoms do not repeat along it`,
    null,
    "give axes that join lattice points",
  );
}

/**
 * Representatives of the translations of the crystal modulo those of a new cell: its lattice points, 0 first.
 * @throws InputProblem as `axesInPrimitive`, and `cell-too-large`
 */
export function translationsIn(group: SpaceGroup, P: RatMat3): CellTranslations {
  return translationsBetween(group.primitive, axesInPrimitive(group, P));
}

/** Representatives of the lattice of `basis` modulo its sublattice `basis` M. @throws InputProblem `cell-too-large` */
export function translationsBetween({ n, d }: RatMat3, M: IntMat3): CellTranslations {
  const [a, b, c] = hermiteRows(rowsOf(transpose(M))).map((row, i) => row[i]!) as [number, number, number];
  if (a * b * c > MOST_TRANSLATIONS) {
    throw new InputProblem(
      "cell-too-large",
      `the new cell holds ${a * b * c} lattice points, more than ${MOST_TRANSLATIONS}`,
      null,
      "choose a smaller cell",
    );
  }
  const list: IntVec3[] = [];
  for (let i = 0; i < a; i++) {
    for (let j = 0; j < b; j++) for (let k = 0; k < c; k++) list.push(apply(n, [i, j, k]));
  }
  return { n: list, d };
}

function rowsOf(m: IntMat3): number[][] {
  return [0, 3, 6].map((i) => m.slice(i, i + 3));
}

import { type IntVec3, type RatMat3, ratDeterminant, rational, ratMat3, ZERO } from "../algebra/index.ts";
import { type CifBlock, findNumb } from "../cif/index.ts";
import { InputProblem } from "../problem.ts";
import { formatExpression } from "../symmetry/index.ts";
import type { Reflection } from "./reflection-list.ts";

/** A matrix M that carries listed indices, as a column, to those of the structure's cell: h' = M h. */
export interface IndexMatrix {
  readonly M: RatMat3;
  /** Where it was found, in words. */
  readonly source: string;
  /** True for the items of the dictionary that speak of the diffraction list only. */
  readonly diffractionListOnly: boolean;
}

/** Largest denominator of a written element: halves, thirds, quarters, sixths. */
const DENOMINATORS = [1, 2, 3, 4, 6];

/** Largest rounding of a written element: .333 for 1/3. Dimensionless. */
const ROUNDING = 2e-3;

/**
 * Reads nine numbers, row by row, divided by blanks, commas or semicolons; fractions may be written `1/2`.
 * @throws InputProblem `index-matrix`
 */
export function parseIndexMatrix(text: string): RatMat3 {
  const words = text.trim().split(/[\s,;]+/);
  const M = matrixOf(words);
  if (M) return M;
  throw new InputProblem(
    "index-matrix",
    `"${text}" is no matrix of indices: nine numbers are needed, row by row, with a determinant that is not 0`,
    null,
    'write for example "0 0 1  0 1 0  -1 0 -1": new h = l, new k = k, new l = -h-l',
  );
}

function matrixOf(words: readonly string[]): RatMat3 | null {
  if (words.length !== 9) return null;
  const numbers = words.map(numberOf);
  if (numbers.some((x) => x === null || Math.abs(x) > 12)) return null;
  const d = [...DENOMINATORS, 12].find((n) => numbers.every((x) => Math.abs(x! - Math.round(x! * n) / n) <= ROUNDING));
  if (d === undefined) return null;
  const M = ratMat3(numbers.map((x) => Math.round(x! * d) + 0) as unknown as RatMat3["n"], d);
  return ratDeterminant(M).n === 0 ? null : M;
}

function numberOf(word: string): number | null {
  const [, numerator, denominator = "1"] = /^([+-]?(?:\d+\.?\d*|\.\d+))(?:\/(\d+))?$/.exec(word) ?? [];
  const x = numerator === undefined ? Number.NaN : Number(numerator) / Number(denominator);
  return Number.isFinite(x) ? x : null;
}

/**
 * Matrices that texts of a block give for reading a list of reflections: a line of a word, a whole number that tells the
 * kind of list, a scale and nine elements. Identities are left out.
 */
export function matricesInText(text: string, name: string): IndexMatrix[] {
  const found: IndexMatrix[] = [];
  for (const line of text.split(/\r\n?|\n/)) {
    const [word = "", kind = "", scale = "", ...elements] = line.trim().split(/\s+/);
    if (!/^[A-Za-z]{4}$/.test(word) || !/^-?[1-9]$/.test(kind) || !(Number(scale) > 0)) continue;
    const M = matrixOf(elements.slice(0, 9));
    if (M && !isIdentity(M))
      found.push({ M, source: `the line "${line.trim()}" in the text of ${name}`, diffractionListOnly: false });
  }
  return found;
}

/**
 * The matrix of `_diffrn_reflns_transf_matrix_11` and so on, which carries indices of the diffraction list, as rows, to
 * those of the refined structure; null where it is absent or the identity.
 */
export function matrixOfItems(block: CifBlock): IndexMatrix | null {
  const rows = [1, 2, 3].map((i) => [1, 2, 3].map((j) => findNumb(block, `_diffrn_reflns_transf_matrix.${j}${i}`)));
  const words = rows.flat().map((n) => n?.text ?? "");
  const M = matrixOf(words); // transposed: rows of indices times T are T^t times columns
  return M && !isIdentity(M)
    ? { M, source: "the items _diffrn_reflns_transf_matrix_", diffractionListOnly: true }
    : null;
}

/** New indices in terms of the listed ones: `l,k,-h-l`. */
export function formatIndexMatrix({ n, d }: RatMat3): string {
  const rows = [0, 3, 6].map((i) => ({
    coefficients: [rational(n[i]!, d), rational(n[i + 1]!, d), rational(n[i + 2]!, d)] as const,
    constant: ZERO,
  }));
  return rows.map((row) => formatExpression(row, "hkl")).join(",");
}

function isIdentity(M: RatMat3): boolean {
  return formatIndexMatrix(M) === "h,k,l";
}

/** Reflections with their indices changed; those whose new indices are no integers are counted, not kept. */
export function changeIndices(
  reflections: readonly Reflection[],
  { n, d }: RatMat3,
): { readonly reflections: Reflection[]; readonly fractional: number } {
  const kept: Reflection[] = [];
  for (const r of reflections) {
    const [h, k, l] = r.h;
    const image = [0, 3, 6].map((i) => (n[i]! * h + n[i + 1]! * k + n[i + 2]! * l) / d + 0);
    if (image.every(Number.isInteger)) kept.push({ ...r, h: image as unknown as IntVec3 });
  }
  return { reflections: kept, fractional: reflections.length - kept.length };
}

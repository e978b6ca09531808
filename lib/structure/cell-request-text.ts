import { type IntMat3, multiplyRatMat, ratMat3, ZERO_VECTOR } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import { formatTransformation, parseTransformation, type Transformation } from "../symmetry/index.ts";
import { multiplesOf } from "./change-of-cell.ts";
import type { Crystal } from "./crystal.ts";
import { axesOf } from "./lattice-axes.ts";
import { niggliReduction } from "./niggli-reduction.ts";

/** A cell asked for: by name, or by its axes and origin in terms of the cell given. */
export type CellRequest =
  | { readonly kind: "primitive" | "reference" }
  | { readonly kind: "axes"; readonly transformation: Transformation };

/**
 * Reads a cell: `primitive`, `reference`, multiples of the axes `2,2,1`, a matrix of nine integers row by row whose
 * columns are the new axes, or axes and origin `a-b,a+b,c;0,0,1/4`.
 * @throws InputProblem `cell-unreadable`, and what `parseTransformation` throws
 * @example
 * ```ts
 * parseCellRequest("primitive").kind; // "primitive"
 * formatCellRequest(parseCellRequest("2,2,1")); // "2a,2b,c;0,0,0"
 * formatCellRequest(parseCellRequest("a-b,a+b,c;0,0,1/4")); // "a-b,a+b,c;0,0,1/4"
 * ```
 */
export function parseCellRequest(text: string): CellRequest {
  const plain = text.trim();
  if (plain === "primitive" || plain === "reference") return { kind: plain };
  if (!/^[-+\d\s,;]+$/.test(plain)) return { kind: "axes", transformation: parseTransformation(plain) };
  const numbers = plain
    .split(/[\s,;]+/)
    .filter((w) => w !== "")
    .map(Number);
  if (numbers.some((e) => !Number.isSafeInteger(e))) throw unreadable(text);
  const [a, b, c] = numbers;
  if (numbers.length === 3 && numbers.every((e) => e > 0)) {
    return { kind: "axes", transformation: multiplesOf(a!, b!, c!) };
  }
  if (numbers.length !== 9) throw unreadable(text);
  const P = ratMat3(numbers as unknown as IntMat3);
  return { kind: "axes", transformation: { P, p: ZERO_VECTOR } };
}

/** Inverse of `parseCellRequest`. */
export function formatCellRequest(request: CellRequest): string {
  return request.kind === "axes" ? formatTransformation(request.transformation) : request.kind;
}

function unreadable(text: string): InputProblem {
  return new InputProblem(
    "cell-unreadable",
    `"${text}" names no cell`,
    { start: 0, end: text.length },
    "write primitive, reference, three multiples such as 2,2,1, nine integers, or axes such as a-b,a+b,c;0,0,1/4",
  );
}

/**
 * The change of cell that a request means for a crystal; the primitive cell is the Niggli cell.
 * @example
 * ```ts
 * const halite = composedCrystal(parseSiteTable("group 225\ncell a=5.64\nNa 4a\nCl 4b"));
 * const { P, p } = requestedCell(halite, { kind: "primitive" });
 * ratDeterminant(P); // { n: 1, d: 4 }
 * formatVector(p); // "0,0,0"
 * ```
 */
export function requestedCell(crystal: Crystal, request: CellRequest): Transformation {
  if (request.kind === "axes") return request.transformation;
  if (request.kind === "reference") return crystal.identified.toReference;
  const { primitive } = crystal.group;
  const P = multiplyRatMat(primitive, ratMat3(niggliReduction(axesOf(crystal.metric, primitive))));
  return { P, p: ZERO_VECTOR };
}

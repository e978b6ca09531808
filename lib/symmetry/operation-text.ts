import { component, determinant, type IntMat3, modOne, type RatVec3, vectorOf } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import { type AffineExpression, formatExpression, keepExact, parseTriplet } from "./affine-text.ts";
import type { Operation } from "./operation.ts";
import { plainOperation, plainTriplet } from "./plain-operation.ts";

/**
 * Reads a symmetry operation in Jones-faithful notation, however written: `-X, 1/2+Y, z-0.5`, `x-y`, `.3333+z`.
 * A written fraction is taken exactly; a decimal becomes the crystallographic fraction it rounds. The translation is
 * reduced to [0, 1).
 * @throws InputProblem `triplet-unreadable`, `number-too-long`, or `operation-impossible` where the rotation part is not an integer
 * matrix of determinant 1 or -1
 */
export function parseOperation(text: string): Operation {
  const plain = plainOperation(text);
  if (plain && Math.abs(determinant(plain.W)) === 1) return plain;
  const rows = parseTriplet(text, "xyz");
  const entries = rows.flatMap((row) => row.coefficients);
  const W = entries.map((e) => e.n) as unknown as IntMat3;
  if (entries.some((e) => e.d !== 1)) throw impossible(text, "its rotation part is not integer in this cell");
  const det = determinant(W);
  if (Math.abs(det) !== 1) throw impossible(text, `its rotation part has determinant ${det}, not 1 or -1`);
  const constants = rows.map((row) => row.constant);
  return { W, w: keepExact(text, () => modOne(vectorOf(constants[0]!, constants[1]!, constants[2]!))) };
}

/** The translation of an operation as its text has it, not reduced. @throws InputProblem `triplet-unreadable` */
export function writtenTranslation(text: string): RatVec3 {
  const plain = plainTriplet(text);
  if (plain) return plain.w;
  const [x, y, z] = parseTriplet(text, "xyz");
  return vectorOf(x.constant, y.constant, z.constant);
}

function impossible(text: string, why: string): InputProblem {
  return new InputProblem(
    "operation-impossible",
    `"${text}" is not a symmetry operation: ${why}`,
    { start: 0, end: text.length },
    "check its signs and letters against the others in the list",
  );
}

/** The operation as text, letters before the constant: `-x,y+1/2,-z`. */
export function formatOperation(a: Operation): string {
  return [0, 1, 2].map((i) => formatExpression(rowOf(a, i), "xyz")).join(",");
}

function rowOf(a: Operation, i: number): AffineExpression {
  const entry = (j: number) => ({ n: a.W[3 * i + j]!, d: 1 });
  return { coefficients: [entry(0), entry(1), entry(2)], constant: component(a.w, i) };
}

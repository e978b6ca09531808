import {
  component,
  formatRational,
  type IntMat3,
  lcm,
  type Rational,
  type RatMat3,
  type RatVec3,
  ratDeterminant,
  rational,
  ratMat3,
  vectorOf,
} from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import { type AffineExpression, formatExpression, keepExact, parseTriplet } from "./affine-text.ts";
import type { Transformation } from "./transformation.ts";

/**
 * Reads a change of setting as the IUCr core dictionary writes it (`_space_group.transform_Pp_abc`): new axes as sums
 * of the old ones, then the origin shift, `a-b,a+b,c;1/4,0,0`. A constant inside an axis (`a,b+1/2,c`) is that
 * component of the shift; then the part after the semicolon is left out or 0.
 * @throws InputProblem `triplet-unreadable`, `number-too-long`, `transformation-singular`, `shift-unreadable`
 */
export function parseTransformation(text: string): Transformation {
  const end = text.indexOf(";") < 0 ? text.length : text.indexOf(";");
  const columns = parseTriplet(text.slice(0, end), "abc");
  const after = end < text.length ? parseShift(text, end + 1) : null;
  const inside = columns.map((c) => c.constant);
  if (after && isShift(after) && isShift(inside)) {
    throw badShift(text, end + 1, "it moves the origin both inside the axes and after the semicolon");
  }
  const [x, y, z] = after && isShift(after) ? after : inside;
  return keepExact(text, () => {
    const P = fromColumns(columns);
    if (ratDeterminant(P).n === 0) throw singular(text, end);
    return { P, p: vectorOf(x!, y!, z!) };
  });
}

/** The three constants after the semicolon, which begins at `from`. */
function parseShift(text: string, from: number): Rational[] {
  const tail = text.slice(from);
  let parts: readonly AffineExpression[];
  try {
    parts = parseTriplet(tail, "xyz");
  } catch (error) {
    if (!(error instanceof InputProblem) || !error.span) throw error;
    const span = { start: error.span.start + from, end: error.span.end + from };
    throw new InputProblem("shift-unreadable", error.message, span, SHIFT_HINT);
  }
  if (parts.some((e) => e.coefficients.some((c) => c.n !== 0))) throw badShift(text, from, "its shift holds letters");
  return parts.map((e) => e.constant);
}

const SHIFT_HINT = "write the shift as three numbers, as in a,b,c;1/4,0,1/2";

function isShift(parts: readonly Rational[]): boolean {
  return parts.some((r) => r.n !== 0);
}

function badShift(text: string, start: number, why: string): InputProblem {
  const message = `"${text}" is no change of setting: ${why}`;
  return new InputProblem("shift-unreadable", message, { start, end: text.length }, SHIFT_HINT);
}

function singular(text: string, end: number): InputProblem {
  return new InputProblem(
    "transformation-singular",
    `"${text}" is no change of basis: its axes lie in one plane`,
    { start: 0, end },
    "give three independent axes such as a-b,a+b,c",
  );
}

function fromColumns(columns: readonly AffineExpression[]): RatMat3 {
  const d = columns.flatMap((c) => c.coefficients).reduce((m, r) => lcm(m, r.d), 1);
  const at = (i: number, j: number) => {
    const r = columns[j]!.coefficients[i]!;
    return r.n * (d / r.d);
  };
  return ratMat3([0, 1, 2].flatMap((i) => [0, 1, 2].map((j) => at(i, j))) as unknown as IntMat3, d);
}

/** The axes of a change of setting: `a-b,a+b,c`. */
export function formatBasis(P: RatMat3): string {
  const column = (j: number): AffineExpression => ({
    coefficients: [rational(P.n[j]!, P.d), rational(P.n[3 + j]!, P.d), rational(P.n[6 + j]!, P.d)],
    constant: rational(0),
  });
  return [0, 1, 2].map((j) => formatExpression(column(j), "abc")).join(",");
}

/** A vector or origin shift: `1/4,0,-1/2`. */
export function formatVector(v: RatVec3): string {
  return [0, 1, 2].map((i) => formatRational(component(v, i))).join(",");
}

/** Inverse of parseTransformation: `a-b,a+b,c;1/4,0,0`. */
export function formatTransformation(t: Transformation): string {
  return `${formatBasis(t.P)};${formatVector(t.p)}`;
}

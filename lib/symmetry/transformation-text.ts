import {
  component,
  formatRational,
  type IntMat3,
  lcm,
  type RatMat3,
  type RatVec3,
  ratDeterminant,
  rational,
  ratMat3,
  vectorOf,
} from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import { type AffineExpression, formatExpression, parseTriplet } from "./affine-text.ts";
import type { Transformation } from "./transformation.ts";

/**
 * Reads a change of setting as the IUCr core dictionary writes it (`_space_group.transform_Pp_abc`): new axes as sums
 * of the old ones, then the origin shift, `a-b,a+b,c;1/4,0,0`. A constant inside an axis (`a,b+1/2,c`) is that
 * component of the shift; the part after the semicolon may be left out.
 * @throws InputProblem `triplet-unreadable`, or `transformation-singular`
 */
export function parseTransformation(text: string): Transformation {
  const [axes = "", shift = "0,0,0"] = text.split(";");
  const columns = parseTriplet(axes, "abc");
  const P = fromColumns(columns);
  if (ratDeterminant(P).n === 0) {
    throw new InputProblem(
      "transformation-singular",
      `"${text}" is no change of basis: its axes lie in one plane`,
      { start: 0, end: axes.length },
      "give three independent axes such as a-b,a+b,c",
    );
  }
  const inside = columns.map((c) => c.constant);
  const after = parseTriplet(shift, "xyz").map((e) => e.constant);
  const p = inside.some((r) => r.n !== 0) ? inside : after;
  return { P, p: vectorOf(p[0]!, p[1]!, p[2]!) };
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

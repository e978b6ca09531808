import { type RatMat3, ratDeterminant, rational, ratMat3, ratVec3, vectorOf } from "../algebra/index.ts";
import { InputProblem, type Span } from "../problem.ts";
import { type AffineExpression, formatExpression, parseTriplet } from "./affine-text.ts";
import { type HallLattice, readHallSymbol, type WrittenRotation } from "./hall-symbol-grammar.ts";
import { reverse, type Transformation } from "./transformation.ts";

/** Axis of a Hall rotation: a cell axis, a face diagonal (' difference, " sum) or the body diagonal (*). */
export type HallAxis = "x" | "y" | "z" | "'" | '"' | "*";

/** One rotation part of a Hall symbol, with its default axis filled in. */
export interface HallRotation {
  /** True for a rotoinversion, written with a minus sign. */
  readonly improper: boolean;
  readonly order: 1 | 2 | 3 | 4 | 6;
  /** Null for order 1, which has no axis. */
  readonly axis: HallAxis | null;
  /** The cell axis that a face diagonal is normal to; "z" for the others. */
  readonly principal: "x" | "y" | "z";
  /** Screw subscript, 0 for none: translation screw/order along the axis. */
  readonly screw: number;
  /** Translation letters as written, a b c n u v w d. */
  readonly translations: string;
  readonly span: Span;
}

export type { HallLattice };

/** A Hall symbol taken apart. */
export interface HallSymbol {
  /** True where the lattice symbol carries a minus sign: an inversion centre at the origin. */
  readonly centrosymmetric: boolean;
  readonly lattice: HallLattice;
  readonly rotations: readonly HallRotation[];
  /** The part in brackets as a change of setting from the symbol without it, or null. */
  readonly change: Transformation | null;
  readonly spans: { readonly lattice: Span; readonly change: Span | null };
}

/**
 * Reads a Hall symbol; case, underscores for blanks and a missing blank after the lattice letter are accepted, and the
 * default axes are filled in.
 * @throws InputProblem `hall-unreadable` with the span of the character at fault
 * Source: S. R. Hall, Acta Cryst. A37 (1981) 517; International Tables for Crystallography B, section 1.4, appendix.
 */
export function parseHallSymbol(text: string): HallSymbol {
  const reading = readHallSymbol(text);
  if (!reading.ok) throw misfit(text, reading.at, reading.expected);
  const { lattice, rotations, change } = reading.symbol;
  return {
    centrosymmetric: lattice.value.centrosymmetric,
    lattice: lattice.value.letter,
    rotations: withDefaults(
      text,
      rotations.map((r) => ({ ...r.value, span: r.span })),
    ),
    change: change ? parseChange(text, change.value, change.span) : null,
    spans: { lattice: lattice.span, change: change ? change.span : null },
  };
}

function misfit(text: string, at: number, expected: readonly string[]): InputProblem {
  const wanted = expected.filter((e) => /^an? /.test(e)).join(", or ") || "a Hall symbol";
  const found = at >= text.length ? "its end" : `"${text[at]}"`;
  return fault(
    `"${text}" is not a Hall symbol: ${found} at character ${at + 1} where ${wanted} should be`,
    { start: at, end: Math.min(at + 1, text.length) },
    'separate the rotations by blanks, as in "-P 2ac 2n"',
  );
}

function fault(message: string, span: Span, hint: string): InputProblem {
  return new InputProblem("hall-unreadable", message, span, hint);
}

/**
 * Axes left out: the first rotation is along c; a second of order 2 along a after 2 or 4, along a-b after 3 or 6; a
 * third of order 3 along a+b+c. Diagonals ' and " refer to the last cell axis before them.
 */
function withDefaults(text: string, written: readonly (WrittenRotation & { span: Span })[]): HallRotation[] {
  let principal: "x" | "y" | "z" = "z";
  return written.map((r, i) => {
    const axisOf = r.order === 1 ? null : ((r.axis || defaultAxis(text, written, i)) as HallAxis);
    if (axisOf === "x" || axisOf === "y" || axisOf === "z") principal = axisOf;
    checkAxis(text, r, axisOf);
    const { screw, translations } = splitTail(text, r);
    const order = r.order as HallRotation["order"];
    const diagonal = axisOf === "'" || axisOf === '"';
    return {
      improper: r.improper,
      order,
      axis: axisOf,
      principal: diagonal ? principal : "z",
      screw,
      translations,
      span: r.span,
    };
  });
}

function defaultAxis(text: string, written: readonly (WrittenRotation & { span: Span })[], i: number): HallAxis {
  const { order, span } = written[i]!;
  const before = i > 0 ? written[i - 1]!.order : 0;
  if (i === 0) return "z";
  if (i === 1 && order === 2 && (before === 2 || before === 4)) return "x";
  if (i === 1 && order === 2 && (before === 3 || before === 6)) return "'";
  if (i === 2 && order === 3) return "*";
  throw fault(
    `"${text}": rotation ${i + 1}, "${text.slice(span.start, span.end)}", has no default axis in this place`,
    span,
    "write its axis: x, y, z, ' (difference), \" (sum) or * (body diagonal)",
  );
}

function checkAxis(text: string, r: WrittenRotation & { span: Span }, a: HallAxis | null): void {
  const bad =
    (r.order === 1 && r.axis !== "") || ((a === "'" || a === '"') && r.order !== 2) || (a === "*" && r.order !== 3);
  if (!bad) return;
  throw fault(
    `"${text}": a rotation of order ${r.order} cannot have the axis ${r.axis}`,
    r.span,
    "' and \" belong to order 2, * to order 3; order 1 has no axis",
  );
}

function splitTail(text: string, r: WrittenRotation & { span: Span }): { screw: number; translations: string } {
  const digits = r.tail.replace(/[^1-5]/g, "");
  const screw = digits === "" ? 0 : Number(digits);
  if (screw === 0 || (digits.length === 1 && screw < r.order)) {
    return { screw, translations: r.tail.replace(/[1-5]/g, "") };
  }
  throw fault(
    `"${text}": the screw subscript ${digits} must be smaller than the order ${r.order} of its axis`,
    r.span,
    "separate two rotations by a blank, or correct the subscript",
  );
}

/** `(0 0 1)`: x' = x + v with v in twelfths; `(x-y,x+y,z)`: x' = V x; both as a change of setting x = P x' + p. */
function parseChange(text: string, inner: string, span: Span): Transformation {
  const body = inner.slice(1, -1);
  if (!body.includes(",")) {
    const numbers = body.trim().split(/[\s_]+/);
    if (numbers.length !== 3 || !numbers.every((n) => /^[-+\u2212]?\d{1,3}$/.test(n))) {
      throw fault(`"${text}": "${inner}" is no origin shift`, span, 'give three whole numbers of twelfths: "(0 0 1)"');
    }
    const v = numbers.map((n) => -Number(n.replace("\u2212", "-")) + 0) as unknown as [number, number, number];
    return { P: ratMat3([1, 0, 0, 0, 1, 0, 0, 0, 1]), p: ratVec3(v, 12) };
  }
  try {
    return reverse(parseChangeOfCoordinates(body));
  } catch (e) {
    if (!(e instanceof InputProblem)) throw e;
    throw fault(
      `"${text}": "${inner}" is no change of basis: ${e.message}`,
      span,
      'give the new coordinates in terms of the old ones: "(x-y,x+y,z)"',
    );
  }
}

/**
 * Reads new coordinates in terms of old ones, `x-y,x+y,z+1/4`, as x' = P x + p.
 * @throws InputProblem `triplet-unreadable`, or `transformation-singular`
 */
export function parseChangeOfCoordinates(text: string): Transformation {
  const rows = parseTriplet(text, "xyz");
  const change = asTransformation(rows);
  if (ratDeterminant(change.P).n !== 0) return change;
  throw new InputProblem(
    "transformation-singular",
    `"${text}" is no change of coordinates: it is singular`,
    { start: 0, end: text.length },
    "give three independent coordinates such as x-y,x+y,z",
  );
}

function asTransformation(rows: readonly [AffineExpression, AffineExpression, AffineExpression]): Transformation {
  const entries = rows.flatMap((row) => row.coefficients);
  const d = entries.reduce((m, e) => m * e.d, 1);
  const matrix = ratMat3(entries.map((e) => e.n * (d / e.d)) as unknown as RatMat3["n"], d);
  return { P: matrix, p: vectorOf(rows[0].constant, rows[1].constant, rows[2].constant) };
}

/** The bracket of a Hall symbol for a change of setting: empty, `(0 0 1)` or `(x-y,x+y,z)`. */
export function formatHallChange(change: Transformation): string {
  const V = reverse(change);
  const twelfths = V.p.n.map((n) => (n * 12) / V.p.d);
  const unit = V.P.d === 1 && V.P.n.join() === "1,0,0,0,1,0,0,0,1";
  if (unit && V.p.n.every((n) => n === 0)) return "";
  if (unit && twelfths.every((t) => Number.isInteger(t) && Math.abs(t) < 12)) return `(${twelfths.join(" ")})`;
  const row = (i: number): AffineExpression => ({
    coefficients: [0, 1, 2].map((j) =>
      rational(V.P.n[3 * i + j]!, V.P.d),
    ) as unknown as AffineExpression["coefficients"],
    constant: rational(V.p.n[i]!, V.p.d),
  });
  return `(${[0, 1, 2].map((i) => formatExpression(row(i), "xyz")).join(",")})`;
}

/** The symbol as text, default axes left out: `-P 2ac 2n`. Inverse of parseHallSymbol up to spelling. */
export function formatHallSymbol(symbol: HallSymbol): string {
  const parts = symbol.rotations.map((r, i) => {
    const before = i > 0 ? symbol.rotations[i - 1]!.order : 0;
    const axisText = r.axis === null || r.axis === impliedAxis(i, r.order, before) ? "" : r.axis;
    return `${r.improper ? "-" : ""}${r.order}${axisText}${r.screw || ""}${r.translations}`;
  });
  const change = symbol.change ? formatHallChange(symbol.change) : "";
  return `${symbol.centrosymmetric ? "-" : ""}${symbol.lattice} ${parts.join(" ")}${change ? ` ${change}` : ""}`;
}

function impliedAxis(i: number, order: number, before: number): HallAxis | null {
  if (i === 0) return "z";
  if (i === 1 && order === 2) return before === 2 || before === 4 ? "x" : before === 3 || before === 6 ? "'" : null;
  return i === 2 && order === 3 ? "*" : null;
}

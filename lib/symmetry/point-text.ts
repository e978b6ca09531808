import P from "parsimmon";
import { formatRational, type Rational, type RatVec3, rational, vectorOf } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import { keepExact } from "./affine-text.ts";

/** A coordinate as it was written: a fraction, or a decimal taken at its word (0.333 is 333/1000). */
export interface WrittenCoordinate {
  readonly value: Rational;
  /** Digits behind the point of a decimal; null for fractions and whole numbers. */
  readonly decimals: number | null;
}

/** A point of the cell, exact; fractional coordinates. */
export type WrittenPoint = readonly [WrittenCoordinate, WrittenCoordinate, WrittenCoordinate];

/** Longer decimals cannot be kept exact. */
const MOST_DECIMALS = 9;

let built: P.Parser<WrittenPoint> | null = null;

function grammar(): P.Parser<WrittenPoint> {
  if (built) return built;
  const blank = P.regexp(/\s*/);
  const sign = P.regexp(/[+\-\u2212]?\s*/).map((s) => (/^[-\u2212]/.test(s) ? -1 : 1));
  const whole = P.regexp(/\d+/).map(Number);
  const fraction = P.seqMap(whole, P.regexp(/\s*\/\s*/), P.regexp(/0*[1-9]\d*/).map(Number), (n, _, d) => ({
    value: rational(n, d),
    decimals: null,
  }));
  const decimal = P.regexp(new RegExp(`\\d+(?:\\.\\d{0,${MOST_DECIMALS}})?|\\.\\d{1,${MOST_DECIMALS}}`)).map((text) => {
    const digits = text.includes(".") ? text.length - text.indexOf(".") - 1 : 0;
    const value = rational(Math.round(Number(text) * 10 ** digits), 10 ** digits);
    return { value, decimals: digits > 0 ? digits : null };
  });
  const number = P.alt(fraction, decimal).desc(`a fraction, or a decimal of at most ${MOST_DECIMALS} digits`);
  const coordinate = P.seqMap(sign, number, (s, { value, decimals }) => ({
    value: { n: s * value.n + 0, d: value.d },
    decimals,
  }));
  const separator = P.regexp(/\s*,\s*|\s+/).desc("a comma");
  built = blank
    .then(P.seqMap(coordinate, separator, coordinate, separator, coordinate, (x, _, y, __, z) => [x, y, z] as const))
    .skip(blank)
    .skip(P.eof);
  return built;
}

/**
 * Reads a point, `0.1,1/4,0.3`: three fractions or decimals with commas or blanks between them. Exact.
 * @throws InputProblem `point-unreadable` with the span of the first character that does not fit, or `number-too-long`
 */
export function parsePoint(text: string): WrittenPoint {
  const result = keepExact(text, () => grammar().parse(text));
  if (result.status) return result.value;
  const start = result.index.offset;
  const why = start >= text.length ? "it ends too early" : `character ${start + 1}, "${text[start]}", does not fit`;
  throw new InputProblem(
    "point-unreadable",
    `"${text}" is no point: ${why}; expected ${result.expected.filter((e) => e.includes(" ")).join(" or ")}`,
    { start, end: Math.min(start + 1, text.length) },
    "write three fractions or decimals, such as 0.1,1/4,0.3",
  );
}

/** Inverse of `parsePoint`. */
export function formatPoint(point: WrittenPoint): string {
  return point.map(({ value, decimals }) => writtenAs(value, decimals)).join(",");
}

function writtenAs(value: Rational, decimals: number | null): string {
  return decimals === null ? formatRational(value) : (value.n / value.d).toFixed(decimals);
}

/** The point as an exact vector. @throws InputProblem `number-too-long` */
export function pointVector(point: WrittenPoint): RatVec3 {
  return keepExact(formatPoint(point), () => vectorOf(point[0].value, point[1].value, point[2].value));
}

/** What two or more digits may be rounded from: thirds, sixths, eighths, twelfths and twenty-fourths. */
const ROUNDED = [3, 6, 8, 12, 24] as const;

/** The point with every decimal that is a rounded or cut off fraction replaced by it; null where there is none. */
export function unroundedPoint(point: WrittenPoint): WrittenPoint | null {
  const mended = point.map(unrounded);
  if (mended.every((c, i) => c === point[i])) return null;
  return mended as unknown as WrittenPoint;
}

function unrounded(c: WrittenCoordinate): WrittenCoordinate {
  const { value, decimals } = c;
  if (decimals === null || decimals < 2) return c;
  const x = value.n / value.d;
  for (const d of ROUNDED) {
    const n = Math.round(x * d);
    const fraction = rational(n, d);
    if (fraction.d < 3 || fraction.d === 4) continue; // halves and quarters are exact in two digits
    const off = Math.abs(x - n / d);
    if (off > 1e-12 && off < 10 ** -decimals) return { value: fraction, decimals: null };
  }
  return c;
}

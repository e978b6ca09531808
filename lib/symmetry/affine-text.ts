import P from "parsimmon";
import { addRational, type Rational, rational, ZERO } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import { fractionFromDecimal } from "./fraction-text.ts";

/** One component of a triplet such as `1/2+x-y`: the coefficient of each of three letters, and the constant. */
export interface AffineExpression {
  readonly coefficients: readonly [Rational, Rational, Rational];
  readonly constant: Rational;
}

interface Term {
  readonly letter: number; // 0, 1, 2 for the three letters, -1 for a constant
  readonly value: Rational;
}

type Letters = "xyz" | "abc" | "hkl" | "uvw";
const parsers = new Map<Letters, P.Parser<AffineExpression[]>>();

const BLANK = "[\\s_]*";
const NUMBER = `\\d+${BLANK}/${BLANK}\\d+|\\d+\\.?\\d*|\\.\\d+`;

/**
 * One term with its sign, `-x`, `+1/2`, `2x`, `x/2`, read by one regular expression: a grammar of smaller pieces costs
 * thirty times as much, and every command reads a hundred operations before it answers.
 */
function termParser(letters: Letters, sign: "?" | ""): P.Parser<Term> {
  const source = `([+\\-\u2212])${sign}${BLANK}(?:(${NUMBER})${BLANK}(?:\\*?${BLANK}([${letters}]))?|([${letters}])(?:${BLANK}/${BLANK}([1-9]\\d*))?)${BLANK}`;
  const term = new RegExp(source, "iy");
  return P((input, i) => {
    term.lastIndex = i;
    const m = term.exec(input);
    if (!m) return P.makeFailure(afterSign(input, i), "a term");
    const [whole, minus, number, factorOf, letter, divisor] = m;
    const size = number === undefined ? rational(1, Number(divisor ?? 1)) : readNumber(number);
    const end = i + whole.search(/[\d.]/) + (number?.length ?? 0); // the complaint looks back from here
    if (typeof size === "string") return P.makeFailure(end, size);
    const at = letters.indexOf((factorOf ?? letter ?? "?").toLowerCase());
    const value = minus === undefined || minus === "+" ? size : { n: -size.n + 0, d: size.d };
    return P.makeSuccess(i + whole.length, { letter: at, value });
  });
}

/** Where the misfit is if no term begins at i: behind a sign, which does fit. */
function afterSign(text: string, i: number): number {
  return i + /^(?:[+\-\u2212][\s_]*)?/.exec(text.slice(i))![0].length;
}

/** The exact number, or what was expected in its place. */
function readNumber(text: string): Rational | string {
  const [n, d] = text.split("/");
  if (d === undefined) {
    const wanted = "a decimal within 0.002 of a fraction with denominator 1, 2, 3, 4, 6, 8, 12 or 24";
    return fractionFromDecimal(Number(text)) ?? wanted;
  }
  const denominator = Number(d.replace(/_/g, ""));
  return denominator === 0 ? "a denominator other than 0" : rational(Number(n!.replace(/_/g, "")), denominator);
}

function tripletParser(letters: Letters): P.Parser<AffineExpression[]> {
  const known = parsers.get(letters);
  if (known) return known;
  const sum = P.seqMap(termParser(letters, "?"), termParser(letters, "").many(), (first, rest) =>
    collect([first, ...rest]),
  );
  const comma = P.regexp(/,[\s_]*/);
  const triplet = P.regexp(/[\s_]*/).then(P.seqMap(sum, comma, sum, comma, sum, (a, _, b, __, c) => [a, b, c]));
  const whole = triplet.skip(P.eof);
  parsers.set(letters, whole);
  return whole;
}

function collect(terms: readonly Term[]): AffineExpression {
  const sums: [Rational, Rational, Rational, Rational] = [ZERO, ZERO, ZERO, ZERO];
  for (const { letter, value } of terms) {
    const at = letter < 0 ? 3 : letter;
    sums[at] = addRational(sums[at]!, value);
  }
  return { coefficients: [sums[0], sums[1], sums[2]], constant: sums[3] };
}

/**
 * Reads three comma-separated affine expressions in the given letters: signs, blanks, capitals, fractions, rounded
 * decimals, products such as `2x` or `x/2`, the whole in quotes or not. Exact.
 * @throws InputProblem `triplet-unreadable` with the span of the first character or number that does not fit, or
 * `number-too-long` where the numbers cannot be kept exact
 */
export function parseTriplet(
  text: string,
  letters: Letters,
): readonly [AffineExpression, AffineExpression, AffineExpression] {
  const bare = /^(\s*)(['"])(.*)\2\s*$/.exec(text); // whole triplet in quotes
  const inner = bare ? bare[3]! : text;
  const offset = bare ? bare[1]!.length + 1 : 0;
  const result = keepExact(text, () => tripletParser(letters).parse(inner));
  if (result.status) return result.value as [AffineExpression, AffineExpression, AffineExpression];
  throw misfit(text, result.index.offset + offset, result.expected, letters);
}

/**
 * The result of an exact computation on what was read.
 * @throws InputProblem `number-too-long` in place of its RangeError
 */
export function keepExact<T>(text: string, compute: () => T): T {
  try {
    return compute();
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    throw new InputProblem(
      "number-too-long",
      `"${text}" has numbers too long to be kept exact`,
      { start: 0, end: text.length },
      "write fractions with small denominators such as 1/2 or 2/3",
    );
  }
}

function misfit(text: string, at: number, expected: readonly string[], letters: Letters): InputProblem {
  const what = `"${text}" is not three expressions in ${[...letters].join(", ")}`;
  const fraction = expected.find((e) => e.startsWith("a d")); // the number before the place is the culprit
  if (fraction) {
    const number = /[\d./\s]*$/.exec(text.slice(0, at))![0].trim();
    const start = text.lastIndexOf(number, at);
    const why = `${number} was found where ${fraction} belongs`;
    const hint = "write the fraction itself, such as 1/3";
    return new InputProblem("triplet-unreadable", `${what}: ${why}`, { start, end: start + number.length }, hint);
  }
  const why = at >= text.length ? "it ends too early" : `character ${at + 1}, "${text[at]}", does not fit`;
  const hint = `write it like ${letters === "abc" ? "a-b,a+b,c" : `${letters[0]},${letters[1]}+1/2,-${letters[2]}`}`;
  return new InputProblem(
    "triplet-unreadable",
    `${what}: ${why}`,
    { start: at, end: Math.min(at + 1, text.length) },
    hint,
  );
}

/** `x-y+1/2` in the letters given; `0` for nothing at all. Letters first, the constant last. */
export function formatExpression(e: AffineExpression, letters: Letters): string {
  let out = "";
  e.coefficients.forEach((c, i) => {
    if (c.n !== 0) out += signOf(c, out) + factor(c) + letters[i];
  });
  if (e.constant.n !== 0) out += signOf(e.constant, out) + magnitude(e.constant);
  return out || "0";
}

function signOf(r: Rational, before: string): string {
  return r.n < 0 ? "-" : before ? "+" : "";
}

function magnitude(r: Rational): string {
  return r.d === 1 ? String(Math.abs(r.n)) : `${Math.abs(r.n)}/${r.d}`;
}

function factor(r: Rational): string {
  return r.d === 1 && Math.abs(r.n) === 1 ? "" : magnitude(r);
}

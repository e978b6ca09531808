import P from "parsimmon";
import { addRational, multiplyRational, type Rational, rational, ZERO } from "../algebra/index.ts";
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

const blank = P.regexp(/[\s_]*/);
const token = <T>(p: P.Parser<T>): P.Parser<T> => p.skip(blank);
const sign = token(P.regexp(/[+\-\u2212]/)).map((s) => (s === "+" ? 1 : -1));

const fraction = P.seq(token(P.regexp(/\d+/)), token(P.string("/")), token(P.regexp(/\d+/))).chain(([n, , d]) =>
  Number(d) === 0 ? P.fail("a denominator other than 0") : P.succeed(rational(Number(n), Number(d))),
);
const decimal = token(P.regexp(/\d+\.\d*|\.\d+|\d+/)).chain((text) => {
  const value = fractionFromDecimal(Number(text));
  return value
    ? P.succeed(value)
    : P.fail("a decimal within 0.002 of a fraction with denominator 1, 2, 3, 4, 6, 8, 12 or 24");
});
const number = P.alt(fraction, decimal);

function tripletParser(letters: Letters): P.Parser<AffineExpression[]> {
  const known = parsers.get(letters);
  if (known) return known;
  const letter = token(P.regexp(new RegExp(`[${letters}]`, "i"))).map((c) => letters.indexOf(c.toLowerCase()));
  const product = P.alt(
    P.seqMap(number, token(P.string("*")).atMost(1), letter, (value, _, l): Term => ({ letter: l, value })),
    P.seqMap(
      letter,
      token(P.string("/")),
      token(P.regexp(/[1-9]\d*/)),
      (l, _, d): Term => ({
        letter: l,
        value: rational(1, Number(d)),
      }),
    ),
    number.map((value): Term => ({ letter: -1, value })),
    letter.map((l): Term => ({ letter: l, value: rational(1) })),
  );
  const signed = P.seqMap(
    sign,
    product,
    (s, t): Term => ({ letter: t.letter, value: rational(s * t.value.n, t.value.d) }),
  );
  const sum = P.seqMap(P.alt(signed, product), signed.many(), (first, rest) => collect([first, ...rest]));
  const comma = token(P.string(","));
  const triplet = blank.then(P.seqMap(sum, comma, sum, comma, sum, (a, _, b, __, c) => [a, b, c])).skip(P.eof);
  parsers.set(letters, triplet);
  return triplet;
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
 * decimals, products such as `2x` or `x/2`. Exact.
 * @throws InputProblem `triplet-unreadable` with the span of the first character that does not fit
 */
export function parseTriplet(
  text: string,
  letters: Letters,
): readonly [AffineExpression, AffineExpression, AffineExpression] {
  const bare = /^\s*(['"])(.*)\1\s*$/.exec(text); // whole triplet in quotes
  const inner = bare ? bare[2]! : text;
  const offset = bare ? text.indexOf(inner) : 0;
  const result = tripletParser(letters).parse(inner);
  if (result.status) return result.value as [AffineExpression, AffineExpression, AffineExpression];
  const start = result.index.offset + offset;
  throw new InputProblem(
    "triplet-unreadable",
    `"${text}" is not three expressions in ${[...letters].join(", ")}: ${complaint(text, start, result.expected)}`,
    { start, end: Math.min(start + 1, text.length) },
    `write it like ${letters === "abc" ? "a-b,a+b,c" : "-x,y+1/2,-z"}`,
  );
}

function complaint(text: string, at: number, expected: readonly string[]): string {
  const worded = expected.find((e) => e.startsWith("a d"));
  if (worded) return `expected ${worded} before character ${at + 1}`;
  return at >= text.length ? "it ends too early" : `character ${at + 1}, "${text[at]}", does not fit`;
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

/** Coefficients times k, for callers that carry an expression through a basis change. */
export function scaleExpression(e: AffineExpression, k: Rational): AffineExpression {
  const [a, b, c] = e.coefficients;
  return {
    coefficients: [multiplyRational(a, k), multiplyRational(b, k), multiplyRational(c, k)],
    constant: multiplyRational(e.constant, k),
  };
}

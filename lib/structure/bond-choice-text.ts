import P from "parsimmon";
import { InputProblem } from "../problem.ts";

/**
 * Pairs of atoms by element or label and by distance: what `--bond` and `--no-bond` say. A name that is an element
 * symbol means every atom of the element, another one the site of that label, `*` any atom.
 */
export interface BondPattern {
  readonly ends: readonly [string, string];
  /** Only pairs farther apart than this, angstrom. */
  readonly above: number | null;
  /** Only pairs nearer than this, angstrom. */
  readonly below: number | null;
}

interface Bound {
  readonly above?: number;
  readonly below?: number;
}

interface Grammar {
  readonly patterns: P.Parser<BondPattern[]>;
  readonly members: P.Parser<string[]>;
}

let built: Grammar | null = null;

function grammar(): Grammar {
  if (built) return built;
  const blank = P.regexp(/\s*/);
  const token = <T>(p: P.Parser<T>): P.Parser<T> => p.skip(blank);
  const name = token(P.alt(P.regexp(/"([^"]+)"/, 1), P.regexp(BARE_NAME))).desc("an element, a label or *");
  const distance = token(P.regexp(/(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?/))
    .map(Number)
    .desc("a distance in angstrom");
  const dash = token(P.regexp(/[-\u2013]/)).desc("a hyphen between the two ends");
  const bound: P.Parser<Bound> = P.alt(
    token(P.string(">"))
      .then(distance)
      .map((above) => ({ above })),
    token(P.string("<"))
      .then(distance)
      .map((below) => ({ below })),
  );
  const pattern = P.seqMap(
    name,
    dash,
    name,
    bound.many(),
    (a, _, b, bounds): BondPattern => ({
      ends: [a, b],
      above: bounds.find((x) => x.above !== undefined)?.above ?? null,
      below: bounds.find((x) => x.below !== undefined)?.below ?? null,
    }),
  );
  const comma = token(P.regexp(/[,;]/));
  const whole = <T>(p: P.Parser<T>): P.Parser<T> => blank.then(p).skip(P.eof);
  built = { patterns: whole(pattern.sepBy1(comma)), members: whole(name.sepBy1(comma.or(P.succeed("")))) };
  return built;
}

/** What needs no quotes: a star, or a letter and what follows it up to a separator. */
const BARE_NAME = /\*|[A-Za-z][^\s,;<>="-]*/;

/**
 * Reads a list of bond patterns: `W-O<1.95`, `Ca-O`, `Fe1-O3>1.8<2.3, Pb-*`. Labels with hyphens stand in quotes.
 * @throws InputProblem `bond-pattern-unreadable` with the span of the first character that does not fit
 */
export function parseBondPatterns(text: string): BondPattern[] {
  const patterns = accept(text, grammar().patterns, "bond-pattern", 'write it like "W-O<1.95" or "Ca-O"');
  const empty = patterns.find((p) => p.above !== null && p.below !== null && p.above >= p.below);
  if (!empty) return patterns;
  throw new InputProblem(
    "bond-pattern-empty",
    `"${formatBondPattern(empty)}" allows no distance`,
    { start: 0, end: text.length },
    "the distance after > must be smaller than the one after <",
  );
}

/**
 * Reads a list of labels or elements that are to form units of their own: `W1,O1,O2`.
 * @throws InputProblem `unit-unreadable`
 */
export function parseUnitMembers(text: string): string[] {
  return accept(text, grammar().members, "unit", 'write it like "W1,O1,O2"');
}

function accept<T>(text: string, parser: P.Parser<T>, what: string, hint: string): T {
  const result = parser.parse(text);
  if (result.status) return result.value;
  const start = result.index.offset;
  const found = start >= text.length ? "it ends too early" : `character ${start + 1}, "${text[start]}", does not fit`;
  const expected = result.expected.filter((e) => e.includes(" "));
  throw new InputProblem(
    `${what}-unreadable`,
    `"${text}" cannot be read: ${found}${expected.length > 0 ? `; expected ${expected.join(" or ")}` : ""}`,
    { start, end: Math.min(start + 1, text.length) },
    hint,
  );
}

/** One pattern as it is written on the command line. */
export function formatBondPattern(p: BondPattern): string {
  const above = p.above === null ? "" : `>${p.above}`;
  const below = p.below === null ? "" : `<${p.below}`;
  return `${formatName(p.ends[0])}-${formatName(p.ends[1])}${above}${below}`;
}

/** Patterns joined with commas, as `parseBondPatterns` reads them. */
export function formatBondPatterns(patterns: readonly BondPattern[]): string {
  return patterns.map(formatBondPattern).join(", ");
}

/** Members of a unit joined with commas, as `parseUnitMembers` reads them. */
export function formatUnitMembers(members: readonly string[]): string {
  return members.map(formatName).join(",");
}

function formatName(text: string): string {
  return BARE_NAME.exec(text)?.[0] === text ? text : `"${text}"`;
}

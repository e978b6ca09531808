import P from "parsimmon";
import { InputProblem, type Span } from "../problem.ts";
import type { PlaneLetter, SymbolPart } from "./hermann-mauguin-symbol.ts";

/** A Hermann-Mauguin symbol as somebody wrote it, before it is known which group is meant. */
export interface WrittenSymbol {
  readonly lattice: string;
  readonly units: readonly SymbolUnit[];
  /** What follows the symbol: after a colon, a closing letter S, Z, H or R, or a remark in brackets. */
  readonly extensions: readonly { readonly text: string; readonly span: Span }[];
}

/** One character of the symbol with a meaning: a digit with its minus sign and sure subscript, a letter, a slash. */
export type SymbolUnit =
  | { readonly kind: "digit"; readonly digit: number; readonly bar: boolean; readonly screw: number; readonly gap: Gap }
  | { readonly kind: "letter"; readonly letter: PlaneLetter; readonly gap: Gap }
  | { readonly kind: "slash" };

/** What stands before a unit: an underscore may be a blank or lower the digit after it. */
type Gap = "" | "blank" | "underscore";

/** One character with a meaning. */
function unitGrammar(): P.Parser<SymbolUnit> {
  const gap = P.regexp(/[\s_.,]*/).map((s): Gap => (s === "" ? "" : s === "_" ? "underscore" : "blank"));
  const subscript = P.alt(
    P.regexp(/\(([1-5])\)/, 1),
    P.regexp(/~([1-5])~/, 1),
    P.regexp(/<sub>([1-5])<\/sub>/i, 1),
    P.regexp(/[\u2081-\u2085]/).map((s) => String(s.charCodeAt(0) - 0x2080)),
  );

  const digit = P.seqMap(
    gap,
    P.regexp(/\\?[-\u2212]?/),
    P.regexp(/[1-6]/),
    P.regexp(/[\u0305\u0304\u00af]?/),
    subscript.times(0, 1),
    (g, minus, d, bar, s): SymbolUnit => ({
      kind: "digit",
      digit: Number(d),
      bar: minus !== "" || bar !== "",
      screw: s[0] ? Number(s[0]) : 0,
      gap: g,
    }),
  );
  const letter = P.seqMap(
    gap,
    P.regexp(/g[12](?![0-9])|[mabcendg]/i),
    (g, l): SymbolUnit => ({ kind: "letter", letter: l.toLowerCase() as PlaneLetter, gap: g }),
  );
  const slash = gap.then(P.regexp(/\//)).map((): SymbolUnit => ({ kind: "slash" }));
  return P.alt(digit, slash, letter);
}

/** A whole symbol with what follows it. */
function symbolGrammar(): P.Parser<WrittenSymbol> {
  const quote = P.regexp(/[\s'"]*/);
  const colon = P.regexp(/[\s_]*:\s*([^:()]*[^:()\s])/, 1);
  const closing = P.regexp(/[\s_]*([szhr])(?=[\s'"]*($|\())/i, 1);
  const remark = P.regexp(/[\s_]*(\([^()]*\)|\{[^{}]*\}|\[[^[\]]*\])/, 1);
  const extension = P.alt(colon, closing, remark).mark();

  return P.seqMap(
    quote.then(P.regexp(/[PABCIFRH]/i).desc("a lattice letter P, A, B, C, F, I, R or H")),
    unitGrammar().atLeast(1),
    extension.many(),
    (lattice, units, extensions): WrittenSymbol => ({
      lattice: lattice.toUpperCase(),
      units,
      extensions: extensions.map((e) => ({
        text: e.value,
        span: { start: e.start.offset, end: e.end.offset },
      })),
    }),
  )
    .skip(quote)
    .skip(P.eof);
}

let grammar: P.Parser<WrittenSymbol> | null = null; // built when the first symbol is read

/**
 * Reads the characters of a Hermann-Mauguin symbol: capitals, underscores, blanks or none, subscripts as `2(1)`, `2_1`,
 * `2~1~` or lowered digits, a bar as minus sign or overline.
 * @throws InputProblem `group-name-unreadable` with the span of the first character that does not fit
 */
export function readSymbolUnits(text: string): WrittenSymbol {
  grammar ??= symbolGrammar();
  const result = grammar.parse(text);
  if (result.status) return result.value;
  const at = result.index.offset;
  const what = at >= text.length ? "it ends too early" : `"${text[at]}" at character ${at + 1} does not fit`;
  throw new InputProblem(
    "group-name-unreadable",
    `"${text}" is not the name of a space group: ${what}`,
    { start: at, end: Math.min(at + 1, text.length) },
    "write a Hermann-Mauguin symbol such as P 21/c, a Schoenflies symbol such as D2h^16, or a number from 1 to 230",
  );
}

/**
 * Every way to cut the units into the parts of a symbol: `P212121` may be 21 21 21 or 2 1 21 21.
 * @param lenient lets a digit after a blank be a subscript too, as in `P 2 1/c`
 */
export function partitions(units: readonly SymbolUnit[], lenient: boolean): SymbolPart[][] {
  const ways: SymbolPart[][] = [];
  extend(units, 0, [], ways, lenient);
  return ways;
}

function extend(
  units: readonly SymbolUnit[],
  at: number,
  parts: readonly SymbolPart[],
  ways: SymbolPart[][],
  lenient: boolean,
): void {
  const unit = units[at];
  if (!unit) {
    ways.push([...parts]);
    return;
  }
  if (unit.kind === "slash" || parts.length === 3) return;
  if (unit.kind === "letter") {
    extend(units, at + 1, [...parts, { axis: null, plane: unit.letter }], ways, lenient);
    return;
  }
  for (const { axis, next } of axisReadings(units, at, lenient)) {
    const plane = units[next]?.kind === "slash" ? units[next + 1] : undefined;
    if (units[next]?.kind !== "slash") extend(units, next, [...parts, { axis, plane: null }], ways, lenient);
    else if (plane?.kind === "letter") {
      extend(units, next + 2, [...parts, { axis, plane: plane.letter }], ways, lenient);
    }
  }
}

/** A digit alone, and with the digit after it as its screw subscript where that can be. */
function axisReadings(units: readonly SymbolUnit[], at: number, lenient: boolean): { axis: string; next: number }[] {
  const unit = units[at];
  if (unit?.kind !== "digit" || unit.digit === 5) return [];
  const name = `${unit.bar ? "-" : ""}${unit.digit}`;
  if (unit.screw > 0) return [{ axis: `${name}${unit.screw}`, next: at + 1 }];
  const readings = [{ axis: name, next: at + 1 }];
  const after = units[at + 1];
  if (!unit.bar && after?.kind === "digit" && !after.bar && after.screw === 0 && after.digit < unit.digit) {
    if (lenient || after.gap !== "blank") readings.unshift({ axis: `${name}${after.digit}`, next: at + 2 });
  }
  return readings;
}

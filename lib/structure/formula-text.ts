import P from "parsimmon";
import { InputProblem } from "../problem.ts";

/** Numbers of atoms by element symbol, in the order written. */
export type Formula = ReadonlyMap<string, number>;

function formulaGrammar(): P.Parser<[string, number][]> {
  const blank = P.regexp(/[\s_]*/);
  const symbol = P.regexp(/[A-Z][a-z]?/);
  const count = P.regexp(/\d+(?:\.\d*)?(?:\(\d+\))?|\.\d+/).map((t) => Number(t.replace(/\(.*/, "")));
  const term = P.seq(symbol, count.fallback(1)).skip(blank);
  return blank.then(term.many()).skip(P.eof);
}

let grammar: P.Parser<[string, number][]> | null = null; // built when the first formula is read

/**
 * Reads a sum formula as CIF writes it, `C6 H12 O6`, `Ca0.95 Mg0.05 C O3`: symbols with counts, no brackets.
 * @throws InputProblem `formula-unreadable` with the span of the character that does not fit
 */
export function parseFormula(text: string): Formula {
  grammar ??= formulaGrammar();
  const result = grammar.parse(text);
  if (!result.status) {
    const at = result.index.offset;
    throw new InputProblem(
      "formula-unreadable",
      `"${text}" is no sum formula: character ${at + 1}, "${text[at] ?? "the end"}", does not fit`,
      { start: at, end: Math.min(at + 1, text.length) },
      "write symbols with counts and blanks between them, such as Ca C O3",
    );
  }
  const counts = new Map<string, number>();
  for (const [element, n] of result.value) counts.set(element, (counts.get(element) ?? 0) + n);
  return counts;
}

/** Inverse of parseFormula: `C6 H12 O6`, in the order of the map, counts rounded to four decimals. */
export function formatFormula(formula: Formula): string {
  return [...formula]
    .map(([element, n]) => {
      const rounded = Number(n.toFixed(4));
      return rounded === 1 ? element : `${element}${rounded}`;
    })
    .join(" ");
}

/** Elements in Hill order: carbon and hydrogen first where there is carbon, the rest by alphabet. */
export function hillOrder(formula: Formula): Formula {
  const rank = (e: string) => (formula.has("C") ? (e === "C" ? "0" : e === "H" ? "1" : `2${e}`) : e);
  return new Map([...formula].sort(([a], [b]) => (rank(a) < rank(b) ? -1 : 1)));
}

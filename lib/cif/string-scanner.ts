import type { Brackets } from "./brackets.ts";
import { COLON, lineEndFrom, SPACE } from "./characters.ts";
import { structuralLine } from "./keywords.ts";
import { excerpt, type ProblemList } from "./problem-list.ts";
import { endsItem, FieldEnds, quoteEnd11, quoteEnd20, tripleEnd } from "./strings.ts";
import type { CifVersion, TokenBuffer } from "./token-buffer.ts";
import * as Kind from "./token-buffer.ts";

/** The part of the scanner that reads strings with delimiters, and finds where one ends that has lost its own. */
export class StringScanner {
  readonly #source: string;
  readonly #two: boolean;
  readonly #tokens: TokenBuffer;
  readonly #brackets: Brackets;
  readonly #problems: ProblemList;
  readonly #fields: FieldEnds;
  /** Up to here no quote is followed by a blank; keeps a line full of `'a'b` from being searched once per string. */
  #looseQuotesTo = 0;

  constructor(source: string, version: CifVersion, tokens: TokenBuffer, brackets: Brackets, problems: ProblemList) {
    this.#source = source;
    this.#two = version === "2.0";
    this.#tokens = tokens;
    this.#brackets = brackets;
    this.#problems = problems;
    this.#fields = new FieldEnds(source);
  }

  /** A string in single or double quotes; like the others returns the offset after what it read. */
  quoted(at: number): number {
    const source = this.#source;
    let end = this.#two ? quoteEnd20(source, at) : quoteEnd11(source, at);
    if (end < 0) {
      end = lineEndFrom(source, at);
      while (source.charCodeAt(end - 1) <= SPACE) end--;
      const message = `the quote that opens ${excerpt(source.slice(at, end))} is not closed on its line`;
      this.#problems.add("unterminated-quote", message, { start: at, end }, "Close the quote, or use a text field.");
      this.#tokens.push(Kind.OPEN_QUOTED, at, end);
      return end;
    }
    if (this.#two && this.#brackets.depth === 0 && !this.#brackets.separates(end)) end = this.#quoteInside(at, end);
    return this.#string(Kind.QUOTED, at, end);
  }

  /** A CIF 2.0 string that goes on after its quote (`'don't'`) is read as CIF 1.1 would, if that closes it. */
  #quoteInside(at: number, end: number): number {
    if (at < this.#looseQuotesTo) return end;
    const later = quoteEnd11(this.#source, at);
    if (later < 0) {
      this.#looseQuotesTo = lineEndFrom(this.#source, at);
      return end;
    }
    const message = `${excerpt(this.#source.slice(at, later))} contains its own quote, which ends a string in CIF 2.0`;
    this.#problems.add("quote-inside", message, { start: end - 1, end }, "Use the other quote, or three of them.");
    return later;
  }

  triple(at: number): number {
    const end = tripleEnd(this.#source, at);
    if (end >= 0) return this.#string(Kind.TRIPLE, at, end);
    const message = `the three quotes that open ${excerpt(this.#source.slice(at, at + 40))} are never closed`;
    this.#problems.add(
      "unterminated-quote",
      message,
      { start: at, end: at + 3 },
      "Close the string with three quotes.",
    );
    return this.#unclosed(Kind.OPEN_TRIPLE, at, structuralLine(this.#source, at, this.#source.length));
  }

  field(at: number): number {
    const close = this.#fields.after(at);
    const swallows = close < 0 || this.#swallows(close);
    const line = swallows ? structuralLine(this.#source, at, close < 0 ? this.#source.length : close) : -1;
    if (close >= 0 && line < 0) return this.#string(Kind.FIELD, at, close + 2);
    const head = excerpt(this.#source.slice(at, lineEndFrom(this.#source, at)));
    const message = `the text field that opens with ${head} is never closed`;
    const hint = "Close it with a semicolon at the beginning of a line.";
    this.#problems.add("unterminated-text-field", message, { start: at, end: at + 1 }, hint);
    return this.#unclosed(Kind.OPEN_FIELD, at, line);
  }

  /**
   * A text field whose closing semicolon was lost seems to end where the next field opens: the semicolon at `close`
   * then touches text, or values follow a single item. Both are against the rules, so that no sound field is taken
   * for one, not even one that holds a whole CIF.
   */
  #swallows(close: number): boolean {
    const after = close + 2;
    if (!this.#brackets.separates(after)) return true;
    return this.#isSingleItem() && !endsItem(this.#source, after);
  }

  /** True if the token to come is the value of a data name that stands in no loop. */
  #isSingleItem(): boolean {
    const { kinds, length } = this.#tokens;
    let at = length - 1;
    while (at >= 0 && kinds[at] === Kind.NAME) at--;
    return at < length - 1 && (at < 0 || kinds[at] !== Kind.LOOP);
  }

  /** A string without end is given up at `line`, the next one that begins with a data name or keyword, if any. */
  #unclosed(kind: number, at: number, line: number): number {
    const end = line < 0 ? this.#source.length : line;
    this.#tokens.push(kind, at, end);
    return end;
  }

  /** A closed string: a table key if a colon follows inside brackets, else a value. */
  #string(kind: number, at: number, end: number): number {
    if (kind !== Kind.FIELD && this.#brackets.depth > 0 && this.#source.charCodeAt(end) === COLON) {
      this.#tokens.push(Kind.KEY, at, end);
      return end + 1;
    }
    this.#tokens.push(kind, at, end);
    this.#brackets.checkSeparation(end);
    return end;
  }
}

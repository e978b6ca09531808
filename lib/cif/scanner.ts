import type { Span } from "../problem.ts";
import {
  blankFrom,
  COLON,
  DOLLAR,
  DOUBLE_QUOTE,
  HASH,
  isLineStart,
  LEFT_BRACE,
  LEFT_BRACKET,
  lineEndFrom,
  RIGHT_BRACE,
  RIGHT_BRACKET,
  SEMICOLON,
  SINGLE_QUOTE,
  SPACE,
  UNDERSCORE,
} from "./characters.ts";
import { keywordKind, structuralLine } from "./keywords.ts";
import { excerpt, type ProblemList } from "./problem-list.ts";
import { FieldEnds, isTriple, quoteEnd11, quoteEnd20, swallowedFrom, tripleEnd } from "./strings.ts";
import * as Kind from "./token-buffer.ts";
import { type CifVersion, TokenBuffer } from "./token-buffer.ts";

/** What the first character of a token decides. */
const PLAIN = 0;
const SEPARATOR = 1;
const MAYBE_KEYWORD = 2;
const SPECIAL = 3;

function firstCharacters(version: CifVersion): Uint8Array {
  const table = new Uint8Array(128);
  table.fill(SEPARATOR, 0, SPACE + 1);
  for (const letter of "dglsDGLS") table[letter.charCodeAt(0)] = MAYBE_KEYWORD;
  for (const mark of version === "2.0" ? "_'\"#;$[]{}" : "_'\"#;$[]") table[mark.charCodeAt(0)] = SPECIAL;
  return table;
}

/** One pass over the text, token after token; what is not well formed is reported and read as far as it makes sense. */
export class Scanner {
  readonly #source: string;
  readonly #two: boolean;
  readonly #version: CifVersion;
  readonly #problems: ProblemList;
  readonly #tokens = new TokenBuffer();
  readonly #fields: FieldEnds;
  /** Offsets of the brackets open at this point, innermost last; always empty in CIF 1.1. */
  readonly #open: number[] = [];

  constructor(source: string, version: CifVersion, problems: ProblemList) {
    this.#source = source;
    this.#version = version;
    this.#two = version === "2.0";
    this.#problems = problems;
    this.#fields = new FieldEnds(source);
  }

  /** Tokens of the text from offset `from` on. Time and memory linear in its length. */
  scan(from: number): TokenBuffer {
    const source = this.#source;
    const tokens = this.#tokens;
    const two = this.#two;
    const length = source.length;
    const first = firstCharacters(this.#version);
    let at = from;
    while (at < length) {
      const c = source.charCodeAt(at);
      const role = c < 128 ? first[c] : PLAIN;
      if (role === SEPARATOR) at++;
      else if (role === PLAIN) {
        let end = at + 1;
        if (two) end = this.#wordEnd20(at);
        else while (end < length && source.charCodeAt(end) > SPACE) end++;
        tokens.push(Kind.WORD, at, end);
        at = end;
      } else at = role === MAYBE_KEYWORD ? this.#word(at) : this.#special(c, at);
    }
    if (this.#open.length > 0) this.#closeBrackets(length);
    return tokens;
  }

  #report(code: string, message: string, span: Span, hint: string): void {
    this.#problems.add(code, message, span, hint);
  }

  /** End of an unquoted value. In CIF 2.0 brackets end it: silently inside brackets, else they are read as part of it. */
  #wordEnd20(at: number): number {
    const source = this.#source;
    let end = at + 1;
    let bracket = false;
    for (; end < source.length; end++) {
      const c = source.charCodeAt(end);
      if (c <= SPACE) break;
      if (c !== LEFT_BRACKET && c !== RIGHT_BRACKET && c !== LEFT_BRACE && c !== RIGHT_BRACE) continue;
      bracket = true;
      if (this.#open.length > 0) break;
    }
    if (bracket && !(this.#open.length > 0 && isCloser(source.charCodeAt(end)))) {
      const word = source.slice(at, this.#open.length > 0 ? end + 1 : end);
      const message = `the unquoted value ${excerpt(word)} contains a bracket, which CIF 2.0 keeps for lists and tables`;
      this.#report("bracket-in-word", message, { start: at, end }, "Put the value in quotes.");
    }
    return end;
  }

  #word(at: number): number {
    const blank = blankFrom(this.#source, at);
    const kind = keywordKind(this.#source, at, blank);
    if (kind !== 0) return this.#structure(kind, at, blank);
    const end = this.#two ? this.#wordEnd20(at) : blank;
    this.#tokens.push(Kind.WORD, at, end);
    return end;
  }

  #structure(kind: number, start: number, end: number): number {
    if (this.#open.length > 0) this.#closeBrackets(start);
    this.#tokens.push(kind, start, end);
    return end;
  }

  #special(c: number, at: number): number {
    switch (c) {
      case UNDERSCORE:
        return this.#structure(Kind.NAME, at, blankFrom(this.#source, at + 1));
      case HASH:
        return lineEndFrom(this.#source, at);
      case SINGLE_QUOTE:
      case DOUBLE_QUOTE:
        return this.#two && isTriple(this.#source, at) ? this.#triple(at) : this.#quoted(at);
      case SEMICOLON:
        if (isLineStart(this.#source, at)) return this.#field(at);
        return this.#word(at);
      case LEFT_BRACKET:
      case LEFT_BRACE:
        if (this.#two) return this.#openBracket(c, at);
        return this.#reserved(at);
      case RIGHT_BRACKET:
      case RIGHT_BRACE:
        if (this.#two) return this.#closeBracket(c, at);
        return this.#reserved(at);
      default:
        return this.#reserved(at);
    }
  }

  /** An unquoted value that begins with a character the version reserves; kept as a value. */
  #reserved(at: number): number {
    const start = this.#source.charCodeAt(at);
    const end = start === DOLLAR && this.#two ? this.#wordEnd20(at) : blankFrom(this.#source, at);
    const word = excerpt(this.#source.slice(at, end));
    const message = `the unquoted value ${word} begins with ${this.#source[at]}, which CIF ${this.#version} reserves`;
    const hint =
      start === DOLLAR
        ? "Put the value in quotes."
        : "Put the value in quotes, or, if a list is meant, begin the file with #\\#CIF_2.0.";
    this.#report("reserved-character", message, { start: at, end }, hint);
    this.#tokens.push(Kind.WORD, at, end);
    return end;
  }

  #quoted(at: number): number {
    const source = this.#source;
    let end = this.#two ? quoteEnd20(source, at) : quoteEnd11(source, at);
    if (end < 0) {
      end = lineEndFrom(source, at);
      while (source.charCodeAt(end - 1) <= SPACE) end--;
      const message = `the quote that opens ${excerpt(source.slice(at, end))} is not closed on its line`;
      this.#report("unterminated-quote", message, { start: at, end }, "Close the quote, or use a text field.");
      this.#tokens.push(Kind.OPEN_QUOTED, at, end);
      return end;
    }
    if (this.#two && this.#open.length === 0 && source.charCodeAt(end) > SPACE) end = this.#quoteInside(at, end);
    return this.#string(Kind.QUOTED, at, end);
  }

  /** A CIF 2.0 string that goes on after its quote (`'don't'`) is read as CIF 1.1 would, if that closes it. */
  #quoteInside(at: number, end: number): number {
    const later = quoteEnd11(this.#source, at);
    if (later <= end) return end;
    const message = `${excerpt(this.#source.slice(at, later))} contains its own quote, which ends a string in CIF 2.0`;
    this.#report("quote-inside", message, { start: end - 1, end }, "Use the other quote, or three of them.");
    return later;
  }

  #triple(at: number): number {
    const source = this.#source;
    const end = tripleEnd(source, at);
    if (end >= 0) return this.#string(Kind.TRIPLE, at, end);
    const message = `the three quotes that open ${excerpt(source.slice(at, at + 40))} are never closed`;
    this.#report("unterminated-quote", message, { start: at, end: at + 3 }, "Close the string with three quotes.");
    return this.#unclosed(Kind.OPEN_TRIPLE, at);
  }

  /** A closed string: a table key if a colon follows inside brackets, else a value that must be followed by a blank. */
  #string(kind: number, at: number, end: number): number {
    const next = end < this.#source.length ? this.#source.charCodeAt(end) : SPACE;
    const inside = this.#open.length > 0;
    if (inside && next === COLON) {
      this.#tokens.push(Kind.KEY, at, end);
      return end + 1;
    }
    this.#tokens.push(kind, at, end);
    if (next > SPACE && !(inside && isCloser(next))) this.#missingSpace(end);
    return end;
  }

  #missingSpace(at: number): void {
    const rest = this.#source.slice(at, Math.min(at + 60, blankFrom(this.#source, at)));
    const message = `no blank separates ${excerpt(rest)} from the value before it`;
    this.#report("missing-space", message, { start: at, end: at + 1 }, "Put a blank or a line end between them.");
  }

  #field(at: number): number {
    const source = this.#source;
    const close = this.#fields.after(at);
    const swallowed = close < 0 ? -1 : swallowedFrom(source, at, close);
    if (close >= 0 && swallowed < 0) return this.#string(Kind.FIELD, at, close + 2);
    const head = excerpt(source.slice(at, lineEndFrom(source, at)));
    const message = `the text field that opens with ${head} is never closed`;
    this.#report("unterminated-text-field", message, { start: at, end: at + 1 }, "Close it with a line that is ;");
    return this.#unclosed(Kind.OPEN_FIELD, at);
  }

  /** A string without end is given up at the next line that begins with a data name or keyword. */
  #unclosed(kind: number, at: number): number {
    const line = structuralLine(this.#source, at, this.#source.length);
    const end = line < 0 ? this.#source.length : line;
    this.#tokens.push(kind, at, end);
    return end;
  }

  #openBracket(c: number, at: number): number {
    this.#open.push(at);
    this.#tokens.push(c === LEFT_BRACKET ? Kind.LIST : Kind.TABLE, at, at + 1);
    return at + 1;
  }

  #closeBracket(c: number, at: number): number {
    const open = this.#open[this.#open.length - 1];
    const wanted = open === undefined ? 0 : this.#source.charCodeAt(open) + 2;
    if (wanted !== c) {
      const message = `the bracket ${this.#source[at]} closes nothing`;
      const hint = wanted === 0 ? "Remove it, or put the value in quotes." : `Expected ${String.fromCharCode(wanted)}.`;
      this.#report("bracket-mismatch", message, { start: at, end: at + 1 }, hint);
      return at + 1;
    }
    this.#open.pop();
    this.#tokens.push(c === RIGHT_BRACKET ? Kind.LIST_END : Kind.TABLE_END, at, at + 1);
    const next = at + 1 < this.#source.length ? this.#source.charCodeAt(at + 1) : SPACE;
    if (next > SPACE && !(this.#open.length > 0 && isCloser(next))) this.#missingSpace(at + 1);
    return at + 1;
  }

  #closeBrackets(at: number): void {
    for (let open = this.#open.pop(); open !== undefined; open = this.#open.pop()) {
      const list = this.#source.charCodeAt(open) === LEFT_BRACKET;
      const message = `the ${list ? "list" : "table"} that opens here is never closed`;
      this.#report(
        "unterminated-bracket",
        message,
        { start: open, end: open + 1 },
        `Close it with ${list ? "]" : "}"}`,
      );
      this.#tokens.push(list ? Kind.LIST_END : Kind.TABLE_END, at, at);
    }
  }
}

function isCloser(code: number): boolean {
  return code === RIGHT_BRACKET || code === RIGHT_BRACE;
}

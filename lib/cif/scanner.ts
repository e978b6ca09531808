import { Brackets } from "./brackets.ts";
import {
  blankFrom,
  COLON,
  DOLLAR,
  DOUBLE_QUOTE,
  HASH,
  isCloser,
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
import { excerpt, excerptWord, type ProblemList } from "./problem-list.ts";
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
  readonly #version: CifVersion;
  readonly #two: boolean;
  readonly #problems: ProblemList;
  readonly #tokens: TokenBuffer;
  readonly #fields: FieldEnds;
  readonly #brackets: Brackets;
  /** Up to here no quote is followed by a blank; keeps a line full of `'a'b` from being searched once per string. */
  #looseQuotesTo = 0;

  constructor(source: string, version: CifVersion, problems: ProblemList) {
    this.#source = source;
    this.#version = version;
    this.#two = version === "2.0";
    this.#problems = problems;
    this.#tokens = new TokenBuffer(source.length >> 4);
    this.#fields = new FieldEnds(source);
    this.#brackets = new Brackets(source, this.#tokens, problems);
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
    this.#brackets.closeAll(length);
    return tokens;
  }

  /** End of an unquoted value in CIF 2.0. Inside brackets any bracket ends it; elsewhere it is read as part of it. */
  #wordEnd20(at: number): number {
    const source = this.#source;
    const inside = this.#brackets.depth > 0;
    let end = at + 1;
    let bracket = false;
    for (; end < source.length; end++) {
      const c = source.charCodeAt(end);
      if (c <= SPACE) break;
      if (c !== LEFT_BRACKET && c !== RIGHT_BRACKET && c !== LEFT_BRACE && c !== RIGHT_BRACE) continue;
      if (inside && isCloser(c)) return end;
      bracket = true;
      if (inside) break;
    }
    if (bracket) {
      const message = `the unquoted value ${excerptWord(source, at)} holds a bracket, which CIF 2.0 keeps for lists and tables`;
      this.#problems.add("bracket-in-word", message, { start: at, end }, "Put the value in quotes.");
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
    this.#brackets.closeAll(start);
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
        return isLineStart(this.#source, at) ? this.#field(at) : this.#word(at);
      case LEFT_BRACKET:
      case LEFT_BRACE:
        if (!this.#two) return this.#reserved(at);
        this.#brackets.open(at);
        return at + 1;
      case RIGHT_BRACKET:
      case RIGHT_BRACE:
        if (!this.#two) return this.#reserved(at);
        this.#brackets.close(at);
        this.#checkSeparation(at + 1);
        return at + 1;
      default:
        return this.#reserved(at);
    }
  }

  /** An unquoted value that begins with a character the version reserves; kept as a value. */
  #reserved(at: number): number {
    const source = this.#source;
    const end = this.#two ? this.#wordEnd20(at) : blankFrom(source, at);
    const word = excerpt(source.slice(at, end));
    const message = `the unquoted value ${word} begins with ${source[at]}, which CIF ${this.#version} reserves`;
    const quote = "Put the value in quotes";
    const hint =
      source.charCodeAt(at) === DOLLAR
        ? `${quote}.`
        : `${quote}, or, if a list is meant, begin the file with #\\#CIF_2.0.`;
    this.#problems.add("reserved-character", message, { start: at, end }, hint);
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

  #triple(at: number): number {
    const end = tripleEnd(this.#source, at);
    if (end >= 0) return this.#string(Kind.TRIPLE, at, end);
    const message = `the three quotes that open ${excerpt(this.#source.slice(at, at + 40))} are never closed`;
    this.#problems.add(
      "unterminated-quote",
      message,
      { start: at, end: at + 3 },
      "Close the string with three quotes.",
    );
    return this.#unclosed(Kind.OPEN_TRIPLE, at);
  }

  #field(at: number): number {
    const close = this.#fields.after(at);
    const swallowed = close < 0 ? -1 : swallowedFrom(this.#source, at, close);
    if (close >= 0 && swallowed < 0) return this.#string(Kind.FIELD, at, close + 2);
    const head = excerpt(this.#source.slice(at, lineEndFrom(this.#source, at)));
    const message = `the text field that opens with ${head} is never closed`;
    const hint = "Close it with a semicolon at the beginning of a line.";
    this.#problems.add("unterminated-text-field", message, { start: at, end: at + 1 }, hint);
    return this.#unclosed(Kind.OPEN_FIELD, at);
  }

  /** A string without end is given up at the next line that begins with a data name or keyword. */
  #unclosed(kind: number, at: number): number {
    const line = structuralLine(this.#source, at, this.#source.length);
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
    this.#checkSeparation(end);
    return end;
  }

  #checkSeparation(at: number): void {
    if (this.#brackets.separates(at)) return;
    const message = `no blank separates ${excerptWord(this.#source, at)} from what stands before it`;
    const hint = "Put a blank or a line end between them.";
    this.#problems.add("missing-space", message, { start: at, end: at + 1 }, hint);
  }
}

import { Brackets } from "./brackets.ts";
import {
  blankFrom,
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
import { keywordKind } from "./keywords.ts";
import { excerpt, excerptWord, type ProblemList } from "./problem-list.ts";
import { StringScanner } from "./string-scanner.ts";
import { isTriple } from "./strings.ts";
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
  readonly #brackets: Brackets;
  readonly #strings: StringScanner;

  constructor(source: string, version: CifVersion, problems: ProblemList) {
    this.#source = source;
    this.#version = version;
    this.#two = version === "2.0";
    this.#problems = problems;
    this.#tokens = new TokenBuffer(source.length >> 4);
    this.#brackets = new Brackets(source, this.#tokens, problems);
    this.#strings = new StringScanner(source, version, this.#tokens, this.#brackets, problems);
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
        return this.#two && isTriple(this.#source, at) ? this.#strings.triple(at) : this.#strings.quoted(at);
      case SEMICOLON:
        return isLineStart(this.#source, at) ? this.#strings.field(at) : this.#word(at);
      case LEFT_BRACKET:
      case LEFT_BRACE:
        if (!this.#two) return this.#reserved(at);
        this.#brackets.open(at);
        return at + 1;
      case RIGHT_BRACKET:
      case RIGHT_BRACE:
        if (!this.#two) return this.#reserved(at);
        this.#brackets.close(at);
        this.#brackets.checkSeparation(at + 1);
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
}

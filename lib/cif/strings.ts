import { HASH, isBlank, isLineEnd } from "./characters.ts";
import { startsStructure } from "./keywords.ts";

/**
 * CIF 1.1: a quoted string ends at the first equal quote that a blank or the end of the text follows.
 * Returns the offset after the closing quote, or -1 where the line ends first.
 */
export function quoteEnd11(source: string, open: number): number {
  const quote = source.charCodeAt(open);
  for (let at = open + 1; at < source.length; at++) {
    const c = source.charCodeAt(at);
    if (c === quote && (at + 1 === source.length || isBlank(source.charCodeAt(at + 1)))) return at + 1;
    if (isLineEnd(c)) return -1;
  }
  return -1;
}

/** CIF 2.0: a quoted string ends at the first equal quote. Result as for `quoteEnd11`. */
export function quoteEnd20(source: string, open: number): number {
  const quote = source.charCodeAt(open);
  for (let at = open + 1; at < source.length; at++) {
    const c = source.charCodeAt(at);
    if (c === quote) return at + 1;
    if (isLineEnd(c)) return -1;
  }
  return -1;
}

/** True if three equal quotes stand at `open`. */
export function isTriple(source: string, open: number): boolean {
  const quote = source.charCodeAt(open);
  return source.charCodeAt(open + 1) === quote && source.charCodeAt(open + 2) === quote;
}

/** Offset after the closing three quotes, or -1. */
export function tripleEnd(source: string, open: number): number {
  const close = source.indexOf(source.slice(open, open + 3), open + 3);
  return close < 0 ? -1 : close + 3;
}

/**
 * Finds the ends of text fields. The three possible delimiters are remembered until the scan has passed them: a text
 * that never uses one of them is searched for it once, not once per field.
 */
export class FieldEnds {
  readonly #source: string;
  readonly #delimiters = ["\n;", "\r;", "\f;"] as const;
  readonly #next = [-1, -1, -1];

  constructor(source: string) {
    this.#source = source;
  }

  /** Offset of the first line end at or after `from` that a semicolon follows, or -1. Calls must not go backwards far. */
  after(from: number): number {
    let first = Number.POSITIVE_INFINITY;
    for (let i = 0; i < 3; i++) {
      if (this.#next[i]! < from) {
        const found = this.#source.indexOf(this.#delimiters[i]!, from);
        this.#next[i] = found < 0 ? Number.POSITIVE_INFINITY : found;
      }
      first = Math.min(first, this.#next[i]!);
    }
    return first === Number.POSITIVE_INFINITY ? -1 : first;
  }
}

/** True if what stands at `from`, blanks aside, may follow a single item: a name, a keyword, a comment or the end. */
export function endsItem(source: string, from: number): boolean {
  let at = from;
  while (at < source.length && isBlank(source.charCodeAt(at))) at++;
  return at === source.length || source.charCodeAt(at) === HASH || startsStructure(source, at);
}

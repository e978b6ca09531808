/**
 * Tokens as three parallel arrays: kind, first offset, offset after the last character. One token costs nine bytes and
 * no object; texts are cut out of the source only when somebody asks for them.
 */

// Kinds below FIRST_VALUE give the document its shape or close a bracket.
export const BLOCK = 1;
export const FRAME = 2;
export const FRAME_END = 3;
export const LOOP = 4;
export const NAME = 5;
export const STOP = 6;
export const GLOBAL = 7;
/** Ends of lists and tables; the scanner supplies the missing ones, so that brackets always balance. */
export const LIST_END = 8;
export const TABLE_END = 9;
/** A table key: a quoted string followed by a colon, which lies outside the token. */
export const KEY = 10;
export const FIRST_VALUE = 11;
export const WORD = 11;
export const QUOTED = 12;
export const TRIPLE = 13;
export const FIELD = 14;
/** Strings whose closing delimiter is missing; they end where the reader took up the thread again. */
export const OPEN_QUOTED = 15;
export const OPEN_TRIPLE = 16;
export const OPEN_FIELD = 17;
export const LIST = 18;
export const TABLE = 19;

const SMALLEST_CAPACITY = 256;

export class TokenBuffer {
  kinds: Uint8Array;
  starts: Int32Array;
  ends: Int32Array;
  length = 0;

  /** @param expected tokens to make room for at first; more are taken in by doubling */
  constructor(expected: number) {
    const capacity = Math.max(SMALLEST_CAPACITY, expected);
    this.kinds = new Uint8Array(capacity);
    this.starts = new Int32Array(capacity);
    this.ends = new Int32Array(capacity);
  }

  push(kind: number, start: number, end: number): void {
    const at = this.length;
    if (at === this.kinds.length) this.#grow();
    this.kinds[at] = kind;
    this.starts[at] = start;
    this.ends[at] = end;
    this.length = at + 1;
  }

  #grow(): void {
    const capacity = 2 * this.kinds.length;
    const kinds = new Uint8Array(capacity);
    const starts = new Int32Array(capacity);
    const ends = new Int32Array(capacity);
    kinds.set(this.kinds);
    starts.set(this.starts);
    ends.set(this.ends);
    this.kinds = kinds;
    this.starts = starts;
    this.ends = ends;
  }
}

/** A scanned text: everything that blocks, loops and values need to cut themselves out. */
export interface TokenSource {
  readonly source: string;
  readonly version: CifVersion;
  readonly tokens: TokenBuffer;
}

export type CifVersion = "1.1" | "2.0";

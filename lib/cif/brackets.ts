import { isCloser, LEFT_BRACE, LEFT_BRACKET, RIGHT_BRACKET, SPACE } from "./characters.ts";
import { excerptWord, type ProblemList } from "./problem-list.ts";
import { LIST, LIST_END, TABLE, TABLE_END, type TokenBuffer } from "./token-buffer.ts";

/** The lists and tables open at a point of a CIF 2.0. Whatever the text does, the tokens pushed here balance. */
export class Brackets {
  readonly #source: string;
  readonly #tokens: TokenBuffer;
  readonly #problems: ProblemList;
  /** Offsets of the opening brackets, innermost last. */
  readonly #open: number[] = [];

  constructor(source: string, tokens: TokenBuffer, problems: ProblemList) {
    this.#source = source;
    this.#tokens = tokens;
    this.#problems = problems;
  }

  get depth(): number {
    return this.#open.length;
  }

  /** True if what stands at `at` may touch the value before it: a blank, the end, or a closing bracket that fits. */
  separates(at: number): boolean {
    if (at >= this.#source.length) return true;
    const c = this.#source.charCodeAt(at);
    return c <= SPACE || (this.#open.length > 0 && isCloser(c));
  }

  /** Reports what stands at `at` if it touches the value before it and may not. */
  checkSeparation(at: number): void {
    if (this.separates(at)) return;
    const message = `no blank separates ${excerptWord(this.#source, at)} from what stands before it`;
    const hint = "Put a blank or a line end between them.";
    this.#problems.add("missing-space", message, { start: at, end: at + 1 }, hint);
  }

  open(at: number): void {
    this.#open.push(at);
    this.#tokens.push(this.#source.charCodeAt(at) === LEFT_BRACE ? TABLE : LIST, at, at + 1);
  }

  /** Closes the innermost bracket; one of the other kind, or one too many, is reported and passed over. */
  close(at: number): void {
    const open = this.#open[this.#open.length - 1];
    const c = this.#source.charCodeAt(at);
    // In ASCII each closing bracket stands two places behind its opening one.
    const wanted = open === undefined ? 0 : this.#source.charCodeAt(open) + 2;
    if (wanted === c) {
      this.#open.pop();
      this.#tokens.push(c === RIGHT_BRACKET ? LIST_END : TABLE_END, at, at + 1);
      return;
    }
    const hint =
      wanted === 0 ? "Remove it, or put the value in quotes." : `${String.fromCharCode(wanted)} is to come first.`;
    const message = `the bracket ${this.#source[at]} closes nothing`;
    this.#problems.add("bracket-mismatch", message, { start: at, end: at + 1 }, hint);
  }

  /** Closes every bracket that is open at `at`, where something begins that no list or table can hold. */
  closeAll(at: number): void {
    for (let open = this.#open.pop(); open !== undefined; open = this.#open.pop()) {
      const list = this.#source.charCodeAt(open) === LEFT_BRACKET;
      const message = `the ${list ? "list" : "table"} that opens here is never closed`;
      const hint = `Close it with ${list ? "]" : "}"}`;
      this.#problems.add("unterminated-bracket", message, { start: open, end: open + 1 }, hint);
      this.#tokens.push(list ? LIST_END : TABLE_END, at, at);
    }
  }
}

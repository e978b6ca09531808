/**
 * A located fault in an input. Wording is kept here in plain sentences; file, line, column and caret are added by one
 * printer (`locate`) and only for faults that are shown. This module imports nothing, so every room may use it.
 */

/** Half-open range of UTF-16 offsets into the source text. */
export interface Span {
  readonly start: number;
  readonly end: number;
}

/** One fault in an input. `code` is words in kebab-case; `span` is absent where the fault has no single place. */
export class InputProblem extends Error {
  override readonly name = "InputProblem";
  readonly code: string;
  readonly span: Span | null;
  /** What the user can do about it, one sentence; empty where nothing can be advised. */
  readonly hint: string;

  constructor(code: string, message: string, span: Span | null = null, hint = "") {
    super(message);
    this.code = code;
    this.span = span;
    this.hint = hint;
  }

  /** The same fault, placed at `span`; a place already known is kept. */
  at(span: Span): InputProblem {
    return this.span ? this : new InputProblem(this.code, this.message, span, this.hint);
  }
}

/** What a lenient reader returns: everything readable, and the list of what was not. */
export interface ParseResult<T> {
  readonly value: T;
  readonly problems: readonly InputProblem[];
}

/**
 * Strict use of a lenient reader.
 * @throws InputProblem the first problem, if there is any
 */
export function requireClean<T>(result: ParseResult<T>): T {
  const [first] = result.problems;
  if (first) throw first;
  return result.value;
}

/** Line and column, both from 1; a tab counts as one column; CR LF, LF and CR each end a line. */
export interface Place {
  readonly line: number;
  readonly column: number;
  /** The whole line, without its end. */
  readonly text: string;
}

/** Place of an offset in a source text. Linear in the offset; meant for faults that are printed. */
export function locate(source: string, offset: number): Place {
  const at = Math.max(0, Math.min(offset, source.length));
  let line = 1;
  let start = 0;
  const ends = /\r\n|\n|\r/g;
  for (let m = ends.exec(source); m && m.index + m[0].length <= at; m = ends.exec(source)) {
    line++;
    start = m.index + m[0].length;
  }
  const rest = source.slice(start).search(/[\r\n]/);
  const text = rest < 0 ? source.slice(start) : source.slice(start, start + rest);
  return { line, column: at - start + 1, text };
}

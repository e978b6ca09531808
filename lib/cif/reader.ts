import type { ParseResult, Span } from "../problem.ts";
import { type CifDocument, TokenBlock } from "./block.ts";
import { hasLineEnd } from "./characters.ts";
import { reportCharacters } from "./forbidden-characters.ts";
import { TokenLoop } from "./loop.ts";
import { layOut } from "./loop-cells.ts";
import { afterByteOrderMark, skipPrelude, versionOf } from "./prelude.ts";
import { excerpt, ProblemList } from "./problem-list.ts";
import { Scanner } from "./scanner.ts";
import { checkTables } from "./table-check.ts";
import type { TokenSource } from "./token-buffer.ts";
import * as Kind from "./token-buffer.ts";
import { afterValue } from "./value.ts";

/**
 * Reads a CIF 1.1 or 2.0 (the first line of the file decides). Never throws: everything readable is in the document,
 * everything amiss in the list of problems, in the order of the text. A damaged place costs what it holds up to the
 * next data name, loop or block. `requireClean` makes the reading strict. Time and memory are linear in the length.
 */
export function readCif(text: string): ParseResult<CifDocument> {
  const problems = new ProblemList();
  const version = versionOf(text);
  reportCharacters(text, version, problems);
  const start = skipPrelude(text, afterByteOrderMark(text), problems);
  const tokens = new Scanner(text, version, problems).scan(start);
  const builder = new DocumentBuilder({ source: text, version, tokens }, problems);
  return { value: { version, source: text, blocks: builder.build() }, problems: problems.finish() };
}

/** Turns tokens into blocks. Values stay token numbers. */
class DocumentBuilder {
  readonly #from: TokenSource;
  readonly #problems: ProblemList;
  readonly #blocks: TokenBlock[] = [];
  readonly #blockNames = new Set<string>();
  /** The data block and the save frames open in it, innermost last; `#frameNames` are the names used in each. */
  #open: TokenBlock[] = [];
  #frameNames: Set<string>[] = [];

  constructor(from: TokenSource, problems: ProblemList) {
    this.#from = from;
    this.#problems = problems;
  }

  build(): readonly TokenBlock[] {
    const { kinds, length } = this.#from.tokens;
    let at = 0;
    while (at < length) at = this.#next(kinds[at]!, at);
    this.#closeBlock(length);
    return this.#blocks;
  }

  #next(kind: number, at: number): number {
    switch (kind) {
      case Kind.NAME:
        return this.#item(at);
      case Kind.LOOP:
        return this.#loop(at);
      case Kind.BLOCK:
        return this.#block(at);
      case Kind.FRAME:
        return this.#frame(at);
      case Kind.FRAME_END:
        return this.#frameEnd(at);
      case Kind.GLOBAL:
      case Kind.STOP:
        this.#report("reserved-word", at, `${this.#text(at)} has no meaning in CIF`, "Remove it, or put it in quotes.");
        return at + 1;
      default:
        return this.#stray(at);
    }
  }

  #block(at: number): number {
    this.#closeBlock(at);
    const { source, tokens } = this.#from;
    const after = this.#afterHead(at);
    const span = this.#span(at, after);
    const name = source.slice(span.start + "data_".length, span.end);
    if (name === "") {
      this.#report("nameless-block", at, "the data block has no name", "Write the name directly behind data_.");
    } else if (after > at + 1) {
      const message = `the block name ${excerpt(name)} contains a blank`;
      this.#problems.add("blank-in-block-name", message, span, "Join its words with underscores.");
    }
    const key = name.toLowerCase();
    if (this.#blockNames.has(key)) {
      const message = `a data block named ${excerpt(name)} occurs before`;
      this.#problems.add(
        "duplicate-block",
        message,
        { start: span.start, end: tokens.ends[at]! },
        "Rename one of them.",
      );
    }
    this.#begin(new TokenBlock(this.#from, name, span));
    return after;
  }

  #begin(block: TokenBlock): void {
    this.#blocks.push(block);
    this.#blockNames.add(block.name.toLowerCase());
    this.#open = [block];
    this.#frameNames = [new Set()];
  }

  /** Index of the token after a heading: words on its line belong to the name, since names with blanks are common. */
  #afterHead(at: number): number {
    const { source, tokens } = this.#from;
    let next = at + 1;
    while (
      next < tokens.length &&
      tokens.kinds[next]! >= Kind.FIRST_VALUE &&
      tokens.kinds[next]! < Kind.LIST &&
      !hasLineEnd(source, tokens.ends[next - 1]!, tokens.starts[next]!)
    ) {
      next++;
    }
    return next;
  }

  #closeBlock(at: number): void {
    while (this.#open.length > 1) {
      const frame = this.#open[this.#open.length - 1]!;
      const message = `the save frame ${excerpt(frame.name)} is never closed`;
      this.#problems.add("unterminated-frame", message, frame.headSpan, "Close it with save_");
      this.#closeInnermost(at);
    }
    if (this.#open.length === 1) this.#closeInnermost(at);
  }

  #closeInnermost(at: number): void {
    const block = this.#open.pop()!;
    this.#frameNames.pop();
    block.span = {
      start: block.headSpan.start,
      end: Math.max(block.headSpan.end, this.#from.tokens.ends[at - 1] ?? 0),
    };
  }

  #frame(at: number): number {
    const parent = this.#parent(at);
    if (this.#from.version === "1.1" && this.#open.length > 1) {
      const open = this.#open[this.#open.length - 1]!;
      const message = `the save frame ${excerpt(open.name)} is not closed before ${excerpt(this.#text(at))}`;
      this.#problems.add("unterminated-frame", message, open.headSpan, "Close it with save_");
      this.#closeInnermost(at);
      return this.#frame(at);
    }
    const name = this.#text(at).slice("save_".length);
    const names = this.#frameNames[this.#frameNames.length - 1]!;
    if (names.has(name.toLowerCase())) {
      const message = `a save frame named ${excerpt(name)} occurs before in this block`;
      this.#report("duplicate-frame", at, message, "Rename one of them.");
    }
    names.add(name.toLowerCase());
    const frame = new TokenBlock(this.#from, name, this.#span(at, at + 1));
    parent.frames.push(frame);
    this.#open.push(frame);
    this.#frameNames.push(new Set());
    return at + 1;
  }

  #frameEnd(at: number): number {
    if (this.#open.length > 1) this.#closeInnermost(at + 1);
    else this.#report("frame-not-open", at, "save_ closes no save frame", "Remove it, or name the frame it opens.");
    return at + 1;
  }

  /** The block or frame that takes what token `at` begins; made up where the file has none. */
  #parent(at: number): TokenBlock {
    const innermost = this.#open[this.#open.length - 1];
    if (innermost) return innermost;
    const hint = "Put a line such as data_halite before the first data name.";
    this.#report("missing-block-header", at, `${excerpt(this.#text(at))} stands before any data block`, hint);
    const block = new TokenBlock(this.#from, "", this.#span(at, at + 1));
    this.#begin(block);
    return block;
  }

  #item(at: number): number {
    const value = at + 1;
    const hasValue = value < this.#from.tokens.length && this.#from.tokens.kinds[value]! >= Kind.FIRST_VALUE;
    if (!hasValue) {
      const message = `the data name ${excerpt(this.#text(at))} has no value`;
      this.#report("name-without-value", at, message, "Write ? for an unknown value and . for an inapplicable one.");
      return value;
    }
    if (!this.#parent(at).addItem(at, value)) this.#duplicate(at);
    return this.#checkedValue(value);
  }

  #duplicate(at: number): void {
    const message = `the data name ${excerpt(this.#text(at))} occurs before in this block; its first value is kept`;
    this.#report("duplicate-name", at, message, "Remove one of them.");
  }

  /** Index after the value that begins at `at`; tables in it are checked. */
  #checkedValue(at: number): number {
    if (this.#from.tokens.kinds[at]! < Kind.LIST) return at + 1;
    const after = afterValue(this.#from, at);
    checkTables(this.#from, at, after, this.#problems);
    return after;
  }

  #loop(at: number): number {
    const { kinds, starts, ends, length } = this.#from.tokens;
    let first = at + 1;
    while (first < length && kinds[first] === Kind.NAME) first++;
    let after = first;
    while (after < length && kinds[after]! >= Kind.FIRST_VALUE) after = this.#checkedValue(after);
    const columnCount = first - at - 1;
    if (columnCount === 0) {
      this.#report("loop-without-names", at, "the loop has no data names", "Write its data names behind loop_.");
      return after;
    }
    const shape = layOut(this.#from, first, after, columnCount);
    if (shape.valueCount === 0) {
      const message = `the loop of ${excerpt(this.#text(at + 1))} has no values`;
      this.#problems.add("loop-without-values", message, this.#span(at, first), "Give it a row, or remove it.");
    } else if (shape.misfit) this.#reportMisfit(at, columnCount, shape.valueCount, shape.misfit);
    const names = Array.from({ length: columnCount }, (_, i) => this.#text(at + 1 + i));
    const loop = new TokenLoop(this.#from, names, shape.cells, { start: starts[at]!, end: ends[after - 1]! });
    const parent = this.#parent(at);
    parent.addLoop(loop);
    for (let i = at + 1; i < first; i++) if (!parent.addColumn(i, loop)) this.#duplicate(i);
    return after;
  }

  #reportMisfit(
    at: number,
    columnCount: number,
    valueCount: number,
    misfit: { readonly first: number; readonly after: number; readonly onLine: boolean },
  ): void {
    const names = columnCount === 1 ? "1 data name" : `${columnCount} data names`;
    const loop = `the loop of ${excerpt(this.#text(at + 1))} has ${names} and ${valueCount} values`;
    const span = this.#span(misfit.first, misfit.after);
    const where = excerpt(this.#from.source.slice(span.start, span.end));
    const message = misfit.onLine ? `${loop}; the first odd line is ${where}` : `${loop}; no row is filled by ${where}`;
    const hint = "Write ? for a missing value, and put values that contain blanks in quotes.";
    this.#problems.add("loop-value-count", message, span, hint);
  }

  /** Values that no data name precedes, up to the next name or keyword. */
  #stray(at: number): number {
    const { kinds, length } = this.#from.tokens;
    let after = at + 1;
    while (after < length && kinds[after]! >= Kind.LIST_END) after++;
    const span = this.#span(at, after);
    const text = excerpt(this.#from.source.slice(span.start, span.end));
    const hint = "Values that contain blanks must be in quotes.";
    this.#problems.add("value-without-name", `no data name stands before ${text}`, span, hint);
    return after;
  }

  #report(code: string, at: number, message: string, hint: string): void {
    this.#problems.add(code, message, this.#span(at, at + 1), hint);
  }

  #text(at: number): string {
    const { start, end } = this.#span(at, at + 1);
    return this.#from.source.slice(start, end);
  }

  /** Span from the first character of token `at` to the last of the token before `after`. */
  #span(at: number, after: number): Span {
    const { starts, ends } = this.#from.tokens;
    return { start: starts[at]!, end: ends[after - 1]! };
  }
}

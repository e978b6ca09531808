import type { Span } from "../problem.ts";
import type { TokenBlock } from "./block.ts";
import { BlockStack } from "./block-stack.ts";
import { hasLineEnd } from "./characters.ts";
import { TokenLoop } from "./loop.ts";
import { type LoopShape, layOut } from "./loop-cells.ts";
import { excerpt, type ProblemList } from "./problem-list.ts";
import { checkTables } from "./table-check.ts";
import type { TokenSource } from "./token-buffer.ts";
import * as Kind from "./token-buffer.ts";
import { afterValue } from "./value.ts";

/** Turns tokens into blocks. Values stay token numbers; `at` and `after` are token numbers throughout. */
export class DocumentBuilder {
  readonly #from: TokenSource;
  readonly #problems: ProblemList;
  readonly #stack: BlockStack;

  constructor(from: TokenSource, problems: ProblemList) {
    this.#from = from;
    this.#problems = problems;
    this.#stack = new BlockStack(from, problems);
  }

  build(): readonly TokenBlock[] {
    const { kinds, length } = this.#from.tokens;
    for (let at = 0; at < length; ) at = this.#next(kinds[at]!, at);
    this.#stack.closeAll(this.#endBefore(length));
    return this.#stack.blocks;
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
        this.#stack.closeFrame(this.#span(at, at + 1));
        return at + 1;
      case Kind.GLOBAL:
      case Kind.STOP:
        this.#report("reserved-word", at, `${this.#text(at)} has no meaning in CIF`, "Remove it, or put it in quotes.");
        return at + 1;
      default:
        return this.#stray(at);
    }
  }

  #block(at: number): number {
    const after = this.#afterHead(at);
    const span = this.#span(at, after);
    const name = this.#from.source.slice(span.start + "data_".length, span.end);
    if (name === "") {
      this.#report("nameless-block", at, "the data block has no name", "Write the name directly behind data_");
    } else if (after > at + 1) {
      const message = `the block name ${excerpt(name)} contains a blank`;
      this.#problems.add("blank-in-block-name", message, span, "Join its words with underscores.");
    }
    this.#stack.openBlock(name, span, this.#endBefore(at));
    return after;
  }

  /** Token after a heading: words on its line belong to the name, since names with blanks are common. */
  #afterHead(at: number): number {
    const { source, tokens } = this.#from;
    const { kinds, starts, ends, length } = tokens;
    let next = at + 1;
    while (next < length && kinds[next]! >= Kind.FIRST_VALUE && kinds[next]! < Kind.LIST) {
      if (hasLineEnd(source, ends[next - 1]!, starts[next]!)) break;
      next++;
    }
    return next;
  }

  #frame(at: number): number {
    const name = this.#text(at).slice("save_".length);
    const span = this.#span(at, at + 1);
    this.#stack.innermost(span);
    this.#stack.openFrame(name, span, this.#endBefore(at));
    return at + 1;
  }

  #item(at: number): number {
    const value = at + 1;
    const hasValue = value < this.#from.tokens.length && this.#from.tokens.kinds[value]! >= Kind.FIRST_VALUE;
    if (!hasValue) {
      const message = `the data name ${excerpt(this.#text(at))} has no value`;
      this.#report("name-without-value", at, message, "Write ? for an unknown value and . for an inapplicable one.");
      return value;
    }
    if (!this.#stack.innermost(this.#span(at, at + 1)).addItem(at, value)) this.#duplicate(at);
    return this.#afterValue(value);
  }

  #duplicate(at: number): void {
    const message = `the data name ${excerpt(this.#text(at))} occurs before in this block; its first value is kept`;
    this.#report("duplicate-name", at, message, "Remove one of them.");
  }

  /** Token after the value that begins at `at`; tables in it are checked. */
  #afterValue(at: number): number {
    if (this.#from.tokens.kinds[at]! < Kind.LIST) return at + 1;
    const after = afterValue(this.#from, at);
    checkTables(this.#from, at, after, this.#problems);
    return after;
  }

  #loop(at: number): number {
    const { kinds, length } = this.#from.tokens;
    let first = at + 1;
    while (first < length && kinds[first] === Kind.NAME) first++;
    let after = first;
    while (after < length && kinds[after]! >= Kind.FIRST_VALUE) {
      after = kinds[after]! < Kind.LIST ? after + 1 : this.#afterValue(after);
    }
    const columnCount = first - at - 1;
    if (columnCount === 0) {
      this.#report("loop-without-names", at, "the loop has no data names", "Write its data names behind loop_");
      return after;
    }
    const shape = layOut(this.#from, first, after, columnCount);
    if (shape.valueCount === 0) {
      const message = `the loop of ${excerpt(this.#text(at + 1))} has no values`;
      this.#problems.add("loop-without-values", message, this.#span(at, first), "Give it a row, or remove it.");
    } else if (shape.misfit) this.#reportMisfit(at, columnCount, shape.valueCount, shape.misfit);
    const names = Array.from({ length: columnCount }, (_, i) => this.#text(at + 1 + i));
    const loop = new TokenLoop(this.#from, names, shape.cells, this.#span(at, after));
    const parent = this.#stack.innermost(this.#span(at, at + 1));
    parent.addLoop(loop);
    for (let i = at + 1; i < first; i++) if (!parent.addColumn(i, loop)) this.#duplicate(i);
    return after;
  }

  #reportMisfit(at: number, columnCount: number, valueCount: number, misfit: NonNullable<LoopShape["misfit"]>): void {
    const names = columnCount === 1 ? "1 data name" : `${columnCount} data names`;
    const loop = `the loop of ${excerpt(this.#text(at + 1))} has ${names} and ${valueCount} values`;
    const span = this.#span(misfit.first, misfit.after);
    const where = excerpt(this.#from.source.slice(span.start, span.end));
    const message = misfit.onLine ? `${loop}; the first odd line is ${where}` : `${loop}; left over: ${where}`;
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

  #endBefore(at: number): number {
    return at === 0 ? 0 : this.#from.tokens.ends[at - 1]!;
  }
}

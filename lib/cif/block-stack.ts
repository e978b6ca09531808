import type { Span } from "../problem.ts";
import { TokenBlock } from "./block.ts";
import { excerpt, type ProblemList } from "./problem-list.ts";
import type { TokenSource } from "./token-buffer.ts";

/** An open data block or save frame, and the names of the frames in it so far. */
interface Level {
  readonly block: TokenBlock;
  readonly frameNames: Set<string>;
}

/** The data blocks read so far, and which block and frames are open. */
export class BlockStack {
  readonly blocks: TokenBlock[] = [];
  readonly #from: TokenSource;
  readonly #problems: ProblemList;
  readonly #names = new Set<string>();
  /** The data block and the save frames open in it, innermost last. */
  readonly #open: Level[] = [];

  constructor(from: TokenSource, problems: ProblemList) {
    this.#from = from;
    this.#problems = problems;
  }

  /** Opens a data block; what is open closes at `end`, the end of the token before. */
  openBlock(name: string, headSpan: Span, end: number): void {
    this.closeAll(end);
    const key = name.toLowerCase();
    if (this.#names.has(key) && name !== "") {
      const message = `a data block named ${excerpt(name)} occurs before`;
      this.#problems.add("duplicate-block", message, headSpan, "Rename one of them.");
    }
    this.#names.add(key);
    const block = new TokenBlock(this.#from, name, headSpan);
    this.blocks.push(block);
    this.#open.push({ block, frameNames: new Set() });
  }

  /**
   * Opens a save frame in `parent`, the innermost block. Frames nest in CIF 2.0; in CIF 1.1 a frame that opens inside
   * another shows that the end of the other is missing.
   */
  openFrame(name: string, headSpan: Span, end: number): void {
    if (this.#from.version === "1.1" && this.#open.length > 1) {
      this.#reportOpenFrame();
      this.#closeInnermost(end);
    }
    const parent = this.#open[this.#open.length - 1]!;
    const key = name.toLowerCase();
    if (parent.frameNames.has(key)) {
      const message = `a save frame named ${excerpt(name)} occurs before in ${excerpt(parent.block.name)}`;
      this.#problems.add("duplicate-frame", message, headSpan, "Rename one of them.");
    }
    parent.frameNames.add(key);
    const block = new TokenBlock(this.#from, name, headSpan);
    parent.block.frames.push(block);
    this.#open.push({ block, frameNames: new Set() });
  }

  closeFrame(span: Span): void {
    if (this.#open.length > 1) this.#closeInnermost(span.end);
    else {
      const hint = "Remove it, or name the frame it opens.";
      this.#problems.add("frame-not-open", "save_ closes no save frame", span, hint);
    }
  }

  /** The block or frame that takes what stands at `at`; made up, and reported, where the file has none. */
  innermost(at: Span): TokenBlock {
    if (this.#open.length === 0) {
      const text = excerpt(this.#from.source.slice(at.start, at.end));
      const hint = "Put a line such as data_halite before the first data name.";
      this.#problems.add("missing-block-header", `${text} stands before any data block`, at, hint);
      this.openBlock("", at, at.start);
    }
    return this.#open[this.#open.length - 1]!.block;
  }

  closeAll(end: number): void {
    while (this.#open.length > 0) {
      if (this.#open.length > 1) this.#reportOpenFrame();
      this.#closeInnermost(end);
    }
  }

  #reportOpenFrame(): void {
    const { block } = this.#open[this.#open.length - 1]!;
    const message = `the save frame ${excerpt(block.name)} is never closed`;
    this.#problems.add("unterminated-frame", message, block.headSpan, "Close it with save_");
  }

  #closeInnermost(end: number): void {
    const { block } = this.#open.pop()!;
    block.span = { start: block.headSpan.start, end: Math.max(block.headSpan.end, end) };
  }
}

import type { Span } from "../problem.ts";
import type { CifLoop, TokenLoop } from "./loop.ts";
import type { CifVersion, TokenSource } from "./token-buffer.ts";
import { type CifValue, valueAt } from "./value.ts";

/** A CIF as read. Spans count UTF-16 units of `source`. */
export interface CifDocument {
  readonly version: CifVersion;
  readonly source: string;
  readonly blocks: readonly CifBlock[];
}

/** A data block or save frame. Data names are compared without regard to capitals. */
export interface CifBlock {
  /** Without `data_` or `save_`; empty for a block that has none. */
  readonly name: string;
  readonly span: Span;
  /** The whole text that spans refer to. */
  readonly source: string;
  readonly frames: readonly CifBlock[];
  /** Data names as written, in the order of the file, those of loops included. */
  names(): readonly string[];
  has(name: string): boolean;
  /** The value of a single item, or that in the first row of a loop; null where there is none. */
  get(name: string): CifValue | null;
  /** The loop that holds the name; null for single items and absent names. */
  loop(name: string): CifLoop | null;
  /** Every loop, in the order of the file. */
  loops(): readonly CifLoop[];
  nameSpan(name: string): Span | null;
}

/** What a data name stands for: one value (`valueToken`) or a column of a loop. */
interface Entry {
  readonly nameToken: number;
  readonly valueToken: number;
  readonly loop: TokenLoop | null;
}

/** A block over scanned tokens. The reader fills it; afterwards it does not change. */
export class TokenBlock implements CifBlock {
  readonly name: string;
  readonly frames: TokenBlock[] = [];
  readonly headSpan: Span;
  readonly source: string;
  span: Span;
  readonly #from: TokenSource;
  readonly #entries = new Map<string, Entry>();
  readonly #loops: TokenLoop[] = [];

  constructor(from: TokenSource, name: string, headSpan: Span) {
    this.#from = from;
    this.source = from.source;
    this.name = name;
    this.headSpan = headSpan;
    this.span = headSpan;
  }

  /** Records a single item. Returns false, and changes nothing, if the block has the name already. */
  addItem(nameToken: number, valueToken: number): boolean {
    return this.#add({ nameToken, valueToken, loop: null });
  }

  addLoop(loop: TokenLoop): void {
    this.#loops.push(loop);
  }

  /** Records a column. Returns false, and changes nothing, if the block has the name already. */
  addColumn(nameToken: number, loop: TokenLoop): boolean {
    return this.#add({ nameToken, valueToken: -1, loop });
  }

  #add(entry: Entry): boolean {
    const key = this.#textOfName(entry).toLowerCase();
    if (this.#entries.has(key)) return false;
    this.#entries.set(key, entry);
    return true;
  }

  names(): readonly string[] {
    return Array.from(this.#entries.values(), (entry) => this.#textOfName(entry));
  }

  has(name: string): boolean {
    return this.#entries.has(name.toLowerCase());
  }

  get(name: string): CifValue | null {
    const entry = this.#entries.get(name.toLowerCase());
    if (!entry) return null;
    return entry.loop ? entry.loop.value(0, name) : valueAt(this.#from, entry.valueToken);
  }

  loop(name: string): CifLoop | null {
    return this.#entries.get(name.toLowerCase())?.loop ?? null;
  }

  loops(): readonly CifLoop[] {
    return this.#loops;
  }

  nameSpan(name: string): Span | null {
    const entry = this.#entries.get(name.toLowerCase());
    return entry ? this.#spanOfName(entry) : null;
  }

  #spanOfName({ nameToken }: Entry): Span {
    const { starts, ends } = this.#from.tokens;
    return { start: starts[nameToken]!, end: ends[nameToken]! };
  }

  #textOfName(entry: Entry): string {
    const { start, end } = this.#spanOfName(entry);
    return this.#from.source.slice(start, end);
  }
}

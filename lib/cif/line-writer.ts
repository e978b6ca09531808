/** Collects words into lines. */
export class LineWriter {
  readonly #parts: string[] = [];
  /** Characters on the current line so far. */
  #column = 0;
  #joined = false;
  #tab = 0;

  /**
   * Adds a word, a blank before it, or a line end where the line would pass `width` characters. A text field, which
   * begins with a semicolon, gets lines of its own.
   */
  word(text: string, width = 80): void {
    const field = text.startsWith(";");
    const firstLine = text.includes("\n") ? text.indexOf("\n") : text.length;
    if (this.#column > 0) {
      const gap = this.#joined ? 0 : Math.max(1, this.#tab - this.#column);
      if (field || this.#column + gap + firstLine > width) this.newLine();
      else this.#add(" ".repeat(gap));
    }
    this.#joined = false;
    this.#tab = 0;
    this.#add(text);
    if (field) this.newLine();
  }

  /** The next word, if it stays on this line, begins in `column`, from 0, or behind it. */
  tab(column: number): void {
    this.#tab = column;
  }

  /** The next word needs no blank before it. */
  join(): void {
    this.#joined = true;
  }

  /** Ends the current line if anything stands on it. */
  newLine(): void {
    if (this.#column > 0) this.line("");
  }

  /** Adds `text` and ends the line. */
  line(text: string): void {
    this.#parts.push(text, "\n");
    this.#column = 0;
  }

  #add(text: string): void {
    this.#parts.push(text);
    const lineEnd = text.lastIndexOf("\n");
    this.#column = lineEnd < 0 ? this.#column + text.length : text.length - lineEnd - 1;
  }

  finish(): string {
    this.newLine();
    return this.#parts.join("");
  }
}

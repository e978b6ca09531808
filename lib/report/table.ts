/** One column: heading, and whether its cells hang right (numbers) or left (words). */
export interface Column {
  readonly heading: string;
  readonly align?: "left" | "right";
}

/** Plain text table: two blanks between columns, headings above, no ruling; trailing blanks removed. */
export function textTable(columns: readonly Column[], rows: readonly (readonly string[])[]): string {
  const widths = columns.map((c, j) => rows.reduce((w, row) => Math.max(w, (row[j] ?? "").length), c.heading.length));
  const line = (cells: readonly string[]) =>
    columns
      .map((c, j) => {
        const cell = cells[j] ?? "";
        return c.align === "right" ? cell.padStart(widths[j]!) : cell.padEnd(widths[j]!);
      })
      .join("  ")
      .trimEnd();
  return [line(columns.map((c) => c.heading)), ...rows.map(line)].join("\n");
}

/** Words broken into lines of at most `width` characters; every line but the first begins with `indent`. */
export function wrapText(text: string, width: number, indent = ""): string {
  const lines: string[] = [];
  let line = "";
  for (const word of text.split(" ")) {
    const room = width - (lines.length > 0 ? indent.length : 0);
    if (line && line.length + 1 + word.length > room) {
      lines.push(line);
      line = word;
    } else line = line ? `${line} ${word}` : word;
  }
  lines.push(line);
  return lines.join(`\n${indent}`);
}

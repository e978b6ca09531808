import { InputProblem } from "../problem.ts";
import { requireCharacters } from "./forbidden-characters.ts";
import { LineWriter } from "./line-writer.ts";
import { excerpt } from "./problem-list.ts";
import { LONGEST_LINE } from "./text-field.ts";
import type { CifVersion } from "./token-buffer.ts";
import { formatText, type WritableValue, writeValue } from "./write-value.ts";

/** What a block holds, in the order in which it is written. A comment may have several lines. */
export type WritableItem =
  | { readonly kind: "item"; readonly name: string; readonly value: WritableValue }
  | {
      readonly kind: "loop";
      readonly names: readonly string[];
      readonly rows: readonly (readonly WritableValue[])[];
    }
  | { readonly kind: "comment"; readonly text: string };

/** A data block, or a save frame where it stands in `frames`. Names of items begin with an underscore. */
export interface WritableBlock {
  readonly name: string;
  readonly items: readonly WritableItem[];
  readonly frames?: readonly WritableBlock[];
}

/** Longest data name, block name or frame name of CIF 1.1, in characters. */
const LONGEST_NAME_11 = 75;

/** Column of the values of single items. */
const VALUE_COLUMN = 34;

/** Values of a loop up to this length stand in columns, in characters. */
const WIDEST_COLUMN = 24;

/**
 * Text of a CIF, its version on the first line. Reading it gives the same names and values; only line ends in texts
 * become LF. Quoting is decided by the content.
 * @throws InputProblem what the version cannot hold, or no CIF can: a name that is none or occurs twice, a row whose
 * length is not that of its loop, a loop without rows, a character, a line that begins with a semicolon (CIF 1.1)
 */
export function writeCif(blocks: readonly WritableBlock[], version: CifVersion): string {
  const to = new LineWriter();
  to.line(`#\\#CIF_${version}`);
  requireDistinct(
    blocks.map((block) => block.name),
    "block name",
  );
  for (const block of blocks) {
    to.line("");
    requireName(block.name, "block name", version);
    to.line(`data_${block.name}`);
    writeContent(to, block, version, 0);
  }
  return to.finish();
}

function writeContent(to: LineWriter, block: WritableBlock, version: CifVersion, depth: number): void {
  const names = block.items.flatMap((item) =>
    item.kind === "loop" ? item.names : item.kind === "item" ? item.name : [],
  );
  requireDistinct(names, "data name");
  for (const name of names) requireName(name, "data name", version);
  for (const item of block.items) {
    if (item.kind === "item") writeItem(to, item.name, item.value, version);
    else if (item.kind === "loop") writeLoop(to, item.names, item.rows, version);
    else writeComment(to, item.text, version);
  }
  const frames = block.frames ?? [];
  if (frames.length > 0 && depth > 0 && version === "1.1") {
    const message = `no CIF 1.1 can hold a save frame inside the save frame ${excerpt(block.name)}`;
    throw new InputProblem("needs-cif-2", message, null, "Write CIF 2.0.");
  }
  requireDistinct(
    frames.map((frame) => frame.name),
    "frame name",
  );
  for (const frame of frames) {
    to.line("");
    requireName(frame.name, "frame name", version);
    to.line(`save_${frame.name}`);
    writeContent(to, frame, version, depth + 1);
    to.newLine();
    to.line("save_");
  }
}

function writeItem(to: LineWriter, name: string, value: WritableValue, version: CifVersion): void {
  to.word(name);
  to.tab(VALUE_COLUMN);
  located(name, () => writeValue(to, value, version));
  to.newLine();
}

type Rows = readonly (readonly WritableValue[])[];

function writeLoop(to: LineWriter, names: readonly string[], rows: Rows, version: CifVersion): void {
  if (names.length === 0) throw new InputProblem("loop-without-names", "a loop has no data names");
  if (rows.length === 0) {
    const hint = "Leave the loop out.";
    throw new InputProblem("loop-without-values", `the loop of ${excerpt(names[0]!)} has no rows`, null, hint);
  }
  const odd = rows.findIndex((row) => row.length !== names.length);
  if (odd >= 0) {
    const message = `row ${odd + 1} of the loop of ${excerpt(names[0]!)} has ${rows[odd]!.length} values for ${names.length} names`;
    throw new InputProblem("loop-value-count", message);
  }
  to.line("loop_");
  for (const name of names) to.line(` ${name}`);
  const cells = rows.map((row) => row.map((value, i) => located(names[i]!, () => cellText(value, version))));
  const columns = columnStarts(cells, names.length);
  rows.forEach((row, r) => {
    row.forEach((value, i) => {
      to.tab(columns[i]!);
      const text = cells[r]![i]!;
      if (text !== null) to.word(text, LONGEST_LINE);
      else located(names[i]!, () => writeValue(to, value, version));
    });
    to.newLine();
  });
}

/** Text of a value that can stand in a column; null for text fields, lists and tables. */
function cellText(value: WritableValue, version: CifVersion): string | null {
  if (typeof value !== "string" && value.kind === "unknown") return "?";
  if (typeof value !== "string" && value.kind === "inapplicable") return ".";
  if (typeof value !== "string" && value.kind !== "text") return null;
  const quoted = typeof value === "string" ? false : (value.quoted ?? false);
  const text = formatText(typeof value === "string" ? value : value.text, quoted, version);
  return text.startsWith(";") ? null : text;
}

/** Where the columns begin, wide enough for all values but the longest. */
function columnStarts(cells: readonly (readonly (string | null)[])[], columnCount: number): readonly number[] {
  const starts = [0];
  for (let column = 0; column < columnCount - 1; column++) {
    let width = 0;
    for (const row of cells) {
      const length = row[column]?.length ?? 0;
      if (length > width && length <= WIDEST_COLUMN) width = length;
    }
    starts.push(starts[column]! + width + 1);
  }
  return starts;
}

function writeComment(to: LineWriter, text: string, version: CifVersion): void {
  requireCharacters(text, version);
  const room = LONGEST_LINE - "# ".length;
  for (const line of text.split(/\r\n|\n|\r/)) {
    for (let from = 0; from === 0 || from < line.length; from += room) {
      to.line(`# ${line.slice(from, from + room)}`.trimEnd());
    }
  }
}

/** Runs `write`; a problem it has is told of the data name it is about. */
function located<T>(name: string, write: () => T): T {
  try {
    return write();
  } catch (error) {
    if (!(error instanceof InputProblem)) throw error;
    throw new InputProblem(error.code, `${name}: ${error.message}`, error.span, error.hint);
  }
}

function requireName(name: string, what: string, version: CifVersion): void {
  requireCharacters(name, version);
  const wrong = what === "data name" ? !/^_\S+$/.test(name) : !/^\S+$/.test(name);
  if (wrong) {
    const form = what === "data name" ? "an underscore and more characters, none of them blank" : "no blank";
    throw new InputProblem("name", `${excerpt(name)} is no ${what}: it must have ${form}`);
  }
  const longest = version === "1.1" ? LONGEST_NAME_11 : LONGEST_LINE - "data_".length;
  if (name.length > longest) {
    throw new InputProblem("name", `the ${what} ${excerpt(name)} has ${name.length} characters, more than ${longest}`);
  }
}

function requireDistinct(names: readonly string[], what: string): void {
  const seen = new Set<string>();
  for (const name of names) {
    const key = name.toLowerCase();
    if (seen.has(key)) throw new InputProblem("duplicate-name", `the ${what} ${excerpt(name)} occurs twice`);
    seen.add(key);
  }
}

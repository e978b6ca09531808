import { InputProblem } from "../problem.ts";
import { requireCharacters } from "./forbidden-characters.ts";
import { keywordKind } from "./keywords.ts";
import type { LineWriter } from "./line-writer.ts";
import { excerpt } from "./problem-list.ts";
import { encodeField, LONGEST_LINE, withPlainLineEnds } from "./text-field.ts";
import type { CifVersion } from "./token-buffer.ts";

/**
 * A value to be written; every `CifValue` is one, and a string stands for text. `quoted` asks for delimiters where the
 * content could do without. Lists and tables need CIF 2.0.
 */
export type WritableValue =
  | string
  | { readonly kind: "unknown" }
  | { readonly kind: "inapplicable" }
  | { readonly kind: "text"; readonly text: string; readonly quoted?: boolean }
  | { readonly kind: "list"; readonly items: readonly WritableValue[] }
  | { readonly kind: "table"; readonly entries: readonly (readonly [string, WritableValue])[] };

/** Deepest nesting of lists and tables that is written; the reader has no such bound. */
export const DEEPEST_NESTING = 200;

/**
 * Writes a value as the next word of a line. Text fields get lines of their own.
 * @throws InputProblem if the version cannot hold the value
 */
export function writeValue(to: LineWriter, value: WritableValue, version: CifVersion, depth = 0): void {
  if (typeof value === "string") to.word(formatText(value, false, version));
  else if (value.kind === "unknown") to.word("?");
  else if (value.kind === "inapplicable") to.word(".");
  else if (value.kind === "text") to.word(formatText(value.text, value.quoted ?? false, version));
  else if (version === "1.1") {
    throw new InputProblem("needs-cif-2", `no CIF 1.1 can hold a ${value.kind}`, null, "Write CIF 2.0.");
  } else if (depth === DEEPEST_NESTING) {
    throw new InputProblem("nesting", `lists and tables nest more than ${DEEPEST_NESTING} deep`);
  } else if (value.kind === "list") writeList(to, value.items, version, depth);
  else if (value.kind === "table") writeTable(to, value.entries, version, depth);
  else value satisfies never;
}

function writeList(to: LineWriter, items: readonly WritableValue[], version: CifVersion, depth: number): void {
  to.word("[");
  to.join();
  for (const item of items) writeValue(to, item, version, depth + 1);
  to.join();
  to.word("]");
}

type Entries = readonly (readonly [string, WritableValue])[];

function writeTable(to: LineWriter, entries: Entries, version: CifVersion, depth: number): void {
  const keys = new Set<string>();
  to.word("{");
  to.join();
  for (const [key, value] of entries) {
    if (keys.has(key)) throw new InputProblem("duplicate-key", `a table has the key ${excerpt(key)} twice`);
    keys.add(key);
    to.word(formatKey(key));
    to.join();
    writeValue(to, value, version, depth + 1);
  }
  to.join();
  to.word("}");
}

/** The text with the delimiters it needs. A result that begins with a semicolon is a text field. */
export function formatText(written: string, quoted: boolean, version: CifVersion): string {
  const text = withPlainLineEnds(written);
  requireCharacters(text, version);
  if (!quoted && isBare(text, version)) return text;
  const delimited = text.length < LONGEST_LINE - 2 ? quote(text, version) : null;
  return delimited ?? encodeField(text, version);
}

/** First characters that an unquoted value may not have; the semicolon only at the beginning of a line. */
const BARE_11 = /^[^\s"#$'_;[\]][^\s]*$/;
const BARE_20 = /^[^\s"#$'_;[\]{}][^\s[\]{}]*$/;

function isBare(text: string, version: CifVersion): boolean {
  if (text.length >= LONGEST_LINE || !(version === "1.1" ? BARE_11 : BARE_20).test(text)) return false;
  return text !== "?" && text !== "." && keywordKind(text, 0, text.length) === 0;
}

/** The text in single or double quotes on one line, or null if neither does. */
function quote(text: string, version: CifVersion): string | null {
  if (text.includes("\n")) return null;
  for (const mark of ["'", '"']) {
    const closes = version === "2.0" ? [mark] : [`${mark} `, `${mark}\t`];
    if (!closes.some((end) => text.includes(end))) return mark + text + mark;
  }
  return null;
}

/** A table key with its colon. */
function formatKey(key: string): string {
  requireCharacters(key, "2.0");
  for (const mark of ["'", '"', "'''", '"""']) {
    const fits = mark.length === 3 || !key.includes("\n");
    const ends = key.includes(mark) || key.endsWith(mark[0]!);
    const written = `${mark}${key}${mark}:`;
    if (fits && !ends && written.split("\n").every((line) => line.length <= LONGEST_LINE)) return written;
  }
  const message = `no CIF can hold the table key ${excerpt(key)}`;
  throw new InputProblem("table-key", message, null, "Shorten it, and use one kind of quote in it.");
}

import type { Span } from "../problem.ts";
import { CARRIAGE_RETURN, LINE_FEED } from "./characters.ts";
import { isTriple } from "./strings.ts";
import { decodeField, withPlainLineEnds } from "./text-field.ts";
import type { TokenSource } from "./token-buffer.ts";
import * as Kind from "./token-buffer.ts";

/**
 * A value as written. `unknown` is the unquoted `?`, `inapplicable` the unquoted `.`; the same characters in quotes are
 * text. Lists and tables occur in CIF 2.0 only; a table keeps the order of its entries. Line ends in texts are LF.
 */
export type CifValue =
  | { readonly kind: "unknown"; readonly span: Span }
  | { readonly kind: "inapplicable"; readonly span: Span }
  | { readonly kind: "text"; readonly text: string; readonly quoted: boolean; readonly span: Span }
  | { readonly kind: "list"; readonly items: readonly CifValue[]; readonly span: Span }
  | { readonly kind: "table"; readonly entries: readonly (readonly [string, CifValue])[]; readonly span: Span };

/** Value that begins with token `index`. */
export function valueAt(from: TokenSource, index: number): CifValue {
  const kind = from.tokens.kinds[index]!;
  if (kind === Kind.LIST || kind === Kind.TABLE) return containerAt(from, index);
  return scalarAt(from, index);
}

/** Index of the token after the value that begins with token `index`. */
export function afterValue(from: TokenSource, index: number): number {
  const { kinds } = from.tokens;
  let depth = 0;
  let at = index;
  do {
    const kind = kinds[at]!;
    if (kind === Kind.LIST || kind === Kind.TABLE) depth++;
    else if (kind === Kind.LIST_END || kind === Kind.TABLE_END) depth--;
    at++;
  } while (depth > 0);
  return at;
}

function scalarAt(from: TokenSource, index: number): CifValue {
  const { source, tokens } = from;
  const span = { start: tokens.starts[index]!, end: tokens.ends[index]! };
  if (tokens.kinds[index] !== Kind.WORD) return { kind: "text", text: textOf(from, index), quoted: true, span };
  const text = source.slice(span.start, span.end);
  if (text === "?") return { kind: "unknown", span };
  if (text === ".") return { kind: "inapplicable", span };
  return { kind: "text", text, quoted: false, span };
}

/** Text of a quoted token or key, without its delimiters. */
export function textOf(from: TokenSource, index: number): string {
  const { source, tokens, version } = from;
  const start = tokens.starts[index]!;
  const end = tokens.ends[index]!;
  switch (tokens.kinds[index]) {
    case Kind.QUOTED:
      return source.slice(start + 1, end - 1);
    case Kind.OPEN_QUOTED:
      return source.slice(start + 1, end);
    case Kind.TRIPLE:
      return withPlainLineEnds(source.slice(start + 3, end - 3));
    case Kind.OPEN_TRIPLE:
      return withPlainLineEnds(source.slice(start + 3, end)).replace(/\n$/, "");
    case Kind.FIELD:
      return decodeField(source.slice(start + 1, end - closingLength(source, end)), version);
    case Kind.OPEN_FIELD:
      return decodeField(source.slice(start + 1, end).replace(/(?:\r\n?|\n)$/, ""), version);
    case Kind.KEY:
      if (end - start >= 6 && isTriple(source, start)) return withPlainLineEnds(source.slice(start + 3, end - 3));
      return source.slice(start + 1, end - 1);
    default:
      return source.slice(start, end);
  }
}

/** Length of the line end and semicolon that close a text field ending at `end`. */
function closingLength(source: string, end: number): number {
  const crlf = source.charCodeAt(end - 2) === LINE_FEED && source.charCodeAt(end - 3) === CARRIAGE_RETURN;
  return crlf ? 3 : 2;
}

/** A list or table under construction: its values so far, and for a table the key that waits for its value. */
interface Draft {
  readonly start: number;
  readonly items: CifValue[];
  readonly entries: [string, CifValue][] | null;
  key: string | null;
}

/** Lists and tables, without recursion: nesting is bounded by the length of the file, not by the stack. */
function containerAt(from: TokenSource, index: number): CifValue {
  const { kinds, starts, ends } = from.tokens;
  const open: Draft[] = [];
  for (let at = index; ; at++) {
    const kind = kinds[at]!;
    let value: CifValue;
    if (kind === Kind.LIST || kind === Kind.TABLE) {
      open.push({ start: starts[at]!, items: [], entries: kind === Kind.TABLE ? [] : null, key: null });
      continue;
    }
    if (kind === Kind.KEY) {
      const top = open[open.length - 1]!;
      if (top.entries) top.key = textOf(from, at);
      continue;
    }
    if (kind === Kind.LIST_END || kind === Kind.TABLE_END) {
      const { start, items, entries } = open.pop()!;
      const span = { start, end: ends[at]! };
      value = entries ? { kind: "table", entries, span } : { kind: "list", items, span };
      if (open.length === 0) return value;
    } else value = scalarAt(from, at);
    addTo(open[open.length - 1]!, value);
  }
}

/** Values of a table that have no key are dropped; they were reported when the file was read. */
function addTo(draft: Draft, value: CifValue): void {
  if (!draft.entries) draft.items.push(value);
  else if (draft.key !== null) draft.entries.push([draft.key, value]);
  draft.key = null;
}

import type { CifVersion } from "./token-buffer.ts";

/**
 * Content of text fields and multi-line strings: line ends, line folding and line prefixing.
 * Sources: CIF 1.1 specification, common semantic features, paragraphs on long lines (International Tables for
 * Crystallography G, 2006, section 2.2.7.4); CIF 2.0: H. J. Bernstein, J. C. Bollinger, I. D. Brown, S. Grazulis,
 * J. R. Hester, B. McMahon, N. Spadaccini, J. D. Westbrook, S. P. Westrip, J. Appl. Cryst. 49, 277 (2016).
 */

/** All line ends as LF; a form feed counts as one only in texts that use it so, before a semicolon. */
export function withPlainLineEnds(text: string): string {
  return text.includes("\r") ? text.replace(/\r\n?/g, "\n") : text;
}

/** First line of a folded or prefixed field: the prefix if any, then one or two backslashes. */
const PROTOCOL = /^([^\\;\n][^\\\n]*)?(\\\\?)[ \t]*$/;

/**
 * Text meant by the raw content of a text field (between the opening semicolon and the last line end).
 * Prefixes are a device of CIF 2.0; in CIF 1.1 only folding is undone.
 */
export function decodeField(raw: string, version: CifVersion): string {
  const content = withPlainLineEnds(raw);
  const firstEnd = content.indexOf("\n");
  const first = firstEnd < 0 ? content : content.slice(0, firstEnd);
  if (!first.includes("\\")) return content;
  const match = PROTOCOL.exec(first);
  if (!match) return content;
  const prefix = match[1] ?? "";
  const backslashes = match[2]!.length;
  const rest = firstEnd < 0 ? "" : content.slice(firstEnd + 1);
  if (prefix === "") return backslashes === 1 ? unfold(rest) : content;
  if (version === "1.1") return content;
  const plain = firstEnd < 0 ? "" : withoutPrefix(rest, prefix);
  if (plain === null) return content;
  return backslashes === 2 ? unfold(plain) : plain;
}

/** Joins the lines that end with a backslash, blanks after it ignored. A backslash at the very end stays. */
function unfold(text: string): string {
  return text.replace(/\\[ \t]*\n/g, "");
}

/** Null if a line lacks the prefix: the field only looked like a prefixed one. */
function withoutPrefix(text: string, prefix: string): string | null {
  const lines = text.split("\n");
  for (let i = 0; i < lines.length; i++) {
    if (!lines[i]!.startsWith(prefix)) return null;
    lines[i] = lines[i]!.slice(prefix.length);
  }
  return lines.join("\n");
}

import { InputProblem } from "../problem.ts";
import { excerpt } from "./problem-list.ts";
import type { CifVersion } from "./token-buffer.ts";

/**
 * Content of text fields and multi-line strings: line ends, line folding and line prefixing.
 * Sources: CIF 1.1 specification, common semantic features, paragraphs on long lines (International Tables for
 * Crystallography G, 2006, section 2.2.7.4); CIF 2.0: H. J. Bernstein, J. C. Bollinger, I. D. Brown, S. Grazulis,
 * J. R. Hester, B. McMahon, N. Spadaccini, J. D. Westbrook, S. P. Westrip, J. Appl. Cryst. 49, 277 (2016).
 */

/** All line ends as LF. */
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

/** Longest line that either version allows, in characters. */
export const LONGEST_LINE = 2048;

/** Stands before every line of a field whose content would end it. */
const PREFIX = ">";

/**
 * Text field that holds `text`, from its opening semicolon to its closing one; both stand at the beginning of a line.
 * Folded where a line is too long or the text itself looks folded, prefixed where a line begins with a semicolon.
 * @throws InputProblem if the version has no way to write the text
 */
export function encodeField(text: string, version: CifVersion): string {
  const lines = text.split("\n");
  const room = LONGEST_LINE - PREFIX.length - 1; // also for the semicolon or backslash that joins the line
  const folded = lines.some((line) => line.length > room) || PROTOCOL.test(lines[0]!);
  // A folded field begins on the line after its semicolon, so that its first line counts too.
  const endsField = (line: string, i: number) => line.startsWith(";") && (i > 0 || folded);
  const hardToCut = (line: string) => version === "2.0" && line.length > room && line.includes(";");
  const prefixed = lines.some((line, i) => endsField(line, i) || hardToCut(line));
  if (prefixed && version === "1.1") {
    const hint = "Write CIF 2.0, or indent the line.";
    throw new InputProblem("text-field-end", `no CIF 1.1 can hold ${excerpt(text)}: a line begins with ;`, null, hint);
  }
  if (!folded && !prefixed) return `;${text}\n;`;
  const prefix = prefixed ? PREFIX : "";
  const body = folded ? lines.flatMap((line) => fold(line, room, prefixed)) : lines;
  const head = prefix + (folded && prefixed ? "\\\\" : "\\");
  return `;${head}\n${body.map((line) => prefix + line).join("\n")}\n;`;
}

const ENDS_WITH_BACKSLASH = /\\[ \t]*$/;

/** The pieces of one line, each but the last with its backslash. A line that ends with one gets an empty last piece. */
function fold(line: string, room: number, prefixed: boolean): string[] {
  const pieces: string[] = [];
  let rest = line;
  while (rest.length > room) {
    const cut = cutBefore(rest, room, prefixed);
    pieces.push(`${rest.slice(0, cut)}\\`);
    rest = rest.slice(cut);
  }
  if (ENDS_WITH_BACKSLASH.test(rest)) {
    pieces.push(`${rest}\\`);
    rest = "";
  }
  pieces.push(rest);
  return pieces;
}

/** Largest place up to `room` where a line may be cut: no semicolon begins the next piece, no character is split. */
function cutBefore(line: string, room: number, prefixed: boolean): number {
  for (let cut = room; cut > 0; cut--) {
    const next = line.charCodeAt(cut);
    const splits = next >= 0xdc00 && next < 0xe000;
    if (!splits && (prefixed || line[cut] !== ";")) return cut;
  }
  const message = `no CIF 1.1 can hold ${excerpt(line)}: the line is too long and offers no place to fold it`;
  throw new InputProblem("line-too-long", message, null, "Write CIF 2.0.");
}

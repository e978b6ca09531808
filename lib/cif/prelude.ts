import { BYTE_ORDER_MARK, HASH, isBlank, lineEndFrom } from "./characters.ts";
import { startsStructure } from "./keywords.ts";
import { excerpt, type ProblemList } from "./problem-list.ts";
import type { CifVersion } from "./token-buffer.ts";

const MAGIC_20 = "#\\#CIF_2.0";

/** Offset of the first character after a byte-order mark. */
export function afterByteOrderMark(source: string): number {
  return source.charCodeAt(0) === BYTE_ORDER_MARK ? 1 : 0;
}

/** CIF 2.0 must say so in the first characters of the file; everything else is CIF 1.1. */
export function versionOf(source: string): CifVersion {
  const start = afterByteOrderMark(source);
  const end = start + MAGIC_20.length;
  return source.startsWith(MAGIC_20, start) && (end === source.length || isBlank(source.charCodeAt(end)))
    ? "2.0"
    : "1.1";
}

/**
 * Offset at which the CIF begins. Files carry letters, licences and web pages before their first `data_`; such text is
 * reported once and skipped as far as the first line that begins with a data name or keyword.
 */
export function skipPrelude(source: string, from: number, problems: ProblemList): number {
  const start = firstToken(source, from);
  if (start === source.length || startsStructure(source, start)) return start;
  const body = firstStructuralLine(source, start);
  const end = body < 0 ? source.length : body;
  const text = excerpt(source.slice(start, lineEndFrom(source, start)));
  if (body < 0) {
    const hint = "A CIF has a line that begins with data_ before its first data name.";
    problems.add("no-data-block", `no data block in a text that begins with ${text}`, { start, end }, hint);
  } else {
    const hint = "Remove the text, or put # before each of its lines.";
    problems.add("text-before-block", `text before the first data block: ${text}`, { start, end }, hint);
  }
  return end;
}

/** Offset of the first character that belongs neither to blanks nor to a comment. */
function firstToken(source: string, from: number): number {
  let at = from;
  while (at < source.length) {
    const c = source.charCodeAt(at);
    if (isBlank(c)) at++;
    else if (c === HASH) at = lineEndFrom(source, at);
    else return at;
  }
  return at;
}

/** First line whose first word, blanks aside, is a data name or keyword; prose rarely begins a line so. */
function firstStructuralLine(source: string, from: number): number {
  let at = lineEndFrom(source, from);
  while (at < source.length) {
    while (at < source.length && isBlank(source.charCodeAt(at))) at++;
    if (startsStructure(source, at)) return at;
    at = lineEndFrom(source, at);
  }
  return -1;
}

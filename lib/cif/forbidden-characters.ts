import { InputProblem } from "../problem.ts";
import { BYTE_ORDER_MARK } from "./characters.ts";
import { afterByteOrderMark } from "./prelude.ts";
import { excerpt, type ProblemList } from "./problem-list.ts";
import type { CifVersion } from "./token-buffer.ts";

const BEYOND_PRINTABLE_ASCII = /[^\t\n\r -~]/;

/** Characters that neither version allows: controls, lone surrogates, non-characters, byte-order marks in the text. */
const FORBIDDEN =
  /[^\t\n\r -~\u{a0}-\u{d7ff}\u{e000}-\u{fdcf}\u{fdf0}-\u{fefe}\u{ff00}-\u{fffd}\u{10000}-\u{10ffff}]+/gu;

/**
 * Reports every run of characters that no CIF may contain, and for CIF 1.1, which is ASCII, the first character beyond.
 * One search over the whole text by the engine's own matcher costs a fraction of the scan.
 */
export function reportCharacters(source: string, version: CifVersion, problems: ProblemList): void {
  const from = afterByteOrderMark(source);
  const body = from === 0 ? source : source.slice(from);
  const first = body.search(BEYOND_PRINTABLE_ASCII);
  if (first < 0) return;
  for (const match of body.slice(first).matchAll(FORBIDDEN)) {
    const start = from + first + match.index;
    const name = codeName(match[0]);
    const hint = name === "U+0000" ? "The file may be UTF-16; save it as UTF-8." : "Remove it.";
    const message = `the character ${name} may not occur in a CIF`;
    problems.add("forbidden-character", message, { start, end: start + match[0].length }, hint);
  }
  if (version === "2.0") return;
  const beyondAscii = source.slice(from + first).search(/[^\0-\x7f]/u);
  if (beyondAscii < 0) return;
  const start = from + first + beyondAscii;
  const character = String.fromCodePoint(source.codePointAt(start)!);
  const message = `the character ${codeName(character)} (${character}) is beyond the ASCII of CIF 1.1`;
  const hint = "Begin the file with #\\#CIF_2.0, or write the character in CIF's backslash codes.";
  problems.add("non-ascii-character", message, { start, end: start + character.length }, hint);
}

function codeName(text: string): string {
  const code = text.codePointAt(0) ?? BYTE_ORDER_MARK;
  return `U+${code.toString(16).toUpperCase().padStart(4, "0")}`;
}

/**
 * Refuses text that the version has no characters for.
 * @throws InputProblem naming the first such character
 */
export function requireCharacters(text: string, version: CifVersion): void {
  const at = text.search(version === "1.1" ? BEYOND_PRINTABLE_ASCII : FORBIDDEN);
  if (at < 0) return;
  const character = codeName(text.slice(at));
  const hint = version === "1.1" ? "Write CIF 2.0, or use CIF's backslash codes." : "Remove the character.";
  const message = `no CIF ${version} can hold ${excerpt(text)}: it contains the character ${character}`;
  throw new InputProblem("forbidden-character", message, null, hint);
}

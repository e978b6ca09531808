import type { ParseResult } from "../problem.ts";
import type { CifDocument } from "./block.ts";
import { DocumentBuilder } from "./document-builder.ts";
import { reportCharacters } from "./forbidden-characters.ts";
import { afterByteOrderMark, skipPrelude, versionOf } from "./prelude.ts";
import { ProblemList } from "./problem-list.ts";
import { Scanner } from "./scanner.ts";

/**
 * Reads a CIF 1.1 or 2.0 (the first line of the file decides). Never throws: everything readable is in the document,
 * everything amiss in the list of problems, in the order of the text. A damaged place costs what it holds up to the
 * next data name, loop or block. `requireClean` makes the reading strict. Time and memory are linear in the length.
 * Sources: S. R. Hall, F. H. Allen, I. D. Brown, Acta Cryst. A 47, 655 (1991); International Tables for Crystallography
 * G (2006), chapter 2.2; H. J. Bernstein et al., J. Appl. Cryst. 49, 277 (2016) for CIF 2.0.
 * @example
 * ```ts
 * const { value, problems } = readCif("data_salt _cell_length_a 5.64(1)");
 * findNumb(value.blocks[0]!, "_cell.length_a")!.value; // 5.64
 * problems.length; // 0
 * ```
 */
export function readCif(text: string): ParseResult<CifDocument> {
  const problems = new ProblemList();
  const version = versionOf(text);
  reportCharacters(text, version, problems);
  const start = skipPrelude(text, afterByteOrderMark(text), problems);
  const tokens = new Scanner(text, version, problems).scan(start);
  const blocks = new DocumentBuilder({ source: text, version, tokens }, problems).build();
  return { value: { version, source: text, blocks }, problems: problems.finish() };
}

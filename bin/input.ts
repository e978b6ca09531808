import { readFileSync } from "node:fs";
import { type CifBlock, type CifDocument, decodeCif, findLoop, findValue, readCif } from "../lib/cif/index.ts";
import { InputProblem } from "../lib/problem.ts";
import { problemText } from "../lib/report/index.ts";
import type { Arguments } from "./arguments.ts";
import { LocatedProblem } from "./problems.ts";
import { usageProblem } from "./usage.ts";

/** A file that was read, with its text for the printer of problems. */
export interface Source {
  readonly file: string;
  readonly text: string;
  readonly document: CifDocument;
  /** What was wrong with the encoding or syntax and was read around. */
  readonly problems: readonly InputProblem[];
}

/** Most syntax errors of one file that are shown; the rest is counted. */
const SHOWN_PROBLEMS = 3;

/** Runs `work`, so that an input fault in it is printed with the place in this source, or as one of usage. */
export function blaming<T>(source: Source, work: () => T): T {
  try {
    return work();
  } catch (e) {
    if (!(e instanceof InputProblem)) throw e;
    if (e.code === "tolerance-impossible") throw usageProblem(e); // it stands in no file
    throw new LocatedProblem(problemText(e, source.file, source.text));
  }
}

/**
 * Reads a CIF, `-` from standard input. Syntax errors are told on standard error and read around, unless --strict.
 * @throws LocatedProblem if the file cannot be read, or has an error and --strict is set
 */
export async function readSource(file: string, args: Arguments): Promise<Source> {
  const source = await loadSource(file, args);
  tellProblems(source);
  return source;
}

/** The same, for a command that has its own way of telling what is wrong with the text. */
export async function loadSource(file: string, args: Arguments): Promise<Source> {
  const { text, encoding } = decodeCif(await bytesOf(file));
  const name = file === "-" ? "standard input" : file;
  const { value, problems } = readCif(text);
  if (problems.length > 0 && args.flag("strict")) {
    throw new LocatedProblem(problemText(problems[0]!, name, text));
  }
  const all = encoding === "latin-1" ? [notUtf8(), ...problems] : problems;
  return { file: name, text, document: value, problems: all };
}

function notUtf8(): InputProblem {
  return new InputProblem("encoding", "not UTF-8; read as Latin-1", null, "Save the file as UTF-8.");
}

/** The first faults of a text on standard error, the rest counted. */
export function tellProblems({ file, text, problems }: Source): void {
  for (const problem of problems.slice(0, SHOWN_PROBLEMS)) tell(problemText(problem, file, text));
  if (problems.length > SHOWN_PROBLEMS) tell(`${file}: ${problems.length - SHOWN_PROBLEMS} more syntax errors`);
}

/** @throws LocatedProblem if the file cannot be read; `-` is standard input */
export async function bytesOf(file: string): Promise<Uint8Array> {
  try {
    if (file !== "-") return readFileSync(file);
    const chunks: Buffer[] = [];
    for await (const chunk of process.stdin) chunks.push(chunk as Buffer);
    return Buffer.concat(chunks);
  } catch (e) {
    const code = (e as NodeJS.ErrnoException).code;
    if (code === "ENOENT") throw new LocatedProblem(`${file}: there is no such file; check the path`);
    if (code === "EISDIR") throw new LocatedProblem(`${file}: this is a folder; name a file in it`);
    if (code === "EACCES" || code === "EPERM") throw new LocatedProblem(`${file}: not readable with your permissions`);
    throw e;
  }
}

function tell(text: string): void {
  process.stderr.write(`${text}\n`);
}

/** The block to answer from, and a note where there was a choice. */
export interface ChosenBlock {
  readonly block: CifBlock;
  readonly notes: readonly string[];
}

/**
 * The block that --block names, by name or by number from 1; else the first with a cell and atoms, else the first.
 * @throws LocatedProblem if there is none
 */
export function chooseBlock(source: Source, args: Arguments): ChosenBlock {
  const blocks = source.document.blocks;
  if (blocks.length === 0) {
    throw new LocatedProblem(`${source.file}: no data block in it; a CIF starts one with data_NAME`);
  }
  const wanted = args.text("block");
  if (wanted !== null) return { block: namedBlock(source, wanted), notes: [] };
  const structures = blocks.filter(holdsStructure);
  const block = structures[0] ?? blocks[0]!;
  if (structures.length < 2) return { block, notes: [] };
  const others = structures.slice(1, 6).map((b) => b.name);
  const more = structures.length > 6 ? ` and ${structures.length - 6} more` : "";
  return {
    block,
    notes: [
      `${structures.length} blocks hold a structure; this is the first, others with --block: ${others.join(", ")}${more}`,
    ],
  };
}

function namedBlock(source: Source, wanted: string): CifBlock {
  const blocks = source.document.blocks;
  const byName = blocks.find((b) => b.name.toLowerCase() === wanted.toLowerCase());
  const found = byName ?? (/^\d+$/.test(wanted) ? blocks[Number(wanted) - 1] : undefined);
  if (found) return found;
  const names = blocks.slice(0, 12).map((b) => b.name);
  throw new LocatedProblem(
    `${source.file}: no block "${wanted}"; it has ${names.join(", ")}${blocks.length > 12 ? ` and ${blocks.length - 12} more` : ""}`,
  );
}

function holdsStructure(block: CifBlock): boolean {
  return findValue(block, "_cell.length_a") !== null && findLoop(block, "_atom_site.label") !== null;
}

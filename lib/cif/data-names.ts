import type { CifBlock } from "./block.ts";
import type { CifLoop } from "./loop.ts";
import { type Numb, numbOf } from "./numb.ts";
import { ALIASES } from "./tables/aliases.ts";
import type { CifValue } from "./value.ts";

/** Names remembered at most; more than the table has, so that only foreign names ever fill it. */
const MOST_REMEMBERED = 5000;

/** The table in lower case, a line end before every line; and the lines found so far, as their names, by each name. */
let table = "";
const found = new Map<string, readonly string[]>();

/** Names of one quantity, canonical one first; a line of the table is taken apart when one of its names is asked for. */
function namesOf(name: string): readonly string[] {
  const lower = name.toLowerCase();
  const known = found.get(lower);
  if (known) return known;
  table ||= ALIASES.toLowerCase();
  const at = lineOf(lower);
  const names =
    at < 0 ? [lower, underscored(lower)] : withUnderscores(table.slice(at, table.indexOf("\n", at)).split(" "));
  const canonical = names[0]!;
  const shared = found.get(canonical) ?? names;
  if (found.size >= MOST_REMEMBERED) found.clear();
  found.set(canonical, shared);
  found.set(lower, shared);
  return shared;
}

/** Offset of the table's line that holds the name, or, with a point for one of its underscores, begins with it; or -1. */
function lineOf(name: string): number {
  const word = wordFrom(name);
  if (word >= 0) return table.lastIndexOf("\n", word) + 1;
  for (let i = name.indexOf("_", 1); i > 0; i = name.indexOf("_", i + 1)) {
    const dotted = wordFrom(`${name.slice(0, i)}.${name.slice(i + 1)}`);
    if (dotted >= 0 && table[dotted - 1] === "\n") return dotted;
  }
  return -1;
}

/** Offset of a whole word in the table, or -1. */
function wordFrom(word: string): number {
  for (let at = table.indexOf(word); at >= 0; at = table.indexOf(word, at + 1)) {
    const after = table[at + word.length];
    if ((table[at - 1] === " " || table[at - 1] === "\n") && (after === " " || after === "\n")) return at;
  }
  return -1;
}

function withUnderscores([canonical, ...others]: readonly string[]): readonly string[] {
  return [canonical!, underscored(canonical!), ...others];
}

/** The form of a dotted name in dictionaries before DDLm: `_cell.length_a` is `_cell_length_a`. */
function underscored(name: string): string {
  return name.replace(".", "_");
}

/**
 * Dotted name, in lower case, of the quantity that a data name stands for; the name itself, in lower case, where it is
 * not in the table of aliases.
 */
export function canonicalName(name: string): string {
  return namesOf(name)[0]!;
}

/** All equivalent names in lower case, the canonical one first. A name outside the table has its two plain forms. */
export function aliasesOf(name: string): readonly string[] {
  return namesOf(name);
}

/** A value found under one of its names. */
export interface FoundValue {
  readonly value: CifValue;
  /** The data name as written in the file. */
  readonly name: string;
}

/**
 * Value of a quantity under any of its names: `findValue(block, "_cell.length_a")` finds `_cell_length_a`. Of several
 * names in the block the first with a known value counts; if all are `?` or `.`, the first. For a column of a loop, the
 * value in its first row.
 */
export function findValue(block: CifBlock, name: string): FoundValue | null {
  let unknown: FoundValue | null = null;
  for (const alias of aliasesOf(name)) {
    const value = block.get(alias);
    if (!value) continue;
    const found = { value, name: nameAsWritten(block, alias) };
    if (value.kind !== "unknown" && value.kind !== "inapplicable") return found;
    unknown ??= found;
  }
  return unknown;
}

/**
 * Number of a quantity under any of its names. A standard uncertainty written as an item of its own
 * (`_cell.length_a_su`, in mmCIF `_cell.length_a_esd`) is joined where the number carries none.
 */
export function findNumb(block: CifBlock, name: string): Numb | null {
  const numb = numbOf(findValue(block, name)?.value ?? null);
  if (!numb || numb.su !== null) return numb;
  return withSu(numb, numbOf(findValue(block, `${canonicalName(name)}_su`)?.value ?? null));
}

/** A negative uncertainty is no uncertainty. */
function withSu(numb: Numb, su: Numb | null): Numb {
  return su && su.value >= 0 ? { ...numb, su: su.value } : numb;
}

function nameAsWritten(block: CifBlock, name: string): string {
  const span = block.nameSpan(name);
  return span ? block.source.slice(span.start, span.end) : name;
}

/**
 * Loop that holds a quantity under any of its names. A category of a single row is often written without `loop_`; its
 * items are presented as a loop of one row.
 */
export function findLoop(block: CifBlock, name: string): CifLoop | null {
  const aliases = aliasesOf(name);
  for (const alias of aliases) {
    const loop = block.loop(alias);
    if (loop) return loop;
  }
  return aliases.some((alias) => block.has(alias)) ? singleRow(block, categoryOf(name)) : null;
}

function categoryOf(name: string): string {
  return canonicalName(name).split(".", 1)[0]!;
}

/** The unlooped items of a category as a loop of one row. */
function singleRow(block: CifBlock, category: string): CifLoop {
  const names = block.names().filter((name) => categoryOf(name) === category && block.loop(name) === null);
  const start = Math.min(...names.map((name) => block.nameSpan(name)!.start));
  const end = Math.max(...names.map((name) => block.get(name)!.span.end));
  const lower = names.map((name) => name.toLowerCase());
  const columnIndex = (name: string) => lower.indexOf(name.toLowerCase());
  const at = (row: number, column: number) => (row === 0 ? block.get(names[column] ?? "") : null);
  return {
    names,
    rowCount: 1,
    span: { start, end },
    has: (name) => columnIndex(name) >= 0,
    columnIndex,
    at,
    value: (row, name) => at(row, columnIndex(name)),
  };
}

/** The name, as written, under which this loop holds a quantity, or null. */
export function columnName(loop: CifLoop, name: string): string | null {
  for (const alias of aliasesOf(name)) {
    const column = loop.columnIndex(alias);
    if (column >= 0) return loop.names[column]!;
  }
  return null;
}

/** Value of a quantity in a row of a loop, under any of its names. */
export function cellOf(loop: CifLoop, row: number, name: string): CifValue | null {
  const written = columnName(loop, name);
  return written === null ? null : loop.value(row, written);
}

/** Number in a row of a loop, a standard uncertainty in a column of its own joined. */
export function numbInLoop(loop: CifLoop, row: number, name: string): Numb | null {
  const numb = numbOf(cellOf(loop, row, name));
  if (!numb || numb.su !== null) return numb;
  return withSu(numb, numbOf(cellOf(loop, row, `${canonicalName(name)}_su`)));
}

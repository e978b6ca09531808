import type { CifBlock } from "./block.ts";
import type { CifLoop } from "./loop.ts";
import { type Numb, numbOf } from "./numb.ts";
import { ALIASES } from "./tables/aliases.ts";
import type { CifValue } from "./value.ts";

/** Every name by its lower-case canonical name, and the canonical name of every alias. */
interface NameTable {
  readonly aliases: ReadonlyMap<string, readonly string[]>;
  readonly canonical: ReadonlyMap<string, string>;
}

let table: NameTable | null = null;

function nameTable(): NameTable {
  table ??= decode(ALIASES);
  return table;
}

function decode(text: string): NameTable {
  const aliases = new Map<string, readonly string[]>();
  const canonical = new Map<string, string>();
  for (const line of text.toLowerCase().split("\n")) {
    if (line === "") continue;
    const [name, ...others] = line.split(" ");
    const all = [name!, underscored(name!), ...others];
    aliases.set(name!, all);
    for (const alias of all) canonical.set(alias, name!);
  }
  return { aliases, canonical };
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
  const lower = name.toLowerCase();
  return nameTable().canonical.get(lower) ?? lower;
}

/** All equivalent names in lower case, the canonical one first. A name outside the table has its two plain forms. */
export function aliasesOf(name: string): readonly string[] {
  const canonical = canonicalName(name);
  return nameTable().aliases.get(canonical) ?? [canonical, underscored(canonical)];
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

import type { WritableBlock, WritableItem } from "../../lib/cif/index.ts";
import { type CifBlock, type CifValue, readCif } from "../../lib/cif/index.ts";
import { locate } from "../../lib/problem.ts";

/** Values in a short form for comparison: text as a string, `?` and `.` as themselves in an object. */
export type Plain = string | { readonly mark: "?" | "." } | readonly Plain[] | { readonly entries: readonly unknown[] };

export function plain(value: CifValue | null): Plain | null {
  switch (value?.kind) {
    case undefined:
      return null;
    case "unknown":
      return { mark: "?" };
    case "inapplicable":
      return { mark: "." };
    case "text":
      return value.text;
    case "list":
      return value.items.map((item) => plain(item)!);
    case "table":
      return { entries: value.entries.map(([key, item]) => [key, plain(item)]) };
  }
}

/** Everything in a block: single items, loops, frames. */
export function content(block: CifBlock): unknown {
  const items = block
    .names()
    .filter((name) => !block.loop(name))
    .map((name) => [name, plain(block.get(name))]);
  const loops = block.loops().map((loop) => ({
    names: loop.names,
    rows: Array.from({ length: loop.rowCount }, (_, r) => loop.names.map((_, c) => plain(loop.at(r, c)))),
  }));
  return { name: block.name, items, loops, frames: block.frames.map(content) };
}

/** The same block as data for the writer. */
export function writable(block: CifBlock): WritableBlock {
  const singles: WritableItem[] = block
    .names()
    .filter((name) => !block.loop(name))
    .map((name) => ({ kind: "item", name, value: block.get(name)! }));
  const loops: WritableItem[] = block
    .loops()
    .filter((loop) => loop.rowCount > 0)
    .map((loop) => ({
      kind: "loop",
      names: loop.names,
      rows: Array.from({ length: loop.rowCount }, (_, r) => loop.names.map((_, c) => loop.at(r, c)!)),
    }));
  return { name: block.name, items: [...singles, ...loops], frames: block.frames.map(writable) };
}

/** First block of a text that must be without fault. */
export function cleanBlock(text: string): CifBlock {
  const { value, problems } = readCif(text);
  if (problems.length > 0) throw problems[0]!;
  return value.blocks[0]!;
}

/** Value of `_x` in a text that must be without fault. */
export function cleanValue(text: string): Plain | null {
  return plain(cleanBlock(text).get("_x"));
}

/** Faults as "code line:column", with the text the span covers. */
export function faults(text: string): readonly (readonly [string, string])[] {
  return readCif(text).problems.map((problem) => {
    const place = locate(text, problem.span!.start);
    const covered = text.slice(problem.span!.start, problem.span!.end);
    return [`${problem.code} ${place.line}:${place.column}`, covered] as const;
  });
}

export const CIF2 = "#\\#CIF_2.0\n";

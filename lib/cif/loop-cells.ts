import { hasLineEnd } from "./characters.ts";
import type { LoopCells } from "./loop.ts";
import type { TokenSource } from "./token-buffer.ts";
import * as Kind from "./token-buffer.ts";
import { afterValue } from "./value.ts";

/** Cells of a loop, and if its values do not fill its rows, how many there are and where it goes wrong first. */
export interface LoopShape {
  readonly cells: LoopCells;
  readonly valueCount: number;
  /** First token of the values that do not fit, and the token after them; null in a sound loop. */
  readonly misfit: { readonly first: number; readonly after: number; readonly onLine: boolean } | null;
}

/**
 * Lays the values in the tokens [first, after) out in rows of `columnCount`. If their number is no multiple of it and
 * the rows stand on lines of their own, the lines that hold whole rows are kept and the others left out, since one
 * value lost or gained would shift all that follow into foreign columns. Otherwise the rows that can be filled are kept.
 */
export function layOut(from: TokenSource, first: number, after: number, columnCount: number): LoopShape {
  const starts = valueStarts(from, first, after);
  const valueCount = starts ? starts.length : after - first;
  const rowCount = Math.floor(valueCount / columnCount);
  const cells = { rowCount, columnCount, starts, first };
  const left = valueCount - rowCount * columnCount;
  if (left === 0) return { cells, valueCount, misfit: null };
  const byLine = starts ? null : alignByLine(from, first, after, columnCount);
  if (byLine) return { ...byLine, valueCount };
  const begin = valueCount - left;
  return { cells, valueCount, misfit: { first: starts ? starts[begin]! : first + begin, after, onLine: false } };
}

/** First token of each value if some value is a list or table, else null: then every token is a value. */
function valueStarts(from: TokenSource, first: number, after: number): Int32Array | null {
  const { kinds } = from.tokens;
  let at = first;
  while (at < after && kinds[at]! < Kind.LIST) at++;
  if (at === after) return null;
  const starts = new Int32Array(after - first);
  let count = 0;
  for (at = first; at < after; at = afterValue(from, at)) starts[count++] = at;
  return starts.slice(0, count);
}

/**
 * Layout by lines, or null if lines are no rows here: some value is longer than a line, or less than half of the lines
 * hold whole rows. If all lines agree in another number of values than there are names, no value can be told its name
 * and no row is given.
 */
function alignByLine(
  from: TokenSource,
  first: number,
  after: number,
  columnCount: number,
): Omit<LoopShape, "valueCount"> | null {
  const lines = lineStarts(from, first, after);
  if (!lines) return null;
  const kept: number[] = [];
  const lengths = new Set<number>();
  let wholeLines = 0;
  let misfit: LoopShape["misfit"] = null;
  for (let i = 0; i + 1 < lines.length; i++) {
    const start = lines[i]!;
    const next = lines[i + 1]!;
    lengths.add(next - start);
    if ((next - start) % columnCount === 0) {
      wholeLines++;
      for (let at = start; at < next; at++) kept.push(at);
    } else misfit ??= { first: start, after: next, onLine: true };
  }
  const [length] = lengths;
  const otherLength = lines.length > 2 && lengths.size === 1 && columnCount % length! !== 0;
  if (2 * wholeLines < lines.length - 1 && !otherLength) return null;
  const cells = { rowCount: kept.length / columnCount, columnCount, starts: Int32Array.from(kept), first };
  return { cells, misfit };
}

/** First token of every line and, last, `after`; null if a value spans lines. */
function lineStarts(from: TokenSource, first: number, after: number): readonly number[] | null {
  const { kinds, starts, ends } = from.tokens;
  const lines: number[] = [];
  for (let at = first; at < after; at++) {
    if (kinds[at] === Kind.FIELD || kinds[at] === Kind.TRIPLE) return null;
    if (at === first || hasLineEnd(from.source, ends[at - 1]!, starts[at]!)) lines.push(at);
  }
  lines.push(after);
  return lines;
}

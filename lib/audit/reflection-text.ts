import type { IntVec3 } from "../algebra/index.ts";
import { MANY_REFLECTIONS, type Reflection } from "./reflection-list.ts";

/** A list found in a text. */
export interface TextReflections {
  readonly reflections: readonly Reflection[];
  /** Lines that belong to overlapping reflections and were left out. */
  readonly overlapping: number;
  /** Whether the lines are in columns of fixed width or divided by blanks. */
  readonly columns: "fixed" | "free";
}

interface Row extends Reflection {
  /** Number after the uncertainty, a batch or a twin component; null where there is none. */
  readonly batch: number | null;
}

/**
 * Reads lines of h k l, value, uncertainty and perhaps a batch number, divided by blanks or in the columns 3i4, 2f8, i4;
 * null for any other text. Recognised by content: reading starts at the first such line and ends with indices 0 0 0 or at
 * the first line of another kind, and at least MANY_REFLECTIONS lines must have been read.
 */
export function readReflectionText(text: string): TextReflections | null {
  const lines = text.split(/\r\n?|\n/);
  const start = lines.findIndex((line) => freeRow(line) || fixedRow(line));
  if (start < 0) return null;
  const free = rowsFrom(lines, start, freeRow);
  // a fixed column may touch the next: then reading by blanks ends early
  const fixed = free.ended ? free : rowsFrom(lines, start, fixedRow);
  const columns = fixed.rows.length > free.rows.length ? "fixed" : "free";
  const rows = columns === "fixed" ? fixed.rows : free.rows;
  if (rows.length < MANY_REFLECTIONS) return null;
  const single = withoutOverlaps(rows);
  return { reflections: single, overlapping: rows.length - single.length, columns };
}

/** Rows up to the end mark 0 0 0 (`ended`) or to a line that is none; blank lines at the end do not matter. */
function rowsFrom(lines: readonly string[], start: number, read: (line: string) => Row | null) {
  const rows: Row[] = [];
  for (let i = start; i < lines.length; i++) {
    const row = read(lines[i]!);
    if (row?.h.every((e) => e === 0)) return { rows, ended: true };
    if (!row) return { rows, ended: lines.slice(i).every((line) => line.trim() === "") };
    rows.push(row);
  }
  return { rows, ended: true };
}

const INTEGER = /^[+-]?\d+$/;
const DECIMAL = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;

function freeRow(line: string): Row | null {
  const words = line.trim().split(/[\s,]+/);
  return words.length < 5 || words.length > 8 ? null : row(words);
}

function fixedRow(line: string): Row | null {
  if (line.length < 21) return null;
  const ends = [0, 4, 8, 12, 20, 28, 32];
  const words = ends.slice(1).map((end, i) => line.slice(ends[i]!, end).trim());
  return row(words[5] === "" ? words.slice(0, 5) : words);
}

function row(words: readonly string[]): Row | null {
  const [h, k, l, value, sigma, batch] = words;
  if (![h, k, l].every((w) => INTEGER.test(w!)) || ![value, sigma].every((w) => DECIMAL.test(w!))) return null;
  if (batch !== undefined && !DECIMAL.test(batch)) return null;
  const index = [h, k, l].map((w) => Number(w) + 0) as unknown as IntVec3;
  return { h: index, value: Number(value), sigma: Number(sigma), batch: batch === undefined ? null : Number(batch) };
}

/** Twin components whose reflections overlap stand in a run of negative batch numbers that a positive one closes. */
function withoutOverlaps(rows: readonly Row[]): Reflection[] {
  const kept: Reflection[] = [];
  let open = false;
  for (const { h, value, sigma, batch } of rows) {
    const negative = batch !== null && batch < 0;
    if (!negative && !open) kept.push({ h, value, sigma });
    open = negative;
  }
  return kept;
}

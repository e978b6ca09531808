import { InputProblem } from "../problem.ts";
import type { Interval } from "./expanded-atoms.ts";

export type CoordinateRange = readonly [Interval, Interval, Interval];

/**
 * Reads a range of fractional coordinates, `0:1,0:1,-0.5:0.5`.
 * @throws InputProblem `range-unreadable`
 * @example
 * ```ts
 * parseRange("0:1,0:1,-0.5:0.5")[2]; // [-0.5, 0.5]
 * formatRange([[0, 1], [0, 1], [0, 2]]); // "0:1,0:1,0:2"
 * ```
 */
export function parseRange(text: string): CoordinateRange {
  const parts = text.split(",").map((part) => part.split(":").map((e) => (e.trim() === "" ? Number.NaN : Number(e))));
  if (parts.length === 3 && parts.every((p) => p.length === 2 && p.every(Number.isFinite))) {
    return parts as unknown as CoordinateRange;
  }
  throw new InputProblem(
    "range-unreadable",
    `"${text}" is no range of coordinates`,
    { start: 0, end: text.length },
    "give from and to for each axis, as in 0:1,0:1,-0.5:0.5",
  );
}

/** Inverse of `parseRange`. */
export function formatRange(range: CoordinateRange): string {
  return range.map(([from, to]) => `${from}:${to}`).join(",");
}

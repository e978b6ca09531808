import { blankFrom, isLineEnd, lineEndFrom, UNDERSCORE } from "./characters.ts";
import { BLOCK, FRAME, FRAME_END, GLOBAL, LOOP, STOP } from "./token-buffer.ts";

/** Token kind of the word [start, end) if it is a keyword in any mixture of capitals, or 0. */
export function keywordKind(source: string, start: number, end: number): number {
  const length = end - start;
  if (length < 5) return 0;
  if (source.charCodeAt(start + 4) === UNDERSCORE) {
    const head = source.slice(start, start + 5).toLowerCase();
    if (head === "data_") return BLOCK;
    if (head === "save_") return length === 5 ? FRAME_END : FRAME;
    if (length === 5 && head === "loop_") return LOOP;
    if (length === 5 && head === "stop_") return STOP;
  } else if (length === 7 && source.slice(start, end).toLowerCase() === "global_") return GLOBAL;
  return 0;
}

/** True if a data name or a keyword other than `stop_` and `global_` begins exactly at `at`. */
export function startsStructure(source: string, at: number): boolean {
  if (source.charCodeAt(at) === UNDERSCORE) return source.charCodeAt(at + 1) > 32;
  const kind = source.charCodeAt(at + 4) === UNDERSCORE ? keywordKind(source, at, blankFrom(source, at)) : 0;
  return kind !== 0 && kind !== STOP;
}

/** Offset of the first line in [from, to) that begins with a data name or keyword in its first column, or -1. */
export function structuralLine(source: string, from: number, to: number): number {
  let at = lineEndFrom(source, from) + 1;
  while (at < to) {
    if (!isLineEnd(source.charCodeAt(at)) && startsStructure(source, at)) return at;
    at = lineEndFrom(source, at) + 1;
  }
  return -1;
}

import { excerpt, type ProblemList } from "./problem-list.ts";
import type { TokenSource } from "./token-buffer.ts";
import * as Kind from "./token-buffer.ts";
import { textOf } from "./value.ts";

/** One open bracket: the keys met in a table (null in a list), and the key token that waits for its value, or -1. */
interface OpenBracket {
  readonly keys: Set<string> | null;
  waiting: number;
}

/** Reports what is wrong inside the brackets of the tokens [first, after), whose brackets balance. */
export function checkTables(from: TokenSource, first: number, after: number, problems: ProblemList): void {
  const { kinds, starts, ends } = from.tokens;
  const open: OpenBracket[] = [];
  for (let at = first; at < after; at++) {
    const kind = kinds[at]!;
    const top = open[open.length - 1];
    if (kind === Kind.KEY) checkKey(from, at, top!, problems);
    else if (kind === Kind.LIST_END || kind === Kind.TABLE_END) {
      if (top!.waiting >= 0) reportLoneKey(from, top!.waiting, problems);
      open.pop();
    } else {
      if (top?.keys && top.waiting < 0) {
        const span = { start: starts[at]!, end: ends[at]! };
        const message = `the table value ${excerpt(from.source.slice(span.start, span.end))} has no key`;
        problems.add("table-key", message, span, "Write 'key':value, the key in quotes and the colon next to it.");
      }
      if (top) top.waiting = -1;
      if (kind === Kind.LIST || kind === Kind.TABLE) {
        open.push({ keys: kind === Kind.TABLE ? new Set() : null, waiting: -1 });
      }
    }
  }
}

function checkKey(from: TokenSource, at: number, top: OpenBracket, problems: ProblemList): void {
  const span = { start: from.tokens.starts[at]!, end: from.tokens.ends[at]! };
  const key = textOf(from, at);
  if (!top.keys) {
    const hint = "Lists have no keys; use braces for a table.";
    problems.add("table-key", `the key ${excerpt(key)} stands in a list`, span, hint);
    return;
  }
  if (top.waiting >= 0) reportLoneKey(from, top.waiting, problems);
  if (top.keys.has(key)) {
    problems.add("duplicate-key", `the key ${excerpt(key)} occurs before in this table`, span, "Rename one of them.");
  }
  top.keys.add(key);
  top.waiting = at;
}

function reportLoneKey(from: TokenSource, at: number, problems: ProblemList): void {
  const span = { start: from.tokens.starts[at]!, end: from.tokens.ends[at]! };
  const message = `the key ${excerpt(textOf(from, at))} has no value`;
  problems.add("table-key", message, span, "Write ? for an unknown value.");
}

import fc from "fast-check";
import type { CifVersion, WritableBlock, WritableItem, WritableValue } from "../../lib/cif/index.ts";

const ASCII = Array.from({ length: 95 }, (_, i) => String.fromCharCode(32 + i));

/** Pieces that quoting, folding and prefixing stumble over. */
const TRICKY = [
  "'",
  '"',
  "' ",
  '" ',
  "'''",
  '"""',
  "\n",
  "\n\n",
  ";",
  "\\",
  "\\ ",
  " ",
  "\t",
  "#",
  "_",
  "[",
  "]",
  "{",
  "}",
  ":",
];
const WORDS = ["?", ".", "loop_", "data_x", "SAVE_", "global_", "stop_", "1.2(3)", "$a", ">\\", ";\\", "x\\\\"];
const BEYOND = ["Å", "−", "π", "𐘾", "\u00a0"];

/** A text of the characters the version has; in CIF 1.1 no line but the first begins with a semicolon. */
export function text(version: CifVersion): fc.Arbitrary<string> {
  const pieces = [...TRICKY, ...WORDS, ...(version === "2.0" ? [...BEYOND, "\n;"] : [])];
  const piece = fc.oneof(
    fc.constantFrom(...pieces),
    fc.constantFrom(...ASCII),
    fc.string({ maxLength: 8 }).map(printable),
  );
  const short = fc.array(piece, { maxLength: 12 }).map((parts) => parts.join(""));
  const long = fc
    .tuple(short, fc.integer({ min: 1, max: 5000 }), fc.constantFrom("a", "ab ", "\\", "'\"", "x;"))
    .map(([head, length, unit]) => head + unit.repeat(Math.ceil(length / unit.length)));
  const any = fc.oneof({ weight: 8, arbitrary: short }, { weight: 1, arbitrary: long });
  return version === "2.0" ? any : any.map((t) => t.replace(/(^|\n);+/g, "$1"));
}

function printable(t: string): string {
  return t.replace(/[^ -~]/g, "-");
}

function scalar(version: CifVersion): fc.Arbitrary<WritableValue> {
  return fc.oneof(
    { weight: 1, arbitrary: fc.constant({ kind: "unknown" as const }) },
    { weight: 1, arbitrary: fc.constant({ kind: "inapplicable" as const }) },
    {
      weight: 6,
      arbitrary: fc.record({ kind: fc.constant("text" as const), text: text(version), quoted: fc.boolean() }),
    },
  );
}

export function value(version: CifVersion): fc.Arbitrary<WritableValue> {
  if (version === "1.1") return scalar(version);
  const key = text("2.0").map((t) => t.slice(0, 500).replace(/'''/g, "-").replace(/'$/, "-"));
  const { any } = fc.letrec<{ any: WritableValue }>((tie) => ({
    any: fc.oneof(
      { depthSize: "small", withCrossShrink: true },
      scalar("2.0"),
      fc.record({ kind: fc.constant("list" as const), items: fc.array(tie("any"), { maxLength: 4 }) }),
      fc.record({
        kind: fc.constant("table" as const),
        entries: fc.uniqueArray(fc.tuple(key, tie("any")), { maxLength: 4, selector: ([k]) => k }),
      }),
    ),
  }));
  return any;
}

const tail = fc.string({ minLength: 1, maxLength: 10 }).map((t) => t.replace(/[^!-~]/g, "-"));

/** Distinct data names, shared out over single items and loops. */
function items(version: CifVersion): fc.Arbitrary<WritableItem[]> {
  const names = fc.uniqueArray(tail, { maxLength: 8, selector: (t) => t.toLowerCase() });
  return names.chain((tails) => {
    const split = fc.array(fc.boolean(), { minLength: tails.length, maxLength: tails.length });
    return split.chain((looped) => {
      const single = tails.filter((_, i) => !looped[i]).map((t) => `_${t}`);
      const columns = tails.filter((_, i) => looped[i]).map((t) => `_${t}`);
      const values = fc.array(value(version), { minLength: single.length, maxLength: single.length });
      const row = fc.array(value(version), { minLength: columns.length, maxLength: columns.length });
      const rows = fc.array(row, { minLength: 1, maxLength: 5 });
      return fc.tuple(values, rows).map(([v, r]) => {
        const list: WritableItem[] = single.map((name, i) => ({ kind: "item", name, value: v[i]! }));
        if (columns.length > 0) list.push({ kind: "loop", names: columns, rows: r });
        return list;
      });
    });
  });
}

/** Blocks of distinct names, with save frames; nested ones in CIF 2.0. */
export function blocks(version: CifVersion): fc.Arbitrary<WritableBlock[]> {
  const frameNames = fc.uniqueArray(tail, { maxLength: 2, selector: (t) => t.toLowerCase() });
  const frames = (depth: number): fc.Arbitrary<WritableBlock[]> =>
    frameNames.chain((names) => fc.tuple(...names.map((name) => block(name, depth))));
  const block = (name: string, depth: number): fc.Arbitrary<WritableBlock> =>
    fc
      .tuple(items(version), depth > 0 ? frames(depth - 1) : fc.constant([]))
      .map(([list, inner]) => ({ name, items: list, frames: inner }));
  return fc
    .uniqueArray(tail, { minLength: 1, maxLength: 3, selector: (t) => t.toLowerCase() })
    .chain((names) => fc.tuple(...names.map((name) => block(name, version === "2.0" ? 2 : 1))));
}

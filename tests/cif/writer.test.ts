import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  type CifValue,
  type CifVersion,
  readCif,
  type WritableBlock,
  type WritableValue,
  writeCif,
} from "../../lib/cif/index.ts";
import { InputProblem } from "../../lib/problem.ts";
import { blocks } from "./arbitrary.ts";
import { cleanBlock, content, writable } from "./plain.ts";

const VERSIONS: readonly CifVersion[] = ["1.1", "2.0"];

/** The block of one item `_x`, written. */
const written = (value: WritableValue, version: CifVersion) =>
  writeCif([{ name: "a", items: [{ kind: "item", name: "_x", value }] }], version);

/** What stands behind `_x`. */
function form(value: WritableValue, version: CifVersion): string {
  const text = written(value, version);
  return text.slice(text.indexOf("_x") + 2).trim();
}

/** A value as the writer was given it: without span, texts always with their mark of quotes. */
function bare(value: CifValue): WritableValue {
  switch (value.kind) {
    case "unknown":
    case "inapplicable":
      return { kind: value.kind };
    case "text":
      return { kind: "text", text: value.text, quoted: value.quoted };
    case "list":
      return { kind: "list", items: value.items.map(bare) };
    case "table":
      return { kind: "table", entries: value.entries.map(([key, item]) => [key, bare(item)]) };
  }
}

/** Texts asked to be unquoted may come back quoted, since their content decides. */
function withoutMarks(value: WritableValue): unknown {
  if (typeof value === "string") return value;
  if (value.kind === "text") return { text: value.text, ...(value.quoted ? { quoted: true } : {}) };
  if (value.kind === "list") return value.items.map(withoutMarks);
  if (value.kind === "table") return { entries: value.entries.map(([key, item]) => [key, withoutMarks(item)]) };
  return value.kind;
}

describe.each(VERSIONS)("writing CIF %s", (version) => {
  it("and reading it is the identity on names and values, and the text is without fault", () => {
    fc.assert(
      fc.property(blocks(version), (given) => {
        const text = writeCif(given, version);
        const { value, problems } = readCif(text);
        expect(problems).toEqual([]);
        expect(value.version).toBe(version);
        const same = (read: readonly WritableBlock[], wanted: readonly WritableBlock[]) => {
          expect(read.map((b) => b.name)).toEqual(wanted.map((b) => b.name));
          for (const [i, block] of wanted.entries()) {
            expect(read[i]!.items.length).toBe(block.items.length);
            for (const [j, item] of block.items.entries()) sameItem(read[i]!.items[j]!, item);
            same(read[i]!.frames ?? [], block.frames ?? []);
          }
        };
        same(value.blocks.map(writable), given);
        for (const line of text.split("\n")) expect(line.length).toBeLessThanOrEqual(2048);
        expect(writeCif(value.blocks.map(writable), version)).toBe(text);
      }),
      { numRuns: 150 },
    );
  });

  function sameItem(read: WritableBlock["items"][number], wanted: WritableBlock["items"][number]): void {
    if (read.kind === "item" && wanted.kind === "item") {
      expect(read.name).toBe(wanted.name);
      sameValue(read.value, wanted.value);
    } else if (read.kind === "loop" && wanted.kind === "loop") {
      expect(read.names).toEqual(wanted.names);
      expect(read.rows.length).toBe(wanted.rows.length);
      for (const [r, row] of wanted.rows.entries())
        for (const [c, value] of row.entries()) sameValue(read.rows[r]![c]!, value);
    } else expect(read.kind).toBe(wanted.kind);
  }

  function sameValue(read: WritableValue, wanted: WritableValue): void {
    const [got, want] = [bare(read as CifValue), wanted].map(withoutMarks);
    expect(JSON.stringify(got).replaceAll(',"quoted":true', "")).toBe(
      JSON.stringify(want).replaceAll(',"quoted":true', ""),
    );
    if (typeof wanted !== "string" && wanted.kind === "text" && wanted.quoted)
      expect(read).toMatchObject({ quoted: true });
  }

  it.each<readonly [WritableValue, string]>([
    ["5.6402(2)", "5.6402(2)"],
    ["-x+1/2,y,z", "-x+1/2,y,z"],
    ["", "''"],
    ["?", "'?'"],
    [".", "'.'"],
    [{ kind: "unknown" }, "?"],
    [{ kind: "inapplicable" }, "."],
    [{ kind: "text", text: "1", quoted: true }, "'1'"],
    [{ kind: "text", text: "1", quoted: false }, "1"],
    ["loop_", "'loop_'"],
    ["DATA_x", "'DATA_x'"],
    ["_x", "'_x'"],
    ["#1", "'#1'"],
    ["$f", "'$f'"],
    [";x", "';x'"],
    ["[1]", "'[1]'"],
    ["it's", "it's"],
    ["'n'", version === "1.1" ? "''n''" : `"'n'"`],
    ["rock 'n' roll", `"rock 'n' roll"`],
    ["two\nlines", ";two\nlines\n;"],
    ["two\r\nlines\r", ";two\nlines\n\n;"],
    ["\\\nx", ";\\\n\\\\\n\nx\n;"],
  ])("writes %j as %j", (value, expected) => {
    expect(form(value, version)).toBe(expected);
  });

  const item = (name: string) => ({ kind: "item", name, value: "1" }) as const;
  const loop = (names: string[], rows: string[][]) => ({ kind: "loop", names, rows }) as const;
  it.each<readonly [string, WritableBlock[], string]>([
    ["a name without underscore", [{ name: "a", items: [item("x")] }], '"x" is no data name'],
    ["a name of an underscore", [{ name: "a", items: [item("_")] }], '"_" is no data name'],
    ["a name with a blank", [{ name: "a", items: [item("_x y")] }], '"_x y" is no data name'],
    ["a block name with a blank", [{ name: "a b", items: [] }], '"a b" is no block name'],
    ["an empty block name", [{ name: "", items: [] }], '"" is no block name'],
    ["a name twice", [{ name: "a", items: [item("_x"), loop(["_y", "_X"], [["1", "2"]])] }], '"_X" occurs twice'],
    [
      "a block twice",
      [
        { name: "a", items: [] },
        { name: "A", items: [] },
      ],
      '"A" occurs twice',
    ],
    [
      "a frame twice",
      [
        {
          name: "a",
          items: [],
          frames: [
            { name: "f", items: [] },
            { name: "F", items: [] },
          ],
        },
      ],
      '"F" occurs twice',
    ],
    ["a loop without names", [{ name: "a", items: [loop([], [])] }], "a loop has no data names"],
    ["a loop without rows", [{ name: "a", items: [loop(["_x"], [])] }], 'the loop of "_x" has no rows'],
    [
      "a short row",
      [{ name: "a", items: [loop(["_x", "_y"], [["1", "2"], ["3"]])] }],
      'row 2 of the loop of "_x" has 1 values for 2 names',
    ],
    ["a control character", [{ name: "a", items: [{ kind: "item", name: "_x", value: "a\u0000b" }] }], "U+0000"],
  ])("refuses %s", (_, given, message) => {
    expect(() => writeCif(given, version)).toThrow(InputProblem);
    expect(() => writeCif(given, version)).toThrow(message);
  });
});

describe("the versions differ", () => {
  it.each<readonly [WritableValue, string, string]>([
    ["don't panic", "'don't panic'", `"don't panic"`],
    ["a[1]", "a[1]", "'a[1]'"],
    ["{x}", "{x}", "'{x}'"],
    [`'a' "b" c`, `;'a' "b" c\n;`, `;'a' "b" c\n;`],
    [`a'b"c d`, `'a'b"c d'`, `;a'b"c d\n;`],
  ])("in writing %j", (value, first, second) => {
    expect(form(value, "1.1")).toBe(first);
    expect(form(value, "2.0")).toBe(second);
  });

  it.each<readonly [WritableValue, string]>([
    ["Å", '_x: no CIF 1.1 can hold "Å": it contains the character U+00C5'],
    ["a\n;b", '_x: no CIF 1.1 can hold "a\\n;b": a line begins with ;'],
    [";".repeat(3000), "a line begins with ;"],
    [`a${";".repeat(5000)}`, "the line is too long and offers no place to fold it"],
    [{ kind: "list", items: [] }, "_x: no CIF 1.1 can hold a list"],
    [{ kind: "table", entries: [] }, "_x: no CIF 1.1 can hold a table"],
  ])("in what they can hold", (value, message) => {
    expect(() => written(value, "1.1")).toThrow(message);
    expect(content(cleanBlock(written(value, "2.0")))).toBeTruthy();
  });

  it("in the length of names and the nesting of frames", () => {
    const long: WritableBlock = { name: "a", items: [{ kind: "item", name: `_${"x".repeat(75)}`, value: "1" }] };
    expect(() => writeCif([long], "1.1")).toThrow("has 76 characters, more than 75");
    expect(writeCif([long], "2.0")).toContain("x 1");
    const nested: WritableBlock = {
      name: "a",
      items: [],
      frames: [{ name: "f", items: [], frames: [{ name: "g", items: [] }] }],
    };
    expect(() => writeCif([nested], "1.1")).toThrow('inside the save frame "f"');
    expect(cleanBlock(writeCif([nested], "2.0")).frames[0]!.frames[0]!.name).toBe("g");
  });
});

describe("writeCif", () => {
  it("writes comments, columns and frames for people", () => {
    const text = writeCif(
      [
        {
          name: "halite",
          items: [
            { kind: "comment", text: "Scraped from the\nharbour wall" },
            { kind: "item", name: "_cell_length_a", value: "5.6402(2)" },
            {
              kind: "loop",
              names: ["_atom_site_label", "_atom_site_fract_x", "_atom_site_note"],
              rows: [
                ["Na1", "0", { kind: "unknown" }],
                ["Cl10", "0.50000", "from the wall"],
              ],
            },
          ],
          frames: [{ name: "note", items: [{ kind: "item", name: "_text", value: "a\nb" }] }],
        },
      ],
      "1.1",
    );
    expect(text).toBe(
      "#\\#CIF_1.1\n\ndata_halite\n# Scraped from the\n# harbour wall\n_cell_length_a                    5.6402(2)\n" +
        "loop_\n _atom_site_label\n _atom_site_fract_x\n _atom_site_note\nNa1  0       ?\nCl10 0.50000 'from the wall'\n" +
        "\nsave_note\n_text\n;a\nb\n;\nsave_\n",
    );
  });

  it("refuses nesting without end, and keys no quotes can hold", () => {
    let deep: WritableValue = "x";
    for (let i = 0; i < 300; i++) deep = { kind: "list", items: [deep] };
    expect(() => written(deep, "2.0")).toThrow("nest more than 200 deep");
    const table = (...keys: string[]): WritableValue => ({
      kind: "table",
      entries: keys.map((k) => [k, "1"] as const),
    });
    expect(() => written(table(`'''"""`), "2.0")).toThrow("no CIF can hold the table key");
    expect(() => written(table("k", "k"), "2.0")).toThrow('a table has the key "k" twice');
  });
});

import { describe, expect, it } from "vitest";
import { readCif } from "../../lib/cif/index.ts";
import { CIF2, cleanBlock, cleanValue, content, faults, plain } from "./plain.ts";

const unknown = { mark: "?" };
const inapplicable = { mark: "." };

describe("version", () => {
  it.each([
    ["#\\#CIF_2.0\n", "2.0"],
    ["#\\#CIF_2.0", "2.0"],
    ["#\\#CIF_2.0  \r\n", "2.0"],
    ["#\\#CIF_1.1\n", "1.1"],
    ["#\\#CIF_1.0\n", "1.1"],
    ["#\\#CIF_2.01\n", "1.1"],
    ["\n#\\#CIF_2.0\n", "1.1"],
    ["", "1.1"],
    ["data_a _x 1", "1.1"],
  ])("of %j is %s", (text, version) => {
    expect(readCif(text).value.version).toBe(version);
  });
});

describe("both versions", () => {
  describe.each(["", CIF2])("after %j", (head) => {
    const value = (text: string) => cleanValue(`${head}data_a\n_x ${text}\n`);

    it.each([
      ["word", "word"],
      ["5.6402(2)", "5.6402(2)"],
      ["-x+1/2,y,z", "-x+1/2,y,z"],
      ["a#b", "a#b"],
      ["a;b", "a;b"],
      ["it's", "it's"],
      ['2"', '2"'],
      ["a_b", "a_b"],
      ["?x", "?x"],
      ["..", ".."],
      ["loop_x", "loop_x"],
      ["data", "data"],
      ["global", "global"],
      ["'single quoted'", "single quoted"],
      ['"double quoted"', "double quoted"],
      [`"it's"`, "it's"],
      ["''", ""],
      ["'# no comment'", "# no comment"],
      ["'_no_name'", "_no_name"],
      ["'loop_'", "loop_"],
      ["'?'", "?"],
      ["'.'", "."],
      ["?", unknown],
      [".", inapplicable],
      ["\t\t tab", "tab"],
      ["# comment\n word # another", "word"],
      ["\n\n\nword", "word"],
      ["\n;field\n;", "field"],
    ])("reads %s", (text, expected) => {
      expect(value(text)).toEqual(expected);
    });

    it("tells quoted from unquoted text", () => {
      const block = cleanBlock(`${head}data_a\n_a b\n_c 'b'\n_d\n;b\n;\n`);
      expect(["_a", "_c", "_d"].map((name) => block.get(name))).toMatchObject([
        { kind: "text", text: "b", quoted: false },
        { kind: "text", text: "b", quoted: true },
        { kind: "text", text: "b", quoted: true },
      ]);
    });

    it("compares names and keywords without regard to capitals, and keeps them as written", () => {
      const block = cleanBlock(`${head}DATA_Salt\nLoop_\n_Cell_A _b\n1 2\n_C 3\nSAVE_F\n_Q 1\nSave_\n`);
      expect(block.name).toBe("Salt");
      expect(block.names()).toEqual(["_Cell_A", "_b", "_C"]);
      expect(plain(block.get("_cell_a"))).toBe("1");
      expect(plain(block.loop("_B")!.value(0, "_B"))).toBe("2");
      expect(block.loop("_c")).toBeNull();
      expect(block.has("_CELL_a")).toBe(true);
      expect(block.frames.map((f) => f.name)).toEqual(["F"]);
      expect(block.frames[0]!.has("_C")).toBe(false);
    });

    it.each(["\n", "\r\n", "\r"])("takes %j as a line end", (eol) => {
      const text = `${head}data_a # comment\n_x 'one' # comment\n_y\n;\nfield\n;\nloop_\n_z\n1 # comment\n2\n`;
      const { value, problems } = readCif(text.replaceAll("\n", eol));
      expect(problems).toEqual([]);
      expect(value.blocks.map(content)).toEqual(readCif(text).value.blocks.map(content));
      expect(plain(value.blocks[0]!.get("_y"))).toBe("\nfield");
    });

    it("needs no line end after the last value", () => {
      expect(plain(cleanBlock(`${head}data_a _x 1`).get("_x"))).toBe("1");
      expect(plain(cleanBlock(`${head}data_a _x 'a'`).get("_x"))).toBe("a");
      expect(plain(cleanBlock(`${head}data_a _x\n;a\n;`).get("_x"))).toBe("a");
    });

    it("gives offsets of values, names, loops and blocks", () => {
      const text = `${head}data_a\n_x 'one'\nloop_ _y\n;two\n; three\ndata_b _z 1\n`;
      const [a, b] = readCif(text).value.blocks;
      const cut = (span: { start: number; end: number } | null | undefined) => text.slice(span?.start, span?.end);
      expect(cut(a!.get("_x")!.span)).toBe("'one'");
      expect(cut(a!.nameSpan("_X"))).toBe("_x");
      expect(cut(a!.loop("_y")!.at(0, 0)!.span)).toBe(";two\n;");
      expect(cut(a!.loop("_y")!.span)).toBe("loop_ _y\n;two\n; three");
      expect(cut(a!.span)).toBe("data_a\n_x 'one'\nloop_ _y\n;two\n; three");
      expect(cut(b!.span)).toBe("data_b _z 1");
      expect(a!.nameSpan("_z")).toBeNull();
    });

    it("answers null where there is nothing", () => {
      const block = cleanBlock(`${head}data_a\nloop_\n_x _y\n1 2\n3 4\n`);
      const loop = block.loop("_x")!;
      expect(loop.rowCount).toBe(2);
      expect([loop.at(2, 0), loop.at(-1, 0), loop.at(0, 2), loop.at(0, -1), loop.at(Number.NaN, 0)]).toEqual([
        null,
        null,
        null,
        null,
        null,
      ]);
      expect([loop.value(0, "_z"), block.get("_z"), block.loop("_z")]).toEqual([null, null, null]);
      expect(loop.columnIndex("_Y")).toBe(1);
    });

    it("is no fault to hold nothing", () => {
      for (const text of ["", "# comment", "\n \n", "data_a", "data_a\ndata_b\n"]) {
        expect(readCif(head + text).problems).toEqual([]);
      }
    });
  });
});

describe("CIF 1.1", () => {
  it.each([
    ["'don't rock the boat'", "don't rock the boat"],
    [`"What's this ab"out?"`, `What's this ab"out?`],
    ["'''", "'"],
    ["''''''", "''''"],
    ["Fc^*^=kFc[1+0.001xFc^2^]^-1/4^", "Fc^*^=kFc[1+0.001xFc^2^]^-1/4^"],
    ["{foo}bar", "{foo}bar"],
    ["a[42]", "a[42]"],
    ["{'a':1}", "{'a':1}"],
  ])("reads %s", (text, expected) => {
    expect(cleanValue(`data_a _x ${text}\n`)).toBe(expected);
  });

  it.each(["['k']", "[1", "]", "$frame", "[]"])("reserves the first character of %s, and keeps the value", (text) => {
    const cif = `data_a _x ${text}\n_y 1`;
    expect(faults(cif)).toEqual([["reserved-character 1:11", text]]);
    expect(plain(readCif(cif).value.blocks[0]!.get("_x"))).toBe(text);
  });

  it("is ASCII: the first character beyond is reported, once", () => {
    expect(faults("data_a\n_x 'Å ü'\n_y é\n")).toEqual([["non-ascii-character 2:5", "Å"]]);
    expect(faults("data_a\n_x '𐘾'\n")).toEqual([["non-ascii-character 2:5", "𐘾"]]);
  });

  it("does not nest save frames: an opening frame shows that an end is missing", () => {
    const text = "data_d\nsave_a\n_x 1\nsave_b\n_x 2\nsave_\n";
    expect(faults(text)).toEqual([["unterminated-frame 2:1", "save_a"]]);
    expect(readCif(text).value.blocks[0]!.frames.map((f) => [f.name, plain(f.get("_x"))])).toEqual([
      ["a", "1"],
      ["b", "2"],
    ]);
  });
});

describe("CIF 2.0", () => {
  const value = (text: string) => cleanValue(`${CIF2}data_a\n_x ${text}\n`);

  it.each([
    ["''''''", ""],
    ['""""""', ""],
    ["'''simple'''", "simple"],
    ["''''tricky'''", "'tricky"],
    ['"""""tricky"""', '""tricky'],
    [`'''"""embedded"""'''`, '"""embedded"""'],
    ['"""first line\nsecond line"""', "first line\nsecond line"],
    ["'''\r\nsecond line [of 3]\r\n'''", "\nsecond line [of 3]\n"],
    ['"""\n_not_a_name\n;embedded\n;\n"""', "\n_not_a_name\n;embedded\n;\n"],
    ["[]", []],
    ["[ ]", []],
    ["[# comment\n ]", []],
    ["[.]", [inapplicable]],
    ["[ ? '?']", [unknown, "?"]],
    ["[bare]", ["bare"]],
    ["[[a b] [c]]", [["a", "b"], ["c"]]],
    ["['one' \"two\" '''three''']", ["one", "two", "three"]],
    ["[\n;field\n;\n]", ["field"]],
    ["{}", { entries: [] }],
    [
      "{'a':1 \"b\": 2 'c':\n3}",
      {
        entries: [
          ["a", "1"],
          ["b", "2"],
          ["c", "3"],
        ],
      },
    ],
    [
      "{'a':{'b':[1 2]} '''it's''':?}",
      {
        entries: [
          ["a", { entries: [["b", ["1", "2"]]] }],
          ["it's", unknown],
        ],
      },
    ],
    ["{'text':\n;text\n;\n}", { entries: [["text", "text"]] }],
    [
      "{'':x 'a':# comment\n 'b'}",
      {
        entries: [
          ["", "x"],
          ["a", "b"],
        ],
      },
    ],
    ["πφ−χ", "πφ−χ"],
    ["a:b", "a:b"],
  ])("reads %s", (text, expected) => {
    expect(value(text)).toEqual(expected);
  });

  it("takes brackets as part of names", () => {
    const block = cleanBlock(`${CIF2}data_with[1]\n_x[1][2] hello\nsave_with{2}\n_y world\nsave_\n`);
    expect([block.name, block.frames[0]!.name, block.names()]).toEqual(["with[1]", "with{2}", ["_x[1][2]"]]);
  });

  it("nests save frames, each with names of its own", () => {
    const text = "data_n\n_l 0\nsave_n\nsave_n\n_l 2\nsave_\n_l 1\nsave_s\n_l 3\nsave_\nsave_\n_m 4\n";
    expect(content(cleanBlock(CIF2 + text))).toMatchObject({
      items: [
        ["_l", "0"],
        ["_m", "4"],
      ],
      frames: [{ items: [["_l", "1"]], frames: [{ name: "n", items: [["_l", "2"]] }, { name: "s" }] }],
    });
  });

  it("counts a list as one value of a loop", () => {
    const loop = cleanBlock(`${CIF2}data_a\nloop_\n_x _y\n[1 2] a\n{'k':[3]} [4]\n`).loop("_x")!;
    expect(loop.rowCount).toBe(2);
    expect(plain(loop.at(1, 0))).toEqual({ entries: [["k", ["3"]]] });
    expect(plain(loop.at(1, 1))).toEqual(["4"]);
  });

  it("reads lists nested deeper than any stack", () => {
    let item = cleanBlock(`${CIF2}data_a _x ${"[".repeat(200_000)}${"]".repeat(200_000)}`).get("_x");
    let depth = 0;
    for (; item?.kind === "list"; item = item.items[0] ?? null) depth++;
    expect(depth).toBe(200_000);
  });

  it.each([
    ["_x a[42]", [["bracket-in-word 3:4", "a[42]"]], "a[42]"],
    ["_x 'don't'", [["quote-inside 3:8", "'"]], "don't"],
    [
      "_x 'a'b",
      [
        ["missing-space 3:7", "b"],
        ["value-without-name 3:7", "b"],
      ],
      "a",
    ],
    ["_x ['a''b']", [["missing-space 3:8", "'"]], ["a", "b"]],
    ["_x [[a b][c]]", [["missing-space 3:10", "["]], [["a", "b"], ["c"]]],
    ["_x [a[b] ]", [["bracket-in-word 3:5", "a"]], ["a", ["b"]]],
    ["_x [1 2", [["unterminated-bracket 3:4", "["]], ["1", "2"]],
    ["_x [1 2\n_y 3", [["unterminated-bracket 3:4", "["]], ["1", "2"]],
    [
      "_x {'a':[1 loop_ _y 3",
      [
        ["unterminated-bracket 3:4", "{"],
        ["unterminated-bracket 3:9", "["],
      ],
      { entries: [["a", ["1"]]] },
    ],
    [
      "_x [1 }2 ]",
      [
        ["bracket-mismatch 3:7", "}"],
        ["missing-space 3:8", "2"],
      ],
      ["1", "2"],
    ],
    ["_x 1 ]", [["bracket-mismatch 3:6", "]"]], "1"],
    [
      "_x {'a':1 b 'c':}",
      [
        ["table-key 3:11", "b"],
        ["table-key 3:13", "'c'"],
      ],
      { entries: [["a", "1"]] },
    ],
    [
      "_x {'a':1 'a':2}",
      [["duplicate-key 3:11", "'a'"]],
      {
        entries: [
          ["a", "1"],
          ["a", "2"],
        ],
      },
    ],
    ["_x ['a':1]", [["table-key 3:5", "'a'"]], ["1"]],
    ["_x {a:1}", [["table-key 3:5", "a:1"]], { entries: [] }],
    ["_x $a", [["reserved-character 3:4", "$a"]], "$a"],
    ["_x '''a\n_y 1", [["unterminated-quote 3:4", "'''"]], "a"],
    [
      "_x 'a\ufeffb\u0007'",
      [
        ["forbidden-character 3:6", "\ufeff"],
        ["forbidden-character 3:8", "\u0007"],
      ],
      "a\ufeffb\u0007",
    ],
  ])("reports %s and reads what it can", (text, expected, value) => {
    const cif = `${CIF2}data_a\n${text}\n`;
    expect(faults(cif)).toEqual(expected);
    expect(plain(readCif(cif).value.blocks[0]!.get("_x"))).toEqual(value);
  });
});

import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import { HARD_TEXTS } from "../bench/cif-scan.ts";
import { CIF2, content, faults, plain } from "./plain.ts";

/** Single items of all blocks, "block: name value". */
function items(text: string): readonly string[] {
  return readCif(text).value.blocks.flatMap((block) =>
    block.names().map((name) => `${block.name}: ${name} ${JSON.stringify(plain(block.get(name)))}`),
  );
}

describe("a damaged CIF is read as far as it makes sense", () => {
  it.each([
    [
      "an open quote ends with its line",
      "data_a\n_x 'halite  \n_y 1",
      ["unterminated-quote 2:4", "'halite"],
      ['a: _x "halite"', 'a: _y "1"'],
    ],
    [
      "an open text field ends before the next name",
      "data_a\n_x\n;halite\n\n_y 1\n",
      ["unterminated-text-field 3:1", ";"],
      ['a: _x "halite\\n"', 'a: _y "1"'],
    ],
    [
      "an open text field ends before the next block",
      "data_a\n_x\n;halite\ndata_b\n_y 1\n",
      ["unterminated-text-field 3:1", ";"],
      ['a: _x "halite"', 'b: _y "1"'],
    ],
    [
      "a text field that swallows the next one",
      "data_a\n_x\n;halite\n_y\n;calcite\n;\n_z 1\n",
      ["unterminated-text-field 3:1", ";"],
      ['a: _x "halite"', 'a: _y "calcite"', 'a: _z "1"'],
    ],
    [
      "the same with the text below the semicolon",
      "data_a\n_x\n;\nhalite\n_y\n;\ncalcite\n;\n_z 1\n",
      ["unterminated-text-field 3:1", ";"],
      ['a: _x "\\nhalite"', 'a: _y "\\ncalcite"', 'a: _z "1"'],
    ],
    ["a name without a value", "data_a\n_x\n_y 1\n", ["name-without-value 2:1", "_x"], ['a: _y "1"']],
    ["a name without a value at the end", "data_a\n_y 1\n_x", ["name-without-value 3:1", "_x"], ['a: _y "1"']],
    [
      "a name without a value before a loop",
      "data_a\n_x\nloop_\n_y\n1\n",
      ["name-without-value 2:1", "_x"],
      ['a: _y "1"'],
    ],
    [
      "a value without a name",
      "data_a\n_x sodium chloride salt\n_y 1\n",
      ["value-without-name 2:11", "chloride salt"],
      ['a: _x "sodium"', 'a: _y "1"'],
    ],
    ["a name that occurs twice", "data_a\n_x 1\n_X 2\n", ["duplicate-name 3:1", "_X"], ['a: _x "1"']],
    ["a loop without names", "data_a\nloop_\n1 2 3\n_y 1\n", ["loop-without-names 2:1", "loop_"], ['a: _y "1"']],
    [
      "a loop without values",
      "data_a\nloop_\n_x\n_z\n_y\ndata_b",
      ["loop-without-values 2:1", "loop_\n_x\n_z\n_y"],
      ["a: _x null", "a: _z null", "a: _y null"],
    ],
    [
      "text before the first block",
      "Dear editor,\n\nthe harbour wall\ndata_a\n_x 1\n",
      ["text-before-block 1:1", "Dear editor,\n\nthe harbour wall\n"],
      ['a: _x "1"'],
    ],
    ["a text that is no CIF", "<html>not found</html>\n", ["no-data-block 1:1", "<html>not found</html>\n"], []],
    [
      "items before the first block",
      "_x 1\ndata_a\n_x 2\n",
      ["missing-block-header 1:1", "_x"],
      [': _x "1"', 'a: _x "2"'],
    ],
    ["a nameless block", "data_\n_x 1\n", ["nameless-block 1:1", "data_"], [': _x "1"']],
    [
      "a block name with blanks",
      "data_salt of the wall\n_x 1\n",
      ["blank-in-block-name 1:1", "data_salt of the wall"],
      ['salt of the wall: _x "1"'],
    ],
    [
      "blocks of the same name",
      "data_a\n_x 1\ndata_A\n_x 2\n",
      ["duplicate-block 3:1", "data_A"],
      ['a: _x "1"', 'A: _x "2"'],
    ],
    ["a reserved word", "data_a\n_x 1\nGlobal_\n_y 1\n", ["reserved-word 3:1", "Global_"], ['a: _x "1"', 'a: _y "1"']],
    [
      "the end of a loop as in STAR",
      "data_a\nloop_\n_x\n1\nstop_\n_y 1\n",
      ["reserved-word 5:1", "stop_"],
      ['a: _x "1"', 'a: _y "1"'],
    ],
    [
      "a control character",
      "data_a\n_x 'a\u0000b'\n_y 1\n",
      ["forbidden-character 2:6", "\u0000"],
      ['a: _x "a\\u0000b"', 'a: _y "1"'],
    ],
    [
      "a save frame that is never closed",
      "data_a\n_y 1\nsave_f\n_x 1\ndata_b\n_x 1\n",
      ["unterminated-frame 3:1", "save_f"],
      ['a: _y "1"', 'b: _x "1"'],
    ],
    ["an end without a save frame", "data_a\nsave_\n_x 1\n", ["frame-not-open 2:1", "save_"], ['a: _x "1"']],
    [
      "text glued to a closed text field",
      "data_a\n_x\n;halite\n;_y 1\n",
      ["missing-space 4:2", "_"],
      ['a: _x "halite"', 'a: _y "1"'],
    ],
  ] as const)("%s", (_, text, fault, expected) => {
    expect(faults(text)).toEqual([fault]);
    expect(items(text)).toEqual(expected);
  });

  it("frames of the same name in one block are reported", () => {
    expect(faults("data_a\nsave_f\nsave_\nsave_F\nsave_\n")).toEqual([["duplicate-frame 4:1", "save_F"]]);
    expect(faults("data_a\nsave_f\nsave_\ndata_b\nsave_f\nsave_\n")).toEqual([]);
  });

  it("control characters separate values, and form feeds end lines as in older files", () => {
    const text = "data_a\f_x 'one'\f_y \f;two\f;\v_z\v3\n";
    expect(items(text)).toEqual(['a: _x "one"', 'a: _y "two"', 'a: _z "3"']);
    expect(faults(text).every(([where]) => where.startsWith("forbidden-character"))).toBe(true);
  });

  it("messages name the offending text and the remedy", () => {
    const [problem] = readCif("data_a\n_x sodium chloride\n").problems;
    expect(problem!.message).toBe('no data name stands before "chloride"');
    expect(problem!.hint).toBe("Values that contain blanks must be in quotes.");
    expect(() => requireClean(readCif("data_a\n_x sodium chloride\n"))).toThrow(problem!.message);
  });

  it("a UTF-16 file is recognised by its zeros", () => {
    const { problems } = readCif([..."data_a\n_x 1\n"].join("\0"));
    expect(problems.some(({ hint }) => hint.includes("UTF-16"))).toBe(true);
  });
});

describe("loops whose values do not fill their rows", () => {
  const head = "data_a\nloop_\n_label\n_x\n_y\n";
  const rows = (text: string) => {
    const loop = readCif(text).value.blocks[0]!.loop("_label")!;
    return Array.from({ length: loop.rowCount }, (_, r) =>
      loop.names.map((name) => plain(loop.value(r, name))).join(" "),
    );
  };

  it("lose the odd line if each row has its line, so that no value shifts into a foreign column", () => {
    const text = `${head}Na1 0 0\nNa2 0\nCl1 0.5 0.5\nCl2 0.5 0 # note\n_z 1\n`;
    expect(rows(text)).toEqual(["Na1 0 0", "Cl1 0.5 0.5", "Cl2 0.5 0"]);
    expect(faults(text)).toEqual([["loop-value-count 7:1", "Na2 0"]]);
    expect(readCif(text).problems[0]!.message).toBe(
      'the loop of "_label" has 3 data names and 11 values; the first odd line is "Na2 0"',
    );
  });

  it("lose a line with a value too many", () => {
    expect(rows(`${head}Na1 0 0\nsodium atom 0 0\nCl1 0.5 0.5\n`)).toEqual(["Na1 0 0", "Cl1 0.5 0.5"]);
  });

  it("keep the rows that can be filled where rows run over lines", () => {
    const text = `${head}Na1\n0\n0\nCl1\n0.5\n`;
    expect(rows(text)).toEqual(["Na1 0 0"]);
    expect(faults(text)).toEqual([["loop-value-count 9:1", "Cl1\n0.5"]]);
  });

  it("keep the rows that can be filled where values are text fields or lists", () => {
    expect(rows(`${head}Na1\n;0\n;\n0\nCl1 0.5\n`)).toEqual(["Na1 0 0"]);
    expect(rows(`${CIF2}${head}Na1 [0 1] 0\nCl1 [1 1]\n`)).toEqual(["Na1 0,1 0"]);
  });

  it("give no rows where all lines hold the same number of values, but another one than there are names", () => {
    expect(rows(`${head}Na1 0 0 0\nCl1 0.5 0.5 0\n`)).toEqual([]);
    expect(faults(`${head}Na1 0 0 0\nCl1 0.5 0.5 0\n`)).toEqual([["loop-value-count 6:1", "Na1 0 0 0"]]);
  });
});

describe("any text", () => {
  it("is read without throwing", () => {
    const piece = fc.constantFrom(
      "data_",
      "save_",
      "loop_",
      "_x",
      "_y ",
      "'",
      '"',
      "'''",
      ";",
      "\n;",
      "\n",
      "\r",
      " ",
      "[",
      "]",
      "{",
      "}",
      ":",
      "a",
      "1.2(3)",
      "?",
      ".",
      "#",
      "$",
      "\\",
      "\f",
      "\0",
      "\ufeff",
      "Å",
      "\ud800",
      "global_",
      "stop_",
    );
    const text = fc
      .tuple(fc.constantFrom("", CIF2), fc.array(piece, { maxLength: 60 }))
      .map(([head, p]) => head + p.join(""));
    fc.assert(
      fc.property(text, (t) => {
        const { value, problems } = readCif(t);
        for (const block of value.blocks) content(block);
        for (const { span } of problems)
          expect(span!.start >= 0 && span!.start <= span!.end && span!.end <= t.length).toBe(true);
      }),
      { numRuns: 500 },
    );
  });

  it.each(Object.entries(HARD_TEXTS))("takes time in proportion to its length: %s", (_, make) => {
    const time = (size: number) => {
      let best = Number.POSITIVE_INFINITY;
      for (let round = 0; round < 3; round++) {
        const text = make(size);
        const start = performance.now();
        readCif(text);
        best = Math.min(best, performance.now() - start);
      }
      return best;
    };
    // Sixteen times the text: a quadratic reader would need 256 times as long. Half of that leaves room for a busy machine.
    expect(time(96_000)).toBeLessThan(Math.max(128 * time(6_000), 5));
  });

  it("keeps its first thousand problems and counts the rest", () => {
    const { problems } = readCif("data_a\n" + "_x\n".repeat(1500));
    expect(problems.length).toBe(1001);
    expect(problems[1000]!.message).toBe("500 more problems are not listed");
  });
});

describe("damage to one block of several", () => {
  const blocks = ["halite", "calcite", "gypsum", "malachite"].map(
    (name, i) =>
      `data_${name}\n_cell_length_a ${5 + i}.64(2)\n_note 'from the "wall"'\n_text\n;two\nlines\n;\n` +
      "loop_\n_atom_site_label\n_atom_site_fract_x\nNa1 0\nCl1 0.5\n_last 1\n",
  );
  const whole = blocks.map((text) => content(readCif(text).value.blocks[0]!));
  const change = fc.oneof(
    fc.record({ kind: fc.constant("delete" as const), length: fc.integer({ min: 1, max: 30 }) }),
    fc.record({ kind: fc.constant("insert" as const), text: fc.string({ maxLength: 12 }) }),
    fc.record({
      kind: fc.constant("insert" as const),
      text: fc.constantFrom("'", '"', "\n;", "\n;x\n", "loop_ ", "_a ", "save_b ", "#", "\0"),
    }),
  );

  it("leaves the others as they were", () => {
    fc.assert(
      fc.property(fc.nat(2), fc.double({ min: 0, max: 1, noNaN: true }), change, (which, where, how) => {
        const block = blocks[which]!;
        const body = block.indexOf("\n") + 1;
        const at = body + Math.floor(where * (block.length - 1 - body));
        const inserted = how.kind === "insert" ? how.text : "";
        const after = how.kind === "delete" ? Math.min(block.length - 1, at + how.length) : at;
        const damaged = block.slice(0, at) + inserted + block.slice(after);
        fc.pre(!/data_/i.test(damaged.slice(5)));
        const text = blocks.map((b, i) => (i === which ? damaged : b)).join("");
        const read = readCif(text).value.blocks.map(content);
        for (const i of [0, 1, 2, 3]) if (i !== which) expect(read[i]).toEqual(whole[i]);
      }),
      { numRuns: 500 },
    );
  });
});

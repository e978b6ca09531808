import { describe, expect, it } from "vitest";
import { CIF2, cleanValue } from "./plain.ts";

/** Value of a text field with this content, read as CIF 2.0. */
const field = (content: string) => cleanValue(`${CIF2}data_a\n_x\n;${content}\n;\n`);
const field11 = (content: string) => cleanValue(`data_a\n_x\n;${content}\n;\n`);

describe("text fields", () => {
  it.each([
    ["one line", "one line"],
    ["\nsecond line", "\nsecond line"],
    ["", ""],
    ["\n", "\n"],
    ["trailing blanks  \n  and leading ones", "trailing blanks  \n  and leading ones"],
    ["a ; inside\n ; and indented", "a ; inside\n ; and indented"],
    ["# no comment\n'no quote", "# no comment\n'no quote"],
    ["line 1\r\nline 2\rline 3", "line 1\nline 2\nline 3"],
  ])("keep their content: %j", (content, text) => {
    expect(field(content)).toBe(text);
    expect(field11(content)).toBe(text);
  });

  it("hold a whole CIF of another file", () => {
    const inner = "\ndata_inner\nloop_\n_y\n1 2\n_z 'text'\n";
    expect(cleanValue(`data_a\n_w 1\n_x\n;${inner}\n;\n_y 2\n`)).toBe(inner);
  });

  it.each(["\n", "\r\n", "\r"])("end at a semicolon that begins a line ended by %j", (eol) => {
    expect(cleanValue(["data_a", "_x", ";one", "two", ";", "_y 2"].join(eol))).toBe("one\ntwo");
  });

  it("need the semicolon in the first column to begin", () => {
    expect(cleanValue("data_a\n_x ;word\n_y 1")).toBe(";word");
  });
});

describe("line folding", () => {
  it.each([
    [
      "\\\nA (not so) long\\\n line.\nA normal line.\nNOT a long line.\\",
      "A (not so) long line.\nA normal line.\nNOT a long line.\\",
    ],
    ["\\   \nline 1  \nline \\ \n2", "line 1  \nline 2"],
    ["\\", ""],
    ["\\\nends in a backslash\\\\\n", "ends in a backslash\\"],
    ["\\\r\na\\\r\nb", "ab"],
  ])("joins %j", (content, text) => {
    expect(field(content)).toBe(text);
    expect(field11(content)).toBe(text);
  });

  it.each(["\\\\\nline 2\\\nline 3    ", "a\n\\\nb", "no\\ marker\nb\\\nc"])("leaves %j alone", (content) => {
    expect(field(content)).toBe(content);
  });
});

describe("line prefixes, in CIF 2.0 only", () => {
  it.each([
    [" \\\n _embedded\n ;\n ;", "_embedded\n;\n;"],
    ["pfx>\\  \npfx>_embedded\npfx>;", "_embedded\n;"],
    ["> \\\\  \n> line 1 \\\n> is folded\\\n>  twice.", "line 1 is folded twice."],
    [">>\\", ""],
    ["πφχ\\\\", ""],
  ])("are taken off %j", (content, text) => {
    expect(field(content)).toBe(text);
    expect(field11(content.replace(/[^\n -~]/g, "p"))).toBe(content.replace(/[^\n -~]/g, "p"));
  });

  it.each([">\\\n>one\ntwo", ";\\", "a>\\b\na>c"])(
    "stay where a line lacks them or the first line is none: %j",
    (content) => {
      expect(field(content)).toBe(content);
    },
  );
});

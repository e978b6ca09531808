import { readdirSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { vetAnswer } from "../../lib/audit/index.ts";
import { fixture } from "./cases.ts";

const NAMES = readdirSync(new URL("../../fixtures/", import.meta.url)).flatMap((f) =>
  f.endsWith(".cif") ? [f.slice(0, -4)] : [],
);

describe("a sound fixture", () => {
  it("is one of many", () => expect(NAMES.length).toBeGreaterThan(90));

  it.each(NAMES)("%s has neither contradiction nor doubt", (name) => {
    const { findings, counts } = vetAnswer(fixture(name));
    expect(findings.filter((f) => f.severity !== "remark")).toEqual([]);
    expect(counts).toMatchObject({ contradiction: 0, doubt: 0 });
  });
});

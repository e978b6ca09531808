import { describe, expect, it } from "vitest";
import { decodeCif, readCif } from "../../lib/cif/index.ts";

const utf8 = (text: string) => new TextEncoder().encode(text);

describe("decodeCif", () => {
  it("reads UTF-8", () => {
    expect(decodeCif(utf8("data_a _x Ångström"))).toEqual({ text: "data_a _x Ångström", encoding: "utf-8" });
  });

  it("drops a byte-order mark", () => {
    expect(decodeCif(utf8("\ufeffdata_a")).text).toBe("data_a");
  });

  it("falls back on Latin-1 where the bytes are not UTF-8", () => {
    const bytes = Uint8Array.from("data_a _x 'Å 20 °C'", (c) => c.charCodeAt(0));
    expect(decodeCif(bytes)).toEqual({ text: "data_a _x 'Å 20 °C'", encoding: "latin-1" });
  });

  it("reads the Windows characters between 0x80 and 0x9F, and keeps every other byte", () => {
    const all = decodeCif(Uint8Array.from({ length: 256 }, (_, i) => i)).text;
    expect(all.length).toBe(256);
    expect(all[0x80]).toBe("€");
    expect(all[0x92]).toBe("’");
    expect(all[0x9f]).toBe("Ÿ");
    for (let i = 0; i < 256; i++) if (i < 0x80 || i > 0x9f) expect(all.charCodeAt(i)).toBe(i);
  });

  it("decodes long Latin-1 texts whole", () => {
    const bytes = new Uint8Array(100_000).fill(0xe9);
    expect(decodeCif(bytes).text).toBe("é".repeat(100_000));
  });
});

describe("a text that still has its byte-order mark", () => {
  it.each(["\ufeffdata_a\n_x 1\n", "\ufeff#\\#CIF_2.0\ndata_a\n_x 1\n"])(
    "is read with offsets into itself: %j",
    (text) => {
      const { value, problems } = readCif(text);
      expect(problems).toEqual([]);
      expect(value.version).toBe(text.includes("CIF_2.0") ? "2.0" : "1.1");
      const span = value.blocks[0]!.get("_x")!.span;
      expect(text.slice(span.start, span.end)).toBe("1");
    },
  );
});

import { describe, expect, it } from "vitest";
import { readSources, type Sources } from "./sources.ts";

const LONGEST = 250; // lines; longer files tell two stories
/** Files allowed to be longer, each with the reason why nothing is gained by cutting it. */
const LONGER: Readonly<Record<string, string>> = {};

const WEAKENED = /\b(?:TODO|FIXME|XXX)\b|\bas any\b|@ts-(?:ignore|nocheck|expect-error)|biome-ignore/;
const IDLE = /\b(?:it|test|describe)\.(?:skip|only|todo|fails)\b/;

function lines(text: string): number {
  return text.split("\n").length - (text.endsWith("\n") ? 1 : 0);
}

function tooLong(sources: Sources): string[] {
  return [...sources]
    .filter(([path, text]) => !path.includes("/tables/") && lines(text) > LONGEST && !(path in LONGER))
    .map(([path, text]) => `${path}: ${lines(text)} lines`);
}

function containing(sources: Sources, pattern: RegExp): string[] {
  return [...sources].filter(([, text]) => pattern.test(text)).map(([path]) => path);
}

/** What an index holds apart from comments and re-exports by name. */
function beyondNames(text: string): string {
  const code = text.replace(/\/\*[\s\S]*?\*\/|\/\/.*$/gm, "");
  return code.replace(/export (?:type )?\{[^}]*\} from "[^"]+";/g, "").trim();
}

describe("the house rules", () => {
  const code = readSources("lib", "bin");
  const tests = readSources("tests");
  tests.delete("tests/house.test.ts"); // it quotes what it forbids

  it(`keep files within ${LONGEST} lines, tables apart`, () => expect(tooLong(code)).toEqual([]));

  it("excuse no file that needs no excuse", () => {
    const idle = Object.keys(LONGER).filter((path) => lines(code.get(path) ?? "") <= LONGEST);
    expect(idle).toEqual([]);
  });

  it("have every index list its names by hand", () => {
    const faces = new Map([...code].filter(([path]) => path.endsWith("/index.ts")));
    expect(faces.size).toBeGreaterThan(0);
    expect([...faces].filter(([, text]) => beyondNames(text) !== "").map(([path]) => path)).toEqual([]);
  });

  it("leave nothing unfinished or silenced", () => {
    expect(containing(code, WEAKENED)).toEqual([]);
    expect(containing(tests, WEAKENED)).toEqual([]);
  });

  it("let no test sleep", () => expect(containing(tests, IDLE)).toEqual([]));

  it("name files in kebab-case", () => {
    const odd = [...code.keys(), ...tests.keys()].filter((path) => !/^[a-z0-9-]+(?:\/[a-z0-9.-]+)+\.ts$/.test(path));
    expect(odd).toEqual([]);
  });
});

describe("the watch over the house rules", () => {
  it("counts lines as an editor does", () => {
    const long = "x\n".repeat(LONGEST);
    expect(tooLong(new Map([["lib/a/b.ts", long]]))).toEqual([]);
    expect(tooLong(new Map([["lib/a/b.ts", `${long}x`]]))).toEqual(["lib/a/b.ts: 251 lines"]);
    expect(tooLong(new Map([["lib/a/tables/b.ts", `${long}x`]]))).toEqual([]);
  });

  it("notices an index that does more than name", () => {
    expect(beyondNames('/** A. */\nexport {\n  a, // first\n  type B,\n} from "./a.ts";\n')).toBe("");
    expect(beyondNames('export * from "./a.ts";')).not.toBe("");
    expect(beyondNames('import { a } from "./a.ts";\nexport { a };')).not.toBe("");
    expect(beyondNames('export { a } from "./a.ts";\nsetUp();')).toBe("setUp();");
  });

  it.each(["// TODO: later", "x as any", "// @ts-ignore"])("notices %s", (text) => {
    expect(containing(new Map([["lib/a/b.ts", text]]), WEAKENED)).toEqual(["lib/a/b.ts"]);
  });

  it.each(['it.skip("x", f)', "describe.only"])("notices %s", (text) => {
    expect(containing(new Map([["tests/a.test.ts", text]]), IDLE)).toEqual(["tests/a.test.ts"]);
  });
});

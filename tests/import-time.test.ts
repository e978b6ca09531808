import { readdirSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { build } from "esbuild";
import { describe, expect, it } from "vitest";

const ROOT = fileURLToPath(new URL("..", import.meta.url));
const ROOMS = readdirSync(`${ROOT}lib`, { withFileTypes: true }).flatMap((d) => (d.isDirectory() ? [d.name] : []));

/**
 * What code runs when it is imported: its bundle with all functions, classes and plain data taken out that nothing at
 * the top level uses. Hints that a package is free of side effects are ignored.
 */
async function leftover(contents: string): Promise<string> {
  const { outputFiles } = await build({
    stdin: { contents, resolveDir: ROOT, loader: "ts" },
    bundle: true,
    format: "esm",
    write: false,
    packages: "external",
    ignoreAnnotations: true,
    treeShaking: true,
  });
  return outputFiles[0]!.text;
}

/** Cheap constants: numbers, and exact vectors and matrices written out. */
const PLAIN = /\b(?:Math\.\w+|rational|ratVec3|ratMat3|inverseRatMat)\(/g;

/** Calls that give a variable its first value; functions that are left over are only there for such calls. */
function calls(code: string): string[] {
  const bare = code.replace(/\/\*.*?\*\/|\/\/.*$/gm, "").replace(PLAIN, "");
  return [...bare.matchAll(/^(?:var|const|let) \w+ = (?!(?:\([\w, ]*\)|\w+) =>).*?[\w.]+\(/gm)].map(([line]) => line);
}

describe("importing a room", () => {
  it.each(ROOMS)("%s builds nothing: no grammar, no table, no group", async (room) => {
    expect(calls(await leftover(`import "./lib/${room}/index.ts";`))).toEqual([]);
  });

  it("is watched by a test that sees what is built", async () => {
    const grammar = `import P from "parsimmon"; const blank = P.regexp(/ /); export const read = (s) => blank.parse(s);`;
    expect(calls(await leftover(grammar))).toEqual(["var blank = P.regexp("]);
    expect(calls(await leftover("const table = decode('a'); function decode(s) { return s.split(''); }"))).toEqual([
      "var table = decode(",
    ]);
    expect(calls(await leftover("export const half = Math.sqrt(3) / 2; const known = new Map();"))).toEqual([]);
  });
});

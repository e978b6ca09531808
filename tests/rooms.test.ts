import { describe, expect, it } from "vitest";
import { type Import, importsOf, readSources, type Sources } from "./sources.ts";

/** Rooms of lib/ from the top down; a room may import those after it. */
const ROOMS = ["page", "report", "audit", "vibrations", "structure", "symmetry", "representation", "algebra", "cif"];
const LEAF = "lib/problem.ts";
const FACE = "lib/index.ts";
const PACKAGES = ["parsimmon"]; // what lib/ may take from outside

const roomOf = (path: string): string | undefined => /^lib\/([a-z]+)\//.exec(path)?.[1];

/** What is wrong with one import, or null. */
function fault({ from, to, typeOnly }: Import): string | null {
  const [own, other] = [roomOf(from), roomOf(to)];
  if (to === FACE) return "nobody inside imports the public face";
  if (from === LEAF) return "lib/problem.ts imports nothing";
  if (from.startsWith("bin/")) return other && to !== `lib/${other}/index.ts` ? "a room is entered by its index" : null;
  if (from.includes("/tables/") && !typeOnly) return "a table imports nothing but types";
  if (to === LEAF) return null;
  if (!to.startsWith("lib/")) return PACKAGES.includes(to) ? null : "lib/ takes nothing from there";
  if (other === own) return to === `lib/${own}/index.ts` ? "insiders never import their own index" : null;
  if (!other || to !== `lib/${other}/index.ts`) return "a room is entered by its index";
  if (own && ROOMS.indexOf(other) < ROOMS.indexOf(own)) return "the arrow points up";
  if (own === "algebra" && other === "cif") return "algebra and cif are strangers";
  if (own === "report" && !typeOnly && other !== "cif") return "report takes other rooms by import type only";
  return null;
}

/** Every breach of the arrows in a set of files, as sentences. */
function breaches(sources: Sources): string[] {
  const found: string[] = [];
  for (const [path, text] of sources) {
    const room = roomOf(path);
    if (room && !ROOMS.includes(room)) found.push(`${path}: no such room`);
    for (const link of importsOf(path, text)) {
      const why = fault(link);
      if (why) found.push(`${path} imports ${link.to}: ${why}`);
    }
  }
  return found;
}

/** An import cycle, type imports included, as the list of its files; null if there is none. */
function cycle(sources: Sources): string[] | null {
  const done = new Set<string>();
  const trail: string[] = [];
  const visit = (path: string): string[] | null => {
    if (trail.includes(path)) return [...trail.slice(trail.indexOf(path)), path];
    const text = sources.get(path);
    if (done.has(path) || text === undefined) return null;
    trail.push(path);
    for (const { to } of importsOf(path, text)) {
      const found = visit(to);
      if (found) return found;
    }
    trail.pop();
    done.add(path);
    return null;
  };
  for (const path of sources.keys()) {
    const found = visit(path);
    if (found) return found;
  }
  return null;
}

describe("the rooms of lib/", () => {
  const sources = readSources("lib", "bin");

  it("are there to be looked at, with their imports", () => {
    const links = [...sources].flatMap(([path, text]) => importsOf(path, text));
    expect(links.some((l) => l.from === "lib/symmetry/operation.ts" && l.to === "lib/algebra/index.ts")).toBe(true);
    const missing = links.filter((l) => /^(lib|bin)\//.test(l.to) && !sources.has(l.to));
    expect(missing).toEqual([]);
  });

  it("import downwards only, and each other by index", () => expect(breaches(sources)).toEqual([]));

  it("have no import cycle", () => expect(cycle(sources)).toBeNull());
});

describe("the watch over the rooms", () => {
  it.each([
    ["lib/symmetry/a.ts", 'import { b } from "../structure/index.ts";', "the arrow points up"],
    ["lib/symmetry/a.ts", 'import type { B } from "../structure/index.ts";', "the arrow points up"],
    ["lib/symmetry/a.ts", 'type B = import("../structure/index.ts").B;', "the arrow points up"],
    ["lib/symmetry/a.ts", 'export { type B } from "../audit/index.ts";', "the arrow points up"],
    ["lib/symmetry/a.ts", 'import {\n  a,\n  type B,\n} from "../report/index.ts";', "the arrow points up"],
    ["lib/symmetry/a.ts", 'const a = await import("../report/index.ts");', "the arrow points up"],
    ["lib/algebra/a.ts", 'import { b } from "../cif/index.ts";', "strangers"],
    ["lib/cif/a.ts", 'import { b } from "../algebra/index.ts";', "the arrow points up"],
    ["lib/report/a.ts", 'import { b } from "../audit/index.ts";', "import type only"],
    ["lib/report/a.ts", 'import { type B } from "../audit/index.ts";', "import type only"],
    ["lib/structure/a.ts", 'import "../../lib/index.ts";', "public face"],
    ["bin/a.ts", 'import { b } from "../lib/index.ts";', "public face"],
    ["bin/commands/a.ts", 'import { b } from "../../lib/cif/scanner.ts";', "by its index"],
    ["lib/structure/a.ts", 'import { b } from "../cif/scanner.ts";', "by its index"],
    ["lib/structure/a.ts", 'import { b } from "./index.ts";', "their own index"],
    ["lib/structure/tables/a.ts", 'import { b } from "../b.ts";', "nothing but types"],
    ["lib/problem.ts", 'import type { B } from "./cif/index.ts";', "imports nothing"],
    ["lib/cif/a.ts", 'import { readFileSync } from "node:fs";', "takes nothing from there"],
    ["lib/cif/a.ts", 'import yargs from "yargs";', "takes nothing from there"],
    ["lib/cif/a.ts", 'import { b } from "../../bin/b.ts";', "takes nothing from there"],
    ["lib/utils/a.ts", "", "no such room"],
  ])("in %s notices %s", (path, text, why) => {
    expect(breaches(new Map([[path, text]]))).toEqual([expect.stringContaining(why)]);
  });

  it.each([
    ["lib/report/a.ts", 'import type { B } from "../audit/index.ts";\nimport { write } from "../cif/index.ts";'],
    ["lib/structure/a.ts", 'import { b } from "../cif/index.ts";\nimport { c } from "../problem.ts";'],
    ["lib/structure/tables/a.ts", 'import type { B } from "../b.ts";'],
    ["lib/symmetry/a.ts", '// import { b } from "../audit/index.ts";\n/* import "../audit/index.ts" */'],
    ["lib/index.ts", 'export { type A, b } from "./audit/index.ts";'],
    ["bin/a.ts", 'import { readFileSync } from "node:fs";\nimport { b } from "../lib/audit/index.ts";'],
  ])("lets %s have %s", (path, text) => expect(breaches(new Map([[path, text]]))).toEqual([]));

  it("finds a cycle through a type import", () => {
    const sources = new Map([
      ["lib/cif/a.ts", 'import { b } from "./b.ts";'],
      ["lib/cif/b.ts", 'import { c } from "./c.ts";'],
      ["lib/cif/c.ts", 'import type { A } from "./b.ts";'],
    ]);
    expect(cycle(sources)).toEqual(["lib/cif/b.ts", "lib/cif/c.ts", "lib/cif/b.ts"]);
  });
});

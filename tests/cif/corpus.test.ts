import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { aliasesOf, type CifBlock, canonicalName, decodeCif, readCif, writeCif } from "../../lib/cif/index.ts";
import { locate } from "../../lib/problem.ts";
import { content, writable } from "./plain.ts";

/** Files of open collections, unchanged; beside the repository where they are present, and no part of it. */
const CORPUS = join(import.meta.dirname, "../../../shared/corpus");

const files = existsSync(CORPUS)
  ? readdirSync(CORPUS, { recursive: true, encoding: "utf-8" }).filter((path) => /\.(cif|dic)$/.test(path))
  : [];

const read = (path: string) => readCif(decodeCif(readFileSync(join(CORPUS, path))).text);
const countFrames = (block: CifBlock): number => block.frames.reduce((sum, frame) => sum + 1 + countFrames(frame), 0);

/** Problems that files of the corpus have; every other file is without. */
const PROBLEMS: Readonly<Record<string, readonly string[]>> = {
  "journal/AFG.cif": ["text-before-block 1:1", "missing-block-header 2:1", "value-without-name 9:28"],
  "journal/ZIF-4-cp-II.cif": ["non-ascii-character 18:45"],
  "journal/ZIF-4-hPT-II.cif": ["non-ascii-character 4:45"],
  "syntax/cif1_invalid.cif": ["reserved-character 5:9"],
};

describe.runIf(files.length > 0)("every file of the corpus", () => {
  it.each(files.filter((path) => path !== "syntax/10.cif"))("%s is read, its problems placed", (path) => {
    const { value, problems } = read(path);
    const found = problems.map((problem) => {
      const { line, column } = locate(value.source, problem.span!.start);
      return `${problem.code} ${line}:${column}`;
    });
    expect(found).toEqual(PROBLEMS[path.replaceAll("\\", "/")] ?? []);
    for (const block of value.blocks) for (const name of block.names()) expect(block.get(name)).not.toBeNull();
  });

  it("of the old sort that uses form feeds and vertical tabs is read, and they are reported", () => {
    const { value, problems } = read("syntax/10.cif");
    expect(new Set(problems.map((p) => p.code))).toEqual(new Set(["forbidden-character"]));
    expect(content(value.blocks[0]!)).toMatchObject({
      name: "10",
      items: [
        ["_sq_string", "sq"],
        ["_dq_string", "dq"],
        ["_text_string", "text"],
        ["_translated_eol", "line1 ;\fline2"],
        ["_numb_plain", "1.25e+03"],
      ],
    });
  });

  it("survives being written and read again", () => {
    for (const path of files) {
      const { value, problems } = read(path);
      if (problems.length > 0) continue;
      const again = readCif(writeCif(value.blocks.map(writable), "2.0"));
      expect(again.problems).toEqual([]);
      // Compared as one string: the reflection lists are long, and only the first difference matters.
      const same = JSON.stringify(again.value.blocks.map(content)) === JSON.stringify(value.blocks.map(content));
      expect([path, same]).toEqual([path, true]);
    }
  });
});

/** Lines outside text fields, found by a plain walk over the lines, as an account independent of the scanner. */
function linesOutsideFields(text: string): readonly string[] {
  let inside = false;
  return text.split(/\r\n|\n|\r/).filter((line) => {
    const delimiter = line.startsWith(";");
    const outside = !inside && !delimiter;
    if (delimiter) inside = !inside;
    return outside;
  });
}

describe.runIf(files.length > 0)("the dictionaries", () => {
  it.each(["dictionary/cif_core.dic", "syntax/cif_core.dic", "dictionary/cif_mag.dic"])(
    "%s have all their save frames",
    (path) => {
      const { value } = read(path);
      const lines = linesOutsideFields(value.source);
      const starts = lines.filter((line) => /^\s*save_\S/i.test(line));
      expect(starts.length).toBeGreaterThan(100);
      expect(value.blocks.map(countFrames)).toEqual([starts.length]);
      const names = starts.map((line) => line.trim().slice("save_".length).split(/\s/)[0]);
      expect(value.blocks[0]!.frames.map((frame) => frame.name)).toEqual(names);
      const definitions = lines.filter((line) => /^\s*_definition\.id(\s|$)/.test(line)).length;
      expect(value.blocks[0]!.frames.filter((frame) => frame.has("_definition.id")).length).toBe(definitions);
    },
  );
});

/** Canonical name and aliases of every definition. */
function definitions(path: string): readonly (readonly [string, readonly string[]])[] {
  return read(path).value.blocks[0]!.frames.flatMap((frame) => {
    const id = frame.get("_definition.id");
    if (id?.kind !== "text" || !id.text.startsWith("_")) return [];
    const loop = frame.loop("_alias.definition_id");
    const values = loop
      ? Array.from({ length: loop.rowCount }, (_, row) => loop.value(row, "_alias.definition_id"))
      : [frame.get("_alias.definition_id")];
    return [[id.text, values.flatMap((value) => (value?.kind === "text" ? [value.text] : []))] as const];
  });
}

describe.runIf(files.length > 0)("the table of aliases", () => {
  // Names that follow use rather than the dictionary, as the head of the table says.
  const moved = new Set(["_space_group.name_h-m_full", "_symmetry.cell_setting"]);

  it.each(["dictionary/cif_core.dic", "dictionary/cif_mag.dic"])(
    "holds what %s says of the quantities in it",
    (path) => {
      let compared = 0;
      for (const [name, aliases] of definitions(path)) {
        if (moved.has(name.toLowerCase()) || aliasesOf(name).length < 2 || canonicalName(name) !== name.toLowerCase())
          continue;
        if (canonicalName(name.replace(".", "_")) === name.replace(".", "_").toLowerCase()) continue; // not in the table
        compared++;
        for (const alias of aliases) expect([alias, canonicalName(alias)]).toEqual([alias, name.toLowerCase()]);
      }
      expect(compared).toBeGreaterThan(20);
    },
  );
});

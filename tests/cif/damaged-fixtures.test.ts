import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import {
  type CifBlock,
  cellOf,
  decodeCif,
  findLoop,
  findNumb,
  findValue,
  numbOf,
  readCif,
} from "../../lib/cif/index.ts";
import { plain } from "./plain.ts";

const FOLDER = join(import.meta.dirname, "../../fixtures/damaged");

const decode = (file: string) => decodeCif(readFileSync(join(FOLDER, file)));
const read = (file: string) => readCif(decode(file).text);
const only = (file: string): CifBlock => {
  const { blocks } = read(file).value;
  expect(blocks.length).toBe(1);
  return blocks[0]!;
};
const found = (block: CifBlock, name: string) => plain(findValue(block, name)?.value ?? null);

/** Rows of the README's table: file and problems, "`code` x 3" written out. */
const listed = readFileSync(join(FOLDER, "README.md"), "utf-8")
  .split("\n")
  .filter((line) => line.startsWith("| `"))
  .map((line) => {
    const [, file, , problems] = line.split(/ ?\| ?/);
    const codes = [...problems!.matchAll(/`([a-z0-9-]+)`(?: x (\d+))?/g)];
    return [file!.replaceAll("`", ""), codes.flatMap(([, code, n]) => Array(Number(n ?? 1)).fill(code))] as const;
  });

/** Labels and coordinates of the sites, `-` where a coordinate is no number. */
function sites(block: CifBlock): readonly string[] {
  const loop = findLoop(block, "_atom_site.label")!;
  return Array.from({ length: loop.rowCount }, (_, row) => {
    const coordinates = ["x", "y", "z"].map(
      (axis) => numbOf(cellOf(loop, row, `_atom_site.fract_${axis}`))?.value ?? "-",
    );
    return [plain(cellOf(loop, row, "_atom_site.label")), ...coordinates].join(" ");
  });
}

const HALITE = ["Na1 0 0 0", "Cl1 0.5 0.5 0.5"];

describe("the damaged files", () => {
  it("are all listed", () => {
    const files = readdirSync(FOLDER).filter((file) => file.endsWith(".cif"));
    expect(listed.map(([file]) => file)).toEqual(files.sort());
  });

  it.each(listed)("%s has the problems listed, each with a place", (file, codes) => {
    const { value, problems } = read(file);
    expect(problems.map((problem) => problem.code)).toEqual(codes);
    for (const { span } of problems) expect(span!.end > span!.start && span!.end <= value.source.length).toBe(true);
  });

  it.each([
    "text-before-block.cif",
    "no-block-header.cif",
    "data-without-underscore.cif",
    "nameless-block.cif",
    "block-name-with-blanks.cif",
    "reserved-words.cif",
    "capitals.cif",
    "value-without-name.cif",
    "duplicate-name.cif",
    "name-without-value.cif",
    "quoted-numbers.cif",
    "bracket-before-value.cif",
    "glued-after-text-field.cif",
    "open-quote.cif",
    "open-text-field.cif",
    "open-text-field-before-another.cif",
    "cif-inside-text-field.cif",
    "folded-text-field.cif",
    "loop-without-names.cif",
    "loop-without-values.cif",
    "coordinates-before-label.cif",
    "byte-order-mark.cif",
    "latin-1.cif",
    "utf-8-in-cif-1.cif",
    "carriage-returns.cif",
    "mixed-line-ends.cif",
    "control-characters.cif",
    "cif2-open-list.cif",
    "cif2-table-without-key.cif",
    "cif2-quote-inside.cif",
    "broken-standard-uncertainties.cif",
    "unknown-cell.cif",
  ])("%s still gives both sites of halite", (file) => {
    expect(sites(only(file))).toEqual(HALITE);
  });

  it.each([
    ["open-quote.cif", "_space_group.name_H-M_alt", "F m -3 m"],
    ["value-without-name.cif", "_space_group.name_H-M_alt", "F"],
    ["open-text-field.cif", "_exptl.special_details", "\nscraped from the wall"],
    ["open-text-field-before-another.cif", "_publ_section_comment", "\nnorth face"],
    ["glued-after-text-field.cif", "_exptl.special_details", "\nscraped from the wall"],
    ["folded-text-field.cif", "_chemical.name_systematic", "sodium chloride"],
    ["latin-1.cif", "_publ_author_name", "Müller, Å."],
    ["utf-8-in-cif-1.cif", "_exptl.special_details", "edge 5,64 Å, wet side"],
    ["carriage-returns.cif", "_exptl.special_details", "\nscraped\nfrom the wall"],
    ["mixed-line-ends.cif", "_exptl.special_details", "\nscraped\nfrom the wall"],
    ["bracket-before-value.cif", "_exptl_crystal.description", "[001]"],
    ["cif2-quote-inside.cif", "_exptl.special_details", "from the mason's wall"],
    ["cif2-open-list.cif", "_wall.courses", ["1", "2", "3"]],
    ["cif2-table-without-key.cif", "_wall.salts", { entries: [["north", "halite"]] }],
    ["duplicate-name.cif", "_cell.length_a", "5.6402"],
    ["single-operation-without-loop.cif", "_space_group_symop.operation_xyz", "x, y, z"],
  ])("%s: %s", (file, name, value) => {
    expect(found(only(file), name)).toEqual(value);
  });

  it("with a broken standard uncertainty give no number", () => {
    const block = only("broken-standard-uncertainties.cif");
    for (const axis of ["a", "b", "c"]) {
      expect(findValue(block, `_cell.length_${axis}`)).not.toBeNull();
      expect(findNumb(block, `_cell.length_${axis}`)).toBeNull();
    }
  });

  it("with a damaged row keep the rows around it", () => {
    expect(sites(only("value-missing-in-loop.cif"))).toEqual(["Na2 0.5 0.5 0", "Cl1 0.5 0.5 0.5"]);
    expect(sites(only("value-too-many-in-loop.cif"))).toEqual(["Cl2 0.5 0 0", "Cl1 0.5 0.5 0.5"]);
    expect(sites(only("cut-off.cif"))).toEqual(["Na1 0 0 0"]);
    expect(sites(only("name-missing-in-loop.cif"))).toEqual([]);
  });

  it("with odd numbers give them", () => {
    expect(sites(only("exponents-in-coordinates.cif"))[0]).toBe("K1 0.25 0.4166 0.7568");
    expect(sites(only("leading-points.cif")).slice(0, 2)).toEqual(["K1 0.25 0.4166 0.7568", "N1 -0.75 0.7548 0.9152"]);
    expect(sites(only("unknown-coordinates.cif")).filter((site) => site.includes("-"))).toEqual([
      "N1 0.25 - 0.9152",
      "H1 - - -",
    ]);
  });

  it("of several blocks give them all", () => {
    expect(read("duplicate-blocks.cif").value.blocks.map((block) => found(block, "_cell.length_a"))).toEqual([
      "5.6402",
      "5.6300",
    ]);
    const [notes, calcite] = read("open-save-frame.cif").value.blocks;
    expect(sites(notes!.frames[0]!)).toEqual(HALITE);
    expect(found(calcite!, "_cell.length_a")).toBe("4.9896");
  });

  it("name the encoding that was found", () => {
    expect(decode("latin-1.cif").encoding).toBe("latin-1");
    expect(decode("byte-order-mark.cif")).toMatchObject({ encoding: "utf-8", text: expect.stringMatching(/^data_/) });
    expect(read("utf-16.cif").problems.some((problem) => problem.hint.includes("UTF-16"))).toBe(true);
  });
});

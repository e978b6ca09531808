import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { locate } from "../../lib/problem.ts";
import { formatSiteTable, parseSiteTable, type SiteTable, type TableSite } from "../../lib/structure/index.ts";
import { problemOf } from "../support/problem-of.ts";

const HEAD = "group R -3 c\ncell a=4.99 c=17.06\n";
const siteOf = (line: string): TableSite => parseSiteTable(HEAD + line).sites[0]!;

const decimal = (digits: number, most: number) =>
  fc.integer({ min: -most, max: most }).map((n) => n / 10 ** digits + 0);
const measured = fc.tuple(decimal(5, 200_000), fc.option(fc.integer({ min: 1, max: 99 }).map((n) => n / 1e5)));
const coordinate = fc.record({
  coefficients: fc.tuple(fc.constantFrom(0, 1, -1, 2), fc.constantFrom(0, 1, -1, 0.5), fc.constantFrom(0, 1, -1)),
  constant: decimal(5, 200_000),
  su: fc.option(fc.integer({ min: 1, max: 99 }).map((n) => n / 1e5)),
});
const letter = fc.constantFrom(..."abcdehklmuvw", "A", "x", "z");
const position = fc.oneof(
  fc.record({ multiplicity: fc.integer({ min: 1, max: 192 }), letter }),
  fc.record({ multiplicity: fc.constant(null), letter: fc.constantFrom(..."abcdehklmuvw", "A") }),
  fc.constant({ multiplicity: null, letter: null }),
);
const number = measured.map(([value, su]) => ({ value, su }));
const isotropic = number.map(({ value, su }) => ({ kind: "isotropic" as const, iso: value, su }));
const tensor = fc
  .tuple(number, number, number, number, number, number)
  .map((list) => ({ kind: "anisotropic" as const, u: list.map((n) => n.value), su: list.map((n) => n.su) }));
const NOWHERE = { start: 0, end: 0 };
const site = fc
  .record({
    label: fc.stringMatching(/^[A-Za-z][A-Za-z0-9()'*]{0,4}$/),
    species: fc.option(fc.constantFrom("Ca", "O2-", "Fe3+", "D", "U+6")),
    at: position,
    coordinates: fc.option(fc.tuple(coordinate, coordinate, coordinate)),
    parameters: fc.record({ x: number, y: number, z: number }, { requiredKeys: [] }),
    occupancy: fc.integer({ min: 1, max: 1000 }).map((n) => n / 1000),
    displacement: fc.option(fc.oneof(isotropic, tensor)),
  })
  .filter(({ label }) => !/^(?:name|group|cell)$/.test(label))
  .map(({ at, ...rest }) => ({ ...rest, ...at, parameters: { ...rest.parameters } }) as unknown as TableSite);

/** Without the places in the text. */
function bare({ name, group, cell, sites }: SiteTable) {
  return { name, group: group.text, cell: cell.values, sites: sites.map(({ spans: _, ...rest }) => rest) };
}

test("a table reads back as it is written", () => {
  const table = fc.record({
    name: fc.constantFrom("", "calcite", "old wall, salt 3"),
    group: fc.constantFrom("R -3 c", "62", "F d d d :2", '-R 3 2"c').map((text) => ({ text, span: NOWHERE })),
    cell: fc
      .constantFrom({ a: 4.99, c: 17.06 }, { a: 5, b: 6, c: 7, beta: 101.25 })
      .map((values) => ({ values, spans: {} })),
    sites: fc.array(site, { minLength: 1, maxLength: 4 }),
  });
  fc.assert(
    fc.property(table, (t) => {
      const again = bare(parseSiteTable(formatSiteTable(t)));
      expect(again).toEqual(bare(t));
    }),
  );
});

describe("a line of a table", () => {
  it.each([
    ["Ca 6b", "Ca null 6 b"],
    ["Ca1 Ca2+ 6(b)", "Ca1 Ca2+ 6 b"],
    ["M1 Mg b", "M1 Mg null b"],
    ["O(1) O2\u2212 18e", "O(1) O2- 18 e"],
    ["Ba 8alpha x=.1 y=.2 z=.3", "Ba null 8 A"],
    ["Ba \u03b1", "Ba null null A"],
    ["H 2x x=0", "H null 2 x"],
  ])("%s: label, species, position are %s", (line, expected) => {
    const { label, species, multiplicity, letter: l } = siteOf(line);
    expect(`${label} ${species} ${multiplicity} ${l}`).toBe(expected);
  });

  it.each([
    ["O 0.2568(3) 0 1/4", "0.2568(0.0003);0;0.25"],
    ["O 18e (0.2568, 0, .25)", "0.2568;0;0.25"],
    ["O \u22120.1,+1/3,-1/4", "-0.1;0.3333333333333333;-0.25"],
    ["O x,0,1/4 x=0.2568", "1,0,0+0;0;0.25"],
    ["O 2x,-x,x/2+1/4 x=0.1", "2,0,0+0;-1,0,0+0;0.5,0,0+0.25"],
    ["O x x+1/2 z x=.1 z=0.2", "1,0,0+0;1,0,0+0.5;0,0,1+0"],
  ])("%s has coordinates %s", (line, expected) => {
    const text = siteOf(line).coordinates!.map(({ coefficients, constant, su }) => {
      const letters = coefficients.some((c) => c !== 0) ? `${coefficients.join()}+` : "";
      return `${letters}${constant}${su === null ? "" : `(${su})`}`;
    });
    expect(text.join(";")).toBe(expected);
  });

  it("names occupancy and displacement", () => {
    const { occupancy, displacement } = siteOf("O 18e x=0.2568(2) occ = 1/2, B=1.5791(8)");
    expect(occupancy).toBe(0.5);
    expect(displacement).toMatchObject({ kind: "isotropic" });
    expect(displacement?.kind === "isotropic" && displacement.iso).toBeCloseTo(0.02, 5);
    const { displacement: full } = siteOf("O 0 0 0 U11=.01 U22=.02 U33=.03 U12=0 U13=-0.001(1) U23=0");
    expect(full).toMatchObject({ u: [0.01, 0.02, 0.03, 0, -0.001, 0], su: [null, null, null, null, 0.001, null] });
  });
});

describe("a table", () => {
  it("may have comments, blank lines, any line ends, colons", () => {
    const text =
      "# from a paper\r\nname: a crust # of the wall\r\n\r\n  group = R -3 c \rcell: a=4.99 c=17.06\nCa 6b # here\n";
    const { name, group, sites } = parseSiteTable(text);
    expect([name, group.text, sites.length]).toEqual(["a crust", "R -3 c", 1]);
    expect(text.slice(group.span.start, group.span.end)).toBe("R -3 c");
    expect(text.slice(sites[0]!.spans.line.start, sites[0]!.spans.line.end)).toBe("Ca 6b");
  });

  it.each([
    [`${HEAD}Ca 6b 0 0`, "table-unreadable", 3, 10],
    [`${HEAD}O 0 0 0 1.0`, "table-unreadable", 3, 9],
    [`${HEAD}O 18e x=`, "table-unreadable", 3, 9],
    [`${HEAD}O 18e q=0.1`, "table-unreadable", 3, 7],
    [`${HEAD}18e O`, "table-unreadable", 3, 1],
    [`${HEAD}O 18e x=0.2 x=0.3`, "table-unreadable", 3, 13],
    [`${HEAD}O 18e x=0.2 U=0.01 B=1`, "table-unreadable", 3, 20],
    [`${HEAD}O 18e x=0.2 U11=0.01 U=0.01`, "table-unreadable", 3, 13],
    [`${HEAD}O 18e x=0.2 U11=0.01 U22=0.01`, "table-unreadable", 3, 22],
    ["group R -3 c\ncell a=4.99 d=3\nCa 6b", "cell-unreadable", 2, 13],
    ["group\ncell a=4\nCa 6b", "table-unreadable", 1, 6],
    ["group 1\ngroup 2\ncell a=4\nCa 6b", "table-unreadable", 2, 7],
    ["cell a=4\nCa 6b", "group-missing", 2, 6],
    ["group 225\nCa 6b", "cell-missing", 2, 6],
    ["# x\n data_salt\n_cell_length_a 5", "table-unreadable", 2, 1],
    [HEAD, "sites-missing", 3, 1],
    ["", "group-missing", 1, 1],
  ])("%j is refused: %s at %i:%i", (text, code, line, column) => {
    const problem = problemOf(() => parseSiteTable(text));
    const place = locate(text, problem.span!.start);
    expect([problem.code, place.line, place.column]).toEqual([code, line, column]);
    expect(problem.hint).not.toBe("");
  });
});

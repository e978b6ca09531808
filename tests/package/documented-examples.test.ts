import { readFileSync } from "node:fs";
import { beforeAll, describe, expect, it } from "vitest";
import {
  type CompiledExamples,
  compiled,
  documentedExamples,
  examplesIn,
  exportedNames,
  statementsOf,
} from "../support/documented-examples.ts";

const EXAMPLES = documentedExamples();
const text = readFileSync("fixtures/calcite.cif", "utf8");

/** Functions for models, which a user calls without a command line; each is shown at work. */
const SHOWN = [
  ...["crystalFromBlock", "sitesAnswer", "positionsAnswer", "atomModel", "modelPositions", "parseCellRequest"],
  ...["requestedCell", "changeOfCell", "expandedAtoms", "parseRange", "orderedCrystal", "chosenComponent"],
  ...["countConfigurations", "orderedConfigurations", "configurationsAnswer", "coordinateList", "listedStructure"],
  ...["structureCif", "xyzText", "extendedXyz", "pdbText", "mmcifText", "positionsCsv", "parseSiteTable"],
  ...["formatSiteTable", "composedCrystal", "composeAnswer", "composedCif", "pointsAnswer", "namedGroup"],
  ...["completedCell", "neighboursAnswer", "resited", "resitedOnto", "compareStructures", "symmetriseAnswer"],
  ...["vetAnswer", "modesAnswer", "splitAnswer", "groupAnswer", "readCif"],
];

describe("the examples in docstrings and in the README", () => {
  let examples: CompiledExamples;
  beforeAll(async () => {
    examples = await compiled(EXAMPLES);
  });

  it("compile in a strict project", () => expect(examples.faults).toBe(""));

  it.each(EXAMPLES.map((e, i) => [e.place, i] as const))("at %s give what they promise", (_, i) => {
    let promises = 0;
    examples.run[i]!((found, promised) => {
      promises++;
      expect(found).toEqual(promised);
    }, text);
    expect(promises).toBeGreaterThan(1); // one is made for each example
  });

  it("show every function for models at work", () => {
    const code = EXAMPLES.map((e) => e.code).join("\n");
    expect(SHOWN.filter((name) => !new RegExp(`\\b${name}\\(`).test(code))).toEqual([]);
    const names = exportedNames();
    expect(SHOWN.filter((name) => !names.has(name))).toEqual([]);
  });
});

describe("the reader of examples", () => {
  it("takes fenced TypeScript out of docstrings and prose, with its place", () => {
    const source =
      '/**\n * Text.\n * @example\n * ```ts\n * f(1); // 2\n *\n * g();\n * ```\n */\n```\nno\n```\n```ts\nh("*");\n```\n';
    expect(examplesIn("a.ts", source)).toEqual([
      { place: "a.ts:4", code: "f(1); // 2\n\ng();\n" },
      { place: "a.ts:13", code: 'h("*");\n' },
    ]);
  });

  it("finds what statements promise, over several lines too", () => {
    expect(statementsOf('// prose\nconst a = f("; // no");\ng({\n  b: 1,\n}); // [1, 2]\nh(`\n(`); // 3\n')).toEqual([
      { code: 'const a = f("; // no");', value: null },
      { code: "g({\n  b: 1,\n});", value: "[1, 2]" },
      { code: "h(`\n(`);", value: "3" },
    ]);
  });

  it("notices a wrong promise and a wrong type", async () => {
    const { faults, run } = await compiled([
      { place: "a", code: "formatOperation(parseOperation('x,y,z')); // \"x,y,-z\"" },
      { place: "b", code: "parseOperation(3);" },
    ]);
    const found: unknown[] = [];
    run[0]!((a, b) => found.push([a, b]), "");
    expect(found[0]).toEqual(["x,y,z", "x,y,-z"]);
    expect(faults).toContain("example1.ts");
    expect(faults).not.toContain("example0.ts");
  });
});

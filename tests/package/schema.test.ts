import { execFileSync } from "node:child_process";
import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { answersSchema } from "../../lib/report/schema/answers-schema.ts";
import { closedSchema, faultsOf, validatorOf } from "../support/answer-schema.ts";
import { COMMANDS, runCommand, wordsOf } from "../support/run-command.ts";

const ROOT = fileURLToPath(new URL("../..", import.meta.url));

/** Command lines whose answers show every part of the schema. */
const LINES = [
  "group fixtures/scheelite-origin-1.cif",
  'group "P 21/c"',
  'group "I a -3 d"',
  'group "P 63" --setting "a+b,b,c;1/8,0,0"',
  "sites fixtures/calcite.cif",
  "sites fixtures/gypsum-i2a.cif",
  "sites fixtures/damaged/several-elements-on-one-site.cif",
  'sites --group "P 63/m m c" --at 0.333,0.667,1/4 --orbit',
  "compose fixtures/tables/dolomite.txt",
  "compose fixtures/tables/spinel.txt",
  'compose --group "P 21/c" --cell "4 5 6 90 100 90" --site "Xe 2a"',
  "positions fixtures/halite.cif",
  "positions fixtures/ammonium-chloride.cif",
  "positions fixtures/ammonium-chloride.cif --enumerate",
  "positions fixtures/calcite.cif --cell primitive --p1 --range 0:7,0:1,0:1",
  "modes fixtures/calcite.cif",
  "modes fixtures/gypsum.cif --units --polyhedron Ca",
  "modes fixtures/forsterite-pbnm.cif",
  "modes fixtures/zincite.cif",
  "split fixtures/gypsum.cif --polyhedron Ca",
  "split fixtures/orpiment.cif",
  "split fixtures/ammonium-chloride.cif --ordered",
  "split fixtures/carbon-dioxide.cif",
  "split fixtures/graphite-2h.cif",
  "polarise fixtures/calcite.cif --geometry z(xy)-z --about z",
  "polarise fixtures/lithium-niobate.cif",
  "polarise fixtures/albite.cif",
  "patterns fixtures/rutile.cif",
  "patterns fixtures/alpha-quartz.cif --optic",
  'point D3d --tensors --product "Eu x Eu" --subgroup all',
  'point Dinfh --product "Pig x Pig" --subgroup D2h',
  "point Ih",
  'reduce --cell "3 5.196 2 103.92 109.47 134.88"',
  "reduce fixtures/gypsum.cif",
  "symmetrise fixtures/barium-titanate.cif --tolerance 0.2 --strain 0.03",
  "symmetrise fixtures/zircon.cif --given",
  "neighbours fixtures/gypsum.cif --angles --torsions",
  "neighbours fixtures/cassiterite.cif --within 3.5",
  "neighbours fixtures/potassium-alum.cif --nearest 6",
  "neighbours fixtures/urea.cif --torsions --weak",
  "neighbours fixtures/damaged/several-elements-on-one-site.cif",
  "resite fixtures/forsterite-pbnm.cif",
  "resite fixtures/zincite.cif --standardised",
  "resite fixtures/gypsum-c2c.cif --to fixtures/gypsum-i2a.cif",
  "resite fixtures/magnesite.cif --to fixtures/calcite.cif --isotypic",
  "resite fixtures/aragonite.cif --to fixtures/calcite.cif",
  "vet fixtures/calcite.cif",
  "vet fixtures/damaged/operations-that-do-not-close.cif",
  "vet fixtures/calcite.cif fixtures/damaged/empty.cif",
  "vet --explain all",
  "absences fixtures/reflections/thenardite.cif",
];

const documentOf = async (line: string): Promise<unknown> => {
  const [name = "", ...words] = wordsOf(line);
  const { out, err } = await runCommand(name, [...words, "--json"]);
  return out === "" ? err : JSON.parse(out);
};

/** Fields that are promised, by command; `[]` stands for every entry of a list that must not be empty here. */
const PROMISED: Readonly<Record<string, readonly string[]>> = {
  "group fixtures/scheelite-origin-1.cif": [
    ..."sitefold source.file source.block command notes tolerance.position".split(" "),
    ...["number", "hermannMauguin", "hall", "schoenflies", "crystalSystem", "pointGroup.hermannMauguin"].map(inGroup),
    ...["pointGroup.schoenflies", "settingName", "toReference.P", "toReference.p", "operations"].map(inGroup),
    ...["centrings", "centrosymmetric", "polar", "sohncke", "symmorphic", "conditions[].reflections"].map(inGroup),
    ...["conditions[].condition", "conditions[].cause", "wyckoff[].letter", "wyckoff[].multiplicity"].map(inGroup),
    ...["wyckoff[].siteSymmetry", "wyckoff[].schoenflies", "wyckoff[].coordinates"].map(inGroup),
    "spaceGroup.wyckoff[].conditions",
  ],
  "sites fixtures/calcite.cif": [
    "spaceGroup",
    ...["label", "element", "occupancy", "multiplicity", "wyckoff", "siteSymmetry", "schoenflies"].map(ofSite),
    ...["order", "position", "snapped", "shift", "constraint", "adp"].map(ofSite),
  ],
  "compose fixtures/tables/dolomite.txt": [
    "spaceGroup",
    "cell",
    ...["label", "element", "occupancy", "multiplicity", "wyckoff", "siteSymmetry", "schoenflies"].map(ofSite),
    ...["order", "position", "snapped", "shift", "constraint", "adp"].map(ofSite),
  ],
  "positions fixtures/halite.cif": [
    "count",
    ...["label", "element", "occupancy", "x", "y", "z", "operation"].map((f) => `positions[].${f}`),
  ],
  "modes fixtures/calcite.cif": [
    "spaceGroup",
    "atomsInPrimitiveCell",
    ...["label", "dimension", "total", "acoustic", "optic", "infrared", "raman", "hyperRaman"].map(ofIrrep),
    ...["hyperRamanGeneral", "silent", "characters", "sites", "ramanTensor"].map(ofIrrep),
    ...["letters", "tensor"].map((f) => ofIrrep(`ramanTensor.${f}`)),
    ...["label", "wyckoff", "siteSymmetry", "order", "contributions"].map(ofSite),
    ...["infraredBands", "ramanBands", "coincident", "silent"].map((f) => `totals.${f}`),
  ],
  "split fixtures/gypsum.cif --polyhedron Ca": [
    ...["formula", "labels", "count", "pointGroup", "siteSymmetry", "translations", "librations"].map(ofUnit),
    ...["species", "name", "freeWavenumber", "site", "factorGroup", "infrared", "raman"].map((f) =>
      ofUnit(`internal[].${f}`),
    ),
  ],
  "polarise fixtures/calcite.cif --geometry z(xy)-z --about z": [
    "geometries[].geometry",
    ...["irrep", "element", "tensor"].map((f) => `geometries[].allowed[].${f}`),
  ],
  "reduce fixtures/gypsum.cif": [
    ..."cell niggli.cell niggli.P delaunay.cell delaunay.P".split(" "),
    ...["cell", "P", "lattice", "deviation"].map((f) => `conventional.${f}`),
  ],
  "symmetrise fixtures/zircon.cif --given": [
    ..."declared.number found.number tolerance cell sites".split(" "),
    ...["xyz", "largest", "mean"].map((f) => `operations[].${f}`),
  ],
  "neighbours fixtures/gypsum.cif --angles --torsions": [
    ...["label", "coordination", "neighbours[].label", "neighbours[].code", "neighbours[].distance"].map(ofSite),
    "sites[].neighbours[].su",
  ],
  "resite fixtures/forsterite-pbnm.cif": [
    ..."spaceGroup.number P p cell sites".split(" "),
    ...["label", "element", "occupancy", "multiplicity", "wyckoff", "position"].map(ofSite),
  ],
  "vet fixtures/damaged/operations-that-do-not-close.cif": [
    ...["id", "severity", "message", "where", "evidence"].map((f) => `findings[].${f}`),
    ..."counts.contradiction counts.doubt counts.remark".split(" "),
  ],
};
function inGroup(field: string): string {
  return `spaceGroup.${field}`;
}
function ofSite(field: string): string {
  return `sites[].${field}`;
}
function ofIrrep(field: string): string {
  return `irreps[].${field}`;
}
function ofUnit(field: string): string {
  return `units[].${field}`;
}

/** The document without one field; null where it has none to take away. */
function without(document: unknown, path: string): unknown {
  const copy = structuredClone(document);
  const steps = path.split(".");
  const last = steps.pop()!;
  let at: unknown = copy;
  for (const step of steps) {
    at = (at as Record<string, unknown>)[step.replace("[]", "")];
    if (step.endsWith("[]"))
      at = (at as unknown[]).find((entry) => goesOn(entry, steps.slice(steps.indexOf(step) + 1)));
    if (at === undefined) return null;
  }
  return Reflect.has(at as object, last) && Reflect.deleteProperty(at as object, last) ? copy : null;
}

/** Lists further down must not be empty in the entry chosen. */
function goesOn(entry: unknown, [next]: readonly string[]): boolean {
  if (!next?.endsWith("[]")) return true;
  return ((entry as Record<string, unknown[]>)[next.replace("[]", "")] ?? []).length > 0;
}

/** Places of all values that are no objects or lists. */
function leaves(value: unknown, path: readonly string[] = []): (readonly string[])[] {
  if (typeof value !== "object" || value === null) return [path];
  return Object.entries(value).flatMap(([key, part]) => leaves(part, [...path, key]));
}

function replaced(document: unknown, path: readonly string[], by: unknown): unknown {
  const copy = structuredClone(document);
  const parent = path.slice(0, -1).reduce((at, key) => (at as Record<string, unknown>)[key], copy);
  (parent as Record<string, unknown>)[path.at(-1)!] = by;
  return copy;
}

describe("the schema of the answers", () => {
  const closed = validatorOf(closedSchema());

  it("lies in the package as it is built", () => {
    const shipped = JSON.parse(readFileSync(`${ROOT}dist/schema.json`, "utf8"));
    expect(shipped).toEqual(JSON.parse(JSON.stringify(answersSchema())));
    const found = execFileSync(process.execPath, ["-p", 'require.resolve("sitefold/schema.json")'], { cwd: ROOT });
    expect(String(found)).toMatch(/dist.schema\.json/);
  });

  it("has an entry for every command", () => {
    const entries = Object.keys(answersSchema()["$defs"] as object);
    expect(COMMANDS.filter((name) => !entries.includes(name))).toEqual([]);
    expect(COMMANDS.filter((name) => !LINES.some((line) => line.startsWith(`${name} `)))).toEqual([]);
  });

  it.each(LINES)("describes in full what is printed by %s", async (line) => {
    expect(faultsOf(closed, await documentOf(line))).toEqual([]);
  });

  it.each(Object.entries(PROMISED))("misses every promised field of %s", async (line, fields) => {
    const document = await documentOf(line);
    const open = validatorOf(answersSchema());
    for (const field of fields) {
      const poorer = without(document, field);
      expect([field, poorer !== null && faultsOf(open, poorer).length > 0]).toEqual([field, true]);
    }
  });

  it("lets later versions add fields", async () => {
    const document = await documentOf("sites fixtures/calcite.cif");
    const richer = { ...(document as object), colour: "white" };
    expect(faultsOf(validatorOf(answersSchema()), richer)).toEqual([]);
    expect(faultsOf(closed, richer)[0]).toContain("colour");
  });

  it.each(["sites fixtures/calcite.cif", "positions fixtures/halite.cif", "reduce fixtures/gypsum.cif"])(
    "has no place for null, nor for text in place of numbers, in %s",
    async (line) => {
      const document = await documentOf(line);
      const nullable = /\/(?:element|centring|code)$/;
      for (const path of leaves(document)) {
        const place = `/${path.join("/")}`;
        if (!nullable.test(place)) expect([place, closed(replaced(document, path, null))]).toEqual([place, false]);
        expect([place, closed(replaced(document, path, []))]).toEqual([place, false]);
      }
    },
  );

  it.each([
    ["sites fixtures/calcite.cif", ["sites", "0", "multiplicity"], 1.5],
    ["sites fixtures/calcite.cif", ["sites", "0", "shift"], -0.1],
    ["sites fixtures/calcite.cif", ["sites", "0", "wyckoff"], "6b"],
    ["sites fixtures/calcite.cif", ["spaceGroup", "number"], 231],
    ["sites fixtures/calcite.cif", ["sites", "0", "constraint"], "x,y"],
    ["modes fixtures/calcite.cif", ["irreps", "0", "characters", "1,0,0"], 1],
    ["modes fixtures/calcite.cif", ["command"], "mode"],
    ["vet fixtures/damaged/operations-that-do-not-close.cif", ["findings", "0", "severity"], "error"],
  ])("refuses in %s %j: %j", async (line, path, value) => {
    expect(closed(replaced(await documentOf(line), path, value))).toBe(false);
  });
});

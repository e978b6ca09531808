import { readdirSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { COMMANDS } from "../support/run-command.ts";
import { transcript } from "../support/transcript.ts";

/** Command lines by command; what they print is kept in NAME.txt. `npm run golden` renews it, and the diff is read. */
const CASES: Readonly<Record<string, readonly string[]>> = {
  group: [
    'sitefold group "P 21/c"',
    'sitefold group "R -3 c:R"',
    "sitefold group Pnam",
    "sitefold group fixtures/gypsum-i2a.cif",
    "sitefold group fixtures/niter.cif --setting reference",
    "sitefold group Pm-4",
    'sitefold group "P -1" --setting cab',
    'sitefold group "P 63" --json',
  ],
  sites: [
    "sitefold sites fixtures/calcite.cif",
    "sitefold sites fixtures/gypsum-i2a.cif",
    "sitefold sites fixtures/potassium-dihydrogen-phosphate.cif",
    "sitefold sites fixtures/niter.cif --tolerance 0.5",
    "sitefold sites fixtures/damaged/duplicate-blocks.cif --block 2",
    "sitefold sites fixtures/calcite.cif --json",
    'sitefold sites --group 62 --at "0.1,1/4,0.3" --at -0.1,0,0 --orbit',
    'sitefold sites --group "P 63/m m c" --at 0.333,0.667,1/4',
    'sitefold sites --group "P 63/m m c" --at 0.333,0.667,1/4 --cell "a=3.16 c=12.3" --json',
    'sitefold sites --group "R -3 c" --at 0.25,0',
    "sitefold sites fixtures/calcite.cif --at 0,0,0",
    "sitefold sites fixtures/calcite.cif --group 167 --at 0,0,0",
    'sitefold sites --group "R -3 c" --at 1/4,1/4,1/4 --cell "a=6.37 alpha=46.1"',
    'sitefold sites --group 194 --at 0,0,0 --cell "a=5 c=6 gamma=90"',
  ],
  positions: [
    "sitefold positions fixtures/halite.cif",
    "sitefold positions fixtures/iodine.cif",
    "sitefold positions fixtures/caesium-chloride.cif --json",
  ],
  compose: [
    'sitefold compose --group "R -3 c" --cell "a=5.070 c=16.82" --site "Na 6b" --site "N 6a" --site "O 18e x=0.2450"',
    "sitefold compose fixtures/tables/dolomite.txt --format text",
    "sitefold compose fixtures/tables/spinel.txt --format text",
    "sitefold compose fixtures/tables/wulfenite.txt --format cif2",
    "sitefold compose fixtures/tables/salammoniac.txt --json",
    'sitefold compose --group 225 --cell a=5.64 --site "Na 4a" --site "Cl 8a"',
    'sitefold compose --group "P 42/m n m" --cell "a=4.59 c=2.96" --site "Ti 2a" --site "O 4f 0.305,0.2,0"',
    'sitefold compose --group "P 42/m n m" --cell "a=4.59 b=4.6 c=2.96" --site "Ti 2a" --site "O 4f x=0.305"',
    'sitefold compose --group "P 42/m n m" --cell "a=4.59" --site "Ti 2a"',
    'sitefold compose --group "P m -3 m" --cell a=3.905 --site "Sr 1a 0 0 0 1.0"',
    'sitefold compose --group "P m -3 m" --cell a=4.12 --site "Cs 1a" --site "Rb 1a occ=0.2"',
    'sitefold compose fixtures/tables/dolomite.txt --site "Ca 3a"',
    "sitefold compose fixtures/calcite.cif",
    "sitefold compose",
  ],
  modes: [
    "sitefold modes fixtures/calcite.cif --units",
    "sitefold modes fixtures/rutile.cif --polyhedron Ti",
    "sitefold modes fixtures/zincite.cif",
    "sitefold modes fixtures/forsterite-pbnm.cif",
    "sitefold modes fixtures/strontium-titanate.cif -f",
    "sitefold modes fixtures/potassium-dihydrogen-phosphate.cif",
    "sitefold modes fixtures/scheelite-origin-1.cif",
    "sitefold modes fixtures/sodium-nitrite.cif --json",
  ],
  split: [
    "sitefold split fixtures/calcite.cif --diagram",
    "sitefold split fixtures/gypsum.cif",
    "sitefold split fixtures/orpiment.cif",
    "sitefold split fixtures/carbon-dioxide.cif",
    "sitefold split fixtures/ammonium-chloride.cif --ordered",
    "sitefold split fixtures/potassium-hexachloroplatinate.cif -f",
    "sitefold split fixtures/barite.cif --lower SO4=C2v",
    "sitefold split fixtures/anatase.cif --polyhedron Ti",
    "sitefold split fixtures/aragonite.cif --svg",
    "sitefold split fixtures/sodium-nitrite.cif --json",
  ],
  polarise: [
    "sitefold polarise fixtures/rutile.cif",
    'sitefold polarise fixtures/calcite.cif -g "z(xy)-z" -g "[110](zz)-[110]"',
    "sitefold polarise fixtures/lithium-niobate.cif --about z --letters a=1,b=0.4 --step 30",
    "sitefold polarise fixtures/gypsum.cif",
    'sitefold polarise fixtures/rutile.cif -g "z(xy"',
    "sitefold polarise fixtures/zincite.cif --json",
  ],
  patterns: [
    "sitefold patterns fixtures/rutile.cif --optic",
    "sitefold patterns fixtures/calcite.cif --site C1",
    "sitefold patterns fixtures/alpha-quartz.cif --species E",
    "sitefold patterns fixtures/calcite.cif --species T2",
    "sitefold patterns fixtures/sodium-nitrite.cif --json",
  ],
  point: [
    "sitefold point D3d --tensors",
    "sitefold point Oh --subgroup D4h --subgroup C3v -f",
    "sitefold point -4m2",
    'sitefold point Dinfh --product "Piu x Piu"',
    "sitefold point D9",
    "sitefold point Th3",
    'sitefold point C3v --product "E x E" --subgroup all --json',
  ],
  reduce: [
    "sitefold reduce fixtures/gypsum.cif",
    'sitefold reduce --cell "3.988 3.988 3.988 60 60 60"',
    'sitefold reduce --cell "4 4.001 4.002 90.01 90 90" --centring I --angle 0.5',
    'sitefold reduce --cell "1 1 3 60 60 150"',
    "sitefold reduce fixtures/niter.cif --json",
  ],
  symmetrise: [
    "sitefold symmetrise fixtures/barium-titanate.cif --tolerance 0.2 --strain 0.03",
    "sitefold symmetrise fixtures/zircon.cif --given",
    "sitefold symmetrise fixtures/niter.cif --cif",
    "sitefold symmetrise fixtures/calcite.cif --tolerance 3",
    "sitefold symmetrise fixtures/sodium-nitrite.cif --json",
  ],
  neighbours: [
    "sitefold neighbours fixtures/calcite.cif --angles",
    "sitefold neighbours fixtures/gypsum.cif",
    "sitefold neighbours fixtures/chalcanthite.cif --site Cu --site S --all",
    "sitefold neighbours fixtures/potassium-alum.cif",
    "sitefold neighbours fixtures/perovskite.cif --nearest 12 --site Ca",
    "sitefold neighbours fixtures/iodine.cif --contacts",
    "sitefold neighbours fixtures/urea.cif --torsions",
    "sitefold neighbours fixtures/calcite.cif --site Mg",
    "sitefold neighbours fixtures/calcite.cif --within 3 --bonds",
    "sitefold neighbours fixtures/gypsum.cif --site OW --json",
  ],
  resite: [
    "sitefold resite fixtures/forsterite-pbnm.cif",
    'sitefold resite fixtures/calcite.cif --setting "R -3 c :R"',
    'sitefold resite fixtures/gypsum.cif --setting "P n m a"',
    "sitefold resite fixtures/lithium-niobate.cif --standardised",
    "sitefold resite fixtures/alpha-quartz.cif --standardised --either-hand",
    "sitefold resite fixtures/gypsum-c2c.cif --to fixtures/gypsum-i2a.cif",
    "sitefold resite fixtures/magnesite.cif --to fixtures/calcite.cif --isotypic",
    "sitefold resite fixtures/aragonite.cif --to fixtures/calcite.cif",
    "sitefold resite fixtures/zincite.cif --standardised --format cif",
    "sitefold resite fixtures/calcite.cif --either-hand",
  ],
  vet: [
    "sitefold vet fixtures/calcite.cif",
    "sitefold vet fixtures/damaged/operations-that-do-not-close.cif",
    "sitefold vet fixtures/damaged/missing-identity.cif",
    "sitefold vet fixtures/calcite.cif fixtures/damaged/duplicate-blocks.cif fixtures/damaged/empty.cif",
    "sitefold vet --explain operations-no-group",
    "sitefold vet --explain nothing",
    "sitefold vet fixtures/damaged/operations-that-do-not-close.cif --json",
  ],
  absences: [
    "sitefold absences fixtures/reflections/thenardite.cif",
    'sitefold absences fixtures/reflections/thenardite.cif --group "F d d 2"',
    "sitefold absences fixtures/calcite.cif",
    "sitefold absences fixtures/reflections/thenardite.cif --json",
  ],
};

describe("the answers kept", () => {
  it("are there for every command, and no others", () => {
    expect(Object.keys(CASES).sort()).toEqual([...COMMANDS].sort());
  });

  it.each(Object.entries(CASES))("of %s are given again", async (name, lines) => {
    const texts: string[] = [];
    for (const line of lines) texts.push(await transcript(line));
    await expect(texts.join("\n")).toMatchFileSnapshot(`${name}.txt`);
  });
});

describe("damaged files", () => {
  const files = readdirSync("fixtures/damaged").filter((file) => file.endsWith(".cif"));

  it("are told of or refused by sites as they always were", async () => {
    const texts: string[] = [];
    for (const file of files.sort()) texts.push(firstWords(await transcript(`sitefold sites fixtures/damaged/${file}`)));
    await expect(texts.join("\n")).toMatchFileSnapshot("damaged.txt");
  });
});

/** The command line, the first line of every message, the space group found and the notes, and the status. */
function firstWords(text: string): string {
  const [line, ...rest] = text.split("\n");
  const messages = rest.filter((l) => /^! \S/.test(l));
  const status = rest.findLast((l) => l.startsWith("[status")) ?? "[status 0]";
  const group = rest.filter((l) => /^space group|^- /.test(l));
  return `${[line, ...messages, ...group, status].join("\n")}\n`;
}

import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { absencesAnswer, absencesQuestion, findReflections } from "../../lib/audit/index.ts";
import { type CifBlock, decodeCif, readCif } from "../../lib/cif/index.ts";
import { extinctionSymbol, groupProperties, matchingSetting } from "../../lib/symmetry/index.ts";

/** Files of open collections, unchanged; beside the repository where they are present, and no part of it. */
const CORPUS = join(import.meta.dirname, "../../../shared/corpus/journal");

const blocks = (file: string): readonly CifBlock[] =>
  readCif(decodeCif(readFileSync(join(CORPUS, file))).text).value.blocks;

const files = existsSync(CORPUS)
  ? readdirSync(CORPUS).filter((f) => f.endsWith(".cif") && findReflections(blocks(f)[0]!).lists.length > 0)
  : [];

/** The one file whose list is indexed in another cell. */
const TURNED: Readonly<Record<string, string>> = { "1854335.cif": "l,k,-h-l" };

describe.runIf(files.length > 0)("deposited reflections", () => {
  it("are found in sixteen files", () => expect(files).toHaveLength(16));

  it.each(files)("of %s agree with the depositors' group", (file) => {
    const all = blocks(file);
    const { question } = absencesQuestion(all[0]!, all);
    const found = absencesAnswer(question);
    const { number, group } = question.declared!;
    expect(["met", "not tested", "no conditions"]).toContain(found.verdict);
    expect(found.reflections.matrix).toBe(TURNED[file] ?? null);
    expect(found.laueClasses.find((c) => c.chosen)!.laueClass).toBe(groupProperties(number).laueClass);
    const symbol = extinctionSymbol(matchingSetting(number, group)!, group);
    expect(found.extinctionSymbol).toBe(symbol);
    expect(found.candidates.find((c) => c.declared)).toMatchObject({ number, extinctionSymbol: symbol });
  });

  it.runIf("1854335.cif" in TURNED && files.includes("1854335.cif"))(
    "in another cell contradict the group without the matrix",
    () => {
      const all = blocks("1854335.cif");
      const { question } = absencesQuestion(all[0]!, all);
      expect(question.matrices).toHaveLength(1);
      const found = absencesAnswer({ ...question, matrices: [] });
      expect(found.verdict).toBe("violated");
      expect(found.conditions[0]!.evidence).toBeGreaterThan(1000);
    },
  );

  it.each(["1854329.cif", "1854332.cif", "1854336.cif"].filter((f) => files.includes(f)))(
    "of %s contradict groups with a glide plane they do not have",
    (file) => {
      const all = blocks(file);
      const turned = file === "1854329.cif" ? "P 1 21/n 1" : "P 1 21/c 1";
      expect(absencesAnswer(absencesQuestion(all[0]!, all, { group: turned }).question).verdict).toBe("violated");
    },
  );
});

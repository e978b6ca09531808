import { modesText, speciesWriter } from "../../lib/report/index.ts";
import { type Crystal, type Formula, statedFormula } from "../../lib/structure/index.ts";
import { isOrdered, type ModesAnswer, modesAnswer, orderedWarnings } from "../../lib/vibrations/index.ts";
import { COMMON_OPTIONS, type CommandSpec, POLYHEDRON_OPTION, SPECIES_OPTIONS } from "../arguments.ts";
import { answerQuestion, askCrystal, type Question, withNotes } from "../ask.ts";
import { EXAMPLE } from "../examples/modes.ts";

export const spec: CommandSpec = {
  name: "modes",
  operands: "FILE",
  summary: "Species of all modes at k = 0 with their infrared, Raman and hyper-Raman activity.",
  options: {
    ...COMMON_OPTIONS,
    ...SPECIES_OPTIONS,
    units: { type: "boolean", describe: "add internal modes, librations and translations of each molecule or ion" },
    ...POLYHEDRON_OPTION,
  },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const asked = await askCrystal(words, spec);
  const { args, crystal, block } = asked;
  const formula = statedFormula(block);
  const answer = modesAnswer(crystal, formula);
  const question = withNotes(asked, await warnings(crystal, formula));
  const write = speciesWriter(args.flag("f") ? "F" : "T");
  if (!args.flag("units") && args.texts("polyhedron").length === 0) {
    const more =
      "Molecules and ions, a line for each of internal modes, R and T: --units; stretches, bends: --polyhedron Ti";
    return answerQuestion(question, await forJson(question, answer), () => `${modesText(answer, write)}\n\n${more}`);
  }
  const { unitParts } = await import("./split.ts"); // half as much code again, loaded only if asked for
  const parts = unitParts(question, answer, write);
  const text = () => [modesText(answer, write), ...parts.text()].join("\n\n");
  return answerQuestion(question, { ...(await forJson(question, answer)), ...parts.answer }, text);
}

/** Alternatives and missed symmetry are searched for where there may be any; the search is loaded for that only. */
async function warnings(crystal: Crystal, formula: Formula | null): Promise<string[]> {
  if (isOrdered(crystal)) return orderedWarnings(crystal, formula);
  const { structureWarnings } = await import("./split.ts");
  return structureWarnings(crystal, formula);
}

/** Raman tensors are in the document, not in the text, and are loaded for it only. */
async function forJson({ args, crystal }: Question, answer: ModesAnswer): Promise<ModesAnswer> {
  if (!args.flag("json")) return answer;
  const { modesWithTensors } = await import("./polarise.ts");
  return modesWithTensors(crystal, answer);
}

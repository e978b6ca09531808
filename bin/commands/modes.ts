import { modesText, speciesWriter } from "../../lib/report/index.ts";
import { modesAnswer } from "../../lib/vibrations/index.ts";
import { COMMON_OPTIONS, type CommandSpec, SPECIES_OPTIONS } from "../arguments.ts";
import { answerQuestion, askCrystal } from "../ask.ts";

export const spec: CommandSpec = {
  name: "modes",
  operands: "FILE",
  summary: "Species of all modes at k = 0 with their infrared, Raman and hyper-Raman activity.",
  options: { ...COMMON_OPTIONS, ...SPECIES_OPTIONS },
  example: { line: "sitefold modes fixtures/calcite.cif", output: "" },
};

export async function run(words: readonly string[]): Promise<number> {
  const question = await askCrystal(words, spec);
  const answer = modesAnswer(question.crystal);
  return answerQuestion(question, answer, () => modesText(answer, speciesWriter(question.args.flag("f") ? "F" : "T")));
}

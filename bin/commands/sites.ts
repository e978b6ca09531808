import { sitesText } from "../../lib/report/index.ts";
import { sitesAnswer } from "../../lib/structure/index.ts";
import { COMMON_OPTIONS, type CommandSpec } from "../arguments.ts";
import { answerQuestion, askCrystal } from "../ask.ts";
import { EXAMPLE } from "../examples/sites.ts";

export const spec: CommandSpec = {
  name: "sites",
  operands: "FILE",
  summary: "Site symmetry, multiplicity and constraints of every atom site.",
  options: COMMON_OPTIONS,
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const question = await askCrystal(words, spec);
  const answer = sitesAnswer(question.crystal);
  return answerQuestion(question, answer, () => sitesText(answer));
}

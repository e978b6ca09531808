import { positionsText } from "../../lib/report/index.ts";
import { positionsAnswer } from "../../lib/structure/index.ts";
import { COMMON_OPTIONS, type CommandSpec } from "../arguments.ts";
import { answerQuestion, askCrystal } from "../ask.ts";

export const spec: CommandSpec = {
  name: "positions",
  operands: "FILE",
  summary: "List every atom of the cell, and the operation that makes it.",
  options: COMMON_OPTIONS,
  example: { line: "sitefold positions fixtures/halite.cif", output: "" },
};

export async function run(words: readonly string[]): Promise<number> {
  const question = await askCrystal(words, spec);
  const answer = positionsAnswer(question.crystal);
  return answerQuestion(question, answer, () => positionsText(answer));
}

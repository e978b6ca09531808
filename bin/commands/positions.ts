import { positionsText } from "../../lib/report/index.ts";
import { positionsAnswer } from "../../lib/structure/index.ts";
import { answerQuestion, askCrystal } from "../ask.ts";
import { DISORDER_OPTIONS, MODEL_OPTIONS, POSITIONS } from "../positions-options.ts";

export const spec = POSITIONS;

export async function run(words: readonly string[]): Promise<number> {
  const question = await askCrystal(words, spec);
  const { args, crystal } = question;
  const further = Object.keys({ ...MODEL_OPTIONS, ...DISORDER_OPTIONS });
  if (further.some((name) => args.flag(name) || args.texts(name).length > 0)) {
    const { answerModel } = await import("../positions-model.ts"); // twice as much code, run only if asked for
    return answerModel(question);
  }
  const answer = positionsAnswer(crystal);
  return answerQuestion(question, answer, () => positionsText(answer));
}

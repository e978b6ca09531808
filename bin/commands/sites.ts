import { sitesText } from "../../lib/report/index.ts";
import { sitesAnswer } from "../../lib/structure/index.ts";
import { COMMON_OPTIONS, type CommandSpec } from "../arguments.ts";
import { answerQuestion, askCrystal } from "../ask.ts";
import { EXAMPLE } from "../examples/sites.ts";

export const spec: CommandSpec = {
  name: "sites",
  operands: "[FILE]",
  summary: "Site symmetry, multiplicity and constraints of every atom site; with --group of points, without a file.",
  options: {
    ...COMMON_OPTIONS,
    group: { type: "string", value: "GROUP", describe: "no file: number, Hermann-Mauguin or Hall symbol of a group" },
    at: {
      type: "string",
      many: true,
      value: "POINT",
      describe: 'with --group: a point, "0.1,1/4,0.3"; may be repeated',
    },
    cell: {
      type: "string",
      value: "CELL",
      describe:
        'with --group: the cell, "a=4.99 c=17.06" or "4.99 17.06", so that nearness can be judged; exact without it',
    },
    orbit: { type: "boolean", describe: "with --group: list all equivalent positions" },
  },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  if (words.some((w) => /^--(?:group|at|cell|orbit)(?:=|$)/.test(w))) {
    const { answerPoints } = await import("../sites-of-points.ts"); // needs no CIF reader, and is rarely asked for
    return answerPoints(words, spec);
  }
  const question = await askCrystal(words, spec);
  const answer = sitesAnswer(question.crystal);
  return answerQuestion(question, answer, () => sitesText(answer));
}

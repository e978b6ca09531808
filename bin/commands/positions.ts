import { configurationsText, positionsText } from "../../lib/report/index.ts";
import {
  type AtomModel,
  atomModel,
  changeOfCell,
  configurationsAnswer,
  type ModelOptions,
  modelPositions,
  requestedCell,
} from "../../lib/structure/index.ts";
import { COMMON_OPTIONS, type CommandSpec } from "../arguments.ts";
import { answerQuestion, askCrystal, type Question, withNotes } from "../ask.ts";
import { DISORDER_OPTIONS, decided, enumerated } from "../disorder.ts";
import { EXAMPLE } from "../examples/positions.ts";
import { modelText } from "../model-formats.ts";
import { asJson, formatOf, MODEL_OPTIONS, modelOptions } from "../model-options.ts";
import { deliver } from "../output.ts";
import { UsageProblem } from "../problems.ts";
import { usage } from "../usage.ts";

export const spec: CommandSpec = {
  name: "positions",
  operands: "FILE",
  summary: "List every atom of a cell, and the operation that makes it; write structures for other programs.",
  options: { ...COMMON_OPTIONS, ...MODEL_OPTIONS, ...DISORDER_OPTIONS },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const asked = await askCrystal(words, spec);
  const { args } = asked;
  const format = formatOf(args);
  const start = decided(asked.crystal, args);
  const question = withNotes({ ...asked, crystal: start.crystal }, start.notes);
  const options = modelOptions(args, format);
  if (args.number("configuration") !== null || args.flag("enumerate")) return configurations(question, options, format);
  return deliverModel(
    question,
    usage(() => atomModel(question.crystal, options)),
    format,
  );
}

/** Ordered structures of the cell asked for: the list of them, or the one named. */
async function configurations(question: Question, { cell, ...options }: ModelOptions, format: string): Promise<number> {
  const { args, crystal } = question;
  const changed = cell ? usage(() => changeOfCell(crystal, requestedCell(crystal, cell)).crystal) : crystal;
  const { list, chosen } = enumerated(changed, args)!;
  if (chosen)
    return deliverModel(
      question,
      usage(() => atomModel(chosen, options)),
      format,
    );
  if (format !== "text" && format !== "json")
    throw new UsageProblem("--enumerate lists; write one with --configuration N");
  const answer = configurationsAnswer(list);
  const average = modelPositions(atomModel(changed));
  const asked = { ...question, crystal: changed, args: format === "json" ? asJson(args) : args };
  return answerQuestion(asked, { ...average, configurations: answer }, () => configurationsText(answer));
}

function deliverModel(question: Question, model: AtomModel, format: string): Promise<number> {
  return format === "text" || format === "json" ? answer(question, model, format) : write(question, model, format);
}

async function answer(question: Question, model: AtomModel, format: string): Promise<number> {
  const positions = modelPositions(model);
  const { args } = question;
  const asked = { ...question, crystal: model.crystal, args: format === "json" ? asJson(args) : args };
  return answerQuestion(withNotes(asked, model.notes), positions, () => positionsText(positions));
}

async function write({ args, file }: Question, model: AtomModel, format: string): Promise<number> {
  await deliver(modelText(model, format), args, file === "-" ? null : file);
  return 0;
}

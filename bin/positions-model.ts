import { configurationsText, positionsText } from "../lib/report/index.ts";
import {
  type AtomModel,
  atomModel,
  changeOfCell,
  configurationsAnswer,
  type ModelOptions,
  modelPositions,
  requestedCell,
} from "../lib/structure/index.ts";
import { answerQuestion, type Question, withNotes } from "./ask.ts";
import { decided, enumerated } from "./disorder.ts";
import { modelText } from "./model-formats.ts";
import { asJson, formatOf, modelOptions } from "./model-options.ts";
import { deliver } from "./output.ts";
import type { FileFormat, Format } from "./positions-options.ts";
import { UsageProblem } from "./problems.ts";
import { usage } from "./usage.ts";

/** Answers with what the options of `positions` ask for beyond the atoms of the cell. */
export async function answerModel(asked: Question): Promise<number> {
  const { args } = asked;
  const format = formatOf(args);
  const start = decided(asked.crystal, args);
  const question = withNotes({ ...asked, crystal: start.crystal }, start.notes);
  const options = modelOptions(args, format);
  if (args.number("configuration") !== null || args.flag("enumerate")) return configurations(question, options, format);
  const model = usage(() => atomModel(question.crystal, options));
  return deliverModel(question, model, format);
}

/** Ordered structures of the cell asked for: the list of them, or the one named. */
async function configurations(question: Question, { cell, ...options }: ModelOptions, format: Format): Promise<number> {
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

function deliverModel(question: Question, model: AtomModel, format: Format): Promise<number> {
  return format === "text" || format === "json" ? answer(question, model, format) : write(question, model, format);
}

async function answer(question: Question, model: AtomModel, format: "text" | "json"): Promise<number> {
  const positions = modelPositions(model);
  const { args } = question;
  const asked = { ...question, crystal: model.crystal, args: format === "json" ? asJson(args) : args };
  return answerQuestion(withNotes(asked, model.notes), positions, () => positionsText(positions));
}

async function write({ args, file }: Question, model: AtomModel, format: FileFormat): Promise<number> {
  await deliver(modelText(model, format), args, file === "-" ? null : file);
  return 0;
}

import { positionsText } from "../../lib/report/index.ts";
import {
  type AtomModel,
  atomModel,
  type ModelOptions,
  modelPositions,
  parseCellRequest,
  parseRange,
} from "../../lib/structure/index.ts";
import { type Arguments, COMMON_OPTIONS, type CommandSpec } from "../arguments.ts";
import { answerQuestion, askCrystal, type Question, withNotes } from "../ask.ts";
import { EXAMPLE } from "../examples/positions.ts";
import { FORMATS, modelText, PLAIN_FORMATS } from "../model-formats.ts";
import { deliver } from "../output.ts";
import { UsageProblem } from "../problems.ts";
import { usage } from "../usage.ts";

export const spec: CommandSpec = {
  name: "positions",
  operands: "FILE",
  summary: "List every atom of a cell, and the operation that makes it; write structures for other programs.",
  options: {
    ...COMMON_OPTIONS,
    cell: {
      type: "string",
      value: "CELL",
      describe: 'another cell: primitive, reference, multiples "2,2,1", nine integers, or axes "a-b,a+b,c;0,0,1/4"',
    },
    p1: { type: "boolean", describe: "claim no symmetry for the cell written: list all atoms in P 1" },
    asymmetric: { type: "boolean", describe: "one atom of each site, as listed" },
    connected: { type: "boolean", describe: "one atom of each site, chosen so that they hang together by bonds" },
    "whole-units": { type: "boolean", describe: "keep molecules whole, each with its centroid in the cell" },
    range: { type: "string", value: "RANGE", describe: 'fractional coordinates wanted, "0:1,0:1,-0.5:0.5"' },
    boundary: { type: "string", value: "WHICH", describe: "in (default) or out: atoms on the ends of a range" },
    format: { type: "string", value: "FORMAT", describe: `one of ${FORMATS.join(", ")} (default text)` },
  },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const question = await askCrystal(words, spec);
  const format = formatOf(question.args);
  const options = modelOptions(question.args, format);
  const model = usage(() => atomModel(question.crystal, options));
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

function formatOf(args: Arguments): string {
  const format = args.text("format") ?? (args.flag("json") ? "json" : "text");
  if (!FORMATS.includes(format))
    throw new UsageProblem(`there is no format "${format}"; there are ${FORMATS.join(", ")}`);
  if (args.flag("json") && format !== "json")
    throw new UsageProblem(`--json and --format ${format} ask for two formats`);
  return format;
}

function asJson(args: Arguments): Arguments {
  return { ...args, flag: (name) => name === "json" || args.flag(name) };
}

function modelOptions(args: Arguments, format: string): ModelOptions {
  const [cell, range, boundary] = [args.text("cell"), args.text("range"), args.text("boundary")];
  const one = args.flag("asymmetric") || args.flag("connected");
  const whole = args.flag("whole-units");
  if (one && (range !== null || whole || args.flag("p1"))) {
    throw new UsageProblem(
      "one atom of each site (--asymmetric, --connected) goes with no --p1, --range or --whole-units",
    );
  }
  if (boundary !== null && boundary !== "in" && boundary !== "out") {
    throw new UsageProblem(`--boundary takes in or out, not "${boundary}"`);
  }
  // files that hold no symmetry need none worked out
  const plain = !one && (args.flag("p1") || PLAIN_FORMATS.includes(format) || (whole && format.startsWith("cif")));
  return {
    symmetry: plain ? "none" : "kept",
    content: args.flag("connected") ? "connected" : one ? "asymmetric" : "cell",
    wholeUnits: whole,
    ...(cell === null ? {} : { cell: usage(() => parseCellRequest(cell)) }),
    ...(range === null ? {} : { range: usage(() => parseRange(range)) }),
    ...(boundary === null ? {} : { boundary }),
  };
}

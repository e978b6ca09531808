import { resiteText, structureCif } from "../../lib/report/index.ts";
import {
  atomModel,
  type ComparisonOptions,
  crystalFromBlock,
  listedStructure,
  type Resited,
  type ResiteRequest,
  resited,
  resitedOnto,
} from "../../lib/structure/index.ts";
import { type Arguments, type CommandSpec, parseArguments } from "../arguments.ts";
import { answerQuestion, askCrystal, type Question, withNotes } from "../ask.ts";
import { blaming, chooseBlock, readSource } from "../input.ts";
import { asJson } from "../model-options.ts";
import { deliver } from "../output.ts";
import { UsageProblem } from "../problems.ts";
import { RESITE, RESITE_FORMATS, type ResiteFormat } from "../resite-options.ts";
import { usage } from "../usage.ts";
import { VERSION } from "../version.ts";

export const spec: CommandSpec = RESITE;

export async function run(words: readonly string[]): Promise<number> {
  const options = parseArguments(words, spec);
  const [format, request] = [formatOf(options), requestOf(options)];
  const question = await askCrystal(words, spec);
  const to = options.text("to");
  const result = to === null ? usage(() => resited(question.crystal, request)) : await compared(question, to);
  const read = { ...question, file: to ?? question.file }; // neither file may be overwritten
  if (format === "cif" || format === "cif2") {
    await deliver(cifOf(result, format === "cif" ? "1.1" : "2.0"), options, read.file === "-" ? null : read.file);
    return 0;
  }
  const told = withNotes({ ...read, args: format === "json" ? asJson(options) : options }, result.notes);
  return answerQuestion(told, result.answer, () => resiteText(result.answer));
}

/** What is asked for: one thing of setting, Hall symbol, standard description and comparison. @throws UsageProblem */
function requestOf(args: Arguments): ResiteRequest {
  const [setting, hall, to] = [args.text("setting"), args.text("hall"), args.text("to")];
  const asked = [setting !== null, hall !== null, args.flag("standardised"), to !== null].filter(Boolean).length;
  if (asked > 1) throw new UsageProblem("give one of --setting, --hall, --standardised and --to");
  if (to === "-" && args.operands[0] === "-") throw new UsageProblem("only one of the two files can be standard input");
  requireWith(args, "either-hand", args.flag("standardised"), "--standardised");
  for (const name of ["to-block", "displacement", "strain", "isotypic"]) requireWith(args, name, to !== null, "--to");
  if (args.flag("standardised")) return { kind: "standardised", eitherHand: args.flag("either-hand") };
  if (hall !== null) return { kind: "hall", text: hall };
  return setting === null ? { kind: "reference" } : { kind: "setting", text: setting };
}

function requireWith(args: Arguments, name: string, fulfilled: boolean, other: string): void {
  if ((args.flag(name) || args.texts(name).length > 0) && !fulfilled) {
    throw new UsageProblem(`--${name} is only for ${other}`);
  }
}

function formatOf(args: Arguments): ResiteFormat {
  const wanted = args.text("format") ?? (args.flag("json") ? "json" : "text");
  const format = RESITE_FORMATS.find((f) => f === wanted);
  if (!format) throw new UsageProblem(`there is no format "${wanted}"; there are ${RESITE_FORMATS.join(", ")}`);
  if (args.flag("json") && format !== "json")
    throw new UsageProblem(`--json and --format ${format} ask for two formats`);
  return format;
}

/** The structure against that of a second file. */
async function compared({ args, crystal }: Question, file: string): Promise<Resited> {
  const source = await readSource(file, args);
  const named = { ...args, text: (name: string) => args.text(name === "block" ? "to-block" : name) };
  const { block, notes } = chooseBlock(source, named);
  const other = blaming(source, () => crystalFromBlock(block, { tolerance: crystal.tolerance }));
  const [displacement, strain] = [args.number("displacement"), args.number("strain")];
  const options: ComparisonOptions = {
    isotypic: args.flag("isotypic"),
    ...(displacement === null ? {} : { displacement }),
    ...(strain === null ? {} : { strain }),
  };
  const result = usage(() => resitedOnto(crystal, other, options));
  const about = [`compared with ${source.file}, block ${block.name || "(nameless)"}`];
  const told = [...notes, ...other.notes].map((note) => `second file: ${note}`);
  return { ...result, notes: [...about, ...told, ...result.notes] };
}

function cifOf({ crystal, answer, notes }: Resited, version: "1.1" | "2.0"): string {
  const { P, p, standardisation } = answer;
  const comment = [
    `Made by sitefold ${VERSION}.`,
    `Axes ${P}, origin ${p} in terms of the cell of the file: (a',b',c') = (a,b,c) P, x = P x' + p.`,
    ...(standardisation ? [`Standard description, gamma ${standardisation.gamma.toFixed(5)}.`] : []),
    "S.u. of the cell are not carried over; those of coordinates and tensors as of independent terms.",
    ...notes,
  ].join("\n");
  return structureCif(listedStructure(atomModel(crystal)), version, { comment, ending: "" });
}

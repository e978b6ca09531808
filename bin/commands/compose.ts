import { InputProblem } from "../../lib/problem.ts";
import { composedCif, composeText, problemText } from "../../lib/report/index.ts";
import {
  atomModel,
  type ComposeResult,
  type Crystal,
  composeAnswer,
  composedCrystal,
  listedStructure,
  POSITION_TOLERANCE,
  parseSiteTable,
} from "../../lib/structure/index.ts";
import { COMMON_OPTIONS, type CommandSpec, parseArguments } from "../arguments.ts";
import { answerQuestion } from "../ask.ts";
import { EXAMPLE } from "../examples/compose.ts";
import { modelText } from "../model-formats.ts";
import { asJson, formatOf } from "../model-options.ts";
import { deliver, type Heading } from "../output.ts";
import { type FileFormat, FORMATS } from "../positions-options.ts";
import { LocatedProblem, UsageProblem } from "../problems.ts";
import { type TableSource, tableSource } from "../table-source.ts";
import { usageProblem } from "../usage.ts";

const { tolerance, json, output } = COMMON_OPTIONS;

export const spec: CommandSpec = {
  name: "compose",
  operands: "[TABLE]",
  summary: "A structure from the table of a paper: space group, cell, Wyckoff sites; written as CIF.",
  options: {
    group: { type: "string", value: "GROUP", describe: "in place of a file: number, Hermann-Mauguin or Hall symbol" },
    cell: {
      type: "string",
      value: "CELL",
      describe:
        'the parameters that symmetry leaves free, "a=4.99 c=17.06", or "4.99 17.06" in the order a b c alpha beta gamma',
    },
    site: {
      type: "string",
      many: true,
      value: "SITE",
      describe: '"Ca 6b", "O 18e x=0.2568", "O1 O2- 0.2568,0,1/4 occ=0.5 U=0.01"; may be repeated',
    },
    name: { type: "string", value: "NAME", describe: "name of the structure" },
    format: { type: "string", value: "FORMAT", describe: `one of ${FORMATS.join(", ")} (default cif)` },
    tolerance: { ...tolerance, describe: "coordinates this near to a position are on it (default 0.05)" },
    json,
    output,
  },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const args = parseArguments(words, spec);
  const format = args.text("format") === null && !args.flag("json") ? "cif" : formatOf(args);
  const source = await tableSource(args);
  const within = args.number("tolerance") ?? POSITION_TOLERANCE;
  const crystal = blaming(source, () => composedCrystal(parseSiteTable(source.text), { tolerance: within }));
  const { answer, notes } = composeAnswer(crystal);
  const told = [...crystal.notes, ...notes];
  if (format !== "text" && format !== "json") {
    await deliver(written(crystal, { answer, notes: told }, format), args, null);
    return 0;
  }
  const heading: Heading = {
    command: spec.name,
    source: { file: source.name, block: crystal.name },
    notes: told,
    tolerance: { position: within },
  };
  const question = { args: format === "json" ? asJson(args) : args, crystal, file: source.file ?? "-", heading };
  return answerQuestion(question, answer, () => composeText(answer));
}

/** Formats that hold no notes have them told beside. */
function written(crystal: Crystal, { answer, notes }: ComposeResult, format: FileFormat): string {
  if (format === "cif" || format === "cif2") {
    const structure = listedStructure(atomModel(crystal));
    return composedCif(structure, answer, notes, format === "cif" ? "1.1" : "2.0");
  }
  for (const note of notes) process.stderr.write(`${note}\n`);
  return modelText(atomModel(crystal, format === "csv" ? {} : { symmetry: "none" }), format);
}

/** Faults of options are faults of usage. */
function blaming<T>(source: TableSource, work: () => T): T {
  try {
    return work();
  } catch (e) {
    if (!(e instanceof InputProblem)) throw e;
    if (e.code === "tolerance-impossible") throw usageProblem(e);
    const text = problemText(e, source.name, source.text);
    throw source.file === null ? new UsageProblem(text) : new LocatedProblem(text);
  }
}

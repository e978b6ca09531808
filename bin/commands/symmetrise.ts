import { symmetrisedCif, symmetriseText } from "../../lib/report/index.ts";
import { crystalFromBlock, POSITION_TOLERANCE, SEARCH_TOLERANCE, symmetriseAnswer } from "../../lib/structure/index.ts";
import { type Arguments, COMMON_OPTIONS, type CommandSpec, onlyOperand, parseArguments } from "../arguments.ts";
import { answerQuestion, type Question } from "../ask.ts";
import { EXAMPLE } from "../examples/symmetrise.ts";
import { blaming, chooseBlock, readSource } from "../input.ts";
import { deliver } from "../output.ts";
import { UsageProblem } from "../problems.ts";
import { usage } from "../usage.ts";

export const spec: CommandSpec = {
  name: "symmetrise",
  operands: "FILE",
  summary: "The symmetry that the atoms have, what each operation displaces, and the structure made exact in it.",
  options: {
    ...COMMON_OPTIONS,
    tolerance: {
      type: "number",
      value: "ANGSTROM",
      describe: `largest distance between an image and its atom (default ${SEARCH_TOLERANCE})`,
    },
    strain: { type: "number", value: "SHARE", describe: "largest strain of the cell under a rotation (default 0.005)" },
    given: { type: "boolean", describe: "keep the cell of the file instead of the conventional one" },
    cif: { type: "boolean", describe: "print the symmetrised structure as a CIF" },
  },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const question = await ask(words);
  const { args, crystal, file } = question;
  const [tolerance, strain] = [args.number("tolerance"), args.number("strain")];
  const answer = usage(() =>
    symmetriseAnswer(crystal, {
      ...(tolerance === null ? {} : { tolerance }),
      ...(strain === null ? {} : { strain }),
      cell: args.flag("given") ? "given" : "conventional",
    }),
  );
  if (args.flag("cif")) {
    if (args.flag("json")) throw new UsageProblem("--cif and --json ask for two formats");
    await deliver(symmetrisedCif(answer, crystal.name), args, file === "-" ? null : file);
    return 0;
  }
  return answerQuestion(question, answer, () => symmetriseText(answer));
}

/** Reads the crystal as the file gives it: the tolerance of the search must not move atoms beforehand. */
async function ask(words: readonly string[]): Promise<Question> {
  const args: Arguments = parseArguments(words, spec);
  const file = onlyOperand(args, "a CIF file");
  const source = await readSource(file, args);
  const { block, notes } = chooseBlock(source, args);
  const crystal = blaming(source, () => crystalFromBlock(block));
  const heading = {
    command: spec.name,
    source: { file: source.file, block: block.name },
    notes: [...notes, ...crystal.notes],
    tolerance: { position: POSITION_TOLERANCE },
  };
  return { args, crystal, block, file, heading };
}

import type { CifBlock } from "../lib/cif/index.ts";
import { headingText } from "../lib/report/index.ts";
import { type Crystal, crystalFromBlock, POSITION_TOLERANCE } from "../lib/structure/index.ts";
import { type Arguments, type CommandSpec, onlyOperand, parseArguments } from "./arguments.ts";
import { blaming, chooseBlock, readSource } from "./input.ts";
import { deliver, type Heading, jsonDocument } from "./output.ts";

/** A crystal read for a command, with the heading of its answer. */
export interface Question {
  readonly args: Arguments;
  readonly crystal: Crystal;
  /** What the crystal was read from. */
  readonly block: CifBlock;
  readonly file: string;
  readonly heading: Heading;
}

/** Reads the arguments, the file and the crystal that most commands start from. */
export async function askCrystal(words: readonly string[], spec: CommandSpec): Promise<Question> {
  const args = parseArguments(words, spec);
  const file = onlyOperand(args, "a CIF file");
  const tolerance = args.number("tolerance") ?? POSITION_TOLERANCE;
  const source = await readSource(file, args);
  const { block, notes } = chooseBlock(source, args);
  const crystal = blaming(source, () => crystalFromBlock(block, { tolerance }));
  const heading: Heading = {
    command: spec.name,
    source: { file: source.file, block: block.name },
    notes: [...notes, ...crystal.notes],
    tolerance: { position: tolerance },
  };
  return { args, crystal, block, file, heading };
}

/** The same question with more notes in the heading of its answer. */
export function withNotes(question: Question, notes: readonly string[]): Question {
  return { ...question, heading: { ...question.heading, notes: [...question.heading.notes, ...notes] } };
}

/** Delivers an answer with its space group: as one JSON document, or as text below the heading. */
export async function answerQuestion(
  question: Omit<Question, "block">,
  answer: object,
  text: () => string,
): Promise<number> {
  const { args, heading, crystal, file } = question;
  const { summary } = crystal.identified;
  const body = args.flag("json")
    ? jsonDocument(heading, { spaceGroup: summary, ...answer })
    : `${headingText(heading, summary)}\n\n${text()}`;
  await deliver(body, args, file === "-" ? null : file);
  return 0;
}

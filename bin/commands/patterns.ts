import { patternsText, speciesWriter } from "../../lib/report/index.ts";
import { patternsAnswer } from "../../lib/vibrations/index.ts";
import { COMMON_OPTIONS, type CommandSpec, SPECIES_OPTIONS } from "../arguments.ts";
import { answerQuestion, askCrystal } from "../ask.ts";
import { EXAMPLE } from "../examples/patterns.ts";
import { usage } from "../usage.ts";

export const spec: CommandSpec = {
  name: "patterns",
  operands: "FILE",
  summary: "How the atoms move: symmetry-adapted displacements of every species and site, partner by partner.",
  options: {
    ...COMMON_OPTIONS,
    ...SPECIES_OPTIONS,
    site: { type: "string", value: "LABEL", describe: "only patterns that move this site" },
    species: { type: "string", value: "SPECIES", describe: "only patterns of this species, such as A1g" },
    optic: { type: "boolean", describe: "take the rigid translations (acoustic modes) out" },
  },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const question = await askCrystal(words, spec);
  const { args, crystal } = question;
  const [site, species] = [args.text("site"), args.text("species")];
  const answer = usage(() =>
    patternsAnswer(crystal, {
      ...(site === null ? {} : { site }),
      ...(species === null ? {} : { species }),
      optic: args.flag("optic"),
    }),
  );
  return answerQuestion(question, answer, () => patternsText(answer, speciesWriter(args.flag("f") ? "F" : "T")));
}

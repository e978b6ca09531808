import { polariseText, speciesWriter } from "../../lib/report/index.ts";
import { statedFormula } from "../../lib/structure/index.ts";
import {
  type PolariseOptions,
  polariseAnswer,
  structureWarnings,
  withRamanTensors,
} from "../../lib/vibrations/index.ts";
import { type Arguments, COMMON_OPTIONS, type CommandSpec, SPECIES_OPTIONS } from "../arguments.ts";
import { answerQuestion, askCrystal, withNotes } from "../ask.ts";
import { EXAMPLE } from "../examples/polarise.ts";
import { UsageProblem } from "../problems.ts";
import { usage } from "../usage.ts";

export const spec: CommandSpec = {
  name: "polarise",
  operands: "FILE",
  summary: "Raman tensors, infrared dipoles and what each scattering geometry shows.",
  options: {
    ...COMMON_OPTIONS,
    ...SPECIES_OPTIONS,
    geometry: {
      type: "string",
      many: true,
      alias: "g",
      value: "GEOMETRY",
      describe: 'scattering geometry in Porto notation, "z(xy)-z"; also "[110](zz)-[110]"; may be repeated',
    },
    about: {
      type: "string",
      value: "DIRECTION",
      describe: "intensity while the crystal turns about the light along this direction",
    },
    zero: {
      type: "string",
      value: "DIRECTION",
      describe: "polarisation at angle 0 of --about (default the first of x, y, z across the light, else z projected)",
    },
    letters: {
      type: "string",
      value: "LIST",
      describe: 'values of tensor letters for --about, "a=1,b=0.4" (default 1)',
    },
    step: { type: "number", value: "DEGREES", describe: "step of --about (default 15)" },
  },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const asked = await askCrystal(words, spec);
  const question = withNotes(asked, structureWarnings(asked.crystal, statedFormula(asked.block)));
  const options = readOptions(question.args);
  const answer = usage(() => polariseAnswer(question.crystal, options));
  return answerQuestion(question, answer, () =>
    polariseText(answer, speciesWriter(question.args.flag("f") ? "F" : "T")),
  );
}

function readOptions(args: Arguments): PolariseOptions {
  const geometries = args.texts("geometry");
  const about = args.text("about");
  if (about === null) return { geometries };
  const zero = args.text("zero");
  const step = args.number("step") ?? 15;
  if (!(step > 0 && 180 % step === 0)) throw new UsageProblem(`--step ${step} does not divide 180`);
  return { geometries, rotation: { about, zero, letters: readLetters(args.text("letters")), step } };
}

function readLetters(text: string | null): Map<string, number> {
  const entries = (text ?? "")
    .split(",")
    .filter(Boolean)
    .map((pair): [string, number] => {
      const [letter = "", value = ""] = pair.split("=").map((t) => t.trim());
      const number = Number(value);
      if (!/^[a-z]\d*$/.test(letter) || value === "" || !Number.isFinite(number)) {
        throw new UsageProblem(`--letters: "${pair}" is not a letter and its value, such as a=1`);
      }
      return [letter, number];
    });
  return new Map(entries);
}

/** What `modes --json` adds to its species; here, so that its text loads no tensors. */
export const modesWithTensors = withRamanTensors;

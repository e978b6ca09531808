import { pointText, speciesWriter } from "../../lib/report/index.ts";
import { pointAnswer } from "../../lib/vibrations/index.ts";
import { COMMON_OPTIONS, type CommandSpec, onlyOperand, parseArguments, SPECIES_OPTIONS } from "../arguments.ts";
import { EXAMPLE } from "../examples/point.ts";
import { deliver, jsonDocument } from "../output.ts";
import { usage } from "../usage.ts";

export const spec: CommandSpec = {
  name: "point",
  operands: "NAME",
  summary:
    "Character table of a point group, molecular or crystallographic: functions, activities, tensors, subgroups.",
  options: {
    json: COMMON_OPTIONS.json,
    output: COMMON_OPTIONS.output,
    ...SPECIES_OPTIONS,
    tensors: { type: "boolean", describe: "forms of Raman and hyper-Raman tensors and directions of dipoles" },
    product: { type: "string", many: true, value: "PRODUCT", describe: 'direct product, "E x E"; may be repeated' },
    subgroup: {
      type: "string",
      many: true,
      value: "NAME",
      describe: 'how species split in a subgroup, in every inequivalent way; "all" for all; may be repeated',
    },
  },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const args = parseArguments(shieldNames(words), spec);
  const name = onlyOperand(args, "name of a point group");
  const answer = usage(() =>
    pointAnswer(name, {
      tensors: args.flag("tensors"),
      products: args.texts("product"),
      subgroups: args.texts("subgroup"),
    }),
  );
  const heading = { command: spec.name, source: { file: name, block: "" }, notes: [], tolerance: { position: 0 } };
  const text = () => pointText(answer, speciesWriter(args.flag("f") ? "F" : "T"));
  await deliver(args.flag("json") ? jsonDocument(heading, answer) : text(), args, null);
  return 0;
}

/** International symbols such as -4m2 look like options: they are tied to the option before them, or put last, after --. */
function shieldNames(words: readonly string[]): string[] {
  const options: string[] = [];
  const operands: string[] = [];
  for (const word of words) {
    if (!/^[-−]\d/.test(word)) options.push(word);
    else if (options.at(-1) === "--subgroup") options.push(`${options.pop()}=${word}`);
    else operands.push(word);
  }
  return operands.length > 0 ? [...options, "--", ...operands] : options;
}

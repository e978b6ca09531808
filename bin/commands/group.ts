import { existsSync } from "node:fs";
import { InputProblem } from "../../lib/problem.ts";
import { groupText } from "../../lib/report/index.ts";
import {
  chain,
  groupAnswer,
  type IdentifiedGroup,
  identifyGroup,
  namedGroup,
  parseTransformation,
  reverse,
  settingOperations,
  settingsOf,
  spaceGroup,
  type Transformation,
} from "../../lib/symmetry/index.ts";
import { type Arguments, COMMON_OPTIONS, type CommandSpec, onlyOperand, parseArguments } from "../arguments.ts";
import { answerQuestion, askCrystal } from "../ask.ts";
import { EXAMPLE } from "../examples/group.ts";
import { deliver, jsonDocument } from "../output.ts";
import { UsageProblem } from "../problems.ts";

export const spec: CommandSpec = {
  name: "group",
  operands: "NAME_OR_FILE",
  summary: "Operations, reflection conditions and Wyckoff positions of a space group, by name or from a file.",
  options: {
    ...COMMON_OPTIONS,
    setting: {
      type: "string",
      value: "SETTING",
      describe:
        'setting to print: "reference", a name such as cab, b2, :1, :R, or a change "b,c,a;0,0,0" of the one given',
    },
  },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const args = parseArguments(words, spec);
  const operand = onlyOperand(args, "a name or a CIF file");
  if (operand === "-" || existsSync(operand)) {
    const question = await askCrystal(words, spec);
    const identified = inSetting(question.crystal.identified, args);
    const answer = groupAnswer(identified);
    return answerQuestion(question, answer, () => groupText(answer, identified !== question.crystal.identified));
  }
  const { identified, notes } = groupCalled(operand);
  const answer = groupAnswer(inSetting(identified, args));
  const heading = { command: spec.name, source: { file: operand, block: "" }, notes, tolerance: { position: 0 } };
  const text = () => [...notes.map((n) => `- ${n}`), groupText(answer)].join("\n");
  await deliver(args.flag("json") ? jsonDocument(heading, answer) : text(), args, null);
  return 0;
}

function groupCalled(name: string): { identified: IdentifiedGroup; notes: string[] } {
  try {
    const { understoodAs, settings, ambiguity } = namedGroup(name);
    const open = ambiguity.join(", ");
    const notes = [`"${name}" read as ${understoodAs}${open ? `; left open: ${open}, the most usual is taken` : ""}`];
    return { identified: identifyGroup(settings[0].group), notes };
  } catch (e) {
    if (!(e instanceof InputProblem)) throw e;
    throw new UsageProblem(`${e.message}, and there is no such file\n  ${e.hint}`);
  }
}

/** The group in the setting that --setting asks for. */
function inSetting(identified: IdentifiedGroup, args: Arguments): IdentifiedGroup {
  const wanted = args.text("setting");
  if (wanted === null) return identified;
  const { number, toReference } = identified;
  const setting = wanted === "reference" ? settingsOf(number)[0] : settingsOf(number).find((s) => s.name === wanted);
  if (setting) return identifyGroup(spaceGroup(settingOperations(setting)));
  if (!wanted.includes(",")) throw new UsageProblem(settingUnknown(wanted, number));
  const change: Transformation = parseTransformation(wanted);
  const operations = settingOperations({ number, toReference: chain(reverse(change), toReference) });
  return identifyGroup(spaceGroup(operations));
}

function settingUnknown(wanted: string, number: number): string {
  const names = settingsOf(number).map((s) => s.name || "reference");
  return `No. ${number} has no setting "${wanted}"; it has ${names.join(", ")}, or give a change such as "b,c,a;0,0,0"`;
}

import { neighboursText } from "../../lib/report/index.ts";
import { type NeighbourChoice, neighboursAnswer } from "../../lib/structure/index.ts";
import { type Arguments, COMMON_OPTIONS, type CommandSpec } from "../arguments.ts";
import { answerQuestion, askCrystal } from "../ask.ts";
import { EXAMPLE } from "../examples/neighbours.ts";
import { UsageProblem } from "../problems.ts";
import { usage } from "../usage.ts";

export const spec: CommandSpec = {
  name: "neighbours",
  operands: "FILE",
  summary: "Distances, angles and hydrogen bonds with symmetry codes and s.u.; coordination, shapes, bond valences.",
  options: {
    ...COMMON_OPTIONS,
    site: { type: "string", many: true, value: "NAME", describe: "only this element or label; may be repeated" },
    with: { type: "string", many: true, value: "NAME", describe: "only neighbours of this element or label" },
    within: { type: "number", value: "ANGSTROM", describe: "all atoms up to this distance" },
    nearest: { type: "number", value: "COUNT", describe: "this many nearest atoms" },
    bonds: { type: "boolean", describe: "bonded atoms only" },
    contacts: { type: "boolean", describe: "all atoms within the sum of the van der Waals radii" },
    angles: { type: "boolean", describe: "angles between neighbours" },
    torsions: { type: "boolean", describe: "torsion angles along bonds" },
    weak: { type: "boolean", describe: "hydrogen bonds of carbon too" },
    all: { type: "boolean", describe: "print every site, every image, every angle" },
  },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const question = await askCrystal(words, spec);
  const { args, crystal, block } = question;
  const choice = choiceOf(args);
  const answer = usage(() =>
    neighboursAnswer(crystal, {
      block,
      choice,
      sites: args.texts("site"),
      neighbours: args.texts("with"),
      angles: args.flag("angles"),
      torsions: args.flag("torsions"),
      weak: args.flag("weak"),
    }),
  );
  return answerQuestion(question, answer, () => neighboursText(answer, { all: args.flag("all") }));
}

function choiceOf(args: Arguments): NeighbourChoice {
  const [distance, count] = [args.number("within"), args.number("nearest")];
  const asked: NeighbourChoice[] = [
    ...(distance === null ? [] : [{ kind: "within" as const, distance }]),
    ...(count === null ? [] : [{ kind: "nearest" as const, count }]),
    ...(args.flag("bonds") ? [{ kind: "bonds" as const }] : []),
    ...(args.flag("contacts") ? [{ kind: "contacts" as const }] : []),
  ];
  if (asked.length > 1) throw new UsageProblem("of --within, --nearest, --bonds and --contacts only one can be meant");
  return asked[0] ?? { kind: "shell" };
}

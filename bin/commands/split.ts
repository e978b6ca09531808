import { InputProblem } from "../../lib/problem.ts";
import { correlationSvg, speciesWriter, splitText } from "../../lib/report/index.ts";
import { orderedModel, parseBondPatterns, parseUnitMembers } from "../../lib/structure/index.ts";
import { type SplitOptions, splitAnswer } from "../../lib/vibrations/index.ts";
import { type Arguments, COMMON_OPTIONS, type CommandSpec, SPECIES_OPTIONS } from "../arguments.ts";
import { answerQuestion, askCrystal, type Question } from "../ask.ts";
import { deliver } from "../output.ts";
import { UsageProblem } from "../problems.ts";

export const spec: CommandSpec = {
  name: "split",
  operands: "FILE",
  summary: "Modes of molecules and ions: free unit to site group to factor group; internal, librations, translations.",
  options: {
    ...COMMON_OPTIONS,
    ...SPECIES_OPTIONS,
    bond: { type: "string", many: true, value: "PAIR", describe: 'make this pair a bond, "W-O<1.95"; may be repeated' },
    "no-bond": {
      type: "string",
      many: true,
      value: "PAIR",
      describe: 'never make this pair a bond, "Ca-O"; may be repeated',
    },
    unit: {
      type: "string",
      many: true,
      value: "LABELS",
      describe: 'atoms that make a unit, "S1,O1,O2"; may be repeated',
    },
    "shape-tolerance": {
      type: "number",
      value: "ANGSTROM",
      describe: "largest distance of an atom from its place in the idealised unit (default 0.1; 0.25 for XYn)",
    },
    lower: {
      type: "string",
      many: true,
      value: "UNIT=GROUP",
      describe: 'take a lower group for a unit, "SO4=C2v"; may be repeated',
    },
    ordered: {
      type: "boolean",
      describe: "where sites exclude each other, take an ordered model in a subgroup instead of the average",
    },
    diagram: { type: "boolean", describe: "draw the correlation of each unit as text" },
    svg: { type: "boolean", describe: "print the correlation diagrams as SVG instead of the answer" },
  },
  example: { line: "sitefold split fixtures/calcite.cif", output: "" },
};

export async function run(words: readonly string[]): Promise<number> {
  const asked = await askCrystal(words, spec);
  const { args } = asked;
  const question = args.flag("ordered") ? ordered(asked) : asked;
  const answer = usage(() => splitAnswer(question.crystal, readOptions(args)));
  const write = speciesWriter(args.flag("f") ? "F" : "T");
  if (args.flag("svg")) {
    await deliver(
      correlationSvg(answer.units, answer.factorGroup, write),
      args,
      question.file === "-" ? null : question.file,
    );
    return 0;
  }
  return answerQuestion(question, answer, () => splitText(answer, args.flag("diagram"), write));
}

/** The same question of an ordered model of the crystal; unchanged, with a note, where none is needed or possible. */
function ordered(asked: Question): Question {
  const model = orderedModel(asked.crystal);
  const note = model
    ? `ordered model: of sites that exclude each other one is taken; the space group falls to a subgroup of index ${model.index}`
    : "no ordered model: no sites exclude each other, or no subgroup of the same lattice orders them";
  const heading = { ...asked.heading, notes: [...asked.heading.notes, note] };
  return { ...asked, crystal: model?.crystal ?? asked.crystal, heading };
}

function readOptions(args: Arguments): SplitOptions {
  const tolerance = args.number("shape-tolerance");
  return {
    bonds: {
      bond: args.texts("bond").flatMap(parseBondPatterns),
      noBond: args.texts("no-bond").flatMap(parseBondPatterns),
      units: args.texts("unit").map(parseUnitMembers),
    },
    lower: new Map(args.texts("lower").map(readLowering)),
    ...(tolerance === null ? {} : { shapeTolerance: tolerance }),
  };
}

function readLowering(text: string): [string, string] {
  const [unit, group, ...rest] = text.split("=").map((t) => t.trim());
  if (!unit || !group || rest.length > 0)
    throw new UsageProblem(`--lower "${text}" is not a unit and a group, such as SO4=C2v`);
  return [unit, group];
}

/** Bonds, units and groups come from the command line, so their faults are faults of usage. */
function usage<T>(work: () => T): T {
  try {
    return work();
  } catch (e) {
    throw e instanceof InputProblem ? new UsageProblem(`${e.message}${e.hint ? `\n  ${e.hint}` : ""}`) : e;
  }
}

import {
  correlationSvg,
  polyhedraText,
  type SpeciesWriter,
  speciesWriter,
  splitText,
  unitSummaryText,
} from "../../lib/report/index.ts";
import { orderedModel, parseBondPatterns, parseUnitMembers, statedFormula } from "../../lib/structure/index.ts";
import {
  type ModesAnswer,
  type SplitOptions,
  splitAnswer,
  structureWarnings,
  unitSummaries,
} from "../../lib/vibrations/index.ts";
import { type Arguments, COMMON_OPTIONS, type CommandSpec, POLYHEDRON_OPTION, SPECIES_OPTIONS } from "../arguments.ts";
import { answerQuestion, askCrystal, type Question, withNotes } from "../ask.ts";
import { EXAMPLE } from "../examples/split.ts";
import { deliver } from "../output.ts";
import { askedPolyhedra } from "../polyhedra.ts";
import { UsageProblem } from "../problems.ts";
import { usage } from "../usage.ts";

/** For `modes`, which loads it where it is needed. */
export { structureWarnings };

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
    ...POLYHEDRON_OPTION,
    diagram: { type: "boolean", describe: "draw the correlation of each unit as text" },
    svg: { type: "boolean", describe: "print the correlation diagrams as SVG instead of the answer" },
  },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const asked = await askCrystal(words, spec);
  const { args } = asked;
  const question = args.flag("ordered") ? ordered(asked) : asked;
  const { crystal, file } = question;
  const answer = usage(() => splitAnswer(crystal, readOptions(args)));
  const write = speciesWriter(args.flag("f") ? "F" : "T");
  if (args.flag("svg")) {
    if (args.flag("json")) throw new UsageProblem("--svg and --json ask for two formats");
    await deliver(correlationSvg(answer.units, answer.factorGroup, write), args, file === "-" ? null : file);
    return 0;
  }
  const polyhedra = askedPolyhedra(args, crystal);
  const warned = withNotes(question, structureWarnings(crystal, statedFormula(question.block)));
  return answerQuestion(warned, { ...answer, ...(polyhedra ? { polyhedra } : {}) }, () => {
    const parts = [splitText(answer, args.flag("diagram"), write)];
    if (polyhedra) parts.push(polyhedraText(polyhedra, answer.activity, write));
    return parts.join("\n\n");
  });
}

/** What `modes` shows of units and polyhedra if asked; here, so that it loads no more than it shows. */
export function unitParts({ args, crystal }: Question, { irreps }: ModesAnswer, write: SpeciesWriter): UnitParts {
  const units = args.flag("units") ? unitSummaries(splitAnswer(crystal)) : null;
  const polyhedra = askedPolyhedra(args, crystal);
  return {
    answer: { ...units, ...(polyhedra ? { polyhedra } : {}) },
    text: () => [
      ...(units ? [unitSummaryText(units, write)] : []),
      ...(polyhedra ? [polyhedraText(polyhedra, irreps, write)] : []),
    ],
  };
}

interface UnitParts {
  readonly answer: object;
  readonly text: () => string[];
}

/** The same question of an ordered model of the crystal; unchanged, with a note, where none is needed or possible. */
function ordered(asked: Question): Question {
  const model = orderedModel(asked.crystal);
  const note = model
    ? `ordered model: of sites that exclude each other one is taken; the space group falls to a subgroup of index ${model.index}`
    : "no ordered model: no sites exclude each other, or no subgroup of the same lattice orders them";
  return { ...withNotes(asked, [note]), crystal: model?.crystal ?? asked.crystal };
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

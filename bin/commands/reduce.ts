import { InputProblem } from "../../lib/problem.ts";
import { reduceText } from "../../lib/report/index.ts";
import {
  type BlockLattice,
  centringsByLetter,
  latticeFromBlock,
  metricOf,
  reduceAnswer,
} from "../../lib/structure/index.ts";
import { type Arguments, COMMON_OPTIONS, type CommandSpec, onlyOperand, parseArguments } from "../arguments.ts";
import { EXAMPLE } from "../examples/reduce.ts";
import { blaming, chooseBlock, readSource } from "../input.ts";
import { ANGLE_OPTION, latticeAngle } from "../lattice-angle.ts";
import { deliver, jsonDocument } from "../output.ts";
import { UsageProblem } from "../problems.ts";

const { block, strict, json, output } = COMMON_OPTIONS;

export const spec: CommandSpec = {
  name: "reduce",
  operands: "[FILE]",
  summary: "Niggli, Delaunay and conventional cell, symmetry of the lattice and how far it misses a higher one.",
  options: {
    cell: { type: "string", value: "CELL", describe: 'a cell in place of a file, "a b c alpha beta gamma"' },
    centring: { type: "string", value: "LETTER", describe: "P, A, B, C, I, F, R or H, in place of what the file says" },
    ...ANGLE_OPTION,
    block,
    strict,
    json,
    output,
  },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const args = parseArguments(words, spec);
  const typed = args.text("cell");
  const { lattice, source, file } = typed === null ? await fromFile(args) : fromOption(args, typed);
  const answer = reduceAnswer(lattice.metric, lattice.centrings, latticeAngle(args));
  const heading = { command: spec.name, source, notes: lattice.notes, tolerance: { position: 0 } };
  await deliver(args.flag("json") ? jsonDocument(heading, answer) : reduceText(answer, heading), args, file);
  return 0;
}

interface Given {
  readonly lattice: BlockLattice;
  readonly source: { readonly file: string; readonly block: string };
  readonly file: string | null;
}

async function fromFile(args: Arguments): Promise<Given> {
  const file = onlyOperand(args, "a CIF file, or --cell,");
  const source = await readSource(file, args);
  const chosen = chooseBlock(source, args);
  const lattice = blaming(source, () => latticeFromBlock(chosen.block, args.text("centring")));
  return {
    lattice: { ...lattice, notes: [...chosen.notes, ...lattice.notes] },
    source: { file: source.file, block: chosen.block.name },
    file: file === "-" ? null : file,
  };
}

function fromOption(args: Arguments, typed: string): Given {
  if (args.operands.length > 0) throw new UsageProblem("give either a file or --cell, not both");
  const numbers = (typed.match(/[^\s,]+/g) ?? []).map(Number);
  if (numbers.length !== 6 || !numbers.every(Number.isFinite)) {
    throw new UsageProblem(`--cell "${typed}" is not six numbers: a b c alpha beta gamma`);
  }
  const [a, b, c, alpha, beta, gamma] = numbers as [number, number, number, number, number, number];
  try {
    const metric = metricOf({ a, b, c, alpha, beta, gamma });
    const lattice = { metric, centrings: centringsByLetter(args.text("centring") ?? "P"), notes: [] };
    return { lattice, source: { file: `cell ${numbers.join(" ")}`, block: "" }, file: null };
  } catch (e) {
    throw e instanceof InputProblem ? new UsageProblem(`${e.message}\n  ${e.hint}`) : e;
  }
}

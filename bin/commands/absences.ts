import { type AbsencesOptions, absencesAnswer, absencesQuestion, type Quantity } from "../../lib/audit/index.ts";
import { decodeCif } from "../../lib/cif/index.ts";
import { absencesText, groupName, wrapText } from "../../lib/report/index.ts";
import { type Arguments, COMMON_OPTIONS, type CommandSpec, onlyOperand, parseArguments } from "../arguments.ts";
import { EXAMPLE } from "../examples/absences.ts";
import { blaming, bytesOf, chooseBlock, readSource } from "../input.ts";
import { ANGLE_OPTION, latticeAngle } from "../lattice-angle.ts";
import { deliver, jsonDocument } from "../output.ts";
import { UsageProblem } from "../problems.ts";

const { block, strict, json, output } = COMMON_OPTIONS;

export const spec: CommandSpec = {
  name: "absences",
  operands: "FILE",
  summary: "Systematic absences against the declared group, agreement of equivalents, and the space groups that fit.",
  options: {
    reflections: {
      type: "string",
      value: "FILE",
      describe: "file with the reflections: a CIF, or lines of h k l, value, uncertainty",
    },
    matrix: {
      type: "string",
      value: "MATRIX",
      describe: 'listed indices to those of the cell, row by row: "0 0 1  0 1 0  -1 0 -1"',
    },
    group: { type: "string", value: "NAME", describe: "space group to test in place of the declared one" },
    values: { type: "string", value: "F|F2", describe: "what the values of the list are, where it does not say" },
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
  const file = onlyOperand(args, "a CIF file");
  const options = await optionsOf(args);
  const source = await readSource(file, args);
  const chosen = chooseBlock(source, args);
  const asked = blaming(source, () => absencesQuestion(chosen.block, source.document.blocks, options));
  const answer = absencesAnswer(asked.question);
  const spaceGroup = asked.question.declared?.summary ?? null;
  const heading = {
    command: spec.name,
    source: { file: source.file, block: chosen.block.name },
    notes: [...chosen.notes, ...asked.notes],
    tolerance: { position: 0 },
  };
  const head = [
    `${source.file}, block ${chosen.block.name || "(nameless)"}`,
    spaceGroup ? `space group ${groupName(spaceGroup)}` : "no space group declared",
    ...heading.notes.map((note) => wrapText(`- ${note}`, 110, "  ")),
  ];
  const text = () => `${head.join("\n")}\n\n${absencesText(answer)}`;
  await deliver(
    args.flag("json") ? jsonDocument(heading, { spaceGroup, ...answer }) : text(),
    args,
    options.reflections?.name ?? null,
  );
  return 0;
}

async function optionsOf(args: Arguments): Promise<AbsencesOptions> {
  const [file, matrix, group] = [args.text("reflections"), args.text("matrix"), args.text("group")];
  const quantity = quantityOf(args.text("values"));
  return {
    ...(file === null ? {} : { reflections: { name: file, text: decodeCif(await bytesOf(file)).text } }),
    ...(matrix === null ? {} : { matrix }),
    ...(group === null ? {} : { group }),
    ...(quantity === null ? {} : { quantity }),
    angleTolerance: latticeAngle(args),
  };
}

function quantityOf(written: string | null): Quantity | null {
  if (written === null) return null;
  const quantity = { F: "F", F2: "F^2", "F^2": "F^2" }[written.toUpperCase()];
  if (quantity === "F" || quantity === "F^2") return quantity;
  throw new UsageProblem(`--values takes F or F2, not "${written}"`);
}

import { allCriteria, criterionOf, problemsByBlock, vetAnswer } from "../../lib/audit/index.ts";
import { criteriaText, criterionText, type VettedBlock, vetTable, vetText } from "../../lib/report/index.ts";
import { POSITION_TOLERANCE } from "../../lib/structure/index.ts";
import { type Arguments, COMMON_OPTIONS, type CommandSpec, parseArguments } from "../arguments.ts";
import { EXAMPLE } from "../examples/vet.ts";
import { blaming, loadSource, type Source, tellProblems } from "../input.ts";
import { deliver, type Heading, jsonDocument } from "../output.ts";
import { LocatedProblem, UsageProblem } from "../problems.ts";
import { structureBlocks } from "../structure-blocks.ts";

export const spec: CommandSpec = {
  name: "vet",
  operands: "FILE...",
  summary: "Contradictions and doubtful points of a structure; a table for several files.",
  options: {
    ...COMMON_OPTIONS,
    explain: {
      type: "string",
      value: "ID",
      describe: 'criterion behind the id of a finding, and its source; "all" lists ids',
    },
  },
  example: EXAMPLE,
};

export async function run(words: readonly string[]): Promise<number> {
  const args = parseArguments(words, spec);
  const id = args.text("explain");
  if (id !== null) return await explain(id, args);
  if (args.operands.length === 0) throw new UsageProblem("a CIF file is missing");
  const tolerance = args.number("tolerance") ?? POSITION_TOLERANCE;
  const vetted: VettedBlock[] = [];
  for (const file of args.operands) vetted.push(...(await vetFile(file, args, tolerance)));
  await deliver(args.flag("json") ? json(vetted, tolerance) : text(vetted), args, null);
  if (vetted.some((v) => v.answer && v.answer.counts.contradiction > 0)) return 1;
  return vetted.some((v) => v.answer === null) ? 3 : 0;
}

/** Every block that holds a structure. Of several files one that cannot be read becomes a line of the table. */
async function vetFile(file: string, args: Arguments, tolerance: number): Promise<VettedBlock[]> {
  let source: Source;
  try {
    source = await loadSource(file, args);
    if (source.document.blocks.length === 0) tellProblems(source);
    const blocks = structureBlocks(source, args);
    const dealt = args.text("block") === null ? blocks : source.document.blocks;
    const problems = problemsByBlock(source.problems, dealt);
    return blocks.map((block) => {
      const answer = blaming(source, () => vetAnswer(block, tolerance, problems[dealt.indexOf(block)]));
      return { file: source.file, block: block.name, answer, problem: null };
    });
  } catch (e) {
    if (!(e instanceof LocatedProblem) || args.operands.length === 1) throw e;
    return [{ file, block: "", answer: null, problem: e.message.split("\n")[0]!.replace(`${file}: `, "") }];
  }
}

function text(vetted: readonly VettedBlock[]): string {
  const [only] = vetted;
  if (vetted.length !== 1 || !only?.answer) return vetTable(vetted);
  return `${only.file}, block ${only.block || "(nameless)"}\n${vetText(only.answer)}`;
}

function json(vetted: readonly VettedBlock[], tolerance: number): string {
  const [only] = vetted;
  if (vetted.length === 1 && only?.answer) return jsonDocument(heading(only, tolerance), only.answer);
  const files = vetted.map(({ file, block, answer, problem }) =>
    answer ? { source: { file, block }, ...answer } : { source: { file, block }, problem },
  );
  return jsonDocument(heading({ file: "", block: "" }, tolerance), { files });
}

function heading({ file, block }: Heading["source"], tolerance: number): Heading {
  return { command: spec.name, source: { file, block }, notes: [], tolerance: { position: tolerance } };
}

/** @throws UsageProblem for an id that no finding has */
async function explain(id: string, args: Arguments): Promise<number> {
  const criterion = criterionOf(id);
  if (!criterion && id !== "all") throw new UsageProblem(`no finding has the id "${id}"; --explain all lists them`);
  const criteria = criterion ? [criterion] : allCriteria();
  const plain = criterion ? criterionText(criterion) : criteriaText(criteria);
  const document = () => jsonDocument(heading({ file: "", block: "" }, 0), { criteria });
  await deliver(args.flag("json") ? document() : plain, args, null);
  return 0;
}

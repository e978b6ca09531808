import { groupName, pointsText, wrapText } from "../lib/report/index.ts";
import {
  checkedTolerance,
  completedCell,
  type Metric,
  POSITION_TOLERANCE,
  parseCellParameters,
  pointsAnswer,
} from "../lib/structure/index.ts";
import { type IdentifiedGroup, identifyGroup, namedGroup, parsePoint } from "../lib/symmetry/index.ts";
import { type Arguments, type CommandSpec, parseArguments } from "./arguments.ts";
import { deliver, type Heading, jsonDocument } from "./output.ts";
import { UsageProblem } from "./problems.ts";
import { usage } from "./usage.ts";

/** `sites --group GROUP --at POINT`: points of a space group instead of the atoms of a file. */
export async function answerPoints(words: readonly string[], spec: CommandSpec): Promise<number> {
  const args = parseArguments(words, spec);
  const name = args.text("group");
  if (name === null) throw new UsageProblem("--at, --cell and --orbit go with --group");
  if (args.operands.length > 0) throw new UsageProblem(`give either a file or --group, not both: ${args.operands[0]}`);
  const points = args.texts("at").map((text) => usage(() => parsePoint(text)));
  if (points.length === 0) throw new UsageProblem('--group needs a point: --at "0.1,1/4,0.3"');
  const { identified, notes } = groupCalled(name);
  const near = nearness(args, identified);
  const { sites, notes: missed } = usage(() => pointsAnswer({ identified, points, near, images: args.flag("orbit") }));
  const heading: Heading = {
    command: spec.name,
    source: { file: `group ${name}`, block: "" },
    notes: [...notes, ...(near ? [cellNote(near.metric)] : [EXACT]), ...missed],
    tolerance: { position: near?.tolerance ?? 0 },
  };
  const text = () => [headText(heading, identified), pointsText({ sites })].join("\n\n");
  const body = args.flag("json") ? jsonDocument(heading, { spaceGroup: identified.summary, sites }) : text();
  await deliver(body, args, null);
  return 0;
}

const EXACT =
  "no cell is given, so there is no length: points are taken as written, and near ones are not one position";

function groupCalled(name: string): { identified: IdentifiedGroup; notes: string[] } {
  const { understoodAs, settings, ambiguity } = usage(() => namedGroup(name));
  const open = ambiguity.length > 0 ? `; left open: ${ambiguity.join(", ")}, the most usual is taken` : "";
  return { identified: identifyGroup(settings[0].group), notes: [`"${name}" read as ${understoodAs}${open}`] };
}

function nearness(args: Arguments, { group, summary }: IdentifiedGroup): { metric: Metric; tolerance: number } | null {
  const written = args.text("cell");
  const tolerance = args.number("tolerance");
  if (written === null) {
    if (tolerance !== null) throw new UsageProblem("--tolerance is a length, which needs --cell here");
    return null;
  }
  return usage(() => {
    const { values, spans } = parseCellParameters(written);
    const metric = completedCell(values, group, { groupName: summary.hermannMauguin, spans });
    return { metric, tolerance: checkedTolerance(tolerance ?? POSITION_TOLERANCE) };
  });
}

function cellNote({ cell }: Metric): string {
  const { a, b, c, alpha, beta, gamma } = cell;
  return `cell ${a} ${b} ${c} Å, ${alpha} ${beta} ${gamma}°`;
}

function headText({ notes, tolerance }: Heading, { summary }: IdentifiedGroup): string {
  const within = tolerance.position > 0 ? [`positions closer than ${tolerance.position} Å are one position`] : [];
  return [`space group ${groupName(summary)}`, ...within, ...notes.map((n) => wrapText(`- ${n}`, 110, "  "))].join(
    "\n",
  );
}

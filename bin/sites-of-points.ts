import { InputProblem } from "../lib/problem.ts";
import { groupName, pointsText, wrapText } from "../lib/report/index.ts";
import {
  cellInOrder,
  checkedTolerance,
  completedCell,
  type Metric,
  POSITION_TOLERANCE,
  parseCellParameters,
  pointsAnswer,
} from "../lib/structure/index.ts";
import { type IdentifiedGroup, identifyGroup, type NamedGroup, namedGroup, parsePoint } from "../lib/symmetry/index.ts";
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
  const { identified, near, notes } = groupCalled(name, args);
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

interface CalledGroup {
  readonly identified: IdentifiedGroup;
  readonly near: { readonly metric: Metric; readonly tolerance: number } | null;
  readonly notes: readonly string[];
}

/** The group, in the most usual setting that the cell fits if one is given. */
function groupCalled(name: string, args: Arguments): CalledGroup {
  const { understoodAs, settings, ambiguity } = usage(() => namedGroup(name));
  const { setting, near } = usage(() => settledBy(settings, args));
  const open =
    ambiguity.length > 0 ? `; left open: ${ambiguity.join(", ")}; ${setting.name} is taken, the most usual` : "";
  const fitting = near && settings.length > 1 ? " that the cell fits" : "";
  const notes = [`"${name}" read as ${understoodAs}${open}${open && fitting}`];
  return { identified: identifyGroup(setting.group), near, notes };
}

/** @throws InputProblem that of the most usual setting, if the cell fits none */
function settledBy(settings: NamedGroup["settings"], args: Arguments) {
  const written = args.text("cell");
  const tolerance = args.number("tolerance");
  if (written === null) {
    if (tolerance !== null) throw new UsageProblem("--tolerance is a length, which needs --cell here");
    return { setting: settings[0], near: null };
  }
  const read = parseCellParameters(written);
  let first: InputProblem | null = null;
  for (const setting of settings) {
    try {
      const { values, spans } = cellInOrder(read, setting.group, setting.name);
      const metric = completedCell(values, setting.group, { groupName: setting.name, spans });
      return { setting, near: { metric, tolerance: checkedTolerance(tolerance ?? POSITION_TOLERANCE) } };
    } catch (e) {
      if (!(e instanceof InputProblem) || e.code === "tolerance-impossible") throw e;
      first ??= e;
    }
  }
  throw first;
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

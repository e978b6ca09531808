import { type CifBlock, readCif } from "../cif/index.ts";
import { InputProblem } from "../problem.ts";
import {
  declaredSymmetry,
  METRIC_TOLERANCE,
  type Metric,
  metricOf,
  readCell,
  resolveSymmetry,
  shapeMisfit,
} from "../structure/index.ts";
import {
  type IdentifiedGroup,
  identifyGroup,
  readGroupName,
  settingOperations,
  spaceGroup,
} from "../symmetry/index.ts";
import type { AbsencesQuestion } from "./absences-answer.ts";
import { type FoundReflections, findReflections, listOfText } from "./find-reflections.ts";
import { parseIndexMatrix } from "./index-matrix.ts";
import type { Quantity, ReflectionList } from "./reflection-list.ts";

/** What the user may say beyond the file. */
export interface AbsencesOptions {
  /** Another file with the reflections: a CIF or lines of h k l, value, uncertainty. */
  readonly reflections?: { readonly name: string; readonly text: string };
  /** Nine numbers, see parseIndexMatrix. */
  readonly matrix?: string;
  /** Name of a group to test in place of the declared one. */
  readonly group?: string;
  /** What the values of the list are, in place of what it says or shows. */
  readonly quantity?: Quantity;
  /** Degrees; see AbsencesQuestion. */
  readonly angleTolerance?: number;
}

/**
 * The question that a block of a file puts: its cell, its declared group, its reflections. Atoms are not needed.
 * @param blocks all blocks of the file; reflections missing from `block` are looked for in the others
 * @throws InputProblem `reflections-missing`, or for an impossible cell, unreadable symmetry, name or matrix
 */
export function absencesQuestion(
  block: CifBlock,
  blocks: readonly CifBlock[],
  options: AbsencesOptions = {},
): { readonly question: AbsencesQuestion; readonly notes: readonly string[] } {
  const metric = metricOf(readCell(block));
  const { declared, notes } = options.group ? namedGroup(options.group, metric) : declaredGroup(block, metric);
  const found = options.reflections ? otherFile(options.reflections) : reflectionsOf(block, blocks);
  const [first, ...others] = found.lists;
  if (!first) throw missing(options.reflections?.name ?? `block "${block.name}"`);
  const list: ReflectionList = options.quantity
    ? { ...first, quantity: options.quantity, quantityFrom: "given" }
    : first;
  const further = others.length > 0 ? [`further lists, not used: ${others.map((l) => l.source).join(", ")}`] : [];
  const matrix = options.matrix
    ? { M: parseIndexMatrix(options.matrix), source: "the command line", diffractionListOnly: false }
    : null;
  const { angleTolerance } = options;
  return {
    question: {
      list,
      matrices: [...found.matrices, ...(options.reflections ? findReflections(block).matrices : [])],
      matrix,
      metric,
      declared,
      ...(angleTolerance === undefined ? {} : { angleTolerance }),
    },
    notes: [...notes, ...list.notes, ...further],
  };
}

interface DeclaredGroup {
  readonly declared: IdentifiedGroup | null;
  readonly notes: readonly string[];
}

function declaredGroup(block: CifBlock, metric: Metric): DeclaredGroup {
  try {
    const { identified, notes } = resolveSymmetry(declaredSymmetry(block), metric, () => null, "accept");
    return { declared: identified, notes };
  } catch (e) {
    if (!(e instanceof InputProblem && e.code === "symmetry-missing")) throw e;
    return {
      declared: null,
      notes: ["no space group is declared; conditions are tested for the groups that fit only"],
    };
  }
}

/** The setting that fits the cell, the most usual of several. */
function namedGroup(name: string, metric: Metric): DeclaredGroup {
  const reading = readGroupName(name);
  const groups = reading.candidates.map((c) =>
    spaceGroup(settingOperations({ number: c.number, toReference: c.transformation })),
  );
  const fitting = groups.find((g) => shapeMisfit(metric, g) <= METRIC_TOLERANCE);
  const notes = [`group given: ${name}, read as ${reading.understoodAs}`];
  if (!fitting) notes.push("the cell does not have the shape that this group needs");
  return { declared: identifyGroup(fitting ?? groups[0]!), notes };
}

function otherFile({ name, text }: { readonly name: string; readonly text: string }): FoundReflections {
  const list = listOfText(text, name);
  if (list) return { lists: [list], matrices: [] };
  const found = readCif(text).value.blocks.map(findReflections);
  return { lists: found.flatMap((f) => f.lists), matrices: found.flatMap((f) => f.matrices) };
}

function reflectionsOf(block: CifBlock, blocks: readonly CifBlock[]): FoundReflections {
  const own = findReflections(block);
  if (own.lists.length > 0) return own;
  for (const other of blocks) {
    const found = other === block ? own : findReflections(other);
    if (found.lists.length === 0) continue;
    const lists = found.lists.map((l) => ({ ...l, source: `${l.source} in block ${other.name}` }));
    return { lists, matrices: [...own.matrices, ...found.matrices] };
  }
  return own;
}

function missing(where: string): InputProblem {
  return new InputProblem(
    "reflections-missing",
    `${where} has no reflections: no _refln_ or _diffrn_refln_ loop with values, and no text of lines h k l, value, uncertainty`,
    null,
    "name the file that has them with --reflections FILE",
  );
}

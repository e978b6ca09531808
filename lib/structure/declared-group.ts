import { InputProblem } from "../problem.ts";
import {
  type GroupNameCandidate,
  type GroupNameReading,
  type IdentifiedGroup,
  identifyGroup,
  operationsFromHall,
  readGroupName,
  type SpaceGroup,
  settingOperations,
  spaceGroup,
} from "../symmetry/index.ts";
import { METRIC_TOLERANCE, type Metric } from "./cell.ts";
import { compareStatements, type SymmetryDisagreement } from "./compare-statements.ts";
import { type Declared, type DeclaredSymmetry, listedGroup, type SymmetrySource } from "./declared-symmetry.ts";
import { primitiveSettings } from "./primitive-setting.ts";
import { shapeMisfit } from "./shape-misfit.ts";

/** Strain above which a name cannot be meant for a cell: no rounding and no s.u. explains it. */
export const NAME_STRAIN = 0.05;

/** The group of a block and how it was settled. */
export interface ResolvedSymmetry {
  readonly identified: IdentifiedGroup;
  readonly source: SymmetrySource;
  readonly notes: readonly string[];
  readonly disagreements: readonly SymmetryDisagreement[];
}

/** Chooses among groups that a name may mean, from what the structure shows; null where it cannot tell. */
export type Arbiter = (groups: readonly SpaceGroup[]) => { readonly index: number; readonly why: string } | null;

/**
 * The space group of a block: the operations listed if there are any; else the Hall symbol, else the name, else the
 * number. The other statements are compared with it; every disagreement is told.
 * @param arbiter settles what a name leaves open after the shape of the cell was asked
 * @param strained whether a name whose group strains the cell by more than NAME_STRAIN is refused or taken all the same
 * @throws InputProblem `symmetry-missing`, `cell-not-of-group`, or the problem of the statement in use where that cannot
 *   be read
 */
export function resolveSymmetry(
  declared: DeclaredSymmetry,
  metric: Metric,
  arbiter: Arbiter,
  strained: "refuse" | "accept" = "refuse",
): ResolvedSymmetry {
  const base = fromOperations(declared) ?? fromHall(declared) ?? fromName(declared, metric, arbiter, strained);
  if (!base) {
    throw new InputProblem(
      "symmetry-missing",
      "the block states no symmetry: no operations, Hall symbol, name or number",
      null,
      "add a _space_group_symop_operation_xyz loop, or at least _space_group_name_H-M_alt",
    );
  }
  const { group, source } = base;
  const stated = Number(declared.number?.text);
  const identified = identifyGroup(group, Number.isInteger(stated) ? stated : null);
  const disagreements = [...base.disagreements, ...compareStatements(declared, identified, source)];
  return { identified, source, notes: [...base.notes, ...disagreements.map((d) => d.message)], disagreements };
}

interface Base {
  readonly group: SpaceGroup;
  readonly source: SymmetrySource;
  readonly notes: readonly string[];
  readonly disagreements: readonly SymmetryDisagreement[];
}

function fromOperations({ operations }: DeclaredSymmetry): Base | null {
  const listed = listedGroup(operations);
  if (!listed) return null;
  const notes = ["symmetry: the operations listed in the file", ...listed.notes];
  return { group: spaceGroup(listed.operations), source: "operations", notes, disagreements: [] };
}

function fromHall({ hall }: DeclaredSymmetry): Base | null {
  if (!hall) return null;
  const group = placed(hall, () => spaceGroup(operationsFromHall(hall.text).operations));
  const notes = [`symmetry: the Hall symbol ${hall.text}; no operations are listed`];
  return { group, source: "hall", notes, disagreements: [] };
}

function fromName(
  declared: DeclaredSymmetry,
  metric: Metric,
  arbiter: Arbiter,
  strained: "refuse" | "accept",
): Base | null {
  const name = declared.hermannMauguin ?? declared.schoenflies;
  const stated = name ?? declared.number;
  if (!stated) return null;
  const reading = placed(stated, () => readGroupName(stated.text));
  const what = name ? `the name ${name.text}` : `the number ${stated.text}`;
  const notes = [`symmetry: ${what}, read as ${reading.understoodAs}; no operations are listed`];
  const narrowed = numberFits(reading, declared.number);
  const { open, note, disagreements } = settingsOfCell(metric, narrowed, strained, stated, what);
  notes.push(...note);
  const verdict = open.length > 1 ? arbiter(open.map(({ group }) => group)) : null;
  const chosen = open[verdict?.index ?? 0]!;
  if (open.length > 1) notes.push(openText(reading, narrowed[chosen.candidate]!, verdict?.why ?? null));
  return { group: chosen.group, source: name ? "name" : "number", notes, disagreements };
}

interface OpenSetting {
  readonly group: SpaceGroup;
  readonly candidate: number;
}

/** The settings of a name that the shape of the cell leaves: conventional ones, else primitive ones, else the nearest. */
function settingsOfCell(
  metric: Metric,
  candidates: readonly GroupNameCandidate[],
  strained: "refuse" | "accept",
  stated: Declared,
  what: string,
): Pick<Base, "disagreements"> & { open: readonly OpenSetting[]; note: readonly string[] } {
  const all = candidates.map((c, candidate) => {
    const group = groupOf(c);
    return { group, candidate, strain: shapeMisfit(metric, group) };
  });
  const fitting = all.filter(({ strain }) => strain <= METRIC_TOLERANCE);
  if (fitting.length > 0) {
    const left = `the shape of the cell leaves ${fitting.length} of ${all.length} settings`;
    return { open: fitting, note: all.length > 1 && fitting.length < all.length ? [left] : [], disagreements: [] };
  }
  const nearest = all.reduce((a, b) => (b.strain < a.strain ? b : a));
  const percent = `${(100 * nearest.strain).toFixed(1)} %`;
  const primitive = primitiveSettings(
    metric,
    candidates,
    all.map((a) => a.group),
  );
  const [first] = primitive;
  if (first && nearest.strain > NAME_STRAIN) {
    const message =
      `the cell is not the conventional one of ${what}, whose operations would strain it by ${percent}, ` +
      `but the primitive one, with axes ${first.axes}: they are used over these`;
    return {
      open: primitive,
      note: [],
      disagreements: [{ kind: "name", declared: stated, level: "setting", message }],
    };
  }
  if (nearest.strain > NAME_STRAIN && strained === "refuse") {
    throw new InputProblem(
      "cell-not-of-group",
      `${stated.name}: the cell does not have the shape that ${what} needs (strain ${percent}), nor that of a usual primitive cell of its lattice`,
      stated.span,
      "correct the cell or the name, or list the operations in the axes of this cell",
    );
  }
  return { open: [nearest], note: [], disagreements: [] };
}

function openText(reading: GroupNameReading, chosen: GroupNameCandidate, why: string | null): string {
  const open = reading.ambiguity.join(", ") || "the setting";
  const { setting } = chosen;
  const taken = `${setting.hermannMauguin.full}${setting.choice ? `:${setting.choice}` : ""}`;
  return `the name leaves open: ${open}; ${taken} is used, ${why ?? "the most usual one; nothing in the file decides"}`;
}

/** Where the number is stated too, candidates of other types are dropped, unless none would be left. */
function numberFits(reading: GroupNameReading, number: Declared | null): readonly GroupNameCandidate[] {
  const n = Number(number?.text);
  const fitting = reading.candidates.filter((c) => c.number === n);
  return fitting.length > 0 ? fitting : reading.candidates;
}

function groupOf({ number, transformation }: GroupNameCandidate): SpaceGroup {
  return spaceGroup(settingOperations({ number, toReference: transformation }));
}

/** Runs a reader of a statement; its problem is placed in the file. */
function placed<T>(statement: Declared, read: () => T): T {
  try {
    return read();
  } catch (e) {
    if (!(e instanceof InputProblem)) throw e;
    throw new InputProblem(e.code, `${statement.name}: ${e.message}`, statement.span, e.hint);
  }
}

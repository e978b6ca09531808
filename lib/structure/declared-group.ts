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
import { METRIC_TOLERANCE, type Metric, metricMisfit } from "./cell.ts";
import { compareStatements, type SymmetryDisagreement } from "./compare-statements.ts";
import { type Declared, type DeclaredSymmetry, listedGroup, type SymmetrySource } from "./declared-symmetry.ts";

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
 * @throws InputProblem `symmetry-missing`, or the problem of the statement in use where that cannot be read
 */
export function resolveSymmetry(declared: DeclaredSymmetry, metric: Metric, arbiter: Arbiter): ResolvedSymmetry {
  const base = fromOperations(declared) ?? fromHall(declared) ?? fromName(declared, metric, arbiter);
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
  const disagreements = compareStatements(declared, identified, source);
  return { identified, source, notes: [...base.notes, ...disagreements.map((d) => d.message)], disagreements };
}

interface Base {
  readonly group: SpaceGroup;
  readonly source: SymmetrySource;
  readonly notes: readonly string[];
}

function fromOperations({ operations }: DeclaredSymmetry): Base | null {
  const listed = listedGroup(operations);
  if (!listed) return null;
  const notes = ["symmetry: the operations listed in the file", ...listed.notes];
  return { group: spaceGroup(listed.operations), source: "operations", notes };
}

function fromHall({ hall }: DeclaredSymmetry): Base | null {
  if (!hall) return null;
  const group = placed(hall, () => spaceGroup(operationsFromHall(hall.text).operations));
  return { group, source: "hall", notes: [`symmetry: the Hall symbol ${hall.text}; no operations are listed`] };
}

function fromName(declared: DeclaredSymmetry, metric: Metric, arbiter: Arbiter): Base | null {
  const name = declared.hermannMauguin ?? declared.schoenflies;
  const stated = name ?? declared.number;
  if (!stated) return null;
  const reading = placed(stated, () => readGroupName(stated.text));
  const what = name ? `the name ${name.text}` : `the number ${stated.text}`;
  const notes = [`symmetry: ${what}, read as ${reading.understoodAs}; no operations are listed`];
  const narrowed = numberFits(reading, declared.number);
  const groups = narrowed.map(groupOf);
  const fitting = groups.map((g, i) => ({ g, i })).filter(({ g }) => shapeMisfit(metric, g) <= METRIC_TOLERANCE);
  const open = fitting.length > 0 ? fitting : [{ g: groups[0]!, i: 0 }];
  if (groups.length > 1 && open.length < groups.length)
    notes.push(`the shape of the cell leaves ${open.length} of ${groups.length} settings`);
  const verdict = open.length > 1 ? arbiter(open.map(({ g }) => g)) : null;
  const chosen = open[verdict?.index ?? 0]!;
  if (open.length > 1) notes.push(openText(reading, narrowed[chosen.i]!, verdict?.why ?? null));
  return { group: chosen.g, source: name ? "name" : "number", notes };
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

/** Largest strain of the cell under the operations of a group; dimensionless. */
export function shapeMisfit(metric: Metric, group: SpaceGroup): number {
  return group.representatives.reduce((worst, a) => Math.max(worst, metricMisfit(metric, a.W)), 0);
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

import { type CifBlock, cellOf, findLoop, findValue } from "../cif/index.ts";
import { InputProblem, type Span } from "../problem.ts";
import {
  closeGroup,
  formatOperation,
  IDENTITY_OPERATION,
  missingProduct,
  type Operation,
  operationKey,
  parseOperation,
} from "../symmetry/index.ts";

/** A text of the file and its place. */
export interface Declared {
  readonly text: string;
  readonly name: string;
  readonly span: Span;
}

/** One line of the list of operations; `problem` where it could not be read. */
export interface DeclaredOperation extends Declared {
  readonly operation: Operation | null;
  readonly problem: InputProblem | null;
}

/** Which of a file's statements the group was taken from. */
export type SymmetrySource = "operations" | "hall" | "name" | "number";

/** Everything a block says of its symmetry, read but not yet compared. */
export interface DeclaredSymmetry {
  readonly operations: readonly DeclaredOperation[];
  readonly hall: Declared | null;
  readonly hermannMauguin: Declared | null;
  readonly number: Declared | null;
  readonly schoenflies: Declared | null;
}

/** Reads the symmetry items of a block. Never throws: unreadable operations carry their problem. */
export function declaredSymmetry(block: CifBlock): DeclaredSymmetry {
  return {
    operations: declaredOperations(block),
    hall: declared(block, "_space_group.name_Hall"),
    hermannMauguin: declared(block, "_space_group.name_H-M_alt") ?? declared(block, "_space_group.name_H-M_ref"),
    number: declared(block, "_space_group.IT_number"),
    schoenflies: declared(block, "_space_group.name_Schoenflies"),
  };
}

function declared(block: CifBlock, canonical: string): Declared | null {
  const found = findValue(block, canonical);
  if (found?.value.kind !== "text" || found.value.text.trim() === "") return null;
  return { text: found.value.text.trim(), name: found.name, span: found.value.span };
}

const XYZ = "_space_group_symop.operation_xyz";

function declaredOperations(block: CifBlock): DeclaredOperation[] {
  const loop = findLoop(block, XYZ);
  if (!loop) {
    const single = declared(block, XYZ);
    return single ? [readOperation(single)] : [];
  }
  const out: DeclaredOperation[] = [];
  for (let row = 0; row < loop.rowCount; row++) {
    const value = cellOf(loop, row, XYZ);
    if (value?.kind === "text") out.push(readOperation({ text: value.text.trim(), name: XYZ, span: value.span }));
  }
  return out;
}

function readOperation(source: Declared): DeclaredOperation {
  try {
    return { ...source, operation: parseOperation(source.text), problem: null };
  } catch (e) {
    if (!(e instanceof InputProblem)) throw e;
    return { ...source, operation: null, problem: new InputProblem(e.code, e.message, source.span, e.hint) };
  }
}

/** A complete list of operations, and what was mended in it. */
export interface ListedGroup {
  readonly operations: readonly Operation[];
  readonly notes: readonly string[];
}

/**
 * The group that a list of operations states, or null for an empty list. An identity left out is added with a note.
 * @throws InputProblem the first unreadable operation, or `operations-not-closed` naming the product that is missing
 */
export function listedGroup(list: readonly DeclaredOperation[]): ListedGroup | null {
  if (list.length === 0) return null;
  const notes: string[] = [];
  const operations = new Map<string, Operation>();
  for (const entry of list) {
    if (entry.problem) throw entry.problem;
    const k = operationKey(entry.operation!);
    if (operations.has(k)) notes.push(`the operation ${entry.text} is listed twice`);
    else operations.set(k, entry.operation!);
  }
  const identity = operationKey(IDENTITY_OPERATION);
  if (!operations.has(identity)) {
    notes.push("the list of operations lacks the identity x,y,z, which was added");
    operations.set(identity, IDENTITY_OPERATION);
  }
  const given = [...operations.values()];
  const closed = closeWithin(given, list);
  if (closed.length !== given.length) throw notClosed(given, list, closed.length);
  return { operations: closed, notes };
}

function closeWithin(given: readonly Operation[], list: readonly DeclaredOperation[]): Operation[] {
  try {
    return closeGroup(given);
  } catch (e) {
    throw e instanceof InputProblem ? e.at(wholeSpan(list)) : e;
  }
}

function notClosed(given: readonly Operation[], list: readonly DeclaredOperation[], count: number): InputProblem {
  const missing = missingProduct(given)!;
  const [first, second, product] = [missing.first, missing.second, missing.product].map(formatOperation);
  return new InputProblem(
    "operations-not-closed",
    `the ${given.length} operations listed are no group: ${first} after ${second} is ${product}, which the list lacks (closing it gives ${count})`,
    wholeSpan(list),
    "look for a wrong sign, letter or fraction in one of these two, or for lines that were lost",
  );
}

function wholeSpan(list: readonly DeclaredOperation[]): Span {
  return { start: list[0]!.span.start, end: list[list.length - 1]!.span.end };
}

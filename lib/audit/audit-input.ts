import { type CifBlock, type CifLoop, cellOf, columnName, findValue, type Numb, numbOf } from "../cif/index.ts";
import { InputProblem, type Span } from "../problem.ts";
import {
  type AtomSite,
  type Crystal,
  checkedTolerance,
  crystalFromBlock,
  crystalOf,
  type DeclaredSymmetry,
  declaredSymmetry,
  type Metric,
  metricOf,
  POSITION_TOLERANCE,
  type ResolvedSymmetry,
  readAtomSites,
  readCell,
  resolveSymmetry,
} from "../structure/index.ts";

/** A place in the file; `line` from 1, null for something absent. */
export interface Place {
  readonly dataName: string;
  readonly line: number | null;
}

/** A block prepared for the checks: as much of the structure as can be had, and why the rest cannot. */
export interface AuditInput {
  readonly block: CifBlock;
  /** Null where the cell is incomplete or impossible. */
  readonly metric: Metric | null;
  readonly declared: DeclaredSymmetry;
  /** The group in use; from other statements where the list of operations makes none. Null where nothing gives one. */
  readonly symmetry: ResolvedSymmetry | null;
  /** Rows of the atom list as written, none moved or merged. */
  readonly atoms: readonly AtomSite[];
  readonly crystal: Crystal | null;
  /** Faults that kept a part from being read. */
  readonly obstacles: readonly InputProblem[];
  /** Faults of syntax that the reader got over, in the order of the text. */
  readonly syntaxProblems: readonly InputProblem[];
  /** Positions closer than this are one; angstrom. */
  readonly tolerance: number;
  /** Place of a span under a data name. */
  readonly place: (dataName: string, span: Span | null) => Place;
}

/** Reads a block as far as it goes; never throws for faults of the file. @throws InputProblem `tolerance-impossible` */
export function auditInput(
  block: CifBlock,
  tolerance: number = POSITION_TOLERANCE,
  syntaxProblems: readonly InputProblem[] = [],
): AuditInput {
  checkedTolerance(tolerance);
  const obstacles: InputProblem[] = [];
  const attempt = <T>(work: () => T): T | null => {
    try {
      return work();
    } catch (e) {
      if (!(e instanceof InputProblem)) throw e;
      if (!obstacles.some((o) => o.message === e.message)) obstacles.push(e);
      return null;
    }
  };
  const declared = declaredSymmetry(block);
  const metric = attempt(() => metricOf(readCell(block)));
  const atoms = (metric && attempt(() => readAtomSites(block, metric)))?.sites ?? [];
  const whole = metric && attempt(() => crystalFromBlock(block, { tolerance }));
  const symmetry = whole
    ? { identified: whole.identified, source: symmetrySource(whole), notes: [], disagreements: whole.disagreements }
    : metric && attempt(() => otherStatements(declared, metric));
  const rebuilt = (m: Metric, { identified, source, disagreements }: ResolvedSymmetry) => {
    const parts = { name: block.name, metric: m, group: identified.group, identified, sites: atoms, tolerance };
    return attempt(() => crystalOf({ ...parts, symmetrySource: source, disagreements }));
  };
  const crystal = whole ?? (metric && symmetry && atoms.length > 0 ? rebuilt(metric, symmetry) : null);
  const place = placer(block.source);
  return { block, metric, declared, symmetry, atoms, crystal, obstacles, syntaxProblems, tolerance, place };
}

function symmetrySource({ symmetrySource: source }: Crystal): ResolvedSymmetry["source"] {
  return source === "given" ? "operations" : source;
}

/** The group by what the file says besides operations that are none. */
function otherStatements(declared: DeclaredSymmetry, metric: Metric): ResolvedSymmetry {
  try {
    return resolveSymmetry(declared, metric, () => null, "accept");
  } catch (e) {
    if (!(e instanceof InputProblem) || declared.operations.length === 0) throw e;
    return resolveSymmetry({ ...declared, operations: [] }, metric, () => null, "accept");
  }
}

function placer(source: string): AuditInput["place"] {
  let starts: number[] | null = null; // made when the first place is asked for
  return (dataName, span) => {
    if (!span) return { dataName, line: null };
    starts ??= lineStarts(source);
    let [low, high] = [0, starts.length];
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (starts[middle]! <= span.start) low = middle;
      else high = middle;
    }
    return { dataName, line: low + 1 };
  };
}

function lineStarts(source: string): number[] {
  const starts = [0];
  for (const end of source.matchAll(/\r\n|\n|\r/g)) starts.push(end.index + end[0].length);
  return starts;
}

/** A number of the file with its place. */
export interface StatedNumber extends Numb {
  /** Data name as written. */
  readonly name: string;
  readonly span: Span;
}

/** The number under a data name or one of its aliases; null where absent, unknown, or no number. */
export function statedNumber({ block }: Pick<AuditInput, "block">, name: string): StatedNumber | null {
  const found = findValue(block, name);
  const numb = numbOf(found?.value ?? null);
  if (!found || !numb) return null;
  const separate = numb.su === null ? numbOf(findValue(block, `${name}_su`)?.value ?? null) : null;
  return { ...numb, su: numb.su ?? separate?.value ?? null, name: found.name, span: found.value.span };
}

/** A text of the file with its place. */
export interface StatedText {
  readonly text: string;
  readonly name: string;
  readonly span: Span;
}

/** The text under a data name or one of its aliases; null where absent, unknown or empty. */
export function statedText({ block }: Pick<AuditInput, "block">, name: string): StatedText | null {
  const found = findValue(block, name);
  if (found?.value.kind !== "text" || found.value.text.trim() === "") return null;
  return { text: found.value.text.trim(), name: found.name, span: found.value.span };
}

/** A number in a row of a loop, with its place; null where absent, unknown, or no number. */
export function rowNumber(loop: CifLoop, row: number, name: string): StatedNumber | null {
  const value = cellOf(loop, row, name);
  const numb = numbOf(value);
  if (!value || !numb) return null;
  const separate = numb.su === null ? numbOf(cellOf(loop, row, `${name}_su`)) : null;
  return { ...numb, su: numb.su ?? separate?.value ?? null, name: columnName(loop, name) ?? name, span: value.span };
}

/** A text in a row of a loop; null where absent, unknown or empty. */
export function rowText(loop: CifLoop, row: number, name: string): StatedText | null {
  const value = cellOf(loop, row, name);
  if (value?.kind !== "text" || value.text.trim() === "") return null;
  return { text: value.text.trim(), name: columnName(loop, name) ?? name, span: value.span };
}

/** Half a unit of the last digit written. */
export function rounding({ decimals }: Pick<Numb, "decimals">): number {
  return 0.5 * 10 ** -decimals;
}

/**
 * The same for a parameter of an atom: 0 for what is written as an exact fraction, as symmetry fixes them (0, 0.5, 0.125),
 * without an uncertainty.
 */
export function parameterRounding(n: Pick<Numb, "decimals" | "value" | "su">): number {
  return n.su === null && Number.isInteger(24 * n.value) ? 0 : rounding(n);
}

/** A stated number as a side of a comparison. */
export function statementOf({ name, text, su, decimals }: StatedNumber): { what: string; value: string } {
  return { what: name, value: su === null ? text : `${text}(${Math.round(su * 10 ** decimals)})` };
}

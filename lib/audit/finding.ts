import type { Place } from "./audit-input.ts";

/**
 * `contradiction`: two statements of the file cannot both be true, beyond rounding and standard uncertainties. `doubt`:
 * physically or statistically unlikely. `remark`: worth knowing.
 */
export type Severity = "contradiction" | "doubt" | "remark";

/** What a check looks for, by an id in plain words. One id has one severity. */
export interface Criterion {
  readonly id: string;
  readonly severity: Severity;
  /** When it is reported, with the limits in use. */
  readonly criterion: string;
  /** Where the criterion comes from: a definition, a law, a paper. */
  readonly source: string;
  /** What the user can do. */
  readonly advice: string;
}

/** One side of a comparison. */
export interface Statement {
  /** Who says it: a data name, or what it was computed from. */
  readonly what: string;
  readonly value: string | number;
}

/** The two statements compared. Numbers are in `unit`; keys without meaning are left out. */
export interface Evidence {
  readonly stated: Statement;
  readonly against: Statement;
  readonly difference?: number;
  /** What the difference was allowed to be. */
  readonly tolerance?: number;
  readonly unit?: string;
  /** Further places with the same fault, shown or counted. */
  readonly also?: readonly string[];
}

/** Where a finding lies; `line` counts from 1, and is absent for what is missing. */
export interface Where {
  readonly dataName: string;
  readonly line?: number;
}

/** What a check found. */
export interface Finding {
  readonly id: string;
  readonly severity: Severity;
  readonly message: string;
  readonly where: Where;
  readonly evidence: Evidence;
  readonly advice: string;
}

/** A finding by its criterion. @throws RangeError if a number of the evidence is not finite */
export function finding(criterion: Criterion, where: Place, message: string, evidence: Evidence): Finding {
  const { id, severity, advice } = criterion;
  const numbers = [evidence.stated.value, evidence.against.value, evidence.difference ?? 0, evidence.tolerance ?? 0];
  const odd = numbers.find((n) => typeof n === "number" && !Number.isFinite(n));
  if (odd !== undefined) throw new RangeError(`evidence of ${id} is ${odd}`);
  return { id, severity, message, where: whereOf(where), evidence, advice };
}

function whereOf({ dataName, line }: Place): Where {
  return line === null ? { dataName } : { dataName, line };
}

/** Names beyond the first that a sentence still lists. */
const SHOWN = 5;

/** `A, B, C, D, E and 3 more` */
export function some(names: readonly string[]): string {
  const shown = names.slice(0, SHOWN).join(", ");
  return names.length > SHOWN ? `${shown} and ${names.length - SHOWN} more` : shown;
}

/** `1 bond`, `3 bonds` */
export function count(n: number, noun: string): string {
  return `${n} ${noun}${n === 1 ? "" : "s"}`;
}

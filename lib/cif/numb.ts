import type { CifValue } from "./value.ts";

/** A CIF number with its standard uncertainty. */
export interface Numb {
  readonly value: number;
  /** Standard uncertainty in the unit of the value, or null where none is written. */
  readonly su: number | null;
  /** The decimal exactly as written, without the standard uncertainty. */
  readonly text: string;
  /** Place of the last digit written: the value is an integer times 10^-decimals. "1.20" 2, "1.2E-4" 5, "12E2" -2. */
  readonly decimals: number;
}

const NUMB = /^([+-]?(?:\d+(?:\.(\d*))?|\.(\d+)))(?:\((\d+)\))?([eE][+-]?\d+)?(?:\((\d+)\))?$/;

/**
 * Reads a number: an optional sign, digits with at most one point, an optional exponent and an optional standard
 * uncertainty in units of the last digit, which stands behind the exponent by the rules and often before it.
 * Returns null for everything else, among it an unfinished uncertainty such as "1.23(" and numbers beyond the range of
 * floating point.
 */
export function parseNumb(text: string): Numb | null {
  const match = NUMB.exec(text);
  if (!match) return null;
  const [, mantissa, fraction, bareFraction, suBefore, exponent = "", suBehind] = match;
  if (suBefore !== undefined && suBehind !== undefined) return null;
  const digits = suBefore ?? suBehind;
  const decimals = (fraction ?? bareFraction ?? "").length - Number(exponent.slice(1) || 0);
  const value = Number(mantissa + exponent);
  const su = digits === undefined ? null : Number(`${digits}e${-decimals}`);
  if (!Number.isFinite(value) || !Number.isSafeInteger(decimals) || !Number.isFinite(su ?? 0)) return null;
  return { value: value + 0, su, text: mantissa + exponent, decimals }; // + 0 turns -0 into 0
}

/** Number in a value, quoted or not (real files quote numbers); null for `?`, `.`, lists, tables and other text. */
export function numbOf(value: CifValue | null): Numb | null {
  return value?.kind === "text" ? parseNumb(value.text.trim()) : null;
}

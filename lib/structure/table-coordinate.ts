import type { MeasuredNumber, TableCoordinate } from "./site-table.ts";

/** One term of a coordinate: a multiple of x, y or z (0, 1, 2), or a constant. */
export interface CoordinateTerm {
  readonly letter: number | null;
  readonly value: number;
  readonly su: number | null;
}

/** The sum of terms. */
export function coordinateOf(terms: readonly CoordinateTerm[]): TableCoordinate {
  const coefficients: [number, number, number] = [0, 0, 0];
  let constant = 0;
  let su: number | null = null;
  for (const term of terms) {
    if (term.letter !== null) coefficients[term.letter]! += term.value;
    else {
      constant += term.value;
      su = term.su ?? su;
    }
  }
  return { coefficients, constant, su };
}

/** `x+1/2`, `0.2568(3)`: letters first. */
export function formatCoordinate({ coefficients, constant, su }: TableCoordinate): string {
  let text = "";
  coefficients.forEach((c, i) => {
    if (c === 0) return;
    const size = Math.abs(c) === 1 ? "" : plain(Math.abs(c));
    text += `${c < 0 ? "-" : text ? "+" : ""}${size}${"xyz"[i]}`;
  });
  if (text && constant === 0 && su === null) return text;
  const number = formatMeasured({ value: constant, su });
  return text && !number.startsWith("-") ? `${text}+${number}` : `${text}${number}`;
}

/** Digits that an s.u. is looked for in. */
const MOST_DIGITS = 12;

/** A number with its s.u. in units of the last digit. */
export function formatMeasured({ value, su }: MeasuredNumber): string {
  if (su === null) return plain(value);
  const written = plain(value);
  const decimals = written.includes("e") || !written.includes(".") ? 0 : written.length - written.indexOf(".") - 1;
  let digits = decimals;
  while (digits < MOST_DIGITS && Math.abs(su * 10 ** digits - Math.round(su * 10 ** digits)) > 1e-6) digits++;
  return `${value.toFixed(digits)}(${Math.round(su * 10 ** digits)})`;
}

/** Digits enough to read the same double again. */
function plain(x: number): string {
  return String(x + 0);
}

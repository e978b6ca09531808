/** Largest distance of a computed coefficient from its closed form; dimensionless, far above rounding in our sums. */
const CLOSED_TOLERANCE = 1e-9;

/** A number as (p/q) sqrt r, with small p, q and r. */
export interface ClosedForm {
  readonly p: number;
  readonly q: number;
  readonly r: number;
}

const DENOMINATORS = [1, 2, 3, 4, 5, 6, 8, 12] as const;
const RADICANDS = [1, 2, 3, 5, 6, 15] as const;

/** The simplest form p/q sqrt r next to a number, or null. */
export function closedForm(x: number): ClosedForm | null {
  if (Math.abs(x) < CLOSED_TOLERANCE) return { p: 0, q: 1, r: 1 };
  for (const r of RADICANDS) {
    for (const q of DENOMINATORS) {
      const p = Math.round((x * q) / Math.sqrt(r));
      if (p !== 0 && Math.abs(p) <= 24 && Math.abs((p * Math.sqrt(r)) / q - x) < CLOSED_TOLERANCE) return { p, q, r };
    }
  }
  return null;
}

/** The number, put on its closed form where it has one: zero and integers become exact. */
export function tidy(x: number): number {
  const form = closedForm(x);
  return form ? (form.p * Math.sqrt(form.r)) / form.q + 0 : x;
}

/** `2b`, `-b`, `sqrt3 b`, `b/2`, `3sqrt3/2 b`; with four decimals where there is no closed form. */
export function formatTerm(x: number, symbol: string): string {
  const form = closedForm(x);
  if (!form) return `${Number(x.toFixed(4))} ${symbol}`;
  const sign = form.p < 0 ? "-" : "";
  const size = Math.abs(form.p);
  const root = form.r > 1 ? `sqrt${form.r}` : "";
  const factor = `${size > 1 ? size : ""}${root}`;
  if (form.q === 1) return `${sign}${factor}${root ? " " : ""}${symbol}`;
  return root || size > 1 ? `${sign}${factor || 1}/${form.q} ${symbol}` : `${sign}${symbol}/${form.q}`;
}

/** Sum of terms in reading order: `a-2b`, `.` for zero. */
export function formatSum(coefficients: readonly number[], symbols: readonly string[], zero = "."): string {
  let text = "";
  coefficients.forEach((c, k) => {
    if (c === 0) return;
    const term = formatTerm(c, symbols[k]!);
    text += text === "" || term.startsWith("-") ? term : `+${term}`;
  });
  return text || zero;
}

import type { MeasuredQuantity } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";
import { numberWithSu } from "./number-with-su.ts";

/**
 * A value with its s.u. in units of the last digit; one that symmetry fixes without trailing zeros; one without s.u. with
 * the decimals given.
 */
export function quantity({ value, su }: MeasuredQuantity, decimals: number): string {
  if (su === 0) return String(Number(formatNumber(value, 4)));
  return numberWithSu(value, su, decimals);
}

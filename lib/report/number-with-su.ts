import { formatNumber } from "./format-number.ts";

/** An s.u. is written with two digits up to this, with one beyond: the rule of 19 of Acta Cryst. */
const RULE = 19;

/**
 * A number with its s.u. in units of the last digit, `0.1234(12)`; with the decimals given where there is no s.u.
 */
export function numberWithSu(value: number, su: number | null, decimals: number): string {
  if (su === null || !(su > 0)) return formatNumber(value, decimals);
  let places = 1 - Math.floor(Math.log10(su));
  let digits = Math.round(su * 10 ** places);
  if (digits > RULE) {
    places--;
    digits = Math.round(su * 10 ** places);
  }
  if (places >= 0) return `${formatNumber(value, Math.min(places, 15))}(${digits})`;
  const unit = 10 ** -places;
  return `${formatNumber(Math.round(value / unit) * unit, 0)}(${formatNumber(digits * unit, 0)})`;
}

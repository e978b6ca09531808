/** A number with fixed decimals, never `-0.00` and never NaN. @throws RangeError if it is not finite */
export function formatNumber(x: number, decimals: number): string {
  if (!Number.isFinite(x)) throw new RangeError(`not a finite number: ${x}`);
  const text = x.toFixed(decimals);
  return /^-0(\.0*)?$/.test(text) ? text.slice(1) : text;
}
